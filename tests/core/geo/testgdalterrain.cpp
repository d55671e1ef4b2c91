// SPDX-License-Identifier: GPL-2.0-or-later
// Terrain through GDAL: exact small grids, what is honoured, what is refused, the same bits from every layout.
#include "core/feedback/parallel.h"
#include "core/geo/gdalcachelimit.h"
#include "core/geo/gdalterrain.h"
#include "core/terrain/tilecache.h"
#include "tests/support/smallraster.h"

#include <QFile>
#include <QTemporaryDir>
#include <QTest>

#include <cmath>
#include <cstring>
#include <limits>

#include <cpl_conv.h>
#include <gdal_utils.h>

using namespace stillhead;
using stillhead::test::SmallRaster;

namespace
{
  constexpr double NONE = std::numeric_limits<double>::quiet_NaN();

  std::string dataFile( const char *name )
  {
    return std::string( STILLHEAD_TEST_DATA "/" ) + name;
  }

  bool isSameToTheBit( const std::vector<double> &a, const std::vector<double> &b )
  {
    for ( std::size_t i = 0; i < a.size() && i < b.size(); ++i )
    {
      if ( !( a[i] == b[i] || ( std::isnan( a[i] ) && std::isnan( b[i] ) ) ) )
        return false;
    }
    return a.size() == b.size();
  }

  //! All values block by block, as 32-bit floats times their factor.
  std::vector<double> readFloatBlocks( const GdalTerrain &terrain )
  {
    const RasterGrid &grid = terrain.grid();
    const auto columns = static_cast<std::size_t>( grid.columns() );
    std::vector<double> values( columns * static_cast<std::size_t>( grid.rows() ) );
    for ( int row = 0; row < grid.rows(); row += terrain.blockRows() )
    {
      for ( int column = 0; column < grid.columns(); column += terrain.blockColumns() )
      {
        const int width = std::min( terrain.blockColumns(), grid.columns() - column );
        const int height = std::min( terrain.blockRows(), grid.rows() - row );
        std::vector<float> block( static_cast<std::size_t>( width ) * static_cast<std::size_t>( height ) );
        terrain.readFloats( column, row, width, height, block.data() );
        for ( std::size_t i = 0; i < block.size(); ++i )
          values[( static_cast<std::size_t>( row ) + i / static_cast<std::size_t>( width ) ) * columns
            + static_cast<std::size_t>( column ) + i % static_cast<std::size_t>( width )] =
            static_cast<double>( block[i] ) * terrain.metresPerFloat();
      }
    }
    return values;
  }

  //! All values; nothing if the two ways of reading them differ in a bit.
  std::vector<double> readAll( const GdalTerrain &terrain )
  {
    const RasterGrid &grid = terrain.grid();
    std::vector<double> values( static_cast<std::size_t>( grid.columns() ) * static_cast<std::size_t>( grid.rows() ) );
    terrain.read( 0, 0, grid.columns(), grid.rows(), values.data() );
    if ( terrain.metresPerFloat() != 0.0 && !isSameToTheBit( readFloatBlocks( terrain ), values ) )
      return {};
    return values;
  }

  //! The values of a raster in memory once \a change has been made to it.
  std::vector<double> valuesOf( const SmallRaster &raster, const std::function<void( GDALDataset & )> &change )
  {
    const std::string path = "/vsimem/terrain/values.tif";
    {
      const test::DatasetPointer dataset = test::create( path, raster );
      change( *dataset );
    }
    return readAll( GdalTerrain( path ) );
  }

  //! What a refused raster says; blank if it is not refused.
  std::string refusal( const std::string &path, TerrainProblem expected, int band = 1 )
  {
    try
    {
      const GdalTerrain terrain( path, band );
    }
    catch ( const TerrainRefused &refused )
    {
      return refused.problem() == expected ? refused.what() : "another problem";
    }
    return {};
  }

  void translate( const std::string &from, const std::string &to, const std::vector<std::string> &arguments )
  {
    std::vector<char *> list;
    for ( const std::string &argument : arguments )
      list.push_back( const_cast<char *>( argument.c_str() ) );
    list.push_back( nullptr );
    GDALTranslateOptions *options = GDALTranslateOptionsNew( list.data(), nullptr );
    const GDALDatasetH source = GDALOpen( from.c_str(), GA_ReadOnly );
    GDALClose( GDALTranslate( to.c_str(), source, options, nullptr ) );
    GDALClose( source );
    GDALTranslateOptionsFree( options );
  }

} // namespace

