// SPDX-License-Identifier: GPL-2.0-or-later
// Drawings as they come: other CRSs, parts, curves, Z and M, reversed lines, cover and system from fields, selections.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgscoordinatetransform.h>
#include <qgslinestring.h>

#include <cmath>
#include <set>

using namespace stillhead::test;

namespace
{

  //! WKT reprojected from the invented ground's CRS.
  QString inCrs( const QString &wkt, const QString &crs )
  {
    QgsGeometry geometry = QgsGeometry::fromWkt( wkt );
    geometry.transform( QgsCoordinateTransform( QgsCoordinateReferenceSystem( "EPSG:32631" ),
      QgsCoordinateReferenceSystem( crs ), QgsCoordinateTransformContext() ) );
    return geometry.asWkt( 12 );
  }

  double sumOf( const std::vector<Row> &rows, const char *field )
  {
    double sum = 0.0;
    for ( const Row &row : rows )
      sum += row[field].toDouble();
    return sum;
  }

} // namespace

class TestDrawing : public QObject
{
    Q_OBJECT

  private slots:
    void linesInAnotherCrs_data();
    void linesInAnotherCrs();
    void lateralsInAnotherCrs();
    void outlinesAreAsWideOnTheGround_data();
    void outlinesAreAsWideOnTheGround();
    void partsAreLines();
    void distanceRunsFromTheDrawnStart();
    void curvesAreFollowed();
    void zAndMAreNoHindrance();
    void drawnZIsThePipe_data();
    void drawnZIsThePipe();
    void coverOfTheFeatureGoesFirst();
    void coverMayBeDataDefined();
    void systemsStayApart();
    void selectedFeaturesOnly();
    void inputsStayAsTheyWere();

  private:
    Slope mSlope;
};

void TestDrawing::linesInAnotherCrs_data()
{
  QTest::addColumn<QString>( "crs" );
  QTest::newRow( "geographic" ) << "EPSG:4326";
  QTest::newRow( "web map" ) << "EPSG:3857";
  QTest::newRow( "next zone" ) << "EPSG:32632";
}

void TestDrawing::linesInAnotherCrs()
{
  QFETCH( QString, crs );
  const Outcome own = runAlgorithm( "staticpressure", mSlope.parameters() );
  const LayerPointer mains =
    drawLayer( "LineString?crs=" + crs, { { inCrs( line( { { 0, 0 }, { 300, 0 } } ), crs ) } }, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  // A straight line in one CRS is bent by far less than a millimetre over 300 m in the other.
  STILLHEAD_NEAR( outcome.number( "LENGTH_TOTAL" ), own.number( "LENGTH_TOTAL" ), 1e-3 );
  STILLHEAD_NEAR( outcome.number( "LENGTH_OVER" ), own.number( "LENGTH_OVER" ), 1e-3 );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 80.0, 1e-4 );
  QCOMPARE( outcome.layer( "SPANS" )->crs().authid(), crs );
  QCOMPARE( outcome.features( "SPANS" ).size(), std::size_t( 3 ) );
}

