// SPDX-License-Identifier: GPL-2.0-or-later
// The main job through the registry, on ground whose answers need no paper: pressure = 50 + east / 10 metres of water.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgslinestring.h>
#include <qgspoint.h>

#include <cmath>

using namespace stillhead::test;

class TestStaticPressure : public QObject
{
    Q_OBJECT

  private slots:
    void cutsAtEveryLimit();
    void sumsUp();
    void nodesStretchesAndExtremes();
    void summitsAndSags_data();
    void summitsAndSags();
    void speaksTheChosenUnits_data();
    void speaksTheChosenUnits();
    void gaugePumpAndCover();
    void withoutSourceThereAreNoFigures();
    void closeCalls();
    void bandsFollowTheLimits();
    void lateralsHaveTheirOwnLimits();
    void geometryIsInTheTerrainsUnit();
    void summaryTellsFiguresAndCautions();

  private:
    Slope mSlope;
};

void TestStaticPressure::cutsAtEveryLimit()
{
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters() );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  // 50 to 80 m of water: band limits 55 (also MOST) and 70 are met on the way.
  const std::vector<Row> spans = outcome.features( "SPANS" );
  QCOMPARE( spans.size(), std::size_t( 3 ) );
  const double ends[] = { 50, 55, 70, 80 };
  for ( int i = 0; i < 3; ++i )
  {
    const Row &span = spans[static_cast<std::size_t>( i )];
    STILLHEAD_NEAR( span["p_low"].toDouble(), ends[i], 1e-6 );
    STILLHEAD_NEAR( span["p_high"].toDouble(), ends[i + 1], 1e-6 );
    STILLHEAD_NEAR( span["z_low"].toDouble(), 150 - ends[i + 1], 1e-6 );
    STILLHEAD_NEAR( span["z_high"].toDouble(), 150 - ends[i], 1e-6 );
    QCOMPARE( span["band"].toInt(), 3 + i );
    QCOMPARE( span["over"].toBool(), i > 0 );
    QCOMPARE( span["short"].toBool(), false );
    QCOMPARE( span["role"].toString(), QString( "mainline" ) );
    QCOMPARE( span["drawn_fid"].toLongLong(), 1LL );
    QCOMPARE( span["pressure_zone"].toInt(), 1 );
    STILLHEAD_SAME( span["doubt"].toDouble(), 0.0 );
    QCOMPARE( span["close_call"].toBool(), false );
  }
  QCOMPARE( spans[0]["band_text"].toString(), QString( "40 to 55 m of water" ) );
  QCOMPARE( spans[0]["state"].toString(), QString( "within limits" ) );
  QCOMPARE( spans[1]["state"].toString(), QString( "over limit" ) );
  QCOMPARE( outcome.layer( "SPANS" )->wkbType(), QgsWkbTypes::LineStringZM );
  QCOMPARE( outcome.layer( "SPANS" )->crs().authid(), QString( "EPSG:32631" ) );
}

void TestStaticPressure::sumsUp()
{
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters() );
  QVERIFY( outcome.ok );
  double length = 0.0;
  for ( const Row &span : outcome.features( "SPANS" ) )
    length += span["length"].toDouble();
  // The ground here is 1 ± 3e-6 of the plan (UTM, 180 km off the central meridian).
  STILLHEAD_NEAR( outcome.number( "LENGTH_TOTAL" ), 300.0, 1e-3 );
  STILLHEAD_NEAR( length, outcome.number( "LENGTH_TOTAL" ), 1e-9 );
  STILLHEAD_NEAR( outcome.number( "LENGTH_WITHIN" ), 50.0, 1e-3 );
  STILLHEAD_NEAR( outcome.number( "LENGTH_OVER" ), 250.0, 1e-3 );
  STILLHEAD_SAME( outcome.number( "LENGTH_SHORT" ), 0.0 );
  STILLHEAD_SAME( outcome.number( "LENGTH_NO_SOURCE" ), 0.0 );
  STILLHEAD_SAME( outcome.number( "LENGTH_NO_TERRAIN" ), 0.0 );
  STILLHEAD_SAME( outcome.number( "LENGTH_CLOSE_CALL" ), 0.0 );
  STILLHEAD_NEAR( outcome.number( "P_LOWEST" ), 50.0, 1e-6 );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 80.0, 1e-6 );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_HIGH" ), 150.0, 1e-9 );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_LOW" ), 150.0, 1e-9 );
  QCOMPARE( outcome.results.value( "SPAN_COUNT" ).toInt(), 3 );
  QCOMPARE( outcome.results.value( "NODE_COUNT" ).toInt(), 2 );
  QCOMPARE( outcome.results.value( "STRETCH_COUNT" ).toInt(), 1 );
  QCOMPARE( outcome.results.value( "FINDING_COUNT" ).toInt(), 0 );
}

