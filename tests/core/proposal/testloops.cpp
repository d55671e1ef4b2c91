// SPDX-License-Identifier: GPL-2.0-or-later
// Looped pipe: hand-made rings, and random networks in which water at rest is worked out place by place. One metre of water
// is one pascal here.
#include "core/proposal/bridges.h"
#include "core/proposal/graphproposal.h"
#include "tests/core/proposal/smalltree.h"

#include <QTest>

#include <queue>
#include <random>

using namespace stillhead;
using smalltree::PART_M;
using smalltree::rulesOf;
using smalltree::STUB_M;

namespace
{

  //! Pipe between two nodes through the given heights, PART_M apart; the first and last are those of the nodes.
  struct Pipe
  {
      int fromNode;
      int toNode;
      std::vector<double> heightM;

      double lengthM() const { return PART_M * static_cast<double>( heightM.size() - 1 ); }
      double heightAt( double alongM ) const
      {
        const std::size_t i = std::min( static_cast<std::size_t>( alongM / PART_M ), heightM.size() - 2 );
        const double share = alongM / PART_M - static_cast<double>( i );
        return heightM[i] + share * ( heightM[i + 1] - heightM[i] );
      }
  };

  struct Net
  {
      StaticLevels source;
      std::vector<int> sources { 0 };
      int nodes = 0;
      std::vector<Pipe> pipes;
      ProposalRules rules = rulesOf( 30.0, 80.0, 10.0 );
  };

  struct Valve
  {
      int pipe;
      double alongM;
      double levelM;
      bool againstLine;
  };

  //! A short piece of pipe, taken at one height.
  struct Element
  {
      int pipe;
      double alongM;
      double heightM;
      int from; //!< places at its ends
      int to;
      double highM = NO_LEVEL_M;
      double lowM = NO_LEVEL_M;
      bool reached = false;
  };

  constexpr double STEP_M = 0.5;

  //! Water at rest in the net: the largest level that reaches each place, and along low enough pipe.
  std::vector<Element> restingWater( const Net &net, const std::vector<Valve> &valves )
  {
    struct Way
    {
        int to;
        double capM; //!< set level of a regulator on the way; any: none
        int element;
    };
    std::vector<Element> elements;
    std::vector<std::vector<Way>> ways( static_cast<std::size_t>( net.nodes ) );
    for ( std::size_t p = 0; p < net.pipes.size(); ++p )
    {
      const Pipe &pipe = net.pipes[p];
      std::vector<double> cuts;
      for ( double alongM = STEP_M; alongM < pipe.lengthM() - 1e-9; alongM += STEP_M )
        cuts.push_back( alongM );
      for ( const Valve &valve : valves )
      {
        if ( valve.pipe == static_cast<int>( p ) )
          cuts.push_back( valve.alongM );
      }
      cuts.push_back( pipe.lengthM() );
      std::sort( cuts.begin(), cuts.end() );
      int place = pipe.fromNode;
      double atM = 0.0;
      for ( const double cutM : cuts )
      {
        const bool last = cutM >= pipe.lengthM();
        int next = last ? pipe.toNode : static_cast<int>( ways.size() );
        if ( !last )
          ways.emplace_back();
        const double middleM = 0.5 * ( atM + cutM );
        const int number = static_cast<int>( elements.size() );
        elements.push_back( { static_cast<int>( p ), middleM, pipe.heightAt( middleM ), place, next } );
        ways[static_cast<std::size_t>( place )].push_back( { next, ANY_LEVEL_M, number } );
        ways[static_cast<std::size_t>( next )].push_back( { place, ANY_LEVEL_M, number } );
        atM = cutM;
        for ( const Valve &valve : valves )
        {
          if ( last || valve.pipe != static_cast<int>( p ) || valve.alongM != cutM )
            continue;
          const int beyond = static_cast<int>( ways.size() );
          ways.emplace_back();
          const int inlet = valve.againstLine ? beyond : next;
          ways[static_cast<std::size_t>( inlet )].push_back( { valve.againstLine ? next : beyond, valve.levelM, -1 } );
          next = beyond;
        }
        place = next;
      }
    }
    const auto spread = [&]( double sourceM, double riseM ) {
      std::vector<double> levelM( ways.size(), NO_LEVEL_M );
      std::priority_queue<std::pair<double, int>> open;
      for ( const int node : net.sources )
        open.push( { sourceM, node } );
      while ( !open.empty() )
      {
        const auto [level, place] = open.top();
        open.pop();
        if ( level <= levelM[static_cast<std::size_t>( place )] )
          continue;
        levelM[static_cast<std::size_t>( place )] = level;
        for ( const Way &way : ways[static_cast<std::size_t>( place )] )
          open.push( { std::min( level, way.capM + riseM ), way.to } );
      }
      return levelM;
    };
    const std::vector<double> high = spread( net.source.highM, net.rules.riseM() );
    const std::vector<double> low = spread( net.source.lowM, 0.0 );
    std::vector<bool> wet( ways.size(), false );
    std::vector<int> open = net.sources;
    for ( const int node : open )
      wet[static_cast<std::size_t>( node )] = true;
    for ( Element &element : elements )
    {
      element.highM = high[static_cast<std::size_t>( element.from )];
      element.lowM = low[static_cast<std::size_t>( element.from )];
    }
    while ( !open.empty() )
    {
      const int place = open.back();
      open.pop_back();
      for ( const Way &way : ways[static_cast<std::size_t>( place )] )
      {
        if ( way.element >= 0 )
        {
          Element &element = elements[static_cast<std::size_t>( way.element )];
          if ( element.heightM > element.lowM + 1e-7 )
            continue;
          element.reached = true;
        }
        if ( wet[static_cast<std::size_t>( way.to )] )
          continue;
        wet[static_cast<std::size_t>( way.to )] = true;
        open.push_back( way.to );
      }
    }
    return elements;
  }

