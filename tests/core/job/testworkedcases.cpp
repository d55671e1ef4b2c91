// SPDX-License-Identifier: GPL-2.0-or-later
// Cases worked by hand: hydrostatic rows of published teaching material (the source stands beside each), own exact cases,
// and two whole jobs on invented places. Water is 1000 kg/m3 at 9.80665 m/s2 unless said otherwise.
#include "core/units/units.h"
#include "tests/support/jobsetup.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::CONVENTIONAL_N_PER_M3;
using stillhead::test::JobSetup;
using stillhead::test::MemoryTerrain;

namespace
{

  constexpr double FOOT = METRES_PER_FOOT;
  constexpr double PSI = PASCALS_PER_PSI;

  //! One pipe of 100 m whose ends lie at two elevations; the source stands at the first.
  JobSetup pipeBetween( double fromM, double toM )
  {
    Drawing drawing;
    test::addLine( drawing, { { 0, 0 }, { 100, 0 } }, {}, { fromM, toM } );
    JobSetup setup( drawing );
    setup.job.useLineZ = true;
    setup.job.specificWeightNPerM3 = CONVENTIONAL_N_PER_M3;
    return setup;
  }

  //! The high case at the node at (\a x, \a y).
  double pressureAt( const StaticResult &result, double x, double y )
  {
    for ( std::size_t i = 0; i < result.network.nodes.size(); ++i )
    {
      if ( result.network.nodes[i].place == PlanPoint { x, y } )
        return result.nodeFigures[i].pressureHighPa;
    }
    return test::NODATA;
  }

  //! Pressure at a place at \a toM when the source's water stands at \a levelM.
  double pressureUnderLevel( double levelM, double toM, double weight = CONVENTIONAL_N_PER_M3 )
  {
    JobSetup setup = pipeBetween( 0.0, toM );
    setup.setLevels( levelM, levelM );
    setup.job.specificWeightNPerM3 = weight;
    return pressureAt( setup.solve(), 100, 0 );
  }

  //! Pressure at \a toM when a gauge at \a fromM on the ground reads \a readingPa.
  double pressureFromReading( double readingPa, double fromM, double toM )
  {
    JobSetup setup = pipeBetween( fromM, toM );
    setup.job.sources.front().kind = SourceKind::PressureReading;
    setup.job.sources.front().groundElevationM = fromM;
    setup.setLevels( readingPa, readingPa );
    return pressureAt( setup.solve(), 100, 0 );
  }

  //! Profile of the first worked case, feet: straight between its five points, flat outside.
  double otterbankFt( double stationFt )
  {
    const double station[] { 0, 300, 600, 1000, 1400 };
    const double ground[] { 412, 300, 380, 430, 250 };
    if ( stationFt <= 0.0 )
      return ground[0];
    for ( int i = 0; i < 4; ++i )
    {
      if ( stationFt <= station[i + 1] )
        return ground[i] + ( ground[i + 1] - ground[i] ) * ( stationFt - station[i] ) / ( station[i + 1] - station[i] );
    }
    return ground[4];
  }

  //! Raster of 10 ft cells, cell centres on multiples of 10 ft, x −50 to 1450 ft, y −50 to 50 ft; coordinates in feet.
  JobSetup otterbank()
  {
    Drawing drawing;
    DrawnLine main;
    main.coverM = 2.0 * FOOT;
    test::addLine( drawing, { { 0, 0 }, { 600, 0 }, { 1400, 0 } }, main );
    JobSetup setup( drawing );
    setup.terrain = std::make_unique<MemoryTerrain>( MemoryTerrain::sampled(
      151, 11, test::centresAt( -50, 50, 10 ), []( double x, double ) { return otterbankFt( x ) * FOOT; } ) );
    setup.planar = PlanarMeasure( FOOT );
    setup.setLevels( 436.0 * FOOT, 424.0 * FOOT );
    setup.job.specificWeightNPerM3 = CONVENTIONAL_N_PER_M3;
    setup.setLimits( 30.0 * PSI, 80.0 * PSI );
    setup.job.limits.bandsPa = { 30.0 * PSI, 60.0 * PSI, 80.0 * PSI };
    return setup;
  }

