// SPDX-License-Identifier: GPL-2.0-or-later
// Boosters on small trees worked by hand. One metre of water is one pascal here; the level is 100 in both cases unless said
// otherwise, LEAST is 30, MOST is 80: pipe is short above 70 and over below 20.
#include "core/proposal/boost.h"

#include <QTest>

using namespace stillhead;

class TestBoost : public QObject
{
    Q_OBJECT

  private slots:
    void onePipe_data();
    void onePipe();
    void nothingShort();
    void eachBranchWhereOneLiftsTooMuch();
    void oneForBothBranches();
    void loopsAreLiftedFromTheirLeg();
    void loopAtTheSource();
    void aGivenRegulatorEndsWhatIsBeyond();
    void lowCaseBelowTheHighCase();
};

namespace
{

  constexpr double STUB_M = 0.2;

  //! Pipes of 100 m, one for each rise or fall, from node to node.
  class Graph
  {
    public:
      explicit Graph( int nodes, StaticLevels levels = { 100.0, 100.0 } )
      {
        mGraph.nodeCount = nodes;
        mGraph.sources = { 0 };
        mGraph.zones = { levels };
      }

      Graph &pipe( int from, int to, const std::vector<double> &elevationsM, int zone = 0 )
      {
        GraphEdge edge;
        edge.fromNode = from;
        edge.toNode = to;
        edge.firstPart = mGraph.parts.size();
        edge.partCount = elevationsM.size() - 1;
        edge.stubFromM = edge.stubToM = STUB_M;
        for ( std::size_t i = 0; i + 1 < elevationsM.size(); ++i )
        {
          // Cut where pipe begins to be short, as the main job cuts it.
          const double shortM = mGraph.zones[static_cast<std::size_t>( zone )].lowM - 30.0;
          const double a = elevationsM[i];
          const double b = elevationsM[i + 1];
          const double at = ( a - shortM ) * ( b - shortM ) < 0.0 ? ( shortM - a ) / ( b - a ) : 1.0;
          add( 100.0 * static_cast<double>( i ), a, 0.0, at, b, zone, shortM );
          if ( at < 1.0 )
          {
            add( 100.0 * static_cast<double>( i ), a, at, 1.0, b, zone, shortM );
            ++edge.partCount;
          }
        }
        mGraph.edges.push_back( edge );
        return *this;
      }

      Graph &regulator( int from, int to, StaticLevels beyond )
      {
        GraphEdge edge;
        edge.fromNode = from;
        edge.toNode = to;
        edge.oneWay = edge.regulates = true;
        mGraph.edges.push_back( edge );
        mGraph.zones.push_back( beyond );
        return *this;
      }

      std::vector<ProposedBooster> boosters( double risePa = 0.0 ) const
      {
        BoostRules rules;
        rules.limits.leastPa = rules.limits.lateralLeastPa = 30.0;
        rules.limits.mostPa = rules.limits.lateralMostPa = 80.0;
        rules.specificWeightNPerM3 = 1.0;
        rules.risePa = risePa;
        return proposeBoosters( mGraph, rules );
      }

    private:
      void add( double startM, double a, double from, double to, double b, int zone, double shortM )
      {
        ForestPart part;
        part.line = static_cast<int>( mGraph.edges.size() );
        part.fromM = startM + 100.0 * from;
        part.toM = startM + 100.0 * to;
        part.elevation = { a + from * ( b - a ), a + to * ( b - a ), 0.0 };
        part.zone = zone;
        part.served = 0.5 * ( part.elevation.from + part.elevation.to ) <= shortM;
        mGraph.parts.push_back( part );
      }

      PipeGraph mGraph;
  };

} // namespace

void TestBoost::onePipe_data()
{
  QTest::addColumn<std::vector<double>>( "elevations" );
  QTest::addColumn<double>( "rise" );
  QTest::addColumn<double>( "at" );
  QTest::addColumn<double>( "boostLow" );
  QTest::addColumn<bool>( "regulatorFollows" );
  QTest::addColumn<double>( "shortM" );
  // 90 needs 120; from 40 on everything stands it (40 + 80).
  QTest::newRow( "at the start where all stands it" )
    << std::vector<double> { 50, 90 } << 0.0 << STUB_M << 20.0 << false << 50.0;
  QTest::newRow( "past the low ground" ) << std::vector<double> { 30, 50, 90 } << 0.0 << 50.0 << 20.0 << false << 50.0;
  QTest::newRow( "past the valley" ) << std::vector<double> { 60, 30, 50, 90 } << 0.0 << 150.0 << 20.0 << false << 50.0;
  QTest::newRow( "rise at no flow" ) << std::vector<double> { 30, 50, 90 } << 5.0 << 75.0 << 20.0 << false << 50.0;
  // Beyond the hill of 90 lies ground at 30, which the lifted level is too much for.
  QTest::newRow( "low ground beyond" ) << std::vector<double> { 50, 90, 30 } << 0.0 << 50.0 << 20.0 << true
                                       << 83.3333333;
  // 110 lies above the level: it needs 140, and the pipe beyond it is past a summit.
  QTest::newRow( "above the level" ) << std::vector<double> { 60, 110, 65 } << 0.0 << STUB_M << 40.0 << false
                                     << 168.8888889;
}

