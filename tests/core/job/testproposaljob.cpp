// SPDX-License-Identifier: GPL-2.0-or-later
// Proposals for whole drawings: the demo park with its figures worked by hand and by brute force, and random layouts in
// which the main job, run again with the devices proposed, must find nothing over that could be mended and nothing short
// that was served.
#include "core/job/proposaljob.h"
#include "core/units/units.h"
#include "core/units/water.h"
#include "tests/support/jobsetup.h"
#include "tests/support/randomlayout.h"
#include "tests/support/tolerance.h"

#include <QTest>

#include <cmath>
#include <sstream>

using namespace stillhead;
using stillhead::test::JobSetup;
using stillhead::test::LayoutOptions;
using stillhead::test::MemoryTerrain;
using stillhead::test::RandomLayout;

namespace
{

  constexpr double FT = METRES_PER_FOOT;
  constexpr double PSI = PASCALS_PER_PSI;

  double smooth( double t )
  {
    t = std::clamp( t, 0.0, 1.0 );
    return t * t * ( 3.0 - 2.0 * t );
  }

  double bump( double q )
  {
    return q < 1.0 ? ( 1.0 - q ) * ( 1.0 - q ) : 0.0;
  }

  //! Ground of the invented demo park, feet.
  double parkGround( double u, double v )
  {
    const double terrace = 400.0 + 0.04 * std::max( 0.0, u - 450.0 );
    const double meadow = 332.0 + 0.008 * u;
    double height = meadow + ( terrace - meadow ) * smooth( ( v - 110.0 ) / 230.0 );
    const double axis = 300.0 + 30.0 * std::sin( ( v - 380.0 ) / 75.0 );
    const double depth =
      v >= 380.0 ? 50.0 * smooth( ( 650.0 - v ) / 270.0 ) : 10.0 + 40.0 * smooth( ( v - 110.0 ) / 270.0 );
    const auto square = []( double x ) { return x * x; };
    height -= depth * bump( square( ( u - axis ) / 75.0 ) );
    height += 146.8 * bump( square( ( u - 680.0 ) / 270.0 ) + square( ( v - 540.0 ) / 200.0 ) );
    height += 34.0 * bump( square( ( u - 150.0 ) / 120.0 ) + square( ( v - 590.0 ) / 90.0 ) );
    return square( ( u - 805.0 ) / 52.0 ) + square( ( v - 150.0 ) / 34.0 ) < 1.0 ? test::NODATA : height;
  }

  std::string parkSketch()
  {
    std::ostringstream text;
    const auto main = [&]( const char *points ) { text << "main cover=0.6096 " << points << ";"; };
    const auto lateral = [&]( double u, double v, double toU, double toV ) {
      text << "lateral cover=0.3048 " << u << " " << v << ", " << toU << " " << toV << ";";
    };
    main( "40 380, 160 380, 450 380, 580 380, 690 380, 880 380" );
    main( "160 380, 170 240, 200 100, 480 90" );
    main( "580 380, 590 455, 640 515" );
    main( "880 380, 872 260, 800 140, 690 105" );
    lateral( 70, 380, 70, 440 );
    lateral( 70, 380, 70, 268 );
    lateral( 115, 380, 115, 440 );
    lateral( 115, 380, 115, 318 );
    text << "lateral cover=0.3048 160 380, 158 470, 152 560;";
    lateral( 210, 380.4, 215, 430 );
    for ( const double u : { 410.0, 450.0, 490.0, 530.0 } )
    {
      lateral( u, 380, u, 425 );
      lateral( u, 380, u, 318 );
    }
    text.precision( 17 );
    for ( const double u : { 240.0, 285.0, 330.0, 375.0, 420.0, 465.0 } )
    {
      const double v = 100.0 - ( u - 200.0 ) / 28.0;
      lateral( u, v, u, v + 45 );
      lateral( u, v, u, v - 55 );
    }
    lateral( 590, 455, 545, 475 );
    lateral( 590, 455, 655, 440 );
    lateral( 640, 515, 600, 560 );
    text << "lateral cover=0.3048 640 515, 680 540, 735 600, 790 655;";
    text << "lateral cover=0.3048 583.2 404, 560 392, 552 340;";
    for ( const double u : { 740.0, 785.0, 830.0 } )
    {
      lateral( u, 380, u, 425 );
      lateral( u, 380, u, 325 );
    }
    lateral( 872, 260, 925, 255 );
    lateral( 836, 200, 890, 185 );
    lateral( 690, 105, 650, 150 );
    lateral( 690, 105, 655, 60 );
    return text.str();
  }

