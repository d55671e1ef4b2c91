// SPDX-License-Identifier: GPL-2.0-or-later
// Summits and sags of mainlines: by hand on drawn Z, against a search from every place for random networks, and the same
// whatever way the pipe was drawn or split.
#include "core/judgement/sags.h"
#include "tests/support/bilinear.h"
#include "tests/support/jobsetup.h"
#include "tests/support/randomlayout.h"
#include "tests/support/realdata.h"
#include "tests/support/tolerance.h"

#include <QRegularExpression>
#include <QTest>

#include <map>
#include <set>

using namespace stillhead;
using stillhead::test::JobSetup;
using stillhead::test::MemoryTerrain;
using stillhead::test::RandomLayout;

namespace
{
  constexpr double DEPTH_M = 2.0;

  //! A place with its elevation, rounded to a micrometre.
  struct Spot
  {
      bool summit = true;
      long long x = 0;
      long long y = 0;
      long long z = 0;

      Spot( bool isSummit, const PlanPoint &place, double elevationM )
        : summit( isSummit )
        , x( std::llround( place.x * 1e6 ) )
        , y( std::llround( place.y * 1e6 ) )
        , z( std::llround( elevationM * 1e6 ) )
      {
      }

      bool operator<( const Spot &other ) const
      {
        return std::tie( summit, x, y, z ) < std::tie( other.summit, other.x, other.y, other.z );
      }
      bool operator==( const Spot &other ) const { return !( *this < other ) && !( other < *this ); }
  };

  bool isSagOrSummit( const Extreme &extreme )
  {
    return extreme.kind == ExtremeKind::Summit || extreme.kind == ExtremeKind::Sag;
  }

  PlanPoint placeOf( const StaticResult &result, const Extreme &extreme )
  {
    return result.drawing.placeAt(
      test::lineOf( result, result.pieces[static_cast<std::size_t>( extreme.piece )] ), extreme.alongM );
  }

  std::multiset<Spot> spotsOf( const StaticResult &result )
  {
    std::multiset<Spot> spots;
    for ( const Extreme &extreme : result.extremes )
    {
      if ( isSagOrSummit( extreme ) )
        spots.insert( { extreme.kind == ExtremeKind::Summit, placeOf( result, extreme ), extreme.elevationM } );
    }
    return spots;
  }

  QString textOf( const std::multiset<Spot> &spots )
  {
    QStringList texts;
    for ( const Spot &spot : spots )
      texts << QString( "%1 %2 %3 %4" )
                 .arg( spot.summit ? "summit" : "sag" )
                 .arg( static_cast<double>( spot.x ) * 1e-6 )
                 .arg( static_cast<double>( spot.y ) * 1e-6 )
                 .arg( static_cast<double>( spot.z ) * 1e-6 );
    return texts.join( "; " );
  }

  /**
   * The definition, place by place: from every vertex all pipe is searched that lies less than the depth below it. Drawn Z only:
   * between vertices the pipe is straight.
   */
  class SearchedSpots
  {
    public:
      explicit SearchedSpots( const StaticResult &result )
      {
        for ( const Span &span : result.network.spans )
          addSpan( result, span );
      }

      std::set<Spot> spots( double depthM ) const
      {
        std::set<Spot> found;
        for ( const double sign : { 1.0, -1.0 } )
        {
          for ( std::size_t i = 0; i < mVertices.size(); ++i )
            search( i, sign, depthM, found );
        }
        return found;
      }

    private:
      struct Vertex
      {
          PlanPoint place;
          double z = 0.0;
          std::vector<std::size_t> next;
          int node = -1;
      };
      std::vector<Vertex> mVertices;
      std::map<int, std::vector<std::size_t>> mAtNode;