void TestStaticPressure::nodesStretchesAndExtremes()
{
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters() );
  QVERIFY( outcome.ok );
  const std::vector<Row> nodes = outcome.features( "NODES" );
  QCOMPARE( nodes.size(), std::size_t( 2 ) );
  QCOMPARE( nodes[0]["kind"].toString(), QString( "source" ) );
  QCOMPARE( nodes[1]["kind"].toString(), QString( "end" ) );
  QCOMPARE( nodes[1]["degree"].toInt(), 1 );
  STILLHEAD_NEAR( nodes[1]["z"].toDouble(), 70.0, 1e-6 );
  STILLHEAD_NEAR( nodes[1]["p_high"].toDouble(), 80.0, 1e-6 );
  QCOMPARE( nodes[1]["state"].toString(), QString( "over limit" ) );

  const std::vector<Row> stretches = outcome.features( "STRETCHES" );
  QCOMPARE( stretches.size(), std::size_t( 1 ) );
  QCOMPARE( stretches[0]["what"].toString(), QString( "over" ) );
  STILLHEAD_NEAR( stretches[0]["p_worst"].toDouble(), 80.0, 1e-6 );
  STILLHEAD_NEAR( stretches[0]["beyond"].toDouble(), 25.0, 1e-6 );
  STILLHEAD_NEAR( stretches[0]["length"].toDouble(), 250.0, 1e-3 );
  QCOMPARE( stretches[0]["mainlines"].toInt(), 1 );
  QCOMPARE( stretches[0]["laterals"].toInt(), 0 );
  QCOMPARE( stretches[0]["label"].toString(), QString( "80.0 m of water, pipe 70.0 m" ) );
  // 3 m around 250 m of straight pipe, with round ends drawn as chords.
  const QgsGeometry outline = stretches[0].geometry();
  QCOMPARE( outline.wkbType(), QgsWkbTypes::Polygon );
  STILLHEAD_NEAR( outline.area(), 250.0 * 6.0 + 0.98 * M_PI * 9.0, 1.0 );
  STILLHEAD_NEAR( outline.boundingBox().height(), 6.0, 0.01 );

  const std::vector<Row> extremes = outcome.features( "EXTREMES" );
  QCOMPARE( extremes.size(), std::size_t( 3 ) );
  QCOMPARE( extremes[0]["what"].toString(), QString( "highest" ) );
  QCOMPARE( extremes[0]["stretch"].toInt(), 1 );
  STILLHEAD_NEAR( extremes[0]["distance_along"].toDouble(), 300.0, 1e-3 );
  QCOMPARE( extremes[0]["drawn_layer"].toString(), QString( "mainlines" ) );
  QVERIFY( extremes[1]["stretch"].isNull() );
  QCOMPARE( extremes[2]["what"].toString(), QString( "lowest" ) );
  STILLHEAD_NEAR( extremes[2]["p"].toDouble(), 50.0, 1e-6 );
}

void TestStaticPressure::summitsAndSags_data()
{
  QTest::addColumn<double>( "heightM" );
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<QStringList>( "labels" );
  const QVariantMap feet { { "LENGTH_UNIT", 0 }, { "SOURCE_VALUE", 150 / 0.3048 }, { "SOURCE_LOW", 148 / 0.3048 },
    { "PRESSURE_UNIT", 4 } };
  const auto depth = []( double value ) { return QVariantMap { { "SAG_DEPTH", value } }; };
  const QStringList none;
  const QStringList both { "summit, 46.4 m of water, pipe 101.6 m", "sag, 50.0 m of water, pipe 100.0 m" };
  QTest::newRow( "unset" ) << 1.6 << QVariantMap() << both;
  QTest::newRow( "a little less than the fall" ) << 1.6 << depth( 1.59 ) << both;
  QTest::newRow( "the fall" ) << 1.6 << depth( 1.6 ) << both;
  QTest::newRow( "a little more" ) << 1.6 << depth( 1.61 ) << none;
  // Unset is half a metre, or two feet.
  QTest::newRow( "too little in metres" ) << 0.45 << QVariantMap() << none;
  QTest::newRow( "enough in metres" ) << 0.55 << QVariantMap()
                                      << QStringList { "summit, 47.5 m of water, pipe 100.5 m",
                                           "sag, 50.0 m of water, pipe 100.0 m" };
  QTest::newRow( "too little in feet" ) << 0.55 << feet << none;
  QTest::newRow( "enough in feet" ) << 0.62 << feet
                                    << QStringList { "summit, 155 ft of water, pipe 330 ft",
                                         "sag, 164 ft of water, pipe 328 ft" };
}

