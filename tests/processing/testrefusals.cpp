// SPDX-License-Identifier: GPL-2.0-or-later
// Bad input: one clear sentence that says what is wrong and what to do, and nothing written.
#include "tests/support/processingrun.h"

#include <qgsprocessingparameters.h>
#include <qgsvectorfilewriter.h>

#include <QDir>
#include <QFile>

#include <limits>

using namespace stillhead::test;

class TestRefusals : public QObject
{
    Q_OBJECT

  private slots:
    void values_data();
    void values();
    void lines_data();
    void lines();
    void terrains_data();
    void terrains();
    void places_data();
    void places();
    void placeholderForACrs();
    void coverThatIsNoNumber();
    void checkedBeforeTheRun();

  private:
    //! Runs and expects one error that holds \a sentence, and an untouched folder.
    void refuse( const QVariantMap &changes, const QString &sentence );

    Slope mSlope;
};

void TestRefusals::refuse( const QVariantMap &changes, const QString &sentence )
{
  QTemporaryDir folder;
  QVariantMap all = changes;
  all.insert( "SPANS", folder.filePath( "spans.gpkg" ) );
  all.insert( "FINDINGS", folder.filePath( "findings.gpkg" ) );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( all ) );
  QVERIFY( !outcome.ok );
  QCOMPARE( outcome.errors.size(), 1 );
  QVERIFY2( outcome.errors.first().contains( sentence ), qPrintable( outcome.errors.first() ) );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), QStringList() );
}

