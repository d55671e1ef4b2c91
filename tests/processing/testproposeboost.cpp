// SPDX-License-Identifier: GPL-2.0-or-later
// Boosters through the registry, on a slope drawn uphill whose answer needs no paper; the layer given back as DEVICES; texts.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

using namespace stillhead::test;

namespace
{

  //! Lengths on the ellipsoid differ from those of the grid by less than this.
  constexpr double GROUND = 1e-3;

} // namespace

class TestProposeBoost : public QObject
{
    Q_OBJECT

  private slots:
    void theSlopeNeedsOne();
    void givenBackAsDevices();
    void nothingShort();
    void whereARegulatorFollows();

  private:
    //! The source at the foot of the slope: ground 70, level 100; LEAST 20 is missed above 80, east of 200 downwards.
    Outcome propose( const QVariantMap &changes = {} ) const
    {
      QVariantMap all = mSlope.parameters( { { "BOOSTERS", Slope::temporary() }, { "SOURCE", place( 300, 0 ) },
        { "SOURCE_VALUE", 100 }, { "SOURCE_LOW", 100 }, { "BOOST_RISE", 5 } } );
      all.remove( "NODES" );
      for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
        all.insert( change.key(), change.value() );
      return runAlgorithm( "proposeboost", all );
    }

    Slope mSlope;
};

/**
 * Metres of water; ground falls from 100 at east 0 to 70 at east 300. The top needs a level of 120, so 20 more; at no flow that
 * makes 125, which the foot (70 + 55) stands: the booster stands at the source's end.
 */
void TestProposeBoost::theSlopeNeedsOne()
{
  const Outcome outcome = propose();
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.number( "BOOSTER_COUNT" ), 1.0 );
  STILLHEAD_NEAR( outcome.number( "BOOST_MOST" ), 20.0, GROUND );
  QCOMPARE( outcome.number( "LENGTH_SHORT" ), 0.0 );
  QCOMPARE( outcome.number( "LENGTH_OVER" ), 0.0 );
  const std::vector<Row> rows = outcome.features( "BOOSTERS" );
  QCOMPARE( rows.size(), std::size_t( 1 ) );
  const Row &row = rows.front();
  QCOMPARE( row["name"].toString(), QString( "B1" ) );
  QCOMPARE( row["kind"].toString(), QString( "booster" ) );
  STILLHEAD_NEAR( row["boost_low"].toDouble(), 20.0, GROUND );
  STILLHEAD_NEAR( row["boost"].toDouble(), 25.0, GROUND );
  QCOMPARE( row["direction"].toString(), QString( "end to start" ) );
  STILLHEAD_NEAR( row["distance_along"].toDouble(), 300.0, 1.0 );
  STILLHEAD_NEAR( row["inlet_low"].toDouble(), 30.0, GROUND );
  STILLHEAD_NEAR( row["outlet_high"].toDouble(), 55.0, GROUND );
  STILLHEAD_NEAR( row["length_short"].toDouble(), 200.0, GROUND );
  STILLHEAD_NEAR( row["z_high"].toDouble(), 100.0, GROUND );
  STILLHEAD_NEAR( row["served_without"].toDouble(), 80.0, GROUND );
  QCOMPARE( row["regulator_follows"].toBool(), false );
  QVERIFY( row["why"].toString().contains( "80" ) );
  const QString summary = outcome.results.value( "SUMMARY" ).toString();
  for ( const char *part : { "One booster", "200.0 m of the 200.0 m", "With them in place" } )
    QVERIFY2( summary.contains( part ), qPrintable( summary ) );
}

void TestProposeBoost::givenBackAsDevices()
{
  const QString file = mSlope.path( "boosters.gpkg" );
  QVERIFY( propose( { { "BOOSTERS", file } } ).ok );
  const Outcome run = runAlgorithm( "staticpressure",
    mSlope.parameters(
      { { "DEVICES", file }, { "SOURCE", place( 300, 0 ) }, { "SOURCE_VALUE", 100 }, { "SOURCE_LOW", 100 } } ) );
  QVERIFY2( run.ok, qPrintable( run.errors.join( '\n' ) ) );
  QCOMPARE( run.number( "LENGTH_SHORT" ), 0.0 );
  QCOMPARE( run.number( "LENGTH_OVER" ), 0.0 );
  // And once more: with it in place nothing is short.
  QCOMPARE( propose( { { "DEVICES", file } } ).number( "BOOSTER_COUNT" ), 0.0 );
}

void TestProposeBoost::nothingShort()
{
  const Outcome outcome = propose( { { "LEAST", 0 } } );
  QVERIFY( outcome.ok );
  QCOMPARE( outcome.number( "BOOSTER_COUNT" ), 0.0 );
  QVERIFY( outcome.results.value( "SUMMARY" ).toString().contains( "no booster is needed" ) );
}

void TestProposeBoost::whereARegulatorFollows()
{
  // A rise of 40 at no flow: 20 + 40 is more than 55 − 20 leaves anywhere.
  const Outcome outcome = propose( { { "BOOST_RISE", 40 } } );
  QVERIFY( outcome.ok );
  const Row row = outcome.features( "BOOSTERS" ).front();
  QCOMPARE( row["regulator_follows"].toBool(), true );
  STILLHEAD_NEAR( row["distance_along"].toDouble(), 200.0, GROUND );
  QVERIFY( outcome.number( "LENGTH_NEWLY_OVER" ) > 0.0 );
  QVERIFY( row["why"].toString().contains( "a regulator must follow" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestProposeBoost>( argc, argv );
}

#include "testproposeboost.moc"
