// SPDX-License-Identifier: GPL-2.0-or-later
// The pressure surface as a file: every cell against direct arithmetic from every layout of terrain, the same bytes
// from any number of threads, and nothing left behind when it does not come to its end.
#include "core/geo/areageometry.h"
#include "core/geo/gdalterrain.h"
#include "core/geo/surfacelayout.h"
#include "core/geo/surfacewriter.h"
#include "core/units/units.h"
#include "core/units/water.h"
#include "tests/support/smallraster.h"

#include <QDir>
#include <QFile>
#include <QTemporaryDir>
#include <QTest>

#include <atomic>
#include <cmath>
#include <functional>
#include <limits>
#include <stdexcept>

#include <ogr_geometry.h>

using namespace stillhead;

namespace
{

  //! Grounds from a formula, in blocks of any shape; reading may be interfered with.
  class FormulaTerrain : public ElevationSource
  {
    public:
      FormulaTerrain( int columns, int rows, int blockColumns, int blockRows )
        : mGrid( columns, rows, { 500000.0, 2.0, 0.0, 4000000.0, 0.0, -2.0 } )
        , mBlockColumns( blockColumns )
        , mBlockRows( blockRows )
      {
      }

      const RasterGrid &grid() const override { return mGrid; }
      int blockColumns() const override { return mBlockColumns; }
      int blockRows() const override { return mBlockRows; }
      void read( int column, int row, int columns, int rows, double *elevationsM ) const override
      {
        if ( beforeRead )
          beforeRead( row );
        cellsRead += static_cast<long long>( columns ) * rows;
        for ( int r = row; r < row + rows; ++r )
        {
          for ( int c = column; c < column + columns; ++c )
            *elevationsM++ = groundM( c, r );
        }
      }

      static double groundM( int column, int row )
      {
        if ( ( column + 3 * row ) % 101 == 0 )
          return std::numeric_limits<double>::quiet_NaN();
        return 100.0 + 0.0625 * column + 0.03 * row + 5.0 * std::sin( 0.05 * column ) * std::cos( 0.07 * row );
      }

      std::function<void( int row )> beforeRead;
      mutable std::atomic<long long> cellsRead { 0 };

    private:
      RasterGrid mGrid;
      int mBlockColumns;
      int mBlockRows;
  };

  RestingWater water( double levelM )
  {
    return { levelM, 0.6, waterSpecificWeightNPerM3( 15.0 ), PASCALS_PER_PSI };
  }

  SurfaceRequest request( const QString &destination, unsigned threads = 2 )
  {
    SurfaceRequest asked;
    asked.destination = destination.toStdString();
    asked.bands = { { water( 140.0 ), "High case" } };
    asked.unitName = "psi";
    asked.crsDefinition = "EPSG:32616";
    asked.threads = threads;
    return asked;
  }

  std::vector<float> readBand( const QString &path, int band )
  {
    const GDALDatasetUniquePtr file( GDALDataset::Open( path.toUtf8().constData() ) );
    const int columns = file->GetRasterXSize();
    const int rows = file->GetRasterYSize();
    std::vector<float> cells( static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows ) );
    const CPLErr error = file->GetRasterBand( band )->RasterIO(
      GF_Read, 0, 0, columns, rows, cells.data(), columns, rows, GDT_Float32, 0, 0, nullptr );
    return error == CE_None ? cells : std::vector<float>();
  }

  QByteArray bytesOf( const QString &path )
  {
    QFile file( path );
    return file.open( QIODevice::ReadOnly ) ? file.readAll() : QByteArray();
  }

  void writeBytes( const QString &path, const QByteArray &bytes )
  {
    QFile file( path );
    QVERIFY( file.open( QIODevice::WriteOnly ) );
    file.write( bytes );
  }

  //! Cancels at the \a count-th time of asking.
  class CancellingMonitor : public Monitor
  {
    public:
      explicit CancellingMonitor( int count )
        : mLeft( count )
      {
      }
      bool cancelled() const override { return --mLeft < 0; }

    private:
      mutable std::atomic<int> mLeft;
  };

  std::vector<unsigned char> wkb( const char *wkt )
  {
    OGRGeometry *geometry = nullptr;
    OGRGeometryFactory::createFromWkt( wkt, nullptr, &geometry );
    std::vector<unsigned char> bytes( geometry->WkbSize() );
    geometry->exportToWkb( wkbNDR, bytes.data(), wkbVariantIso );
    OGRGeometryFactory::destroyGeometry( geometry );
    return bytes;
  }

} // namespace

