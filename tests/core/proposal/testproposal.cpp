// SPDX-License-Identifier: GPL-2.0-or-later
// Cases worked by hand: the figures of every regulator, what is excused and why, where regulators may stand.
#include "core/proposal/proposal.h"
#include "core/units/units.h"
#include "tests/core/proposal/smalltree.h"

#include <QTest>

using namespace stillhead;
using namespace smalltree;

namespace
{

  //! Adds a leg of straight pieces given by (distance, elevation), metres.
  int addLeg( Forest &forest, int parent, const std::vector<std::pair<double, double>> &points, double servedBelowM,
    double standFromM = STUB_M )
  {
    Limb limb;
    limb.parent = parent;
    limb.firstPart = forest.parts.size();
    const int line = static_cast<int>( forest.limbs.size() );
    for ( std::size_t i = 0; i + 1 < points.size(); ++i )
    {
      ForestPart part;
      part.line = line;
      part.fromM = points[i].first;
      part.toM = points[i + 1].first;
      part.elevation = { points[i].second, points[i + 1].second, 0.0 };
      part.served = 0.5 * ( points[i].second + points[i + 1].second ) <= servedBelowM;
      forest.parts.push_back( part );
    }
    limb.partCount = forest.parts.size() - limb.firstPart;
    limb.standFromM = standFromM;
    limb.standToM = points.back().first - STUB_M;
    forest.limbs.push_back( limb );
    return line;
  }

  bool near( double value, double expected, double tolerance )
  {
    return std::abs( value - expected ) <= tolerance;
  }

} // namespace

#define NEAR( value, expected, tolerance )                                                                             \
  QVERIFY2( near( value, expected, tolerance ),                                                                        \
    qPrintable( QStringLiteral( "%1 is not %2" ).arg( double( value ), 0, 'g', 12 ).arg( double( expected ) ) ) )

class TestProposal : public QObject
{
    Q_OBJECT

  private slots:
    void twoStages();
    void terracesAndAGully();
    void onlyWhatIsOverAsks();
    void eachLegOfASourceTakesItsOwn();
    void placesThatCannotBeMended();
    void pipeNotServedAsksNothing();
    void unknownPipe();
    void aSummitOnTheWay();
    void ratioTakesTwoStages();
    void settingSteps();
    void noWindow();
    void stubs();
    void givenBooster();
};

// A main on a plane slope, metres and kilopascals, 1000 kg/m3 x 9.80665: regulators at 160 m and 240 m along.
void TestProposal::twoStages()
{
  ProposalRules rules = rulesOf( 200e3, 550e3, 50e3 );
  rules.specificWeightNPerM3 = 1000.0 * STANDARD_GRAVITY_M_PER_S2;
  Forest forest;
  const auto pipeM = []( double x ) { return 58.0 - 0.05 * x - 0.6; };
  const double groundM = 58.0 + 0.9;
  forest.zones.push_back( { groundM + rules.heightM( 690e3 ), groundM + rules.heightM( 620e3 ) } );
  addLeg( forest, -1, { { 0.0, pipeM( 0.0 ) }, { 540.0, pipeM( 540.0 ) } }, 100.0 );

  const MarkedForest marked = markForest( forest, rules );
  std::vector<Planned> plan;
  plan.push_back( { 0, -1, 160.0, pipeM( 160.0 ), pipeM( 160.0 ) + rules.heightM( 450e3 ), true } );
  plan.push_back( { 0, -1, 240.0, pipeM( 240.0 ), pipeM( 240.0 ) + rules.heightM( 350e3 ), true } );
  PlanView view( marked, rules, plan );
  const std::vector<ProposedRegulator> regulators = describePlan( view );
  const ProposedRegulator &upper = regulators[0];
  const ProposedRegulator &lower = regulators[1];
  NEAR( upper.inletLowPa / 1e3, 713.2, 0.05 );
  NEAR( upper.inletHighPa / 1e3, 783.2, 0.05 );
  NEAR( upper.outletHighPa / 1e3, 500.0, 1e-9 );
  NEAR( upper.planned.elevationM + rules.heightM( upper.outletHighPa ), 100.386, 0.0005 );
  NEAR( lower.inletHighPa / 1e3, 539.2, 0.05 );
  NEAR( lower.planned.elevationM + rules.heightM( lower.outletHighPa ), 86.189, 0.0005 );
  NEAR( lower.zoneHighestPa / 1e3, 547.1, 0.05 );
  NEAR( lower.setMostPa / 1e3, 350.0 + 2.9, 0.05 );
  NEAR( upper.failedOpenPa / 1e3, 822.4, 0.05 );
  NEAR( lower.failedOpenPa / 1e3, 686.3, 0.05 );
  QCOMPARE( upper.stage, 1 );
  QCOMPARE( lower.stage, 2 );
  QCOMPARE( lower.feeder, 0 );
}

