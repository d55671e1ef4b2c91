// SPDX-License-Identifier: GPL-2.0-or-later
// Both algorithms through the platform's command-line runner, as a user without a screen runs them: figures as in the
// desktop, refusals as one sentence, nothing needed that has a default.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgsvectorfilewriter.h>

#include <QDir>
#include <QFile>
#include <QJsonDocument>
#include <QJsonObject>
#include <QProcess>
#include <QStandardPaths>

using namespace stillhead::test;

class TestHeadlessRun : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase();
    void pipe();
    void surface();
    void refusal();

  private:
    struct Finished
    {
        int code = -1;
        QByteArray output;
        QByteArray errors;
    };
    Finished runTool( const QStringList &arguments ) const;
    QStringList pipeArguments( const QString &algorithm ) const;

    Slope mSlope;
    QString mTool;
};

void TestHeadlessRun::initTestCase()
{
  // Some distributions wrap the tool in a script that passes options it does not know.
  for ( const char *name : { "qgis_process.bin", "qgis_process" } )
  {
    if ( mTool.isEmpty() )
      mTool = QStandardPaths::findExecutable( name );
  }
  QVERIFY2( !mTool.isEmpty(), "the command-line runner is not installed" );
  qputenv( "QGIS_PLUGINPATH", STILLHEAD_BINARY_DIR "/headless" );
  // Fails where it is enabled already; the runs tell whether it is.
  runTool( { "plugins", "enable", "stillhead_headless" } );
  const LayerPointer drawn = drawLayer( Slope::lines(), { { line( { { 0, 0 }, { 300, 0 } } ) } }, "pipe" );
  QgsVectorFileWriter::SaveVectorOptions options;
  options.driverName = "GPKG";
  QCOMPARE( QgsVectorFileWriter::writeAsVectorFormatV3(
              drawn.get(), mSlope.path( "plan.gpkg" ), QgsCoordinateTransformContext(), options ),
    QgsVectorFileWriter::NoError );
}

TestHeadlessRun::Finished TestHeadlessRun::runTool( const QStringList &arguments ) const
{
  QProcess process;
  process.start( mTool, arguments );
  Finished finished;
  if ( !process.waitForFinished( 120000 ) )
    return finished;
  finished.code = process.exitCode();
  finished.output = process.readAllStandardOutput();
  finished.errors = process.readAllStandardError();
  return finished;
}

QStringList TestHeadlessRun::pipeArguments( const QString &algorithm ) const
{
  return { "--json", "run", "stillhead:" + algorithm, "--TERRAIN=" + mSlope.path( "slope.tif" ), "--TERRAIN_UNIT=1",
    "--SOURCE=" + place( 0, 0 ), "--SOURCE_KIND=1", "--PRESSURE_UNIT=3", "--LENGTH_UNIT=1" };
}

void TestHeadlessRun::pipe()
{
  const QString result = mSlope.path( "result.gpkg" );
  const Finished finished = runTool( pipeArguments( "staticpressure" )
    << "--MAINS=" + mSlope.path( "plan.gpkg" ) << "--SOURCE_VALUE=150"
    << QString( "--SPANS=ogr:dbname='%1' table=\"spans\" (geom)" ).arg( result )
    << QString( "--FINDINGS=ogr:dbname='%1' table=\"findings\" (geom)" ).arg( result ) );
  QVERIFY2( finished.code == 0, finished.errors.constData() );
  const QJsonObject results = QJsonDocument::fromJson( finished.output ).object().value( "results" ).toObject();
  // The same figures as in a session, to the last digit.
  const Outcome own = runAlgorithm(
    "staticpressure", mSlope.parameters( { { "MAINS", mSlope.path( "plan.gpkg" ) }, { "SOURCE_LOW", QVariant() } } ) );
  for ( const char *number :
    { "P_LOWEST", "P_HIGHEST", "LENGTH_TOTAL", "LENGTH_OVER", "STATIC_LEVEL_HIGH", "SPAN_COUNT" } )
    STILLHEAD_SAME( results.value( number ).toDouble(), own.number( number ) );
  QCOMPARE( results.value( "SUMMARY" ).toString(), own.results.value( "SUMMARY" ).toString() );
  QCOMPARE( results.value( "FINDING_COUNT" ).toInt(), 1 );
  QVERIFY( !results.contains( "NODES" ) );
  QCOMPARE( QgsVectorLayer( result + "|layername=spans", "spans", "ogr" ).featureCount(), 3LL );
  QCOMPARE( QgsVectorLayer( result + "|layername=findings", "findings", "ogr" ).featureCount(), 1LL );
}

void TestHeadlessRun::surface()
{
  const Finished finished =
    runTool( pipeArguments( "pressuresurface" ) << "--SOURCE_VALUE=150"
                                                << "--SURFACE=" + mSlope.path( "surface.tif" ) );
  QVERIFY2( finished.code == 0, finished.errors.constData() );
  const QJsonObject results = QJsonDocument::fromJson( finished.output ).object().value( "results" ).toObject();
  STILLHEAD_NEAR( results.value( "GROUND_TOO_LOW" ).toDouble(), 95.0, 1e-9 );
  QVERIFY( QFile::exists( mSlope.path( "surface.tif" ) ) );
}

void TestHeadlessRun::refusal()
{
  const Finished finished =
    runTool( pipeArguments( "staticpressure" ) << "--MAINS=" + mSlope.path( "plan.gpkg" ) << "--SOURCE_VALUE=65 psi"
                                               << "--SPANS=" + mSlope.path( "none.gpkg" ) );
  QVERIFY( finished.code != 0 );
  QVERIFY2( ( finished.output + finished.errors ).contains( "is “65 psi”, which is not a number." ),
    finished.errors.constData() );
  QVERIFY( !QFile::exists( mSlope.path( "none.gpkg" ) ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestHeadlessRun>( argc, argv );
}
#include "testheadlessrun.moc"
