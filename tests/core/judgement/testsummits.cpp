// SPDX-License-Identifier: GPL-2.0-or-later
// Where water at rest reaches: only along pipe no higher than the static level. The drawn Z is the pipe; the water stands
// at 100 m, LEAST is met up to 80 m and MOST down to 40 m.
#include "core/judgement/piecegroups.h"
#include "tests/support/jobsetup.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::JobSetup;

class TestSummits : public QObject
{
    Q_OBJECT

  private slots:
    void states_data();
    void states();
    void summitTellsHeightAndLength();
    void everySummitWithWaterOnOneSide();
    void lowCaseOnly();
    void nodesPastASummit();
    void unknownTerrainLetsWaterPass();
    void pipeWithoutSource();
    void placesOfManyPiecesAreVisitedOnce();
};

void TestSummits::states_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<QString>( "expected" ); // of the first line
  QTest::addColumn<int>( "summits" );
  QTest::addColumn<int>( "unknown" );
  const auto row = []( const char *name, const char *sketch, const char *expected, int summits, int unknown = 0 ) {
    QTest::newRow( name ) << sketch << expected << summits << unknown;
  };
  row( "a hill on the way", "main 0 0 50, 100 0 150, 200 0 50",
    "0-30 within limits, 30-50 under limit, 50-150 above static level, 150-170 past a summit, 170-200 past a summit",
    1 );
  row( "a hill just as high as the water", "main 0 0 50, 100 0 100, 200 0 50",
    "0-60 within limits, 60-140 under limit, 140-200 within limits", 0 );
  row( "a hill a millimetre higher", "main 0 0 50, 100 0 100.001, 150 0 100.001, 250 0 50.001",
    "0-59.9988 within limits, 59.9988-99.998 under limit, 99.998-150.002 above static level, 150.002-190.002 past a "
    "summit, 190.002-250 past a summit",
    1 );
  row( "a hill at the end of a branch", "main 0 0 50, 100 0 150",
    "0-30 within limits, 30-50 under limit, 50-100 above static level", 0 );
  row( "a low way round", "main 0 0 50, 100 50 150, 200 0 50; main 0 0 50, 100 -50 50, 200 0 50",
    "0-33.541 within limits, 33.541-55.9017 under limit, 55.9017-167.705 above static level, 167.705-190.066 under "
    "limit, 190.066-223.607 within limits",
    0 );
  row( "a ring with a hill", "main 0 0 50, 0 100 50, 100 100 150, 200 100 50, 200 0 50, 0 0 50",
    "0-130 within limits, 130-150 under limit, 150-250 above static level, 250-270 under limit, 270-600 within limits",
    0 );
  row( "a sag between two summits", "main 0 0 50, 100 0 150, 200 0 50, 300 0 150, 400 0 50",
    "0-30 within limits, 30-50 under limit, 50-150 above static level, 150-170 past a summit, 170-230 past a summit, "
    "230-250 past a summit, 250-350 above static level, 350-370 past a summit, 370-400 past a summit",
    1 );
  row( "the source itself above the water", "main 0 0 150, 100 0 50",
    "0-50 above static level, 50-70 past a summit, 70-100 past a summit", 1 );
  row( "over limit past a summit", "main 0 0 50, 100 0 150, 250 0 0",
    "0-30 within limits, 30-50 under limit, 50-150 above static level, 150-170 past a summit, 170-210 past a summit, "
    "210-250 over limit",
    1 );
  row( "water comes back from the far end",
    "main 0 0 50, 100 0 150, 200 0 50; main 0 0 50, 0 -99 50, 200 -99 50, 200 0 50",
    "0-30 within limits, 30-50 under limit, 50-150 above static level, 150-170 under limit, 170-200 within limits", 0 );
  row( "beyond a hill of another line", "main 200 0 50, 300 0 50; main 0 0 50, 100 0 150, 200 0 50",
    "0-100 past a summit", 1 );
  row( "two hills in parallel",
    "main 200 0 50, 300 0 50; main 0 0 50, 100 0 150, 200 0 50; main 0 0 50, 100 50 150, 200 0 50",
    "0-100 past a summit", 2 );
  row( "three lines that meet on a hill",
    "main 100 0 150, 200 0 50; main 0 0 50, 100 0 150; main 100 0 150, 100 100 50",
    "0-50 above static level, 50-70 past a summit, 70-100 past a summit", 1 );
  row( "a gap on the only way", "main 0 0 50, 100 0 nan, 200 0 50, 300 0 50", "0-200 no terrain, 200-300 within limits",
    0, 1 );
  row( "a gap with another way round",
    "main 0 0 50, 100 0 nan, 200 0 50, 300 0 50; main 0 0 50, 0 -99 50, 300 -99 50, 300 0 50",
    "0-200 no terrain, 200-300 within limits", 0, 0 );
  row( "a gap at a dead end", "main 0 0 50, 100 0 50, 200 0 nan", "0-100 within limits, 100-200 no terrain", 0, 0 );
  row( "a hill beyond a gap", "main 0 0 50, 100 0 nan, 200 0 50, 300 0 150, 400 0 50",
    "0-200 no terrain, 200-230 within limits, 230-250 under limit, 250-350 above static level, 350-370 past a summit, "
    "370-400 past a summit",
    1, 1 );
  row( "a gap beyond a hill", "main 0 0 50, 100 0 150, 200 0 50, 300 0 nan, 400 0 50, 500 0 50",
    "0-30 within limits, 30-50 under limit, 50-150 above static level, 150-170 past a summit, 170-200 past a summit, "
    "200-400 no terrain, 400-500 past a summit",
    1, 0 );
  row( "a gap beside a hill",
    "main 200 0 50, 300 0 50; main 0 0 50, 100 0 150, 200 0 50; main 0 0 50, 100 50 nan, 200 0 50",
    "0-100 within limits", 0, 1 );
}