  JobSetup park()
  {
    JobSetup setup( parkSketch() );
    setup.terrain =
      std::make_unique<MemoryTerrain>( MemoryTerrain::sampled( 1001, 701, test::centresAt( 0.0, 700.0, 1.0 ),
        []( double u, double v ) { return std::round( parkGround( u, v ) * 100.0 ) / 100.0 * FT; } ) );
    Source &source = setup.job.sources.front();
    source.place = { 40.0, 380.0 };
    source.kind = SourceKind::PressureReading;
    source.high = 71.0 * PSI;
    source.low = 62.0 * PSI;
    source.gaugeHeightM = 2.5 * FT;
    setup.job.specificWeightNPerM3 = waterSpecificWeightNPerM3( 15.0 );
    setup.setLimits( 30.0 * PSI, 80.0 * PSI );
    setup.job.leastDropPa = 10.0 * PSI;
    return setup;
  }

  ProposalResult propose( JobSetup &setup, ProposalJob job )
  {
    TileCache cache( *setup.terrain, setup.cacheBytes );
    setup.job.drawing = &setup.drawing;
    setup.job.measure = &setup.planar;
    setup.job.planToTerrain = &setup.samePlan;
    setup.job.terrain = &cache;
    job.statics = setup.job;
    Monitor monitor;
    ProposalResult result = solveProposal( job, monitor );
    setup.job.terrain = nullptr;
    return result;
  }

  ProposalJob parkJob()
  {
    ProposalJob job;
    job.risePa = 10.0 * PSI;
    job.mostRatio = 3.0;
    return job;
  }

  //! Distance along the line as drawn.
  double asDrawn( const StaticResult &result, int line, double alongM )
  {
    const CanonicalLine &own = result.drawing.lines[static_cast<std::size_t>( line )];
    return own.reversed ? own.lengthM - alongM : alongM;
  }

} // namespace

class TestProposalJob : public QObject
{
    Q_OBJECT

  private slots:
    void theParkNeedsTwo();
    void randomLayouts();
    void orderAndThreadsChangeNothing();
    void splittingALineChangesNoCount();
    void givenDevicesStay();
};

