// SPDX-License-Identifier: GPL-2.0-or-later
// Devices and several sources at rest, sentence by sentence of the rules, worked by hand: one metre of water is 1000 Pa, the
// source is an open water level of 100 m, and pipe elevations are drawn.
#include "core/judgement/judge.h"
#include "tests/support/jobsetup.h"
#include "tests/support/tolerance.h"

#include <QTest>

using namespace stillhead;
using stillhead::test::JobSetup;

namespace
{

  Device device( DeviceKind kind, double x, double y = 0.0 )
  {
    Device own;
    own.kind = kind;
    own.place = { x, y };
    return own;
  }

  Device regulator( double x, double setPa, double risePa, double y = 0.0 )
  {
    Device own = device( DeviceKind::Regulator, x, y );
    own.setPa = setPa;
    own.risePa = risePa;
    return own;
  }

  Device booster( double x, double boostPa, std::optional<double> lowPa, double y = 0.0 )
  {
    Device own = device( DeviceKind::Booster, x, y );
    own.boostPa = boostPa;
    own.boostLowPa = lowPa;
    return own;
  }

  //! A main of 100 m at an elevation of 50 m.
  JobSetup levelMain( std::vector<Device> devices )
  {
    JobSetup setup( "main 0 0 50, 100 0 50" );
    setup.job.devices = std::move( devices );
    return setup;
  }

  //! Levels at a place of the first line; NaN where no water comes.
  StaticLevels levelsAt( const StaticResult &result, double alongM, int drawn = 0 )
  {
    const Zone &zone = result.zones[static_cast<std::size_t>( test::pieceAlong( result, drawn, alongM ).zone )];
    return zone.fed ? zone.levels : StaticLevels { NOT_A_FIGURE, NOT_A_FIGURE };
  }

  Source sourceAt( double x, double levelM, double y = 0.0 )
  {
    Source source;
    source.place = { x, y };
    source.kind = SourceKind::WaterLevel;
    source.high = levelM;
    source.low = levelM;
    return source;
  }

  Refusal refusalOf( JobSetup &setup )
  {
    try
    {
      setup.solve();
    }
    catch ( const Refusal &refusal )
    {
      return refusal;
    }
    throw std::logic_error( "not refused" );
  }

} // namespace

class TestDevices : public QObject
{
    Q_OBJECT

  private slots:
    void levels_data();
    void levels();
    void aRegulatorFedTheWrongWayPassesNothing();
    void aClosedValvePartsAndHasTwoNodes();
    void aControlValveParts();
    void statuses_data();
    void statuses();
    void heldShutByALargerLevel();
    void bypassWithItsWay();
    void twoSideBySideAreAStation();
    void openWaterIsFixed();
    void aCycleThatRaisesItself();
    void sourcesThatNearlyAgree();
    void sourcesThatDisagree();
    void systemsStayApart();
    void pastASummitFeedsPastASummit();
    void doubtBelowARegulator();
    void failedOpen();
    void unclearPlaces();
    void theLegItStandsOn();
    void addingARegulatorRaisesNothing();
};

// What a device makes of a level of 100 m in the high case and 90 m in the low one, at 50 m.
void TestDevices::levels_data()
{
  QTest::addColumn<int>( "kind" );
  QTest::addColumn<double>( "setKpa" );  // or boost
  QTest::addColumn<double>( "riseKpa" ); // or boost while running
  QTest::addColumn<double>( "highM" );
  QTest::addColumn<double>( "lowM" );
  const int regulates = static_cast<int>( DeviceKind::Regulator );
  const int boosts = static_cast<int>( DeviceKind::Booster );
  QTest::newRow( "lock-up high, set low" ) << regulates << 15.0 << 5.0 << 70.0 << 65.0;
  QTest::newRow( "no rise" ) << regulates << 15.0 << 0.0 << 65.0 << 65.0;
  QTest::newRow( "inlet below lock-up" ) << regulates << 47.0 << 5.0 << 100.0 << 90.0;
  QTest::newRow( "inlet below set in the low case only" ) << regulates << 42.0 << 5.0 << 97.0 << 90.0;
  QTest::newRow( "booster, no flow and running" ) << boosts << 30.0 << 20.0 << 130.0 << 110.0;
  QTest::newRow( "check valve" ) << static_cast<int>( DeviceKind::CheckValve ) << 0.0 << 0.0 << 100.0 << 90.0;
}