// From 100 m up at 100 m east, down to 100 m again at 200 m, up to 103 m at 300 m.
void TestStaticPressure::summitsAndSags()
{
  QFETCH( double, heightM );
  QFETCH( QVariantMap, changes );
  QFETCH( QStringList, labels );
  const QString hills = mSlope.makeTerrain( "hills.tif", [heightM]( double east, double ) {
    return 100.0 + ( east < 200.0 ? heightM * ( 1.0 - std::abs( 0.01 * east - 1.0 ) ) : 0.03 * ( east - 200.0 ) );
  } );
  QVariantMap all { { "TERRAIN", hills }, { "SOURCE_LOW", 148 } };
  for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
    all.insert( change.key(), change.value() );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( all ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QStringList found;
  const double metre = changes.contains( "LENGTH_UNIT" ) ? 1 / 0.3048 : 1.0;
  for ( const Row &row : outcome.features( "EXTREMES" ) )
  {
    const QString what = row["what"].toString();
    if ( what != "summit" && what != "sag" )
      continue;
    found << row["label"].toString();
    const bool isSummit = what == "summit";
    const double pipeM = isSummit ? 100.0 + heightM : 100.0;
    STILLHEAD_NEAR( row["distance_along"].toDouble(), ( isSummit ? 100.0 : 200.0 ) * metre, 0.005 );
    STILLHEAD_NEAR( row["z"].toDouble(), pipeM * metre, 1e-6 );
    STILLHEAD_NEAR( row["p"].toDouble(), ( ( isSummit ? 148.0 : 150.0 ) - pipeM ) * metre, 1e-6 );
    QVERIFY( row["stretch"].isNull() );
    QCOMPARE( row["pressure_zone"].toInt(), 1 );
    QCOMPARE( row["drawn_layer"].toString(), QString( "mainlines" ) );
    QCOMPARE( row["drawn_fid"].toLongLong(), 1LL );
  }
  QCOMPARE( found, labels );
}

void TestStaticPressure::speaksTheChosenUnits_data()
{
  // Weight of water at 15 °C: 999.1026 kg/m3 (CIPM 2001) × 9.80665 m/s2 = 9797.85 Pa per metre.
  QTest::addColumn<int>( "pressureUnit" );
  QTest::addColumn<int>( "lengthUnit" );
  QTest::addColumn<double>( "lowest" );
  QTest::addColumn<double>( "level" );
  QTest::newRow( "psi, feet" ) << 0 << 0 << 50 * 9797.85 / 6894.757293168 << 150 / 0.3048;
  QTest::newRow( "kPa, metres" ) << 1 << 1 << 50 * 9.79785 << 150.0;
  QTest::newRow( "bar, feet" ) << 2 << 0 << 50 * 0.0979785 << 150 / 0.3048;
  QTest::newRow( "metres of water" ) << 3 << 1 << 50.0 << 150.0;
  QTest::newRow( "feet of water" ) << 4 << 0 << 50 / 0.3048 << 150 / 0.3048;
}

void TestStaticPressure::speaksTheChosenUnits()
{
  QFETCH( int, pressureUnit );
  QFETCH( int, lengthUnit );
  QFETCH( double, lowest );
  QFETCH( double, level );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "PRESSURE_UNIT", pressureUnit }, { "LENGTH_UNIT", lengthUnit }, { "SOURCE_VALUE", level },
      { "SOURCE_LOW", level } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR_RELATIVE( outcome.number( "P_LOWEST" ), lowest, 1e-6 );
  STILLHEAD_NEAR_RELATIVE( outcome.number( "STATIC_LEVEL_HIGH" ), level, 1e-12 );
  STILLHEAD_NEAR_RELATIVE( outcome.number( "LENGTH_TOTAL" ), lengthUnit == 0 ? 300 / 0.3048 : 300.0, 1e-5 );
}