class TestGdalTerrain : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase() { test::registerGdal(); }
    void cleanup() { VSIRmdirRecursive( "/vsimem/terrain" ); }

    void integersWithScaleAndOffset();
    void wholeNumberNodata();
    void nodataInTheBandsOwnType();
    void infiniteIsNone();
    void maskBand();
    void alphaBand();
    void signedBytes();
    void everyType_data();
    void everyType();
    void unit_data();
    void unit();
    void unitOfACompoundCrs();
    void unitOfTheUserGoesFirst();
    void rotatedPlacement();
    void degrees();
    void mosaicWithAGap();
    void mosaicWithAGapAndNoNodata();
    void sparseFile();
    void mosaicOfTwoTouchingTiles();
    void layoutsAgreeToTheBit();
    void overviewsAreNotRead();
    void threadsAgreeToTheBit();
    void missingTile_data();
    void missingTile();
    void corruptBlock();
    void refusals();
    void pictures();
    void withoutCrs();
    void realTerrainInMetresAndFeet();
    void cacheLimitIsGivenBack();
};

void TestGdalTerrain::integersWithScaleAndOffset()
{
  SmallRaster raster;
  raster.type = GDT_Int16;
  raster.bands = { { 0, 1, -40, 32767, -32768, 500 } };
  const std::vector<double> values = valuesOf( raster, []( GDALDataset &dataset ) {
    dataset.GetRasterBand( 1 )->SetScale( 0.25 );
    dataset.GetRasterBand( 1 )->SetOffset( 100.0 );
    dataset.GetRasterBand( 1 )->SetNoDataValue( -32768 );
  } );
  QVERIFY( isSameToTheBit( values, { 100.0, 100.25, 90.0, 8291.75, NONE, 225.0 } ) );
}

void TestGdalTerrain::wholeNumberNodata()
{
  SmallRaster raster;
  raster.type = GDT_Int32;
  raster.bands = { { 1, -9999, 3, -9998, 5, -9999 } };
  const std::vector<double> values =
    valuesOf( raster, []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( -9999 ); } );
  QVERIFY( isSameToTheBit( values, { 1, NONE, 3, -9998, 5, NONE } ) );
}

void TestGdalTerrain::nodataInTheBandsOwnType()
{
  // 0.1 is no 32-bit float: the cell holds the nearest one, the declaration the double.
  SmallRaster raster;
  raster.bands = { { 0.1, 0.5, NONE, -3.0, std::numeric_limits<float>::lowest(), 7.0 } };
  std::vector<double> values =
    valuesOf( raster, []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( 0.1 ); } );
  QVERIFY( isSameToTheBit( values, { NONE, 0.5, NONE, -3.0, std::numeric_limits<float>::lowest(), 7.0 } ) );

  // The usual text of the least float lies a little beyond it.
  values =
    valuesOf( raster, []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( -3.40282347e+38 ); } );
  QVERIFY( std::isnan( values[4] ) );
  QCOMPARE( values[0], static_cast<double>( 0.1f ) );

  values = valuesOf( raster, []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( NONE ); } );
  QVERIFY( std::isnan( values[2] ) );
  QCOMPARE( values[3], -3.0 );
}

void TestGdalTerrain::infiniteIsNone()
{
  SmallRaster raster;
  const double infinite = std::numeric_limits<double>::infinity();
  raster.bands = { { 1, infinite, 3, -infinite, 5, 6 } };
  QVERIFY( isSameToTheBit( valuesOf( raster, []( GDALDataset & ) {} ), { 1, NONE, 3, NONE, 5, 6 } ) );
}

void TestGdalTerrain::maskBand()
{
  const std::vector<double> values = valuesOf( SmallRaster(), []( GDALDataset &dataset ) {
    dataset.CreateMaskBand( GMF_PER_DATASET );
    std::array<unsigned char, 6> mask { 255, 0, 255, 1, 0, 255 };
    QCOMPARE( dataset.GetRasterBand( 1 )->GetMaskBand()->RasterIO(
                GF_Write, 0, 0, 3, 2, mask.data(), 3, 2, GDT_Byte, 0, 0, nullptr ),
      CE_None );
  } );
  QVERIFY( isSameToTheBit( values, { 1, NONE, 3, 4, NONE, 6 } ) );
}

void TestGdalTerrain::alphaBand()
{
  SmallRaster raster;
  raster.type = GDT_UInt16;
  raster.bands = { { 1, 2, 3, 4, 5, 6 }, { 65535, 0, 65535, 0, 65535, 65535 } };
  raster.creationOptions = { "ALPHA=YES" };
  QVERIFY( isSameToTheBit( valuesOf( raster, []( GDALDataset & ) {} ), { 1, NONE, 3, NONE, 5, 6 } ) );
}

