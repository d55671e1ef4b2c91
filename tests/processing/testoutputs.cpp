// SPDX-License-Identifier: GPL-2.0-or-later
// Where results go: nothing half-written, nothing earlier lost to a run that fails, no input overwritten, formats that
// cannot hold the result refused before anything is written, style and metadata kept with the data.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgslayermetadata.h>
#include <qgsrenderer.h>
#include <qgsvectorfilewriter.h>

#include <QDir>
#include <QElapsedTimer>
#include <QFile>

using namespace stillhead::test;

namespace
{

  //! Cancels as soon as progress has reached a share.
  class Impatient : public Listener
  {
    public:
      explicit Impatient( double percent )
      {
        QObject::connect( this, &QgsFeedback::progressChanged, this, [this, percent]( double progress ) {
          if ( progress >= percent )
            cancel();
        } );
      }
  };

  QByteArray contentOf( const QString &path )
  {
    QFile file( path );
    return file.open( QIODevice::ReadOnly ) ? file.readAll() : QByteArray();
  }

} // namespace

class TestOutputs : public QObject
{
    Q_OBJECT

  private slots:
    void cancelLeavesNothing_data();
    void cancelLeavesNothing();
    void cancelLeavesEarlierResults();
    void failureLeavesEarlierResults();
    void lateCancelLeavesAGeoPackage();
    void lateCancelFinishesWhatReplaces();
    void cancelOfTheSurface_data();
    void cancelOfTheSurface();
    void severalLayersInOneFile();
    void formatsThatCannotHoldGaps_data();
    void formatsThatCannotHoldGaps();
    void shapefileHoldsWholeFigures();
    void neverOverAnInput();
    void neverOverEachOther();
    void foldersThatCannotBeWritten();
    void metadataIsKept();
    void styleIsKept();
    void progressRises();

  private:
    Slope mSlope;
};

void TestOutputs::cancelLeavesNothing_data()
{
  QTest::addColumn<double>( "percent" );
  for ( const double percent : { 0.1, 10.0, 40.0, 74.9, 76.0, 85.0, 98.0 } )
    QTest::newRow( QByteArray::number( percent ) ) << percent;
}

void TestOutputs::cancelLeavesNothing()
{
  QFETCH( double, percent );
  QTemporaryDir folder;
  const auto layer = [&folder]( const QString &name ) {
    return QString( "ogr:dbname='%1' table=\"%2\" (geom)" ).arg( folder.filePath( "result.gpkg" ), name );
  };
  Impatient impatient( percent );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "SPANS", layer( "spans" ) }, { "NODES", layer( "nodes" ) }, { "STRETCHES", folder.filePath( "a.shp" ) },
        { "EXTREMES", folder.filePath( "extremes.gpkg" ) }, { "SURFACE", folder.filePath( "surface.tif" ) } } ),
    impatient );
  QVERIFY( !outcome.ok );
  QCOMPARE( outcome.errors, QStringList( "Cancelled; nothing was written." ) );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), QStringList() );
}

void TestOutputs::cancelLeavesEarlierResults()
{
  const QString file = mSlope.path( "earlier.gpkg" );
  QVERIFY( runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ) ).ok );
  const QByteArray before = contentOf( file );
  QVERIFY( !before.isEmpty() );
  Impatient impatient( 40.0 );
  QVERIFY( !runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ), impatient ).ok );
  QCOMPARE( contentOf( file ), before );
}

void TestOutputs::failureLeavesEarlierResults()
{
  const QString file = mSlope.path( "standing.gpkg" );
  QVERIFY( runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ) ).ok );
  const QByteArray before = contentOf( file );
  QVERIFY(
    !runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file }, { "SOURCE", place( 0, 39 ) } } ) ).ok );
  // The shapefile is refused once all is computed: the GeoPackage named before it stays too.
  const LayerPointer mains = drawLayer(
    Slope::lines(), { { line( { { 0, 0 }, { 100, 0 } } ) }, { line( { { 0, 30 }, { 100, 30 } } ) } }, "pipe" );
  QVERIFY( !runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "MAINS", asParameter( mains ) }, { "SPANS", file }, { "NODES", mSlope.path( "nodes.shp" ) } } ) )
              .ok );
  QCOMPARE( contentOf( file ), before );
}

