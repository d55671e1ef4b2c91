// SPDX-License-Identifier: GPL-2.0-or-later
// The demo park, made afresh by its scripts and run through the registry, against the figures that the demo promises
// (tests/demo/figures.csv: worked by hand, or counted by a brute force that shares no code with ours).
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgsgeometry.h>
#include <qgslinestring.h>
#include <qgsvectorlayer.h>

#include <QFile>
#include <QProcess>
#include <QTextStream>

#include <algorithm>
#include <cmath>

using namespace stillhead::test;

class TestDemoPark : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase();
    void figures_data();
    void figures();
    void namesTheWorstPlaces();
    void findsSummitsAndSags();
    void findsWhatWasDrawnWrong();
    void everyMetreIsAccountedFor();
    void surfaceAgreesWithThePipe();

  private:
    QMap<QString, double> found() const;
    std::vector<Row> spansOf( const QString &name ) const;
    const QgsLineString *drawn( const QString &name ) const;
    double lengthIn( const QString &state ) const;
    double runBegin( const QString &name, const QString &state ) const;
    double runEnd( const QString &name, const QString &state ) const;
    QgsPoint pipeAt( const QString &name, bool atStart ) const;

    QTemporaryDir mFolder;
    LayerPointer mMains;
    LayerPointer mLaterals;
    Outcome mOutcome;
    std::vector<Row> mSpans;
    QMap<QString, QgsGeometry> mDrawn;
};

namespace
{

  constexpr double METRES_PER_FOOT = 0.3048;

  struct Figure
  {
      QString name;
      double value = 0.0;
      double tolerance = 0.0;
  };

  std::vector<Figure> readFigures()
  {
    std::vector<Figure> figures;
    QFile file( QStringLiteral( STILLHEAD_SOURCE_DIR "/tests/demo/figures.csv" ) );
    if ( !file.open( QIODevice::ReadOnly | QIODevice::Text ) )
      return figures;
    QTextStream lines( &file );
    while ( !lines.atEnd() )
    {
      const QString line = lines.readLine();
      if ( line.startsWith( '#' ) )
        continue;
      const QStringList cells = line.split( ';' );
      figures.push_back( { cells.at( 0 ), cells.at( 1 ).toDouble(), cells.at( 2 ).toDouble() } );
    }
    return figures;
  }

  const QgsLineString *lineOf( const QgsGeometry &geometry )
  {
    return qgsgeometry_cast<const QgsLineString *>( geometry.constGet()->simplifiedTypeRef() );
  }

} // namespace

void TestDemoPark::initTestCase()
{
  const QString terrain = mFolder.filePath( QStringLiteral( "terrain.tif" ) );
  const QString planning = mFolder.filePath( QStringLiteral( "planning.gpkg" ) );
  const QString scripts = QStringLiteral( STILLHEAD_SOURCE_DIR "/demo_project/" );
  QCOMPARE( QProcess::execute( scripts + QStringLiteral( "make_terrain.py" ), { terrain } ), 0 );
  QCOMPARE( QProcess::execute( scripts + QStringLiteral( "make_layers.py" ), { planning } ), 0 );
  const auto open = [&planning]( const QString &name ) {
    return std::make_unique<QgsVectorLayer>(
      planning + QStringLiteral( "|layername=" ) + name, name, QStringLiteral( "ogr" ) );
  };
  mMains = open( QStringLiteral( "mainlines" ) );
  mLaterals = open( QStringLiteral( "laterals" ) );
  QCOMPARE( mMains->featureCount(), 4L );
  QCOMPARE( mLaterals->featureCount(), 41L );
  for ( QgsVectorLayer *layer : { mMains.get(), mLaterals.get() } )
  {
    QgsFeatureIterator features = layer->getFeatures();
    QgsFeature feature;
    while ( features.nextFeature( feature ) )
      mDrawn.insert( feature.attribute( QStringLiteral( "name" ) ).toString(), feature.geometry() );
  }

  const QString memory = QgsProcessing::TEMPORARY_OUTPUT;
  mOutcome = runAlgorithm( QStringLiteral( "staticpressure" ),
    { { QStringLiteral( "MAINS" ), asParameter( mMains ) }, { QStringLiteral( "LATERALS" ), asParameter( mLaterals ) },
      { QStringLiteral( "TERRAIN" ), terrain }, { QStringLiteral( "SOURCE" ), place( 40, 380 ) },
      { QStringLiteral( "SOURCE_KIND" ), 0 }, { QStringLiteral( "SOURCE_VALUE" ), 71 },
      { QStringLiteral( "SOURCE_LOW" ), 62 }, { QStringLiteral( "GAUGE_HEIGHT" ), 2.5 },
      { QStringLiteral( "LEAST" ), 30 }, { QStringLiteral( "MOST" ), 80 },
      { QStringLiteral( "BANDS" ), QStringLiteral( "30,45,60,80,100" ) }, { QStringLiteral( "TERRAIN_RMSE" ), 0.3 },
      { QStringLiteral( "READING_ERROR" ), 1 }, { QStringLiteral( "SPANS" ), memory },
      { QStringLiteral( "NODES" ), memory }, { QStringLiteral( "STRETCHES" ), memory },
      { QStringLiteral( "EXTREMES" ), memory }, { QStringLiteral( "FINDINGS" ), memory },
      { QStringLiteral( "SURFACE" ), mFolder.filePath( QStringLiteral( "surface.tif" ) ) } } );
  QVERIFY2( mOutcome.ok, qPrintable( mOutcome.errors.join( '\n' ) ) );
  mSpans = mOutcome.features( QStringLiteral( "SPANS" ) );
}

