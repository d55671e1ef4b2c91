// SPDX-License-Identifier: GPL-2.0-or-later
// Joining in general: random layouts against a comparison of every end with everything, the same bits from every order,
// direction and number of threads, tolerance in ground units wherever the plan lies and however it is scaled.
#include "tests/support/networksketch.h"
#include "tests/support/planmeasures.h"
#include "tests/support/randomlayout.h"
#include "tests/support/tolerance.h"

#include <map>

using namespace stillhead;
using stillhead::test::Joined;
using stillhead::test::joined;
using stillhead::test::LayoutOptions;
using stillhead::test::RandomLayout;

namespace
{

  //! Everything that joining says, by place and to the bit: no number of a line, node or span is left in it.
  QStringList byPlace( const Joined &result, const Drawing &drawn )
  {
    const auto bits = []( double value ) { return QString::number( value, 'g', 17 ); };
    const auto point = [&]( const PlanPoint &p ) { return bits( p.x ) + " " + bits( p.y ); };
    const auto nodePlace = [&]( int node ) {
      return point( result.network.nodes[static_cast<std::size_t>( node )].place );
    };
    const auto lineText = [&]( int line ) {
      const DrawnLine &own = drawn.lines[static_cast<std::size_t>( line )];
      const std::vector<PlanPoint> there = test::verticesOf( drawn, own );
      const std::vector<PlanPoint> back( there.rbegin(), there.rend() );
      const std::vector<PlanPoint> &vertices = back < there ? back : there;
      QString text = own.role == Role::Lateral ? "lateral " : "main ";
      text += QString::fromStdString( drawn.systems[static_cast<std::size_t>( own.system )] ) + " ";
      return text + point( vertices.front() ) + " " + point( vertices[1] ) + " " + point( vertices.back() );
    };
    QStringList rows;
    for ( const Node &node : result.network.nodes )
    {
      const CanonicalLine &carrier = result.drawing.lines[static_cast<std::size_t>( node.on.line )];
      rows << "node " + point( node.place )
          + QString( " %1 %2 " ).arg( node.degree ).arg( static_cast<int>( node.kind ) )
          + point( result.drawing.placeAt( carrier, node.on.alongM ) )
          + ( carrier.role == Role::Lateral ? " l" : " m" );
    }
    for ( const Span &span : result.network.spans )
    {
      const CanonicalLine &line = result.drawing.lines[static_cast<std::size_t>( span.line )];
      rows << "span " + nodePlace( span.fromNode ) + " to " + nodePlace( span.toNode ) + " from " + bits( span.fromM )
          + " to " + bits( span.toM ) + " of " + lineText( line.drawn );
    }
    for ( const Finding &finding : result.findings )
    {
      QStringList lines { lineText( finding.line ), finding.otherLine < 0 ? QString() : lineText( finding.otherLine ) };
      if ( finding.code != FindingCode::NearMiss )
        lines.sort();
      rows << QString( findingName( finding.code ) ) + " " + point( finding.place ) + " " + bits( finding.gapM ) + " "
          + lines.join( " / " ) + ( finding.joinedByEnd ? " joined" : "" );
    }
    rows.sort();
    return rows;
  }

  //! Distance of a place from a straight leg, and the share of the leg where it is nearest; in the plan's own units.
  double distanceToLeg( const PlanPoint &p, const PlanPoint &a, const PlanPoint &b )
  {
    const double dx = b.x - a.x, dy = b.y - a.y;
    const double t = std::clamp( ( ( p.x - a.x ) * dx + ( p.y - a.y ) * dy ) / ( dx * dx + dy * dy ), 0.0, 1.0 );
    return std::hypot( a.x + t * dx - p.x, a.y + t * dy - p.y );
  }

