// SPDX-License-Identifier: GPL-2.0-or-later
// Single places of a result: figures on pipe agree with the result's own at nodes, cuts and extremes; off pipe they are
// those of a pipe that would lie there; and the way from the source follows joined pipe by the shortest length.
#include "core/job/placeprobe.h"

#include "core/job/wayprofile.h"
#include "tests/support/jobsetup.h"

#include <QTest>

#include <cmath>

using namespace stillhead;
using namespace stillhead::test;

namespace
{

  //! The drawn line number \a drawn, as the result numbers it.
  int lineOf( const StaticResult &result, int drawn )
  {
    for ( std::size_t i = 0; i < result.drawing.lines.size(); ++i )
    {
      if ( result.drawing.lines[i].drawn == drawn )
        return static_cast<int>( i );
    }
    return -1;
  }

} // namespace

class TestPlaceProbe : public QObject
{
    Q_OBJECT

  private slots:
    void agreesWithThePieces();
    void answersOffThePipe();
    void knowsNothingWithoutWater();
    void wayIsTheShortest_data();
    void wayIsTheShortest();
    void noWayToPipeApart();
    void profileFollowsTheWay();
};

void TestPlaceProbe::agreesWithThePieces()
{
  // Surveyed: from 10 m down to 90 m below the level and up again.
  JobSetup setup( "main 0 0 90, 100 0 10, 200 0 70; lateral 100 0 10, 100 50 30" );
  const StaticResult result = setup.solve();
  TileCache cache( *setup.terrain );
  PlaceProbe probe( result, setup.samePlan, cache, true, setup.job.specificWeightNPerM3 );
  int checked = 0;
  for ( const Piece &piece : result.pieces )
  {
    const int line = result.network.spans[static_cast<std::size_t>( piece.span )].line;
    const PlaceFigures lowest = probe.onPipe( { line, piece.lowestAtM } );
    QCOMPARE( lowest.pipeM, piece.lowestM );
    QCOMPARE( lowest.highPa, piece.pressureHighPa );
    const PlaceFigures highest = probe.onPipe( { line, piece.highestAtM } );
    QCOMPARE( highest.lowPa, piece.pressureLowPa );
    const PlaceFigures inside = probe.onPipe( { line, ( piece.fromM + piece.toM ) / 2.0 } );
    QCOMPARE( inside.piece, static_cast<int>( &piece - result.pieces.data() ) );
    ++checked;
  }
  QVERIFY( checked > 4 );
}

void TestPlaceProbe::answersOffThePipe()
{
  JobSetup setup( "main 0 0, 100 0" );
  setup.job.source.low = 80.0;
  const StaticResult result = setup.solve();
  TileCache cache( *setup.terrain );
  PlaceProbe probe( result, setup.samePlan, cache, false, setup.job.specificWeightNPerM3 );
  // Flat ground at 0 m, 2 m of cover, water at 100 and 80 m; 1000 N/m3.
  const std::optional<PlaceFigures> figures = probe.offPipe( { 500.0, 400.0 }, 2.0 );
  QVERIFY( figures );
  QCOMPARE( figures->groundM, 0.0 );
  QCOMPARE( figures->pipeM, -2.0 );
  QCOMPARE( figures->highPa, 102000.0 );
  QCOMPARE( figures->lowPa, 82000.0 );
  QCOMPARE( figures->piece, -1 );
  // Limits of 20 and 60 kPa, laterals 10 and 30.
  setup.job.limits.lateralLeastPa = 10000.0;
  setup.job.limits.lateralMostPa = 30000.0;
  QCOMPARE( marginsOf( *figures, setup.job.limits, Role::Mainline ).overPa, 42000.0 );
  QCOMPARE( marginsOf( *figures, setup.job.limits, Role::Mainline ).underPa, -62000.0 );
  QCOMPARE( marginsOf( *figures, setup.job.limits, Role::Lateral ).overPa, 72000.0 );
  QVERIFY( std::isnan( probe.offPipe( { 1e9, 0.0 }, 0.0 )->highPa ) );
}