  JobSetup calloway()
  {
    Drawing drawing;
    DrawnLine main;
    main.coverM = 0.6;
    test::addLine( drawing, { { 0, 0 }, { 540, 0 } }, main );
    JobSetup setup( drawing );
    setup.terrain = std::make_unique<MemoryTerrain>( MemoryTerrain::sampled(
      561, 21, test::centresAt( -10, 10, 1 ), []( double x, double ) { return 58.0 - 0.05 * x; } ) );
    setup.job.sources.front().kind = SourceKind::PressureReading;
    setup.job.sources.front().gaugeHeightM = 0.9;
    setup.setLevels( 690000.0, 620000.0 );
    setup.job.specificWeightNPerM3 = CONVENTIONAL_N_PER_M3;
    setup.setLimits( 200000.0, 550000.0 );
    return setup;
  }

  double alongFt( const StaticResult &result, double stationFt, bool high )
  {
    // A station is looked up where a piece has its extreme, or at a node.
    for ( const Piece &piece : result.pieces )
    {
      if ( high && std::abs( piece.lowestAtM - stationFt * FOOT ) < 1e-6 )
        return piece.pressureHighPa / PSI;
      if ( !high && std::abs( piece.highestAtM - stationFt * FOOT ) < 1e-6 )
        return piece.pressureLowPa / PSI;
    }
    return test::NODATA;
  }

} // namespace

using Values = std::vector<double>;
Q_DECLARE_METATYPE( Values )

class TestWorkedCases : public QObject
{
    Q_OBJECT

  private slots:
    void published_data();
    void published();
    void tank_data();
    void tank();
    void meter_data();
    void meter();
    void elevationWhereAPressureStands_data();
    void elevationWhereAPressureStands();
    void heightOfABand_data();
    void heightOfABand();
    void fallingPipeReachesItsLimit();
    void routeDoesNotMatter();
    void negativeIsNotClamped();

    void otterbankStations_data();
    void otterbankStations();
    void otterbankSplits();
    void otterbankLowTank();
    void otterbankCeilingAndFloor();
    void callowayLevels();
    void callowayUnregulated();
};

// Published figures round their factors; the tolerance is that of the table they come from.
void TestWorkedCases::published_data()
{
  QTest::addColumn<double>( "actual" );
  QTest::addColumn<double>( "printed" );
  QTest::addColumn<double>( "allowed" );
  // lbf = 0.45359237 kg × 9.80665 m/s2.
  const double lbPerFt3 = 0.45359237 * 9.80665 / ( FOOT * FOOT * FOOT );
  QTest::newRow( "tank 100 ft up, main 5 ft deep, 62.4 lb/ft3: fluid-mechanics e-text" )
    << pressureUnderLevel( 100 * FOOT, -5 * FOOT, 62.4 * lbPerFt3 ) / PSI << 45.5 << 0.05;
  QTest::newRow( "tank 125 ft up, main 5 ft deep, 62.4 lb/ft3: fluid-mechanics e-text" )
    << pressureUnderLevel( 125 * FOOT, -5 * FOOT, 62.4 * lbPerFt3 ) / PSI << 56.3 << 0.05;
  QTest::newRow( "main 70 psi, house 40 ft above: operator-exam question" )
    << pressureFromReading( 70 * PSI, 0, 40 * FOOT ) / PSI << 52.7 << 0.05;
  QTest::newRow( "outlet 20 ft below supply, psi: IPC App. E" )
    << pressureUnderLevel( 0, -20 * FOOT ) / PSI << 8.66 << 0.02;
  QTest::newRow( "outlet 20 ft above supply, psi: IPC App. E" )
    << pressureUnderLevel( 0, 20 * FOOT ) / PSI << -8.66 << 0.02;
  QTest::newRow( "outlet 20 ft below supply, kPa: IPC App. E" )
    << pressureUnderLevel( 0, -20 * FOOT ) / 1000.0 << 59.8 << 0.05;
  QTest::newRow( "tank 46.2 ft up: self-reliance page" ) << pressureUnderLevel( 46.2 * FOOT, 0 ) / PSI << 20.0 << 0.05;
  QTest::newRow( "100 ft of water: dam page" ) << pressureUnderLevel( 100 * FOOT, 0 ) / PSI << 43.3 << 0.06;
  QTest::newRow( "120 in of water at 62.43 lb/ft3: science page" )
    << pressureUnderLevel( 10 * FOOT, 0, 62.43 * lbPerFt3 ) / PSI << 4.34 << 0.5e-2;
  QTest::newRow( "100 m of head, kPa: gravity-line design note (computed)" )
    << pressureUnderLevel( 100, 0 ) / 1000.0 << 980.665 << 1e-9;
  QTest::newRow( "100 m of head, psi: gravity-line design note (computed)" )
    << pressureUnderLevel( 100, 0 ) / PSI << 142.233 << 0.5e-3;
  // Level that gives 130 psi (training slides: 300.3 ft) and 30 psi at a fixture 91 ft up (operator page: tank at 160.3 ft).
  QTest::newRow( "130 psi stand 300.3 ft high: training slides" )
    << pressureUnderLevel( 300.3 * FOOT, 0 ) / PSI << 130.0 << 0.2;
  QTest::newRow( "tank base 160.3 ft for 30 psi at 91 ft: operator page" )
    << pressureUnderLevel( 160.3 * FOOT, 91 * FOOT ) / PSI << 30.0 << 0.065;
}