void TestGdalTerrain::signedBytes()
{
#if GDAL_VERSION_NUM >= 3070000
  SmallRaster raster;
  raster.type = GDT_Int8;
#else
  SmallRaster raster;
  raster.type = GDT_Byte;
  raster.creationOptions = { "PIXELTYPE=SIGNEDBYTE" };
#endif
  raster.bands = { {} };
  const std::vector<double> values = valuesOf( raster, []( GDALDataset &dataset ) {
    std::array<signed char, 6> cells { 1, -1, 127, -128, 0, -100 };
    const GDALDataType type = dataset.GetRasterBand( 1 )->GetRasterDataType();
    QCOMPARE(
      dataset.GetRasterBand( 1 )->RasterIO( GF_Write, 0, 0, 3, 2, cells.data(), 3, 2, type, 0, 0, nullptr ), CE_None );
    dataset.GetRasterBand( 1 )->SetNoDataValue( -128 );
  } );
  QVERIFY( isSameToTheBit( values, { 1, -1, 127, NONE, 0, -100 } ) );
}

void TestGdalTerrain::everyType_data()
{
  QTest::addColumn<int>( "type" );
  QTest::addColumn<double>( "most" );
  QTest::newRow( "Byte" ) << int( GDT_Byte ) << 255.0;
  QTest::newRow( "UInt16" ) << int( GDT_UInt16 ) << 65535.0;
  QTest::newRow( "Int16" ) << int( GDT_Int16 ) << 32767.0;
  QTest::newRow( "UInt32" ) << int( GDT_UInt32 ) << 4294967295.0;
  QTest::newRow( "Int32" ) << int( GDT_Int32 ) << 2147483647.0;
  QTest::newRow( "Float32" ) << int( GDT_Float32 ) << static_cast<double>( 1234.567f );
  QTest::newRow( "Float64" ) << int( GDT_Float64 ) << 1234.56789012345;
}

void TestGdalTerrain::everyType()
{
  QFETCH( int, type );
  QFETCH( double, most );
  SmallRaster raster;
  raster.type = static_cast<GDALDataType>( type );
  raster.bands = { { 1, 2, most, 0, 5, 6 } };
  const std::vector<double> values =
    valuesOf( raster, []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( 5 ); } );
  QVERIFY( isSameToTheBit( values, { 1, 2, most, 0, NONE, 6 } ) );
}

void TestGdalTerrain::unit_data()
{
  QTest::addColumn<QString>( "text" );
  QTest::addColumn<double>( "metres" );
  QTest::addColumn<QString>( "name" );
  QTest::addColumn<int>( "origin" );
  const int band = static_cast<int>( ElevationUnitOrigin::Band );
  for ( const char *text : { "m", "metre", "Meter", "metres", "METERS" } )
    QTest::newRow( text ) << text << 1.0 << "metre" << band;
  for ( const char *text : { "ft", "foot", "Feet", "international foot", "ft (international)" } )
    QTest::newRow( text ) << text << 0.3048 << "foot" << band;
  for ( const char *text :
    { "us-ft", "ftUS", "US survey foot", "U.S. Survey Feet", "ft (US)", "Foot_US", "us_survey_foot", "sFT" } )
    QTest::newRow( text ) << text << 1200.0 / 3937.0 << "US survey foot" << band;
  QTest::newRow( "cm" ) << "cm" << 0.01 << "centimetre" << band;
  QTest::newRow( "decimetres" ) << "decimetres" << 0.1 << "decimetre" << band;
  QTest::newRow( "mm" ) << "mm" << 0.001 << "millimetre" << band;
  QTest::newRow( "not understood" ) << "furlong" << 1.0 << "metre" << static_cast<int>( ElevationUnitOrigin::Assumed );
  QTest::newRow( "none" ) << "" << 1.0 << "metre" << static_cast<int>( ElevationUnitOrigin::Assumed );
}

void TestGdalTerrain::unit()
{
  QFETCH( QString, text );
  QFETCH( double, metres );
  const std::string path = "/vsimem/terrain/unit.tif";
  test::create( path, SmallRaster() )->GetRasterBand( 1 )->SetUnitType( qPrintable( text ) );
  const GdalTerrain terrain( path );
  QCOMPARE( terrain.unit().metresPerUnit, metres );
  QTEST( QString::fromStdString( terrain.unit().unitName ), "name" );
  QTEST( static_cast<int>( terrain.unit().origin ), "origin" );
  QTEST( QString::fromStdString( terrain.unit().bandText ), "text" );
  QVERIFY(
    isSameToTheBit( readAll( terrain ), { metres, 2 * metres, 3 * metres, 4 * metres, 5 * metres, 6 * metres } ) );
}

