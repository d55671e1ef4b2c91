// SPDX-License-Identifier: GPL-2.0-or-later
// Cleaning, direction and order of what was drawn.
#include "core/network/canonicaldrawing.h"
#include "tests/support/networksketch.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::sketched;

namespace
{

  struct Canonical
  {
      CanonicalDrawing drawing;
      std::vector<Finding> findings;
  };

  Canonical canonical( const Drawing &drawing, unsigned threads = 1 )
  {
    Canonical result;
    Monitor monitor;
    result.drawing = canonicalDrawing( drawing, PlanarMeasure(), threads, result.findings, monitor );
    return result;
  }

  std::vector<int> drawnOrder( const CanonicalDrawing &drawing )
  {
    std::vector<int> order;
    for ( const CanonicalLine &line : drawing.lines )
      order.push_back( line.drawn );
    return order;
  }

  std::size_t duplicates( const Canonical &result )
  {
    return static_cast<std::size_t>( std::count_if( result.findings.begin(), result.findings.end(),
      []( const Finding &finding ) { return finding.code == FindingCode::Duplicate; } ) );
  }

} // namespace

using Numbers = std::vector<int>;
Q_DECLARE_METATYPE( Numbers )

class TestCanonicalDrawing : public QObject
{
    Q_OBJECT

  private slots:
    void direction_data();
    void direction();
    void order_data();
    void order();
    void leftOut_data();
    void leftOut();
    void duplicates_data();
    void duplicates();
    void placesAlong();
    void repeatedVertices();
    void surveyRunsWithItsVertices();
    void emptyDrawing();
};

void TestCanonicalDrawing::direction_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<bool>( "reversed" );
  QTest::newRow( "from the lesser x" ) << "main 0 5, 1 0" << false;
  QTest::newRow( "against it" ) << "main 1 0, 0 5" << true;
  QTest::newRow( "equal x: from the lesser y" ) << "main 1 3, 0 2, 1 1" << true;
  QTest::newRow( "a ring: by its next vertices" ) << "main 0 0, 1 0, 0 1, 0 0" << true;
  QTest::newRow( "a ring the other way" ) << "main 0 0, 0 1, 1 0, 0 0" << false;
  QTest::newRow( "there and back" ) << "main 0 0, 1 0, 0 0" << false;
  QTest::newRow( "there and back, told by Z" ) << "main 0 0 7, 1 0 5, 0 0 6" << true;
}

void TestCanonicalDrawing::direction()
{
  QFETCH( QString, sketch );
  QFETCH( bool, reversed );
  const Drawing drawing = sketched( sketch.toStdString() );
  const Canonical result = canonical( drawing );
  QCOMPARE( result.drawing.lines.at( 0 ).reversed, reversed );
  std::vector<PlanPoint> vertices = drawing.vertices;
  if ( reversed )
    std::reverse( vertices.begin(), vertices.end() );
  QVERIFY( result.drawing.vertices == vertices );
}

void TestCanonicalDrawing::order_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<Numbers>( "order" );
  QTest::newRow( "by first vertex" ) << "main 5 0, 6 0; main 0 0, 9 9; main 0 -1, 9 9" << Numbers { 2, 1, 0 };
  QTest::newRow( "by later vertices" ) << "main 0 0, 2 0; main 0 0, 1 5; main 0 0, 1 4" << Numbers { 2, 1, 0 };
  QTest::newRow( "the shorter of two that begin alike" ) << "main 0 0, 1 0, 2 0; main 0 0, 1 0" << Numbers { 1, 0 };
  QTest::newRow( "mainline before lateral" ) << "lateral 0 0, 1 0; main 1 0, 0 0" << Numbers { 1, 0 };
  QTest::newRow( "by the system's name" )
    << "main system=b 0 0, 1 0; main system=a 0 0, 1 0; main 0 0, 1 0" << Numbers { 2, 1, 0 };
  QTest::newRow( "by cover" ) << "main cover=2 0 0, 1 0; main cover=1 0 0, 1 0" << Numbers { 1, 0 };
  QTest::newRow( "by Z" ) << "main 0 0 5, 1 0 6; main 0 0 nan, 1 0 6; main 0 0 4, 1 0 6" << Numbers { 2, 0, 1 };
}

void TestCanonicalDrawing::order()
{
  QFETCH( QString, sketch );
  QFETCH( Numbers, order );
  const Drawing drawing = sketched( sketch.toStdString() );
  QVERIFY( drawnOrder( canonical( drawing ).drawing ) == order );
}

void TestCanonicalDrawing::leftOut_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<int>( "left" );
  QTest::addColumn<double>( "x" );
  QTest::newRow( "no vertex" ) << "main 0 0, 1 0; main" << 1 << NOT_A_FIGURE;
  QTest::newRow( "one vertex" ) << "main 0 0, 1 0; main 7 7" << 1 << 7.0;
  QTest::newRow( "without length" ) << "main 0 0, 1 0; main 7 7, 7 7, 7 7" << 1 << 7.0;
  QTest::newRow( "a coordinate that is not a number" ) << "main 0 0, 1 0; main nan 3, 8 7, 9 9" << 1 << 8.0;
  QTest::newRow( "an endless coordinate" ) << "main 0 0, 1 0; main 3 3, 8 inf" << 1 << 3.0;
  QTest::newRow( "nothing but not-a-number" ) << "main 0 0, 1 0; main nan nan, nan nan" << 1 << NOT_A_FIGURE;
  QTest::newRow( "nothing but a riser" ) << "main 0 0 1, 1 0 1; main 7 7 1, 7 7 5" << 1 << 7.0;
  QTest::newRow( "there and back stays" ) << "main 0 0, 1 0; main 7 7, 8 7, 7 7" << 0 << 0.0;
}