void TestBoost::onePipe()
{
  QFETCH( const std::vector<double>, elevations );
  QFETCH( const double, rise );
  const std::vector<ProposedBooster> boosters = Graph( 2 ).pipe( 0, 1, elevations ).boosters( rise );
  QCOMPARE( boosters.size(), std::size_t { 1 } );
  const ProposedBooster &own = boosters.front();
  QTEST( own.at.alongM, "at" );
  QTEST( own.boostLowPa, "boostLow" );
  QCOMPARE( own.boostPa, own.boostLowPa + rise );
  QTEST( own.regulatorFollows, "regulatorFollows" );
  QFETCH( const double, shortM );
  QVERIFY( std::abs( own.shortM - shortM ) < 1e-6 );
  QVERIFY( !own.againstLine );
}

void TestBoost::nothingShort()
{
  QVERIFY( Graph( 2 ).pipe( 0, 1, { 50, 70 } ).boosters().empty() );
}

void TestBoost::eachBranchWhereOneLiftsTooMuch()
{
  // 25 on the way to both ends stands 105 only, so each hill gets its own, past that ground.
  const std::vector<ProposedBooster> boosters =
    Graph( 4 ).pipe( 0, 1, { 50, 25, 50 } ).pipe( 1, 2, { 50, 90 } ).pipe( 3, 1, { 80, 30, 50 } ).boosters();
  QCOMPARE( boosters.size(), std::size_t { 2 } );
  QCOMPARE( boosters[0].at.line, 1 );
  QCOMPARE( boosters[0].boostLowPa, 20.0 );
  QVERIFY( !boosters[0].regulatorFollows );
  // Drawn towards the joint: water runs against the line. 30 stands 110: what the hill of 80 needs.
  QCOMPARE( boosters[1].at.line, 2 );
  QVERIFY( boosters[1].againstLine );
  QCOMPARE( boosters[1].boostLowPa, 10.0 );
  QCOMPARE( boosters[1].at.alongM, 200.0 - STUB_M );
}

void TestBoost::oneForBothBranches()
{
  const std::vector<ProposedBooster> boosters =
    Graph( 4 ).pipe( 0, 1, { 50, 45 } ).pipe( 1, 2, { 45, 90 } ).pipe( 1, 3, { 45, 75 } ).boosters();
  QCOMPARE( boosters.size(), std::size_t { 1 } );
  QCOMPARE( boosters[0].at.line, 0 );
  QCOMPARE( boosters[0].neededByM, 90.0 );
}

void TestBoost::loopsAreLiftedFromTheirLeg()
{
  // The low ground of 25 lies on the leg; the loop beyond is short in part.
  const std::vector<ProposedBooster> boosters = Graph( 4 )
                                                  .pipe( 0, 1, { 60, 25, 60 } )
                                                  .pipe( 1, 2, { 60, 90 } )
                                                  .pipe( 2, 3, { 90, 60 } )
                                                  .pipe( 3, 1, { 60, 60 } )
                                                  .boosters();
  QCOMPARE( boosters.size(), std::size_t { 1 } );
  QCOMPARE( boosters[0].at.line, 0 );
  // 25 + 35·share must reach 40 on the second half.
  QVERIFY( std::abs( boosters[0].at.alongM - ( 100.0 + 100.0 * 15.0 / 35.0 ) ) < 1e-9 );
}

void TestBoost::loopAtTheSource()
{
  const std::vector<ProposedBooster> boosters =
    Graph( 3 ).pipe( 0, 1, { 60, 90 } ).pipe( 1, 2, { 90, 60 } ).pipe( 2, 0, { 60, 60 } ).boosters();
  QCOMPARE( boosters.size(), std::size_t { 1 } );
  QVERIFY( boosters[0].atSource );
  QCOMPARE( boosters[0].boostLowPa, 20.0 );
}

void TestBoost::aGivenRegulatorEndsWhatIsBeyond()
{
  // Beyond the regulator (level 50) pipe at 30 is short and pipe at 0 stands little; only a booster there helps.
  Graph graph( 4 );
  graph.pipe( 0, 1, { 60, 55 } ).regulator( 1, 2, { 50.0, 50.0 } ).pipe( 2, 3, { 15, 30 }, 1 );
  const std::vector<ProposedBooster> boosters = graph.boosters();
  QCOMPARE( boosters.size(), std::size_t { 1 } );
  QCOMPARE( boosters[0].at.line, 2 );
  QCOMPARE( boosters[0].zone, 1 );
  QCOMPARE( boosters[0].boostLowPa, 10.0 );
}

void TestBoost::lowCaseBelowTheHighCase()
{
  // Low level 90: 80 needs 110, 20 more; at no flow that makes 120, which 40 stands.
  const std::vector<ProposedBooster> boosters = Graph( 2, { 100.0, 90.0 } ).pipe( 0, 1, { 30, 50, 80 } ).boosters();
  QCOMPARE( boosters.size(), std::size_t { 1 } );
  QCOMPARE( boosters[0].boostLowPa, 20.0 );
  QCOMPARE( boosters[0].at.alongM, 50.0 );
}

QTEST_APPLESS_MAIN( TestBoost )
#include "testboost.moc"