void TestDrawing::lateralsInAnotherCrs()
{
  // The lateral's start meets the main within the join tolerance although it took a way round.
  const LayerPointer laterals =
    drawLayer( "LineString?crs=EPSG:4326", { { inCrs( line( { { 100, 0 }, { 100, 30 } } ), "EPSG:4326" ) } }, "heads" );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "LATERALS", asParameter( laterals ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QVERIFY( outcome.said( outcome.infos, "LATERALS (“heads”) is reprojected from EPSG:4326" ) );
  STILLHEAD_SAME( outcome.number( "LENGTH_NO_SOURCE" ), 0.0 );
  STILLHEAD_NEAR( outcome.number( "LENGTH_TOTAL" ), 330.0, 2e-3 );
  QCOMPARE( outcome.results.value( "NODE_COUNT" ).toInt(), 4 );
  for ( const Row &span : outcome.features( "SPANS" ) )
    QVERIFY( span.geometry().boundingBox().xMinimum() > 319999.0 );
}

void TestDrawing::outlinesAreAsWideOnTheGround_data()
{
  QTest::addColumn<QString>( "crs" );
  QTest::addColumn<int>( "lengthUnit" );
  QTest::addColumn<double>( "width" );
  QTest::newRow( "own, metres" ) << "EPSG:32631" << 1 << 6.0;
  QTest::newRow( "own, feet" ) << "EPSG:32631" << 0 << 6.096;
  QTest::newRow( "geographic, metres" ) << "EPSG:4326" << 1 << 6.0;
  QTest::newRow( "web map, feet" ) << "EPSG:3857" << 0 << 6.096;
}

void TestDrawing::outlinesAreAsWideOnTheGround()
{
  QFETCH( QString, crs );
  QFETCH( int, lengthUnit );
  QFETCH( double, width );
  const double level = lengthUnit == 0 ? 150 / 0.3048 : 150.0;
  const LayerPointer mains =
    drawLayer( "LineString?crs=" + crs, { { inCrs( line( { { 0, 0 }, { 300, 0 } } ), crs ) } }, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "LENGTH_UNIT", lengthUnit }, { "SOURCE_VALUE", level },
      { "SOURCE_LOW", level } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<Row> stretches = outcome.features( "STRETCHES" );
  QCOMPARE( stretches.size(), std::size_t( 1 ) );
  QgsGeometry outline = stretches[0].geometry();
  QCOMPARE( outline.wkbType(), QgsWkbTypes::Polygon );
  outline.transform( QgsCoordinateTransform( QgsCoordinateReferenceSystem( crs ),
    QgsCoordinateReferenceSystem( "EPSG:32631" ), QgsCoordinateTransformContext() ) );
  STILLHEAD_NEAR( outline.boundingBox().height(), width, 0.02 );
}

void TestDrawing::partsAreLines()
{
  const LayerPointer mains = drawLayer( "MultiLineString?crs=EPSG:32631",
    { { QString( "MULTILINESTRING((%1, %2), (%3, %4))" )
          .arg( at( 0, 0 ), at( 100, 0 ), at( 100, 20 ), at( 100, 0 ) ) } },
    "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "LENGTH_TOTAL" ), 120.0, 1e-3 );
  STILLHEAD_SAME( outcome.number( "LENGTH_NO_SOURCE" ), 0.0 );
  QCOMPARE( outcome.layer( "SPANS" )->wkbType(), QgsWkbTypes::LineStringZM );
  for ( const Row &span : outcome.features( "SPANS" ) )
    QCOMPARE( span["drawn_fid"].toLongLong(), 1LL );
}

void TestDrawing::distanceRunsFromTheDrawnStart()
{
  // Drawn uphill, in two parts: the highest pressure stands at the start of the second part.
  const LayerPointer mains = drawLayer( "MultiLineString?crs=EPSG:32631",
    { { QString( "MULTILINESTRING((%1, %2), (%3, %4))" ).arg( at( 10, 0 ), at( 0, 0 ), at( 300, 0 ), at( 10, 0 ) ) } },
    "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  // The lowest at the end of the first part: both 10 m along.
  for ( const Row &extreme : outcome.features( "EXTREMES" ) )
    STILLHEAD_NEAR( extreme["distance_along"].toDouble(), 10.0, 1e-3 );
  // Pieces keep the drawn direction.
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    const QgsGeometry geometry = span.geometry();
    const auto *drawn = qgsgeometry_cast<const QgsLineString *>( geometry.constGet() );
    QVERIFY( drawn->startPoint().x() > drawn->endPoint().x() );
  }
}

void TestDrawing::curvesAreFollowed()
{
  // A half circle of radius 20 m: its chords are shorter by less than 1 cm of sagitta allows.
  const LayerPointer mains = drawLayer( "CompoundCurve?crs=EPSG:32631",
    { { QString( "COMPOUNDCURVE((%1, %2), CIRCULARSTRING(%2, %3, %4))" )
          .arg( at( 0, 0 ), at( 100, 0 ), at( 120, 20 ), at( 140, 0 ) ) } },
    "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QVERIFY( outcome.said( outcome.infos, "followed by chords to within 1 cm" ) );
  const double arc = 100.0 + M_PI * 20.0;
  QVERIFY( outcome.number( "LENGTH_TOTAL" ) < arc + 1e-3 );
  // Sagitta s = 1 cm on radius 20 m: chord to arc 1 − s / (3 r), off by 1 in 6,000.
  STILLHEAD_NEAR( outcome.number( "LENGTH_TOTAL" ), arc, 0.02 );
}

void TestDrawing::zAndMAreNoHindrance()
{
  const LayerPointer mains = drawLayer( "LineStringZM?crs=EPSG:32631",
    { { QString( "LINESTRINGZM(%1 7 1, %2 9 2)" ).arg( at( 0, 0 ), at( 300, 0 ) ) } }, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 80.0, 1e-6 );
}

void TestDrawing::drawnZIsThePipe_data()
{
  QTest::addColumn<int>( "unit" );
  QTest::addColumn<double>( "metresPerUnit" );
  QTest::newRow( "as the terrain" ) << 0 << 1.0;
  QTest::newRow( "metre" ) << 1 << 1.0;
  QTest::newRow( "foot" ) << 2 << 0.3048;
  QTest::newRow( "US survey foot" ) << 3 << 1200.0 / 3937.0;
}

void TestDrawing::drawnZIsThePipe()
{
  QFETCH( int, unit );
  QFETCH( double, metresPerUnit );
  const LayerPointer mains = drawLayer( "LineStringZ?crs=EPSG:32631",
    { { QString( "LINESTRINGZ(%1 %3, %2 %4)" )
          .arg( at( 0, 0 ), at( 100, 0 ) )
          .arg( 99.0 / metresPerUnit, 0, 'g', 17 )
          .arg( 90.0 / metresPerUnit, 0, 'g', 17 ) } },
    "pipe" );
  // Cover is replaced along with the terrain.
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "MAINS", asParameter( mains ) }, { "USE_LINE_Z", true }, { "LINE_Z_UNIT", unit }, { "COVER", 5 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "P_LOWEST" ), 51.0, 1e-9 );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 60.0, 1e-9 );
}

