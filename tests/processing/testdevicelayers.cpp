// SPDX-License-Identifier: GPL-2.0-or-later
// Sources and devices from layers: what rows may hold, what is refused and how, and what comes of devices in NODES, SPANS and
// FINDINGS.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

using namespace stillhead::test;

namespace
{

  //! Lengths on the ellipsoid differ from those of the grid by less than this.
  constexpr double GROUND = 1e-3;

  const QString DEVICE_FIELDS = "Point?crs=EPSG:32631&field=name:string&field=kind:string&field=set:string"
                                "&field=rise:double&field=boost:double&field=boost_low:double&field=direction:string";
  const QString SOURCE_FIELDS = "Point?crs=EPSG:32631&field=name:string&field=kind:string&field=value:string"
                                "&field=low:double&field=note:string";

  Drawn point( double east, double north, const QVariantList &attributes )
  {
    return { "POINT(" + at( east, north ) + ")", attributes };
  }

  LayerPointer devices( const std::vector<Drawn> &rows )
  {
    return drawLayer( DEVICE_FIELDS, rows, "devices" );
  }

  LayerPointer sources( const std::vector<Drawn> &rows )
  {
    return drawLayer( SOURCE_FIELDS, rows, "sources" );
  }

  //! The row of NODES with a name; a row without a name if there is none.
  Row nodeOf( const Outcome &outcome, const QString &name )
  {
    for ( const Row &row : outcome.features( "NODES" ) )
    {
      if ( row["name"].toString() == name )
        return row;
    }
    return Row();
  }

  QString messageOf( const Outcome &outcome, const QString &finding )
  {
    for ( const Row &row : outcome.features( "FINDINGS" ) )
    {
      if ( row["finding"].toString() == finding )
        return row["message"].toString();
    }
    return QString();
  }

} // namespace

class TestDeviceLayers : public QObject
{
    Q_OBJECT

  private slots:
    void aRegulatorInNodes();
    void theUsualRise();
    void closedValveIsTwoNodes();
    void fieldsThatAreMissing();
    void failedOpenOnSpans();
    void scheduleOfAllKinds();
    void sourcesInPlaceOfOne();
    void messages_data();
    void messages();
    void refusals_data();
    void refusals();

  private:
    Outcome run( const LayerPointer &rows, const QVariantMap &changes = {} ) const
    {
      QVariantMap all = mSlope.parameters( { { "DEVICES", asParameter( rows ) } } );
      for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
        all.insert( change.key(), change.value() );
      return runAlgorithm( "staticpressure", all );
    }

    Slope mSlope;
};

// The slope's pressure is 50 + east / 10; at east 100 pipe lies at 90 m.
void TestDeviceLayers::aRegulatorInNodes()
{
  const LayerPointer rows = devices( { point( 100, 0, { "Gate", "REGULATOR", "30", 4, {}, {}, "Start to End" } ) } );
  const Outcome outcome = run( rows );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const Row node = nodeOf( outcome, "Gate" );
  QCOMPARE( node["kind"].toString(), QString( "device" ) );
  QCOMPARE( node["degree"].toInt(), 2 );
  STILLHEAD_NEAR( node["p_in_high"].toDouble(), 60.0, GROUND );
  STILLHEAD_NEAR( node["p_in_low"].toDouble(), 60.0, GROUND );
  STILLHEAD_NEAR( node["p_high"].toDouble(), 34.0, GROUND );
  STILLHEAD_NEAR( node["p_low"].toDouble(), 30.0, GROUND );
  QCOMPARE( node["status"].toString(), QString( "holding" ) );
  QCOMPARE( outcome.number( "NODE_COUNT" ), 3.0 );
  // The end: 30 m below the level of 90 + 34.
  double highest = 0.0;
  for ( const Row &row : outcome.features( "SPANS" ) )
    highest = std::max( highest, row["pressure_zone"].toInt() == 2 ? row["p_high"].toDouble() : 0.0 );
  STILLHEAD_NEAR( highest, 90.0 + 34.0 - 70.0, GROUND );
}

// Where a regulator has no rise of its own: LOCKUP_RISE, else 7 m of water.
void TestDeviceLayers::theUsualRise()
{
  const LayerPointer rows = devices( { point( 100, 0, { "Gate", "regulator", "30" } ) } );
  STILLHEAD_NEAR( nodeOf( run( rows ), "Gate" )["p_high"].toDouble(), 37.0, GROUND );
  STILLHEAD_NEAR( nodeOf( run( rows, { { "LOCKUP_RISE", 2 } } ), "Gate" )["p_high"].toDouble(), 32.0, GROUND );
}