void TestDevices::levels()
{
  QFETCH( int, kind );
  QFETCH( double, setKpa );
  QFETCH( double, riseKpa );
  QFETCH( double, highM );
  QFETCH( double, lowM );
  const auto own = static_cast<DeviceKind>( kind );
  JobSetup setup = levelMain( { own == DeviceKind::Regulator ? regulator( 20.0, setKpa * 1000.0, riseKpa * 1000.0 )
      : own == DeviceKind::Booster                           ? booster( 20.0, setKpa * 1000.0, riseKpa * 1000.0 )
                                                             : device( own, 20.0 ) } );
  setup.setLevels( 100.0, 90.0 );
  const StaticResult result = setup.solve();
  QCOMPARE( levelsAt( result, 10.0 ).highM, 100.0 );
  QCOMPARE( levelsAt( result, 50.0 ).highM, highM );
  QCOMPARE( levelsAt( result, 50.0 ).lowM, lowM );
  QCOMPARE( result.devices.size(), std::size_t( 1 ) );
  QCOMPARE( result.devices.front().inletHighPa, 50000.0 );
  QCOMPARE( result.devices.front().inletLowPa, 40000.0 );
  QCOMPARE( result.devices.front().outletHighPa, ( highM - 50.0 ) * 1000.0 );
  QCOMPARE( result.devices.front().outletLowPa, ( lowM - 50.0 ) * 1000.0 );
  QCOMPARE(
    test::countOf( result, FindingCode::PressureMayBeTrapped ), std::size_t( own == DeviceKind::CheckValve ? 1 : 0 ) );
}

void TestDevices::aRegulatorFedTheWrongWayPassesNothing()
{
  for ( const DeviceKind kind : { DeviceKind::Regulator, DeviceKind::Booster, DeviceKind::CheckValve } )
  {
    Device own = regulator( 20.0, 25000.0, 0.0 );
    own.kind = kind;
    own.direction = DeviceDirection::EndToStart;
    JobSetup setup = levelMain( { own } );
    const StaticResult result = setup.solve();
    QCOMPARE( test::statesAlong( result, 0 ), QString( "0-20 within limits, 20-100 no source" ) );
    // The drawn direction is turned with the line.
    setup.drawing = test::sketched( "main 100 0 50, 0 0 50" );
    QCOMPARE( test::statesAlong( setup.solve(), 0 ), QString( "0-80 within limits, 80-100 within limits" ) );
  }
  // A booster whose inlet pressure is below 0 adds nothing.
  JobSetup dry( "main 0 0 50, 50 0 110, 100 0 60" );
  dry.job.devices = { booster( 50.0, 30000.0, 30000.0 ) };
  QCOMPARE( levelsAt( dry.solve(), 75.0 ).highM, 100.0 );
}

void TestDevices::aClosedValvePartsAndHasTwoNodes()
{
  JobSetup setup = levelMain( { device( DeviceKind::ClosedValve, 20.0 ) } );
  const StaticResult result = setup.solve();
  QCOMPARE( test::statesAlong( result, 0 ), QString( "0-20 within limits, 20-100 no source" ) );
  int there = 0;
  for ( const Node &node : result.network.nodes )
    there += node.place == PlanPoint { 20.0, 0.0 } ? 1 : 0;
  QCOMPARE( there, 2 );
}

void TestDevices::aControlValveParts()
{
  Device valve = device( DeviceKind::ControlValve, 20.0 );
  JobSetup passing = levelMain( { valve } );
  const StaticResult one = passing.solve();
  QCOMPARE( one.zones.size(), std::size_t( 1 ) );
  QCOMPARE( levelsAt( one, 50.0 ).highM, 100.0 );
  valve.setPa = 30000.0;
  JobSetup regulating = levelMain( { valve } );
  const StaticResult two = regulating.solve();
  QCOMPARE( two.zones.size(), std::size_t( 2 ) );
  QCOMPARE( levelsAt( two, 50.0 ).highM, 80.0 );
  // It stands at a joint of three legs as long as it only passes.
  JobSetup joint( "main 0 0 50, 50 0 50; lateral 20 0 50, 20 30 50; main 50 0 50, 100 0 50" );
  joint.job.devices = { device( DeviceKind::ControlValve, 20.0 ) };
  QCOMPARE( test::countOf( joint.solve(), FindingCode::DeviceAtAJoint ), std::size_t( 0 ) );
  joint.job.devices.front().setPa = 30000.0;
  QCOMPARE( test::countOf( joint.solve(), FindingCode::DeviceAtAJoint ), std::size_t( 1 ) );
}

