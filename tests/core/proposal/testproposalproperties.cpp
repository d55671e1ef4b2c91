// SPDX-License-Identifier: GPL-2.0-or-later
// What must hold of every proposal, tried on random trees of sloping pipe: nothing is over that need not be, nothing is
// short, order, direction and splitting change nothing, the places told work, and chance finds nothing better.
#include "core/proposal/proposal.h"
#include "tests/core/proposal/smalltree.h"

#include <QTest>

#include <random>

using namespace stillhead;
using namespace smalltree;

namespace
{

  using Random = std::mt19937;

  double pick( Random &random, double low, double high )
  {
    return std::uniform_real_distribution<double>( low, high )( random );
  }

  int pickInt( Random &random, int low, int high )
  {
    return std::uniform_int_distribution<int>( low, high )( random );
  }

  //! Pipe that goes on at the height at which its parent ends.
  Tree slopingTree( Random &random, int mostLegs )
  {
    Tree tree;
    tree.rules = rulesOf( 30.0, 80.0, 10.0 );
    tree.source.highM = pick( random, 90.0, 130.0 );
    tree.source.lowM = tree.source.highM - pick( random, 0.0, 15.0 );
    const double startM = tree.source.lowM - pick( random, 30.0, 70.0 );
    const int legs = pickInt( random, 1, mostLegs );
    std::vector<double> endM;
    for ( int i = 0; i < legs; ++i )
    {
      Leg leg;
      leg.parent = i == 0 ? -1 : pickInt( random, std::max( -1, i - 4 ), i - 1 );
      double heightM = leg.parent < 0 ? startM : endM[static_cast<std::size_t>( leg.parent )];
      const int pipes = pickInt( random, 1, 4 );
      const double trend = pick( random, -25.0, 10.0 );
      for ( int p = 0; p < pipes; ++p )
      {
        Pipe pipe;
        pipe.fromM = heightM;
        heightM = std::max( -80.0, heightM + trend + pick( random, -15.0, 15.0 ) );
        pipe.toM = heightM;
        pipe.known = pickInt( random, 0, 19 ) > 0;
        leg.pipes.push_back( pipe );
      }
      endM.push_back( heightM );
      tree.legs.push_back( leg );
    }
    return tree;
  }

  void addRules( Random &random, Tree &tree )
  {
    tree.rules.leastDropPa = pick( random, 0.0, 15.0 );
    tree.rules.mostRatio = pickInt( random, 0, 3 ) == 0 ? 0.0 : pick( random, 1.5, 4.0 );
    tree.rules.settingStepPa = pickInt( random, 0, 1 ) == 0 ? 0.0 : pick( random, 0.5, 5.0 );
    tree.rules.limits.lateralMostPa = 70.0;
    for ( Leg &leg : tree.legs )
    {
      const bool lateral = leg.parent >= 0 && pickInt( random, 0, 3 ) == 0;
      for ( Pipe &pipe : leg.pipes )
        pipe.role = lateral ? Role::Lateral : Role::Mainline;
    }
  }

  //! The same forest with its limbs numbered otherwise and every other line drawn the other way.
  Forest shuffled( const Forest &forest, Random &random )
  {
    std::vector<std::size_t> order( forest.limbs.size() );
    for ( std::size_t i = 0; i < order.size(); ++i )
      order[i] = i;
    std::shuffle( order.begin(), order.end(), random );
    std::vector<int> newNumber( order.size() );
    for ( std::size_t i = 0; i < order.size(); ++i )
      newNumber[order[i]] = static_cast<int>( i );
    Forest other;
    other.zones = forest.zones;
    for ( const std::size_t old : order )
    {
      Limb limb = forest.limbs[old];
      const std::size_t first = limb.firstPart;
      limb.firstPart = other.parts.size();
      limb.parent = limb.parent < 0 ? -1 : newNumber[static_cast<std::size_t>( limb.parent )];
      for ( std::size_t p = first; p < first + limb.partCount; ++p )
        other.parts.push_back( forest.parts[p] );
      other.limbs.push_back( limb );
    }
    return other;
  }

