// SPDX-License-Identifier: GPL-2.0-or-later
// The walk of a segment over the bilinear surface: hand-made grids with exact answers, and random ones against a
// second, independent sampler.
#include "core/terrain/segmentwalk.h"
#include "tests/support/bilinear.h"
#include "tests/support/tolerance.h"

#include <random>
#include <string>

using namespace stillhead;
using stillhead::test::bilinear;
using stillhead::test::MemoryTerrain;
using stillhead::test::NODATA;

namespace
{

  struct WalkPiece
  {
      double from;
      double to;
      double fromM;
      double toM;
      double bendM;

      double at( double tau ) const { return ( 1.0 - tau ) * fromM + tau * toM + bendM * tau * ( tau - 1.0 ); }
      bool known() const { return !std::isnan( bendM ); }
  };
  using Walk = std::vector<WalkPiece>;

  Walk walked( const MemoryTerrain &terrain, const TerrainPoint &from, const TerrainPoint &to )
  {
    TileCache cache( terrain );
    TerrainReader reader( cache );
    Walk pieces;
    walkSegment( reader, from, to, [&]( double tFrom, double tTo, double fromM, double toM, double bendM ) {
      pieces.push_back( { tFrom, tTo, fromM, toM, bendM } );
    } );
    return pieces;
  }

  double elevationAt( const MemoryTerrain &terrain, const TerrainPoint &place )
  {
    TileCache cache( terrain );
    return TerrainReader( cache ).elevationAtM( place );
  }

  //! Lowest and highest of the exact pieces that have an elevation.
  std::pair<double, double> exactRange( const Walk &pieces )
  {
    double low = HUGE_VAL;
    double high = -HUGE_VAL;
    const auto take = [&]( double z ) {
      low = std::min( low, z );
      high = std::max( high, z );
    };
    for ( const WalkPiece &piece : pieces )
    {
      if ( !piece.known() )
        continue;
      take( piece.fromM );
      take( piece.toM );
      const double turn = 0.5 * ( 1.0 - ( piece.toM - piece.fromM ) / piece.bendM );
      if ( turn > 0.0 && turn < 1.0 )
        take( piece.at( turn ) );
    }
    return { low, high };
  }

  //! Rows of 3 × 3 pixels whose first cell is the saddle 100 / 97 / 96 / 99.
  MemoryTerrain saddleGrid()
  {
    return { 3, 3, { 100, 97, 95, 96, 99, 90, 80, 85, 88 } };
  }

} // namespace

Q_DECLARE_METATYPE( TerrainPoint )
Q_DECLARE_METATYPE( Walk )

class TestSegmentWalk : public QObject
{
    Q_OBJECT

  private slots:
    void handMade_data();
    void handMade();
    void saddleDiagonal();
    void single_data();
    void single();
    void zeroWeightNeighboursDoNotMatter_data();
    void zeroWeightNeighboursDoNotMatter();
    void noLength();
    void piecesLeaveNoGap();
    void reversingGivesTheSameKnots();
    void shiftedCoordinatesGiveTheSameHeights();
    void samplingNeverBeatsTheExactExtreme();
};

