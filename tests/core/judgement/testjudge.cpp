// SPDX-License-Identifier: GPL-2.0-or-later
// What a piece is: every state and the order in which they are decided, truth fields, bands, close calls, the limits of
// laterals, and the names in the outputs.
#include "core/judgement/judge.h"
#include "core/plan/finding.h"
#include "tests/support/memoryterrain.h"
#include "tests/support/tolerance.h"

using namespace stillhead;

namespace
{

  //! γ = 1000 N/m3, LEAST 20 kPa, MOST 50 kPa; laterals 30 and 40 kPa; bands at 20, 35 and 50 kPa.
  constexpr double WEIGHT = 1000.0;

  Limits limits( double leastPa = 20000.0 )
  {
    Limits limits;
    limits.leastPa = leastPa;
    limits.mostPa = 50000.0;
    limits.lateralLeastPa = 30000.0;
    limits.lateralMostPa = 40000.0;
    limits.bandsPa = { 20000.0, 35000.0, 50000.0 };
    return limits;
  }

  Zone fedZone( double highM, double lowM, double doubtPa = 0.0 )
  {
    Zone zone;
    zone.fed = true;
    zone.levels = { highM, lowM };
    zone.doubtHighPa = zone.doubtLowPa = doubtPa;
    return zone;
  }

  CutPiece pieceBetween( double lowestM, double highestM )
  {
    CutPiece piece;
    piece.known = true;
    piece.toM = 10.0;
    piece.lowestM = lowestM;
    piece.highestM = highestM;
    piece.middleM = 0.5 * ( lowestM + highestM );
    return piece;
  }

  Piece judged( const CutPiece &cut, const Zone &zone, Role role = Role::Mainline, double leastPa = 20000.0 )
  {
    return judgedPiece( cut, 3, 1, zone, role, limits( leastPa ), WEIGHT );
  }

} // namespace

class TestJudge : public QObject
{
    Q_OBJECT

  private slots:
    void state_data();
    void state();
    void figuresOfAPiece();
    void withoutFigures();
    void laterals_data();
    void laterals();
    void band_data();
    void band();
    void pieceUpToALimitIsBelowIt();
    void closeCall_data();
    void closeCall();
    void pastASummit_data();
    void pastASummit();
    void names();
};

void TestJudge::state_data()
{
  QTest::addColumn<double>( "high" );
  QTest::addColumn<double>( "low" );
  QTest::addColumn<double>( "elevation" );
  QTest::addColumn<QString>( "state" );
  QTest::addColumn<bool>( "over" );
  QTest::addColumn<bool>( "isShort" );
  const auto row = []( const char *name, double high, double low, double elevation, const char *state, bool over,
                     bool isShort ) { QTest::newRow( name ) << high << low << elevation << state << over << isShort; };
  row( "within", 150, 140, 110, "within limits", false, false );
  row( "exactly at MOST", 150, 140, 100, "within limits", false, false );
  row( "over MOST by a millimetre", 150, 140, 99.999, "over limit", true, false );
  row( "exactly at LEAST", 150, 140, 120, "within limits", false, false );
  row( "under LEAST by a millimetre", 150, 140, 120.001, "under limit", false, true );
  row( "exactly at the static level", 150, 140, 140, "under limit", false, true );
  row( "above it by a millimetre", 150, 140, 140.001, "above static level", false, true );
  row( "above both levels", 150, 140, 170, "above static level", false, true );
  row( "over in the high case, under in the low", 150, 110, 95, "over and under", true, true );
  row( "over in the high case, above the level of the low", 150, 90, 95, "over and under", true, true );
  row( "at MOST and under", 150, 110, 100, "under limit", false, true );
  row( "over and at LEAST", 150, 115, 95, "over limit", true, false );
}

void TestJudge::state()
{
  QFETCH( double, high );
  QFETCH( double, low );
  QFETCH( double, elevation );
  const Piece piece = judged( pieceBetween( elevation, elevation ), fedZone( high, low ) );
  QTEST( QString( stateName( piece.state ) ), "state" );
  QTEST( piece.over, "over" );
  QTEST( piece.isShort, "isShort" );
}