// Feet and psi; water at 15 degC weighs 0.433138 psi per foot. The terraces, the gully, the hill and both low grounds of
// the demo park, drawn with straight pipe between their turning points.
void TestProposal::terracesAndAGully()
{
  ProposalRules rules = rulesOf( 30.0, 80.0, 10.0 );
  rules.specificWeightNPerM3 = 0.433138;
  rules.leastDropPa = 10.0;
  rules.mostRatio = 3.0;
  const double highM = 400.0 + 2.5 + 71.0 / 0.433138;
  const double lowM = 400.0 + 2.5 + 62.0 / 0.433138;
  const double servedM = lowM - 30.0 / 0.433138;
  const double overM = highM - 80.0 / 0.433138;
  NEAR( servedM, 476.38, 0.01 );
  NEAR( overM, 381.72, 0.01 );
  Forest forest;
  forest.zones.push_back( { highM, lowM } );
  const int first = addLeg( forest, -1, { { 0.0, 398.0 }, { 393.7, 398.0 } }, servedM, 0.0 );
  const int meadow =
    addLeg( forest, first, { { 0.0, 398.0 }, { 260.0, 398.0 }, { 480.0, 350.0 }, { 900.0, 322.54 } }, servedM );
  const int terrace = addLeg( forest, first,
    { { 0.0, 398.0 }, { 270.0, 398.0 }, { 459.0, 348.0 }, { 650.0, 398.0 }, { 1378.0, 398.0 } }, servedM );
  addLeg( forest, terrace, { { 0.0, 398.0 }, { 245.2, servedM }, { 400.0, 520.0 } }, servedM );
  const int pond =
    addLeg( forest, terrace, { { 0.0, 398.0 }, { 380.0, 398.0 }, { 900.0, 370.0 }, { 1200.0, 335.52 } }, servedM );

  const Proposal proposal = propose( forest, rules );
  QCOMPARE( proposal.bound, 2 );
  QVERIFY( proposal.proven );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QCOMPARE( static_cast<int>( proposal.excused.size() ), 1 );
  const Excused &gully = proposal.excused.front();
  QCOMPARE( gully.line, terrace );
  NEAR( gully.lowestM, 348.0, 1e-9 );
  NEAR( gully.need.elevationM, servedM, 1e-9 );
  NEAR( gully.need.levelM, lowM, 1e-9 );
  NEAR( gully.toM - gully.fromM, ( 189.0 + 191.0 ) * ( overM - 348.0 ) / 50.0, 1e-6 );

  const double bottoms[] = { 322.54, 335.52 };
  const int lines[] = { meadow, pond };
  for ( int i = 0; i < 2; ++i )
  {
    const ProposedRegulator &own = proposal.regulators[static_cast<std::size_t>( i )];
    const double e = own.planned.elevationM;
    QCOMPARE( own.at.line, lines[i] );
    QVERIFY( own.placeFromM <= own.at.alongM && own.at.alongM <= own.placeToM );
    QVERIFY( e >= overM && e <= 398.0 );
    NEAR( own.setMostPa, 70.0 - ( e - bottoms[i] ) * 0.433138, 1e-6 );
    NEAR( own.setLeastPa, 30.0, 1e-6 );
    QVERIFY( own.setPa >= own.setLeastPa && own.setPa <= own.setMostPa );
    NEAR( own.inletHighPa, ( highM - e ) * 0.433138, 1e-9 );
    NEAR( own.inletLowPa, ( lowM - e ) * 0.433138, 1e-9 );
    NEAR( own.failedOpenPa, ( highM - bottoms[i] ) * 0.433138, 1e-6 );
    NEAR( own.servesUpToM, e + ( own.setPa - 30.0 ) / 0.433138, 1e-9 );
    NEAR( own.holdsDownToM, e + ( own.setPa + 10.0 - 80.0 ) / 0.433138, 1e-9 );
    QVERIFY( own.inletLowPa - own.setPa >= 10.0 );
    QVERIFY( own.inletHighPa <= 3.0 * own.setPa );
    // The three margins are as equal as they can be made: none can grow but at the cost of another.
    const double margins[] = { 80.0 - own.inletHighPa, own.zoneLowestPa - 30.0, 80.0 - own.zoneHighestPa };
    NEAR( margins[0], margins[1], 0.05 );
    NEAR( margins[1], margins[2], 0.05 );
  }
  // With the same setting the meadow's may stand from the stub at its joint down to where the pipe begins to be over.
  NEAR( proposal.regulators[0].placeFromM, STUB_M, 1e-9 );
  NEAR( proposal.regulators[0].placeToM, 260.0 + 220.0 * ( 398.0 - overM ) / 48.0, 1e-6 );
}