class TestSurfaceWriter : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase() { test::registerGdal(); }

    void everyCell_data();
    void everyCell();
    void theFile();
    void twoBands();
    void threadsGiveTheSameBytes_data();
    void threadsGiveTheSameBytes();
    void littleMemoryGivesTheSameBytes();
    void layoutCoversTheRaster_data();
    void layoutCoversTheRaster();
    void heightsAreNoPartOfTheCrs();
    void rotatedPlacement();
    void area();
    void terrainOutsideTheAreaIsNotRead();
    void areaGeometries();
    void cancelLeavesNothing_data();
    void cancelLeavesNothing();
    void failureLeavesNothing();
    void replacesAnEarlierFile();
    void unwritable();
    void realTerrain();
};

void TestSurfaceWriter::everyCell_data()
{
  QTest::addColumn<int>( "columns" );
  QTest::addColumn<int>( "rows" );
  QTest::addColumn<int>( "blockColumns" );
  QTest::addColumn<int>( "blockRows" );
  QTest::newRow( "one cell" ) << 1 << 1 << 1 << 1;
  QTest::newRow( "smaller than a tile" ) << 61 << 87 << 61 << 33;
  QTest::newRow( "tiles" ) << 700 << 610 << 256 << 256;
  QTest::newRow( "large tiles" ) << 1100 << 600 << 512 << 512;
  QTest::newRow( "huge tiles" ) << 2500 << 1100 << 1024 << 1024;
  QTest::newRow( "small tiles" ) << 500 << 400 << 64 << 64;
  QTest::newRow( "odd tiles" ) << 900 << 500 << 100 << 333;
  QTest::newRow( "low wide blocks" ) << 1500 << 300 << 1000 << 8;
  QTest::newRow( "strips of one row" ) << 1300 << 700 << 1300 << 1;
  QTest::newRow( "strips of many rows" ) << 1300 << 700 << 1300 << 99;
  QTest::newRow( "one block for all" ) << 900 << 800 << 900 << 800;
  QTest::newRow( "very wide strips" ) << 40000 << 40 << 40000 << 1;
}

void TestSurfaceWriter::everyCell()
{
  QFETCH( int, columns );
  QFETCH( int, rows );
  QFETCH( int, blockColumns );
  QFETCH( int, blockRows );
  QTemporaryDir folder;
  const QString path = folder.filePath( "surface.tif" );
  const FormulaTerrain terrain( columns, rows, blockColumns, blockRows );
  Monitor monitor;
  writeSurface( terrain, request( path ), monitor, 0.0, 1.0 );
  const std::vector<float> cells = readBand( path, 1 );
  QCOMPARE( cells.size(), static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows ) );
  bool hasNegative = false;
  for ( int row = 0; row < rows; ++row )
  {
    for ( int column = 0; column < columns; ++column )
    {
      const double groundM = FormulaTerrain::groundM( column, row );
      // The rule, written out once more: specific weight times (static level less pipe).
      const double pressure = waterSpecificWeightNPerM3( 15.0 ) * ( 140.0 - ( groundM - 0.6 ) ) / PASCALS_PER_PSI;
      const float expected = std::isnan( groundM ) ? surfaceNodata() : static_cast<float>( pressure );
      const float found = cells[static_cast<std::size_t>( row ) * static_cast<std::size_t>( columns )
        + static_cast<std::size_t>( column )];
      if ( found != expected )
        QFAIL( qPrintable( QStringLiteral( "column %1, row %2: %3" ).arg( column ).arg( row ).arg( found ) ) );
      hasNegative = hasNegative || ( found < 0.0F && found != surfaceNodata() );
    }
  }
  // Above the static level the negative number is kept.
  QVERIFY( hasNegative || columns < 600 );
  // Every cell was read once.
  QCOMPARE( terrain.cellsRead.load(), static_cast<long long>( columns ) * rows );
}