void TestRefusals::values_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<QString>( "sentence" );
  const auto row = [&]( const char *name, const QVariantMap &changes, const QString &sentence ) {
    QTest::newRow( name ) << changes << sentence;
  };
  row( "no value", { { "SOURCE_VALUE", QVariant() } }, "SOURCE_VALUE is not given; give the water level, in m." );
  row( "no reading", { { "SOURCE_VALUE", QVariant() }, { "SOURCE_KIND", 0 } },
    "SOURCE_VALUE is not given; give the pressure read at rest, in m of water." );
  row( "low above high", { { "SOURCE_LOW", 151 } },
    "SOURCE_LOW (151 m) is above SOURCE_VALUE (150 m); the low case must not exceed the high one: swap them." );
  row( "low pump alone", { { "BOOST_LOW", 5 } }, "BOOST_LOW is given without BOOST" );
  row( "pump upside down", { { "BOOST", 5 }, { "BOOST_LOW", 6 } },
    "BOOST_LOW (6 m of water) is above BOOST (5 m of water); a pump adds most at no flow: swap them." );
  row( "least above most", { { "LEAST", 60 }, { "MOST", 50 } },
    "LEAST (60 m of water) is above MOST (50 m of water); give limits that leave room between them." );
  row( "least by default above most", { { "MOST", 15 } },
    "LEAST (unset, so 20 m of water) is above MOST (15 m of water)" );
  row( "laterals' least above most", { { "LATERAL_LEAST", 30 }, { "LATERAL_MOST", 25 } },
    "LATERAL_LEAST (30 m of water) is above LATERAL_MOST (25 m of water)" );
  row( "band no number", { { "BANDS", "30, forty, 60" } }, "BANDS: entry 2, “forty”, is not a number" );
  row( "band twice", { { "BANDS", "30 45 45 60" } }, "BANDS: entry 3, “45”, is not above the entry before it, “45”" );
  row( "bands falling", { { "BANDS", "30;45;40" } }, "BANDS: entry 3, “40”, is not above the entry before it, “45”" );
  row(
    "decimal comma", { { "BANDS", "2,5; 3,5" } }, "BANDS: “2,5” has a decimal comma, but a point is the decimal mark" );
  row( "decimal comma that could rise", { { "BANDS", "2,5 6" } }, "“2,5” has a decimal comma" );
  row( "decimal comma among commas", { { "BANDS", "2,5,3,5" } },
    "entry 3, “3”, is not above the entry before it, “5”; write the limits in rising order (a point is the decimal "
    "mark" );
  row( "band missing", { { "BANDS", "30,,60" } }, "BANDS: entry 2 is empty" );
  row( "band not finite", { { "BANDS", "30 inf" } }, "BANDS: entry 2, “inf”, is not a number" );
  row( "ice", { { "WATER_TEMPERATURE", -0.5 } }, "WATER_TEMPERATURE is −0.5 °C, out of range; give 0 to 40 °C." );
  row( "hot water", { { "WATER_TEMPERATURE", 40.5 } }, "WATER_TEMPERATURE is 40.5 °C, out of range" );
  row( "suction", { { "SOURCE_KIND", 0 }, { "SOURCE_VALUE", -5 }, { "SOURCE_LOW", -6 } },
    "SOURCE_VALUE is −5 m of water, out of range; give a pressure from 0 to 1,020.6 m of water" );
  row( "far too much",
    { { "SOURCE_KIND", 0 }, { "SOURCE_VALUE", 150000 }, { "SOURCE_LOW", 1 }, { "PRESSURE_UNIT", 0 } },
    "SOURCE_VALUE is 150000 psi, out of range; give a pressure from 0 to 1,450 psi" );
  row( "negative limit", { { "LEAST", -1 } }, "LEAST is −1 m of water, out of range" );
  row( "negative reading error", { { "READING_ERROR", -1 } }, "READING_ERROR is −1 m of water, out of range" );
  row( "negative pump", { { "BOOST", -1 } }, "BOOST is −1 m of water, out of range" );
  row( "negative terrain error", { { "TERRAIN_RMSE", -0.3 } },
    "TERRAIN_RMSE is −0.3 m, below 0; give a distance of 0 or more." );
  row( "negative reach", { { "SOURCE_REACH", -1 } }, "SOURCE_REACH is −1 m, below 0" );
  row( "negative depth of sags", { { "SAG_DEPTH", -1 } }, "SAG_DEPTH is −1 m, below 0" );
  row( "negative tolerance", { { "JOIN_TOLERANCE", -1 } }, "JOIN_TOLERANCE is −1 m, below 0" );
  row( "text for a number", { { "SOURCE_VALUE", "65 psi" } },
    "SOURCE_VALUE is “65 psi”, which is not a number. Give the number alone" );
  row( "comma in a number", { { "SOURCE_VALUE", "4,5" } }, "with a point as decimal mark" );
  row( "not a number", { { "COVER", std::numeric_limits<double>::quiet_NaN() } },
    "COVER is “nan”, which is not a number" );
  row( "no such unit", { { "PRESSURE_UNIT", 5 } },
    "PRESSURE_UNIT is “5”; choose one of 0 (psi), 1 (kPa), 2 (bar), 3 (metres of water), 4 (feet of water)." );
  row( "no such kind", { { "SOURCE_KIND", "tank" } },
    "SOURCE_KIND is “tank”; choose one of 0 (Pressure read on a gauge)" );
}

void TestRefusals::values()
{
  QFETCH( QVariantMap, changes );
  QFETCH( QString, sentence );
  refuse( changes, sentence );
}

void TestRefusals::lines_data()
{
  QTest::addColumn<QString>( "parameter" );
  QTest::addColumn<QString>( "definition" );
  QTest::addColumn<QString>( "wkt" );
  QTest::addColumn<QString>( "sentence" );
  const QString good = line( { { 100, 0 }, { 100, 30 } } );
  QTest::newRow( "mains without CRS" )
    << "MAINS"
    << "LineString?crs=" << good << "MAINS (“drawn”) has no coordinate reference system; set the layer's CRS first.";
  QTest::newRow( "laterals without CRS" )
    << "LATERALS"
    << "LineString?crs=" << good << "LATERALS (“drawn”) has no coordinate reference system";
  QTest::newRow( "no lines" ) << "MAINS" << Slope::lines() << QString()
                              << "MAINS (“drawn”) has no lines; draw the mainlines first";
  QTest::newRow( "no length" ) << "MAINS" << Slope::lines() << line( { { 5, 5 }, { 5, 5 } } )
                               << "None of the drawn lines has any length";
  QTest::newRow( "elsewhere" )
    << "MAINS" << Slope::lines() << line( { { 9000, 0 }, { 9100, 0 } } )
    << "No drawn line lies on the terrain; check that lines and terrain cover the same ground";
}

