// SPDX-License-Identifier: GPL-2.0-or-later
// Core against the platform: lengths on the ellipsoid as the platform measures them, and the same pixels through a
// raster provider as straight from the file.
#include "core/geo/gdalterrain.h"
#include "core/geo/geodesicmeasure.h"
#include "core/terrain/tilecache.h"
#include "processing/qgiscompat.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/providerterrain.h"
#include "tests/support/processingrun.h"

#include <qgsdistancearea.h>
#include <qgsrasterdataprovider.h>
#include <qgsrasterlayer.h>

#include <cmath>

using namespace stillhead;

namespace
{

  std::vector<double> readAll( const ElevationSource &source )
  {
    const RasterGrid &grid = source.grid();
    std::vector<double> values( static_cast<std::size_t>( grid.columns() ) * static_cast<std::size_t>( grid.rows() ) );
    source.read( 0, 0, grid.columns(), grid.rows(), values.data() );
    return values;
  }

  //! The same, tile by tile.
  std::vector<double> readTiles( const ElevationSource &source )
  {
    TileCache cache( source );
    std::vector<double> values;
    for ( int row = 0; row < source.grid().rows(); ++row )
    {
      for ( int column = 0; column < source.grid().columns(); ++column )
        values.push_back( cache.tileAt( column, row )->at( column, row ) );
    }
    return values;
  }

  std::unique_ptr<ProviderTerrain> throughProvider( const QgsRasterLayer &layer, double metresPerUnit )
  {
    auto *own = dynamic_cast<QgsRasterDataProvider *>( layer.dataProvider()->clone() );
    return std::make_unique<ProviderTerrain>( std::unique_ptr<QgsRasterDataProvider>( own ), 1, metresPerUnit );
  }

  //! A copy of test data in \a folder: the platform leaves its statistics beside what it opens.
  QString copied( const QTemporaryDir &folder, const QString &name )
  {
    const QString path = folder.filePath( name );
    return QFile::copy( QStringLiteral( STILLHEAD_TEST_DATA "/" ) + name, path ) ? path : QString();
  }

  bool isSame( const std::vector<double> &a, const std::vector<double> &b )
  {
    return std::equal( a.begin(), a.end(), b.begin(), b.end(),
      []( double x, double y ) { return x == y || ( std::isnan( x ) && std::isnan( y ) ); } );
  }

} // namespace

class TestPlatform : public QObject
{
    Q_OBJECT

  private slots:
    void lengths_data();
    void lengths();
    void pixelsThroughAProvider_data();
    void pixelsThroughAProvider();
    void pixelsOfAVirtualRaster();
};

void TestPlatform::lengths_data()
{
  QTest::addColumn<QString>( "crs" );
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<double>( "step" );
  QTest::newRow( "UTM" ) << "EPSG:32616" << 612000.0 << 4100000.0 << 40.0;
  QTest::newRow( "another datum" ) << "EPSG:26916" << 612000.0 << 4100000.0 << 40.0;
  QTest::newRow( "US survey feet" ) << "EPSG:2277" << 3100000.0 << 10050000.0 << 130.0;
  QTest::newRow( "international feet" ) << "EPSG:2222" << 700000.0 << 1000000.0 << 130.0;
  QTest::newRow( "web map" ) << "EPSG:3857" << -9700000.0 << 6500000.0 << 40.0;
  QTest::newRow( "degrees" ) << "EPSG:4326" << -87.0 << 37.0 << 4e-4;
  QTest::newRow( "northing before easting in the definition" ) << "EPSG:2193" << 1757000.0 << 5917000.0 << 40.0;
}

void TestPlatform::lengths()
{
  QFETCH( QString, crs );
  QFETCH( double, x );
  QFETCH( double, y );
  QFETCH( double, step );
  const QgsCoordinateReferenceSystem system( crs );
  QVERIFY( system.isValid() );
  QgsDistanceArea platform;
  platform.setSourceCrs( system, QgsCoordinateTransformContext() );
  QVERIFY( platform.setEllipsoid( system.ellipsoidAcronym() ) );
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( crsDefinition( system ) );
  for ( int i = 1; i < 30; ++i )
  {
    const std::vector<PlanPoint> line { { x, y }, { x + step * i, y - step * i }, { x - step * i, y + step } };
    std::vector<double> along( line.size() );
    measure->distancesAlongM( line.data(), line.size(), along.data() );
    QVector<QgsPointXY> points;
    for ( const PlanPoint &place : line )
      points << QgsPointXY( place.x, place.y );
    const double expected =
      platform.convertLengthMeasurement( platform.measureLine( points ), compat::Distance::Metres );
    QVERIFY2( std::abs( along.back() - expected ) < 1e-9 * expected + 2e-8,
      qPrintable( QString::number( along.back() - expected ) ) );
  }
}