void TestSegmentWalk::handMade_data()
{
  QTest::addColumn<TerrainPoint>( "from" );
  QTest::addColumn<TerrainPoint>( "to" );
  QTest::addColumn<Walk>( "expected" );
  const auto row = []( const char *name, TerrainPoint from, TerrainPoint to, const Walk &expected ) {
    QTest::newRow( name ) << from << to << expected;
  };
  row( "within one cell", { 0.25, 0.5 }, { 0.75, 0.5 }, { { 0.0, 1.0, 98.0, 98.0, 0.0 } } );
  row( "within one cell, bending", { 0.25, 0.25 }, { 0.75, 0.75 }, { { 0.0, 1.0, 98.625, 98.125, 1.5 } } );
  row( "over a column of pixel centres", { 0.5, 0.5 }, { 1.5, 0.5 },
    { { 0.0, 0.5, 98.0, 98.0, 0.0 }, { 0.5, 1.0, 98.0, 95.25, 0.0 } } );
  row( "along a row of pixel centres", { 0.0, 1.0 }, { 2.0, 1.0 },
    { { 0.0, 0.5, 96.0, 99.0, 0.0 }, { 0.5, 1.0, 99.0, 90.0, 0.0 } } );
  row( "along a column of pixel centres, upward", { 1.0, 2.0 }, { 1.0, 0.0 },
    { { 0.0, 0.5, 85.0, 99.0, 0.0 }, { 0.5, 1.0, 99.0, 97.0, 0.0 } } );
  row( "through pixel centres, two crossings in one", { 0.0, 0.0 }, { 2.0, 2.0 },
    { { 0.0, 0.5, 100.0, 99.0, 6.0 }, { 0.5, 1.0, 99.0, 88.0, 12.0 } } );
  row( "through pixel centres, the other diagonal", { 2.0, 0.0 }, { 0.0, 2.0 },
    { { 0.0, 0.5, 95.0, 99.0, 7.0 }, { 0.5, 1.0, 99.0, 80.0, -2.0 } } );
  row( "the outer half pixel holds the edge", { -0.5, 0.0 }, { 0.5, 0.0 },
    { { 0.0, 0.5, 100.0, 100.0, 0.0 }, { 0.5, 1.0, 100.0, 98.5, 0.0 } } );
  row( "the outer corner holds the corner pixel", { 2.5, 2.5 }, { 2.0, 2.0 }, { { 0.0, 1.0, 88.0, 88.0, 0.0 } } );
  row( "along the outer edge", { 0.0, 2.5 }, { 2.0, 2.5 },
    { { 0.0, 0.5, 80.0, 85.0, 0.0 }, { 0.5, 1.0, 85.0, 88.0, 0.0 } } );
  row( "out of the raster", { 2.0, 1.0 }, { 3.0, 1.0 },
    { { 0.0, 0.5, 90.0, 90.0, 0.0 }, { 0.5, 1.0, NODATA, NODATA, NODATA } } );
  row( "into the raster", { 1.0, -1.5 }, { 1.0, 0.5 },
    { { 0.0, 0.5, NODATA, NODATA, NODATA }, { 0.5, 0.75, 97.0, 97.0, 0.0 }, { 0.75, 1.0, 97.0, 98.0, 0.0 } } );
  row( "off the raster", { -1.0, -1.0 }, { -1.0, 0.0 }, { { 0.0, 1.0, NODATA, NODATA, NODATA } } );
}

void TestSegmentWalk::handMade()
{
  QFETCH( TerrainPoint, from );
  QFETCH( TerrainPoint, to );
  QFETCH( Walk, expected );
  // Pieces without elevation may come in several; here they are told as one.
  Walk actual;
  for ( const WalkPiece &piece : walked( saddleGrid(), from, to ) )
  {
    if ( !actual.empty() && !actual.back().known() && !piece.known() )
      actual.back().to = piece.to;
    else
      actual.push_back( piece );
  }
  QCOMPARE( actual.size(), expected.size() );
  for ( std::size_t i = 0; i < actual.size(); ++i )
  {
    STILLHEAD_SAME( actual[i].from, expected[i].from );
    STILLHEAD_SAME( actual[i].to, expected[i].to );
    STILLHEAD_SAME( actual[i].fromM, expected[i].fromM );
    STILLHEAD_SAME( actual[i].toM, expected[i].toM );
    STILLHEAD_NEAR( actual[i].known() ? actual[i].bendM : 0.0, expected[i].known() ? expected[i].bendM : 0.0, 0.0 );
  }
}

// 100 − 7τ + 6τ² is lowest at τ = 7/12: 97.958, though both ends are higher and no corner of the way is as low.
void TestSegmentWalk::saddleDiagonal()
{
  const Walk pieces = walked( saddleGrid(), { 0.0, 0.0 }, { 1.0, 1.0 } );
  QCOMPARE( pieces.size(), std::size_t( 1 ) );
  STILLHEAD_NEAR( exactRange( pieces ).first, 100.0 - 49.0 / 24.0, 1e-12 );
  STILLHEAD_NEAR( exactRange( pieces ).first, 97.958, 0.5e-3 );
  STILLHEAD_SAME( exactRange( pieces ).second, 100.0 );
}

