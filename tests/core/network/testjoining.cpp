// SPDX-License-Identifier: GPL-2.0-or-later
// Which lines join, sentence by sentence of the rule: small sketches with the parts, nodes and findings they must give.
// Tolerance 0.125 m unless said otherwise, so that figures are exact; near misses reach to 1.25 m.
#include "core/network/endjoins.h"
#include "tests/support/networksketch.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::Joined;
using stillhead::test::joined;
using stillhead::test::sketched;

namespace
{

  constexpr double TOLERANCE_M = 0.125;

  Joined joinedSketch( const char *sketch, bool joinCrossings = false )
  {
    return joined( sketched( sketch ), { TOLERANCE_M, joinCrossings } );
  }

  int degreeAt( const Joined &result, double x, double y )
  {
    const int node = result.nodeAt( x, y );
    return node < 0 ? 0 : result.network.nodes[static_cast<std::size_t>( node )].degree;
  }

  double spannedM( const Joined &result )
  {
    double sum = 0.0;
    for ( const Span &span : result.network.spans )
      sum += span.toM - span.fromM;
    return sum;
  }

} // namespace

class TestJoining : public QObject
{
    Q_OBJECT

  private slots:
    void whatJoins_data();
    void whatJoins();
    void nodePlace_data();
    void nodePlace();
    void elevationCarrier();
    void nearMissTellsItsGap();
    void crossingTellsItsPlaceAndLines();
    void endOnTwoCrossingLines();
    void systemsTouchOnceForEachPair();
    void crossingsOfSystemsAreToldOnRequest();
    void sourceNode_data();
    void sourceNode();
    void nothingShorterThanAMillimetre();
    void manyEndsWithinOneTolerance();
};