std::vector<Row> TestDemoPark::spansOf( const QString &name ) const
{
  std::vector<Row> spans;
  std::copy_if( mSpans.begin(), mSpans.end(), std::back_inserter( spans ),
    [&name]( const Row &span ) { return span["name"].toString() == name; } );
  return spans;
}

double TestDemoPark::lengthIn( const QString &state ) const
{
  double length = 0.0;
  for ( const Row &span : mSpans )
    length += span["state"].toString() == state ? span["length"].toDouble() : 0.0;
  return length;
}

//! Where the first pipe in \a state begins, in feet along the drawn line; grid and ground lengths agree here.
double TestDemoPark::runBegin( const QString &name, const QString &state ) const
{
  double begin = std::numeric_limits<double>::infinity();
  for ( const Row &span : spansOf( name ) )
  {
    if ( span["state"].toString() == state )
      begin = std::min(
        begin, mDrawn.value( name ).lineLocatePoint( QgsGeometry( lineOf( span.geometry() )->startPoint().clone() ) ) );
  }
  return begin / METRES_PER_FOOT;
}

double TestDemoPark::runEnd( const QString &name, const QString &state ) const
{
  double end = -std::numeric_limits<double>::infinity();
  for ( const Row &span : spansOf( name ) )
  {
    if ( span["state"].toString() == state )
      end = std::max(
        end, mDrawn.value( name ).lineLocatePoint( QgsGeometry( lineOf( span.geometry() )->endPoint().clone() ) ) );
  }
  return end / METRES_PER_FOOT;
}

//! The end of a drawn line in the result: Z is the pipe, M the pressure of the high case.
QgsPoint TestDemoPark::pipeAt( const QString &name, bool atStart ) const
{
  const QgsLineString *drawn = lineOf( mDrawn.value( name ) );
  const QgsPoint end = atStart ? drawn->startPoint() : drawn->endPoint();
  for ( const Row &span : spansOf( name ) )
  {
    for ( const QgsPoint &vertex : { lineOf( span.geometry() )->startPoint(), lineOf( span.geometry() )->endPoint() } )
    {
      if ( vertex.x() == end.x() && vertex.y() == end.y() )
        return vertex;
    }
  }
  return QgsPoint();
}