void TestPlaceProbe::knowsNothingWithoutWater()
{
  JobSetup setup( "main 0 0, 100 0; main 0 500, 100 500" );
  const StaticResult result = setup.solve();
  TileCache cache( *setup.terrain );
  PlaceProbe probe( result, setup.samePlan, cache, false, setup.job.specificWeightNPerM3 );
  const PlaceFigures figures = probe.onPipe( { lineOf( result, 1 ), 50.0 } );
  QVERIFY( figures.piece >= 0 );
  QVERIFY( std::isnan( figures.highPa ) && std::isnan( figures.levels.highM ) );
  QCOMPARE( figures.groundM, 0.0 );
}

void TestPlaceProbe::wayIsTheShortest_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<int>( "drawn" );
  QTest::addColumn<double>( "along" );
  QTest::addColumn<double>( "length" );
  QTest::addColumn<int>( "legs" );
  QTest::newRow( "along one line" ) << "main 0 0, 100 0" << 0 << 60.0 << 60.0 << 1;
  QTest::newRow( "through a joint" ) << "main 0 0, 100 0; main 40 0, 40 30" << 1 << 25.0 << 65.0 << 2;
  QTest::newRow( "joint on the way" ) << "main 0 0, 100 0; main 40 0, 40 30" << 0 << 90.0 << 90.0 << 1;
  // A loop: the far side of the square is nearer by the straight side.
  QTest::newRow( "round a loop" ) << "main 0 0, 100 0; main 0 0, 0 90, 100 90, 100 0" << 1 << 250.0 << 130.0 << 2;
}

void TestPlaceProbe::wayIsTheShortest()
{
  QFETCH( QString, sketch );
  QFETCH( int, drawn );
  QFETCH( double, along );
  QFETCH( double, length );
  QFETCH( int, legs );
  JobSetup setup( sketch.toStdString() );
  const StaticResult result = setup.solve();
  const int line = lineOf( result, drawn );
  const CanonicalLine &on = result.drawing.lines[static_cast<std::size_t>( line )];
  const double alongM = on.reversed ? on.lengthM - along : along;
  const std::vector<WayLeg> way = wayToPlace( result, { line, alongM } );
  QCOMPARE( static_cast<int>( way.size() ), legs );
  double sum = 0.0;
  for ( const WayLeg &leg : way )
    sum += leg.lengthM();
  QCOMPARE( sum, length );
  QCOMPARE( way.back().line, line );
  QCOMPARE( way.back().toM, alongM );
}

void TestPlaceProbe::noWayToPipeApart()
{
  JobSetup setup( "main 0 0, 100 0; main 0 500, 100 500" );
  const StaticResult result = setup.solve();
  QVERIFY( wayToPlace( result, { lineOf( result, 1 ), 50.0 } ).empty() );
}

void TestPlaceProbe::profileFollowsTheWay()
{
  // Down 80 m over 100 m, then up a lateral that was drawn towards the joint; water at 100 m, limits 20 and 60 kPa.
  JobSetup setup( "main 0 0 90, 100 0 10; lateral 100 50 30, 100 0 10" );
  const StaticResult result = setup.solve();
  TileCache cache( *setup.terrain );
  PlaceProbe probe( result, setup.samePlan, cache, true, setup.job.specificWeightNPerM3 );
  const int lateral = lineOf( result, 1 );
  const CanonicalLine &line = result.drawing.lines[static_cast<std::size_t>( lateral )];
  const std::vector<WayLeg> way = wayToPlace( result, { lateral, line.reversed ? line.lengthM : 0.0 } );
  const std::vector<WayPoint> points = wayProfile( result, way, setup.job.limits, probe );
  QCOMPARE( points.front().distanceM, 0.0 );
  QCOMPARE( points.front().figures.pipeM, 90.0 );
  QCOMPARE( points.back().distanceM, 150.0 );
  QCOMPARE( points.back().figures.pipeM, 30.0 );
  QCOMPARE( points.back().figures.highPa, 70000.0 );
  for ( std::size_t i = 1; i < points.size(); ++i )
    QVERIFY( points[i].distanceM >= points[i - 1].distanceM );
  QCOMPARE( points.back().mostElevationM, 40.0 );
  QCOMPARE( points.back().leastElevationM, 80.0 );
}

QTEST_GUILESS_MAIN( TestPlaceProbe )
#include "testplaceprobe.moc"