// Low inlet 40 kPa; least drop 7 kPa.
void TestDevices::statuses_data()
{
  QTest::addColumn<double>( "setPa" );
  QTest::addColumn<QString>( "status" );
  QTest::addColumn<int>( "finding" );
  QTest::newRow( "holding" ) << 15000.0 << "holding" << -1;
  QTest::newRow( "just enough" ) << 33000.0 << "holding" << -1;
  QTest::newRow( "short of it" ) << 33001.0 << "short of differential"
                                 << static_cast<int>( FindingCode::RegulatorShortOfDifferential );
  QTest::newRow( "inlet at set" ) << 40000.0 << "short of differential"
                                  << static_cast<int>( FindingCode::RegulatorShortOfDifferential );
  QTest::newRow( "inlet below set" ) << 40001.0 << "wide open" << static_cast<int>( FindingCode::RegulatorWideOpen );
}

void TestDevices::statuses()
{
  QFETCH( double, setPa );
  QFETCH( QString, status );
  QFETCH( int, finding );
  JobSetup setup = levelMain( { regulator( 20.0, setPa, 5000.0 ) } );
  setup.setLevels( 100.0, 90.0 );
  setup.job.leastDropPa = 7000.0;
  const StaticResult result = setup.solve();
  QCOMPARE( QString::fromLatin1( regulatorStatusName( result.devices.front().status ) ), status );
  for ( const FindingCode code : { FindingCode::RegulatorShortOfDifferential, FindingCode::RegulatorWideOpen,
          FindingCode::RegulatorHeldShut, FindingCode::RegulatorBypassed } )
    QCOMPARE( test::countOf( result, code ), std::size_t( static_cast<int>( code ) == finding ? 1 : 0 ) );
}

void TestDevices::heldShutByALargerLevel()
{
  JobSetup setup = levelMain( { regulator( 20.0, 15000.0, 5000.0 ) } );
  setup.job.devices.front().direction = DeviceDirection::StartToEnd;
  setup.job.sources.push_back( sourceAt( 100.0, 90.0 ) );
  const StaticResult result = setup.solve();
  QCOMPARE( levelsAt( result, 50.0 ).highM, 90.0 );
  QCOMPARE( levelsAt( result, 10.0 ).highM, 100.0 );
  QVERIFY( result.devices.front().status == RegulatorStatus::HeldShut );
  QCOMPARE( test::findingOf( result, FindingCode::RegulatorHeldShut ).device, 0 );
}

void TestDevices::bypassWithItsWay()
{
  // Line 1 goes round the regulator on line 0, line 2 is the rest.
  JobSetup setup( "main 0 0 50, 40 0 50; main 10 0 50, 10 10 50, 40 10 50, 40 0 50; main 40 0 50, 100 0 50" );
  setup.job.devices = { regulator( 20.0, 15000.0, 5000.0 ) };
  const StaticResult result = setup.solve();
  QCOMPARE( levelsAt( result, 50.0, 2 ).highM, 100.0 );
  const Finding finding = test::findingOf( result, FindingCode::RegulatorBypassed );
  QVERIFY( std::find( finding.way.begin(), finding.way.end(), 1 ) != finding.way.end() );
  // A closed valve on the way ends the bypass, a check valve does not.
  setup.job.devices.push_back( device( DeviceKind::ClosedValve, 25.0, 10.0 ) );
  const StaticResult closed = setup.solve();
  QCOMPARE( test::countOf( closed, FindingCode::RegulatorBypassed ), std::size_t( 0 ) );
  QCOMPARE( levelsAt( closed, 50.0, 2 ).highM, 70.0 );
  setup.job.devices.back().kind = DeviceKind::CheckValve;
  QCOMPARE( test::countOf( setup.solve(), FindingCode::RegulatorBypassed ), std::size_t( 1 ) );
}