void TestGdalTerrain::unitOfACompoundCrs()
{
  // NAVD88 height in US survey feet; the virtual raster driver passes the CRS through as it is.
  const std::string path = "/vsimem/terrain/compound.vrt";
  SmallRaster raster;
  raster.driver = "VRT";
  raster.bands = { {} };
  raster.crs = "EPSG:2277+6360";
  test::create( path, raster );
  const GdalTerrain terrain( path );
  QCOMPARE( terrain.unit().metresPerUnit, 1200.0 / 3937.0 );
  QCOMPARE( QString::fromStdString( terrain.unit().unitName ), QStringLiteral( "US survey foot" ) );
  QCOMPARE( terrain.unit().origin, ElevationUnitOrigin::Crs );
  QVERIFY( terrain.hasCrs() );
}

void TestGdalTerrain::unitOfTheUserGoesFirst()
{
  const std::string path = "/vsimem/terrain/given.tif";
  test::create( path, SmallRaster() )->GetRasterBand( 1 )->SetUnitType( "m" );
  const GdalTerrain terrain( path, 1, ElevationUnit::Foot );
  QCOMPARE( terrain.unit().metresPerUnit, 0.3048 );
  QCOMPARE( terrain.unit().origin, ElevationUnitOrigin::Given );
  QCOMPARE( readAll( terrain )[3], 4 * 0.3048 );
}

void TestGdalTerrain::rotatedPlacement()
{
  const std::string path = "/vsimem/terrain/rotated.tif";
  SmallRaster raster;
  raster.geoTransform = { 1000.0, 3.0, 1.0, 2000.0, -1.0, -4.0 };
  test::create( path, raster );
  const GdalTerrain terrain( path );
  // The centre of the cell in column 2, row 1 is 2.5 columns and 1.5 rows from the corner.
  const TerrainPoint map = terrain.grid().toMap( { 2.0, 1.0 } );
  QCOMPARE( map.x, 1000.0 + 2.5 * 3.0 + 1.5 * 1.0 );
  QCOMPARE( map.y, 2000.0 - 2.5 * 1.0 - 1.5 * 4.0 );
  const TerrainPoint pixel = terrain.grid().toPixel( map );
  QVERIFY( std::abs( pixel.x - 2.0 ) < 1e-12 && std::abs( pixel.y - 1.0 ) < 1e-12 );
}

void TestGdalTerrain::degrees()
{
  const GdalTerrain terrain( dataFile( "sf_1s_tile1.tif" ) );
  QVERIFY( terrain.hasCrs() );
  QCOMPARE( terrain.grid().columns(), 24 );
  QCOMPARE( terrain.grid().rows(), 37 );
  const std::vector<double> values = readAll( terrain );
  QVERIFY( std::abs( terrain.grid().geoTransform()[1] ) < 0.001 );
  QCOMPARE( std::count_if( values.begin(), values.end(), []( double v ) { return std::isnan( v ); } ), 96 );
}

void TestGdalTerrain::mosaicWithAGap()
{
  SmallRaster left;
  SmallRaster right;
  right.bands = { { 11, 12, 13, 14, 15, 16 } };
  right.geoTransform[0] += 5 * 2.0;
  test::create( "/vsimem/terrain/left.tif", left )->GetRasterBand( 1 )->SetNoDataValue( -1 );
  test::create( "/vsimem/terrain/right.tif", right )->GetRasterBand( 1 )->SetNoDataValue( -1 );
  const char *files[] = { "/vsimem/terrain/left.tif", "/vsimem/terrain/right.tif", nullptr };
  GDALClose( GDALBuildVRT( "/vsimem/terrain/gap.vrt", 2, nullptr, files, nullptr, nullptr ) );
  QVERIFY( isSameToTheBit( readAll( GdalTerrain( "/vsimem/terrain/gap.vrt" ) ),
    { 1, 2, 3, NONE, NONE, 11, 12, 13, 4, 5, 6, NONE, NONE, 14, 15, 16 } ) );
}

void TestGdalTerrain::mosaicWithAGapAndNoNodata()
{
  // Nothing declares what fills the gap: GDAL reads 0 there, which is no elevation.
  SmallRaster left;
  SmallRaster right;
  right.bands = { { 11, 12, 13, 14, 15, 16 } };
  right.geoTransform[0] += 5 * 2.0;
  right.geoTransform[3] -= 1 * 2.0;
  test::create( "/vsimem/terrain/left.tif", left );
  test::create( "/vsimem/terrain/right.tif", right );
  const char *files[] = { "/vsimem/terrain/left.tif", "/vsimem/terrain/right.tif", nullptr };
  GDALClose( GDALBuildVRT( "/vsimem/terrain/gap.vrt", 2, nullptr, files, nullptr, nullptr ) );
  const GdalTerrain terrain( "/vsimem/terrain/gap.vrt" );
  QVERIFY( isSameToTheBit( readAll( terrain ),
    { 1, 2, 3, NONE, NONE, NONE, NONE, NONE, //
      4, 5, 6, NONE, NONE, 11, 12, 13,       //
      NONE, NONE, NONE, NONE, NONE, 14, 15, 16 } ) );
  std::vector<double> window( 4 );
  terrain.read( 3, 0, 2, 2, window.data() );
  QVERIFY( isSameToTheBit( window, { NONE, NONE, NONE, NONE } ) );
}