void TestPlatform::pixelsThroughAProvider_data()
{
  QTest::addColumn<QString>( "what" );
  for ( const char *what : { "floats", "scaled integers", "tiles", "degrees" } )
    QTest::newRow( what ) << what;
}

void TestPlatform::pixelsThroughAProvider()
{
  QFETCH( QString, what );
  QTemporaryDir folder;
  std::string path = folder.filePath( "terrain.tif" ).toStdString();
  test::SmallRaster raster;
  raster.columns = 301;
  raster.rows = 203;
  raster.bands = { test::hills( 301, 203, -9999.0 ) };
  if ( what == "scaled integers" )
    raster.type = GDT_Int16;
  if ( what == "tiles" )
    raster.creationOptions = { "TILED=YES", "BLOCKXSIZE=64", "BLOCKYSIZE=32", "COMPRESS=DEFLATE" };
  if ( what == "degrees" )
  {
    path = copied( folder, QStringLiteral( "sf_1s_tile1.tif" ) ).toStdString();
  }
  else
  {
    const test::DatasetPointer dataset = test::create( path, raster );
    dataset->GetRasterBand( 1 )->SetNoDataValue( -9999.0 );
    if ( what == "scaled integers" )
    {
      dataset->GetRasterBand( 1 )->SetScale( 0.25 );
      dataset->GetRasterBand( 1 )->SetOffset( -3.5 );
    }
  }
  const QgsRasterLayer layer( QString::fromStdString( path ), "terrain", "gdal" );
  QVERIFY( layer.isValid() );
  const GdalTerrain direct( path, 1, ElevationUnit::Foot );
  const std::unique_ptr<ProviderTerrain> provider = throughProvider( layer, 0.3048 );
  QCOMPARE( provider->grid().columns(), direct.grid().columns() );
  QCOMPARE( provider->grid().rows(), direct.grid().rows() );
  for ( std::size_t i = 0; i < 6; ++i )
    QVERIFY( std::abs( provider->grid().geoTransform()[i] - direct.grid().geoTransform()[i] ) < 1e-9 );
  const std::vector<double> expected = readAll( direct );
  QVERIFY( std::any_of( expected.begin(), expected.end(), []( double value ) { return std::isnan( value ); } ) );
  QVERIFY( isSame( readAll( *provider ), expected ) );
  QVERIFY( isSame( readTiles( *provider ), expected ) );
}

void TestPlatform::pixelsOfAVirtualRaster()
{
  // Computed on the fly by the platform, opened by no file library: the ground lowered by a metre.
  QTemporaryDir folder;
  const QString path = copied( folder, QStringLiteral( "bei_5m_utm17n.tif" ) );
  const QgsRasterLayer ground( path, "ground", "gdal" );
  QgsRasterDataProvider::VirtualRasterParameters parameters;
  parameters.crs = ground.crs();
  parameters.extent = ground.extent();
  parameters.width = ground.width();
  parameters.height = ground.height();
  parameters.formula = QStringLiteral( "\"ground@1\" - 1" );
  QgsRasterDataProvider::VirtualRasterInputLayers input;
  input.name = QStringLiteral( "ground" );
  input.uri = path;
  input.provider = QStringLiteral( "gdal" );
  parameters.rInputLayers << input;
  const QgsRasterLayer layer(
    QgsRasterDataProvider::encodeVirtualRasterProviderUri( parameters ), "lowered", "virtualraster" );
  if ( !layer.isValid() )
    QSKIP( "this platform has no virtual rasters" );
  const std::vector<double> expected = readAll( GdalTerrain( path.toStdString() ) );
  const std::unique_ptr<ProviderTerrain> provider = throughProvider( layer, 1.0 );
  for ( const std::vector<double> &found : { readAll( *provider ), readTiles( *provider ) } )
  {
    QCOMPARE( found.size(), expected.size() );
    for ( std::size_t i = 0; i < found.size(); ++i )
      QVERIFY( std::abs( found[i] - ( expected[i] - 1.0 ) ) < 1e-9 );
  }
}

int main( int argc, char *argv[] )
{
  return test::runWithQgis<TestPlatform>( argc, argv );
}

#include "testplatform.moc"