void TestProposalJob::theParkNeedsTwo()
{
  JobSetup setup = park();
  const double gamma = setup.job.specificWeightNPerM3 * FT / PSI;
  const ProposalResult result = propose( setup, parkJob() );
  const Proposal &proposal = result.proposal;
  QCOMPARE( proposal.bound, 2 );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QVERIFY( proposal.proven );
  QVERIFY( result.verified );
  STILLHEAD_NEAR( result.before.totals.overM / FT, 4800.0, 1.0 );
  STILLHEAD_NEAR( result.after.totals.overM / FT, 322.0, 1.0 );
  STILLHEAD_NEAR( result.notMendedM / FT, 322.0, 1.0 );
  STILLHEAD_NEAR( result.after.totals.shortM, result.before.totals.shortM, 1e-6 );

  const double bottoms[] = { 322.54, 335.52 };
  // The meadow main is over from 375.1 ft on; the leg of the pond main ends before that, at its first lateral (394.6 ft).
  const double legTo[] = { 375.1, std::hypot( 8.0, 120.0 ) / FT - 0.2 / FT };
  for ( const ProposedRegulator &own : proposal.regulators )
  {
    const int drawn = result.before.drawing.lines[static_cast<std::size_t>( own.at.line )].drawn;
    QVERIFY( drawn == 1 || drawn == 3 );
    const int i = drawn == 1 ? 0 : 1;
    const double e = own.planned.elevationM / FT;
    const double alongFt = asDrawn( result.before, own.at.line, own.at.alongM ) / FT;
    const double fromFt = asDrawn( result.before, own.at.line, own.placeFromM ) / FT;
    const double toFt = asDrawn( result.before, own.at.line, own.placeToM ) / FT;
    QVERIFY( fromFt <= alongFt && alongFt <= toFt );
    // The setting works up to where its lock-up is too much for the bottom, or up to the joint.
    const PlanPoint from = result.before.drawing.placeAt(
      result.before.drawing.lines[static_cast<std::size_t>( own.at.line )], own.placeFromM );
    const double fromE = parkGround( from.x, from.y ) - 2.0;
    const bool upToTheJoint = std::abs( fromFt - 0.2 / FT ) < 0.01;
    QVERIFY( upToTheJoint || std::abs( own.setPa / PSI - ( 70.0 - ( fromE - bottoms[i] ) * gamma ) ) < 0.01 );
    QVERIFY( fromFt > 0.2 / FT - 0.01 );
    STILLHEAD_NEAR( toFt, legTo[i], 0.1 );
    STILLHEAD_NEAR( own.setMostPa / PSI, 70.0 - ( e - bottoms[i] ) * gamma, 0.006 );
    STILLHEAD_NEAR( own.setLeastPa / PSI, 30.0, 0.001 );
    STILLHEAD_NEAR( own.inletHighPa / PSI, ( 566.42 - e ) * gamma, 0.006 );
    STILLHEAD_NEAR( own.inletLowPa / PSI, ( 545.64 - e ) * gamma, 0.006 );
    STILLHEAD_NEAR( own.failedOpenPa / PSI, ( 566.42 - bottoms[i] ) * gamma, 0.01 );
    QVERIFY( own.setPa > own.setLeastPa && own.setPa < own.setMostPa );
    QVERIFY( own.inletLowPa - own.setPa > 10.0 * PSI && own.inletHighPa < 3.0 * own.setPa );
    QCOMPARE( own.stage, 1 );
  }
  // The gully stays over: the hill is served to pipe at 476.38 ft.
  QCOMPARE( static_cast<int>( proposal.excused.size() ), 1 );
  STILLHEAD_NEAR( proposal.excused.front().lowestM / FT, 348.0, 0.01 );
  STILLHEAD_NEAR( proposal.excused.front().need.elevationM / FT, 476.38, 0.01 );
  const Finding finding = test::findingOf( result.after, FindingCode::CannotBeMended );
  QCOMPARE( finding.line, 0 );
  STILLHEAD_NEAR( finding.figureM / FT, 476.38, 0.01 );
  STILLHEAD_NEAR( finding.lengthM / FT, 322.5, 0.6 );
}

namespace
{

  JobSetup randomSetup( unsigned seed, ProposalJob &job )
  {
    RandomLayout random( seed );
    LayoutOptions options;
    options.lines = random.whole( 2, 18 );
    options.gridM = 12.0;
    options.duplicates = false;
    options.stride = 3;
    JobSetup setup( random.drawing( options ) );
    setup.terrain =
      std::make_unique<MemoryTerrain>( random.hills( options, random.between( 0.8, 3.0 ), random.whole( 0, 2 ) ) );
    setup.job.sources.front().place = setup.drawing.vertices.front();
    setup.job.sourceReachM = 1000.0;
    const double levelM = random.between( 115.0, 128.0 );
    setup.setLevels( levelM, levelM - random.between( 0.0, 2.0 ) );
    setup.setLimits( 3000.0, random.between( 16000.0, 24000.0 ) );
    job.risePa = random.between( 0.0, 2000.0 );
    if ( random.chance( 0.5 ) )
    {
      setup.job.leastDropPa = random.between( 0.0, 2000.0 );
      job.mostRatio = random.between( 2.0, 4.0 );
      job.settingStepPa = random.chance( 0.5 ) ? 100.0 : 0.0;
    }
    return setup;
  }

} // namespace