  PipeGraph graphOf( const Net &net )
  {
    PipeGraph graph;
    graph.nodeCount = net.nodes;
    graph.sources = net.sources;
    graph.zones.push_back( net.source );
    const std::vector<Element> today = restingWater( net, {} );
    const double servedBelowM = net.source.lowM - net.rules.leastM( Role::Mainline );
    for ( std::size_t p = 0; p < net.pipes.size(); ++p )
    {
      const Pipe &pipe = net.pipes[p];
      GraphEdge edge;
      edge.fromNode = pipe.fromNode;
      edge.toNode = pipe.toNode;
      edge.stubFromM = edge.stubToM = STUB_M;
      edge.firstPart = graph.parts.size();
      for ( std::size_t i = 0; i + 1 < pipe.heightM.size(); ++i )
      {
        ForestPart part;
        part.line = static_cast<int>( p );
        part.fromM = PART_M * static_cast<double>( i );
        part.toM = part.fromM + PART_M;
        part.elevation = { pipe.heightM[i], pipe.heightM[i + 1], 0.0 };
        std::vector<double> shares { 0.0 };
        if ( servedBelowM > part.lowestM() && servedBelowM < part.highestM() )
          shares.push_back( part.shareOf( servedBelowM ) );
        shares.push_back( 1.0 );
        for ( std::size_t k = 0; k + 1 < shares.size(); ++k )
        {
          ForestPart own = part.between( shares[k], shares[k + 1] );
          const double middleM = 0.5 * ( own.fromM + own.toM );
          const auto element = std::min_element( today.begin(), today.end(), [&]( const Element &a, const Element &b ) {
            const auto off = [&]( const Element &e ) {
              return e.pipe == static_cast<int>( p ) ? std::abs( e.alongM - middleM ) : 1e9;
            };
            return off( a ) < off( b );
          } );
          own.served = element->reached && pipe.heightAt( middleM ) <= servedBelowM;
          graph.parts.push_back( own );
        }
      }
      edge.partCount = graph.parts.size() - edge.firstPart;
      graph.edges.push_back( edge );
    }
    return graph;
  }

  struct Fault
  {
      std::string what; //!< blank: none
      PlaceOnLine at;
  };