void TestOutputs::lateCancelLeavesAGeoPackage()
{
  const QString file = mSlope.path( "late.gpkg" );
  QVERIFY( runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ) ).ok );
  const QByteArray before = contentOf( file );
  Impatient impatient( 80.0 );
  QVERIFY(
    !runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file }, { "BANDS", "900" } } ), impatient ).ok );
  QCOMPARE( contentOf( file ), before );
  QCOMPARE( QgsVectorLayer( file, "earlier", "ogr" ).featureCount(), 3LL );
}

void TestOutputs::lateCancelFinishesWhatReplaces()
{
  // Once something earlier is gone the run is finished: a whole new result, never half of one.
  const QString file = mSlope.path( "replaced.geojson" );
  QVERIFY( runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ) ).ok );
  QCOMPARE( QgsVectorLayer( file, "earlier", "ogr" ).featureCount(), 3LL );
  Impatient impatient( 80.0 );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file }, { "BANDS", "900" } } ), impatient );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( QgsVectorLayer( file, "new", "ogr" ).featureCount(), 2LL );
}

void TestOutputs::cancelOfTheSurface_data()
{
  QTest::addColumn<double>( "percent" );
  for ( const double percent : { 0.1, 30.0, 60.0 } )
    QTest::newRow( QByteArray::number( percent ) ) << percent;
}

void TestOutputs::cancelOfTheSurface()
{
  QFETCH( double, percent );
  QTemporaryDir folder;
  const QVariantMap parameters { { "TERRAIN", mSlope.path( "slope.tif" ) }, { "SOURCE", place( 0, 0 ) },
    { "SOURCE_KIND", 1 }, { "SOURCE_VALUE", 150 }, { "SURFACE", folder.filePath( "surface.tif" ) },
    { "BAND_AREAS", folder.filePath( "areas.gpkg" ) }, { "LEAST", 60 },
    { "GROUND_LIMITS", folder.filePath( "limits.gpkg" ) } };
  Impatient impatient( percent );
  QVERIFY( !runAlgorithm( "pressuresurface", parameters, impatient ).ok );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), QStringList() );

  QVERIFY( runAlgorithm( "pressuresurface", parameters ).ok );
  const QByteArray surface = contentOf( folder.filePath( "surface.tif" ) );
  const QByteArray areas = contentOf( folder.filePath( "areas.gpkg" ) );
  const QByteArray limits = contentOf( folder.filePath( "limits.gpkg" ) );
  QVERIFY( !limits.isEmpty() );
  Impatient again( percent );
  QVERIFY( !runAlgorithm( "pressuresurface", parameters, again ).ok );
  QCOMPARE( contentOf( folder.filePath( "surface.tif" ) ), surface );
  QCOMPARE( contentOf( folder.filePath( "areas.gpkg" ) ), areas );
  QCOMPARE( contentOf( folder.filePath( "limits.gpkg" ) ), limits );
}

void TestOutputs::severalLayersInOneFile()
{
  const QString file = mSlope.path( "result.gpkg" );
  const auto layer = [&file]( const QString &name ) {
    return QString( "ogr:dbname='%1' table=\"%2\" (geom)" ).arg( file, name );
  };
  const QVariantMap sinks { { "SPANS", layer( "spans" ) }, { "NODES", layer( "nodes" ) },
    { "STRETCHES", layer( "stretches" ) }, { "EXTREMES", layer( "extremes" ) }, { "FINDINGS", layer( "findings" ) } };
  // Twice: the second run replaces the layers one by one and leaves others alone.
  for ( int run = 0; run < 2; ++run )
  {
    const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( sinks ) );
    QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
    QCOMPARE( QgsVectorLayer( file + "|layername=spans", "spans", "ogr" ).featureCount(), 3LL );
    QCOMPARE( QgsVectorLayer( file + "|layername=nodes", "nodes", "ogr" ).featureCount(), 2LL );
    QCOMPARE( QgsVectorLayer( file + "|layername=stretches", "stretches", "ogr" ).featureCount(), 1LL );
    QCOMPARE( QgsVectorLayer( file + "|layername=extremes", "extremes", "ogr" ).featureCount(), 3LL );
    QCOMPARE( QgsVectorLayer( file + "|layername=findings", "findings", "ogr" ).featureCount(), 0LL );
  }
}