QMap<QString, double> TestDemoPark::found() const
{
  QMap<QString, double> found;
  const auto number = [this, &found]( const QString &figure, const QString &output ) {
    found.insert( figure, mOutcome.number( output ) );
  };
  number( QStringLiteral( "static level high" ), QStringLiteral( "STATIC_LEVEL_HIGH" ) );
  number( QStringLiteral( "static level low" ), QStringLiteral( "STATIC_LEVEL_LOW" ) );
  number( QStringLiteral( "length drawn" ), QStringLiteral( "LENGTH_TOTAL" ) );
  number( QStringLiteral( "length within" ), QStringLiteral( "LENGTH_WITHIN" ) );
  number( QStringLiteral( "length over" ), QStringLiteral( "LENGTH_OVER" ) );
  number( QStringLiteral( "length no terrain" ), QStringLiteral( "LENGTH_NO_TERRAIN" ) );
  number( QStringLiteral( "length no source" ), QStringLiteral( "LENGTH_NO_SOURCE" ) );
  number( QStringLiteral( "length close call" ), QStringLiteral( "LENGTH_CLOSE_CALL" ) );
  for ( const char *state : { "under limit", "above static level", "past a summit" } )
    found.insert( QStringLiteral( "length %1" ).arg( state ), lengthIn( QString::fromLatin1( state ) ) );
  double overMainlines = 0.0;
  for ( const Row &span : mSpans )
    overMainlines +=
      span["over"].toBool() && span["role"].toString() == QLatin1String( "mainline" ) ? span["length"].toDouble() : 0.0;
  found.insert( QStringLiteral( "length over, mainlines" ), overMainlines );
  found.insert(
    QStringLiteral( "length over, laterals" ), mOutcome.number( QStringLiteral( "LENGTH_OVER" ) ) - overMainlines );
  found.insert( QStringLiteral( "doubt" ), spansOf( QStringLiteral( "Terrace main" ) ).front()["doubt"].toDouble() );

  const QgsPoint meter = pipeAt( QStringLiteral( "Terrace main" ), true );
  found.insert( QStringLiteral( "Terrace main, pipe at the meter" ), meter.z() );
  found.insert( QStringLiteral( "Terrace main, at the meter, high" ), meter.m() );
  const QgsPoint pondEnd = pipeAt( QStringLiteral( "Pond main" ), false );
  found.insert( QStringLiteral( "Pond main end, pipe" ), pondEnd.z() );
  found.insert( QStringLiteral( "Pond main end, high" ), pondEnd.m() );
  const QgsPoint lawnEnd = pipeAt( QStringLiteral( "West Lawn 2" ), false );
  found.insert( QStringLiteral( "West Lawn 2 end, pipe" ), lawnEnd.z() );
  found.insert( QStringLiteral( "West Lawn 2 end, high" ), lawnEnd.m() );
  // The cases differ by the 9 psi between the two readings, everywhere.
  const QgsPoint bankEnd = pipeAt( QStringLiteral( "Heron Bank" ), false );
  found.insert( QStringLiteral( "Heron Bank far end, pipe" ), bankEnd.z() );
  found.insert( QStringLiteral( "Heron Bank far end, low" ), bankEnd.m() - 9.0 );

  for ( const Row &extreme : mOutcome.features( QStringLiteral( "EXTREMES" ) ) )
  {
    const bool ofStretch = !extreme["stretch"].isNull();
    const bool highest = extreme["what"].toString() == QLatin1String( "highest" );
    const bool onMain = extreme["drawn_layer"].toString() == QLatin1String( "mainlines" );
    if ( ofStretch && highest && onMain && extreme["drawn_fid"].toInt() == 1 )
    {
      found.insert( QStringLiteral( "Wren Gully, pipe" ), extreme["z"].toDouble() );
      found.insert( QStringLiteral( "Wren Gully, along" ), extreme["distance_along"].toDouble() );
      found.insert( QStringLiteral( "Wren Gully, high" ), extreme["p"].toDouble() );
    }
    if ( !ofStretch && highest )
    {
      found.insert( QStringLiteral( "Mill Meadow, worst pipe" ), extreme["z"].toDouble() );
      found.insert( QStringLiteral( "Mill Meadow, worst, high" ), extreme["p"].toDouble() );
    }
    if ( !ofStretch && extreme["what"].toString() == QLatin1String( "lowest" ) )
    {
      found.insert( QStringLiteral( "Heron Bank, highest pipe" ), extreme["z"].toDouble() );
      found.insert( QStringLiteral( "Heron Bank, highest pipe, low" ), extreme["p"].toDouble() );
      found.insert( QStringLiteral( "Heron Bank, highest pipe, high" ), extreme["p"].toDouble() + 9.0 );
    }
  }
  double highestPipe = 0.0;
  double lowest = 100.0;
  for ( const Row &span : spansOf( QStringLiteral( "Kite Hill 2" ) ) )
  {
    highestPipe = std::max( highestPipe, span["z_high"].toDouble() );
    lowest = std::min( lowest, span["p_low"].toDouble() );
  }
  found.insert( QStringLiteral( "Kite Hill 2, highest pipe" ), highestPipe );
  found.insert( QStringLiteral( "Kite Hill 2, lowest, low" ), lowest );

  const QString over = QStringLiteral( "over limit" );
  found.insert( QStringLiteral( "Terrace main, over from" ), runBegin( QStringLiteral( "Terrace main" ), over ) );
  found.insert( QStringLiteral( "Terrace main, over to" ), runEnd( QStringLiteral( "Terrace main" ), over ) );
  found.insert( QStringLiteral( "Meadow main, over from" ), runBegin( QStringLiteral( "Meadow main" ), over ) );
  found.insert( QStringLiteral( "Pond main, over from" ), runBegin( QStringLiteral( "Pond main" ), over ) );
  const QString unknown = QStringLiteral( "no terrain" );
  found.insert( QStringLiteral( "Pond main, no terrain from" ), runBegin( QStringLiteral( "Pond main" ), unknown ) );
  found.insert( QStringLiteral( "Pond main, no terrain to" ), runEnd( QStringLiteral( "Pond main" ), unknown ) );
  found.insert( QStringLiteral( "Hill main, under from" ),
    runBegin( QStringLiteral( "Hill main" ), QStringLiteral( "under limit" ) ) );
  const QString above = QStringLiteral( "above static level" );
  found.insert(
    QStringLiteral( "Heron Bank, above static level from" ), runBegin( QStringLiteral( "Heron Bank" ), above ) );
  found.insert(
    QStringLiteral( "Heron Bank, above static level to" ), runEnd( QStringLiteral( "Heron Bank" ), above ) );

  int nearMisses = 0;
  int crossings = 0;
  for ( const Row &finding : mOutcome.features( QStringLiteral( "FINDINGS" ) ) )
  {
    if ( finding["finding"].toString() == QLatin1String( "near miss" ) )
    {
      ++nearMisses;
      found.insert( QStringLiteral( "near miss, gap" ), finding["gap"].toDouble() );
    }
    if ( finding["finding"].toString() == QLatin1String( "crossing not joined" ) )
    {
      ++crossings;
      found.insert( QStringLiteral( "crossing, u" ), finding.geometry().asPoint().x() - 320000.0 );
    }
  }
  found.insert( QStringLiteral( "near misses" ), nearMisses );
  found.insert( QStringLiteral( "crossings not joined" ), crossings );
  return found;
}

