// SPDX-License-Identifier: GPL-2.0-or-later
// Every finding of the main job: its code, place and sentence, in the user's units.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <algorithm>

using namespace stillhead::test;

class TestFindings : public QObject
{
    Q_OBJECT

  private slots:
    void ofDrawings_data();
    void ofDrawings();
    void ofTheSource_data();
    void ofTheSource();
    void summits();
    void summitThatCannotBeRuledOut();
    void systemsThatTouch();
    void missingSurvey();
    void undeclaredNoData();

  private:
    //! The only finding of the run, or none.
    static Row only( const Outcome &outcome, const QString &code );

    Slope mSlope;
};

Row TestFindings::only( const Outcome &outcome, const QString &code )
{
  const std::vector<Row> rows = outcome.features( "FINDINGS" );
  const auto ofCode = [&code]( const Row &row ) { return row["finding"].toString() == code; };
  return std::count_if( rows.begin(), rows.end(), ofCode ) == 1 ? *std::find_if( rows.begin(), rows.end(), ofCode )
                                                                : Row();
}

void TestFindings::ofDrawings_data()
{
  QTest::addColumn<QStringList>( "lines" );
  QTest::addColumn<QString>( "code" );
  QTest::addColumn<QString>( "message" );
  QTest::addColumn<QString>( "where" );
  const QString main = line( { { 0, 0 }, { 300, 0 } } );
  QTest::newRow( "near miss" ) << QStringList { main, line( { { 100, 0.4 }, { 100, 30 } } ) } << "near miss"
                               << "An end of mainlines feature 2 stops 0.400 m short of mainlines feature 1 and is not "
                                  "joined to it. If water passes "
                                  "there, move the end onto the line."
                               << at( 100, 0 );
  QTest::newRow( "crossing" ) << QStringList { main, line( { { 100, -30 }, { 100, 30 } } ) } << "crossing not joined"
                              << "Mainlines feature 2 and mainlines feature 1 cross without a joint. If water passes "
                                 "there, end a line at the crossing, "
                                 "or set JOIN_CROSSINGS."
                              << at( 100, 0 );
  QTest::newRow( "no source" ) << QStringList { main, line( { { 0, 20 }, { 100, 20 } } ) } << "no source"
                               << "100.0 m of pipe is joined to no source." << at( 50, 20 );
  QTest::newRow( "no terrain" ) << QStringList { main, line( { { 100, 0 }, { 100, 60 } } ) } << "no terrain"
                                << "19.5 m of pipe lies where the terrain has no elevation; its pressure is not known."
                                << at( 100, 50.25 );
  QTest::newRow( "duplicate" )
    << QStringList { main, line( { { 300, 0 }, { 0, 0 } } ) } << "duplicate"
    << "Mainlines feature 2 is drawn on top of mainlines feature 1, vertex by vertex; both are computed." << at( 0, 0 );
  QTest::newRow( "no length" ) << QStringList { main, line( { { 5, 5 }, { 5, 5 } } ) } << "no length"
                               << "Mainlines feature 2 has no geometry or no length, and is left out." << at( 5, 5 );
  QTest::newRow( "no geometry" ) << QStringList { main, QString() } << "no length"
                                 << "Mainlines feature 2 has no geometry or no length, and is left out." << QString();
}

void TestFindings::ofDrawings()
{
  QFETCH( QStringList, lines );
  QFETCH( QString, code );
  QFETCH( QString, message );
  QFETCH( QString, where );
  std::vector<Drawn> features;
  for ( const QString &wkt : lines )
    features.push_back( { wkt } );
  const LayerPointer mains = drawLayer( Slope::lines(), features, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const Row finding = only( outcome, code );
  QCOMPARE( finding["finding"].toString(), code );
  if ( code != "crossing not joined" ) // which of the two is named first is core's choice
    QCOMPARE( finding["message"].toString(), message );
  else
    QVERIFY( finding["message"].toString().endsWith( message.section( "cross", 1 ) ) );
  QCOMPARE( finding["gap"].isNull(), code != "near miss" );
  QCOMPARE( finding.hasGeometry(), !where.isEmpty() );
  if ( !where.isEmpty() )
    STILLHEAD_NEAR( finding.geometry().distance( QgsGeometry::fromWkt( "POINT(" + where + ")" ) ), 0.0, 1e-3 );
  QCOMPARE( finding["drawn_layer"].toString(), QString( "mainlines" ) );
}

void TestFindings::ofTheSource_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<QString>( "code" );
  QTest::addColumn<QString>( "message" );
  QTest::newRow( "one reading" ) << QVariantMap { { "SOURCE_LOW", QVariant() } } << "one reading"
                                 << "Only one value is given for the source, so the low case is the high one.";
  QTest::newRow( "pump duty" ) << QVariantMap { { "BOOST", 5 } } << "pump duty not given"
                               << "The pressure while running of the pump at the source (BOOST_LOW) is not given";
  QTest::newRow( "unusually low" )
    << QVariantMap { { "SOURCE_KIND", 0 }, { "SOURCE_VALUE", 40 }, { "SOURCE_LOW", 9 } } << "unusual pressure"
    << "The pressure of the source, 9.00 m of water, lies outside 10.6 m of water to 175.9 m of water; check its unit.";
  QTest::newRow( "unusually high" )
    << QVariantMap { { "SOURCE_KIND", 0 }, { "SOURCE_VALUE", 620 }, { "SOURCE_LOW", 62 }, { "PRESSURE_UNIT", 0 } }
    << "unusual pressure"
    << "The pressure of the source, 620.0 psi, lies outside 15 psi to 250 psi; check its unit.";
}