void TestSummits::states()
{
  QFETCH( QString, sketch );
  QFETCH( int, summits );
  QFETCH( int, unknown );
  JobSetup setup( sketch.toStdString() );
  for ( unsigned seed = 0; seed < 4; ++seed )
  {
    const StaticResult result = setup.solve();
    if ( seed == 0 )
      QTEST( test::statesAlong( result, 0 ), "expected" );
    QCOMPARE( test::countOf( result, FindingCode::Summit ), static_cast<std::size_t>( summits ) );
    QCOMPARE( test::countOf( result, FindingCode::SummitUnknown ), static_cast<std::size_t>( unknown ) );
    for ( const Piece &piece : result.pieces )
    {
      QCOMPARE( piece.over, piece.state == State::OverLimit );
      const bool isShort =
        piece.state == State::UnderLimit || piece.state == State::AboveStaticLevel || piece.state == State::PastASummit;
      if ( piece.state != State::OverLimit )
        QCOMPARE( piece.isShort, isShort );
    }
    setup.drawing = test::redrawn( setup.drawing, seed + 1 );
  }
  // Pipe that is over limit past a summit is short as well: its water does not get there.
  if ( sketch.contains( "250 0 0" ) )
    QVERIFY( test::pieceAlong( JobSetup( sketch.toStdString() ).solve(), 0, 230.0 ).isShort );
}

void TestSummits::summitTellsHeightAndLength()
{
  const StaticResult result =
    JobSetup( "main 0 0 50, 100 0 150, 200 0 50; main 200 0 50, 300 0 50; lateral 200 0 50, 200 40 50" ).solve();
  const Finding finding = test::findingOf( result, FindingCode::Summit );
  QCOMPARE( finding.line, 0 );
  QVERIFY( finding.place == ( PlanPoint { 100, 0 } ) );
  STILLHEAD_SAME( finding.figureM, 50.0 );
  STILLHEAD_NEAR( finding.lengthM, 50.0 + 100.0 + 40.0, 1e-9 );
}

// Two hills on a span that begins at the source: the second has no water on either side. Lower the first and the second is
// the one that stands in the way.
void TestSummits::everySummitWithWaterOnOneSide()
{
  const StaticResult both = JobSetup( "main 0 0 50, 100 0 150, 200 0 50, 300 0 120, 400 0 50" ).solve();
  QCOMPARE( test::countOf( both, FindingCode::Summit ), std::size_t( 1 ) );
  QVERIFY( test::findingOf( both, FindingCode::Summit ).place == ( PlanPoint { 100, 0 } ) );
  const StaticResult second = JobSetup( "main 0 0 50, 100 0 90, 200 0 50, 300 0 120, 400 0 50" ).solve();
  QCOMPARE( test::countOf( second, FindingCode::Summit ), std::size_t( 1 ) );
  QVERIFY( test::findingOf( second, FindingCode::Summit ).place == ( PlanPoint { 300, 0 } ) );
}