void TestRefusals::lines()
{
  QFETCH( QString, parameter );
  QFETCH( QString, definition );
  QFETCH( QString, wkt );
  QFETCH( QString, sentence );
  std::vector<Drawn> features;
  if ( !wkt.isEmpty() )
    features.push_back( { wkt } );
  const LayerPointer layer = drawLayer( definition, features, "drawn" );
  QVariantMap changes { { parameter, asParameter( layer ) } };
  if ( wkt.contains( "9000" ) || wkt.contains( "329000" ) )
    changes.insert( "SOURCE", place( 9000, 0 ) );
  refuse( changes, sentence );
}

void TestRefusals::terrains_data()
{
  QTest::addColumn<QString>( "file" );
  QTest::addColumn<QString>( "sentence" );
  QTest::newRow( "missing" ) << "nowhere.tif"
                             << "nowhere.tif”) cannot be opened as a raster; check the file and its path.";
  QTest::newRow( "no raster" ) << "text.tif"
                               << "text.tif”) cannot be opened as a raster";
  QTest::newRow( "no CRS" ) << "nocrs.tif"
                            << "TERRAIN (“nocrs”) has no coordinate reference system; set the layer's CRS first.";
  QTest::newRow( "picture" )
    << "rgb.tif"
    << "is a picture in colours, not elevations; choose a raster whose cells hold ground elevations.";
  QTest::newRow( "palette" ) << "palette.tif"
                             << "is a picture whose cells are colours of a palette, not elevations";
}

void TestRefusals::terrains()
{
  QFETCH( QString, file );
  QFETCH( QString, sentence );
  const auto flat = []( double, double ) { return 100.0; };
  if ( file == "text.tif" )
  {
    QFile text( mSlope.path( file ) );
    QVERIFY( text.open( QIODevice::WriteOnly ) );
    text.write( "no raster" );
  }
  else if ( file == "nocrs.tif" )
    mSlope.makeTerrain( file, flat, []( SmallRaster &raster ) { raster.crs.clear(); } );
  else if ( file == "rgb.tif" )
    mSlope.makeTerrain( file, flat, []( SmallRaster &raster ) {
      raster.type = GDT_Byte;
      raster.bands = { raster.bands[0], raster.bands[0], raster.bands[0] };
    } );
  else if ( file == "palette.tif" )
    mSlope.makeTerrain(
      file, flat, []( SmallRaster &raster ) { raster.type = GDT_Byte; },
      []( GDALDataset &dataset ) {
        GDALColorTable colours;
        const GDALColorEntry white { 255, 255, 255, 255 };
        colours.SetColorEntry( 0, &white );
        dataset.GetRasterBand( 1 )->SetColorTable( &colours );
      } );
  refuse( { { "TERRAIN", mSlope.path( file ) } }, sentence );
}