  //! What is wrong after \a proposal: pipe over that is not excused, or served pipe that has become short.
  Fault firstFault( const Net &net, const Proposal &proposal )
  {
    std::vector<Valve> valves;
    for ( const ProposedRegulator &own : proposal.regulators )
      valves.push_back( { own.at.line, own.at.alongM, own.planned.levelM, own.againstLine } );
    const std::vector<Element> today = restingWater( net, {} );
    const std::vector<Element> after = restingWater( net, valves );
    const double leastM = net.rules.leastM( Role::Mainline );
    for ( const Element &own : after )
    {
      const Pipe &pipe = net.pipes[static_cast<std::size_t>( own.pipe )];
      if ( own.alongM < STUB_M + STEP_M || own.alongM > pipe.lengthM() - STUB_M - STEP_M )
        continue;
      const auto before = std::min_element( today.begin(), today.end(), [&]( const Element &a, const Element &b ) {
        const auto off = [&](
                           const Element &e ) { return e.pipe == own.pipe ? std::abs( e.alongM - own.alongM ) : 1e9; };
        return off( a ) < off( b );
      } );
      const bool excused = std::any_of( proposal.excused.begin(), proposal.excused.end(), [&]( const Excused &e ) {
        return e.line == own.pipe && own.alongM >= std::min( e.fromM, e.toM ) - STEP_M
          && own.alongM <= std::max( e.fromM, e.toM ) + STEP_M;
      } );
      const std::string where = " on pipe " + std::to_string( own.pipe ) + " at " + std::to_string( own.alongM );
      const PlaceOnLine at { own.pipe, own.alongM };
      // Levels are exact, places to half a step.
      if ( own.highM > own.heightM + net.rules.mostM( Role::Mainline ) + 1e-6 && !excused )
        return { "over" + where, at };
      const bool served = before->reached && before->lowM >= own.heightM + leastM + 1e-6;
      if ( served && ( !own.reached || own.lowM < own.heightM + leastM - 1e-6 ) )
        return { "short" + where, at };
    }
    return {};
  }

  std::string faultOf( const Net &net, const Proposal &proposal )
  {
    return firstFault( net, proposal ).what;
  }

} // namespace

class TestLoops : public QObject
{
    Q_OBJECT

  private slots:
    void bridgesAndBodies();
    void aRingOnATrunk();
    void aLowSectorOfARing();
    void aRingAtTheSource();
    void bothArmsLeadToTheHill();
    void lowGroundEnclosesWhatNeedsLittle();
    void twoSourcesOfOneLevel();
    void aDeviceBetween();
    void randomNetworks();
};

void TestLoops::bridgesAndBodies()
{
  // 0 - 1, ring 1 2 3, 3 - 4, 4 = 5 (two pipes), 6 apart
  const std::vector<std::pair<int, int>> edges { { 0, 1 }, { 1, 2 }, { 2, 3 }, { 3, 1 }, { 3, 4 }, { 4, 5 }, { 5, 4 } };
  const BridgeTree tree = bridgeTree( 7, edges, { 0 } );
  QVERIFY( tree.isBridge[0] && tree.isBridge[4] );
  for ( const std::size_t edge : { 1, 2, 3, 5, 6 } )
    QVERIFY( !tree.isBridge[edge] );
  QCOMPARE( tree.bodyOf[1], tree.bodyOf[2] );
  QCOMPARE( tree.bodyOf[1], tree.bodyOf[3] );
  QCOMPARE( tree.bodyOf[4], tree.bodyOf[5] );
  QVERIFY( tree.bodyOf[0] != tree.bodyOf[1] && tree.bodyOf[3] != tree.bodyOf[4] );
  QCOMPARE( tree.bodyOf[6], -1 );
  // With a second root what lies between is looped.
  const BridgeTree two = bridgeTree( 7, edges, { 0, 5 } );
  QVERIFY( !two.isBridge[0] && !two.isBridge[4] );
}

