// SPDX-License-Identifier: GPL-2.0-or-later
// The proposal through the registry, on a slope whose answer needs no paper: figures, rules about settings, the layer given
// back as DEVICES, texts and refusals.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

using namespace stillhead::test;

namespace
{

  //! Lengths on the ellipsoid differ from those of the grid by less than this.
  constexpr double GROUND = 1e-3;

  //! Fields that a standing regulator and a proposed one share, whatever the words about them.
  const QStringList FIGURES { "set", "rise", "status", "stage", "ground", "z", "inlet_low", "inlet_high",
    "differential", "ratio", "lockup", "pressure_zone", "p_low", "p_high", "z_low", "z_high", "serves_up_to",
    "holds_down_to", "p_failed_open", "length", "drawn_layer", "drawn_fid", "distance_along" };

} // namespace

class TestProposeRegulators : public QObject
{
    Q_OBJECT

  private slots:
    void theSlopeNeedsOne();
    void givenBackAsDevices();
    void settingsInSteps();
    void aRatioTakesTwo();
    void nothingOver();
    void whatNoneCanMend();
    void namesOfGivenDevices();
    void refusals_data();
    void refusals();
    void cancelled();

  private:
    Outcome propose( const QVariantMap &changes = {} ) const
    {
      QVariantMap all = mSlope.parameters( { { "REGULATORS", Slope::temporary() } } );
      all.remove( "NODES" );
      for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
        all.insert( change.key(), change.value() );
      return runAlgorithm( "proposeregulators", all );
    }

    Slope mSlope;
};

/**
 * Pressure is 50 + east / 10 m, limits 20 and 55, rise 7: over from east 50. The bottom lies at 70, so a regulator may hold a
 * level of 70 + 55 − 7 = 118 at most; to serve its own place (100 − east / 10) with 20 it may stand from east 20 on.
 */
void TestProposeRegulators::theSlopeNeedsOne()
{
  const Outcome outcome = propose();
  QVERIFY( outcome.ok );
  QCOMPARE( outcome.number( "REGULATOR_COUNT" ), 1.0 );
  QCOMPARE( outcome.number( "REGULATOR_BOUND" ), 1.0 );
  QCOMPARE( outcome.number( "PROVEN" ), 1.0 );
  QCOMPARE( outcome.number( "LENGTH_OVER" ), 0.0 );
  QCOMPARE( outcome.number( "LENGTH_SHORT" ), 0.0 );
  QCOMPARE( outcome.number( "LENGTH_NOT_MENDED" ), 0.0 );
  const std::vector<Row> rows = outcome.features( "REGULATORS" );
  QCOMPARE( rows.size(), std::size_t( 1 ) );
  const Row &row = rows.front();
  const auto number = [&row]( const char *name ) { return row[name].toDouble(); };
  const double east = number( "distance_along" );
  QVERIFY( east >= 20.0 && east <= 50.0 );
  QVERIFY( number( "place_from" ) <= east && east <= number( "place_to" ) );
  STILLHEAD_NEAR( number( "place_to" ), 50.0, GROUND );
  const double z = 100.0 - 0.1 * east;
  STILLHEAD_NEAR( number( "z" ), z, GROUND );
  STILLHEAD_NEAR( number( "ground" ), number( "z" ), 1e-6 );
  STILLHEAD_NEAR( number( "set_least" ), 20.0, GROUND );
  STILLHEAD_NEAR( number( "set_most" ), 118.0 - z, GROUND );
  QVERIFY( number( "set" ) >= 20.0 && number( "set" ) <= 118.0 - z );
  // The same setting works from where its lock-up is just enough for the bottom.
  STILLHEAD_NEAR( 100.0 - 0.1 * number( "place_from" ) + number( "set" ), 118.0, GROUND );
  QCOMPARE( number( "rise" ), 7.0 );
  STILLHEAD_NEAR( number( "lockup" ), number( "set" ) + 7.0, 1e-9 );
  STILLHEAD_NEAR( number( "inlet_high" ), 150.0 - z, GROUND );
  STILLHEAD_NEAR( number( "differential" ), 150.0 - z - number( "set" ), GROUND );
  STILLHEAD_NEAR( number( "ratio" ), ( 150.0 - z ) / number( "set" ), 1e-6 );
  STILLHEAD_NEAR( number( "p_low" ), number( "set" ), GROUND );
  STILLHEAD_NEAR( number( "p_high" ), z + number( "lockup" ) - 70.0, GROUND );
  STILLHEAD_NEAR( number( "z_low" ), 70.0, GROUND );
  STILLHEAD_NEAR( number( "z_high" ), z, GROUND );
  STILLHEAD_NEAR( number( "serves_up_to" ), z + number( "set" ) - 20.0, GROUND );
  STILLHEAD_NEAR( number( "holds_down_to" ), z + number( "lockup" ) - 55.0, GROUND );
  STILLHEAD_NEAR( number( "p_failed_open" ), 80.0, GROUND );
  STILLHEAD_NEAR( number( "length" ), 300.0 - east, GROUND );
  QCOMPARE( row["name"].toString(), QString( "R1" ) );
  QCOMPARE( row["kind"].toString(), QString( "regulator" ) );
  QCOMPARE( row["direction"].toString(), QString( "start to end" ) );
  QCOMPARE( row["status"].toString(), QString( "holding" ) );
  QCOMPARE( row["stage"].toInt(), 1 );
  QCOMPARE( row["drawn_layer"].toString(), QString( "mainlines" ) );
  QVERIFY( row["why"].toString().contains( "80" ) );
  const QString summary = outcome.results.value( "SUMMARY" ).toString();
  for ( const char *part : { "One regulator", "250.0 m of the 250.0 m", "No plan can have fewer.", "can fail open" } )
    QVERIFY2( summary.contains( part ), qPrintable( summary ) );
}

