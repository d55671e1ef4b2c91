// SPDX-License-Identifier: GPL-2.0-or-later
// The main job's borders: what is refused and with which figure, what is found, what is told of the source, and the lines
// that are drawn for the pieces.
#include "core/judgement/limits.h"
#include "core/units/units.h"
#include "tests/support/jobsetup.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::JobSetup;
using stillhead::test::MemoryTerrain;

namespace
{

  //! Pixel centres at whole coordinates, x 0 to 20, y 0 to 10; the ground is 50 + x.
  std::unique_ptr<MemoryTerrain> slope()
  {
    return std::make_unique<MemoryTerrain>( MemoryTerrain::sampled(
      21, 11, test::centresAt( 0.0, 10.0, 1.0 ), []( double x, double ) { return 50.0 + x; } ) );
  }

  JobSetup onSlope( const char *sketch )
  {
    JobSetup setup( std::string { sketch } );
    setup.terrain = slope();
    return setup;
  }

  //! The refusal of a job, nothing if it is not refused.
  std::optional<Refusal> refusalOf( JobSetup &setup )
  {
    try
    {
      setup.solve();
    }
    catch ( const Refusal &refusal )
    {
      return refusal;
    }
    return std::nullopt;
  }

} // namespace

using Reason = Refusal::Reason;
Q_DECLARE_METATYPE( Reason )

class TestStaticJob : public QObject
{
    Q_OBJECT

  private slots:
    void refused_data();
    void refused();
    void sourceTooFar();
    void sourceOnNoTerrain();
    void partlyOffTheTerrainIsComputed();
    void sourceReport_data();
    void sourceReport();
    void findings_data();
    void findings();
    void surveyFindings();
    void lengthsInAreLengthsOut();
    void coverAndLateralLimits();
    void doubtCountsItsTerrain_data();
    void doubtCountsItsTerrain();
    void pieceLines();
    void pieceLinesWithoutFigures();
    void lineThatEndsAHairOffTheTerrain();
    void nodeFigures();
    void terrainThatCannotBeRead();
};

void TestStaticJob::refused_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<Reason>( "reason" );
  QTest::newRow( "nothing drawn" ) << "" << Reason::NoLines;
  QTest::newRow( "nothing but lines without length" ) << "main 1 1, 1 1; lateral 2 2" << Reason::NoLines;
  QTest::newRow( "lines beside the terrain" ) << "main 0 500, 20 500" << Reason::NoOverlap;
  QTest::newRow( "all coordinates not numbers" ) << "main nan 1, 2 2" << Reason::NoLines;
}

void TestStaticJob::refused()
{
  QFETCH( QString, sketch );
  QFETCH( Reason, reason );
  JobSetup setup = onSlope( sketch.toUtf8().constData() );
  setup.job.sources.front().place = { 0.0, 500.0 };
  for ( const SourceKind kind : { SourceKind::PressureReading, SourceKind::WaterLevel, SourceKind::LevelAboveGround } )
  {
    setup.job.sources.front().kind = kind;
    const std::optional<Refusal> refusal = refusalOf( setup );
    QVERIFY( refusal );
    QVERIFY( refusal->reason == reason );
  }
}

void TestStaticJob::sourceTooFar()
{
  JobSetup setup = onSlope( "main 0 5, 20 5" );
  setup.job.sourceReachM = 4.0;
  setup.job.sources.front().place = { 3.0, 1.0 };
  QVERIFY( !refusalOf( setup ) );
  setup.job.sources.front().place = { 3.0, 0.5 };
  const std::optional<Refusal> refusal = refusalOf( setup );
  QVERIFY( refusal && refusal->reason == Reason::SourceTooFar );
  STILLHEAD_SAME( refusal->figureM, 4.5 );
  // On the ground, not in map units.
  setup.planar = PlanarMeasure( 0.3048 );
  QVERIFY( !refusalOf( setup ) );
  // A place that is none is near to nothing.
  setup.job.sources.front().place = { test::NODATA, 5.0 };
  QVERIFY( refusalOf( setup ) && refusalOf( setup )->reason == Reason::SourceTooFar );
}