void TestJoining::whatJoins_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<bool>( "joinCrossings" );
  QTest::addColumn<int>( "parts" );
  QTest::addColumn<int>( "nodes" );
  QTest::addColumn<int>( "spans" );
  QTest::addColumn<int>( "nearMisses" );
  QTest::addColumn<int>( "crossings" );
  QTest::addColumn<int>( "touches" );
  const auto row = []( const char *name, const char *sketch, bool joinCrossings, int parts, int nodes, int spans,
                     int nearMisses = 0, int crossings = 0, int touches = 0 ) {
    QTest::newRow( name ) << sketch << joinCrossings << parts << nodes << spans << nearMisses << crossings << touches;
  };
  // End to end.
  row( "ends at one place", "main 0 0, 10 0; main 10 0, 20 5", false, 1, 3, 2 );
  row( "ends just within the tolerance", "main 0 0, 10 0; main 10.125 0, 20 5", false, 1, 3, 2 );
  row( "ends just beyond it", "main 0 0, 10 0; main 10.1250001 0, 20 5", false, 2, 4, 2, 2 );
  row( "a chain of ends is carried on", "main 0 0, 10 0; main 10.125 0, 20 5; main 10.25 0, 20 -5", false, 1, 4, 3 );
  row( "a chain of five",
    "main 0 0, 10 0; main 10.125 0, 20 9; main 10.25 0, 20 5; main 10.375 0, 20 -5;"
    "main 10.5 0, 20 -9",
    false, 1, 6, 5 );
  row( "a mainline and a lateral", "main 0 0, 10 0; lateral 10 0, 20 5", false, 1, 3, 2 );
  // End to interior.
  row( "an end on a line", "main 0 0, 10 0; lateral 5 0, 5 5", false, 1, 4, 3 );
  row( "an end just within the tolerance of a line", "main 0 0, 10 0; lateral 5 0.125, 5 5", false, 1, 4, 3 );
  row( "an end just beyond it", "main 0 0, 10 0; lateral 5 0.1250001, 5 5", false, 2, 4, 2, 1 );
  row( "an end at a vertex", "main 0 0, 5 0, 10 0; lateral 5 0, 5 5", false, 1, 4, 3 );
  row( "an end in the elbow of a line", "main 0 0, 5 0, 5 -5; lateral 5.0625 0.0625, 9 9", false, 1, 4, 3 );
  row( "two ends on a line at one place", "main 0 0, 10 0; lateral 5 0, 5 5; lateral 5 0, 5 -5", false, 1, 5, 4 );
  row( "two ends on a line at two places", "main 0 0, 10 0; lateral 5 0, 5 5; lateral 6 0, 9 5", false, 1, 6, 5 );
  row( "an end near a line's end cuts nothing off it", "main 0 0, 10 0; lateral 9.9375 0.0625, 9 9", false, 1, 3, 2 );
  row( "both ends on one line", "main 0 0, 10 0; lateral 2 0, 2 5, 8 5, 8 0", false, 1, 4, 4 );
  row( "an end on two lines", "main 0 0, 10 0; main 0 0.125, 10 0.125; lateral 5 0.0625, 5 9", false, 1, 4, 5 );
  row(
    "an end on a line that comes by twice", "main 0 0, 9 0, 9 0.125, 0 0.125; lateral 4 0.0625, 4 5", false, 1, 3, 4 );
  // Itself.
  row( "its own other end", "main 0 0, 10 0, 10 10, 0 0.125", false, 1, 1, 1 );
  row( "closed", "main 0 0, 10 0, 10 10, 0 0", false, 1, 1, 1 );
  row( "nearly closed", "main 0 0, 10 0, 10 10, 0 0.5", false, 1, 2, 1, 2 );
  row( "its own interior", "main 0 0, 0 10, 5 10, 5 5, 0 5", false, 1, 2, 2 );
  row( "its own interior no farther along than two tolerances", "main 0 0, 0 10, 0.125 10, 0.0625 9.9375", false, 1, 2,
    1 );
  row( "two sloppy ends on a line make one joint", "main 0 0, 10 0; lateral 5 0.0625, 5 5; lateral 4.9375 0.0625, 0 5",
    false, 1, 5, 4 );
  row( "its own interior within the tolerance", "main 0 0, 0 10, 5 10, 5 5, 0.125 5", false, 1, 2, 2 );
  row( "its own interior, overshot", "main 0 0, 0 10, 5 10, 5 5, -0.0625 5", false, 1, 2, 2 );
  row( "nearly its own interior", "main 0 0, 0 10, 5 10, 5 5, 0.5 5", false, 1, 2, 1, 1 );
  row( "not its own interior nearer than the tolerance", "main 0 0, 0.0625 0, 0.0625 0.0625, 5 5", false, 1, 2, 1 );
  row( "back over itself", "main 0 0, 10 0, 5 0", false, 1, 2, 2 );
  // Near misses.
  row( "near miss at ten tolerances", "main 0 0, 10 0; lateral 5 1.25, 5 5", false, 2, 4, 2, 1 );
  row( "beyond ten tolerances", "main 0 0, 10 0; lateral 5 1.2500001, 5 5", false, 2, 4, 2 );
  row( "two ends that nearly meet", "main 0 0, 10 0; main 10.5 0, 20 0", false, 2, 4, 2, 2 );
  row( "pipe leads there nearby", "main 0 0, 10 0; lateral 5 0, 5 0.5, 6 0.5", false, 1, 4, 3 );
  row( "pipe leads there a long way round", "main 0 0, 10 0; lateral 5 0, 5 0.5, 8 0.5", false, 1, 4, 3, 1 );
  row( "pipe leads there over a third line", "main 0 0, 10 0; main 5 0, 5 9; lateral 5 0.5, 5.75 0.5", false, 1, 6, 5 );
  row( "two ends short of a line miss it twice", "main 0 0, 10 0; lateral 2 0.5, 2 5; lateral 7 0.5, 7 5", false, 3, 6,
    3, 2 );
  row( "two laterals end near each other on their main", "main 0 0, 10 0; lateral 5 0, 5 5; lateral 5.5 0, 9 5", false,
    1, 6, 5 );
  row( "another system is never missed", "main system=a 0 0, 10 0; lateral system=b 5 0.5, 5 5", false, 2, 4, 2 );
  // Crossings.
  row( "a crossing", "main 0 0, 10 0; main 5 -5, 5 5", false, 2, 4, 2, 0, 1 );
  row( "a crossing on request", "main 0 0, 10 0; main 5 -5, 5 5", true, 1, 5, 4 );
  row( "at a vertex of one line only", "main 0 0, 10 0; main 5 -5, 5 0, 7 5", false, 2, 4, 2, 0, 1 );
  row( "at a vertex of both", "main 0 0, 5 0, 10 1; main 5 -5, 5 0, 7 5", false, 2, 4, 2, 0, 1 );
  row( "at a vertex of both on request", "main 0 0, 5 0, 10 1; main 5 -5, 5 0, 7 5", true, 1, 5, 4 );
  row( "touching at a vertex without crossing", "main 0 0, 10 0; main 3 5, 5 0, 7 5", false, 2, 4, 2, 0, 1 );
  row( "crossing twice", "main 0 0, 10 0; main 2 -5, 2 5, 7 5, 7 -5", false, 2, 4, 2, 0, 2 );
  row( "crossing itself", "main 0 0, 10 10, 10 0, 0 10", false, 1, 2, 1, 0, 1 );
  row( "crossing itself on request", "main 0 0, 10 10, 10 0, 0 10", true, 1, 3, 3 );
  row( "three through one place", "main 0 0, 10 0; main 5 -5, 5 5; main 0 -5, 10 5", false, 3, 6, 3, 0, 3 );
  row( "three through one place on request", "main 0 0, 10 0; main 5 -5, 5 5; main 0 -5, 10 5", true, 1, 7, 6 );
  row( "a lateral at its own joint", "main 0 0, 10 0; lateral 5 0, 5 5", true, 1, 4, 3 );
  row( "a lateral past its own joint", "main 0 0, 10 0; lateral 5 -0.0625, 5 5", false, 1, 4, 3 );
  row( "a lateral past its joint on request", "main 0 0, 10 0; lateral 5 -0.0625, 5 5", true, 1, 4, 3 );
  row( "far past: a crossing and a near miss", "main 0 0, 10 0; lateral 5 -0.5, 5 5", false, 2, 4, 2, 1, 1 );
  row( "far past, on request", "main 0 0, 10 0; lateral 5 -0.5, 5 5", true, 1, 5, 4 );
  row( "past the joint with a line's end", "main 0 0, 10 0; main 10 -0.0625, 10 5", false, 1, 3, 2 );
  row( "an end on two crossing lines", "main 0 0, 10 0; main 5 -5, 5 5; lateral 5 0, 8 8", false, 1, 6, 5, 0, 1 );
  row( "two lines drawn on each other in part", "main 0 0, 10 0; main 5 0, 15 0", false, 1, 4, 4 );
  row( "drawn twice", "main 0 0, 5 1, 10 0; main 0 0, 5 1, 10 0", false, 1, 2, 2 );
  row( "drawn twice, many bends, on request", "main 0 0, 3 1, 6 0, 9 1; lateral 9 1, 6 0, 3 1, 0 0", true, 1, 2, 2 );
  row( "drawn twice and crossing itself", "main 0 0, 9 9, 9 0, 0 9; main 0 0, 9 9, 9 0, 0 9", false, 1, 2, 2, 0, 2 );
  row( "a riser does not cross its own line", "main 0 0 5, 5 0 5, 5 0 8, 5 5 8", true, 1, 2, 1 );
  // Systems.
  row( "one named system", "main system=a 0 0, 10 0; main system=a 10 0, 20 0", false, 1, 3, 2 );
  row( "two systems end to end", "main system=a 0 0, 10 0; main system=b 10 0, 20 0", false, 2, 4, 2, 0, 0, 1 );
  row(
    "a blank one differs from a named one", "main system=a 0 0, 10 0; main 10.0625 0, 20 0", false, 2, 4, 2, 0, 0, 1 );
  row( "two systems, end to interior", "main system=a 0 0, 10 0; lateral system=b 5 0.0625, 5 5", false, 2, 4, 2, 0, 0,
    1 );
  row( "two systems, past the line by a hair", "main system=a 0 0, 10 0; main system=b 5 -0.0625, 5 5", false, 2, 4, 2,
    0, 0, 1 );
  row( "two systems cross", "main system=a 0 0, 10 0; main system=b 5 -5, 5 5", false, 2, 4, 2, 0, 1 );
  row( "two systems cross, crossings asked for", "main system=a 0 0, 10 0; main system=b 5 -5, 5 5", true, 2, 4, 2, 0,
    0, 1 );
  row( "a chain does not lead through another system",
    "main system=a 0 0, 10 0; main system=b 10.125 0, 20 5; main system=a 10.25 0, 20 -5", false, 3, 6, 3, 2, 0, 2 );
}