  //! Which lines hang together, comparing every end with every end and every leg; crossings count if asked for.
  DisjointSets connectedLines( const Drawing &drawing, double toleranceM, bool joinCrossings )
  {
    DisjointSets sets( drawing.lines.size() );
    for ( std::size_t i = 0; i < drawing.lines.size(); ++i )
    {
      for ( std::size_t j = 0; j < drawing.lines.size(); ++j )
      {
        if ( i == j || drawing.lines[i].system != drawing.lines[j].system )
          continue;
        const std::vector<PlanPoint> a = test::verticesOf( drawing, drawing.lines[i] );
        const std::vector<PlanPoint> b = test::verticesOf( drawing, drawing.lines[j] );
        for ( std::size_t leg = 0; leg + 1 < b.size(); ++leg )
        {
          if ( b[leg] == b[leg + 1] )
            continue;
          if ( distanceToLeg( a.front(), b[leg], b[leg + 1] ) <= toleranceM
            || distanceToLeg( a.back(), b[leg], b[leg + 1] ) <= toleranceM )
            sets.join( static_cast<int>( i ), static_cast<int>( j ) );
          for ( std::size_t other = 0; joinCrossings && other + 1 < a.size(); ++other )
          {
            const auto side = []( const PlanPoint &p, const PlanPoint &q, const PlanPoint &r ) {
              return ( q.x - p.x ) * ( r.y - p.y ) - ( q.y - p.y ) * ( r.x - p.x );
            };
            if ( side( b[leg], b[leg + 1], a[other] ) * side( b[leg], b[leg + 1], a[other + 1] ) < 0.0
              && side( a[other], a[other + 1], b[leg] ) * side( a[other], a[other + 1], b[leg + 1] ) < 0.0 )
              sets.join( static_cast<int>( i ), static_cast<int>( j ) );
          }
        }
      }
    }
    return sets;
  }

} // namespace

class TestJoinProperties : public QObject
{
    Q_OBJECT

  private slots:
    void sameBitsFromEveryOrderAndDirection();
    void sameBitsFromEveryNumberOfThreads();
    void againstComparingEverything();
    void pairsAcrossAnyBucketEdge_data();
    void pairsAcrossAnyBucketEdge();
    void toleranceIsOnTheGround_data();
    void toleranceIsOnTheGround();
    void scaleChangesOverTheDrawing();
    void splittingALineAtAVertexJoinsTheSame();
};

void TestJoinProperties::sameBitsFromEveryOrderAndDirection()
{
  int findings = 0;
  for ( unsigned seed = 0; seed < 60; ++seed )
  {
    RandomLayout random( seed );
    LayoutOptions options;
    options.jitterM = seed % 3 == 0 ? 0.0 : ( seed % 3 == 1 ? 0.08 : 0.5 );
    options.systems = seed % 2 == 0;
    const Drawing drawing = random.drawing( options );
    const JoinOptions joins { 0.1, seed % 5 == 0 };
    const PlanPoint source = random.place( options );
    const QStringList expected = byPlace( joined( drawing, joins, PlanarMeasure(), 1, source ), drawing );
    for ( unsigned again = 1; again <= 4; ++again )
    {
      const Drawing other = test::redrawn( drawing, 1000 * seed + again );
      const Joined result = joined( other, joins, PlanarMeasure(), 1, source );
      findings += static_cast<int>( result.findings.size() );
      QCOMPARE( byPlace( result, other ), expected );
    }
  }
  QVERIFY( findings > 1000 );
}

void TestJoinProperties::sameBitsFromEveryNumberOfThreads()
{
  for ( unsigned seed = 100; seed < 103; ++seed )
  {
    RandomLayout random( seed );
    LayoutOptions options;
    options.lines = 1500;
    options.places = 60;
    options.stride = 3;
    options.jitterM = 0.2;
    options.systems = true;
    const Drawing drawing = random.drawing( options );
    const Joined one = joined( drawing );
    for ( const unsigned threads : { 2u, 4u } )
    {
      const Joined several = joined( drawing, {}, PlanarMeasure(), threads );
      QCOMPARE( byPlace( several, drawing ), byPlace( one, drawing ) );
      // The numbers are the same too, not only the places.
      for ( std::size_t i = 0; i < one.findings.size(); ++i )
        QVERIFY( one.findings[i].code == several.findings[i].code && one.findings[i].line == several.findings[i].line );
    }
  }
}