void TestWorkedCases::published()
{
  QFETCH( double, actual );
  QFETCH( double, printed );
  QFETCH( double, allowed );
  STILLHEAD_NEAR( actual, printed, allowed );
}

// Own exact cases, computed from the definitions apart from this code, to half a unit of the last digit.
void TestWorkedCases::tank_data()
{
  QTest::addColumn<double>( "elevationFt" );
  QTest::addColumn<double>( "psi" );
  QTest::addColumn<double>( "kPa" );
  QTest::newRow( "540" ) << 540.0 << 26.011650 << 179.344015;
  QTest::newRow( "480" ) << 480.0 << 52.023300 << 358.688030;
  QTest::newRow( "420" ) << 420.0 << 78.034951 << 538.032046;
  QTest::newRow( "350" ) << 350.0 << 108.381876 << 747.266730;
}

void TestWorkedCases::tank()
{
  QFETCH( double, elevationFt );
  QFETCH( double, psi );
  QFETCH( double, kPa );
  const double pressurePa = pressureUnderLevel( 600 * FOOT, elevationFt * FOOT );
  STILLHEAD_NEAR( pressurePa / PSI, psi, 0.51e-6 );
  STILLHEAD_NEAR( pressurePa / 1000.0, kPa, 0.51e-6 );
}

void TestWorkedCases::meter_data()
{
  QTest::addColumn<double>( "elevationFt" );
  QTest::addColumn<double>( "psi" );
  QTest::newRow( "520" ) << 520.0 << 61.32945;
  QTest::newRow( "480" ) << 480.0 << 78.67055;
  QTest::newRow( "450" ) << 450.0 << 91.67638;
  QTest::newRow( "560" ) << 560.0 << 43.98835;
  QTest::newRow( "600" ) << 600.0 << 26.64725;
}

void TestWorkedCases::meter()
{
  QFETCH( double, elevationFt );
  QFETCH( double, psi );
  STILLHEAD_NEAR( pressureFromReading( 70 * PSI, 500 * FOOT, elevationFt * FOOT ) / PSI, psi, 0.51e-5 );
}

// The cut of a pipe that runs from 450 to 700 ft, metered at 500 ft with 70 psi.
void TestWorkedCases::elevationWhereAPressureStands_data()
{
  QTest::addColumn<double>( "psi" );
  QTest::addColumn<double>( "elevationFt" );
  QTest::newRow( "80 psi" ) << 80.0 << 476.933413;
  QTest::newRow( "30 psi" ) << 30.0 << 592.266349;
  QTest::newRow( "0 psi" ) << 0.0 << 661.466111;
}

void TestWorkedCases::elevationWhereAPressureStands()
{
  QFETCH( double, psi );
  QFETCH( double, elevationFt );
  JobSetup setup = pipeBetween( 450 * FOOT, 700 * FOOT );
  setup.job.sources.front().kind = SourceKind::PressureReading;
  setup.job.sources.front().groundElevationM = 500 * FOOT;
  setup.setLevels( 70 * PSI, 70 * PSI );
  setup.setLimits( -1e6, 1e6 );
  setup.job.limits.bandsPa = { psi * PSI };
  const StaticResult result = setup.solve();
  double nearest = HUGE_VAL;
  for ( const Piece &piece : result.pieces )
  {
    const double off = piece.highestM / FOOT - elevationFt;
    nearest = std::abs( off ) < std::abs( nearest ) ? off : nearest;
  }
  STILLHEAD_NEAR( nearest, 0.0, 0.51e-6 );
}

