// SPDX-License-Identifier: GPL-2.0-or-later
// Which pipe a source joins: the nearest, a mainline before a lateral only where both lie equally near within the tolerance.
#include "core/network/joining.h"
#include "tests/support/networksketch.h"
#include "tests/support/planmeasures.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::sketched;

namespace
{

  struct Nearest
  {
      int drawn = -1;
      double alongM = 0.0;
      double distanceM = 0.0;
  };

  Nearest nearest(
    const Drawing &drawing, const PlanPoint &place, double toleranceM, const PlanMeasure &measure = PlanarMeasure() )
  {
    std::vector<Finding> findings;
    Monitor monitor;
    const CanonicalDrawing canonical = canonicalDrawing( drawing, measure, 1, findings, monitor );
    const std::optional<NearestPipe> pipe = nearestPipe( canonical, measure, place, 0, toleranceM );
    if ( !pipe )
      return {};
    return { canonical.lines[static_cast<std::size_t>( pipe->on.line )].drawn, pipe->on.alongM, pipe->distanceM };
  }

} // namespace

class TestNearestPipe : public QObject
{
    Q_OBJECT

  private slots:
    void nearestPipe_data();
    void nearestPipe();
    void orderDoesNotMatter();
    void distanceIsOnTheGround();
    void noPipe();
};

void TestNearestPipe::nearestPipe_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<int>( "line" );
  QTest::addColumn<double>( "along" );
  QTest::addColumn<double>( "distance" );
  QTest::newRow( "an interior" ) << "main 0 0, 10 0" << 4.0 << 3.0 << 0 << 4.0 << 3.0;
  QTest::newRow( "an end" ) << "main 0 0, 10 0" << 13.0 << 4.0 << 0 << 10.0 << 5.0;
  QTest::newRow( "a vertex" ) << "main 0 0, 10 0, 10 10" << 13.0 << -4.0 << 0 << 10.0 << 5.0;
  QTest::newRow( "on the pipe" ) << "main 0 0, 10 0" << 7.0 << 0.0 << 0 << 7.0 << 0.0;
  QTest::newRow( "the nearer of two mainlines" ) << "main 0 0, 10 0; main 0 4, 10 4" << 5.0 << 3.0 << 1 << 5.0 << 1.0;
  QTest::newRow( "a lateral that is nearer" ) << "main 0 0, 10 0; lateral 0 4, 10 4" << 5.0 << 3.0 << 1 << 5.0 << 1.0;
  QTest::newRow( "a mainline that is nearer" ) << "lateral 0 0, 10 0; main 0 4, 10 4" << 5.0 << 3.0 << 1 << 5.0 << 1.0;
  QTest::newRow( "equally near: the mainline" ) << "lateral 0 0, 10 0; main 0 4, 10 4" << 5.0 << 2.0 << 1 << 5.0 << 2.0;
  QTest::newRow( "the mainline farther by the tolerance" )
    << "lateral 0 0, 10 0; main 0 4.125, 10 4.125" << 5.0 << 2.0 << 1 << 5.0 << 2.125;
  QTest::newRow( "the mainline farther by more" )
    << "lateral 0 0, 10 0; main 0 4.1251, 10 4.1251" << 5.0 << 2.0 << 0 << 5.0 << 2.0;
  QTest::newRow( "at their joint: the mainline" )
    << "lateral 5 0, 5 5; main 0 0, 10 0" << 5.0 << 0.0 << 1 << 5.0 << 0.0;
}

void TestNearestPipe::nearestPipe()
{
  QFETCH( QString, sketch );
  QFETCH( double, x );
  QFETCH( double, y );
  const Nearest pipe = nearest( sketched( sketch.toStdString() ), { x, y }, 0.125 );
  QTEST( pipe.drawn, "line" );
  QTEST( pipe.alongM, "along" );
  QTEST( pipe.distanceM, "distance" );
}

void TestNearestPipe::orderDoesNotMatter()
{
  // Equally near to four lines: one and the same is chosen, however they were drawn.
  const Drawing drawing = sketched( "lateral 0 4, 10 4; main 0 0, 10 0; main 3 -3, 3 7; main 7 -3, 7 7" );
  const auto place = [&]( const Drawing &drawn ) {
    const Nearest pipe = nearest( drawn, { 5, 2 }, 0.1 );
    return test::verticesOf( drawn, drawn.lines[static_cast<std::size_t>( pipe.drawn )] );
  };
  for ( unsigned seed = 1; seed < 20; ++seed )
  {
    std::vector<PlanPoint> vertices = place( test::redrawn( drawing, seed ) );
    if ( vertices.back() < vertices.front() )
      std::reverse( vertices.begin(), vertices.end() );
    QVERIFY( vertices == ( std::vector<PlanPoint> { { 0, 0 }, { 10, 0 } } ) );
  }
}

void TestNearestPipe::distanceIsOnTheGround()
{
  // In degrees at 60 north the line that looks farther along x is the nearer.
  const test::GlobeLikeMeasure measure;
  const Drawing drawing = sketched( "main 10.0015 59.9, 10.0015 60.1; main 9.9 60.001, 10.1 60.001" );
  const Nearest pipe = nearest( drawing, { 10, 60 }, 0.1, measure );
  QCOMPARE( pipe.drawn, 0 );
  STILLHEAD_NEAR( pipe.distanceM, 0.0015 * 111000.0 * 0.5, 1e-3 );
}

void TestNearestPipe::noPipe()
{
  QVERIFY( !stillhead::nearestPipe( CanonicalDrawing(), PlanarMeasure(), { 0, 0 }, 0, 0.1 ) );
}

QTEST_APPLESS_MAIN( TestNearestPipe )
#include "testnearestpipe.moc"