void TestGdalTerrain::sparseFile()
{
  SmallRaster raster;
  raster.columns = 64;
  raster.rows = 32;
  raster.bands = { {} };
  raster.creationOptions = { "TILED=YES", "BLOCKXSIZE=32", "BLOCKYSIZE=32", "SPARSE_OK=TRUE" };
  std::vector<double> values = valuesOf( raster, []( GDALDataset &dataset ) {
    std::vector<float> cells( 32 * 32, 9.0F );
    QCOMPARE(
      dataset.GetRasterBand( 1 )->RasterIO( GF_Write, 32, 0, 32, 32, cells.data(), 32, 32, GDT_Float32, 0, 0, nullptr ),
      CE_None );
  } );
  QVERIFY( std::isnan( values[0] ) && std::isnan( values[31] ) );
  QCOMPARE( values[32], 9.0 );
}

void TestGdalTerrain::mosaicOfTwoTouchingTiles()
{
  const std::string one = dataFile( "sf_1s_tile1.tif" );
  const std::string two = dataFile( "sf_1s_tile2.tif" );
  const char *files[] = { one.c_str(), two.c_str(), nullptr };
  GDALClose( GDALBuildVRT( "/vsimem/terrain/tiles.vrt", 2, nullptr, files, nullptr, nullptr ) );
  const GdalTerrain mosaic( "/vsimem/terrain/tiles.vrt" );
  const GdalTerrain first( one );
  // One column of the two overlaps.
  QCOMPARE( mosaic.grid().columns(), 24 + 23 - 1 );
  const std::vector<double> whole = readAll( mosaic );
  const std::vector<double> part = readAll( first );
  for ( std::size_t row = 0; row < 37; ++row )
  {
    for ( std::size_t column = 0; column < 23; ++column )
    {
      const double a = whole[row * 46 + column];
      const double b = part[row * 24 + column];
      QVERIFY( a == b || ( std::isnan( a ) && std::isnan( b ) ) );
    }
  }
}

void TestGdalTerrain::layoutsAgreeToTheBit()
{
  constexpr int COLUMNS = 700;
  constexpr int ROWS = 600;
  SmallRaster raster;
  raster.columns = COLUMNS;
  raster.rows = ROWS;
  raster.bands = { test::hills( COLUMNS, ROWS, -9999.0 ) };
  test::create( "/vsimem/terrain/plain.tif", raster )->GetRasterBand( 1 )->SetNoDataValue( -9999.0 );
  const std::vector<double> expected = readAll( GdalTerrain( "/vsimem/terrain/plain.tif" ) );
  QVERIFY( std::isnan( expected[static_cast<std::size_t>( 170 * COLUMNS + 300 )] ) );

  const std::string from = "/vsimem/terrain/plain.tif";
  translate( from, "/vsimem/terrain/strips.tif", { "-co", "COMPRESS=DEFLATE", "-co", "BLOCKYSIZE=3" } );
  translate(
    from, "/vsimem/terrain/tiles.tif", { "-co", "TILED=YES", "-co", "COMPRESS=DEFLATE", "-co", "PREDICTOR=3" } );
  translate( from, "/vsimem/terrain/odd.tif", { "-co", "TILED=YES", "-co", "BLOCKXSIZE=48", "-co", "BLOCKYSIZE=80" } );
  translate( from, "/vsimem/terrain/cog.tif", { "-of", "COG", "-co", "BLOCKSIZE=128", "-co", "COMPRESS=LZW" } );
  translate( from, "/vsimem/terrain/mosaic.vrt", { "-of", "VRT" } );
  for ( const char *name : { "strips.tif", "tiles.tif", "odd.tif", "cog.tif", "mosaic.vrt" } )
  {
    const GdalTerrain terrain( std::string( "/vsimem/terrain/" ) + name );
    QVERIFY2( isSameToTheBit( readAll( terrain ), expected ), name );
    TileCache cache( terrain, 1 << 20 );
    for ( int row = 0; row < ROWS; row += 7 )
    {
      for ( int column = 0; column < COLUMNS; column += 5 )
      {
        const double value = cache.tileAt( column, row )->at( column, row );
        const double wanted = expected[static_cast<std::size_t>( row * COLUMNS + column )];
        QVERIFY2( value == wanted || ( std::isnan( value ) && std::isnan( wanted ) ), name );
      }
    }
  }
}