void TestStaticPressure::gaugePumpAndCover()
{
  // 40 m read 1.5 m above ground at 100 m; the pump adds 8 at no flow and 3 running; pipe 2 m down.
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "SOURCE_KIND", 0 }, { "SOURCE_VALUE", 40 }, { "SOURCE_LOW", 35 }, { "GAUGE_HEIGHT", 1.5 },
      { "BOOST", 8 }, { "BOOST_LOW", 3 }, { "COVER", 2 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_HIGH" ), 149.5, 1e-6 );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_LOW" ), 139.5, 1e-6 );
  STILLHEAD_NEAR( outcome.number( "P_LOWEST" ), 41.5, 1e-6 );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 81.5, 1e-6 );

  // Surveyed ground goes before the terrain; both are told with their difference.
  const Outcome surveyed = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "SOURCE_KIND", 2 }, { "SOURCE_VALUE", 50 }, { "SOURCE_LOW", 48 }, { "SOURCE_ELEVATION", 101.5 } } ) );
  QVERIFY( surveyed.ok );
  STILLHEAD_NEAR( surveyed.number( "STATIC_LEVEL_HIGH" ), 151.5, 1e-9 );
  STILLHEAD_NEAR( surveyed.number( "STATIC_LEVEL_LOW" ), 149.5, 1e-9 );
  QVERIFY(
    surveyed.said( surveyed.infos, "101.50 m surveyed, which is used; 100.00 m by the terrain; difference 1.50 m" ) );
}

void TestStaticPressure::withoutSourceThereAreNoFigures()
{
  const LayerPointer mains = drawLayer( Slope::lines(),
    { { line( { { 0, 0 }, { 100, 0 } } ) }, { line( { { 0, 30 }, { 100, 30 } } ) },
      { line( { { 100, 0 }, { 100, -60 } } ) } },
    "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "LENGTH_NO_SOURCE" ), 100.0, 1e-3 );
  // Beyond the edge at −40.5 there is no terrain.
  STILLHEAD_NEAR( outcome.number( "LENGTH_NO_TERRAIN" ), 19.5, 1e-3 );
  int without = 0;
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    const bool figures = span["state"].toString() != "no source" && span["state"].toString() != "no terrain";
    QCOMPARE( span["p_low"].isNull(), !figures );
    QCOMPARE( span["p_high"].isNull(), !figures );
    QCOMPARE( span["band"].isNull(), !figures );
    QCOMPARE( span["band_text"].isNull(), !figures );
    const QgsGeometry geometry = span.geometry();
    QCOMPARE( geometry.wkbType(), QgsWkbTypes::LineStringZM );
    const auto *drawn = qgsgeometry_cast<const QgsLineString *>( geometry.constGet() );
    QCOMPARE( std::isnan( drawn->mAt( 0 ) ), !figures );
    without += figures ? 0 : 1;
  }
  QCOMPARE( without, 2 );

  // Nothing has figures: the extremes are null, not 0.
  const LayerPointer off =
    drawLayer( Slope::lines(), { { line( { { 50, 80 }, { 50, 40.4 }, { 50, 90 } } ) } }, "pipe" );
  const Outcome none = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "MAINS", asParameter( off ) }, { "SOURCE", place( 50, 90 ) },
      { "TERRAIN",
        mSlope.makeTerrain(
          "hole.tif", []( double, double ) { return -9999.0; }, {},
          []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetNoDataValue( -9999 ); } ) } } ) );
  QVERIFY2( none.ok, qPrintable( none.errors.join( '\n' ) ) );
  QVERIFY( none.results.contains( "P_LOWEST" ) );
  QVERIFY( !none.results.value( "P_LOWEST" ).isValid() );
  QVERIFY( !none.results.value( "P_HIGHEST" ).isValid() );
}

void TestStaticPressure::closeCalls()
{
  // Doubt: a water level needs no ground at the source, so √( (1.96 × 0.5)² + 1² ) = 1.40014 m of water.
  const double doubt = std::sqrt( 0.98 * 0.98 + 1.0 );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "TERRAIN_RMSE", 0.5 }, { "READING_ERROR", 1 } } ) );
  QVERIFY( outcome.ok );
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    STILLHEAD_NEAR( span["doubt"].toDouble(), doubt, 1e-9 );
    const double middle = 0.5 * ( span["p_low"].toDouble() + span["p_high"].toDouble() );
    QCOMPARE( span["close_call"].toBool(), std::abs( middle - 55.0 ) < doubt );
  }
  STILLHEAD_NEAR( outcome.number( "LENGTH_CLOSE_CALL" ), 20.0 * doubt, 1e-3 );
}