void TestLoops::aRingOnATrunk()
{
  Net net;
  net.source = { 100.0, 95.0 };
  net.nodes = 4;
  net.pipes = { { 0, 1, { 40.0, 40.0, 30.0 } }, { 1, 2, { 30.0, 10.0, 15.0 } }, { 1, 2, { 30.0, 20.0, 15.0 } },
    { 2, 3, { 15.0, 0.0 } } };
  const Proposal proposal = proposeOnGraph( graphOf( net ), net.rules );
  QCOMPARE( proposal.bound, 1 );
  QVERIFY( proposal.proven );
  QCOMPARE( proposal.regulators.front().at.line, 0 );
  QCOMPARE( faultOf( net, proposal ), std::string() );
}

void TestLoops::aLowSectorOfARing()
{
  Net net;
  net.source = { 110.0, 110.0 };
  net.nodes = 4;
  // One way round the ring is level at 60 with a hill of 78 hanging on it, the other dips to 10.
  net.pipes = { { 0, 1, { 60.0, 60.0 } }, { 1, 2, { 60.0, 60.0, 60.0 } }, { 1, 2, { 60.0, 10.0, 10.0, 60.0 } },
    { 2, 3, { 60.0, 78.0 } } };
  const Proposal proposal = proposeOnGraph( graphOf( net ), net.rules );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QCOMPARE( proposal.bound, 2 );
  QVERIFY( proposal.proven );
  QVERIFY( proposal.excused.empty() );
  for ( const ProposedRegulator &own : proposal.regulators )
  {
    QCOMPARE( own.at.line, 2 );
    QVERIFY( own.reason == RegulatorReason::FeedsALoop );
  }
  QVERIFY( proposal.regulators[0].againstLine != proposal.regulators[1].againstLine );
  QCOMPARE( proposal.regulators[0].group, proposal.regulators[1].group );
  QCOMPARE( faultOf( net, proposal ), std::string() );
}

void TestLoops::aRingAtTheSource()
{
  Net net;
  net.source = { 100.0, 95.0 };
  net.nodes = 2;
  net.pipes = { { 0, 1, { 15.0, 10.0, 5.0 } }, { 1, 0, { 5.0, 10.0, 15.0 } } };
  const Proposal proposal = proposeOnGraph( graphOf( net ), net.rules );
  QCOMPARE( proposal.bound, 2 );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QCOMPARE( faultOf( net, proposal ), std::string() );
}

void TestLoops::bothArmsLeadToTheHill()
{
  Net net;
  net.source = { 110.0, 110.0 };
  net.nodes = 3;
  // Either dip could be held lower, but not both: the hill would have no way left. The shorter is left over.
  net.pipes = { { 0, 1, { 60.0, 10.0, 60.0 } }, { 0, 1, { 60.0, 10.0, 10.0, 60.0 } }, { 1, 2, { 60.0, 78.0 } } };
  const Proposal proposal = proposeOnGraph( graphOf( net ), net.rules );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QCOMPARE( static_cast<int>( proposal.excused.size() ), 1 );
  QVERIFY( proposal.excused.front().loop );
  QCOMPARE( proposal.excused.front().line, 0 );
  QCOMPARE( faultOf( net, proposal ), std::string() );
}

void TestLoops::lowGroundEnclosesWhatNeedsLittle()
{
  Net net;
  net.source = { 110.0, 105.0 };
  net.nodes = 4;
  // Between two dips of the ring the pipe is not over; it needs no more than the dips stand and is fed with them.
  net.pipes = { { 0, 1, { 70.0, 70.0, 70.0 } }, { 0, 2, { 70.0, 5.0, 35.0 } }, { 2, 1, { 35.0, 5.0, 70.0 } },
    { 2, 3, { 35.0, 38.0 } } };
  const Proposal proposal = proposeOnGraph( graphOf( net ), net.rules );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QVERIFY( proposal.excused.empty() );
  QCOMPARE( faultOf( net, proposal ), std::string() );
}

void TestLoops::twoSourcesOfOneLevel()
{
  Net net;
  net.source = { 100.0, 100.0 };
  net.nodes = 2;
  net.sources = { 0, 1 };
  net.pipes = { { 0, 1, { 50.0, 5.0, 50.0 } } };
  const Proposal proposal = proposeOnGraph( graphOf( net ), net.rules );
  QCOMPARE( static_cast<int>( proposal.regulators.size() ), 2 );
  QCOMPARE( faultOf( net, proposal ), std::string() );
}