void TestJudge::figuresOfAPiece()
{
  const Piece piece = judged( pieceBetween( 105, 115 ), fedZone( 150, 140 ) );
  QCOMPARE( piece.span, 3 );
  QCOMPARE( piece.zone, 1 );
  STILLHEAD_SAME( piece.toM, 10.0 );
  STILLHEAD_SAME( piece.lowestM, 105.0 );
  STILLHEAD_SAME( piece.highestM, 115.0 );
  STILLHEAD_SAME( piece.pressureLowPa, 25000.0 );
  STILLHEAD_SAME( piece.pressureHighPa, 45000.0 );
  // Above the static level the pressure is the negative number that the rule gives.
  STILLHEAD_SAME( judged( pieceBetween( 151, 160 ), fedZone( 150, 140 ) ).pressureLowPa, -20000.0 );
  // With a LEAST below nothing, pipe over MOST that lies above the low level is over limit, and short all the same.
  const Piece above = judged( pieceBetween( 95, 95 ), fedZone( 150, 90 ), Role::Mainline, -1e6 );
  QVERIFY( above.state == State::OverLimit && above.over && above.isShort );
}

void TestJudge::withoutFigures()
{
  CutPiece unknown = pieceBetween( 100, 100 );
  unknown.known = false;
  const Piece noTerrain = judged( unknown, fedZone( 150, 140 ) );
  QVERIFY( noTerrain.state == State::NoTerrain );
  const Piece noSource = judged( pieceBetween( 100, 101 ), Zone() );
  QVERIFY( noSource.state == State::NoSource );
  QVERIFY( judged( unknown, Zone() ).state == State::NoSource );
  // Elevation is told where it is known, though nothing feeds the pipe.
  STILLHEAD_SAME( noSource.lowestM, 100.0 );
  STILLHEAD_SAME( noSource.highestM, 101.0 );
  STILLHEAD_SAME( noTerrain.lowestM, test::NODATA );
  for ( const Piece &piece : { noTerrain, noSource } )
  {
    QVERIFY( std::isnan( piece.pressureLowPa ) && std::isnan( piece.pressureHighPa ) );
    QCOMPARE( piece.band, -1 );
    QVERIFY( !piece.over && !piece.isShort && !piece.closeCall );
  }
}

void TestJudge::laterals_data()
{
  QTest::addColumn<double>( "elevation" );
  QTest::addColumn<QString>( "mainline" );
  QTest::addColumn<QString>( "lateral" );
  QTest::newRow( "45 kPa" ) << 105.0 << "within limits"
                            << "over limit";
  QTest::newRow( "40 kPa" ) << 110.0 << "within limits"
                            << "within limits";
  QTest::newRow( "30 kPa in the low case" ) << 110.0 << "within limits"
                                            << "within limits";
  QTest::newRow( "25 kPa in the low case" ) << 115.0 << "within limits"
                                            << "under limit";
}

void TestJudge::laterals()
{
  QFETCH( double, elevation );
  const CutPiece cut = pieceBetween( elevation, elevation );
  QTEST( QString( stateName( judged( cut, fedZone( 150, 140 ) ).state ) ), "mainline" );
  QTEST( QString( stateName( judged( cut, fedZone( 150, 140 ), Role::Lateral ).state ) ), "lateral" );
}

void TestJudge::band_data()
{
  QTest::addColumn<double>( "pressure" );
  QTest::addColumn<int>( "band" );
  QTest::newRow( "under all" ) << 19999.9 << 0;
  QTest::newRow( "equal to a limit: the band above" ) << 20000.0 << 1;
  QTest::newRow( "equal but for rounding" ) << 20000.0 * ( 1.0 - 1e-12 ) << 1;
  QTest::newRow( "between" ) << 34999.0 << 1;
  QTest::newRow( "equal to the last" ) << 50000.0 << 3;
  QTest::newRow( "over all" ) << 900000.0 << 3;
  QTest::newRow( "negative" ) << -5000.0 << 0;
}

void TestJudge::band()
{
  QFETCH( double, pressure );
  QTEST( bandOf( pressure, limits().bandsPa ), "band" );
  QCOMPARE( bandOf( pressure, {} ), 0 );
}

// A piece that ends exactly where 50 kPa is reached has 50 kPa as its highest pressure and belongs to the band below.
void TestJudge::pieceUpToALimitIsBelowIt()
{
  const Piece below = judged( pieceBetween( 100, 115 ), fedZone( 150, 140 ) );
  STILLHEAD_SAME( below.pressureHighPa, 50000.0 );
  QCOMPARE( below.band, 2 );
  QVERIFY( below.state == State::WithinLimits );
  const Piece beyond = judged( pieceBetween( 90, 100 ), fedZone( 150, 140 ) );
  QCOMPARE( beyond.band, 3 );
  QVERIFY( beyond.state == State::OverLimit );
  QCOMPARE( judged( pieceBetween( 100, 100 ), fedZone( 150, 140 ) ).band, 3 );
}