void TestWorkedCases::heightOfABand_data()
{
  QTest::addColumn<double>( "psi" );
  QTest::addColumn<double>( "feet" );
  QTest::addColumn<double>( "metres" );
  QTest::newRow( "10" ) << 10.0 << 23.07 << 7.031;
  QTest::newRow( "20" ) << 20.0 << 46.13 << 14.061;
  QTest::newRow( "30" ) << 30.0 << 69.20 << 21.092;
  QTest::newRow( "40" ) << 40.0 << 92.27 << 28.123;
  QTest::newRow( "50" ) << 50.0 << 115.33 << 35.153;
  QTest::newRow( "70" ) << 70.0 << 161.47 << 49.215;
}

void TestWorkedCases::heightOfABand()
{
  QFETCH( double, psi );
  QFETCH( double, feet );
  QFETCH( double, metres );
  JobSetup setup = pipeBetween( 0, 100 );
  setup.setLimits( -1e6, 1e7 );
  setup.job.limits.bandsPa = { 100 * PSI, ( 100 + psi ) * PSI };
  setup.setLevels( 120, 120 );
  const StaticResult result = setup.solve();
  const auto band =
    std::find_if( result.pieces.begin(), result.pieces.end(), []( const Piece &piece ) { return piece.band == 1; } );
  QVERIFY( band != result.pieces.end() );
  const double height = band->highestM - band->lowestM;
  STILLHEAD_NEAR( height / FOOT, feet, 0.51e-2 );
  STILLHEAD_NEAR( height, metres, 0.51e-3 );
}

// A pipe that falls 5 % from 60 psi reaches 80 psi after 46.1332 ft of fall, 922.66 ft along.
void TestWorkedCases::fallingPipeReachesItsLimit()
{
  Drawing drawing;
  test::addLine( drawing, { { 0, 0 }, { 2000, 0 } }, {}, { 500 * FOOT, 400 * FOOT } );
  JobSetup setup( drawing );
  setup.planar = PlanarMeasure( FOOT );
  setup.job.useLineZ = true;
  setup.job.specificWeightNPerM3 = CONVENTIONAL_N_PER_M3;
  setup.job.sources.front().kind = SourceKind::PressureReading;
  setup.job.sources.front().groundElevationM = 500 * FOOT;
  setup.setLevels( 60 * PSI, 60 * PSI );
  setup.setLimits( 30 * PSI, 80 * PSI );
  const StaticResult result = setup.solve();
  QCOMPARE( result.pieces.size(), std::size_t( 2 ) );
  STILLHEAD_NEAR( result.pieces[1].fromM / FOOT, 922.66, 0.51e-2 );
  STILLHEAD_NEAR( 500 - result.pieces[1].highestM / FOOT, 46.1332, 0.51e-4 );
}

void TestWorkedCases::routeDoesNotMatter()
{
  JobSetup setup( std::string( "main 0 0 50, 10 0 30; main 0 0 50, 500 900 20, -700 400 60, 10 0 30" ) );
  const StaticResult result = setup.solve();
  QCOMPARE( result.zoneMap.count, 1 );
  const auto at = [&]( int drawn, double along ) { return test::pieceAlong( result, drawn, along ); };
  STILLHEAD_SAME( at( 0, 10.0 ).pressureHighPa, 70000.0 );
  STILLHEAD_SAME( pressureAt( result, 10, 0 ), 70000.0 );
}

void TestWorkedCases::negativeIsNotClamped()
{
  STILLHEAD_NEAR( pressureFromReading( 70 * PSI, 500 * FOOT, 700 * FOOT ) / PSI,
    70.0 - 200 * FOOT * CONVENTIONAL_N_PER_M3 / PSI, 1e-9 );
  QVERIFY( pressureFromReading( 70 * PSI, 500 * FOOT, 700 * FOOT ) < 0.0 );
}