void TestProposalJob::randomLayouts()
{
  int regulators = 0;
  int mended = 0;
  for ( unsigned seed = 0; seed < 300; ++seed )
  {
    ProposalJob job;
    JobSetup setup = randomSetup( seed, job );
    const ProposalResult result = propose( setup, job );
    QVERIFY2( result.verified, qPrintable( QStringLiteral( "layout %1" ).arg( seed ) ) );
    QVERIFY( static_cast<int>( result.proposal.regulators.size() ) >= result.proposal.bound );
    regulators += static_cast<int>( result.proposal.regulators.size() );
    mended += result.after.totals.overM < result.before.totals.overM - 1.0 ? 1 : 0;
  }
  QVERIFY( regulators > 300 );
  QVERIFY( mended > 100 );
}

void TestProposalJob::orderAndThreadsChangeNothing()
{
  for ( unsigned seed = 0; seed < 60; ++seed )
  {
    ProposalJob job;
    JobSetup setup = randomSetup( seed, job );
    const ProposalResult own = propose( setup, job );
    setup.drawing = test::redrawn( setup.drawing, seed );
    setup.job.threads = 3;
    const ProposalResult other = propose( setup, job );
    QCOMPARE( other.proposal.bound, own.proposal.bound );
    QCOMPARE( other.proposal.regulators.size(), own.proposal.regulators.size() );
    for ( std::size_t i = 0; i < own.proposal.regulators.size(); ++i )
    {
      const Device &a = own.devices[own.devices.size() - own.proposal.regulators.size() + i];
      const Device &b = other.devices[other.devices.size() - other.proposal.regulators.size() + i];
      QVERIFY( a.place == b.place && *a.setPa == *b.setPa );
    }
  }
}

void TestProposalJob::splittingALineChangesNoCount()
{
  JobSetup setup = park();
  const ProposalResult own = propose( setup, parkJob() );
  // Every line cut into its legs.
  Drawing split;
  for ( const DrawnLine &line : setup.drawing.lines )
  {
    for ( std::size_t v = line.first; v + 1 < line.first + line.count; ++v )
      test::addLine( split, { setup.drawing.vertices[v], setup.drawing.vertices[v + 1] }, line );
  }
  setup.drawing = split;
  const ProposalResult inLegs = propose( setup, parkJob() );
  QCOMPARE( inLegs.proposal.bound, own.proposal.bound );
  QCOMPARE( inLegs.proposal.regulators.size(), own.proposal.regulators.size() );
  QVERIFY( inLegs.verified );
  STILLHEAD_NEAR( inLegs.after.totals.overM, own.after.totals.overM, 1e-3 );
}

// What is mended already is not counted again.
void TestProposalJob::givenDevicesStay()
{
  JobSetup setup = park();
  const ProposalResult first = propose( setup, parkJob() );
  setup.job.devices = first.devices;
  const ProposalResult again = propose( setup, parkJob() );
  QCOMPARE( again.proposal.bound, 0 );
  QVERIFY( again.proposal.regulators.empty() );
  QVERIFY( again.verified );
  STILLHEAD_NEAR( again.notMendedM, first.notMendedM, 1e-6 );
  setup.job.devices.resize( 1 );
  const ProposalResult half = propose( setup, parkJob() );
  QCOMPARE( half.proposal.bound, 1 );
  QVERIFY( half.verified );
}

QTEST_GUILESS_MAIN( TestProposalJob )
#include "testproposaljob.moc"