// Low pipe that is not over today asks for nothing, however little a regulator's lock-up would leave it.
void TestProposal::onlyWhatIsOverAsks()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.source = { 100.0, 100.0 };
  // 22 m: high 78, within; a set level of 95 would stand 105 there with lock-up, but water stands no higher than 100.
  tree.legs.push_back( { -1, { { 60.0, 22.0 }, { 22.0, 60.0 } } } );
  const Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 0 );
  QVERIFY( proposal.regulators.empty() && proposal.excused.empty() && proposal.proven );
}

void TestProposal::eachLegOfASourceTakesItsOwn()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.source = { 100.0, 95.0 };
  for ( int i = 0; i < 3; ++i )
    tree.legs.push_back( { -1, { { 10.0, 0.0 } } } );
  QCOMPARE( propose( forestOf( tree ), tree.rules ).bound, 3 );
  // Joined by a trunk, one serves all.
  tree.legs.insert( tree.legs.begin(), Leg { -1, { { 10.0, 10.0 } } } );
  for ( std::size_t i = 1; i < tree.legs.size(); ++i )
    tree.legs[i].parent = 0;
  const Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 1 );
  QCOMPARE( proposal.regulators.front().at.line, 0 );
  NEAR(
    proposal.regulators.front().beneath.lengthM, 4 * PART_M - proposal.regulators.front().at.alongM, STUB_M + 1e-9 );
}

void TestProposal::placesThatCannotBeMended()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.source = { 110.0, 110.0 };
  // A dip to 0 on the way to ground at 75: the dip stands a set level of 70, the ground needs 105.
  tree.legs.push_back( { -1, { { 75.0, 0.0 }, { 0.0, 75.0 } } } );
  Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 0 );
  QCOMPARE( static_cast<int>( proposal.excused.size() ), 1 );
  NEAR( proposal.excused.front().fromM, 10.0 * 45.0 / 75.0, 1e-9 );
  NEAR( proposal.excused.front().toM, 20.0 - 10.0 * 45.0 / 75.0, 1e-9 );
  NEAR( proposal.excused.front().lowestM, 0.0, 1e-9 );
  NEAR( proposal.excused.front().lowestAtM, 10.0, 1e-9 );
  NEAR( proposal.excused.front().need.levelM, 105.0, 1e-9 );
  NEAR( proposal.excused.front().need.at.alongM, 20.0, 1e-9 );
  QVERIFY( !proposal.excused.front().need.summit );

  // Ground that needs just what the dip stands leaves it mendable; two regulators, one on each slope... no: one, at the top.
  tree.legs.front().pipes = { { 75.0, 0.0 }, { 0.0, 40.0 } };
  proposal = propose( forestOf( tree ), tree.rules );
  QVERIFY( proposal.excused.empty() );
  QCOMPARE( proposal.bound, 1 );
  NEAR( proposal.regulators.front().setLeastPa, proposal.regulators.front().setMostPa, 1e-6 );
}