void TestGdalTerrain::overviewsAreNotRead()
{
  SmallRaster raster;
  raster.columns = 256;
  raster.rows = 256;
  raster.bands = { test::hills( 256, 256, -9999.0 ) };
  const std::string path = "/vsimem/terrain/overviews.tif";
  {
    const test::DatasetPointer dataset = test::create( path, raster );
    int levels[] = { 2, 4 };
    QCOMPARE( dataset->BuildOverviews( "AVERAGE", 2, levels, 0, nullptr, nullptr, nullptr ), CE_None );
  }
  const GdalTerrain terrain( path );
  const std::vector<double> values = readAll( terrain );
  QCOMPARE( values[256 * 10 + 10], static_cast<double>( static_cast<float>( raster.bands[0][256 * 10 + 10] ) ) );
}

void TestGdalTerrain::threadsAgreeToTheBit()
{
  SmallRaster raster;
  raster.columns = 600;
  raster.rows = 500;
  raster.bands = { test::hills( 600, 500, -9999.0 ) };
  raster.creationOptions = { "TILED=YES", "BLOCKXSIZE=64", "BLOCKYSIZE=64", "COMPRESS=DEFLATE" };
  test::create( "/vsimem/terrain/a.tif", raster )->GetRasterBand( 1 )->SetNoDataValue( -9999.0 );
  // A mosaic, whose tiles handles may share unless told not to.
  translate( "/vsimem/terrain/a.tif", "/vsimem/terrain/threads.vrt", { "-of", "VRT" } );
  const GdalTerrain terrain( "/vsimem/terrain/threads.vrt" );
  const std::vector<double> expected = readAll( terrain );
  for ( const unsigned threads : { 1u, 2u, 4u, 8u } )
  {
    std::vector<double> values( expected.size() );
    Monitor monitor;
    parallelRanges( 500, 3, threads, monitor, 0.0, 1.0, [&]( std::size_t first, std::size_t last, unsigned ) {
      terrain.read( 0, static_cast<int>( first ), 600, static_cast<int>( last - first ), values.data() + first * 600 );
    } );
    QVERIFY( isSameToTheBit( values, expected ) );
  }
}

void TestGdalTerrain::missingTile_data()
{
  QTest::addColumn<bool>( "nodata" );
  QTest::newRow( "nodata declared" ) << true;
  QTest::newRow( "nothing declared" ) << false;
}

void TestGdalTerrain::missingTile()
{
  QFETCH( bool, nodata );
  QTemporaryDir folder;
  const std::string tile = folder.filePath( "tile.tif" ).toStdString();
  const std::string mosaic = folder.filePath( "mosaic.vrt" ).toStdString();
  {
    const test::DatasetPointer dataset = test::create( tile, SmallRaster() );
    if ( nodata )
      dataset->GetRasterBand( 1 )->SetNoDataValue( -1 );
  }
  const char *files[] = { tile.c_str(), nullptr };
  GDALClose( GDALBuildVRT( mosaic.c_str(), 1, nullptr, files, nullptr, nullptr ) );
  VSIUnlink( tile.c_str() );
  const GdalTerrain terrain( mosaic );
  try
  {
    readAll( terrain );
    QFAIL( "a mosaic without its tile was read" );
  }
  catch ( const std::runtime_error &error )
  {
    const QString text = QString::fromUtf8( error.what() );
    QVERIFY2( text.startsWith( "The terrain cannot be read at columns 0 to 2, rows 0 to 1" ), error.what() );
    QVERIFY2( text.contains( "tile.tif" ), error.what() );
  }
}

void TestGdalTerrain::corruptBlock()
{
  QTemporaryDir folder;
  const QString path = folder.filePath( "corrupt.tif" );
  SmallRaster raster;
  raster.columns = 256;
  raster.rows = 256;
  raster.bands = { test::hills( 256, 256, -9999.0 ) };
  raster.creationOptions = { "TILED=YES", "BLOCKXSIZE=64", "BLOCKYSIZE=64", "COMPRESS=DEFLATE" };
  test::create( path.toStdString(), raster );
  QFile file( path );
  QVERIFY( file.open( QIODevice::ReadWrite ) );
  const qint64 middle = file.size() / 2;
  QVERIFY( file.seek( middle ) );
  file.write( QByteArray( 2000, '\xFF' ) );
  file.close();
  const GdalTerrain terrain( path.toStdString() );
  QVERIFY_EXCEPTION_THROWN( readAll( terrain ), std::runtime_error );
  // What is whole can still be read.
  std::vector<double> corner( 16 );
  terrain.read( 0, 0, 4, 4, corner.data() );
  QCOMPARE( corner[0], 100.0 );
}