void TestProposeRegulators::givenBackAsDevices()
{
  const QString file = mSlope.path( "proposal.gpkg" );
  const Outcome proposed = propose( { { "REGULATORS", file } } );
  QVERIFY( proposed.ok );
  const Outcome run =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "DEVICES", file }, { "SCHEDULE", Slope::temporary() } } ) );
  QVERIFY( run.ok );
  QCOMPARE( run.number( "LENGTH_OVER" ), 0.0 );
  STILLHEAD_NEAR( run.number( "LENGTH_WITHIN" ), 300.0, GROUND );
  const std::vector<Row> before = proposed.features( "REGULATORS" );
  const std::vector<Row> after = run.features( "SCHEDULE" );
  QCOMPARE( after.size(), before.size() );
  for ( const QString &name : FIGURES )
  {
    const QVariant own = before.front().attribute( name );
    const QVariant other = after.front().attribute( name );
    if ( own.type() == QVariant::Double )
      STILLHEAD_NEAR( other.toDouble(), own.toDouble(), 1e-6 );
    else
      QCOMPARE( other, own );
  }
  // And once more: with it in place nothing is left to propose.
  const Outcome again = propose( { { "DEVICES", file } } );
  QCOMPARE( again.number( "REGULATOR_COUNT" ), 0.0 );
}

void TestProposeRegulators::settingsInSteps()
{
  const Outcome outcome = propose( { { "SETTING_STEP", 5 } } );
  const double set = outcome.features( "REGULATORS" ).front()["set"].toDouble();
  STILLHEAD_NEAR( set, 5.0 * std::round( set / 5.0 ), 1e-9 );
  QCOMPARE( outcome.number( "PROVEN" ), 1.0 );
}

// High inlet to set at most 2: a set of 20 to 25 takes inlets of 50 at most, but at the start the inlet is 50 already.
void TestProposeRegulators::aRatioTakesTwo()
{
  const Outcome outcome = propose( { { "MOST_RATIO", 1.8 } } );
  QVERIFY( outcome.ok );
  QCOMPARE( outcome.number( "REGULATOR_BOUND" ), 1.0 );
  QVERIFY( outcome.number( "REGULATOR_COUNT" ) >= 2.0 );
  QCOMPARE( outcome.number( "PROVEN" ), 0.0 );
  QCOMPARE( outcome.number( "LENGTH_OVER" ), 0.0 );
  for ( const Row &row : outcome.features( "REGULATORS" ) )
    QVERIFY( row["ratio"].toDouble() <= 1.8 + 1e-9 );
  QVERIFY( outcome.results.value( "SUMMARY" ).toString().contains( "is not proven" ) );
}