void TestStaticJob::sourceOnNoTerrain()
{
  JobSetup setup = onSlope( "main 0 5, 20 5" );
  setup.terrain->set( 0, 5, test::NODATA );
  setup.job.sources.front().place = { 0.25, 5.0 };
  setup.setLevels( 10.0, 10.0 );
  for ( const SourceKind kind : { SourceKind::PressureReading, SourceKind::LevelAboveGround } )
  {
    setup.job.sources.front().kind = kind;
    setup.job.sources.front().groundElevationM.reset();
    const std::optional<Refusal> refusal = refusalOf( setup );
    QVERIFY( refusal && refusal->reason == Reason::SourceNoTerrain );
    setup.job.sources.front().groundElevationM = 50.0;
    QVERIFY( !refusalOf( setup ) );
  }
  setup.job.sources.front().kind = SourceKind::WaterLevel;
  setup.job.sources.front().groundElevationM.reset();
  QVERIFY( !refusalOf( setup ) );
}

void TestStaticJob::partlyOffTheTerrainIsComputed()
{
  JobSetup setup = onSlope( "main 0 5, 30 5; lateral 40 5, 50 5; main 30 5, 40 5" );
  const StaticResult result = setup.solve();
  QCOMPARE( test::statesAlong( result, 0 ), "0-20.5 within limits, 20.5-30 no terrain" );
  QCOMPARE( test::statesAlong( result, 1 ), "0-10 no terrain" );
  STILLHEAD_NEAR( result.totals.noTerrainM, 29.5, 1e-12 );
  QCOMPARE( test::countOf( result, FindingCode::NoTerrain ), std::size_t( 3 ) );
}

void TestStaticJob::sourceReport_data()
{
  QTest::addColumn<int>( "kind" );
  QTest::addColumn<double>( "surveyed" ); // below 0: none
  QTest::addColumn<double>( "used" );
  QTest::addColumn<double>( "level" );
  QTest::newRow( "reading, terrain" ) << 0 << -1.0 << 54.0 << 64.0;
  QTest::newRow( "reading, surveyed" ) << 0 << 60.0 << 60.0 << 70.0;
  QTest::newRow( "water level" ) << 1 << -1.0 << 54.0 << 10000.0;
  QTest::newRow( "level above ground" ) << 2 << -1.0 << 54.0 << 10054.0;
  QTest::newRow( "level above surveyed ground" ) << 2 << 60.0 << 60.0 << 10060.0;
}

void TestStaticJob::sourceReport()
{
  QFETCH( int, kind );
  QFETCH( double, surveyed );
  JobSetup setup = onSlope( "main 0 5, 20 5" );
  setup.job.sources.front().place = { 4.0, 7.0 };
  setup.job.sources.front().kind = static_cast<SourceKind>( kind );
  setup.setLevels( 10000.0, 10000.0 );
  if ( surveyed > 0.0 )
    setup.job.sources.front().groundElevationM = surveyed;
  const SourceReport report = setup.solve().sources.front();
  QTEST( report.usedGroundM, "used" );
  QTEST( report.levels.highM, "level" );
  STILLHEAD_SAME( report.terrainGroundM, 54.0 );
  STILLHEAD_SAME( report.distanceM, 2.0 );
  STILLHEAD_SAME( report.on.alongM, 4.0 );
}

void TestStaticJob::findings_data()
{
  QTest::addColumn<double>( "highPsi" );
  QTest::addColumn<double>( "lowPsi" ); // below 0: none
  QTest::addColumn<double>( "boostPsi" );
  QTest::addColumn<double>( "boostLowPsi" ); // below 0: none
  QTest::addColumn<bool>( "oneReading" );
  QTest::addColumn<bool>( "unusual" );
  QTest::addColumn<bool>( "pump" );
  QTest::newRow( "a pair of readings" ) << 70.0 << 50.0 << 0.0 << -1.0 << false << false << false;
  QTest::newRow( "one reading" ) << 70.0 << -1.0 << 0.0 << -1.0 << true << false << false;
  QTest::newRow( "14 psi" ) << 70.0 << 14.0 << 0.0 << -1.0 << false << true << false;
  QTest::newRow( "15 psi" ) << 70.0 << 15.0 << 0.0 << -1.0 << false << false << false;
  QTest::newRow( "250 psi" ) << 250.0 << 50.0 << 0.0 << -1.0 << false << false << false;
  QTest::newRow( "251 psi" ) << 251.0 << 50.0 << 0.0 << -1.0 << false << true << false;
  QTest::newRow( "both unusual: one finding" ) << 300.0 << 5.0 << 0.0 << -1.0 << false << true << false;
  QTest::newRow( "a boost without its running value" ) << 70.0 << 50.0 << 30.0 << -1.0 << false << false << true;
  QTest::newRow( "a boost with it" ) << 70.0 << 50.0 << 30.0 << 20.0 << false << false << false;
}