      void addSpan( const StaticResult &result, const Span &span )
      {
        const CanonicalLine &line = result.drawing.lines[static_cast<std::size_t>( span.line )];
        if ( line.role != Role::Mainline )
          return;
        for ( std::size_t v = line.first; v + 1 < line.first + line.count; ++v )
        {
          const double legFrom = result.drawing.alongM[v];
          const double legTo = result.drawing.alongM[v + 1];
          const double from = std::max( legFrom, span.fromM );
          const double to = std::min( legTo, span.toM );
          const double zFrom = result.drawing.surveyZM[v];
          const double zTo = result.drawing.surveyZM[v + 1];
          if ( !( from < to ) || std::isnan( zFrom ) || std::isnan( zTo ) )
            continue;
          const auto z = [&]( double along ) {
            return zFrom + ( zTo - zFrom ) * ( along - legFrom ) / ( legTo - legFrom );
          };
          const bool follows = !mVertices.empty() && mLastSpan == &span && mLastAlong == from;
          if ( !follows )
            addVertex( result.drawing.placeAt( line, from ), z( from ), from == span.fromM ? span.fromNode : -1 );
          addVertex( result.drawing.placeAt( line, to ), z( to ), to == span.toM ? span.toNode : -1 );
          mVertices.back().next.push_back( mVertices.size() - 2 );
          mVertices[mVertices.size() - 2].next.push_back( mVertices.size() - 1 );
          mLastSpan = &span;
          mLastAlong = to;
        }
      }

      void addVertex( const PlanPoint &place, double z, int node )
      {
        mVertices.push_back( { place, z, {}, node } );
        if ( node >= 0 )
          mAtNode[node].push_back( mVertices.size() - 1 );
      }

      const Span *mLastSpan = nullptr;
      double mLastAlong = 0.0;

      void search( std::size_t start, double sign, double depthM, std::set<Spot> &found ) const
      {
        const double top = sign * mVertices[start].z;
        const auto isIn = [&]( std::size_t v ) { return sign * mVertices[v].z > top - depthM + 1e-9; };
        std::set<std::size_t> seen { start };
        std::set<int> nodes;
        std::vector<std::size_t> open { start };
        int ways = 0;
        PlanPoint least = mVertices[start].place;
        const auto meet = [&]( std::size_t v ) {
          if ( !isIn( v ) )
            ++ways;
          else if ( seen.insert( v ).second )
            open.push_back( v );
        };
        while ( !open.empty() )
        {
          const Vertex &vertex = mVertices[open.back()];
          open.pop_back();
          if ( sign * vertex.z > top + 1e-9 )
            return;
          if ( sign * vertex.z >= top - 1e-9 )
            least = std::min( least, vertex.place );
          for ( const std::size_t next : vertex.next )
            meet( next );
          if ( vertex.node < 0 || !nodes.insert( vertex.node ).second )
            continue;
          for ( const std::size_t next : mAtNode.at( vertex.node ) )
            meet( next );
        }
        if ( ways >= 2 )
          found.insert( { sign > 0.0, least, mVertices[start].z } );
      }
  };

  //! Elevations that depend on the place alone, whole metres, here and there none.
  void drape( Drawing &drawing, RandomLayout &random )
  {
    std::map<std::pair<double, double>, double> heights;
    drawing.surveyZM.clear();
    for ( const PlanPoint &vertex : drawing.vertices )
    {
      const auto entry = heights.emplace( std::make_pair( vertex.x, vertex.y ), 0.0 );
      if ( entry.second )
        entry.first->second = random.chance( 0.03 ) ? test::NODATA : 50.0 + random.whole( 0, 6 );
      drawing.surveyZM.push_back( entry.first->second );
    }
  }

  double distance( const PlanPoint &p, const PlanPoint &a, const PlanPoint &b )
  {
    const double dx = b.x - a.x;
    const double dy = b.y - a.y;
    const double squared = dx * dx + dy * dy;
    const double share =
      squared > 0.0 ? std::clamp( ( ( p.x - a.x ) * dx + ( p.y - a.y ) * dy ) / squared, 0.0, 1.0 ) : 0.0;
    return std::hypot( p.x - a.x - share * dx, p.y - a.y - share * dy );
  }

  //! True if no other leg comes so near to \a p that an end there would join it.
  bool isFree( const Drawing &drawing, const PlanPoint &p )
  {
    int near = 0;
    for ( const DrawnLine &line : drawing.lines )
    {
      for ( std::size_t v = line.first; v + 1 < line.first + line.count; ++v )
        near += distance( p, drawing.vertices[v], drawing.vertices[v + 1] ) < 0.25 ? 1 : 0;
    }
    return near == 1;
  }