void TestJoining::whatJoins()
{
  QFETCH( QString, sketch );
  QFETCH( bool, joinCrossings );
  const Drawing drawing = sketched( sketch.toStdString() );
  double drawnM = 0.0;
  for ( const DrawnLine &line : drawing.lines )
  {
    std::vector<double> along( line.count );
    PlanarMeasure().distancesAlongM( &drawing.vertices[line.first], line.count, along.data() );
    drawnM += along.back();
  }
  for ( unsigned seed = 0; seed < 8; ++seed )
  {
    const Joined result =
      joined( seed == 0 ? drawing : test::redrawn( drawing, seed ), { TOLERANCE_M, joinCrossings } );
    QTEST( static_cast<int>( result.parts() ), "parts" );
    QTEST( static_cast<int>( result.network.nodes.size() ), "nodes" );
    QTEST( static_cast<int>( result.network.spans.size() ), "spans" );
    QTEST( static_cast<int>( result.count( FindingCode::NearMiss ) ), "nearMisses" );
    QTEST( static_cast<int>( result.count( FindingCode::CrossingNotJoined ) ), "crossings" );
    QTEST( static_cast<int>( result.count( FindingCode::SystemsTouch ) ), "touches" );
    STILLHEAD_NEAR( spannedM( result ), drawnM, 1e-12 * drawnM );
    int degrees = 0;
    for ( const Node &node : result.network.nodes )
    {
      degrees += node.degree;
      QVERIFY( node.kind == ( node.degree > 1 ? NodeKind::Joint : NodeKind::End ) );
    }
    QCOMPARE( degrees, static_cast<int>( 2 * result.network.spans.size() ) );
  }
}