void TestDevices::twoSideBySideAreAStation()
{
  JobSetup setup( "main 0 0 50, 40 0 50; main 10 0 50, 10 10 50, 40 10 50, 40 0 50; main 40 0 50, 100 0 50" );
  setup.job.devices = { regulator( 20.0, 15000.0, 5000.0 ), regulator( 25.0, 12000.0, 5000.0, 10.0 ) };
  const StaticResult result = setup.solve();
  QCOMPARE( test::countOf( result, FindingCode::RegulatorBypassed ), std::size_t( 0 ) );
  // The larger of the two counts; the smaller one is held shut.
  QCOMPARE( levelsAt( result, 50.0, 2 ).highM, 70.0 );
  QCOMPARE( test::countOf( result, FindingCode::RegulatorHeldShut ), std::size_t( 1 ) );
}

void TestDevices::openWaterIsFixed()
{
  JobSetup setup = levelMain( { booster( 50.0, 20000.0, 20000.0 ) } );
  setup.job.devices.front().direction = DeviceDirection::StartToEnd;
  setup.job.sources.push_back( sourceAt( 100.0, 110.0 ) );
  const Refusal refusal = refusalOf( setup );
  QVERIFY( refusal.reason == Refusal::Reason::LevelOverWater );
  QCOMPARE( refusal.sources, ( std::vector<int> { 1, 0 } ) );
  QCOMPARE( refusal.devices, std::vector<int> { 0 } );
  STILLHEAD_NEAR( refusal.figureM, 10.0, 1e-9 );
  // Water that stands higher itself is not disturbed, and pressure in a pipe may be raised.
  setup.job.sources.back() = sourceAt( 100.0, 125.0 );
  QCOMPARE( levelsAt( setup.solve(), 75.0 ).highM, 125.0 );
  setup.job.sources.back().kind = SourceKind::PressureReading;
  setup.job.sources.back().groundElevationM = 50.0;
  setup.job.sources.back().high = 60000.0;
  setup.job.sources.back().low = 60000.0;
  QCOMPARE( levelsAt( setup.solve(), 75.0 ).highM, 120.0 );
}

void TestDevices::aCycleThatRaisesItself()
{
  JobSetup setup( "main 0 0 50, 40 0 50; main 10 0 50, 10 10 50, 40 10 50, 40 0 50" );
  Source &source = setup.job.sources.front();
  source.kind = SourceKind::PressureReading;
  source.groundElevationM = 50.0;
  source.high = 50000.0;
  source.low = 50000.0;
  setup.job.devices = { booster( 20.0, 10000.0, 10000.0 ) };
  const Refusal refusal = refusalOf( setup );
  QVERIFY( refusal.reason == Refusal::Reason::LevelRaisesItself );
  QCOMPARE( refusal.devices, std::vector<int> { 0 } );
  // Through a regulator on the way back it settles at the largest level.
  setup.job.devices.push_back( regulator( 25.0, 30000.0, 0.0, 10.0 ) );
  setup.job.devices.back().direction = DeviceDirection::EndToStart;
  QCOMPARE( levelsAt( setup.solve(), 30.0 ).highM, 110.0 );
}

// Levels that agree within 0.5 psi (3447 Pa): the higher counts high, the lower low.
void TestDevices::sourcesThatNearlyAgree()
{
  JobSetup setup = levelMain( {} );
  setup.job.sources.push_back( sourceAt( 100.0, 97.0 ) );
  const StaticResult result = setup.solve();
  QCOMPARE( levelsAt( result, 50.0 ).highM, 100.0 );
  QCOMPARE( levelsAt( result, 50.0 ).lowM, 97.0 );
  STILLHEAD_NEAR( test::findingOf( result, FindingCode::LevelsDiffer ).figurePa, 3000.0, 1e-6 );
}