  //! The same pipe in other features: lines are cut within their legs, wherever that makes no new joint.
  Drawing split( const Drawing &drawing, std::size_t &cuts )
  {
    Drawing result;
    for ( const DrawnLine &line : drawing.lines )
    {
      std::vector<PlanPoint> part;
      for ( const PlanPoint &vertex : test::verticesOf( drawing, line ) )
      {
        if ( !part.empty() )
        {
          const PlanPoint from = part.back();
          const PlanPoint cut { from.x + 0.4142 * ( vertex.x - from.x ), from.y + 0.4142 * ( vertex.y - from.y ) };
          if ( isFree( drawing, cut ) )
          {
            part.push_back( cut );
            test::addLine( result, part, line );
            part = { cut };
            ++cuts;
          }
        }
        part.push_back( vertex );
      }
      test::addLine( result, part, line );
    }
    return result;
  }

  //! Spots, rounded coarsely enough for what splitting changes by rounding.
  std::multiset<Spot> coarse( const std::multiset<Spot> &spots )
  {
    std::multiset<Spot> rounded;
    for ( Spot spot : spots )
    {
      for ( long long *value : { &spot.x, &spot.y, &spot.z } )
        *value = ( *value + 50 ) / 100;
      rounded.insert( spot );
    }
    return rounded;
  }
} // namespace

class TestSags : public QObject
{
    Q_OBJECT

  private slots:
    void byHand_data();
    void byHand();
    void insideACell();
    void pressures();
    void onlyWhenAsked();
    void depthThatCounts();
    void againstSearch();
    void drawnOtherwise();
    void splitOtherwise();
    void levelGround();
    void realGround();
};