// A node lies on the line whose interior was met, else at the least (x, y) of the ends that meet.
void TestJoining::nodePlace_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<int>( "degree" );
  const auto row = []( const char *name, const char *sketch, double x, double y, int degree ) {
    QTest::newRow( name ) << sketch << x << y << degree;
  };
  row( "least x of two ends", "main 0 0, 10 0; main 9.9375 0.0625, 20 5", 9.9375, 0.0625, 2 );
  row( "equal x: least y", "main 0 0, 10 0; main 10 -0.0625, 20 5", 10, -0.0625, 2 );
  row( "least of a chain", "main 0 0, 10.25 0; main 10.125 0, 20 5; main 10 0, 20 -5", 10, 0, 3 );
  row( "least though a lateral's", "main 0 0, 10 0; lateral 9.9375 0, 20 5", 9.9375, 0, 2 );
  row( "on the line that was met", "main 0 0, 10 0; lateral 5 0.125, 5 5", 5, 0, 3 );
  row( "on it though the end is less", "main 0 0, 10 10; lateral 4.9375 5.0625, 0 9", 5, 5, 3 );
  row(
    "on it though ends meet too", "main 0 0, 10 0; lateral 5 0.0625, 5 5; lateral 4.96875 0.0625, 0 5", 4.96875, 0, 4 );
  row( "on the mainline of two that were met", "lateral 0 0, 10 0; main 0 0.125, 10 0.125; lateral 5 0.0625, 5 9", 5,
    0.125, 5 );
  row( "the least of two mainlines that were met", "main 0 0, 10 0; main 0 0.125, 10 0.125; lateral 5 0.0625, 5 9", 5,
    0, 5 );
  row( "a crossing on request", "main 0 0, 10 0; main 5 -5, 5 5", 5, 0, 4 );
}

void TestJoining::nodePlace()
{
  QFETCH( QString, sketch );
  QFETCH( double, x );
  QFETCH( double, y );
  QFETCH( int, degree );
  const Drawing drawing = sketched( sketch.toStdString() );
  const std::vector<PlanPoint> before = drawing.vertices;
  for ( unsigned seed = 0; seed < 8; ++seed )
  {
    const Joined result = joined( seed == 0 ? drawing : test::redrawn( drawing, seed ), { TOLERANCE_M, true } );
    QCOMPARE( degreeAt( result, x, y ), degree );
  }
  QVERIFY( drawing.vertices == before );
}