void TestOutputs::formatsThatCannotHoldGaps_data()
{
  QTest::addColumn<QString>( "sink" );
  QTest::addColumn<QString>( "file" );
  QTest::newRow( "spans as shapefile" ) << "SPANS"
                                        << "spans.shp";
  QTest::newRow( "spans as GeoJSON" ) << "SPANS"
                                      << "spans.geojson";
  QTest::newRow( "nodes as shapefile" ) << "NODES"
                                        << "nodes.SHP";
}

void TestOutputs::formatsThatCannotHoldGaps()
{
  QFETCH( QString, sink );
  QFETCH( QString, file );
  QTemporaryDir folder;
  const LayerPointer mains = drawLayer(
    Slope::lines(), { { line( { { 0, 0 }, { 100, 0 } } ) }, { line( { { 0, 30 }, { 100, 30 } } ) } }, "pipe" );
  QVariantMap changes { { "MAINS", asParameter( mains ) }, { "SPANS", folder.filePath( "spans.gpkg" ) } };
  changes.insert( sink, folder.filePath( file ) );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( changes ) );
  QVERIFY( !outcome.ok );
  QCOMPARE( outcome.errors,
    QStringList( sink + " has places without figures (no source or no terrain), which the format of "
      + folder.filePath( file ) + " cannot hold; choose a GeoPackage (.gpkg)." ) );
  QCOMPARE( QDir( folder.path() ).entryList( QDir::Files ), QStringList() );
}

void TestOutputs::shapefileHoldsWholeFigures()
{
  const QString file = mSlope.path( "whole.shp" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( QgsVectorLayer( file, "spans", "ogr" ).featureCount(), 3LL );
}

void TestOutputs::neverOverAnInput()
{
  const LayerPointer drawn = drawLayer( Slope::lines(), { { line( { { 0, 0 }, { 300, 0 } } ) } }, "pipe" );
  const QString plan = mSlope.path( "plan.gpkg" );
  QgsVectorFileWriter::SaveVectorOptions options;
  options.driverName = "GPKG";
  options.layerName = "mainlines";
  QCOMPARE( QgsVectorFileWriter::writeAsVectorFormatV3( drawn.get(), plan, QgsCoordinateTransformContext(), options ),
    QgsVectorFileWriter::NoError );
  const QByteArray before = contentOf( plan );
  const QString mains = plan + "|layername=mainlines";
  for ( const QString &target : { plan, QString( "ogr:dbname='%1' table=\"Mainlines\" (geom)" ).arg( plan ) } )
  {
    const Outcome outcome =
      runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", mains }, { "SPANS", target } } ) );
    QVERIFY( !outcome.ok );
    QVERIFY2( outcome.errors.first().startsWith( "SPANS would replace the input MAINS" ),
      qPrintable( outcome.errors.first() ) );
    QCOMPARE( contentOf( plan ), before );
  }
  const QString terrain = mSlope.path( "slope.tif" );
  const QByteArray ground = contentOf( terrain );
  const Outcome surface = runAlgorithm( "staticpressure", mSlope.parameters( { { "SURFACE", terrain } } ) );
  QVERIFY( !surface.ok );
  QVERIFY( surface.errors.first().startsWith( "SURFACE would replace the input TERRAIN" ) );
  QCOMPARE( contentOf( terrain ), ground );
  // A layer of another name in the same file is no input.
  const Outcome beside = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "MAINS", mains }, { "SPANS", QString( "ogr:dbname='%1' table=\"spans\" (geom)" ).arg( plan ) } } ) );
  QVERIFY2( beside.ok, qPrintable( beside.errors.join( '\n' ) ) );
  QCOMPARE( QgsVectorLayer( mains, "mains", "ogr" ).featureCount(), 1LL );
}