void TestDeviceLayers::closedValveIsTwoNodes()
{
  const Outcome outcome = run( devices( { point( 100, 0, { "Shut", "closed valve" } ) } ) );
  int rows = 0;
  for ( const Row &row : outcome.features( "NODES" ) )
    rows += row["name"].toString() == "Shut" ? 1 : 0;
  QCOMPARE( rows, 2 );
  STILLHEAD_NEAR( outcome.number( "LENGTH_NO_SOURCE" ), 200.0, GROUND );
}

// Only kind and what it needs must be there, in whatever case the fields are named.
void TestDeviceLayers::fieldsThatAreMissing()
{
  const LayerPointer rows = drawLayer( "Point?crs=EPSG:32631&field=Kind:string&field=SET:double",
    { { "POINT(" + at( 100, 0 ) + ")", { "regulator", 30 } } }, "devices" );
  const Outcome outcome = run( rows );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( nodeOf( outcome, "feature 1" )["p_low"].toDouble(), 30.0, GROUND );
}

void TestDeviceLayers::failedOpenOnSpans()
{
  const LayerPointer rows = devices( { point( 100, 0, { "Gate", "regulator", "30", 4 } ) } );
  for ( const Row &row : run( rows ).features( "SPANS" ) )
    QVERIFY( row["p_failed_open"].isNull() && row["failed_open_cause"].isNull() );
  bool seen = false;
  for ( const Row &row : run( rows, { { "FAILED_OPEN", 1 } } ).features( "SPANS" ) )
  {
    if ( row["pressure_zone"].toInt() == 1 )
    {
      QCOMPARE( row["p_failed_open"].toDouble(), row["p_high"].toDouble() );
      QVERIFY( row["failed_open_cause"].isNull() );
      continue;
    }
    QCOMPARE( row["failed_open_cause"].toString(), QString( "Gate" ) );
    STILLHEAD_NEAR( row["p_failed_open"].toDouble(), 150.0 - row["z_low"].toDouble(), 1e-6 );
    seen = true;
  }
  QVERIFY( seen );
}

void TestDeviceLayers::scheduleOfAllKinds()
{
  const LayerPointer rows = devices( { point( 50, 0, { "Pump", "booster", {}, {}, 10, 5 } ),
    point( 100, 0, { "Flap", "check valve" } ), point( 150, 0, { "Zone", "control valve" } ),
    point( 200, 0, { "Gate", "regulator", "30", 4 } ), point( 250, 0, { "Shut", "closed valve" } ) } );
  const Outcome outcome = run( rows, { { "SCHEDULE", Slope::temporary() } } );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<Row> schedule = outcome.features( "SCHEDULE" );
  QCOMPARE( schedule.size(), std::size_t( 5 ) );
  for ( const Row &row : schedule )
  {
    QVERIFY( !row["why"].toString().isEmpty() );
    const bool regulates = row["kind"].toString() == "regulator";
    for ( const char *name : { "set", "rise", "lockup", "differential", "ratio", "set_most", "status" } )
      QCOMPARE( row[name].isNull(), !regulates );
    STILLHEAD_NEAR( row["distance_along"].toDouble(), 10.0 * ( 100.0 - row["z"].toDouble() ), GROUND );
  }
  // Pumped water at 160 and 155 stands 80 − 10 at east 200.
  STILLHEAD_NEAR( schedule[3]["inlet_high"].toDouble(), 80.0, GROUND );
  STILLHEAD_NEAR( schedule[3]["inlet_low"].toDouble(), 75.0, GROUND );
  STILLHEAD_NEAR( schedule[3]["ratio"].toDouble(), 80.0 / 30.0, GROUND );
}