// Otterbank Hill: elevated tank, a gully and a knoll between drawn vertices. Figures to half a unit of the last digit.
void TestWorkedCases::otterbankStations_data()
{
  QTest::addColumn<double>( "station" );
  QTest::addColumn<double>( "full" );
  QTest::addColumn<double>( "low" );
  QTest::newRow( "0" ) << 0.0 << 11.27 << 6.07;
  QTest::newRow( "300, no vertex" ) << 300.0 << 59.83 << 54.62;
  QTest::newRow( "600" ) << 600.0 << 25.14 << 19.94;
  QTest::newRow( "1000, no vertex" ) << 1000.0 << 3.47 << -1.73;
  QTest::newRow( "1400" ) << 1400.0 << 81.50 << 76.30;
}

void TestWorkedCases::otterbankStations()
{
  QFETCH( double, station );
  QFETCH( double, full );
  QFETCH( double, low );
  const StaticResult result = otterbank().solve();
  // Extremes of pieces and drawn vertices are places of the exact profile.
  double highPsi = test::NODATA;
  double lowPsi = test::NODATA;
  const auto look = [&]( double alongM, double elevationM ) {
    if ( std::abs( alongM - station * FOOT ) > 1e-6 )
      return;
    highPsi = CONVENTIONAL_N_PER_M3 * ( result.sources.front().levels.highM - elevationM ) / PSI;
    lowPsi = CONVENTIONAL_N_PER_M3 * ( result.sources.front().levels.lowM - elevationM ) / PSI;
  };
  for ( const Piece &piece : result.pieces )
  {
    look( piece.lowestAtM, piece.lowestM );
    look( piece.highestAtM, piece.highestM );
  }
  for ( const ProfileVertex &vertex : result.vertices )
    look( vertex.alongM, vertex.elevationM );
  STILLHEAD_NEAR( highPsi, full, 0.51e-2 );
  STILLHEAD_NEAR( lowPsi, low, 0.51e-2 );
}

void TestWorkedCases::otterbankSplits()
{
  // The full tank alone, so that only its cuts are made.
  JobSetup setup = otterbank();
  setup.setLevels( 436.0 * FOOT, 436.0 * FOOT );
  const StaticResult result = setup.solve();
  const double splits[] { 115.71, 558.00, 1136.00, 1289.78, 1392.29 };
  const int bands[] { 0, 1, 0, 1, 2, 3 };
  QCOMPARE( result.pieces.size(), std::size_t( 6 ) );
  for ( std::size_t i = 0; i < 6; ++i )
  {
    QCOMPARE( result.pieces[i].band, bands[i] );
    if ( i > 0 )
      STILLHEAD_NEAR( result.pieces[i].fromM / FOOT, splits[i - 1], 0.51e-2 );
  }
  STILLHEAD_NEAR( ( result.pieces[5].toM - result.pieces[5].fromM ) / FOOT, 7.71, 0.51e-2 );
  // The gully stops at 59.83 psi: no cut there. The pieces sum to the run.
  STILLHEAD_NEAR( alongFt( result, 300.0, true ), 59.83, 0.51e-2 );
  STILLHEAD_NEAR( result.totals.lengthM, 1400.0 * FOOT, 1e-9 );
  STILLHEAD_NEAR( result.totals.highestPa / PSI, 81.50, 0.51e-2 );
  STILLHEAD_NEAR( result.totals.lowestPa / PSI, 3.47, 0.51e-2 );
  QCOMPARE( test::countOf( result, FindingCode::Summit ), std::size_t( 0 ) );
}

void TestWorkedCases::otterbankLowTank()
{
  const StaticResult result = otterbank().solve();
  const auto above = std::find_if( result.pieces.begin(), result.pieces.end(),
    []( const Piece &piece ) { return piece.state == State::AboveStaticLevel; } );
  QVERIFY( above != result.pieces.end() );
  STILLHEAD_NEAR( above->fromM / FOOT, 968.00, 0.51e-2 );
  STILLHEAD_NEAR( above->toM / FOOT, 1008.89, 0.51e-2 );
  STILLHEAD_NEAR( ( above->toM - above->fromM ) / FOOT, 40.89, 0.51e-2 );
  STILLHEAD_NEAR( above->pressureLowPa / PSI, -1.73, 0.51e-2 );
  STILLHEAD_NEAR( result.totals.lowestPa / PSI, -1.73, 0.51e-2 );
  // Beyond the knoll the low tank's water does not stand: past a summit, over limit at the very end.
  QVERIFY( test::pieceAlong( result, 0, 1200.0 * FOOT ).state == State::PastASummit );
  QVERIFY( test::pieceAlong( result, 0, 1399.0 * FOOT ).state == State::OverLimit );
  QVERIFY( test::pieceAlong( result, 0, 1399.0 * FOOT ).isShort );
  STILLHEAD_NEAR( test::findingOf( result, FindingCode::Summit ).figureM / FOOT, 4.0, 1e-9 );
  STILLHEAD_NEAR( test::findingOf( result, FindingCode::Summit ).lengthM / FOOT, 391.11, 0.51e-2 );
}