// The node's elevation is that of the pipe that was met, a mainline before a lateral.
void TestJoining::elevationCarrier()
{
  const auto carrier = []( const char *sketch, double x, double y ) {
    const Joined result = joinedSketch( sketch );
    const Node &node = result.network.nodes[static_cast<std::size_t>( result.nodeAt( x, y ) )];
    return std::make_pair( result.drawing.lines[static_cast<std::size_t>( node.on.line )].drawn, node.on.alongM );
  };
  QVERIFY( carrier( "lateral 5 0.0625, 5 5; main 0 0, 10 0", 5, 0 ) == std::make_pair( 1, 5.0 ) );
  QVERIFY( carrier( "lateral 9.9375 0, 20 0; main 0 0, 10 0", 9.9375, 0 ) == std::make_pair( 1, 10.0 ) );
  QVERIFY( carrier( "lateral 0 0, 10 0; main 5 0, 5 5", 5, 0 ) == std::make_pair( 0, 5.0 ) );
}

void TestJoining::nearMissTellsItsGap()
{
  const Joined result = joinedSketch( "main 0 0, 10 0; lateral 5 0.5, 5 5" );
  const Finding finding = result.finding( FindingCode::NearMiss );
  QCOMPARE( finding.line, 1 );
  QCOMPARE( finding.otherLine, 0 );
  STILLHEAD_SAME( finding.gapM, 0.5 );
  QVERIFY( finding.place == ( PlanPoint { 5, 0 } ) );
  // Of two lines missed the nearer is named.
  const Joined two = joinedSketch( "main 0 0, 10 0; main 0 1.5, 10 1.5; lateral 5 1, 5 9" );
  STILLHEAD_SAME( two.finding( FindingCode::NearMiss ).gapM, 0.5 );
  QCOMPARE( two.finding( FindingCode::NearMiss ).otherLine, 1 );
}

void TestJoining::crossingTellsItsPlaceAndLines()
{
  const Joined result = joinedSketch( "main 5 -5, 5 5; lateral 0 0, 10 1" );
  const Finding finding = result.finding( FindingCode::CrossingNotJoined );
  STILLHEAD_NEAR( finding.place.x, 5.0, 1e-12 );
  STILLHEAD_NEAR( finding.place.y, 0.5, 1e-12 );
  QCOMPARE( std::min( finding.line, finding.otherLine ), 0 );
  QCOMPARE( std::max( finding.line, finding.otherLine ), 1 );
  QVERIFY( !finding.joinedByEnd );
}

void TestJoining::endOnTwoCrossingLines()
{
  for ( const bool joinCrossings : { false, true } )
  {
    const Joined result = joinedSketch( "main 0 0, 10 0; main 5 -5, 5 5; lateral 5.0625 0.0625, 8 8", joinCrossings );
    QCOMPARE( result.parts(), std::size_t( 1 ) );
    QVERIFY( result.finding( FindingCode::CrossingNotJoined ).joinedByEnd );
  }
}

void TestJoining::systemsTouchOnceForEachPair()
{
  const Joined result = joinedSketch( "main system=a 0 0, 10 0; main system=b 10 0, 20 0; main system=c 10 0, 10 9" );
  QCOMPARE( result.count( FindingCode::SystemsTouch ), std::size_t( 3 ) );
  QCOMPARE( result.parts(), std::size_t( 3 ) );
  const Joined twoPlaces = joinedSketch( "main system=a 0 0, 10 0; main system=b 2 0, 2 5, 8 5, 8 0" );
  QCOMPARE( twoPlaces.count( FindingCode::SystemsTouch ), std::size_t( 2 ) );
  QVERIFY( twoPlaces.finding( FindingCode::SystemsTouch ).place == ( PlanPoint { 2, 0 } ) );
}

void TestJoining::crossingsOfSystemsAreToldOnRequest()
{
  const Joined result = joinedSketch( "main system=a 0 0, 10 0; main system=b 5 -5, 5 5", true );
  QVERIFY( result.finding( FindingCode::SystemsTouch ).place == ( PlanPoint { 5, 0 } ) );
}

