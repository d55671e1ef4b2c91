// SPDX-License-Identifier: GPL-2.0-or-later
// Connected pipe that is over or short, its worst place, and the extremes of zones. The drawn Z is the pipe; the water
// stands at 100 m, LEAST 20 kPa is met up to 80 m and MOST 60 kPa down to 40 m.
#include "tests/support/jobsetup.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::JobSetup;

namespace
{

  std::vector<Stretch> stretches( const StaticResult &result, bool over )
  {
    std::vector<Stretch> found;
    std::copy_if( result.stretches.begin(), result.stretches.end(), std::back_inserter( found ),
      [over]( const Stretch &stretch ) { return stretch.over == over; } );
    return found;
  }

  PlanPoint placeOf( const StaticResult &result, const Extreme &extreme )
  {
    return result.drawing.placeAt(
      test::lineOf( result, result.pieces[static_cast<std::size_t>( extreme.piece )] ), extreme.alongM );
  }

} // namespace

class TestStretches : public QObject
{
    Q_OBJECT

  private slots:
    void figures();
    void connection_data();
    void connection();
    void shortStretches();
    void worstByTheOwnLimit();
    void features();
    void closeCalls();
    void order();
    void extremes();
    void totals();
};

void TestStretches::figures()
{
  const StaticResult result = JobSetup( "main 0 0 50, 100 0 10, 200 0 50" ).solve();
  QCOMPARE( result.stretches.size(), std::size_t( 1 ) );
  const Stretch &stretch = result.stretches[0];
  QVERIFY( stretch.over );
  STILLHEAD_SAME( stretch.worstPa, 90000.0 );
  STILLHEAD_SAME( stretch.beyondPa, 30000.0 );
  STILLHEAD_SAME( stretch.worstElevationM, 10.0 );
  STILLHEAD_NEAR( stretch.lengthM, 150.0, 1e-12 );
  QCOMPARE( stretch.mainlines, 1 );
  QCOMPARE( stretch.laterals, 0 );
  QVERIFY( !stretch.closeCall );
  QCOMPARE( stretch.pieces.size(), std::size_t( 1 ) );
  QCOMPARE( stretch.worstPiece, stretch.pieces[0] );
}

void TestStretches::connection_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<int>( "over" );
  QTest::addColumn<int>( "shorts" );
  QTest::newRow( "none" ) << "main 0 0 50, 100 0 60" << 0 << 0;
  QTest::newRow( "over a joint" ) << "main 0 0 50, 100 0 20; main 100 0 20, 200 0 50" << 1 << 0;
  QTest::newRow( "over a tee" ) << "main 0 0 20, 100 0 20; lateral 50 0 20, 50 50 20; lateral 70 0 20, 70 50 60" << 1
                                << 0;
  QTest::newRow( "two low places" ) << "main 0 0 50, 50 0 20, 100 0 50, 150 0 20, 200 0 50" << 2 << 0;
  QTest::newRow( "two bands of one stretch" ) << "main 0 0 50, 50 0 10, 60 0 30, 70 0 10, 150 0 50" << 1 << 0;
  QTest::newRow( "crossing without a joint" )
    << "main 0 0 20, 100 0 20; main 100 0 20, 100 9 60, 50 9 60, 50 9 20, 50 -9 20" << 2 << 0;
  QTest::newRow( "a ring" ) << "main 0 0 20, 50 0 20, 50 50 20, 0 0 20" << 1 << 0;
  QTest::newRow( "over and short" ) << "main 0 0 50, 50 0 20, 100 0 50, 200 0 90" << 1 << 1;
  QTest::newRow( "short: under, above and past a summit are one" ) << "main 0 0 50, 100 0 150, 200 0 50" << 0 << 1;
  QTest::newRow( "parted by unknown terrain" ) << "main 0 0 20, 50 0 20, 60 0 nan, 70 0 20, 90 0 20" << 2 << 0;
}

void TestStretches::connection()
{
  QFETCH( QString, sketch );
  const StaticResult result = JobSetup( sketch.toStdString() ).solve();
  QTEST( static_cast<int>( stretches( result, true ).size() ), "over" );
  QTEST( static_cast<int>( stretches( result, false ).size() ), "shorts" );
  double over = 0.0;
  double isShort = 0.0;
  for ( const Stretch &stretch : result.stretches )
    ( stretch.over ? over : isShort ) += stretch.lengthM;
  STILLHEAD_NEAR( over, result.totals.overM, 1e-9 );
  STILLHEAD_NEAR( isShort, result.totals.shortM, 1e-9 );
}