  //! Every line measured from its other end.
  Forest reversed( const Forest &forest )
  {
    Forest other = forest;
    for ( Limb &limb : other.limbs )
    {
      const double lengthM = forest.parts[limb.firstPart + limb.partCount - 1].toM;
      for ( std::size_t p = limb.firstPart; p < limb.firstPart + limb.partCount; ++p )
      {
        other.parts[p].fromM = lengthM - other.parts[p].fromM;
        other.parts[p].toM = lengthM - other.parts[p].toM;
      }
      limb.standFromM = lengthM - limb.standFromM;
      limb.standToM = lengthM - limb.standToM;
    }
    return other;
  }

  //! Parts cut anywhere, and no leg with more than one part of what were parts before.
  Tree splitLegs( const Tree &tree )
  {
    Tree other = tree;
    other.legs.clear();
    std::vector<int> last;
    for ( const Leg &leg : tree.legs )
    {
      int parent = leg.parent < 0 ? -1 : last[static_cast<std::size_t>( leg.parent )];
      for ( const Pipe &pipe : leg.pipes )
      {
        other.legs.push_back( { parent, { pipe } } );
        parent = static_cast<int>( other.legs.size() ) - 1;
      }
      last.push_back( parent );
    }
    return other;
  }

  Forest splitParts( const Forest &forest, Random &random )
  {
    Forest other = forest;
    other.parts.clear();
    for ( Limb &limb : other.limbs )
    {
      const std::size_t first = limb.firstPart;
      limb.firstPart = other.parts.size();
      for ( std::size_t p = first; p < first + limb.partCount; ++p )
      {
        const double share = pick( random, 0.1, 0.9 );
        other.parts.push_back( forest.parts[p].between( 0.0, share ) );
        other.parts.push_back( forest.parts[p].between( share, 1.0 ) );
      }
      limb.partCount = other.parts.size() - limb.firstPart;
    }
    return other;
  }

  constexpr int STEPS = 60;
  constexpr int TREES = 1500;

} // namespace

class TestProposalProperties : public QObject
{
    Q_OBJECT

  private slots:
    void mendsAllItMayAndHarmsNothing();
    void orderAndDirectionChangeNothing();
    void splittingChangesNoCount();
    void everyPlaceToldWorks();
    void chanceFindsNothingBetter();
    void noPlaceHasLargerMargins();
};

void TestProposalProperties::mendsAllItMayAndHarmsNothing()
{
  Random random( 11 );
  int regulators = 0;
  int excused = 0;
  for ( int i = 0; i < TREES; ++i )
  {
    Tree tree = slopingTree( random, 14 );
    if ( i % 2 == 1 )
      addRules( random, tree );
    const Proposal proposal = propose( forestOf( tree ), tree.rules );
    const std::vector<Place> today = placesOf( tree, STEPS );
    const std::string fault = faultOf( tree, valvesOf( tree, proposal ), today, STEPS, false );
    QVERIFY2(
      fault.empty(), qPrintable( QStringLiteral( "tree %1: %2" ).arg( i ).arg( QString::fromStdString( fault ) ) ) );
    // A place is told as excused if and only if it is.
    for ( const Place &place : today )
    {
      bool told = false;
      bool edge = false;
      for ( const Excused &own : proposal.excused )
      {
        told = told || ( own.line == place.leg && place.atM > own.fromM + 1e-6 && place.atM < own.toM - 1e-6 );
        edge = edge
          || ( own.line == place.leg
            && ( std::abs( place.atM - own.fromM ) < 1e-5 || std::abs( place.atM - own.toM ) < 1e-5 ) );
      }
      const bool onNode = std::abs( std::remainder( place.atM, PART_M ) ) < 1e-9;
      if ( !edge && !onNode )
        QCOMPARE( told, place.excused );
    }
    regulators += static_cast<int>( proposal.regulators.size() );
    excused += static_cast<int>( proposal.excused.size() );
    if ( i % 2 == 0 )
      QVERIFY2( proposal.proven, qPrintable( QString::number( i ) ) );
    QVERIFY( static_cast<int>( proposal.regulators.size() ) >= proposal.bound );
  }
  QVERIFY( regulators > TREES && excused > TREES / 10 );
}