void TestStaticPressure::bandsFollowTheLimits()
{
  // Unset with a limit given: LEAST, the two thirds between, MOST, 1.25 × MOST.
  const Outcome thirds = runAlgorithm( "staticpressure", mSlope.parameters( { { "LEAST", 45 }, { "MOST", 60 } } ) );
  QVERIFY( thirds.ok );
  QStringList texts;
  for ( const Row &span : thirds.features( "SPANS" ) )
    texts << span["band_text"].toString();
  QCOMPARE( texts,
    QStringList( { "50 to 55 m of water", "55 to 60 m of water", "60 to 75 m of water", "75 m of water and over" } ) );

  const Outcome given = runAlgorithm( "staticpressure", mSlope.parameters( { { "BANDS", "52.5; 60 78" } } ) );
  QVERIFY( given.ok );
  texts.clear();
  for ( const Row &span : given.features( "SPANS" ) )
    texts << span["band_text"].toString();
  // MOST (55) cuts too, within a band.
  QCOMPARE( texts,
    QStringList( { "under 52.5 m of water", "52.5 to 60 m of water", "52.5 to 60 m of water", "60 to 78 m of water",
      "78 m of water and over" } ) );
}

void TestStaticPressure::lateralsHaveTheirOwnLimits()
{
  const LayerPointer laterals = drawLayer( Slope::lines(), { { line( { { 40, 0 }, { 40, 20 } } ) } }, "heads" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "LATERALS", asParameter( laterals ) }, { "LATERAL_LEAST", 10 }, { "LATERAL_MOST", 50 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  int seen = 0;
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    if ( span["role"].toString() != "lateral" )
      continue;
    ++seen;
    // 54 m: within 20 to 55, but over 50.
    QCOMPARE( span["state"].toString(), QString( "over limit" ) );
  }
  QCOMPARE( seen, 1 );
  QVERIFY(
    outcome.results.value( "SUMMARY" ).toString().contains( "20 to 55 m of water (laterals 10 to 50 m of water)" ) );
}

void TestStaticPressure::geometryIsInTheTerrainsUnit()
{
  // The same ground in feet; figures stay in metres, Z turns to feet, M is the pressure.
  const QString feet = mSlope.makeTerrain(
    "feet.tif", []( double east, double ) { return ( 100.0 - 0.1 * east ) / 0.3048; }, {},
    []( GDALDataset &dataset ) { dataset.GetRasterBand( 1 )->SetUnitType( "ft" ); } );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "TERRAIN", feet }, { "TERRAIN_UNIT", 0 } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QVERIFY( outcome.said( outcome.infos, "unit foot (the band says so)" ) );
  STILLHEAD_NEAR( outcome.number( "P_HIGHEST" ), 80.0, 1e-6 );
  const std::vector<Row> nodes = outcome.features( "NODES" );
  STILLHEAD_NEAR( nodes[1]["z"].toDouble(), 70.0, 1e-6 );
  const QgsGeometry geometry = nodes[1].geometry();
  const auto *point = qgsgeometry_cast<const QgsPoint *>( geometry.constGet() );
  STILLHEAD_NEAR( point->z(), 70.0 / 0.3048, 1e-6 );
  STILLHEAD_NEAR( point->m(), 80.0, 1e-6 );
}

void TestStaticPressure::summaryTellsFiguresAndCautions()
{
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "PRESSURE_UNIT", 0 }, { "LENGTH_UNIT", 0 }, { "SOURCE_VALUE", 492.126 }, { "SOURCE_LOW", 492.126 } } ) );
  QVERIFY( outcome.ok );
  const QString summary = outcome.results.value( "SUMMARY" ).toString();
  // 80 psi stands 56.30 m of water, which is met 62.96 m along; 300 m are 984 ft.
  QVERIFY2(
    summary.startsWith(
      "Of 984 ft of pipe, 207 ft stands within 30 to 80 psi at rest, 778 ft is over (778 ft of it mainlines)." ),
    qPrintable( summary ) );
  QVERIFY( summary.contains( "The highest pressure is 113.7 psi at pipe elevation 230 ft (high case), the lowest 71.1 "
                             "psi at 328 ft (low case)." ) );
  QVERIFY( summary.contains( "elevation 492.1 ft in the high case and 492.1 ft in the low case" ) );
  QVERIFY( summary.contains( "0.43314 psi per ft of height, water at 15 °C" ) );
  QVERIFY( summary.contains( "Pressure at rest. With water running it is lower" ) );
  QVERIFY( summary.contains( "not a stamped design" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestStaticPressure>( argc, argv );
}
#include "teststaticpressure.moc"
