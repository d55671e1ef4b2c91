// SPDX-License-Identifier: GPL-2.0-or-later
// The pressure surface through the registry, on ground whose answers need no paper: pressure = 50 + east / 10 metres of
// water.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgsrasterlayer.h>
#include <qgsrasterrenderer.h>
#include <qgsrenderer.h>

#include <QFile>

using namespace stillhead::test;

class TestPressureSurface : public QObject
{
    Q_OBJECT

  private slots:
    void onTheTerrainsOwnGrid();
    void lowCaseIsTheSecondBand();
    void groundsThatAreTooHighOrLow();
    void staysWithinTheArea();
    void terrainInFeet();
    void agreesWithThePipe();
    void bandAreas();
    void groundLimits_data();
    void groundLimits();
    void groundLimitsWithinTheArea();
    void refusals_data();
    void refusals();
    void keepsWhatItIs();

  private:
    QVariantMap parameters( const QVariantMap &changes = QVariantMap() ) const;
    //! Values of a band of a file, row by row.
    static std::vector<double> cells( const QString &file, int band );

    Slope mSlope;
};

QVariantMap TestPressureSurface::parameters( const QVariantMap &changes ) const
{
  QVariantMap all { { "TERRAIN", mSlope.path( "slope.tif" ) }, { "TERRAIN_UNIT", 1 }, { "SOURCE", place( 0, 0 ) },
    { "SOURCE_KIND", 1 }, { "SOURCE_VALUE", 150 }, { "PRESSURE_UNIT", 3 }, { "LENGTH_UNIT", 1 },
    { "SURFACE", mSlope.path( "surface.tif" ) } };
  for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
    all.insert( change.key(), change.value() );
  return all;
}

std::vector<double> TestPressureSurface::cells( const QString &file, int band )
{
  const DatasetPointer dataset( GDALDataset::Open( file.toUtf8().constData() ) );
  std::vector<double> values( static_cast<std::size_t>( Slope::COLUMNS * Slope::ROWS ) );
  const CPLErr error = dataset->GetRasterBand( band )->RasterIO( GF_Read, 0, 0, Slope::COLUMNS, Slope::ROWS,
    values.data(), Slope::COLUMNS, Slope::ROWS, GDT_Float64, 0, 0, nullptr );
  return error == CE_None ? values : std::vector<double>();
}

void TestPressureSurface::onTheTerrainsOwnGrid()
{
  const Outcome outcome = runAlgorithm( "pressuresurface", parameters() );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const DatasetPointer surface( GDALDataset::Open( mSlope.path( "surface.tif" ).toUtf8().constData() ) );
  QVERIFY( surface );
  QCOMPARE( surface->GetRasterXSize(), int( Slope::COLUMNS ) );
  QCOMPARE( surface->GetRasterYSize(), int( Slope::ROWS ) );
  QCOMPARE( surface->GetRasterCount(), 1 );
  QCOMPARE( surface->GetRasterBand( 1 )->GetRasterDataType(), GDT_Float32 );
  double placement[6];
  surface->GetGeoTransform( placement );
  STILLHEAD_SAME( placement[0], 319999.5 );
  STILLHEAD_SAME( placement[3], 110040.5 );
  QCOMPARE( QString::fromUtf8( surface->GetMetadataItem( "COMPRESSION", "IMAGE_STRUCTURE" ) ), QString( "DEFLATE" ) );
  const std::vector<double> values = cells( mSlope.path( "surface.tif" ), 1 );
  for ( const int column : { 0, 37, 400 } )
    STILLHEAD_NEAR( values[static_cast<std::size_t>( 40 * Slope::COLUMNS + column )], 50.0 + 0.1 * column, 1e-5 );
}