void TestSurfaceWriter::theFile()
{
  QTemporaryDir folder;
  const QString path = folder.filePath( "surface.tif" );
  Monitor monitor;
  writeSurface( FormulaTerrain( 700, 600, 256, 256 ), request( path ), monitor, 0.0, 1.0 );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), QStringList { "surface.tif" } );
  const GDALDatasetUniquePtr file( GDALDataset::Open( path.toUtf8().constData() ) );
  QCOMPARE( QString( file->GetDriver()->GetDescription() ), QStringLiteral( "GTiff" ) );
  QCOMPARE( file->GetRasterCount(), 1 );
  std::array<double, 6> placement {};
  file->GetGeoTransform( placement.data() );
  QCOMPARE( placement, ( std::array<double, 6> { 500000.0, 2.0, 0.0, 4000000.0, 0.0, -2.0 } ) );
  QCOMPARE( QString( file->GetSpatialRef()->GetAuthorityCode( nullptr ) ), QStringLiteral( "32616" ) );
  QCOMPARE( QString( file->GetMetadataItem( "COMPRESSION", "IMAGE_STRUCTURE" ) ), QStringLiteral( "DEFLATE" ) );
  QCOMPARE( QString( file->GetMetadataItem( "PREDICTOR", "IMAGE_STRUCTURE" ) ), QStringLiteral( "3" ) );
  GDALRasterBand *band = file->GetRasterBand( 1 );
  QCOMPARE( band->GetRasterDataType(), GDT_Float32 );
  int tileColumns = 0;
  int tileRows = 0;
  band->GetBlockSize( &tileColumns, &tileRows );
  QCOMPARE( tileColumns, 256 );
  QCOMPARE( tileRows, 256 );
  QCOMPARE( band->GetNoDataValue(), static_cast<double>( std::numeric_limits<float>::lowest() ) );
  QCOMPARE( QString( band->GetDescription() ), QStringLiteral( "High case" ) );
  QCOMPARE( QString( band->GetUnitType() ), QStringLiteral( "psi" ) );
}

void TestSurfaceWriter::twoBands()
{
  QTemporaryDir folder;
  SurfaceRequest asked = request( folder.filePath( "surface.tif" ) );
  asked.bands.push_back( { water( 130.0 ), "Low case" } );
  Monitor monitor;
  writeSurface( FormulaTerrain( 700, 300, 700, 1 ), asked, monitor, 0.0, 1.0 );
  const std::vector<float> high = readBand( folder.filePath( "surface.tif" ), 1 );
  const std::vector<float> low = readBand( folder.filePath( "surface.tif" ), 2 );
  for ( int row = 0; row < 300; ++row )
  {
    for ( int column = 0; column < 700; ++column )
    {
      const std::size_t i = static_cast<std::size_t>( row * 700 + column );
      const double groundM = FormulaTerrain::groundM( column, row );
      if ( ( high[i] == surfaceNodata() ) != std::isnan( groundM )
        || ( !std::isnan( groundM ) && low[i] != static_cast<float>( water( 130.0 ).pressureUnder( groundM ) ) ) )
        QFAIL( qPrintable( QStringLiteral( "column %1, row %2" ).arg( column ).arg( row ) ) );
    }
  }
  const GDALDatasetUniquePtr file( GDALDataset::Open( folder.filePath( "surface.tif" ).toUtf8().constData() ) );
  QCOMPARE( QString( file->GetRasterBand( 2 )->GetDescription() ), QStringLiteral( "Low case" ) );
  QCOMPARE( QString( file->GetRasterBand( 2 )->GetUnitType() ), QStringLiteral( "psi" ) );
}

void TestSurfaceWriter::threadsGiveTheSameBytes_data()
{
  QTest::addColumn<int>( "blockColumns" );
  QTest::addColumn<int>( "blockRows" );
  QTest::newRow( "tiles" ) << 256 << 256;
  QTest::newRow( "strips" ) << 1700 << 1;
}

void TestSurfaceWriter::threadsGiveTheSameBytes()
{
  QFETCH( int, blockColumns );
  QFETCH( int, blockRows );
  QTemporaryDir folder;
  const FormulaTerrain terrain( 1700, 2000, blockColumns, blockRows );
  Monitor monitor;
  QByteArray first;
  for ( const unsigned threads : { 1u, 2u, 4u, 7u } )
  {
    const QString path = folder.filePath( QStringLiteral( "%1.tif" ).arg( threads ) );
    SurfaceRequest asked = request( path, threads );
    asked.bands.push_back( { water( 120.0 ), "Low case" } );
    writeSurface( terrain, asked, monitor, 0.0, 1.0 );
    if ( first.isEmpty() )
      first = bytesOf( path );
    QVERIFY( !first.isEmpty() );
    QVERIFY2( bytesOf( path ) == first, qPrintable( path ) );
  }
}