void TestStaticJob::findings()
{
  QFETCH( double, highPsi );
  QFETCH( double, lowPsi );
  QFETCH( double, boostPsi );
  QFETCH( double, boostLowPsi );
  QFETCH( bool, oneReading );
  QFETCH( bool, unusual );
  QFETCH( bool, pump );
  JobSetup setup = onSlope( "main 0 5, 20 5" );
  Source &source = setup.job.sources.front();
  source.kind = SourceKind::PressureReading;
  source.high = highPsi * PASCALS_PER_PSI;
  source.low.reset();
  if ( lowPsi >= 0.0 )
    source.low = lowPsi * PASCALS_PER_PSI;
  source.boostPa = boostPsi * PASCALS_PER_PSI;
  if ( boostLowPsi >= 0.0 )
    source.boostLowPa = boostLowPsi * PASCALS_PER_PSI;
  const StaticResult result = setup.solve();
  QCOMPARE( test::countOf( result, FindingCode::OneReading ), std::size_t( oneReading ? 1 : 0 ) );
  QCOMPARE( test::countOf( result, FindingCode::UnusualPressure ), std::size_t( unusual ? 1 : 0 ) );
  QCOMPARE( test::countOf( result, FindingCode::PumpDutyNotGiven ), std::size_t( pump ? 1 : 0 ) );
  for ( const Finding &finding : result.findings )
    QVERIFY( finding.place == source.place );
  // Nobody reads a water level off a gauge.
  source.kind = SourceKind::WaterLevel;
  QCOMPARE( test::countOf( setup.solve(), FindingCode::UnusualPressure ), std::size_t( 0 ) );
}

void TestStaticJob::surveyFindings()
{
  JobSetup setup = onSlope( "main 0 5 51, 10 5 52; lateral 10 5 0, 10 9 0; lateral 5 5, 5 9; main 10 5 52, 20 5 nan" );
  StaticResult result = setup.solve();
  QCOMPARE( test::countOf( result, FindingCode::NoSurveyZ ), std::size_t( 2 ) );
  for ( const Finding &finding : result.findings )
    QVERIFY( finding.code != FindingCode::NoSurveyZ || finding.line == 1 || finding.line == 2 );
  // Those two lie on the terrain; the fourth has a survey with a gap.
  STILLHEAD_SAME( test::pieceAlong( result, 1, 2.0 ).lowestM, 60.0 );
  STILLHEAD_SAME( test::pieceAlong( result, 2, 2.0 ).lowestM, 55.0 );
  QVERIFY( test::pieceAlong( result, 3, 2.0 ).state == State::NoTerrain );
  setup.job.useLineZ = false;
  result = setup.solve();
  QCOMPARE( test::countOf( result, FindingCode::NoSurveyZ ), std::size_t( 0 ) );
  STILLHEAD_SAME( test::pieceAlong( result, 0, 7.0 ).highestM, 60.0 );
}

void TestStaticJob::lengthsInAreLengthsOut()
{
  JobSetup setup =
    onSlope( "main 0 5, 30 5; main 0 5, 30 5; lateral 5 5, 5 5.0004; lateral 3 3, 3 3; main 7 1, 9 2, 7 1;"
             "lateral 15 5, 15 -20; main 300 300, 310 310" );
  const StaticResult result = setup.solve();
  const double drawnM = 30 + 30 + 0.0004 + 2 * std::sqrt( 5.0 ) + 25 + std::sqrt( 200.0 );
  STILLHEAD_NEAR( result.totals.lengthM, drawnM, 1e-9 );
  double sum = 0.0;
  for ( const Piece &piece : result.pieces )
    sum += piece.toM - piece.fromM;
  STILLHEAD_NEAR( sum, drawnM, 1e-9 );
  QCOMPARE( test::countOf( result, FindingCode::NoLength ), std::size_t( 1 ) );
  QCOMPARE( test::countOf( result, FindingCode::Duplicate ), std::size_t( 1 ) );
}