void TestSegmentWalk::single_data()
{
  QTest::addColumn<int>( "columns" );
  QTest::addColumn<int>( "rows" );
  QTest::addColumn<TerrainPoint>( "from" );
  QTest::addColumn<TerrainPoint>( "to" );
  QTest::addColumn<double>( "low" );
  QTest::addColumn<double>( "high" );
  QTest::newRow( "one row" ) << 3 << 1 << TerrainPoint { -0.5, -0.5 } << TerrainPoint { 2.5, 0.5 } << 10.0 << 40.0;
  QTest::newRow( "one row, aslant" ) << 3 << 1 << TerrainPoint { 0.5, 0.25 } << TerrainPoint { 1.5, -0.25 } << 15.0
                                     << 30.0;
  QTest::newRow( "one column" ) << 1 << 3 << TerrainPoint { 0.0, 0.0 } << TerrainPoint { 0.0, 2.0 } << 10.0 << 40.0;
  QTest::newRow( "one column, along its edge" )
    << 1 << 3 << TerrainPoint { 0.5, 2.0 } << TerrainPoint { 0.5, 1.0 } << 20.0 << 40.0;
  QTest::newRow( "one pixel" ) << 1 << 1 << TerrainPoint { -0.5, 0.5 } << TerrainPoint { 0.5, -0.5 } << 10.0 << 10.0;
}

void TestSegmentWalk::single()
{
  QFETCH( int, columns );
  QFETCH( int, rows );
  QFETCH( TerrainPoint, from );
  QFETCH( TerrainPoint, to );
  QFETCH( double, low );
  QFETCH( double, high );
  const Walk pieces =
    walked( { columns, rows, columns * rows == 1 ? std::vector<double> { 10 } : std::vector<double> { 10, 20, 40 } },
      from, to );
  for ( const WalkPiece &piece : pieces )
    QVERIFY( piece.known() );
  STILLHEAD_SAME( exactRange( pieces ).first, low );
  STILLHEAD_SAME( exactRange( pieces ).second, high );
}

// Where a neighbour that carries weight has no elevation there is none; one that carries none does not matter.
void TestSegmentWalk::zeroWeightNeighboursDoNotMatter_data()
{
  QTest::addColumn<TerrainPoint>( "from" );
  QTest::addColumn<TerrainPoint>( "to" );
  QTest::addColumn<bool>( "known" );
  QTest::newRow( "along the row above" ) << TerrainPoint { 0.0, 0.0 } << TerrainPoint { 2.0, 0.0 } << true;
  QTest::newRow( "along the column beside, upward" ) << TerrainPoint { 2.0, 2.0 } << TerrainPoint { 2.0, 0.0 } << true;
  QTest::newRow( "part of that row" ) << TerrainPoint { 0.25, 0.0 } << TerrainPoint { 1.75, 0.0 } << true;
  QTest::newRow( "a hair below the row above" )
    << TerrainPoint { 0.0, 0x1p-20 } << TerrainPoint { 2.0, 0x1p-20 } << false;
  QTest::newRow( "along its own row" ) << TerrainPoint { 0.0, 1.0 } << TerrainPoint { 2.0, 1.0 } << false;
  QTest::newRow( "in the outer half pixel" ) << TerrainPoint { -0.25, -0.25 } << TerrainPoint { 2.25, -0.25 } << true;
  QTest::newRow( "in the outer half pixel beside it" )
    << TerrainPoint { -0.25, 0.5 } << TerrainPoint { -0.25, 1.0 } << true;
}

void TestSegmentWalk::zeroWeightNeighboursDoNotMatter()
{
  QFETCH( TerrainPoint, from );
  QFETCH( TerrainPoint, to );
  QFETCH( bool, known );
  MemoryTerrain terrain( 3, 3, { 1, 2, 3, 4, NODATA, 6, 7, 8, 9 } );
  for ( const bool reversed : { false, true } )
  {
    for ( const WalkPiece &piece : walked( terrain, reversed ? to : from, reversed ? from : to ) )
      QCOMPARE( piece.known(), known );
    const TerrainPoint middle { 0.5 * ( from.x + to.x ), 0.5 * ( from.y + to.y ) };
    QCOMPARE( !std::isnan( elevationAt( terrain, middle ) ), known );
  }
}