void TestProposeRegulators::nothingOver()
{
  const Outcome outcome = propose( { { "MOST", 90 } } );
  QVERIFY( outcome.ok );
  QCOMPARE( outcome.number( "REGULATOR_COUNT" ), 0.0 );
  QCOMPARE( outcome.number( "REGULATOR_BOUND" ), 0.0 );
  QCOMPARE( outcome.number( "PROVEN" ), 1.0 );
  QVERIFY( outcome.results.value( "SUMMARY" ).toString().contains( "no regulator is needed" ) );
}

/**
 * A gully before a hill: pipe at 70 under water at 150, and beyond it served ground at 124 that needs 144; the gully stands
 * 70 + 48 = 118 only.
 */
void TestProposeRegulators::whatNoneCanMend()
{
  const QString terrain = mSlope.makeTerrain( "gully.tif", []( double east, double ) {
    return east <= 100.0 ? 110.0 - 0.4 * east : std::min( 124.0, 70.0 + 0.5 * ( east - 100.0 ) );
  } );
  const Outcome outcome = propose( { { "TERRAIN", terrain } } );
  QVERIFY( outcome.ok );
  QCOMPARE( outcome.number( "REGULATOR_COUNT" ), 0.0 );
  // Over where ground lies below 95: 37.5 m down and 50 m up.
  STILLHEAD_NEAR( outcome.number( "LENGTH_NOT_MENDED" ), 62.5 + 50.0, GROUND );
  QCOMPARE( outcome.number( "LENGTH_OVER" ), outcome.number( "LENGTH_NOT_MENDED" ) );
  int told = 0;
  for ( const Row &row : outcome.features( "FINDINGS" ) )
  {
    if ( row["finding"].toString() != "cannot be mended" )
      continue;
    ++told;
    QVERIFY2( row["message"].toString().contains( "124.0" ), qPrintable( row["message"].toString() ) );
  }
  QVERIFY( told > 0 );
}

void TestProposeRegulators::namesOfGivenDevices()
{
  const LayerPointer devices = drawLayer( "Point?crs=EPSG:32631&field=name:string&field=kind:string",
    { { "POINT(" + at( 10, 0 ) + ")", { "R1", "check valve" } } }, "devices" );
  const Outcome outcome = propose( { { "DEVICES", asParameter( devices ) } } );
  QVERIFY( outcome.ok );
  QCOMPARE( outcome.features( "REGULATORS" ).front()["name"].toString(), QString( "R2" ) );
}

void TestProposeRegulators::refusals_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::addColumn<QString>( "sentence" );
  QTest::newRow( "ratio below one" ) << QVariantMap { { "MOST_RATIO", 0.5 } } << "a ratio above 1, or 0 for no limit";
  QTest::newRow( "negative ratio" ) << QVariantMap { { "MOST_RATIO", -3 } } << "a ratio above 1, or 0 for no limit";
  QTest::newRow( "rise at the limit" ) << QVariantMap { { "LOCKUP_RISE", 55 } } << "LOCKUP_RISE (55 m of water)";
  QTest::newRow( "negative step" ) << QVariantMap { { "SETTING_STEP", -5 } } << "SETTING_STEP";
  QTest::newRow( "negative drop" ) << QVariantMap { { "LEAST_DROP", -5 } } << "LEAST_DROP";
  QTest::newRow( "devices that are none" ) << QVariantMap { { "DEVICES", "nowhere.gpkg" } } << "DEVICES";
}

void TestProposeRegulators::refusals()
{
  QFETCH( QVariantMap, changes );
  QFETCH( QString, sentence );
  const Outcome outcome = propose( changes );
  QVERIFY( !outcome.ok );
  QVERIFY2( outcome.said( outcome.errors, sentence ), qPrintable( outcome.errors.join( '\n' ) ) );
}

void TestProposeRegulators::cancelled()
{
  const QString file = mSlope.path( "cancelled.gpkg" );
  QVariantMap all = mSlope.parameters( { { "REGULATORS", file } } );
  Listener listener;
  listener.cancel();
  const Outcome outcome = runAlgorithm( "proposeregulators", all, listener );
  QVERIFY( !outcome.ok );
  QVERIFY( !QFile::exists( file ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestProposeRegulators>( argc, argv );
}

#include "testproposeregulators.moc"