void TestCanonicalDrawing::leftOut()
{
  QFETCH( QString, sketch );
  QFETCH( int, left );
  QFETCH( double, x );
  const Drawing drawing = sketched( sketch.toStdString() );
  const Canonical result = canonical( drawing );
  QCOMPARE( result.findings.size(), static_cast<std::size_t>( left ) );
  QCOMPARE( result.drawing.lines.size() + result.findings.size(), drawing.lines.size() );
  if ( left == 0 )
    return;
  QVERIFY( result.findings[0].code == FindingCode::NoLength );
  QCOMPARE( result.findings[0].line, 1 );
  STILLHEAD_SAME( result.findings[0].place.x, x );
}

void TestCanonicalDrawing::duplicates_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<int>( "count" );
  QTest::newRow( "twice" ) << "main 0 0, 1 1, 2 0; main 0 0, 1 1, 2 0" << 1;
  QTest::newRow( "the other way round" ) << "main 0 0, 1 1, 2 0; main 2 0, 1 1, 0 0" << 1;
  QTest::newRow( "three times" ) << "main 0 0, 1 1; main 0 0, 1 1; main 1 1, 0 0" << 2;
  QTest::newRow( "as another role" ) << "main 0 0, 1 1; lateral 0 0, 1 1" << 1;
  QTest::newRow( "with a repeated vertex" ) << "main 0 0, 1 1; main 0 0, 0 0, 1 1" << 1;
  QTest::newRow( "with another Z" ) << "main 0 0 1, 1 1 1; main 0 0 2, 1 1 2" << 1;
  QTest::newRow( "a vertex more is no duplicate" ) << "main 0 0, 2 2; main 0 0, 1 1, 2 2" << 0;
  QTest::newRow( "two pairs" ) << "main 0 0, 1 1; main 5 5, 6 6; main 0 0, 1 1; main 5 5, 6 6" << 2;
}

void TestCanonicalDrawing::duplicates()
{
  QFETCH( QString, sketch );
  QFETCH( int, count );
  const Drawing drawing = sketched( sketch.toStdString() );
  const Canonical result = canonical( drawing );
  QCOMPARE( result.drawing.lines.size(), drawing.lines.size() );
  QCOMPARE( ::duplicates( result ), static_cast<std::size_t>( count ) );
  for ( const Finding &finding : result.findings )
    QVERIFY( finding.line != finding.otherLine && finding.otherLine >= 0 );
}

void TestCanonicalDrawing::placesAlong()
{
  const Canonical result = canonical( sketched( "main 0 0, 3 4, 3 10" ) );
  const CanonicalLine &line = result.drawing.lines[0];
  STILLHEAD_SAME( line.lengthM, 11.0 );
  QCOMPARE( result.drawing.legAt( line, 0.0 ), std::size_t( 0 ) );
  QCOMPARE( result.drawing.legAt( line, 4.999 ), std::size_t( 0 ) );
  QCOMPARE( result.drawing.legAt( line, 5.0 ), std::size_t( 1 ) );
  QCOMPARE( result.drawing.legAt( line, 11.0 ), std::size_t( 1 ) );
  QVERIFY( result.drawing.placeAt( line, -1.0 ) == ( PlanPoint { 0, 0 } ) );
  QVERIFY( result.drawing.placeAt( line, 5.0 ) == ( PlanPoint { 3, 4 } ) );
  QVERIFY( result.drawing.placeAt( line, 8.0 ) == ( PlanPoint { 3, 7 } ) );
  QVERIFY( result.drawing.placeAt( line, 11.0 ) == ( PlanPoint { 3, 10 } ) );
  QVERIFY( result.drawing.placeAt( line, 99.0 ) == ( PlanPoint { 3, 10 } ) );
}

void TestCanonicalDrawing::repeatedVertices()
{
  QCOMPARE( canonical( sketched( "main 0 0, 0 0, 1 0, 1 0, 1 0, 2 0" ) ).drawing.vertices.size(), std::size_t( 3 ) );
  // A vertex may come back later, and a riser repeats its place at another Z.
  QCOMPARE( canonical( sketched( "main 0 0, 1 0, 0 0, 1 0" ) ).drawing.vertices.size(), std::size_t( 4 ) );
  const Canonical riser = canonical( sketched( "main 0 0 1, 1 0 1, 1 0 4, 1 0 4, 2 0 4" ) );
  QCOMPARE( riser.drawing.vertices.size(), std::size_t( 4 ) );
  STILLHEAD_SAME( riser.drawing.alongM[1], riser.drawing.alongM[2] );
}

void TestCanonicalDrawing::surveyRunsWithItsVertices()
{
  const Canonical result = canonical( sketched( "main 9 0 3, 5 0 2, 1 0 1; main 0 0 7, 0 1 8" ) );
  const std::vector<double> z { 7, 8, 1, 2, 3 };
  QVERIFY( result.drawing.surveyZM == z );
  QVERIFY( result.drawing.lines[1].reversed );
}

void TestCanonicalDrawing::emptyDrawing()
{
  const Canonical result = canonical( Drawing(), 4 );
  QVERIFY( result.drawing.lines.empty() && result.findings.empty() );
}

QTEST_APPLESS_MAIN( TestCanonicalDrawing )
#include "testcanonicaldrawing.moc"