void TestSurfaceWriter::littleMemoryGivesTheSameBytes()
{
  QTemporaryDir folder;
  const FormulaTerrain terrain( 1700, 1000, 256, 256 );
  Monitor monitor;
  writeSurface( terrain, request( folder.filePath( "a.tif" ) ), monitor, 0.0, 1.0 );
  SurfaceRequest asked = request( folder.filePath( "b.tif" ), 4 );
  asked.memoryBytes = 1;
  writeSurface( terrain, asked, monitor, 0.0, 1.0 );
  QVERIFY( bytesOf( folder.filePath( "a.tif" ) ) == bytesOf( folder.filePath( "b.tif" ) ) );
}

void TestSurfaceWriter::layoutCoversTheRaster_data()
{
  everyCell_data();
  QTest::newRow( "a city, tiled" ) << 20000 << 20000 << 512 << 512;
  QTest::newRow( "a city, striped" ) << 20000 << 20000 << 20000 << 1;
  QTest::newRow( "a very wide raster, striped" ) << 400000 << 1000 << 400000 << 1;
  QTest::newRow( "one block for a city" ) << 20000 << 20000 << 20000 << 20000;
}

void TestSurfaceWriter::layoutCoversTheRaster()
{
  QFETCH( int, columns );
  QFETCH( int, rows );
  QFETCH( int, blockColumns );
  QFETCH( int, blockRows );
  const SurfaceLayout layout( FormulaTerrain( columns, rows, blockColumns, blockRows ) );
  QCOMPARE( layout.tileColumns % 16, 0 );
  QCOMPARE( layout.tileRows % 16, 0 );
  QCOMPARE( layout.unitColumns % layout.tileColumns, 0 );
  QCOMPARE( layout.unitRows % layout.tileRows, 0 );
  QVERIFY( layout.windowColumns <= layout.unitColumns && layout.windowRows <= layout.unitRows );
  const std::size_t down = layout.units / layout.unitsAcross;
  QCOMPARE( down * layout.unitsAcross, layout.units );
  QVERIFY( layout.unitsAcross * static_cast<std::size_t>( layout.unitColumns ) >= static_cast<std::size_t>( columns ) );
  QVERIFY(
    ( layout.unitsAcross - 1 ) * static_cast<std::size_t>( layout.unitColumns ) < static_cast<std::size_t>( columns ) );
  QVERIFY( down * static_cast<std::size_t>( layout.unitRows ) >= static_cast<std::size_t>( rows ) );
  // What is held does not grow with the raster: a unit is at most 4 million cells, but for one row of the lowest tiles.
  QVERIFY(
    layout.unitCells() <= std::max<std::size_t>( 4 << 20, 16u * static_cast<std::size_t>( layout.unitColumns ) ) );
}

void TestSurfaceWriter::heightsAreNoPartOfTheCrs()
{
  QTemporaryDir folder;
  SurfaceRequest asked = request( folder.filePath( "surface.tif" ) );
  asked.crsDefinition = "EPSG:26916+6360";
  Monitor monitor;
  writeSurface( FormulaTerrain( 20, 20, 20, 20 ), asked, monitor, 0.0, 1.0 );
  const GDALDatasetUniquePtr file( GDALDataset::Open( asked.destination.c_str() ) );
  QVERIFY( !file->GetSpatialRef()->IsCompound() );
  QCOMPARE( QString( file->GetSpatialRef()->GetAuthorityCode( nullptr ) ), QStringLiteral( "26916" ) );
  QCOMPARE( QString( file->GetRasterBand( 1 )->GetUnitType() ), QStringLiteral( "psi" ) );
}

void TestSurfaceWriter::rotatedPlacement()
{
  test::SmallRaster raster;
  raster.geoTransform = { 1000.0, 3.0, 1.0, 2000.0, -1.0, -4.0 };
  test::create( "/vsimem/rotated.tif", raster );
  QTemporaryDir folder;
  Monitor monitor;
  writeSurface( GdalTerrain( "/vsimem/rotated.tif" ), request( folder.filePath( "surface.tif" ) ), monitor, 0.0, 1.0 );
  VSIUnlink( "/vsimem/rotated.tif" );
  const GDALDatasetUniquePtr file( GDALDataset::Open( folder.filePath( "surface.tif" ).toUtf8().constData() ) );
  std::array<double, 6> placement {};
  file->GetGeoTransform( placement.data() );
  QCOMPARE( placement, raster.geoTransform );
}