void TestJoinProperties::againstComparingEverything()
{
  for ( unsigned seed = 200; seed < 300; ++seed )
  {
    RandomLayout random( seed );
    LayoutOptions options;
    options.lines = 25;
    options.jitterM = 0.09;
    options.systems = seed % 2 == 0;
    const bool joinCrossings = seed % 4 == 1;
    const Drawing drawing = random.drawing( options );
    const Joined result = joined( drawing, { 0.1, joinCrossings } );
    DisjointSets expected = connectedLines( drawing, 0.1, joinCrossings );
    DisjointSets actual( drawing.lines.size() );
    std::map<int, int> lineAtNode;
    for ( const Span &span : result.network.spans )
    {
      const int line = result.drawing.lines[static_cast<std::size_t>( span.line )].drawn;
      for ( const int node : { span.fromNode, span.toNode } )
        actual.join( line, lineAtNode.emplace( node, line ).first->second );
    }
    for ( int line = 0; line < static_cast<int>( drawing.lines.size() ); ++line )
      QVERIFY2( actual.find( line ) == expected.find( line ),
        qPrintable( QString( "seed %1, line %2" ).arg( seed ).arg( line ) ) );
  }
}

// Ends are put into cells; a pair must meet wherever the cell edges happen to fall, and no pair just beyond the tolerance.
void TestJoinProperties::pairsAcrossAnyBucketEdge_data()
{
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<double>( "tolerance" );
  QTest::newRow( "near the origin" ) << 0.0 << 0.0 << 0.1;
  QTest::newRow( "in a projected plan" ) << 612345.678 << 4567890.123 << 0.1;
  QTest::newRow( "west and south of the origin" ) << -1234567.8 << -7654321.0 << 0.1;
  QTest::newRow( "a wide tolerance" ) << 612345.678 << 4567890.123 << 25.0;
}

void TestJoinProperties::pairsAcrossAnyBucketEdge()
{
  QFETCH( double, x );
  QFETCH( double, y );
  QFETCH( double, tolerance );
  RandomLayout random( 11 );
  for ( int i = 0; i < 4000; ++i )
  {
    // The first line fixes where the cells begin.
    Drawing drawing;
    test::addLine( drawing, { { x - 90000.0, y }, { x - 90000.0 - random.between( 0.0, 1.0 ), y - 500.0 } } );
    const PlanPoint a { x + tolerance * random.between( 0.0, 3.0 ), y + tolerance * random.between( 0.0, 3.0 ) };
    const double angle =
      random.chance( 0.3 ) ? 0.25 * random.whole( 0, 7 ) * 3.14159265358979 : random.between( 0.0, 6.3 );
    const bool within = random.chance( 0.5 );
    const double gap = tolerance * ( within ? 1.0 - 1e-4 * random.whole( 1, 9 ) : 1.0 + 1e-4 * random.whole( 1, 9 ) );
    const PlanPoint b { a.x + gap * std::cos( angle ), a.y + gap * std::sin( angle ) };
    const double away = 40.0 * tolerance;
    test::addLine( drawing, { a, { a.x - away * std::cos( angle ), a.y - away * std::sin( angle ) } } );
    test::addLine( drawing, { b, { b.x + away * std::cos( angle ), b.y + away * std::sin( angle ) } } );
    QVERIFY2( joined( drawing, { tolerance, false } ).parts() == ( within ? 2u : 3u ),
      qPrintable( QString( "gap %1 at angle %2" ).arg( gap ).arg( angle ) ) );
  }
}

void TestJoinProperties::toleranceIsOnTheGround_data()
{
  QTest::addColumn<double>( "xx" );
  QTest::addColumn<double>( "xy" );
  QTest::addColumn<double>( "yx" );
  QTest::addColumn<double>( "yy" );
  QTest::newRow( "feet" ) << 0.3048 << 0.0 << 0.0 << 0.3048;
  QTest::newRow( "degrees at 60 north" ) << 55800.0 << 0.0 << 0.0 << 111400.0;
  QTest::newRow( "turned" ) << 0.8 << -0.6 << 0.6 << 0.8;
  QTest::newRow( "sheared and stretched" ) << 3.0 << 0.5 << -0.25 << 0.5;
}