void TestStaticJob::coverAndLateralLimits()
{
  JobSetup setup = onSlope( "main 0 5, 10 5; lateral cover=2 0 5, 0 9; lateral 0 5, 0 1" );
  setup.job.limits.lateralMostPa = 45000.0;
  const StaticResult result = setup.solve();
  STILLHEAD_SAME( test::pieceAlong( result, 1, 2.0 ).pressureHighPa, 52000.0 );
  STILLHEAD_SAME( test::pieceAlong( result, 2, 2.0 ).pressureHighPa, 50000.0 );
  QVERIFY( test::pieceAlong( result, 1, 2.0 ).state == State::OverLimit );
  QVERIFY( test::pieceAlong( result, 0, 0.5 ).state == State::WithinLimits );
}

void TestStaticJob::doubtCountsItsTerrain_data()
{
  QTest::addColumn<int>( "kind" );
  QTest::addColumn<bool>( "surveyed" );
  QTest::addColumn<double>( "terrains" );
  QTest::newRow( "reading over terrain: pipe and source" ) << 0 << false << 2.0;
  QTest::newRow( "reading over surveyed ground: pipe only" ) << 0 << true << 1.0;
  QTest::newRow( "water level: pipe only" ) << 1 << false << 1.0;
  QTest::newRow( "level above terrain: pipe and source" ) << 2 << false << 2.0;
  QTest::newRow( "level above surveyed ground: pipe only" ) << 2 << true << 1.0;
}

void TestStaticJob::doubtCountsItsTerrain()
{
  QFETCH( int, kind );
  QFETCH( bool, surveyed );
  QFETCH( double, terrains );
  JobSetup setup = onSlope( "main 0 5, 20 5; main 0 9, 20 9" );
  setup.job.sources.front().kind = static_cast<SourceKind>( kind );
  if ( surveyed )
    setup.job.sources.front().groundElevationM = 50.0;
  setup.job.terrainRmseM = 0.5;
  setup.job.readingErrorPa = 2000.0;
  const StaticResult result = setup.solve();
  const double terrainPa = 1.96 * 0.5 * 1000.0;
  STILLHEAD_NEAR( result.zones.at( 0 ).doubtHighPa, std::sqrt( terrains * terrainPa * terrainPa + 4e6 ), 1e-9 );
  QVERIFY( result.zones.at( 0 ).fed && !result.zones.at( 1 ).fed );
  STILLHEAD_SAME( result.zones.at( 1 ).doubtHighPa, 0.0 );
}

void TestStaticJob::pieceLines()
{
  for ( const char *sketch : { "main 0 5, 7.5 5, 20 5", "main 20 5, 7.5 5, 0 5" } )
  {
    JobSetup setup = onSlope( sketch );
    setup.setLevels( 100.0, 90.0 );
    setup.setLimits( 30000.0, 60000.0 ); // cut where the low case has 30 kPa: at 60 m, x = 10
    const StaticResult result = setup.solve();
    QCOMPARE( result.pieces.size(), std::size_t( 2 ) );
    const bool reversed = test::lineOf( result, result.pieces[0] ).reversed;
    std::vector<PieceVertex> vertices;
    pieceLine( result, result.pieces[0], setup.job.specificWeightNPerM3, vertices );
    QCOMPARE( vertices.size(), std::size_t( 3 ) );
    if ( reversed )
      std::reverse( vertices.begin(), vertices.end() );
    const double x[] { 0.0, 7.5, 10.0 };
    for ( std::size_t i = 0; i < 3; ++i )
    {
      STILLHEAD_SAME( vertices[i].x, x[i] );
      STILLHEAD_SAME( vertices[i].y, 5.0 );
      STILLHEAD_SAME( vertices[i].elevationM, 50.0 + x[i] );
      STILLHEAD_SAME( vertices[i].pressurePa, 1000.0 * ( 50.0 - x[i] ) );
    }
    // The next piece begins where this one ends, and the memory is used again.
    pieceLine( result, result.pieces[1], setup.job.specificWeightNPerM3, vertices );
    QCOMPARE( vertices.size(), std::size_t( 2 ) );
    STILLHEAD_SAME( ( reversed ? vertices.back() : vertices.front() ).x, 10.0 );
    STILLHEAD_SAME( ( reversed ? vertices.front() : vertices.back() ).x, 20.0 );
  }
}