void TestStretches::shortStretches()
{
  const StaticResult result = JobSetup( "main 0 0 50, 100 0 150, 200 0 70" ).solve();
  const Stretch stretch = stretches( result, false ).at( 0 );
  STILLHEAD_SAME( stretch.worstPa, -50000.0 );
  STILLHEAD_SAME( stretch.beyondPa, 70000.0 );
  STILLHEAD_SAME( stretch.worstElevationM, 150.0 );
  STILLHEAD_NEAR( stretch.lengthM, 170.0, 1e-9 );
  // Only past a summit, with pressure enough if it were full: nothing beyond the limit, but short all the same.
  JobSetup laterals( std::string( "main 0 0 50, 50 0 101; lateral 50 0 101, 50 1 60, 100 50 60" ) );
  laterals.job.limits.leastPa = -5000.0;
  const Stretch past = stretches( laterals.solve(), false ).at( 0 );
  QVERIFY( past.beyondPa > 0.0 );
  JobSetup lower( std::string( "main 0 0 50, 100 0 101, 200 0 60" ) );
  lower.setLimits( -5000.0, 60000.0 );
  const Stretch only = stretches( lower.solve(), false ).at( 0 );
  STILLHEAD_SAME( only.beyondPa, 0.0 );
  STILLHEAD_SAME( only.worstPa, -1000.0 );
}

// A lateral is judged by its own limit: 5 kPa beyond it is worse than 3 kPa beyond the mainline's, though less pressure.
void TestStretches::worstByTheOwnLimit()
{
  JobSetup setup( std::string( "main 0 0 37, 100 0 37; lateral 50 0 37, 50 50 45" ) );
  setup.job.limits.lateralMostPa = 50000.0;
  const Stretch stretch = stretches( setup.solve(), true ).at( 0 );
  STILLHEAD_SAME( stretch.beyondPa, 13000.0 );
  STILLHEAD_SAME( stretch.worstPa, 63000.0 );
  QCOMPARE( stretch.mainlines, 1 );
  QCOMPARE( stretch.laterals, 1 );
  JobSetup lower( std::string( "main 0 0 37, 100 0 37; lateral 50 0 41, 50 50 45" ) );
  lower.job.limits.lateralMostPa = 50000.0;
  const Stretch byLateral = stretches( lower.solve(), true ).at( 0 );
  STILLHEAD_SAME( byLateral.worstPa, 59000.0 );
  STILLHEAD_SAME( byLateral.beyondPa, 9000.0 );
}

void TestStretches::features()
{
  // Two parts of one feature count once; the same number in the other layer is another feature.
  const StaticResult result =
    JobSetup( "main feature=7 0 0 20, 50 0 20; main feature=7 50 0 20, 100 0 20; main feature=8 100 0 20, 150 0 20;"
              "lateral feature=7 50 0 20, 50 50 20; lateral feature=9 0 9 20, 5 9 20" )
      .solve();
  QCOMPARE( result.stretches.size(), std::size_t( 1 ) );
  QCOMPARE( result.stretches[0].mainlines, 2 );
  QCOMPARE( result.stretches[0].laterals, 1 );
}

void TestStretches::closeCalls()
{
  JobSetup setup( std::string( "main 0 0 50, 100 0 38" ) );
  setup.job.readingErrorPa = 2500.0;
  const StaticResult result = setup.solve();
  QVERIFY( stretches( result, true ).at( 0 ).closeCall );
  // Pipe from 42.5 m down: it is cut where the high case is 57.5 and 60 kPa, and all below 57.5 is close.
  QVERIFY( !test::pieceAlong( result, 0, 60.0 ).closeCall );
  QVERIFY( test::pieceAlong( result, 0, 63.0 ).closeCall );
  QVERIFY( test::pieceAlong( result, 0, 99.0 ).closeCall );
  STILLHEAD_NEAR( result.totals.closeCallM, 100.0 * ( 42.5 - 38.0 ) / 12.0, 1e-9 );
  setup.job.readingErrorPa = 1500.0;
  const StaticResult sure = setup.solve();
  QVERIFY( !stretches( sure, true ).at( 0 ).closeCall );
  STILLHEAD_NEAR( sure.totals.closeCallM, 100.0 * 3.0 / 12.0, 1e-9 );
  setup.job.readingErrorPa = 0.0;
  const StaticResult none = setup.solve();
  QVERIFY( !stretches( none, true ).at( 0 ).closeCall );
  STILLHEAD_SAME( none.totals.closeCallM, 0.0 );
  QVERIFY( none.pieces.size() < sure.pieces.size() );
}