void TestProposal::pipeNotServedAsksNothing()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.source = { 100.0, 90.0 };
  // Ground at 65 has 25 today: under LEAST, so nobody counts on it, and the low ground before it is mended.
  tree.legs.push_back( { -1, { { 50.0, 0.0 }, { 0.0, 65.0 } } } );
  const Proposal proposal = propose( forestOf( tree ), tree.rules );
  // Served up to 60, which needs 90; excused only as far as that needs it.
  QCOMPARE( static_cast<int>( proposal.excused.size() ), 1 );
  NEAR( proposal.excused.front().need.elevationM, 60.0, 1e-9 );
  tree.legs.front().pipes = { { 50.0, 0.0 }, { 0.0, 0.0 }, { 65.0, 65.0 } };
  const Proposal flat = propose( forestOf( tree ), tree.rules );
  QVERIFY( flat.excused.empty() );
  QCOMPARE( flat.bound, 1 ); // far enough down that pipe above, which is not over, needs no level from it
}

void TestProposal::unknownPipe()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.source = { 100.0, 95.0 };
  // No regulator can stand where no elevation is known: what is joined there is as if it left the source.
  tree.legs.push_back( { -1, { { 0.0, 0.0, Role::Mainline, false } } } );
  tree.legs.push_back( { 0, { { 10.0, 5.0 } } } );
  tree.legs.push_back( { 0, { { 10.0, 5.0 } } } );
  QCOMPARE( propose( forestOf( tree ), tree.rules ).bound, 2 );
  tree.legs.front().pipes.insert( tree.legs.front().pipes.begin(), Pipe { 12.0, 10.0 } );
  const Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 1 );
  QVERIFY( proposal.regulators.front().at.alongM <= PART_M );
}

void TestProposal::aSummitOnTheWay()
{
  Tree tree;
  tree.rules = rulesOf( 10.0, 80.0, 10.0 );
  tree.source = { 100.0, 100.0 };
  // Served pipe at 12 lies behind a crest at 85: a regulator before the crest must hold 85 at least, and the place at 12
  // stands 82, so it must stand behind the crest.
  tree.legs.push_back( { -1, { { 60.0, 85.0 }, { 85.0, 12.0 } } } );
  Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 1 );
  QVERIFY( proposal.regulators.front().planned.elevationM <= 72.0 );
  QVERIFY( proposal.regulators.front().at.alongM > PART_M );
  // A low place before the crest stands 82 too, but 92 must pass it.
  tree.legs.front().pipes = { { 60.0, 12.0 }, { 12.0, 12.0 }, { 92.0, 92.0 }, { 60.0, 60.0 } };
  proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 0 );
  QCOMPARE( static_cast<int>( proposal.excused.size() ), 1 );
  QVERIFY( proposal.excused.front().need.summit );
  NEAR( proposal.excused.front().need.elevationM, 92.0, 1e-9 );
}

void TestProposal::ratioTakesTwoStages()
{
  Tree tree;
  tree.rules = rulesOf( 10.0, 60.0, 5.0 );
  tree.source = { 150.0, 150.0 };
  tree.legs.push_back( { -1, { { 20.0, 0.0 }, { 0.0, -20.0 } } } );
  Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 1 );
  QVERIFY( proposal.proven );
  // At most 35 over -20 is 35 over... set 15 at 20, against an inlet of 130.
  tree.rules.mostRatio = 3.0;
  proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( proposal.bound, 1 );
  QVERIFY( !proposal.proven && proposal.rulesKept );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  for ( const ProposedRegulator &own : proposal.regulators )
    QVERIFY( own.inletHighPa <= 3.0 * own.setPa + 1e-6 );
  QVERIFY( faultOf( tree, valvesOf( tree, proposal ), placesOf( tree, 20 ), 20, false ).empty() );
}