void TestSummits::lowCaseOnly()
{
  JobSetup setup( std::string( "main 0 0 50, 100 0 95, 200 0 50" ) );
  setup.setLevels( 110.0, 90.0 );
  const StaticResult result = setup.solve();
  QCOMPARE( test::countOf( result, FindingCode::Summit ), std::size_t( 1 ) );
  STILLHEAD_NEAR( test::findingOf( result, FindingCode::Summit ).figureM, 5.0, 1e-12 );
  QVERIFY( test::pieceAlong( result, 0, 199.0 ).state == State::PastASummit );
  // Its figures are those it would have if the pipe stayed full.
  STILLHEAD_NEAR( test::pieceAlong( result, 0, 199.0 ).pressureHighPa, 60000.0, 1e-9 );
  setup.setLevels( 110.0, 95.0 );
  QCOMPARE( test::countOf( setup.solve(), FindingCode::Summit ), std::size_t( 0 ) );
}

void TestSummits::nodesPastASummit()
{
  const StaticResult result =
    JobSetup( "main 0 0 50, 100 0 150; main 100 0 150, 200 0 50; main 200 0 50, 300 0 nan; main 0 900 50, 9 900 50" )
      .solve();
  const auto stateAt = [&]( double x, double y ) {
    for ( std::size_t i = 0; i < result.network.nodes.size(); ++i )
    {
      if ( result.network.nodes[i].place == PlanPoint { x, y } )
        return QString( stateName( result.nodeFigures[i].state ) );
    }
    return QString( "no node" );
  };
  QCOMPARE( stateAt( 0, 0 ), "within limits" );
  QCOMPARE( stateAt( 100, 0 ), "above static level" );
  QCOMPARE( stateAt( 200, 0 ), "past a summit" );
  QCOMPARE( stateAt( 300, 0 ), "no terrain" );
  QCOMPARE( stateAt( 0, 900 ), "no source" );
}

void TestSummits::unknownTerrainLetsWaterPass()
{
  const StaticResult result =
    JobSetup( "main 0 0 50, 100 0 nan, 200 0 50, 300 0 50; lateral 300 0 50, 300 25 50" ).solve();
  const Finding unknown = test::findingOf( result, FindingCode::SummitUnknown );
  STILLHEAD_NEAR( unknown.lengthM, 125.0, 1e-9 );
  QVERIFY( unknown.place == ( PlanPoint { 100, 0 } ) );
  const Finding gap = test::findingOf( result, FindingCode::NoTerrain );
  STILLHEAD_NEAR( gap.lengthM, 200.0, 1e-9 );
  QVERIFY( gap.place == ( PlanPoint { 100, 0 } ) );
  QCOMPARE( test::countOf( result, FindingCode::NoTerrain ), std::size_t( 1 ) );
}

void TestSummits::pipeWithoutSource()
{
  const StaticResult result =
    JobSetup( "main 0 0 50, 100 0 50; main 0 50 50, 100 50 50; lateral 50 50 50, 50 80 nan; main 0 90 50, 10 90 50" )
      .solve();
  QCOMPARE( test::countOf( result, FindingCode::NoSource ), std::size_t( 2 ) );
  QCOMPARE( test::countOf( result, FindingCode::NoTerrain ), std::size_t( 0 ) );
  STILLHEAD_NEAR( result.totals.noSourceM, 140.0, 1e-9 );
  double told = 0.0;
  for ( const Finding &finding : result.findings )
    told += finding.code == FindingCode::NoSource ? finding.lengthM : 0.0;
  STILLHEAD_NEAR( told, 140.0, 1e-9 );
}

// A hub of many pieces costs no more than as many apart: each piece is met at its two ends and no pairs are made.
void TestSummits::placesOfManyPiecesAreVisitedOnce()
{
  Drawing drawing;
  for ( int i = 0; i < 200; ++i )
    test::addLine( drawing, { { 0, 0 }, { 1000.0, 10.0 * i } }, {}, { 50.0, 150.0 } );
  JobSetup setup( drawing );
  setup.job.useLineZ = true;
  setup.job.joins.toleranceM = 0.01;
  const StaticResult result = setup.solve();
  const PieceGraph graph( result.network, result.pieces );
  std::size_t visited = 0;
  graph.visitPlaces( [&]( int, const std::vector<int> &pieces ) { visited += pieces.size(); } );
  QCOMPARE( visited, 2 * result.pieces.size() );
}

QTEST_APPLESS_MAIN( TestSummits )
#include "testsummits.moc"