void TestJoining::sourceNode_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<double>( "x" ); // of the source
  QTest::addColumn<double>( "y" );
  QTest::addColumn<double>( "nodeX" );
  QTest::addColumn<double>( "nodeY" );
  QTest::addColumn<int>( "nodes" );
  QTest::addColumn<int>( "degree" );
  QTest::newRow( "at an end" ) << "main 0 0, 10 0" << 0.0 << 3.0 << 0.0 << 0.0 << 2 << 1;
  QTest::newRow( "on an interior" ) << "main 0 0, 10 0" << 4.0 << 3.0 << 4.0 << 0.0 << 3 << 2;
  QTest::newRow( "within the tolerance of an end" ) << "main 0 0, 10 0" << 9.875 << 0.5 << 10.0 << 0.0 << 2 << 1;
  QTest::newRow( "just beyond it" ) << "main 0 0, 10 0" << 9.8125 << 0.5 << 9.8125 << 0.0 << 3 << 2;
  QTest::newRow( "takes over a joint" ) << "main 0 0, 10 0; lateral 5 0, 5 5" << 5.0625 << 0.0 << 5.0 << 0.0 << 4 << 3;
  QTest::newRow( "at a crossing: one of the two lines only" )
    << "main 0 0, 10 0; main 5 -5, 5 5" << 5.0 << 0.0 << 5.0 << 0.0 << 5 << 2;
  QTest::newRow( "on a vertex" ) << "main 0 0, 5 0, 5 5" << 6.0 << -1.0 << 5.0 << 0.0 << 3 << 2;
}

void TestJoining::sourceNode()
{
  QFETCH( QString, sketch );
  QFETCH( double, x );
  QFETCH( double, y );
  const Joined result =
    joined( sketched( sketch.toStdString() ), { TOLERANCE_M, false }, PlanarMeasure(), 1, PlanPoint { x, y } );
  std::vector<Node> sources;
  for ( const Node &node : result.network.nodes )
  {
    if ( node.kind == NodeKind::Source )
      sources.push_back( node );
  }
  QCOMPARE( sources.size(), std::size_t( 1 ) );
  QTEST( sources[0].place.x, "nodeX" );
  QTEST( sources[0].place.y, "nodeY" );
  QTEST( sources[0].degree, "degree" );
  QTEST( static_cast<int>( result.network.nodes.size() ), "nodes" );
}

// Joints nearer than a millimetre along a line are one, and no span is shorter.
void TestJoining::nothingShorterThanAMillimetre()
{
  const Joined result = joined( sketched( "main 0 0, 10 0; lateral 5 0, 5 5; lateral 5.0005 0, 6 -5;"
                                          "lateral 0.0005 0, 0 5; lateral 9.9995 0, 10 5" ),
    { 0.0001, false } );
  QCOMPARE( result.network.nodes.size(), std::size_t( 7 ) );
  QCOMPARE( degreeAt( result, 5.0, 0.0 ), 4 );
  for ( const Span &span : result.network.spans )
    QVERIFY( span.toM - span.fromM >= 0.001 );
}

// A hundred thousand lines that begin within one tolerance of each other: compared pair by pair this would be 10¹⁰
// comparisons, and the test would not end within its time-out.
void TestJoining::manyEndsWithinOneTolerance()
{
  Drawing drawing;
  std::mt19937 random( 3 );
  std::uniform_real_distribution<double> offset( 0.0, 0.08 );
  constexpr int LINES = 100000;
  for ( int i = 0; i < LINES; ++i )
    test::addLine( drawing, { { offset( random ), offset( random ) }, { 100.0 + i, 100.0 } } );
  Monitor monitor;
  std::vector<Finding> findings;
  const CanonicalDrawing canonical = canonicalDrawing( drawing, PlanarMeasure(), 1, findings, monitor );
  const GroundScales scales( canonical, PlanarMeasure(), 1, monitor );
  DisjointSets sets = joinEnds( canonical, scales, 0.125, monitor );
  for ( int line = 0; line < LINES; ++line )
  {
    QCOMPARE( sets.find( 2 * line ), 0 );
    QCOMPARE( sets.find( 2 * line + 1 ), 2 * line + 1 );
  }
}

QTEST_APPLESS_MAIN( TestJoining )
#include "testjoining.moc"