void TestJoinProperties::toleranceIsOnTheGround()
{
  QFETCH( double, xx );
  QFETCH( double, xy );
  QFETCH( double, yx );
  QFETCH( double, yy );
  const test::FixedScaleMeasure measure( GroundScale { xx, xy, yx, yy } );
  const double determinant = xx * yy - xy * yx;
  const auto plan = [&]( double east, double north ) {
    return PlanPoint { ( yy * east - xy * north ) / determinant, ( xx * north - yx * east ) / determinant };
  };
  for ( int degrees = 0; degrees < 360; degrees += 5 )
  {
    const double c = std::cos( degrees * 3.14159265358979 / 180.0 );
    const double s = std::sin( degrees * 3.14159265358979 / 180.0 );
    for ( const double gap : { 0.0999, 0.1001, 0.999, 1.001 } )
    {
      Drawing ends;
      test::addLine( ends, { plan( 0.0, 0.0 ), plan( -50.0 * c, -50.0 * s ) } );
      test::addLine( ends, { plan( gap * c, gap * s ), plan( 50.0 * c, 50.0 * s ) } );
      Drawing interior;
      test::addLine( interior, { plan( -50.0 * s, 50.0 * c ), plan( 50.0 * s, -50.0 * c ) } );
      test::addLine( interior, { plan( gap * c, gap * s ), plan( 50.0 * c, 50.0 * s ) } );
      for ( const Drawing &drawing : { ends, interior } )
      {
        const Joined result = joined( drawing, { 0.1, false }, measure );
        QCOMPARE( result.parts(), std::size_t( gap <= 0.1 ? 1 : 2 ) );
        QCOMPARE( result.count( FindingCode::NearMiss ) > 0, gap > 0.1 && gap <= 1.0 );
        if ( result.count( FindingCode::NearMiss ) > 0 )
          STILLHEAD_NEAR( result.finding( FindingCode::NearMiss ).gapM, gap, 1e-9 );
      }
    }
  }
}

// From the equator to 70 degrees one unit of x shrinks to a third: each end is measured where it lies.
void TestJoinProperties::scaleChangesOverTheDrawing()
{
  const test::GlobeLikeMeasure measure;
  Drawing drawing;
  int expected = 0;
  for ( int latitude = 0; latitude <= 70; latitude += 5 )
  {
    const double metresPerX = measure.scaleAt( { 0.0, latitude + 0.0 } ).xx;
    const bool within = latitude % 2 == 0;
    const double gapX = ( within ? 0.0999 : 0.1001 ) / metresPerX;
    test::addLine( drawing, { { 10.0, latitude + 0.0 }, { 9.0, latitude + 0.0 } } );
    test::addLine( drawing, { { 10.0 + gapX, latitude + 0.0 }, { 11.0, latitude + 0.0 } } );
    expected += within ? 1 : 2;
  }
  for ( const unsigned threads : { 1u, 4u } )
    QCOMPARE( joined( drawing, { 0.1, false }, measure, threads ).parts(), static_cast<std::size_t>( expected ) );
}

void TestJoinProperties::splittingALineAtAVertexJoinsTheSame()
{
  for ( unsigned seed = 400; seed < 440; ++seed )
  {
    RandomLayout random( seed );
    LayoutOptions options;
    options.jitterM = 0.03;
    const Drawing drawing = random.drawing( options );
    Drawing split;
    for ( const DrawnLine &line : drawing.lines )
    {
      const std::vector<PlanPoint> vertices = test::verticesOf( drawing, line );
      if ( vertices.size() < 3 || random.chance( 0.5 ) )
      {
        test::addLine( split, vertices, line );
        continue;
      }
      test::addLine( split, { vertices.begin(), vertices.begin() + 2 }, line );
      test::addLine( split, { vertices.begin() + 1, vertices.end() }, line );
    }
    // With crossings joined a new end adds no connection, so the parts stay.
    QCOMPARE( joined( split, { 0.1, true } ).parts(), joined( drawing, { 0.1, true } ).parts() );
  }
}

QTEST_APPLESS_MAIN( TestJoinProperties )
#include "testjoinproperties.moc"
