// SPDX-License-Identifier: GPL-2.0-or-later
// Placement of pixels: which way rows run, where centres and edges lie, rotation, and what is refused.
#include "core/terrain/rastergrid.h"
#include "tests/support/tolerance.h"

#include <limits>
#include <stdexcept>

using namespace stillhead;

Q_DECLARE_METATYPE( TerrainPoint )
using GeoTransform = std::array<double, 6>;
Q_DECLARE_METATYPE( GeoTransform )

class TestRasterGrid : public QObject
{
    Q_OBJECT

  private slots:
    void places_data();
    void places();
    void largeCoordinatesKeepTheirDigits();
    void centresOfUnevenPixelsAreExactWithoutRotation();
    void refused_data();
    void refused();
};

// Where the rotation is a quarter turn or none all figures are exact.
void TestRasterGrid::places_data()
{
  QTest::addColumn<GeoTransform>( "geoTransform" );
  QTest::addColumn<TerrainPoint>( "map" );
  QTest::addColumn<TerrainPoint>( "pixel" );
  const GeoTransform northUp { 100.0, 2.0, 0.0, 500.0, 0.0, -2.0 };
  QTest::newRow( "north up: first centre" ) << northUp << TerrainPoint { 101.0, 499.0 } << TerrainPoint { 0.0, 0.0 };
  QTest::newRow( "north up: outer corner" ) << northUp << TerrainPoint { 100.0, 500.0 } << TerrainPoint { -0.5, -0.5 };
  QTest::newRow( "north up: last centre" ) << northUp << TerrainPoint { 107.0, 495.0 } << TerrainPoint { 3.0, 2.0 };
  QTest::newRow( "north up: last corner" ) << northUp << TerrainPoint { 108.0, 494.0 } << TerrainPoint { 3.5, 2.5 };
  QTest::newRow( "north up: off the raster" ) << northUp << TerrainPoint { 91.0, 509.0 } << TerrainPoint { -5.0, -5.0 };
  const GeoTransform southUp { 100.0, 2.0, 0.0, 500.0, 0.0, 2.0 };
  QTest::newRow( "south up: first centre" ) << southUp << TerrainPoint { 101.0, 501.0 } << TerrainPoint { 0.0, 0.0 };
  QTest::newRow( "south up: a row farther" ) << southUp << TerrainPoint { 101.0, 503.0 } << TerrainPoint { 0.0, 1.0 };
  const GeoTransform uneven { 100.0, 4.0, 0.0, 500.0, 0.0, -0.5 };
  QTest::newRow( "oblong pixels" ) << uneven << TerrainPoint { 106.0, 499.25 } << TerrainPoint { 1.0, 1.0 };
  const GeoTransform mirrored { 100.0, -2.0, 0.0, 500.0, 0.0, -2.0 };
  QTest::newRow( "columns run west" ) << mirrored << TerrainPoint { 97.0, 499.0 } << TerrainPoint { 1.0, 0.0 };
  const GeoTransform quarterTurn { 100.0, 0.0, -2.0, 500.0, -2.0, 0.0 };
  QTest::newRow( "a quarter turn" ) << quarterTurn << TerrainPoint { 97.0, 493.0 } << TerrainPoint { 3.0, 1.0 };
  const GeoTransform sheared { 0.0, 1.0, 0.5, 0.0, 0.0, -1.0 };
  QTest::newRow( "sheared" ) << sheared << TerrainPoint { 3.25, -1.5 } << TerrainPoint { 2.0, 1.0 };
}

void TestRasterGrid::places()
{
  QFETCH( GeoTransform, geoTransform );
  QFETCH( TerrainPoint, map );
  QFETCH( TerrainPoint, pixel );
  const RasterGrid grid( 4, 3, geoTransform );
  QCOMPARE( grid.columns(), 4 );
  QCOMPARE( grid.rows(), 3 );
  const TerrainPoint there = grid.toPixel( map );
  STILLHEAD_SAME( there.x, pixel.x );
  STILLHEAD_SAME( there.y, pixel.y );
  const TerrainPoint back = grid.toMap( pixel );
  STILLHEAD_SAME( back.x, map.x );
  STILLHEAD_SAME( back.y, map.y );
}

// A grid turned by 30 degrees far from the origin: there and back to a millionth of a pixel.
void TestRasterGrid::largeCoordinatesKeepTheirDigits()
{
  const double c = std::sqrt( 0.75 );
  const double s = 0.5;
  const RasterGrid grid( 1000, 1000, { 4000000.25, 0.5 * c, 0.5 * s, 5000000.75, 0.5 * s, -0.5 * c } );
  for ( int i = 0; i < 1000; i += 37 )
  {
    const TerrainPoint pixel = grid.toPixel( grid.toMap( { i + 0.125, 999.0 - i } ) );
    STILLHEAD_NEAR( pixel.x, i + 0.125, 1e-6 );
    STILLHEAD_NEAR( pixel.y, 999.0 - i, 1e-6 );
  }
}

// Where a division is exact the pixel is: a line drawn through pixel centres must not be thrown off them.
void TestRasterGrid::centresOfUnevenPixelsAreExactWithoutRotation()
{
  const RasterGrid grid( 100, 100, { 626772.5, 5.0, 0.0, 1011777.5, 0.0, -5.0 } );
  for ( int i = 0; i < 100; ++i )
  {
    const TerrainPoint pixel = grid.toPixel( { 626775.0 + 5.0 * i, 1011775.0 - 5.0 * i } );
    STILLHEAD_SAME( pixel.x, i + 0.0 );
    STILLHEAD_SAME( pixel.y, i + 0.0 );
  }
}

void TestRasterGrid::refused_data()
{
  QTest::addColumn<int>( "columns" );
  QTest::addColumn<int>( "rows" );
  QTest::addColumn<GeoTransform>( "geoTransform" );
  const GeoTransform good { 0.0, 1.0, 0.0, 0.0, 0.0, -1.0 };
  QTest::newRow( "no columns" ) << 0 << 3 << good;
  QTest::newRow( "rows below nothing" ) << 3 << -1 << good;
  QTest::newRow( "pixels without width" ) << 3 << 3 << GeoTransform { 0.0, 0.0, 0.0, 0.0, 0.0, -1.0 };
  QTest::newRow( "rows along columns" ) << 3 << 3 << GeoTransform { 0.0, 1.0, 2.0, 0.0, 2.0, 4.0 };
  QTest::newRow( "not a number" ) << 3 << 3
                                  << GeoTransform { 0.0, std::numeric_limits<double>::quiet_NaN(), 0.0, 0.0, 0.0,
                                       -1.0 };
}

void TestRasterGrid::refused()
{
  QFETCH( int, columns );
  QFETCH( int, rows );
  QFETCH( GeoTransform, geoTransform );
  QVERIFY_EXCEPTION_THROWN( RasterGrid( columns, rows, geoTransform ), std::invalid_argument );
}

QTEST_APPLESS_MAIN( TestRasterGrid )
#include "testrastergrid.moc"