void TestProposalProperties::orderAndDirectionChangeNothing()
{
  Random random( 12 );
  for ( int i = 0; i < TREES; ++i )
  {
    Tree tree = slopingTree( random, 10 );
    addRules( random, tree );
    const Forest forest = forestOf( tree );
    const Proposal own = propose( forest, tree.rules );
    const Proposal other = propose( shuffled( forest, random ), tree.rules );
    QCOMPARE( other.bound, own.bound );
    QCOMPARE( other.proven, own.proven );
    QCOMPARE( other.regulators.size(), own.regulators.size() );
    for ( std::size_t r = 0; r < own.regulators.size(); ++r )
    {
      QCOMPARE( other.regulators[r].at.line, own.regulators[r].at.line );
      QVERIFY( other.regulators[r].at.alongM == own.regulators[r].at.alongM );
      QVERIFY( other.regulators[r].setPa == own.regulators[r].setPa );
    }
    const Proposal back = propose( reversed( forest ), tree.rules );
    QCOMPARE( back.bound, own.bound );
    QCOMPARE( back.regulators.size(), own.regulators.size() );
    for ( const ProposedRegulator &regulator : back.regulators )
      QVERIFY( regulator.againstLine );
  }
}

void TestProposalProperties::splittingChangesNoCount()
{
  Random random( 13 );
  for ( int i = 0; i < TREES; ++i )
  {
    const Tree tree = slopingTree( random, 12 );
    const Forest forest = forestOf( tree );
    const Proposal own = propose( forest, tree.rules );
    const Proposal inParts = propose( splitParts( forest, random ), tree.rules );
    QCOMPARE( inParts.bound, own.bound );
    QCOMPARE( inParts.regulators.size(), own.regulators.size() );
    const Tree split = splitLegs( tree );
    const Proposal inLegs = propose( forestOf( split ), split.rules );
    QCOMPARE( inLegs.bound, own.bound );
    QCOMPARE( inLegs.regulators.size(), own.regulators.size() );
  }
}

void TestProposalProperties::everyPlaceToldWorks()
{
  Random random( 14 );
  int wide = 0;
  for ( int i = 0; i < TREES; ++i )
  {
    Tree tree = slopingTree( random, 8 );
    if ( i % 2 == 1 )
      addRules( random, tree );
    const Proposal proposal = propose( forestOf( tree ), tree.rules );
    const std::vector<Place> today = placesOf( tree, STEPS );
    for ( const ProposedRegulator &own : proposal.regulators )
    {
      QVERIFY( own.placeFromM <= own.at.alongM + 1e-9 && own.at.alongM <= own.placeToM + 1e-9 );
      wide += own.placeToM - own.placeFromM > 1.0 ? 1 : 0;
      for ( const double share : { 0.0, 0.37, 1.0 } )
      {
        const double atM = own.placeFromM + share * ( own.placeToM - own.placeFromM );
        const std::vector<Pipe> &pipes = tree.legs[static_cast<std::size_t>( own.at.line )].pipes;
        const std::size_t pipe = std::min( static_cast<std::size_t>( atM / PART_M ), pipes.size() - 1 );
        const double elevationM = heightAt( pipes[pipe], atM / PART_M - static_cast<double>( pipe ) );
        Valves valves = valvesOf( tree, proposal );
        for ( Valve &valve : valves[static_cast<std::size_t>( own.at.line )] )
        {
          if ( valve.atM == own.at.alongM )
            valve = { atM, elevationM + own.setPa, elevationM };
        }
        const std::string fault = faultOf( tree, valves, today, STEPS, false );
        QVERIFY2( fault.empty(),
          qPrintable(
            QStringLiteral( "tree %1 moved to %2: %3" ).arg( i ).arg( atM ).arg( QString::fromStdString( fault ) ) ) );
      }
    }
  }
  QVERIFY( wide > TREES / 4 );
}