void TestSegmentWalk::noLength()
{
  const Walk pieces = walked( saddleGrid(), { 0.5, 0.5 }, { 0.5, 0.5 } );
  QCOMPARE( pieces.size(), std::size_t( 1 ) );
  STILLHEAD_SAME( pieces[0].from, 0.0 );
  STILLHEAD_SAME( pieces[0].to, 1.0 );
  STILLHEAD_SAME( pieces[0].fromM, 98.0 );
  STILLHEAD_SAME( pieces[0].toM, 98.0 );
  QCOMPARE( pieces[0].bendM, 0.0 );
  QVERIFY( std::isnan( walked( saddleGrid(), { 5.0, 5.0 }, { 5.0, 5.0 } ).at( 0 ).bendM ) );
  QVERIFY( std::isnan( elevationAt( saddleGrid(), { NODATA, 1.0 } ) ) );
}

namespace
{

  //! Random grids with holes, and segments of which many meet pixel centres, edges and corners exactly.
  class RandomWalks
  {
    public:
      explicit RandomWalks( unsigned seed )
        : mRandom( seed )
      {
      }

      MemoryTerrain terrain()
      {
        const int columns = whole( 1, 9 );
        const int rows = whole( 1, 9 );
        std::vector<double> elevations;
        for ( int i = 0; i < columns * rows; ++i )
          elevations.push_back( whole( 0, 19 ) == 0 ? NODATA : 100.0 + 25.0 * share() );
        MemoryTerrain terrain( columns, rows, elevations );
        terrain.setBlock( 4 );
        return terrain;
      }

      TerrainPoint place( const MemoryTerrain &terrain )
      {
        return { position( terrain.grid().columns() ), position( terrain.grid().rows() ) };
      }

    private:
      std::mt19937 mRandom;

      int whole( int low, int high ) { return std::uniform_int_distribution<int>( low, high )( mRandom ); }
      double share() { return std::uniform_real_distribution<double>( 0.0, 1.0 )( mRandom ); }

      double position( int pixels )
      {
        switch ( whole( 0, 4 ) )
        {
        case 0:
          return whole( 0, pixels - 1 );
        case 1:
          return whole( 0, 1 ) == 0 ? -0.5 : pixels - 0.5;
        case 2:
          return 0.5 * whole( -2, 2 * pixels );
        default:
          return -1.0 + share() * ( pixels + 1.0 );
        }
      }
  };

} // namespace

void TestSegmentWalk::piecesLeaveNoGap()
{
  RandomWalks random( 1 );
  for ( int i = 0; i < 4000; ++i )
  {
    const MemoryTerrain terrain = random.terrain();
    const Walk pieces = walked( terrain, random.place( terrain ), random.place( terrain ) );
    STILLHEAD_SAME( pieces.front().from, 0.0 );
    STILLHEAD_SAME( pieces.back().to, 1.0 );
    for ( std::size_t k = 0; k < pieces.size(); ++k )
    {
      QVERIFY( pieces[k].to > pieces[k].from );
      if ( k == 0 )
        continue;
      STILLHEAD_SAME( pieces[k].from, pieces[k - 1].to );
      if ( pieces[k].known() && pieces[k - 1].known() )
        STILLHEAD_SAME( pieces[k].fromM, pieces[k - 1].toM );
    }
  }
}

void TestSegmentWalk::reversingGivesTheSameKnots()
{
  RandomWalks random( 2 );
  for ( int i = 0; i < 4000; ++i )
  {
    const MemoryTerrain terrain = random.terrain();
    const TerrainPoint a = random.place( terrain );
    const TerrainPoint b = random.place( terrain );
    const Walk there = walked( terrain, a, b );
    Walk back = walked( terrain, b, a );
    std::reverse( back.begin(), back.end() );
    QCOMPARE( there.size(), back.size() );
    for ( std::size_t k = 0; k < there.size(); ++k )
    {
      STILLHEAD_NEAR( there[k].from, 1.0 - back[k].to, 1e-12 );
      STILLHEAD_NEAR( there[k].to, 1.0 - back[k].from, 1e-12 );
      QCOMPARE( there[k].known(), back[k].known() );
      if ( !there[k].known() )
        continue;
      STILLHEAD_NEAR( there[k].fromM, back[k].toM, 1e-9 );
      STILLHEAD_NEAR( there[k].toM, back[k].fromM, 1e-9 );
      STILLHEAD_NEAR( there[k].bendM, back[k].bendM, 1e-9 );
    }
  }
}