void TestStretches::order()
{
  const StaticResult result =
    JobSetup( "main 0 0 50, 50 0 30, 100 0 50, 150 0 10, 200 0 50, 250 0 90, 300 0 50, 350 0 85, 400 0 50" ).solve();
  QCOMPARE( result.stretches.size(), std::size_t( 4 ) );
  const double beyond[] { 30000, 10000, 10000, 5000 };
  const bool over[] { true, true, false, false };
  for ( std::size_t i = 0; i < 4; ++i )
  {
    QCOMPARE( result.stretches[i].over, over[i] );
    STILLHEAD_NEAR( result.stretches[i].beyondPa, beyond[i], 1e-9 );
  }
}

void TestStretches::extremes()
{
  JobSetup setup( std::string( "main 200 0 90, 100 0 10, 0 0 50; main 0 500 5, 10 500 5" ) );
  setup.setLevels( 110.0, 100.0 );
  const StaticResult result = setup.solve();
  QCOMPARE( result.stretches.size(), std::size_t( 2 ) );
  QCOMPARE( result.extremes.size(), std::size_t( 4 ) );
  const struct
  {
      bool highest;
      int stretch;
      double x;
      double pressurePa;
      double elevationM;
  } expected[] { { true, 0, 100.0, 100000.0, 10.0 }, { false, 1, 200.0, 10000.0, 90.0 },
    { true, -1, 100.0, 100000.0, 10.0 }, { false, -1, 200.0, 10000.0, 90.0 } };
  for ( std::size_t i = 0; i < 4; ++i )
  {
    const Extreme &extreme = result.extremes[i];
    QVERIFY( extreme.kind == ( expected[i].highest ? ExtremeKind::Highest : ExtremeKind::Lowest ) );
    QCOMPARE( extreme.stretch, expected[i].stretch );
    QCOMPARE( extreme.zone, 0 );
    QVERIFY( placeOf( result, extreme ) == ( PlanPoint { expected[i].x, 0.0 } ) );
    STILLHEAD_SAME( extreme.pressurePa, expected[i].pressurePa );
    STILLHEAD_SAME( extreme.elevationM, expected[i].elevationM );
  }
}

void TestStretches::totals()
{
  JobSetup setup( std::string( "main 0 0 50, 100 0 20, 200 0 90, 210 0 nan; main 0 500 5, 10 500 5" ) );
  setup.setLevels( 105.0, 100.0 );
  const Totals totals = setup.solve().totals;
  // Over below 45 m, short above 80 m.
  STILLHEAD_NEAR( totals.lengthM, 220.0, 1e-9 );
  STILLHEAD_NEAR( totals.overM, 100.0 * 25 / 30 + 100.0 * 25 / 70, 1e-9 );
  STILLHEAD_NEAR( totals.shortM, 100.0 * 10 / 70, 1e-9 );
  STILLHEAD_NEAR( totals.noTerrainM, 10.0, 1e-9 );
  STILLHEAD_NEAR( totals.noSourceM, 10.0, 1e-9 );
  STILLHEAD_NEAR( totals.withinM, 220.0 - 20.0 - totals.overM - totals.shortM, 1e-9 );
  STILLHEAD_SAME( totals.lowestPa, 10000.0 );
  STILLHEAD_SAME( totals.highestPa, 85000.0 );
  const Totals none = totalsOf( {} );
  QVERIFY( std::isnan( none.lowestPa ) && std::isnan( none.highestPa ) && none.lengthM == 0.0 );
}

QTEST_APPLESS_MAIN( TestStretches )
#include "teststretches.moc"