// Ground above which the low tank gives no 30 psi: 356.80 ft; below which the full one gives more than 80: 253.47 ft.
void TestWorkedCases::otterbankCeilingAndFloor()
{
  const StaticResult result = otterbank().solve();
  double ceiling = HUGE_VAL;
  double floor = HUGE_VAL;
  for ( const Piece &piece : result.pieces )
  {
    const double groundFt = piece.highestM / FOOT + 2.0;
    ceiling = std::abs( groundFt - 356.80 ) < std::abs( ceiling - 356.80 ) ? groundFt : ceiling;
    floor = std::abs( groundFt - 253.47 ) < std::abs( floor - 253.47 ) ? groundFt : floor;
  }
  STILLHEAD_NEAR( ceiling, 356.80, 0.51e-2 );
  STILLHEAD_NEAR( floor, 253.47, 0.51e-2 );
}

// Calloway Terraces: a gauge 0.9 m above ground 58.0 m reads 620 kPa by day and 690 by night; cover 0.6 m; limit 550 kPa.
void TestWorkedCases::callowayLevels()
{
  const StaticResult result = calloway().solve();
  STILLHEAD_NEAR( result.sources.front().levels.lowM, 122.122, 0.51e-3 );
  STILLHEAD_NEAR( result.sources.front().levels.highM, 129.260, 0.51e-3 );
  STILLHEAD_NEAR( result.sources.front().terrainGroundM, 58.0, 1e-12 );
  STILLHEAD_NEAR( result.sources.front().usedGroundM, 58.0, 1e-12 );
}

void TestWorkedCases::callowayUnregulated()
{
  const StaticResult result = calloway().solve();
  const auto kPa = [&]( double x, double levelM ) {
    return CONVENTIONAL_N_PER_M3 * ( levelM - ( 58.0 - 0.05 * x - 0.6 ) ) / 1000.0;
  };
  // Bottom: ground 31 m.
  STILLHEAD_NEAR( pressureAt( result, 540, 0 ) / 1000.0, 969.5, 0.51e-1 );
  STILLHEAD_NEAR( result.totals.highestPa / 1000.0, 969.5, 0.51e-1 );
  STILLHEAD_NEAR( kPa( 540, result.sources.front().levels.lowM ), 899.5, 0.51e-1 );
  // All of x 0 to 160 is over 550 kPa even by day.
  STILLHEAD_NEAR( kPa( 0, result.sources.front().levels.lowM ), 634.7, 0.51e-1 );
  STILLHEAD_NEAR( kPa( 160, result.sources.front().levels.lowM ), 713.2, 0.51e-1 );
  STILLHEAD_NEAR( kPa( 160, result.sources.front().levels.highM ), 783.2, 0.51e-1 );
  QCOMPARE( result.pieces.size(), std::size_t( 1 ) );
  QVERIFY( result.pieces[0].state == State::OverLimit );
  STILLHEAD_NEAR( result.pieces[0].pressureLowPa / 1000.0, 634.7, 0.51e-1 );
  STILLHEAD_NEAR( result.totals.overM, 540.0, 1e-9 );
  // The day's level by its own run: the bottom at 899.5 kPa.
  JobSetup day = calloway();
  day.setLevels( 620000.0, 620000.0 );
  STILLHEAD_NEAR( pressureAt( day.solve(), 540, 0 ) / 1000.0, 899.5, 0.51e-1 );
}

QTEST_APPLESS_MAIN( TestWorkedCases )
#include "testworkedcases.moc"