void TestGdalTerrain::refusals()
{
  QTemporaryDir folder;
  const QString text = folder.filePath( "not a raster.tif" );
  QFile file( text );
  QVERIFY( file.open( QIODevice::WriteOnly ) );
  file.write( "plain words" );
  file.close();
  QVERIFY( QString::fromStdString( refusal( text.toStdString(), TerrainProblem::Unreadable ) )
             .contains( "cannot be opened as a raster" ) );
  QVERIFY( QString::fromStdString( refusal( "/vsimem/terrain/none.tif", TerrainProblem::Unreadable ) )
             .contains( "check the file and its path" ) );

  test::create( "/vsimem/terrain/one.tif", SmallRaster() );
  for ( const int band : { 0, 2, -1 } )
  {
    QCOMPARE( QString::fromStdString( refusal( "/vsimem/terrain/one.tif", TerrainProblem::NoSuchBand, band ) ),
      QStringLiteral( "The terrain has 1 band, so band %1 does not exist; choose a band from 1 to 1." ).arg( band ) );
  }

  SmallRaster raster;
  raster.isPlaced = false;
  test::create( "/vsimem/terrain/nowhere.tif", raster );
  QVERIFY( QString::fromStdString( refusal( "/vsimem/terrain/nowhere.tif", TerrainProblem::NotPlaced ) )
             .contains( "georeference it first" ) );
  {
    const test::DatasetPointer dataset = test::create( "/vsimem/terrain/points.tif", raster );
    GDAL_GCP points[3];
    GDALInitGCPs( 3, points );
    for ( int i = 0; i < 3; ++i )
    {
      points[i].dfGCPPixel = i;
      points[i].dfGCPLine = i * i;
      points[i].dfGCPX = 100.0 + 7.0 * i;
      points[i].dfGCPY = 200.0 + 5.0 * i * i * i;
    }
    OGRSpatialReference crs;
    crs.importFromEPSG( 32616 );
    QCOMPARE( dataset->SetGCPs( 3, points, &crs ), CE_None );
    GDALDeinitGCPs( 3, points );
  }
  QVERIFY( QString::fromStdString( refusal( "/vsimem/terrain/points.tif", TerrainProblem::NotPlaced ) )
             .contains( "ground control points" ) );

  raster = SmallRaster();
  raster.type = GDT_CFloat32;
  test::create( "/vsimem/terrain/complex.tif", raster );
  QVERIFY( QString::fromStdString( refusal( "/vsimem/terrain/complex.tif", TerrainProblem::NotNumbers ) )
             .contains( "complex numbers" ) );
}

void TestGdalTerrain::pictures()
{
  SmallRaster raster;
  raster.type = GDT_Byte;
  raster.bands = { { 1, 2, 3, 4, 5, 6 }, { 1, 2, 3, 4, 5, 6 }, { 1, 2, 3, 4, 5, 6 } };
  test::create( "/vsimem/terrain/colours.tif", raster );
  QVERIFY( QString::fromStdString( refusal( "/vsimem/terrain/colours.tif", TerrainProblem::Picture ) )
             .contains( "picture of three colour bands" ) );

  raster.bands.push_back( { 255, 255, 255, 255, 255, 255 } );
  raster.creationOptions = { "ALPHA=YES" };
  test::create( "/vsimem/terrain/alpha.tif", raster );
  QVERIFY( !refusal( "/vsimem/terrain/alpha.tif", TerrainProblem::Picture, 2 ).empty() );

  raster = SmallRaster();
  raster.type = GDT_Byte;
  {
    const test::DatasetPointer dataset = test::create( "/vsimem/terrain/palette.tif", raster );
    GDALColorTable colours;
    const GDALColorEntry red { 255, 0, 0, 255 };
    colours.SetColorEntry( 1, &red );
    dataset->GetRasterBand( 1 )->SetColorTable( &colours );
  }
  QVERIFY(
    QString::fromStdString( refusal( "/vsimem/terrain/palette.tif", TerrainProblem::Picture ) ).contains( "palette" ) );

  // A grey byte raster may be terrain, and so may three bands of heights.
  test::create( "/vsimem/terrain/grey.tif", raster );
  QCOMPARE( readAll( GdalTerrain( "/vsimem/terrain/grey.tif" ) )[5], 6.0 );
  raster.type = GDT_Float32;
  raster.bands = { { 1, 2, 3, 4, 5, 6 }, { 7, 8, 9, 10, 11, 12 }, { 0, 0, 0, 0, 0, 0 } };
  test::create( "/vsimem/terrain/heights.tif", raster );
  QCOMPARE( readAll( GdalTerrain( "/vsimem/terrain/heights.tif", 2 ) )[0], 7.0 );
}

