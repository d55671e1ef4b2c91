// SPDX-License-Identifier: GPL-2.0-or-later
// The arithmetic of the surface: pressure under a ground, ground of a pressure, and which cells lie inside an area.
#include "core/surface/areamask.h"
#include "core/surface/restingwater.h"
#include "core/units/units.h"
#include "core/units/water.h"

#include <QTest>

#include <cmath>
#include <limits>
#include <random>

using namespace stillhead;

namespace
{

  constexpr float NODATA = -12345.0F;

  std::vector<unsigned char> markAll( const AreaMask &mask, int columns, int rows )
  {
    std::vector<unsigned char> all( static_cast<std::size_t>( columns * rows ) );
    for ( int row = 0; row < rows; ++row )
      mask.markRow( row, 0, columns, all.data() + row * columns );
    return all;
  }

  //! Even-odd by a ray to the left, one polygon.
  bool isInside( const PixelPolygon &polygon, double x, double y )
  {
    bool inside = false;
    for ( const std::vector<TerrainPoint> &ring : polygon )
    {
      for ( std::size_t i = 0, j = ring.size() - 1; i < ring.size(); j = i++ )
      {
        const TerrainPoint &a = ring[i];
        const TerrainPoint &b = ring[j];
        if ( ( a.y > y ) != ( b.y > y ) && x > a.x + ( y - a.y ) * ( b.x - a.x ) / ( b.y - a.y ) )
          inside = !inside;
      }
    }
    return inside;
  }

} // namespace

class TestSurface : public QObject
{
    Q_OBJECT

  private slots:
    void pressureByHand();
    void blockAgreesWithSinglePlaces();
    void groundOfAPressure();
    void squareWithAHole();
    void neighboursShareNoCell();
    void overlapsAreJoined();
    void partOfARow();
    void farBeyondTheRaster();
    void randomPolygonsAgainstRays();
    void emptyArea();
};

void TestSurface::pressureByHand()
{
  // The tank of a worked case: water at 436 ft, ground 412 ft, 2 ft of cover, water of 1000 kg/m3: 11.27 psi, and with
  // the tank low (424 ft) over ground at 430 ft -1.73 psi (arithmetic: 26 ft and -4 ft of 0.433528 psi).
  RestingWater water;
  water.specificWeightNPerM3 = 1000.0 * STANDARD_GRAVITY_M_PER_S2;
  water.pascalsPerUnit = PASCALS_PER_PSI;
  water.coverM = 2.0 * METRES_PER_FOOT;
  water.levelM = 436.0 * METRES_PER_FOOT;
  QVERIFY( std::abs( water.pressureUnder( 412.0 * METRES_PER_FOOT ) - 11.27 ) < 0.005 );
  water.levelM = 424.0 * METRES_PER_FOOT;
  QVERIFY( std::abs( water.pressureUnder( 430.0 * METRES_PER_FOOT ) + 1.73 ) < 0.005 );
  QVERIFY( std::isnan( water.pressureUnder( std::numeric_limits<double>::quiet_NaN() ) ) );
}

void TestSurface::blockAgreesWithSinglePlaces()
{
  const RestingWater water { 181.25, 0.61, waterSpecificWeightNPerM3( 15.0 ), PASCALS_PER_PSI };
  std::vector<double> grounds;
  for ( int i = 0; i < 1000; ++i )
    grounds.push_back( i % 17 == 0 ? std::numeric_limits<double>::quiet_NaN() : 100.0 + 0.1234567 * i );
  std::vector<float> pressures( grounds.size() );
  fillPressures( water, grounds.data(), grounds.size(), NODATA, pressures.data() );
  for ( std::size_t i = 0; i < grounds.size(); ++i )
  {
    const float expected = std::isnan( grounds[i] ) ? NODATA : static_cast<float>( water.pressureUnder( grounds[i] ) );
    QVERIFY( pressures[i] == expected );
  }
  QVERIFY( pressures[999] < 0.0F );
}

void TestSurface::groundOfAPressure()
{
  const RestingWater water { 181.25, 0.61, waterSpecificWeightNPerM3( 15.0 ), PASCALS_PER_PSI };
  for ( const double pressure : { -10.0, 0.0, 30.0, 80.0 } )
    QVERIFY( std::abs( water.pressureUnder( water.groundWhereM( pressure ) ) - pressure ) < 1e-11 );
  // Worked case: 436 ft tank, 2 ft cover, 80 psi at ground 253.47 ft; 30 psi with 424 ft at ground 356.80 ft.
  RestingWater tank { 436.0 * METRES_PER_FOOT, 2.0 * METRES_PER_FOOT, 9806.65, PASCALS_PER_PSI };
  QVERIFY( std::abs( tank.groundWhereM( 80.0 ) / METRES_PER_FOOT - 253.47 ) < 0.005 );
  tank.levelM = 424.0 * METRES_PER_FOOT;
  QVERIFY( std::abs( tank.groundWhereM( 30.0 ) / METRES_PER_FOOT - 356.80 ) < 0.005 );
}