void TestDeviceLayers::sourcesInPlaceOfOne()
{
  const LayerPointer rows = sources( { point( 0, 0, { "Tank", "water level", "150", 148, "by letter" } ),
    point( 300, 0, { "Well", "pressure reading", "30" } ) } );
  const LayerPointer parted = devices( { point( 200, 0, { "Shut", "closed valve" } ) } );
  QVariantMap changes { { "SOURCES", asParameter( rows ) }, { "SOURCE", QVariant() }, { "SOURCE_VALUE", QVariant() } };
  const Outcome outcome = run( parted, changes );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_HIGH" ), 150.0, 1e-6 );
  STILLHEAD_NEAR( outcome.number( "STATIC_LEVEL_LOW" ), 148.0, 1e-6 );
  // Beyond the valve the well's 30 m at 70 m.
  double highest = 0.0;
  for ( const Row &row : outcome.features( "SPANS" ) )
    highest = std::max( highest, row["z_high"].toDouble() < 80.0 + 1e-6 ? row["p_high"].toDouble() : 0.0 );
  STILLHEAD_NEAR( highest, 30.0, GROUND );
  // Joined without the valve they disagree by 50 m.
  QVariantMap all = mSlope.parameters( changes );
  const Outcome joined = runAlgorithm( "staticpressure", all );
  QVERIFY( !joined.ok );
  for ( const char *part : { "“Tank”", "“Well”", "50.00 m", "mainlines feature 1" } )
    QVERIFY2( joined.said( joined.errors, part ), qPrintable( joined.errors.join( '\n' ) ) );
}

void TestDeviceLayers::messages_data()
{
  QTest::addColumn<double>( "east" );
  QTest::addColumn<double>( "north" );
  QTest::addColumn<QVariantList>( "row" );
  QTest::addColumn<QString>( "finding" );
  QTest::addColumn<QString>( "part" );
  QTest::newRow( "wide open" ) << 100.0 << 0.0 << QVariantList { "Gate", "regulator", "65" } << "regulator wide open"
                               << "only 60.00 m of water reaches it";
  QTest::newRow( "differential" ) << 100.0 << 0.0 << QVariantList { "Gate", "regulator", "55" }
                                  << "regulator short of differential"
                                  << "only 5.0";
  QTest::newRow( "trapped" ) << 100.0 << 0.0 << QVariantList { "Flap", "check valve" } << "pressure may be trapped"
                             << "“Flap”";
  QTest::newRow( "off the line" ) << 100.0 << 5.0 << QVariantList { "Gate", "regulator", "30" } << "device off the line"
                                  << "5.000 m from the nearest pipe (mainlines feature 1)";
  QTest::newRow( "duty" ) << 100.0 << 0.0 << QVariantList { "Pump", "booster", {}, {}, 10 } << "pump duty not given"
                          << "The booster “Pump” has no `boost_low`";
}

void TestDeviceLayers::messages()
{
  QFETCH( double, east );
  QFETCH( double, north );
  QFETCH( QVariantList, row );
  QFETCH( QString, finding );
  QFETCH( QString, part );
  const QString message = messageOf( run( devices( { point( east, north, row ) } ) ), finding );
  QVERIFY2( message.contains( part ), qPrintable( message ) );
}

void TestDeviceLayers::refusals_data()
{
  QTest::addColumn<QVariantList>( "row" );
  QTest::addColumn<QString>( "sentence" );
  const QString begin = "DEVICES, feature 1: ";
  QTest::newRow( "unknown kind" ) << QVariantList { "x", "tap" }
                                  << begin + "`kind` is “tap”; write one of: regulator, booster, check valve,";
  QTest::newRow( "no kind" ) << QVariantList { "x" } << begin + "`kind` is “”; write one of:";
  QTest::newRow( "no set" ) << QVariantList { "x", "regulator" } << begin + "the regulator has no `set`";
  QTest::newRow( "set with unit" ) << QVariantList { "x", "regulator", "30 m" }
                                   << begin + "`set` is “30 m”, which is no number";
  QTest::newRow( "negative set" ) << QVariantList { "x", "regulator", "-3" } << begin + "`set` (−3";
  QTest::newRow( "no boost" ) << QVariantList { "x", "booster" } << begin + "the booster has no `boost`";
  QTest::newRow( "duty above shutoff" ) << QVariantList { "x", "booster", {}, {}, 5, 9 }
                                        << begin + "`boost_low` is above `boost`";
  QTest::newRow( "direction" ) << QVariantList { "x", "regulator", "30", {}, {}, {}, "uphill" }
                               << begin + "`direction` is “uphill”; write one of: from the source,";
}

void TestDeviceLayers::refusals()
{
  QFETCH( QVariantList, row );
  QFETCH( QString, sentence );
  const Outcome outcome = run( devices( { point( 100, 0, row ) } ) );
  QVERIFY( !outcome.ok );
  QVERIFY2( outcome.said( outcome.errors, sentence ), qPrintable( outcome.errors.join( '\n' ) ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestDeviceLayers>( argc, argv );
}

#include "testdevicelayers.moc"