void TestSags::byHand_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<QString>( "expected" );
  const auto row = []( const char *name, const char *sketch, const char *expected ) {
    QTest::newRow( name ) << QString( sketch ) << QString( expected );
  };
  row( "hill", "main 0 0 50, 10 0 60, 20 0 50", "summit 10 0 60" );
  row( "hollow", "main 0 0 50, 10 0 40, 20 0 50", "sag 10 0 40" );
  row( "just deep enough", "main 0 0 50, 10 0 52, 20 0 50", "summit 10 0 52" );
  row( "not deep enough", "main 0 0 50, 10 0 51.5, 20 0 40", "" );
  row( "slope", "main 0 0 50, 10 0 60, 20 0 70", "" );
  row( "it must fall before it ends", "main 0 0 50, 10 0 60, 20 0 59", "" );
  row( "it must fall before it rises higher", "main 0 0 50, 10 0 60, 20 0 59, 30 0 70", "" );
  row( "a dip on the way down is none", "main 0 0 50, 10 0 60, 20 0 55, 30 0 56, 40 0 50", "summit 10 0 60" );
  row( "a small dip at the top", "main 0 0 50, 10 0 60, 20 0 59, 30 0 61, 40 0 50", "summit 30 0 61" );
  row( "hill, hollow, hill", "main 0 0 50, 10 0 60, 20 0 55, 30 0 58, 40 0 50",
    "sag 20 0 55; summit 10 0 60; summit 30 0 58" );
  row( "twins with little between are one", "main 40 0 50, 30 0 60, 20 0 59, 10 0 60, 0 0 50", "summit 10 0 60" );
  row( "twins with enough between", "main 0 0 50, 10 0 60, 20 0 58, 30 0 60, 40 0 50",
    "sag 20 0 58; summit 10 0 60; summit 30 0 60" );
  row( "level top", "main 0 0 50, 10 5 60, 20 0 60, 30 -5 60, 40 0 50", "summit 10 5 60" );
  row( "level top that bends back", "main 0 0 50, 10 0 60, 5 5 60, 30 5 60, 40 0 50", "summit 5 5 60" );
  row( "top where features meet", "main 0 0 50, 10 0 60; main 20 0 50, 10 0 60", "summit 10 0 60" );
  row( "level top over features", "main 0 0 50, 20 0 60; main 20 0 60, 10 10 60; main 10 10 60, 0 10 50",
    "summit 10 10 60" );
  row(
    "features that miss each other by a little", "main 0 0 50, 10 0 60; main 20 0 50, 10.05 0 60", "summit 10 0 60" );
  row(
    "joint, three legs fall", "main 0 0 50, 10 0 60; main 20 0 50, 10 0 60; main 10 9 50, 10 0 60", "summit 10 0 60" );
  row( "joint, one leg rises", "main 0 0 50, 10 0 60; main 20 0 50, 10 0 60; main 10 9 63, 10 0 60", "" );
  row( "joint, one leg rises a little", "main 0 0 50, 10 0 60; main 20 0 50, 10 0 60; main 10 9 61, 10 0 60",
    "summit 10 9 61" );
  row( "joint, one leg falls a little", "main 0 0 50, 10 0 60; main 20 0 50, 10 0 60; main 10 9 59, 10 0 60",
    "summit 10 0 60" );
  row( "joint, two legs end too soon", "main 0 0 50, 10 0 60; main 20 0 59, 10 0 60; main 10 9 59, 10 0 60", "" );
  row( "sag at a joint inside a line", "main 0 0 50, 10 0 40, 20 0 50; main 10 0 40, 10 9 50", "sag 10 0 40" );
  row( "joint inside a line, the leg falls on", "main 0 0 50, 10 0 40, 20 0 50; main 10 0 40, 10 9 30", "" );
  row( "top of a ring", "main 0 0 50, 10 0 60, 10 10 60, 0 10 50, 0 0 50", "sag 0 0 50; summit 10 0 60" );
  row( "a ring at the end of a leg", "main 0 0 60, 10 0 61, 10 10 61, 0 10 60, 0 0 60; main -9 0 50, 0 0 60", "" );
  row( "laterals are left out",
    "main 0 0 50, 10 0 60, 20 0 50; lateral 10 0 60, 10 9 70; lateral 0 50 0, 9 50 9, 20 50 0", "summit 10 0 60" );
  row( "gap beyond the fall", "main 0 0 50, 10 0 60, 20 0 50, 30 0 nan, 40 0 50, 50 0 70", "summit 10 0 60" );
  row( "gap before the fall", "main 0 0 50, 10 0 60, 20 0 59, 30 0 nan, 40 0 50, 50 0 40", "" );
  row( "gap at a joint", "main 0 0 50, 10 0 60; main 20 0 nan, 10 0 60; main 10 9 50, 10 0 60", "summit 10 0 60" );
  row( "systems do not join", "main system=a 0 0 50, 10 0 60; main system=b 20 0 50, 10 0 60", "" );
  row( "pipe that merely crosses", "main 0 0 50, 10 0 60, 20 0 50; main 10 -5 70, 10 5 70", "summit 10 0 60" );
  row( "without a source", "main 0 0 50, 1 0 50; main 500 0 50, 510 0 60, 520 0 50", "summit 510 0 60" );
  row( "a step where covers or surveys differ", "main 0 0 50, 10 0 60; main 10 0 57, 20 0 57", "summit 10 0 60" );
}

void TestSags::byHand()
{
  QFETCH( QString, sketch );
  QFETCH( QString, expected );
  JobSetup setup( sketch.toStdString() );
  setup.job.sagDepthM = DEPTH_M;
  QCOMPARE( textOf( spotsOf( setup.solve() ) ), expected );
}

// Over a saddle cell the pipe along a diagonal is a parabola whose top lies between the vertices, with no pixel there.
void TestSags::insideACell()
{
  JobSetup setup( test::sketched( "main cover=1 0.25 -0.25, 4.25 -4.25" ) );
  setup.terrain = std::make_unique<MemoryTerrain>(
    2, 2, std::vector<double> { 0.0, 80.0, 80.0, 0.0 }, test::centresAt( 0.0, 0.0, 4.0 ) );
  setup.job.sagDepthM = DEPTH_M;
  const StaticResult result = setup.solve();
  QCOMPARE( textOf( spotsOf( result ) ), QString( "summit 2 -2 39" ) );
  const Extreme &summit = result.extremes.back();
  STILLHEAD_NEAR( summit.elevationM, 39.0, 1e-12 );
}