void TestSurface::squareWithAHole()
{
  const PixelPolygon polygon { { { 0.5, 0.5 }, { 4.5, 0.5 }, { 4.5, 4.5 }, { 0.5, 4.5 }, { 0.5, 0.5 } },
    { { 1.5, 1.5 }, { 1.5, 3.5 }, { 3.5, 3.5 }, { 3.5, 1.5 } } };
  const std::vector<unsigned char> expected { 0, 0, 0, 0, 0, 0, //
    0, 1, 1, 1, 1, 0,                                           //
    0, 1, 0, 0, 1, 0,                                           //
    0, 1, 0, 0, 1, 0,                                           //
    0, 1, 1, 1, 1, 0,                                           //
    0, 0, 0, 0, 0, 0 };
  QCOMPARE( markAll( AreaMask( { polygon }, 6 ), 6, 6 ), expected );
}

void TestSurface::neighboursShareNoCell()
{
  // Both have the same slanting side, drawn in opposite directions and through cell centres.
  const PixelPolygon left { { { -1.0, -1.0 }, { 3.0, -1.0 }, { 7.0, 11.0 }, { -1.0, 11.0 } } };
  const PixelPolygon right { { { 11.0, 11.0 }, { 7.0, 11.0 }, { 3.0, -1.0 }, { 11.0, -1.0 } } };
  const std::vector<unsigned char> a = markAll( AreaMask( { left }, 10 ), 10, 10 );
  const std::vector<unsigned char> b = markAll( AreaMask( { right }, 10 ), 10, 10 );
  for ( std::size_t i = 0; i < a.size(); ++i )
    QCOMPARE( a[i] + b[i], 1 );
}

void TestSurface::overlapsAreJoined()
{
  const PixelPolygon one { { { -0.5, -0.5 }, { 2.5, -0.5 }, { 2.5, 0.5 }, { -0.5, 0.5 } } };
  const PixelPolygon two { { { 1.5, -0.5 }, { 4.5, -0.5 }, { 4.5, 0.5 }, { 1.5, 0.5 } } };
  QCOMPARE( markAll( AreaMask( { one, two }, 1 ), 6, 1 ), ( std::vector<unsigned char> { 1, 1, 1, 1, 1, 0 } ) );
}

void TestSurface::partOfARow()
{
  const PixelPolygon polygon { { { 2.5, -0.5 }, { 6.5, -0.5 }, { 6.5, 3.5 }, { 2.5, 3.5 } } };
  const AreaMask mask( { polygon }, 4 );
  std::vector<unsigned char> inside( 3 );
  QVERIFY( mask.markRow( 1, 1, 3, inside.data() ) );
  QCOMPARE( inside, ( std::vector<unsigned char> { 0, 0, 1 } ) );
  QVERIFY( !mask.markRow( 1, 7, 3, inside.data() ) );
  QCOMPARE( inside, ( std::vector<unsigned char> { 0, 0, 0 } ) );
}

void TestSurface::farBeyondTheRaster()
{
  const PixelPolygon polygon { { { -1e12, -1e12 }, { 1e12, -1e12 }, { 1e12, 1e12 }, { -1e12, 1e12 } } };
  const std::vector<unsigned char> all = markAll( AreaMask( { polygon }, 100 ), 5, 100 );
  QVERIFY( std::all_of( all.begin(), all.end(), []( unsigned char c ) { return c == 1; } ) );
}

void TestSurface::randomPolygonsAgainstRays()
{
  std::mt19937 random( 20 );
  std::uniform_real_distribution<double> place( -20.0, 120.0 );
  for ( int run = 0; run < 50; ++run )
  {
    std::vector<PixelPolygon> polygons( 3 );
    for ( PixelPolygon &polygon : polygons )
    {
      polygon.resize( 2 );
      for ( std::vector<TerrainPoint> &ring : polygon )
      {
        for ( int i = 0; i < 9; ++i )
          ring.push_back( { place( random ), place( random ) } );
      }
    }
    const std::vector<unsigned char> marked = markAll( AreaMask( polygons, 100 ), 100, 100 );
    for ( int row = 0; row < 100; ++row )
    {
      for ( int column = 0; column < 100; ++column )
      {
        const bool expected = std::any_of( polygons.begin(), polygons.end(),
          [&]( const PixelPolygon &polygon ) { return isInside( polygon, column, row ); } );
        QCOMPARE( marked[static_cast<std::size_t>( row * 100 + column )] == 1, expected );
      }
    }
  }
}

void TestSurface::emptyArea()
{
  const std::vector<unsigned char> all = markAll( AreaMask( {}, 3 ), 4, 3 );
  QVERIFY( std::none_of( all.begin(), all.end(), []( unsigned char c ) { return c == 1; } ) );
}

QTEST_APPLESS_MAIN( TestSurface )
#include "testsurface.moc"