void TestDemoPark::figures_data()
{
  QTest::addColumn<double>( "actual" );
  QTest::addColumn<double>( "promised" );
  QTest::addColumn<double>( "allowed" );
  const QMap<QString, double> answers = found();
  const std::vector<Figure> figures = readFigures();
  QVERIFY( figures.size() > 40 );
  for ( const Figure &figure : figures )
    QTest::newRow( figure.name.toUtf8().constData() )
      << answers.value( figure.name, std::numeric_limits<double>::quiet_NaN() ) << figure.value << figure.tolerance;
}

void TestDemoPark::figures()
{
  QFETCH( double, actual );
  QFETCH( double, promised );
  QFETCH( double, allowed );
  STILLHEAD_NEAR( actual, promised, allowed );
}

void TestDemoPark::namesTheWorstPlaces()
{
  QStringList labels;
  for ( const Row &stretch : mOutcome.features( QStringLiteral( "STRETCHES" ) ) )
    labels << stretch["what"].toString() + QStringLiteral( ": " ) + stretch["label"].toString();
  labels.sort();
  QCOMPARE( labels,
    ( QStringList { QStringLiteral( "over: 100 psi, pipe 336 ft" ), QStringLiteral( "over: 106 psi, pipe 323 ft" ),
      QStringLiteral( "over: 92 psi, pipe 354 ft" ), QStringLiteral( "over: 95 psi, pipe 348 ft" ),
      QStringLiteral( "short: −4 psi, pipe 555 ft" ) } ) );
}