void TestJudge::closeCall_data()
{
  QTest::addColumn<double>( "high" );
  QTest::addColumn<double>( "low" );
  QTest::addColumn<double>( "elevation" );
  QTest::addColumn<double>( "doubt" );
  QTest::addColumn<bool>( "close" );
  QTest::newRow( "no doubt, at MOST" ) << 150.0 << 140.0 << 100.0 << 0.0 << false;
  QTest::newRow( "within the doubt under MOST" ) << 150.0 << 140.0 << 100.5 << 1000.0 << true;
  QTest::newRow( "within the doubt over MOST" ) << 150.0 << 140.0 << 99.5 << 1000.0 << true;
  QTest::newRow( "beyond the doubt under MOST" ) << 150.0 << 140.0 << 101.5 << 1000.0 << false;
  QTest::newRow( "beyond the doubt over MOST" ) << 150.0 << 140.0 << 98.5 << 1000.0 << false;
  QTest::newRow( "within the doubt of LEAST" ) << 150.0 << 140.0 << 120.5 << 1000.0 << true;
  QTest::newRow( "beyond the doubt of LEAST" ) << 150.0 << 140.0 << 121.5 << 1000.0 << false;
  QTest::newRow( "the low case near MOST is no matter" ) << 160.0 << 140.0 << 90.5 << 1000.0 << false;
  QTest::newRow( "over and under, near LEAST" ) << 150.0 << 115.0 << 95.5 << 1000.0 << true;
  QTest::newRow( "above the static level, however doubtful" ) << 150.0 << 140.0 << 140.5 << 30000.0 << false;
}

void TestJudge::closeCall()
{
  QFETCH( double, high );
  QFETCH( double, low );
  QFETCH( double, elevation );
  QFETCH( double, doubt );
  QTEST( judged( pieceBetween( elevation, elevation ), fedZone( high, low, doubt ) ).closeCall, "close" );
}

void TestJudge::pastASummit_data()
{
  QTest::addColumn<double>( "low" );
  QTest::addColumn<double>( "elevation" );
  QTest::addColumn<QString>( "state" );
  QTest::addColumn<bool>( "close" );
  QTest::newRow( "within limits by pressure" ) << 140.0 << 110.0 << "past a summit" << false;
  QTest::newRow( "under limit by pressure" ) << 140.0 << 130.0 << "past a summit" << false;
  QTest::newRow( "near a limit: no close call any more" ) << 140.0 << 119.5 << "past a summit" << false;
  QTest::newRow( "over limit goes first" ) << 140.0 << 80.0 << "over limit" << false;
  QTest::newRow( "over limit and near it" ) << 140.0 << 99.5 << "over limit" << true;
  QTest::newRow( "over and under goes first" ) << 110.0 << 95.0 << "over and under" << false;
  QTest::newRow( "above the static level goes first" ) << 140.0 << 145.0 << "above static level" << false;
}

void TestJudge::pastASummit()
{
  QFETCH( double, low );
  QFETCH( double, elevation );
  Piece piece = judged( pieceBetween( elevation, elevation ), fedZone( 150, low, 1000.0 ) );
  const double before = piece.pressureHighPa;
  const int band = piece.band;
  markPastASummit( piece );
  QTEST( QString( stateName( piece.state ) ), "state" );
  QTEST( piece.closeCall, "close" );
  QVERIFY( piece.isShort );
  STILLHEAD_SAME( piece.pressureHighPa, before );
  QCOMPARE( piece.band, band );
}

// These texts are part of the public contract.
void TestJudge::names()
{
  const char *const states[] { "no source", "no terrain", "over and under", "over limit", "above static level",
    "past a summit", "under limit", "within limits" };
  for ( int i = 0; i < 8; ++i )
    QCOMPARE( stateName( static_cast<State>( i ) ), states[i] );
  const std::pair<FindingCode, const char *> findings[] {
    { FindingCode::NearMiss, "near miss" },
    { FindingCode::CrossingNotJoined, "crossing not joined" },
    { FindingCode::NoSource, "no source" },
    { FindingCode::NoTerrain, "no terrain" },
    { FindingCode::Summit, "summit" },
    { FindingCode::SummitUnknown, "summit unknown" },
    { FindingCode::SystemsTouch, "systems touch" },
    { FindingCode::Duplicate, "duplicate" },
    { FindingCode::NoLength, "no length" },
    { FindingCode::NoSurveyZ, "no survey Z" },
    { FindingCode::OneReading, "one reading" },
    { FindingCode::UnusualPressure, "unusual pressure" },
    { FindingCode::PumpDutyNotGiven, "pump duty not given" },
  };
  for ( const auto &[code, name] : findings )
    QCOMPARE( findingName( code ), name );
}

QTEST_APPLESS_MAIN( TestJudge )
#include "testjudge.moc"