void TestDevices::sourcesThatDisagree()
{
  JobSetup setup( "main 0 0 50, 50 0 50; main 50 0 50, 100 0 50; lateral 50 0 50, 50 20 50" );
  setup.job.sources.push_back( sourceAt( 100.0, 96.0 ) );
  const Refusal refusal = refusalOf( setup );
  QVERIFY( refusal.reason == Refusal::Reason::SourcesDisagree );
  QCOMPARE( refusal.sources, ( std::vector<int> { 0, 1 } ) );
  QCOMPARE( refusal.figureM, 4.0 );
  QCOMPARE( refusal.lines, ( std::vector<int> { 0, 1 } ) );
  // Within their combined doubt they are one: 4000 Pa < √2 · 3000 Pa.
  setup.job.readingErrorPa = 3000.0;
  QCOMPARE( test::countOf( setup.solve(), FindingCode::LevelsDiffer ), std::size_t( 1 ) );
  // Parted by a closed valve both stand.
  setup.job.readingErrorPa = 0.0;
  setup.job.devices = { device( DeviceKind::ClosedValve, 75.0 ) };
  QCOMPARE( levelsAt( setup.solve(), 40.0, 1 ).highM, 96.0 );
}

void TestDevices::systemsStayApart()
{
  JobSetup setup( "main system=a 0 0 50, 100 0 50; main system=b 50 0 60, 50 80 60" );
  setup.job.sources.push_back( sourceAt( 50.0, 80.0, 80.0 ) );
  setup.job.sources.front().system = setup.drawing.lines[0].system;
  setup.job.sources.back().system = setup.drawing.lines[1].system;
  const StaticResult result = setup.solve();
  QCOMPARE( levelsAt( result, 50.0, 0 ).highM, 100.0 );
  QCOMPARE( levelsAt( result, 40.0, 1 ).highM, 80.0 );
  QCOMPARE( test::countOf( result, FindingCode::SystemsTouch ), std::size_t( 1 ) );
  // A device of a system stands only on its lines.
  setup.job.devices = { device( DeviceKind::ClosedValve, 50.0, 0.0 ) };
  setup.job.devices.front().system = setup.job.sources.back().system;
  QCOMPARE( levelsAt( setup.solve(), 75.0, 0 ).highM, 100.0 );
}

void TestDevices::pastASummitFeedsPastASummit()
{
  JobSetup setup( "main 0 0 50, 40 0 110, 60 0 50, 100 0 50" );
  setup.job.devices = { regulator( 80.0, 30000.0, 0.0 ) };
  const StaticResult result = setup.solve();
  QVERIFY( test::pieceAlong( result, 0, 90.0 ).state == State::PastASummit );
  QVERIFY( test::pieceAlong( result, 0, 90.0 ).isShort );
  QCOMPARE( levelsAt( result, 90.0 ).highM, 80.0 );
}

// Below a regulator that holds, reading and source drop out and the terrain at the regulator comes in.
void TestDevices::doubtBelowARegulator()
{
  JobSetup setup = levelMain( { regulator( 20.0, 15000.0, 5000.0 ) } );
  setup.job.readingErrorPa = 2000.0;
  setup.job.terrainRmseM = 0.5;
  const StaticResult result = setup.solve();
  const auto doubtAt = [&]( double alongM ) {
    return result.zones[static_cast<std::size_t>( test::pieceAlong( result, 0, alongM ).zone )].doubtHighPa;
  };
  STILLHEAD_NEAR( doubtAt( 10.0 ), std::hypot( 1.96 * 500.0, 2000.0 ), 1e-6 );
  STILLHEAD_NEAR( doubtAt( 50.0 ), 1.96 * 500.0 * std::sqrt( 2.0 ), 1e-6 );
  // With a surveyed elevation only the pipe's own is left; wide open the reading stays.
  setup.job.devices.front().elevationM = 50.0;
  const StaticResult surveyed = setup.solve();
  STILLHEAD_NEAR( surveyed.zones[static_cast<std::size_t>( test::pieceAlong( surveyed, 0, 50.0 ).zone )].doubtHighPa,
    1.96 * 500.0, 1e-6 );
  setup.job.devices.front().setPa = 60000.0;
  const StaticResult open = setup.solve();
  STILLHEAD_NEAR( open.zones[static_cast<std::size_t>( test::pieceAlong( open, 0, 50.0 ).zone )].doubtHighPa,
    std::hypot( 1.96 * 500.0, 2000.0 ), 1e-6 );
}