// By hand: the meter (both mains fall from it, ground 400.0), the gully (ground 350.0), the shoulder of the hill (ground 400 + 0.04 × 242 + 146.8 × 0.3580² = 428.5 ft at 692 m) and the lowest of the meadow.
void TestDemoPark::findsSummitsAndSags()
{
  QStringList labels;
  for ( const Row &extreme : mOutcome.features( QStringLiteral( "EXTREMES" ) ) )
  {
    const QString what = extreme["what"].toString();
    if ( what == QLatin1String( "summit" ) || what == QLatin1String( "sag" ) )
      labels << extreme["label"].toString();
  }
  QCOMPARE( labels,
    ( QStringList { QStringLiteral( "summit, 64 psi, pipe 398 ft" ), QStringLiteral( "sag, 95 psi, pipe 348 ft" ),
      QStringLiteral( "summit, 52 psi, pipe 426 ft" ), QStringLiteral( "sag, 106 psi, pipe 323 ft" ) } ) );
}

void TestDemoPark::findsWhatWasDrawnWrong()
{
  QStringList codes;
  for ( const Row &finding : mOutcome.features( QStringLiteral( "FINDINGS" ) ) )
    codes << finding["finding"].toString();
  codes.sort();
  // The pipe beyond the pond is reached only through pipe without elevation.
  QCOMPARE( codes,
    ( QStringList { QStringLiteral( "crossing not joined" ), QStringLiteral( "near miss" ),
      QStringLiteral( "no source" ), QStringLiteral( "no terrain" ), QStringLiteral( "summit" ),
      QStringLiteral( "summit unknown" ) } ) );
}

void TestDemoPark::everyMetreIsAccountedFor()
{
  double length = 0.0;
  for ( const Row &span : mSpans )
    length += span["length"].toDouble();
  STILLHEAD_NEAR( length, mOutcome.number( QStringLiteral( "LENGTH_TOTAL" ) ), 1e-6 );
  double planar = 0.0;
  for ( const QgsGeometry &geometry : mDrawn )
    planar += geometry.length() / METRES_PER_FOOT;
  // Ground is 0.8 mm longer than grid per kilometre here.
  STILLHEAD_NEAR_RELATIVE( length, planar, 1.5e-6 );
}

// On the terrace the pipe lies 2 ft under the ground, so it stands 2 ft of water above the surface's figure.
void TestDemoPark::surfaceAgreesWithThePipe()
{
  const DatasetPointer surface(
    GDALDataset::Open( mFolder.filePath( QStringLiteral( "surface.tif" ) ).toUtf8().constData() ) );
  QVERIFY( surface );
  const auto at = [&surface]( int u, int v, int band ) {
    float value = 0.0F;
    const CPLErr error =
      surface->GetRasterBand( band )->RasterIO( GF_Read, u, 700 - v, 1, 1, &value, 1, 1, GDT_Float32, 0, 0 );
    return error == CE_None ? static_cast<double>( value ) : std::numeric_limits<double>::quiet_NaN();
  };
  STILLHEAD_NEAR( at( 40, 380, 1 ), 72.95 - 2.0 * 0.433138, 0.006 );
  STILLHEAD_NEAR( at( 40, 380, 2 ), 63.95 - 2.0 * 0.433138, 0.006 );
  STILLHEAD_NEAR( at( 300, 380, 1 ), 94.61 - 2.0 * 0.433138, 0.006 );
  // In the pond there is no ground, so there is no pressure.
  QCOMPARE( at( 805, 150, 1 ), surface->GetRasterBand( 1 )->GetNoDataValue() );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestDemoPark>( argc, argv );
}

#include "testdemopark.moc"