void TestProposalProperties::chanceFindsNothingBetter()
{
  Random random( 15 );
  int tried = 0;
  for ( int i = 0; i < TREES / 2; ++i )
  {
    const Tree tree = slopingTree( random, 5 );
    const Proposal proposal = propose( forestOf( tree ), tree.rules );
    if ( proposal.bound == 0 )
      continue;
    const std::vector<Place> today = placesOf( tree, 16 );
    for ( int k = 0; k < 100; ++k, ++tried )
    {
      Valves valves( tree.legs.size() );
      for ( int r = 0; r + 1 < proposal.bound; ++r )
      {
        const std::size_t leg =
          static_cast<std::size_t>( pickInt( random, 0, static_cast<int>( tree.legs.size() ) - 1 ) );
        const int places = 16 * static_cast<int>( tree.legs[leg].pipes.size() );
        const Place &limit =
          today[static_cast<std::size_t>( pickInt( random, 0, static_cast<int>( today.size() ) - 1 ) )];
        const double levelM =
          limit.elevationM + ( pickInt( random, 0, 1 ) == 0 ? 70.0 : 30.0 ) + pick( random, -2.0, 2.0 );
        valves[leg].push_back( { PART_M * pickInt( random, 0, places - 1 ) / 16, levelM, 0.0 } );
      }
      for ( std::vector<Valve> &own : valves )
        std::sort( own.begin(), own.end(), []( const Valve &a, const Valve &b ) { return a.atM < b.atM; } );
      QVERIFY2( !faultOf( tree, valves, today, 16, true ).empty(), qPrintable( QString::number( i ) ) );
    }
  }
  QVERIFY( tried > 10000 );
}

void TestProposalProperties::noPlaceHasLargerMargins()
{
  Random random( 16 );
  int compared = 0;
  for ( int i = 0; i < TREES; ++i )
  {
    Tree tree = slopingTree( random, 1 );
    const Proposal proposal = propose( forestOf( tree ), tree.rules );
    if ( proposal.regulators.size() != 1 || !proposal.excused.empty() )
      continue;
    const std::vector<Place> today = placesOf( tree, STEPS );
    const auto marginOf = [&]( const Valve &valve ) {
      double margin = 80.0 - ( tree.source.highM - valve.elevationM );
      for ( const Place &place : today )
      {
        if ( !place.known || place.atM < valve.atM - 1e-9 )
          continue;
        if ( place.served )
          margin = std::min( margin, std::min( valve.levelM, tree.source.lowM ) - place.elevationM - 30.0 );
        margin = std::min( margin, 80.0 - ( std::min( valve.levelM + 10.0, tree.source.highM ) - place.elevationM ) );
      }
      return margin;
    };
    const ProposedRegulator &own = proposal.regulators.front();
    const double margin = std::min( { 80.0 - own.inletHighPa, own.planned.levelM - own.beneath.zoneNeedM,
      own.beneath.zoneMostM - std::min( own.planned.levelM + 10.0, tree.source.highM ) } );
    for ( const Place &place : today )
    {
      if ( !place.known || place.stub )
        continue;
      for ( double setM = 30.0; setM <= 70.0; setM += 0.5 )
      {
        Valves valves( 1 );
        valves[0].push_back( { place.atM, place.elevationM + setM, place.elevationM } );
        const double other = marginOf( valves[0][0] );
        if ( other > margin + 0.05 )
          QVERIFY2( !faultOf( tree, valves, today, STEPS, true ).empty(),
            qPrintable( QStringLiteral( "tree %1: %2 at %3 beats %4 at %5" )
                          .arg( i )
                          .arg( other )
                          .arg( place.atM )
                          .arg( margin )
                          .arg( own.at.alongM ) ) );
      }
    }
    ++compared;
  }
  QVERIFY( compared > TREES / 20 );
}

QTEST_GUILESS_MAIN( TestProposalProperties )
#include "testproposalproperties.moc"