void TestGdalTerrain::withoutCrs()
{
  SmallRaster raster;
  raster.crs.clear();
  test::create( "/vsimem/terrain/nocrs.tif", raster );
  QVERIFY( !GdalTerrain( "/vsimem/terrain/nocrs.tif" ).hasCrs() );
  test::create( "/vsimem/terrain/crs.tif", SmallRaster() );
  QVERIFY( GdalTerrain( "/vsimem/terrain/crs.tif" ).hasCrs() );
}

void TestGdalTerrain::realTerrainInMetresAndFeet()
{
  const GdalTerrain metres( dataFile( "bei_5m_utm17n.tif" ) );
  const GdalTerrain feet( dataFile( "bei_5m_utm17n_ft.tif" ) );
  QCOMPARE( metres.unit().origin, ElevationUnitOrigin::Assumed );
  QCOMPARE( feet.unit().origin, ElevationUnitOrigin::Band );
  QCOMPARE( feet.unit().metresPerUnit, 0.3048 );
  const std::vector<double> a = readAll( metres );
  const std::vector<double> b = readAll( feet );
  // Range as stated with the data: 119.81 to 159.48 m.
  QVERIFY( std::abs( *std::min_element( a.begin(), a.end() ) - 119.81 ) < 1e-5 );
  QVERIFY( std::abs( *std::max_element( a.begin(), a.end() ) - 159.48 ) < 1e-5 );
  for ( std::size_t i = 0; i < a.size(); ++i )
    QVERIFY( std::abs( a[i] - b[i] ) < 2e-5 ); // both came through 32-bit floats
}

void TestGdalTerrain::cacheLimitIsGivenBack()
{
  constexpr GIntBig MIB = 1 << 20;
  const std::int64_t before = GDALGetCacheMax64();
  GDALSetCacheMax64( 500 * MIB );
  {
    const GdalCacheLimit outer( 64 * MIB );
    QCOMPARE( GDALGetCacheMax64(), 64 * MIB );
    {
      const GdalCacheLimit smaller( 32 * MIB );
      QCOMPARE( GDALGetCacheMax64(), 64 * MIB );
      const GdalCacheLimit larger( 80 * MIB );
      QCOMPARE( GDALGetCacheMax64(), 80 * MIB );
    }
    QCOMPARE( GDALGetCacheMax64(), 80 * MIB );
  }
  QCOMPARE( GDALGetCacheMax64(), 500 * MIB );

  GDALSetCacheMax64( 16 * MIB );
  {
    const GdalCacheLimit larger( 64 * MIB );
    QCOMPARE( GDALGetCacheMax64(), 16 * MIB );
  }
  GDALSetCacheMax64( 500 * MIB );
  CPLSetConfigOption( "GDAL_CACHEMAX", "400" );
  {
    const GdalCacheLimit meant( 64 * MIB );
    QCOMPARE( GDALGetCacheMax64(), 500 * MIB );
  }
  CPLSetConfigOption( "GDAL_CACHEMAX", nullptr );

  // A raster in one block of 32 MiB: three of them fit, in a job that runs and in later ones.
  test::SmallRaster raster;
  raster.columns = 4096;
  raster.rows = 2048;
  raster.bands = { {} };
  raster.creationOptions = { "BLOCKYSIZE=2048", "COMPRESS=DEFLATE", "SPARSE_OK=TRUE" };
  test::create( "/vsimem/terrain/block.tif", raster );
  {
    const GdalCacheLimit limit( 64 * MIB );
    const GdalTerrain terrain( "/vsimem/terrain/block.tif" );
    QCOMPARE( terrain.blockRows(), 2048 );
    QCOMPARE( GDALGetCacheMax64(), 96 * MIB );
  }
  {
    const GdalCacheLimit limit( 64 * MIB );
    QCOMPARE( GDALGetCacheMax64(), 96 * MIB );
    GdalCacheLimit::neverBelow( 9000 * MIB );
    QCOMPARE( GDALGetCacheMax64(), 500 * MIB );
  }
  QCOMPARE( GDALGetCacheMax64(), 500 * MIB );
  GDALSetCacheMax64( before );
}

QTEST_APPLESS_MAIN( TestGdalTerrain )
#include "testgdalterrain.moc"