void TestSegmentWalk::shiftedCoordinatesGiveTheSameHeights()
{
  RandomWalks random( 3 );
  for ( int i = 0; i < 500; ++i )
  {
    const MemoryTerrain terrain = random.terrain();
    const TerrainPoint a = random.place( terrain );
    const TerrainPoint b = random.place( terrain );
    // The same pixels as the middle of a larger raster: nothing but the numbers of the pixels changes.
    const int columns = terrain.grid().columns();
    const int rows = terrain.grid().rows();
    const int margin = 256;
    MemoryTerrain larger( columns + 2 * margin, rows + 2 * margin,
      std::vector<double>( static_cast<std::size_t>( ( columns + 2 * margin ) * ( rows + 2 * margin ) ), NODATA ) );
    for ( int r = 0; r < rows; ++r )
    {
      for ( int c = 0; c < columns; ++c )
        larger.set( margin + c, margin + r, terrain.at( c, r ) );
    }
    TileCache cache( terrain );
    TileCache largerCache( larger );
    TerrainReader reader( cache );
    TerrainReader largerReader( largerCache );
    for ( int k = 0; k <= 64; ++k )
    {
      const TerrainPoint p { a.x + ( b.x - a.x ) * k / 64.0, a.y + ( b.y - a.y ) * k / 64.0 };
      const bool inside = p.x >= 0.0 && p.x <= columns - 1.0 && p.y >= 0.0 && p.y <= rows - 1.0;
      if ( !inside )
        continue;
      const double here = reader.elevationAtM( p );
      const double there = largerReader.elevationAtM( { p.x + margin, p.y + margin } );
      if ( std::isnan( here ) )
        QVERIFY( std::isnan( there ) );
      else if ( !std::isnan( there ) ) // a weight of 1e-17 may vanish or appear where the shift rounds
        STILLHEAD_NEAR( there, here, 1e-9 );
    }
  }
}

void TestSegmentWalk::samplingNeverBeatsTheExactExtreme()
{
  RandomWalks random( 4 );
  int known = 0;
  int withoutMiss = 0;
  for ( int i = 0; i < 4000; ++i )
  {
    const MemoryTerrain terrain = random.terrain();
    const TerrainPoint a = random.place( terrain );
    const TerrainPoint b = random.place( terrain );
    const Walk pieces = walked( terrain, a, b );
    const auto [low, high] = exactRange( pieces );
    double sampledLow = HUGE_VAL;
    double sampledHigh = -HUGE_VAL;
    // Where rounding gives a hole beside the knot a weight of 1e-17 the sampler has nothing just there.
    bool missed = false;
    const auto sample = [&]( double share ) {
      const double z = bilinear( terrain, a.x + share * ( b.x - a.x ), a.y + share * ( b.y - a.y ) );
      missed = missed || std::isnan( z );
      sampledLow = std::isnan( z ) ? sampledLow : std::min( sampledLow, z );
      sampledHigh = std::isnan( z ) ? sampledHigh : std::max( sampledHigh, z );
      return z;
    };
    const std::vector<double> shares = test::samplingShares( terrain, a, b, 300, true );
    for ( const WalkPiece &piece : pieces )
    {
      if ( !piece.known() )
        continue;
      ++known;
      const double turn = 0.5 * ( 1.0 - ( piece.toM - piece.fromM ) / piece.bendM );
      for ( const double tau : { 1e-6, 0.25, 0.5, 0.75, 1.0 - 1e-6, turn > 0.0 && turn < 1.0 ? turn : 0.5 } )
        STILLHEAD_NEAR( piece.at( tau ), sample( piece.from + tau * ( piece.to - piece.from ) ), 1e-9 );
      for ( const double share : shares )
      {
        if ( share >= piece.from && share <= piece.to )
          sample( share );
      }
    }
    if ( sampledLow == HUGE_VAL )
      continue;
    QVERIFY( sampledLow >= low - 1e-9 && sampledHigh <= high + 1e-9 );
    STILLHEAD_NEAR( sampledLow, low, missed ? 1e-3 : 1e-9 );
    STILLHEAD_NEAR( sampledHigh, high, missed ? 1e-3 : 1e-9 );
    withoutMiss += missed ? 0 : 1;
  }
  QVERIFY( known > 10000 );
  QVERIFY( withoutMiss > 2000 );
}

QTEST_APPLESS_MAIN( TestSegmentWalk )
#include "testsegmentwalk.moc"