void TestRefusals::places_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<QString>( "sentence" );
  QTest::newRow( "no mains" ) << QVariantMap { { "MAINS", QVariant() } }
                              << "MAINS is not given; choose a layer of lines.";
  QTest::newRow( "mains missing" ) << QVariantMap {
    { "MAINS", "/nowhere/pipe.gpkg" }
  } << "MAINS (“/nowhere/pipe.gpkg”) cannot be opened as a layer of lines; check the file and its path.";
  QTest::newRow( "laterals missing" ) << QVariantMap { { "LATERALS", "/nowhere/heads.gpkg" } }
                                      << "LATERALS (“/nowhere/heads.gpkg”) cannot be opened";
  QTest::newRow( "no terrain" ) << QVariantMap { { "TERRAIN", QVariant() } }
                                << "TERRAIN is not given; choose a raster of ground elevations.";
  QTest::newRow( "no such band" ) << QVariantMap { { "TERRAIN_BAND", 2 } }
                                  << "TERRAIN_BAND is 2, but the terrain's bands are numbered 1 to 1";
  QTest::newRow( "no source" ) << QVariantMap { { "SOURCE", QVariant() } }
                               << "SOURCE is not given; choose the point where the pressure comes from.";
  QTest::newRow( "no point" ) << QVariantMap { { "SOURCE", "the meter" } }
                              << "SOURCE is “the meter”, which is no point; write it as x,y [EPSG:code]";
  QTest::newRow( "no such CRS" ) << QVariantMap { { "SOURCE", "1,2 [EPSG:999999]" } }
                                 << "SOURCE names a CRS that is not known, “EPSG:999999”";
  QTest::newRow( "source far away" ) << QVariantMap { { "SOURCE", place( 100, 12.5 ) } }
                                     << "The source lies 12.500 m from the nearest pipe, farther than SOURCE_REACH (10 "
                                        "m); move it onto the pipe, or raise SOURCE_REACH.";
  QTest::newRow( "source beyond a short reach, in feet" )
    << QVariantMap { { "SOURCE", place( 100, 3.048 ) }, { "SOURCE_REACH", 5 }, { "LENGTH_UNIT", 0 } }
    << "The source lies 10.00 ft from the nearest pipe, farther than SOURCE_REACH (5 ft)";
  QTest::newRow( "source off the terrain" )
    << QVariantMap { { "SOURCE", place( -5, 0 ) }, { "SOURCE_KIND", 2 }, { "SOURCE_VALUE", 50 }, { "SOURCE_LOW", 50 } }
    << "The terrain has no elevation at the source; give SOURCE_ELEVATION (in a layer: `elevation`), or a terrain that "
       "reaches there.";
}

void TestRefusals::places()
{
  QFETCH( QVariantMap, changes );
  QFETCH( QString, sentence );
  refuse( changes, sentence );
}

void TestRefusals::placeholderForACrs()
{
  // A GeoPackage writes "Undefined" where there is no CRS, and the platform takes that for one.
  const LayerPointer drawn = drawLayer( "LineString?crs=", { { line( { { 0, 0 }, { 100, 0 } } ) } }, "drawn" );
  const QString plan = mSlope.path( "nocrs.gpkg" );
  QgsVectorFileWriter::SaveVectorOptions options;
  options.driverName = "GPKG";
  QCOMPARE( QgsVectorFileWriter::writeAsVectorFormatV3( drawn.get(), plan, QgsCoordinateTransformContext(), options ),
    QgsVectorFileWriter::NoError );
  QVERIFY( QgsVectorLayer( plan, "drawn", "ogr" ).crs().isValid() );
  refuse( { { "MAINS", plan } }, "has no coordinate reference system; set the layer's CRS first." );
}

void TestRefusals::coverThatIsNoNumber()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=cover:string",
    { { line( { { 0, 0 }, { 100, 0 } } ), { "2" } }, { line( { { 100, 0 }, { 200, 0 } } ), { "24 in" } } }, "pipe" );
  refuse( { { "MAINS", asParameter( mains ) } },
    "The cover of feature 2 of MAINS (“pipe”) is “24 in” by its field, which is not a number; give a number in m." );
}

void TestRefusals::checkedBeforeTheRun()
{
  // Front ends ask first: they get our sentence, not the platform's.
  const std::unique_ptr<QgsProcessingAlgorithm> algorithm(
    QgsApplication::processingRegistry()->createAlgorithmById( "stillhead:staticpressure" ) );
  QgsProcessingContext context;
  QString message;
  QVERIFY(
    !algorithm->checkParameterValues( mSlope.parameters( { { "SOURCE_VALUE", "65 psi" } } ), context, &message ) );
  QVERIFY2( message.startsWith( "SOURCE_VALUE is “65 psi”, which is not a number." ), qPrintable( message ) );
  QVERIFY( !algorithm->checkParameterValues( mSlope.parameters( { { "LENGTH_UNIT", 2 } } ), context, &message ) );
  QVERIFY2( message.startsWith( "LENGTH_UNIT is “2”; choose one of 0 (feet), 1 (metres)." ), qPrintable( message ) );
  QVERIFY2( algorithm->checkParameterValues( mSlope.parameters(), context, &message ), qPrintable( message ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestRefusals>( argc, argv );
}
#include "testrefusals.moc"