void TestSurfaceWriter::area()
{
  // A ring with a hole over several tiles; a cell belongs where its centre is.
  const FormulaTerrain terrain( 700, 600, 256, 256 );
  std::vector<PixelPolygon> polygons;
  appendPolygons( wkb( "POLYGON((500101 3999000,501201 3999000,501201 3999999,500101 3999999,500101 3999000),"
                       "(500401 3999300,500801 3999300,500801 3999601,500401 3999601,500401 3999300))" ),
    terrain.grid(), polygons );
  const AreaMask mask( polygons, 600 );
  QTemporaryDir folder;
  SurfaceRequest asked = request( folder.filePath( "surface.tif" ) );
  asked.area = &mask;
  Monitor monitor;
  writeSurface( terrain, asked, monitor, 0.0, 1.0 );
  const std::vector<float> cells = readBand( folder.filePath( "surface.tif" ), 1 );
  for ( int row = 0; row < 600; ++row )
  {
    for ( int column = 0; column < 700; ++column )
    {
      const double x = 500000.0 + 2.0 * column + 1.0;
      const double y = 4000000.0 - 2.0 * row - 1.0;
      // A centre on a side belongs to the polygon to the right of it, or below it.
      const bool inRing = x >= 500101 && x < 501201 && y > 3999000 && y <= 3999999;
      const bool inHole = x >= 500401 && x < 500801 && y > 3999300 && y <= 3999601;
      const double groundM = FormulaTerrain::groundM( column, row );
      const bool hasPressure = inRing && !inHole && !std::isnan( groundM );
      const float expected =
        hasPressure ? static_cast<float>( water( 140.0 ).pressureUnder( groundM ) ) : surfaceNodata();
      if ( cells[static_cast<std::size_t>( row * 700 + column )] != expected )
        QFAIL( qPrintable( QStringLiteral( "column %1, row %2" ).arg( column ).arg( row ) ) );
    }
  }
}

void TestSurfaceWriter::terrainOutsideTheAreaIsNotRead()
{
  const FormulaTerrain terrain( 4096, 4096, 256, 256 );
  const AreaMask mask( { { { { 300.0, 300.0 }, { 400.0, 300.0 }, { 400.0, 400.0 }, { 300.0, 400.0 } } } }, 4096 );
  QTemporaryDir folder;
  SurfaceRequest asked = request( folder.filePath( "surface.tif" ) );
  asked.area = &mask;
  Monitor monitor;
  writeSurface( terrain, asked, monitor, 0.0, 1.0 );
  QCOMPARE( terrain.cellsRead.load(), 256LL * 256LL );
}

void TestSurfaceWriter::areaGeometries()
{
  const FormulaTerrain terrain( 100, 100, 100, 100 );
  std::vector<PixelPolygon> polygons;
  appendPolygons( wkb( "MULTIPOLYGON(((0 0,1 0,1 1,0 0)),((5 5,6 5,6 6,5 5)))" ), terrain.grid(), polygons );
  QCOMPARE( polygons.size(), std::size_t( 2 ) );
  appendPolygons( wkb( "GEOMETRYCOLLECTION(POINT(1 1),POLYGON((0 0,1 0,1 1,0 0)))" ), terrain.grid(), polygons );
  QCOMPARE( polygons.size(), std::size_t( 3 ) );
  appendPolygons( wkb( "POLYGON Z((500000 4000000 7,500002 4000000 7,500002 3999998 7,500000 4000000 7))" ),
    terrain.grid(), polygons );
  QCOMPARE( polygons[3][0][0].x, -0.5 );
  QCOMPARE( polygons[3][0][2].x, 0.5 );
  QCOMPARE( polygons[3][0][2].y, 0.5 );
  // Half circles are straightened.
  appendPolygons( wkb( "CURVEPOLYGON(CIRCULARSTRING(0 0,1 1,2 0,1 -1,0 0))" ), terrain.grid(), polygons );
  QVERIFY( polygons[4][0].size() > 50 );
  QVERIFY_EXCEPTION_THROWN( appendPolygons( { 1, 2, 3 }, terrain.grid(), polygons ), std::runtime_error );
}

void TestSurfaceWriter::cancelLeavesNothing_data()
{
  QTest::addColumn<int>( "askings" );
  QTest::newRow( "before it begins" ) << 0;
  QTest::newRow( "at the first window" ) << 2;
  QTest::newRow( "in the middle" ) << 60;
  QTest::newRow( "near the end" ) << 110;
}