void TestStaticJob::pieceLinesWithoutFigures()
{
  JobSetup setup = onSlope( "main 0 5, 30 5; main 0 2, 20 2" );
  setup.job.sources.front().place = { 0.0, 5.0 };
  const StaticResult result = setup.solve();
  std::vector<PieceVertex> vertices;
  for ( const Piece &piece : result.pieces )
  {
    pieceLine( result, piece, 1000.0, vertices );
    for ( const PieceVertex &vertex : vertices )
    {
      QCOMPARE( std::isnan( vertex.pressurePa ), piece.state == State::NoSource || piece.state == State::NoTerrain );
      QVERIFY( std::isnan( vertex.elevationM ) == ( piece.state == State::NoTerrain ) );
    }
  }
}

// A line clipped to the raster's edge lies off it by rounding: that hair is no piece of its own, and pipe with figures has
// an elevation and a pressure at every vertex.
void TestStaticJob::lineThatEndsAHairOffTheTerrain()
{
  for ( const char *sketch :
    { "main 0 5, 20.5000001 5", "main -0.5000001 5, 20 5", "main -0.5000001 5, 20.5000001 5" } )
  {
    JobSetup setup = onSlope( sketch );
    setup.job.sources.front().place = { -5.0, 5.0 };
    const StaticResult result = setup.solve();
    QCOMPARE( result.pieces.size(), std::size_t( 1 ) );
    QVERIFY( result.pieces[0].state == State::WithinLimits );
    std::vector<PieceVertex> vertices;
    pieceLine( result, result.pieces[0], 1000.0, vertices );
    for ( const PieceVertex &vertex : vertices )
      QVERIFY( !std::isnan( vertex.elevationM ) && !std::isnan( vertex.pressurePa ) );
    STILLHEAD_SAME( std::max( vertices.front().elevationM, vertices.back().elevationM ), 70.0 );
  }
}

void TestStaticJob::nodeFigures()
{
  JobSetup setup = onSlope( "main cover=1 0 5, 20 5; lateral 10 5, 10 9; main 0 1, 9 1" );
  setup.job.sources.front().place = { 0.0, 5.0 };
  setup.setLevels( 100.0, 90.0 );
  const StaticResult result = setup.solve();
  QCOMPARE( result.nodeFigures.size(), result.network.nodes.size() );
  for ( std::size_t i = 0; i < result.network.nodes.size(); ++i )
  {
    const Node &node = result.network.nodes[i];
    const NodeFigures &figures = result.nodeFigures[i];
    const double cover = node.place.y == 5.0 ? 1.0 : 0.0;
    STILLHEAD_SAME( figures.elevationM, 50.0 + node.place.x - cover );
    const bool fed = node.place.y >= 5.0;
    STILLHEAD_SAME( figures.pressureHighPa, fed ? 1000.0 * ( 100.0 - figures.elevationM ) : test::NODATA );
    STILLHEAD_SAME( figures.pressureLowPa, fed ? 1000.0 * ( 90.0 - figures.elevationM ) : test::NODATA );
    QCOMPARE( figures.state == State::NoSource, !fed );
  }
}

void TestStaticJob::terrainThatCannotBeRead()
{
  struct BrokenTerrain : public MemoryTerrain
  {
      using MemoryTerrain::MemoryTerrain;
      void read( int column, int row, int columns, int rows, double *elevationsM ) const override
      {
        if ( column > 0 )
          throw std::runtime_error( "block 7 is damaged" );
        MemoryTerrain::read( column, row, columns, rows, elevationsM );
      }
  };
  Drawing drawing;
  for ( int i = 0; i < 60; ++i )
    test::addLine( drawing, { { 10.0 * i, 1.0 }, { 10.0 * i + 10.0, 1.0 } } );
  JobSetup setup( drawing );
  setup.terrain =
    std::make_unique<BrokenTerrain>( 600, 3, std::vector<double>( 1800, 50.0 ), test::centresAt( 0, 2, 1 ) );
  for ( const unsigned threads : { 1u, 4u } )
  {
    setup.job.threads = threads;
    try
    {
      setup.solve();
      QFAIL( "solved" );
    }
    catch ( const std::runtime_error &error )
    {
      QCOMPARE( error.what(), "block 7 is damaged" );
    }
  }
}

QTEST_APPLESS_MAIN( TestStaticJob )
#include "teststaticjob.moc"