void TestDevices::failedOpen()
{
  JobSetup setup = levelMain( { regulator( 20.0, 30000.0, 0.0 ), regulator( 60.0, 10000.0, 5000.0 ) } );
  const auto failureAt = []( const StaticResult &result, double alongM ) {
    return result.failures[static_cast<std::size_t>( test::pieceAlong( result, 0, alongM ).zone )];
  };
  QVERIFY( setup.solve().failures.empty() );
  setup.job.failedOpen = FailedOpen::EachInTurn;
  const StaticResult each = setup.solve();
  QCOMPARE( failureAt( each, 10.0 ).levelM, 100.0 );
  QCOMPARE( failureAt( each, 10.0 ).device, -1 );
  QCOMPARE( failureAt( each, 40.0 ).levelM, 100.0 );
  QCOMPARE( failureAt( each, 40.0 ).device, 0 );
  QCOMPARE( failureAt( each, 80.0 ).levelM, 80.0 );
  QCOMPARE( failureAt( each, 80.0 ).device, 1 );
  setup.job.failedOpen = FailedOpen::All;
  const StaticResult all = setup.solve();
  QCOMPARE( failureAt( all, 80.0 ).levelM, 100.0 );
  QCOMPARE( failureAt( all, 80.0 ).device, 1 );
  // The figures of the run itself are those of regulators in good order.
  QCOMPARE( levelsAt( all, 80.0 ).highM, 65.0 );
}

void TestDevices::unclearPlaces()
{
  JobSetup setup( "main 0 0 50, 50 0 50; main 50 0 50, 100 0 50; lateral 50 0 50, 50 20 50" );
  setup.job.devices = { regulator( 50.0, 15000.0, 0.0 ), regulator( 70.0, 15000.0, 0.0, 3.0 ) };
  const StaticResult result = setup.solve();
  QVERIFY( result.devices.empty() );
  QCOMPARE( test::findingOf( result, FindingCode::DeviceAtAJoint ).device, 0 );
  const Finding off = test::findingOf( result, FindingCode::DeviceOffTheLine );
  QCOMPARE( off.device, 1 );
  STILLHEAD_NEAR( off.gapM, 3.0, 1e-9 );
  QCOMPARE( levelsAt( result, 40.0, 1 ).highM, 100.0 );
}

// Near a sharp joint the lateral's own device stays on the lateral, although the mainline lies within the tolerance.
void TestDevices::theLegItStandsOn()
{
  JobSetup setup( "main 0 0 50, 100 0 50; lateral 50 0 50, 90 4 50" );
  const double run = 0.3 / std::hypot( 40.0, 4.0 );
  setup.job.devices = { regulator( 50.0 + 40.0 * run, 15000.0, 0.0, 4.0 * run ) };
  const StaticResult result = setup.solve();
  QCOMPARE( result.devices.size(), std::size_t( 1 ) );
  QCOMPARE( levelsAt( result, 75.0, 0 ).highM, 100.0 );
  QCOMPARE( levelsAt( result, 20.0, 1 ).highM, 65.0 );
}

void TestDevices::addingARegulatorRaisesNothing()
{
  std::mt19937 random( 11 );
  const auto pick = [&]( double low, double high ) {
    return std::uniform_real_distribution<double>( low, high )( random );
  };
  const char *sketch = "main 0 0 50, 60 0 20, 120 0 45; main 60 0 20, 60 50 5; lateral 90 0 33, 90 40 60; "
                       "main 60 50 5, 120 50 12, 120 0 45";
  for ( int round = 0; round < 200; ++round )
  {
    JobSetup setup( sketch );
    setup.setLevels( 100.0, 92.0 );
    for ( int i = 0; i < 3; ++i )
      setup.job.devices.push_back( regulator( pick( 1.0, 119.0 ), pick( 5000.0, 60000.0 ), pick( 0.0, 8000.0 ) ) );
    const StaticResult before = setup.solve();
    setup.job.devices.push_back( regulator( 60.0, pick( 5000.0, 60000.0 ), pick( 0.0, 8000.0 ), pick( 1.0, 49.0 ) ) );
    const StaticResult after = setup.solve();
    for ( int line = 0; line < 4; ++line )
    {
      for ( double alongM = 0.5; alongM < 40.0; alongM += 1.0 )
      {
        const StaticLevels own = levelsAt( before, alongM, line );
        const StaticLevels other = levelsAt( after, alongM, line );
        QVERIFY( !( other.highM > own.highM + 1e-9 ) && !( other.lowM > own.lowM + 1e-9 ) );
      }
    }
  }
}

QTEST_GUILESS_MAIN( TestDevices )
#include "testdevices.moc"