void TestOutputs::neverOverEachOther()
{
  const QString file = mSlope.path( "both.gpkg" );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file }, { "NODES", file } } ) );
  QVERIFY( !outcome.ok );
  QVERIFY2( outcome.errors.first().contains( "would both be written to" ), qPrintable( outcome.errors.first() ) );
  QVERIFY( !QFile::exists( file ) );
}

void TestOutputs::foldersThatCannotBeWritten()
{
  // A file stands where a folder would be needed.
  const QString terrain = mSlope.path( "slope.tif" );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", terrain + "/spans.gpkg" } } ) );
  QVERIFY( !outcome.ok );
  QCOMPARE( outcome.errors.first(),
    QString( "SPANS cannot be written: no file can be made in the folder %1; choose another folder." ).arg( terrain ) );
}

void TestOutputs::metadataIsKept()
{
  const QString file = mSlope.path( "told.gpkg" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "SPANS", file }, { "SOURCE_NOTE", "Level staff, A. Gardener, 3 May, 6 h" } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  for ( const QString &where : { QString( "stored" ), QString( "in memory" ) } )
  {
    const QgsLayerMetadata metadata =
      where == "stored" ? QgsVectorLayer( file, "spans", "ogr" ).metadata() : outcome.layer( "NODES" )->metadata();
    const QString history = metadata.history().join( '\n' );
    QVERIFY2(
      metadata.abstract().contains( "of pipe" ), qPrintable( where + ": " + metadata.abstract() + metadata.title() ) );
    QVERIFY( metadata.abstract().contains( "Pressure at rest. With water running it is lower" ) );
    QVERIFY( metadata.abstract().contains( "not a stamped design" ) );
    for ( const char *fact :
      { "Made by Stillhead ", "Source: a water level at 150 m", "Level staff, A. Gardener, 3 May, 6 h",
        "Ground: terrain “slope”, band 1: 401 × 81 cells of 1 × 1 m", "chosen by TERRAIN_UNIT",
        "Weight of water: 9.79785 kPa per m of height, water at 15 °C", "PRESSURE_UNIT = 3", "MAINS = pipe" } )
      QVERIFY2( history.contains( QString::fromUtf8( fact ) ), qPrintable( where + ": " + fact + " in\n" + history ) );
  }
}

void TestOutputs::styleIsKept()
{
  const QString file = mSlope.path( "styled.gpkg" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "SPANS", file } } ) );
  QVERIFY( outcome.ok );
  const QgsVectorLayer stored( file, "spans", "ogr" );
  QCOMPARE( stored.renderer()->type(), QString( "RuleRenderer" ) );
  QCOMPARE( outcome.layer( "NODES" )->fields().field( "p_high" ).alias().contains( "m of water" ), true );
  QCOMPARE( stored.fields().field( "p_high" ).alias().contains( "m of water" ), true );
}

void TestOutputs::progressRises()
{
  Listener listener;
  std::vector<double> seen;
  QObject::connect(
    &listener, &QgsFeedback::progressChanged, &listener, [&seen]( double progress ) { seen.push_back( progress ); } );
  QVERIFY(
    runAlgorithm( "staticpressure", mSlope.parameters( { { "SURFACE", mSlope.path( "progress.tif" ) } } ), listener )
      .ok );
  QVERIFY( seen.size() > 10 );
  for ( std::size_t i = 1; i < seen.size(); ++i )
    QVERIFY2( seen[i] >= seen[i - 1], qPrintable( QString( "%1 after %2" ).arg( seen[i] ).arg( seen[i - 1] ) ) );
  QVERIFY( seen.back() >= 99.0 && seen.back() <= 100.0 );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestOutputs>( argc, argv );
}
#include "testoutputs.moc"