void TestPressureSurface::lowCaseIsTheSecondBand()
{
  const Outcome outcome = runAlgorithm( "pressuresurface", parameters( { { "SOURCE_LOW", 80 }, { "COVER", 2 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<double> high = cells( mSlope.path( "surface.tif" ), 1 );
  const std::vector<double> low = cells( mSlope.path( "surface.tif" ), 2 );
  STILLHEAD_NEAR( high[0], 52.0, 1e-5 );
  // Above the static level the figure is negative, not cut off.
  STILLHEAD_NEAR( low[0], -18.0, 1e-5 );
}

void TestPressureSurface::groundsThatAreTooHighOrLow()
{
  const Outcome outcome = runAlgorithm(
    "pressuresurface", parameters( { { "SOURCE_LOW", 140 }, { "COVER", 1 }, { "LEAST", 25 }, { "MOST", 60 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_HIGH" ), 150.0, 1e-9 );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_LOW" ), 140.0, 1e-9 );
  // The pipe lies a metre below its ground.
  STILLHEAD_NEAR( outcome.number( "GROUND_TOO_HIGH" ), 116.0, 1e-9 );
  STILLHEAD_NEAR( outcome.number( "GROUND_TOO_LOW" ), 91.0, 1e-9 );
}

// 50 + east / 10: under 60 as far as east 100, 60 to 70 as far as 200, 70 and over beyond; the ground is 81 m wide and its
// plan is true to scale within 0.1 %.
void TestPressureSurface::bandAreas()
{
  const Outcome outcome = runAlgorithm(
    "pressuresurface", parameters( { { "BANDS", "60 70" }, { "BAND_AREAS", QgsProcessing::TEMPORARY_OUTPUT } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<Row> areas = outcome.features( "BAND_AREAS" );
  QCOMPARE( areas.size(), std::size_t( 3 ) );
  const double widthsM[] { 100.5, 100.0, 200.5 };
  for ( const Row &area : areas )
  {
    const int band = area["band"].toInt();
    QVERIFY( band >= 0 && band <= 2 );
    STILLHEAD_NEAR( area["area"].toDouble(), widthsM[band] * 81.0, widthsM[band] * 81.0 * 1e-3 );
    QCOMPARE( area["p_from"].isNull(), band == 0 );
    QCOMPARE( area["p_to"].isNull(), band == 2 );
    if ( band == 1 )
    {
      STILLHEAD_SAME( area["p_from"].toDouble(), 60.0 );
      STILLHEAD_SAME( area["p_to"].toDouble(), 70.0 );
    }
    QVERIFY( !area["band_text"].toString().isEmpty() );
  }
}

void TestPressureSurface::groundLimits_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<double>( "ceilingEast" );
  QTest::addColumn<double>( "floorEast" );
  QTest::addColumn<QStringList>( "labels" );
  // 50 + east / 10 in the high case; the pipe lies its cover deeper, the low case so much lower.
  QTest::newRow( "one reading" ) << QVariantMap() << 100.0 << 250.0
                                 << QStringList { "ceiling, 60 m of water, ground 90.0 m",
                                      "floor, 75 m of water, ground 75.0 m" };
  QTest::newRow( "low case and cover" ) << QVariantMap { { "SOURCE_LOW", 148 }, { "COVER", 1 } } << 110.0 << 240.0
                                        << QStringList { "ceiling, 60 m of water, ground 89.0 m",
                                             "floor, 75 m of water, ground 76.0 m" };
  QTest::newRow( "no ground so high" ) << QVariantMap { { "LEAST", 49 } } << qQNaN() << 250.0
                                       << QStringList { "floor, 75 m of water, ground 75.0 m" };
  QTest::newRow( "in feet" ) << QVariantMap { { "LENGTH_UNIT", 0 }, { "SOURCE_VALUE", 150 / 0.3048 } } << 100.0 << 250.0
                             << QStringList { "ceiling, 60 m of water, ground 295 ft",
                                  "floor, 75 m of water, ground 246 ft" };
}

void TestPressureSurface::groundLimits()
{
  QFETCH( QVariantMap, changes );
  QFETCH( double, ceilingEast );
  QFETCH( double, floorEast );
  QFETCH( QStringList, labels );
  QVariantMap all { { "LEAST", 60 }, { "MOST", 75 }, { "GROUND_LIMITS", QgsProcessing::TEMPORARY_OUTPUT } };
  for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
    all.insert( change.key(), change.value() );
  const Outcome outcome = runAlgorithm( "pressuresurface", parameters( all ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.layer( "GROUND_LIMITS" )->crs().authid(), QString( "EPSG:32631" ) );
  QStringList found;
  for ( const Row &row : outcome.features( "GROUND_LIMITS" ) )
  {
    found << row["label"].toString();
    const bool isCeiling = row["what"].toString() == "ceiling";
    STILLHEAD_SAME( row["p"].toDouble(), isCeiling ? all["LEAST"].toDouble() : 75.0 );
    STILLHEAD_SAME( row["elevation"].toDouble(), outcome.number( isCeiling ? "GROUND_TOO_HIGH" : "GROUND_TOO_LOW" ) );
    const QgsPolylineXY line = row.geometry().asPolyline();
    // From edge to edge; the higher ground, in the west, is on the left of the way north.
    STILLHEAD_NEAR( line.first().y(), 110000.0 - 40.5, 1e-6 );
    STILLHEAD_NEAR( line.last().y(), 110000.0 + 40.5, 1e-6 );
    for ( const QgsPointXY &place : line )
      STILLHEAD_NEAR( place.x() - 320000.0, isCeiling ? ceilingEast : floorEast, 1e-6 );
  }
  found.sort();
  QCOMPARE( found, labels );
}

void TestPressureSurface::groundLimitsWithinTheArea()
{
  const LayerPointer area = drawLayer( "Polygon?crs=EPSG:32631",
    { { QString( "POLYGON((%1, %2, %3, %4, %1))" )
          .arg( at( 90.5, -10.5 ), at( 120.5, -10.5 ), at( 120.5, 10.5 ), at( 90.5, 10.5 ) ) } },
    "bed" );
  const Outcome outcome = runAlgorithm( "pressuresurface",
    parameters( { { "LEAST", 60 }, { "MOST", 75 }, { "AREA", asParameter( area ) },
      { "GROUND_LIMITS", mSlope.path( "limits.gpkg" ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const QgsVectorLayer layer( mSlope.path( "limits.gpkg" ), "limits", "ogr" );
  QCOMPARE( layer.featureCount(), 1LL );
  QCOMPARE( layer.renderer()->type(), QString( "categorizedSymbol" ) );
  STILLHEAD_NEAR( layer.extent().yMinimum(), 110000.0 - 10.5, 1e-6 );
  STILLHEAD_NEAR( layer.extent().yMaximum(), 110000.0 + 10.5, 1e-6 );
}

void TestPressureSurface::staysWithinTheArea()
{
  const LayerPointer area = drawLayer( "Polygon?crs=EPSG:32631",
    { { QString( "POLYGON((%1, %2, %3, %4, %1))" )
          .arg( at( 10.5, -10.5 ), at( 20.5, -10.5 ), at( 20.5, 10.5 ), at( 10.5, 10.5 ) ) } },
    "bed" );
  const Outcome outcome = runAlgorithm( "pressuresurface", parameters( { { "AREA", asParameter( area ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const DatasetPointer surface( GDALDataset::Open( mSlope.path( "surface.tif" ).toUtf8().constData() ) );
  const double nodata = surface->GetRasterBand( 1 )->GetNoDataValue();
  int inside = 0;
  for ( const double value : cells( mSlope.path( "surface.tif" ), 1 ) )
    inside += value != nodata ? 1 : 0;
  QCOMPARE( inside, 10 * 21 );
}

void TestPressureSurface::terrainInFeet()
{
  const QString feet =
    mSlope.makeTerrain( "feet.tif", []( double east, double ) { return ( 100.0 - 0.1 * east ) / 0.3048; } );
  const Outcome outcome =
    runAlgorithm( "pressuresurface", parameters( { { "TERRAIN", feet }, { "TERRAIN_UNIT", 2 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( cells( mSlope.path( "surface.tif" ), 1 )[100], 60.0, 1e-5 );
}

void TestPressureSurface::agreesWithThePipe()
{
  QVariantMap changes { { "SURFACE", mSlope.path( "both.tif" ) }, { "SOURCE_LOW", 145 }, { "COVER", 1.5 } };
  const Outcome pipe = runAlgorithm( "staticpressure", mSlope.parameters( changes ) );
  QVERIFY2( pipe.ok, qPrintable( pipe.errors.join( '\n' ) ) );
  const Outcome surface = runAlgorithm( "pressuresurface", parameters( { { "SOURCE_LOW", 145 }, { "COVER", 1.5 } } ) );
  QVERIFY2( surface.ok, qPrintable( surface.errors.join( '\n' ) ) );
  for ( const int band : { 1, 2 } )
    QVERIFY( cells( mSlope.path( "both.tif" ), band ) == cells( mSlope.path( "surface.tif" ), band ) );
  STILLHEAD_NEAR( cells( mSlope.path( "both.tif" ), 1 )[40 * Slope::COLUMNS + 300], pipe.number( "P_HIGHEST" ), 1e-5 );
}

void TestPressureSurface::refusals_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<QString>( "sentence" );
  QTest::newRow( "no source" ) << QVariantMap { { "SOURCE", QVariant() } } << "SOURCE is not given";
  QTest::newRow( "no ground" ) << QVariantMap { { "SOURCE", place( 900, 0 ) }, { "SOURCE_KIND", 2 } }
                               << "The terrain has no elevation at the source; give SOURCE_ELEVATION";
  QTest::newRow( "limits" ) << QVariantMap { { "LEAST", 60 }, { "MOST", 50 } }
                            << "LEAST (60 m of water) is above MOST (50 m of water)";
  QTest::newRow( "input" ) << QVariantMap { { "SURFACE", mSlope.path( "slope.tif" ) } }
                           << "SURFACE would replace the input TERRAIN";
  QTest::newRow( "area missing" ) << QVariantMap { { "AREA", "/nowhere/bed.gpkg" } }
                                  << "AREA (“/nowhere/bed.gpkg”) cannot be opened as a layer of polygons";
}

void TestPressureSurface::refusals()
{
  QFETCH( QVariantMap, changes );
  QFETCH( QString, sentence );
  QVariantMap all = parameters( { { "SURFACE", mSlope.path( "refused.tif" ) } } );
  for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
    all.insert( change.key(), change.value() );
  const Outcome outcome = runAlgorithm( "pressuresurface", all );
  QVERIFY( !outcome.ok );
  QVERIFY2( outcome.errors.first().contains( sentence ), qPrintable( outcome.errors.first() ) );
  QVERIFY( !QFile::exists( mSlope.path( "refused.tif" ) ) );
}

void TestPressureSurface::keepsWhatItIs()
{
  const Outcome outcome = runAlgorithm(
    "pressuresurface", parameters( { { "SURFACE", mSlope.path( "told.tif" ) }, { "SOURCE_NOTE", "By staff" } } ) );
  QVERIFY( outcome.ok );
  QgsRasterLayer layer( mSlope.path( "told.tif" ), "told" );
  bool loaded = false;
  layer.loadDefaultMetadata( loaded );
  QVERIFY( loaded );
  QVERIFY( layer.metadata().history().join( '\n' ).contains( "Note on the source: By staff" ) );
  QVERIFY( layer.metadata().abstract().contains( "not a stamped design" ) );
  QCOMPARE( layer.renderer()->type(), QString( "singlebandpseudocolor" ) );

  const LayerPointer far = drawLayer( "Polygon?crs=EPSG:32631", { { "POLYGON((0 0, 1 0, 1 1, 0 0))" } }, "far" );
  const Outcome elsewhere = runAlgorithm( "pressuresurface", parameters( { { "AREA", asParameter( far ) } } ) );
  QVERIFY( elsewhere.said( elsewhere.errors, "AREA (“far”) lies nowhere on the terrain" ) );
  const LayerPointer none = drawLayer( "Polygon?crs=EPSG:32631", {}, "none" );
  const Outcome empty = runAlgorithm( "pressuresurface", parameters( { { "AREA", asParameter( none ) } } ) );
  QVERIFY( empty.said( empty.errors, "AREA (“none”) has no polygons" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestPressureSurface>( argc, argv );
}
#include "testpressuresurface.moc"