void TestProposal::settingSteps()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.rules.settingStepPa = 5.0;
  tree.source = { 100.0, 95.0 };
  tree.legs.push_back( { -1, { { 33.0, 1.0 } } } );
  const Proposal proposal = propose( forestOf( tree ), tree.rules );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 1 );
  QVERIFY( proposal.proven );
  const double setPa = proposal.regulators.front().setPa;
  NEAR( setPa, 5.0 * std::round( setPa / 5.0 ), 1e-9 );
  // Pipe at 30 is over already and the bottom stands 40 there: with steps of 50 it takes a second one farther down.
  tree.rules.settingStepPa = 50.0;
  tree.legs.front().pipes = { { 30.0, 30.0 }, { 30.0, 0.0 } };
  tree.source = { 112.0, 110.0 };
  const Proposal coarse = propose( forestOf( tree ), tree.rules );
  QCOMPARE( static_cast<int>( coarse.regulators.size() ), 2 );
  QVERIFY( coarse.rulesKept && !coarse.proven );
  // No multiple of 500 will do anywhere: the count stands, the setting is the best there is, and it is said.
  tree.rules.settingStepPa = 500.0;
  const Proposal none = propose( forestOf( tree ), tree.rules );
  QCOMPARE( static_cast<int>( none.regulators.size() ), 1 );
  QVERIFY( !none.rulesKept && !none.proven );
}

// LEAST and MOST so near that no setting serves sloping pipe: said place by place, not a regulator every step.
void TestProposal::noWindow()
{
  Tree tree;
  tree.rules = rulesOf( 70.0, 80.0, 10.0 );
  tree.source = { 100.0, 100.0 };
  tree.legs.push_back( { -1, { { 25.0, 0.0 } } } );
  const Proposal sloping = propose( forestOf( tree ), tree.rules );
  QCOMPARE( sloping.bound, 0 );
  QCOMPARE( static_cast<int>( sloping.excused.size() ), 1 );
  tree.legs.front().pipes = { { 10.0, 10.0 } };
  const Proposal flat = propose( forestOf( tree ), tree.rules );
  QCOMPARE( flat.bound, 1 );
  NEAR( flat.regulators.front().setPa, 70.0, 1e-6 );
  QVERIFY( flat.excused.empty() );
}

void TestProposal::stubs()
{
  Tree tree;
  tree.rules = rulesOf( 30.0, 80.0, 10.0 );
  tree.source = { 100.0, 95.0 };
  tree.legs.push_back( { -1, { { 15.0, 0.0 } } } );
  Forest forest = forestOf( tree );
  // Over from the start: the regulator stands as near to it as may be written.
  NEAR( propose( forest, tree.rules ).regulators.front().at.alongM, STUB_M, 1e-9 );
  forest.limbs.front().standFromM = 0.0;
  NEAR( propose( forest, tree.rules ).regulators.front().at.alongM, 0.0, 1e-9 );
  // Too short for both stubs: in the middle.
  forest.limbs.front().standFromM = forest.limbs.front().standToM = 5.0;
  const Proposal proposal = propose( forest, tree.rules );
  NEAR( proposal.regulators.front().at.alongM, 5.0, 1e-9 );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 1 );
}

// A given booster stays: what must be mended behind it counts its boost.
void TestProposal::givenBooster()
{
  ProposalRules rules = rulesOf( 30.0, 80.0, 10.0 );
  Forest forest;
  forest.zones.push_back( { 100.0, 95.0 } );
  forest.zones.push_back( { 130.0, 120.0 } );
  const int trunk = addLeg( forest, -1, { { 0.0, 40.0 }, { 50.0, 40.0 } }, 65.0 );
  const int behind = addLeg( forest, trunk, { { 0.0, 40.0 }, { 100.0, 80.0 } }, 90.0 );
  forest.parts.back().zone = 1;
  Limb &limb = forest.limbs[static_cast<std::size_t>( behind )];
  limb.boostHighM = 30.0;
  limb.boostLowM = 25.0;
  limb.wayM = 40.0;
  // 80 needs 110 behind the booster, 40 stands no more: before it 85 would be too little and 80 too much.
  const Proposal proposal = propose( forest, rules );
  QCOMPARE( proposal.bound, 1 );
  QVERIFY( proposal.excused.empty() );
  QCOMPARE( proposal.regulators.front().at.line, behind );
  NEAR( proposal.regulators.front().setLeastPa, proposal.regulators.front().setMostPa, 0.1 );
}

QTEST_GUILESS_MAIN( TestProposal )
#include "testproposal.moc"