void TestFindings::ofTheSource()
{
  QFETCH( QVariantMap, changes );
  QFETCH( QString, code );
  QFETCH( QString, message );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( changes ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.results.value( "FINDING_COUNT" ).toInt(), 1 );
  const Row finding = only( outcome, code );
  QVERIFY2( finding["message"].toString().startsWith( message ), qPrintable( finding["message"].toString() ) );
  STILLHEAD_NEAR( finding.geometry().distance( QgsGeometry::fromWkt( "POINT(" + at( 0, 0 ) + ")" ) ), 0.0, 1e-6 );
  QVERIFY( finding["drawn_layer"].isNull() );
  QVERIFY( finding["drawn_fid"].isNull() );
}

void TestFindings::summits()
{
  // A ridge of 95 m between lower ends; the low level of 90 m does not pass it.
  const QString ridge =
    mSlope.makeTerrain( "ridge.tif", []( double east, double ) { return 95.0 - 0.2 * std::abs( east - 150.0 ); } );
  const Outcome outcome = runAlgorithm(
    "staticpressure", mSlope.parameters( { { "TERRAIN", ridge }, { "SOURCE_VALUE", 100 }, { "SOURCE_LOW", 90 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const Row finding = only( outcome, "summit" );
  // Above 90 m from 125 to 175 m along; 125 m of pipe beyond.
  QCOMPARE( finding["message"].toString(),
    QString( "The pipe rises 5.00 m above the static level of the low case here; 125.0 m of pipe beyond lies past a "
             "summit and "
             "is not served." ) );
  STILLHEAD_NEAR( finding.geometry().distance( QgsGeometry::fromWkt( "POINT(" + at( 150, 0 ) + ")" ) ), 0.0, 1e-3 );
  QStringList states;
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    if ( !states.contains( span["state"].toString() ) )
      states << span["state"].toString();
  }
  QVERIFY( states.contains( "above static level" ) );
  QVERIFY( states.contains( "past a summit" ) );
  QVERIFY( states.contains( "under limit" ) );
}

void TestFindings::summitThatCannotBeRuledOut()
{
  const QString gap = mSlope.makeTerrain(
    "gap.tif", []( double east, double ) { return east > 140.0 && east < 160.0 ? -9999.0 : 100.0 - 0.1 * east; }, {},
    []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( -9999.0 ); } );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "TERRAIN", gap } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  // Known up to the last centre with data at 140, and from 160 on.
  QCOMPARE( only( outcome, "summit unknown" )["message"].toString(),
    QString( "Every way to 140.0 m of pipe leads through pipe without elevation, so a summit on the way cannot be "
             "ruled out." ) );
  STILLHEAD_NEAR( outcome.number( "LENGTH_NO_TERRAIN" ), 20.0, 1e-3 );
}

void TestFindings::systemsThatTouch()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=system:string",
    { { line( { { 0, 0 }, { 300, 0 } } ), { "drinking" } }, { line( { { 100, 0 }, { 100, 30 } } ) } }, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( only( outcome, "systems touch" )["message"].toString(),
    QString(
      "Mainlines feature 2 (without a system) meets mainlines feature 1 (of system “drinking”); lines of different "
      "systems are not joined." ) );
}

void TestFindings::missingSurvey()
{
  const LayerPointer mains = drawLayer( "LineStringZ?crs=EPSG:32631",
    { { QString( "LINESTRINGZ(%1 99, %2 90)" ).arg( at( 0, 0 ), at( 100, 0 ) ) },
      { QString( "LINESTRINGZ(%1 0, %2 0)" ).arg( at( 100, 0 ), at( 200, 0 ) ) } },
    "pipe" );
  const Outcome outcome = runAlgorithm(
    "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "USE_LINE_Z", true } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const Row finding = only( outcome, "no survey Z" );
  QCOMPARE( finding["message"].toString(),
    QString( "Mainlines feature 2 has no surveyed Z (missing, or zero throughout); the terrain is used for it." ) );
  QCOMPARE( finding["drawn_fid"].toLongLong(), 2LL );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 70.0, 1e-6 );
}

void TestFindings::undeclaredNoData()
{
  const QString holes = mSlope.makeTerrain(
    "undeclared.tif", []( double east, double ) { return east > 150.0 ? -9999.0 : 100.0 - 0.1 * east; } );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "TERRAIN", holes } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QVERIFY( outcome.said(
    outcome.warnings, "which no ground has: the terrain may use a value for “no data” without declaring it" ) );
  const Outcome sound = runAlgorithm( "staticpressure", mSlope.parameters() );
  QVERIFY( !sound.said( sound.warnings, "which no ground has" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestFindings>( argc, argv );
}
#include "testfindings.moc"