void TestDrawing::coverOfTheFeatureGoesFirst()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=Cover:string",
    { { line( { { 0, 0 }, { 100, 0 } } ), { "3" } }, { line( { { 100, 0 }, { 200, 0 } } ), { QVariant() } },
      { line( { { 200, 0 }, { 300, 0 } } ), { " " } } },
    "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "COVER", 1 }, { "MOST", 900 }, { "BANDS", "900" } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QVERIFY( outcome.said( outcome.infos, "1 of 3 drawn features have a depth of cover of their own" ) );
  const std::vector<Row> spans = outcome.features( "SPANS" );
  QCOMPARE( spans.size(), std::size_t( 3 ) );
  STILLHEAD_NEAR( spans[0]["p_low"].toDouble(), 53.0, 1e-6 );
  STILLHEAD_NEAR( spans[1]["p_low"].toDouble(), 61.0, 1e-6 );
  STILLHEAD_NEAR( spans[2]["p_high"].toDouble(), 81.0, 1e-6 );

  const Outcome warned = runAlgorithm( "staticpressure", mSlope.parameters( { { "COVER", -1 } } ) );
  QVERIFY( warned.ok );
  QVERIFY( warned.said( warned.warnings, "negative depth of cover" ) );
  const Outcome deep = runAlgorithm( "staticpressure", mSlope.parameters( { { "COVER", 24 } } ) );
  QVERIFY( deep.said( deep.warnings, "check the unit" ) );
}

void TestDrawing::coverMayBeDataDefined()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=depth:double",
    { { line( { { 0, 0 }, { 100, 0 } } ), { 2.5 } }, { line( { { 100, 0 }, { 200, 0 } } ), { QVariant() } } }, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "MAINS", asParameter( mains ) },
      { "COVER", QVariant::fromValue( QgsProperty::fromField( "depth" ) ) }, { "MOST", 900 }, { "BANDS", "900" } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<Row> spans = outcome.features( "SPANS" );
  STILLHEAD_NEAR( spans[0]["p_low"].toDouble(), 52.5, 1e-6 );
  STILLHEAD_NEAR( spans[1]["p_low"].toDouble(), 60.0, 1e-6 );
}

void TestDrawing::systemsStayApart()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=SYSTEM:string",
    { { line( { { 0, 0 }, { 100, 0 } } ), { "drinking" } }, { line( { { 100, 0 }, { 200, 0 } } ), { " drinking " } },
      { line( { { 100, 0 }, { 100, 30 } } ), { "reclaimed" } },
      { line( { { 200, 0 }, { 300, 0 } } ), { QVariant() } } },
    "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  // Reclaimed and the blank system differ from drinking water, and from each other.
  STILLHEAD_NEAR( outcome.number( "LENGTH_NO_SOURCE" ), 130.0, 1e-3 );
}

void TestDrawing::selectedFeaturesOnly()
{
  const LayerPointer mains = drawLayer( Slope::lines(),
    { { line( { { 0, 0 }, { 100, 0 } } ) }, { line( { { 100, 0 }, { 200, 0 } } ) },
      { line( { { 200, 0 }, { 300, 0 } } ) } },
    "pipe" );
  mains->select( 1 );
  mains->select( 3 );
  QgsProject::instance()->addMapLayer( mains.get(), false, false );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "MAINS", QVariant::fromValue( QgsProcessingFeatureSourceDefinition( mains->id(), true ) ) } } ) );
  QgsProject::instance()->takeMapLayer( mains.get() );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "LENGTH_TOTAL" ), 200.0, 1e-3 );
  STILLHEAD_NEAR( outcome.number( "LENGTH_NO_SOURCE" ), 100.0, 1e-3 );
  std::set<long long> fids;
  for ( const Row &span : outcome.features( "SPANS" ) )
    fids.insert( span["drawn_fid"].toLongLong() );
  QCOMPARE( fids, std::set<long long>( { 1, 3 } ) );
}

void TestDrawing::inputsStayAsTheyWere()
{
  const LayerPointer mains =
    drawLayer( Slope::lines() + "&field=name:string", { { line( { { 0, 0 }, { 300, 0 } } ), { "main" } } }, "pipe" );
  const QString before = mains->getFeature( 1 ).geometry().asWkt( 9 );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY( outcome.ok );
  QCOMPARE( mains->featureCount(), 1LL );
  QCOMPARE( mains->getFeature( 1 ).geometry().asWkt( 9 ), before );
  QCOMPARE( mains->fields().names(), QStringList( "name" ) );
  QVERIFY( !mains->isEditable() );
  QVERIFY( sumOf( outcome.features( "SPANS" ), "length" ) > 0.0 );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestDrawing>( argc, argv );
}
#include "testdrawing.moc"