void TestSags::pressures()
{
  JobSetup setup( std::string( "main 0 0 50, 10 0 60, 20 0 40, 30 0 50; main 500 0 50, 510 0 60, 520 0 50" ) );
  setup.job.sagDepthM = DEPTH_M;
  setup.setLevels( 110.0, 100.0 );
  const StaticResult result = setup.solve();
  std::vector<Extreme> places;
  std::copy_if( result.extremes.begin(), result.extremes.end(), std::back_inserter( places ), isSagOrSummit );
  QCOMPARE( places.size(), std::size_t( 3 ) );
  // After the worst places, along the pipe; a summit in the low case, a sag in the high one.
  QVERIFY( isSagOrSummit( result.extremes.back() ) && !isSagOrSummit( result.extremes.front() ) );
  QVERIFY( places[0].kind == ExtremeKind::Summit && places[1].kind == ExtremeKind::Sag );
  STILLHEAD_SAME( places[0].pressurePa, 40000.0 );
  STILLHEAD_SAME( places[1].pressurePa, 70000.0 );
  QCOMPARE( places[0].zone, 0 );
  QCOMPARE( places[1].stretch, -1 );
  QVERIFY( std::isnan( places[2].pressurePa ) );
  STILLHEAD_SAME( places[2].elevationM, 60.0 );
}

void TestSags::onlyWhenAsked()
{
  JobSetup setup( std::string( "main 0 0 50, 10 0 60, 20 0 40, 30 0 50" ) );
  QVERIFY( spotsOf( setup.solve() ).empty() );
}

void TestSags::depthThatCounts()
{
  // Asked for in feet: what falls by 2 ft is found, though feet are not exact in metres.
  const double foot = 0.3048;
  QVERIFY( countedSagDepthM( 2.0 * foot ) < 410.0 * foot - 408.0 * foot );
  QVERIFY( countedSagDepthM( 2.0 * foot ) > 2.0 * foot - 1e-8 );
  // No depth at all is a millimetre.
  JobSetup setup( std::string( "main 0 0 50, 10 0 50.0005, 20 0 50, 30 0 50.002, 40 0 50" ) );
  setup.job.sagDepthM = 0.0;
  QCOMPARE( textOf( spotsOf( setup.solve() ) ), QString( "summit 30 0 50.002" ) );
}

void TestSags::againstSearch()
{
  std::size_t found = 0;
  for ( unsigned seed = 1; seed <= 300; ++seed )
  {
    RandomLayout random( seed );
    test::LayoutOptions options;
    options.lines = random.whole( 1, 25 );
    options.stride = 2;
    options.systems = seed % 4 == 0;
    Drawing drawing = random.drawing( options );
    drape( drawing, random );
    JobSetup setup( drawing );
    setup.job.useLineZ = true;
    setup.job.sourceReachM = 1e6;
    setup.job.sagDepthM = DEPTH_M;
    const StaticResult result = setup.solve();
    const std::multiset<Spot> all = spotsOf( result );
    const std::set<Spot> spots( all.begin(), all.end() );
    found += spots.size();
    QCOMPARE( textOf( { spots.begin(), spots.end() } ), [&] {
      const std::set<Spot> expected = SearchedSpots( result ).spots( DEPTH_M );
      return textOf( { expected.begin(), expected.end() } );
    }() );
  }
  QVERIFY( found > 1000 );
}

void TestSags::drawnOtherwise()
{
  for ( unsigned seed = 1; seed <= 40; ++seed )
  {
    RandomLayout random( seed );
    test::LayoutOptions options;
    options.jitterM = 0.02;
    const Drawing drawing = random.drawing( options );
    const MemoryTerrain terrain = random.hills( options, 1.5, 3 );
    const auto rows = [&]( const Drawing &drawn, unsigned threads ) {
      JobSetup setup( drawn );
      setup.terrain = std::make_unique<MemoryTerrain>( terrain );
      setup.job.sourceReachM = 1e6;
      setup.job.sagDepthM = 0.5;
      setup.job.threads = threads;
      return test::rowsByPlace( setup.solve(), drawn, test::EXACT_N_PER_M3 ).filter( QRegularExpression( "^extreme" ) );
    };
    const QStringList expected = rows( drawing, 1 );
    QCOMPARE( rows( test::redrawn( drawing, seed ), 4 ), expected );
    QVERIFY( expected.filter( QRegularExpression( "summit|sag" ) ).size() > 2 );
  }
}