void TestSurfaceWriter::cancelLeavesNothing()
{
  QFETCH( int, askings );
  QTemporaryDir folder;
  const QString path = folder.filePath( "surface.tif" );
  writeBytes( path, "earlier" );
  writeBytes( path + ".aux.xml", "earlier too" );
  const FormulaTerrain terrain( 2560, 2560, 256, 256 ); // 100 windows, 10 and more units
  CancellingMonitor monitor( askings );
  QVERIFY_EXCEPTION_THROWN( writeSurface( terrain, request( path ), monitor, 0.0, 1.0 ), Cancelled );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), ( QStringList { "surface.tif", "surface.tif.aux.xml" } ) );
  QCOMPARE( bytesOf( path ), QByteArray( "earlier" ) );
}

void TestSurfaceWriter::failureLeavesNothing()
{
  QTemporaryDir folder;
  const QString path = folder.filePath( "surface.tif" );
  FormulaTerrain terrain( 2560, 2560, 256, 256 );
  terrain.beforeRead = []( int row ) {
    if ( row >= 1500 )
      throw std::runtime_error( "broken block" );
  };
  Monitor monitor;
  try
  {
    writeSurface( terrain, request( path ), monitor, 0.0, 1.0 );
    QFAIL( "a broken terrain was written" );
  }
  catch ( const std::runtime_error &error )
  {
    QCOMPARE( QString( error.what() ), QStringLiteral( "broken block" ) );
  }
  QVERIFY( QDir( folder.path() ).entryList( QDir::Files ).isEmpty() );
}

void TestSurfaceWriter::replacesAnEarlierFile()
{
  QTemporaryDir folder;
  const QString path = folder.filePath( "surface.tif" );
  writeBytes( path, "earlier" );
  writeBytes( path + ".aux.xml", "statistics of the earlier one" );
  writeBytes( path + ".ovr", "overviews of the earlier one" );
  writeBytes( folder.filePath( "surface.qml" ), "somebody's style" );
  Monitor monitor;
  writeSurface( FormulaTerrain( 30, 20, 30, 20 ), request( path ), monitor, 0.0, 1.0 );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), ( QStringList { "surface.qml", "surface.tif" } ) );
  QCOMPARE( readBand( path, 1 ).size(), std::size_t( 600 ) );
}

void TestSurfaceWriter::unwritable()
{
  QTemporaryDir folder;
  Monitor monitor;
  try
  {
    writeSurface(
      FormulaTerrain( 30, 20, 30, 20 ), request( folder.filePath( "no such folder/surface.tif" ) ), monitor, 0.0, 1.0 );
    QFAIL( "written into a folder that is not there" );
  }
  catch ( const std::runtime_error &error )
  {
    const QString text = QString::fromUtf8( error.what() );
    QVERIFY2( text.startsWith( "The pressure surface cannot be written to " ), error.what() );
    QVERIFY2( text.contains( "no such folder/surface.tif\"" ), error.what() );
  }
}

void TestSurfaceWriter::realTerrain()
{
  // The same hillside in metres and in feet gives the same pressures.
  QTemporaryDir folder;
  Monitor monitor;
  const GdalTerrain metres( STILLHEAD_TEST_DATA "/bei_5m_utm17n.tif" );
  const GdalTerrain feet( STILLHEAD_TEST_DATA "/bei_5m_utm17n_ft.tif" );
  writeSurface( metres, request( folder.filePath( "m.tif" ) ), monitor, 0.0, 1.0 );
  writeSurface( feet, request( folder.filePath( "ft.tif" ) ), monitor, 0.0, 1.0 );
  const std::vector<float> a = readBand( folder.filePath( "m.tif" ), 1 );
  const std::vector<float> b = readBand( folder.filePath( "ft.tif" ), 1 );
  QCOMPARE( a.size(), std::size_t( 201 * 101 ) );
  for ( std::size_t i = 0; i < a.size(); ++i )
    QVERIFY( std::abs( a[i] - b[i] ) < 4e-5F ); // 2e-5 m of rounding in the two files
  // 159.48 m and 119.81 m are the highest and lowest cells: 1.42106 psi per metre at 15 degC.
  const auto [lowest, highest] = std::minmax_element( a.begin(), a.end() );
  QVERIFY( std::abs( *lowest - ( 140.0 + 0.6 - 159.48 ) * 1.421058 ) < 1e-3 );
  QVERIFY( std::abs( *highest - ( 140.0 + 0.6 - 119.81 ) * 1.421058 ) < 1e-3 );
}

QTEST_APPLESS_MAIN( TestSurfaceWriter )
#include "testsurfacewriter.moc"