// A given regulator stays as it is: pipe below it is over only if its own lock-up is too much there.
void TestLoops::aDeviceBetween()
{
  Net net;
  net.source = { 100.0, 95.0 };
  net.nodes = 4;
  net.pipes = { { 0, 1, { 40.0, 30.0 } }, { 2, 3, { 30.0, -30.0 } } };
  PipeGraph graph = graphOf( net );
  graph.zones.push_back( { 70.0, 60.0 } );
  for ( std::size_t p = graph.edges[1].firstPart; p < graph.parts.size(); ++p )
  {
    graph.parts[p].zone = 1;
    graph.parts[p].served = true;
  }
  GraphEdge device;
  device.fromNode = 1;
  device.toNode = 2;
  device.oneWay = true;
  graph.edges.push_back( device );
  const Proposal proposal = proposeOnGraph( graph, net.rules );
  QCOMPARE( proposal.bound, 1 );
  QCOMPARE( proposal.regulators.front().at.line, 1 );
  QVERIFY( proposal.proven );
}

void TestLoops::randomNetworks()
{
  std::mt19937 random( 3 );
  const auto pick = [&]( double low, double high ) {
    return std::uniform_real_distribution<double>( low, high )( random );
  };
  const auto pickInt = [&]( int low, int high ) { return std::uniform_int_distribution<int>( low, high )( random ); };
  int looped = 0;
  int cut = 0;
  int gaveWay = 0;
  for ( int i = 0; i < 800; ++i )
  {
    Net net;
    net.source.highM = pick( 95.0, 130.0 );
    net.source.lowM = net.source.highM - pick( 0.0, 12.0 );
    net.nodes = pickInt( 2, 7 );
    std::vector<double> heightM;
    for ( int node = 0; node < net.nodes; ++node )
      heightM.push_back( node == 0 ? net.source.lowM - pick( 35.0, 60.0 ) : pick( -10.0, net.source.lowM + 5.0 ) );
    const auto join = [&]( int a, int b ) {
      Pipe pipe { a, b, { heightM[static_cast<std::size_t>( a )] } };
      for ( int k = pickInt( 0, 2 ); k > 0; --k )
        pipe.heightM.push_back( pick( -10.0, net.source.lowM ) );
      pipe.heightM.push_back( heightM[static_cast<std::size_t>( b )] );
      net.pipes.push_back( pipe );
    };
    for ( int node = 1; node < net.nodes; ++node )
      join( pickInt( 0, node - 1 ), node );
    for ( int k = pickInt( 0, 3 ); k > 0; --k )
      join( pickInt( 0, net.nodes - 1 ), pickInt( 0, net.nodes - 1 ) );
    // As the job does: a plan that fails when it is tried gives way.
    PipeGraph graph = graphOf( net );
    Proposal proposal = proposeOnGraph( graph, net.rules );
    Fault fault = firstFault( net, proposal );
    gaveWay += fault.what.empty() ? 0 : 1;
    while ( !fault.what.empty() && giveWay( graph, { fault.at } ) )
    {
      proposal = proposeOnGraph( graph, net.rules );
      fault = firstFault( net, proposal );
    }
    QVERIFY2( fault.what.empty(),
      qPrintable( QStringLiteral( "net %1: %2" ).arg( i ).arg( QString::fromStdString( fault.what ) ) ) );
    QVERIFY2( static_cast<int>( proposal.regulators.size() ) >= proposal.bound, qPrintable( QString::number( i ) ) );
    looped += static_cast<int>( net.pipes.size() ) >= net.nodes ? 1 : 0;
    cut += std::any_of( proposal.regulators.begin(), proposal.regulators.end(),
             []( const ProposedRegulator &own ) { return own.reason == RegulatorReason::FeedsALoop; } )
      ? 1
      : 0;
  }
  QVERIFY( looped > 400 );
  QVERIFY( cut > 50 );
  QVERIFY( gaveWay < 5 );
}

QTEST_GUILESS_MAIN( TestLoops )
#include "testloops.moc"