void TestSags::splitOtherwise()
{
  std::size_t cuts = 0;
  for ( unsigned seed = 1; seed <= 40; ++seed )
  {
    RandomLayout random( seed );
    test::LayoutOptions options;
    options.duplicates = false;
    const Drawing drawing = random.drawing( options );
    const MemoryTerrain terrain = random.hills( options, 1.5, 3 );
    const auto spots = [&]( const Drawing &drawn ) {
      JobSetup setup( drawn );
      setup.terrain = std::make_unique<MemoryTerrain>( terrain );
      setup.job.sourceReachM = 1e6;
      setup.job.sagDepthM = 0.5;
      return textOf( coarse( spotsOf( setup.solve() ) ) );
    };
    QCOMPARE( spots( split( drawing, cuts ) ), spots( drawing ) );
  }
  QVERIFY( cuts > 500 );
}

// Ground that is level over a plateau, a slope about it: one place, and the same one however the pipe is drawn, though
// rounding makes the level ground rough.
void TestSags::levelGround()
{
  const Drawing whole = test::sketched( "main 5 -10, 22.3 -10.7, 35.1 -9.1" );
  const Drawing parts = test::sketched( "main 20 -10.606936416184971, 5 -10; main 22.3 -10.7, 20 -10.606936416184971;"
                                        "main 35.1 -9.1, 22.3 -10.7" );
  for ( const double base : { 100.0, 123.456, 0.1 } )
  {
    const MemoryTerrain terrain = MemoryTerrain::sampled( 41, 21, test::centresAt( 0.0, 0.0, 1.0 ),
      [base]( double x, double ) { return base - std::max( 0.0, std::abs( x - 20.0 ) - 8.0 ); } );
    for ( const Drawing &drawing : { whole, test::redrawn( whole, 3 ), parts } )
    {
      JobSetup setup( drawing );
      setup.terrain = std::make_unique<MemoryTerrain>( terrain );
      setup.job.sourceReachM = 1e6;
      setup.job.sagDepthM = DEPTH_M;
      const StaticResult result = setup.solve();
      const std::multiset<Spot> spots = spotsOf( result );
      QCOMPARE( spots.size(), std::size_t( 1 ) );
      STILLHEAD_NEAR( static_cast<double>( spots.begin()->x ) * 1e-6, 12.0, 1e-6 );
    }
  }
}

// Streets on a surveyed hillside, a made-up pairing: along its line nothing near a summit is higher, and the ground there is
// the ground that another bilinear surface has.
void TestSags::realGround()
{
  const Drawing drawing =
    test::realDrawing( test::realLines( "chicago_streets_local_ft.gpkg" ), 0.3048, 626000.0, 1011600.0 );
  const MemoryTerrain terrain = test::realTerrain( "bei_5m_utm17n.tif" );
  JobSetup setup( drawing );
  setup.terrain = std::make_unique<MemoryTerrain>( terrain );
  setup.job.sources.front().place = drawing.vertices.front();
  setup.job.sagDepthM = 0.5;
  const StaticResult result = setup.solve();
  const auto groundAt = [&]( const PlanPoint &place ) {
    const TerrainPoint pixel = terrain.grid().toPixel( { place.x, place.y } );
    return test::bilinear( terrain, pixel.x, pixel.y );
  };
  int found = 0;
  for ( const Extreme &extreme : result.extremes )
  {
    if ( !isSagOrSummit( extreme ) )
      continue;
    ++found;
    STILLHEAD_NEAR( groundAt( placeOf( result, extreme ) ), extreme.elevationM, 1e-7 );
    const CanonicalLine &line = test::lineOf( result, result.pieces[static_cast<std::size_t>( extreme.piece )] );
    for ( const double stepM : { -2.0, -0.5, -0.05, 0.05, 0.5, 2.0 } )
    {
      const double alongM = extreme.alongM + stepM;
      if ( alongM < 0.0 || alongM > line.lengthM )
        continue;
      const double differenceM = groundAt( result.drawing.placeAt( line, alongM ) ) - extreme.elevationM;
      const bool isBeyond = extreme.kind == ExtremeKind::Summit ? differenceM > 1e-7 : differenceM < -1e-7;
      QVERIFY( !isBeyond );
    }
  }
  QVERIFY( found > 30 );
}

QTEST_APPLESS_MAIN( TestSags )
#include "testsags.moc"
