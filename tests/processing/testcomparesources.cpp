// SPDX-License-Identifier: GPL-2.0-or-later
// Options for the connection through the registry: order, figures equal to those of the algorithms that look at one, an
// option that cannot be answered, and refusals.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

using namespace stillhead::test;

class TestCompareSources : public QObject
{
    Q_OBJECT

  private slots:
    void figuresAreThoseOfEachAlone();
    void theOrderFollowsTheCriterion_data();
    void theOrderFollowsTheCriterion();
    void anOptionThatCannotBeAnswered();
    void refusedWhereNoneCan();

  private:
    //! Points east of the slope's start with their water levels (elevations).
    LayerPointer options( const std::vector<std::pair<double, double>> &eastAndLevel ) const
    {
      auto layer = std::make_unique<QgsVectorLayer>(
        "Point?crs=EPSG:32631&field=name:string&field=kind:string&field=value:double", "options", "memory" );
      QgsFeatureList rows;
      for ( const auto &[east, level] : eastAndLevel )
      {
        QgsFeature row( layer->fields() );
        row.setAttribute( "name", QString( "east %1" ).arg( east ) );
        row.setAttribute( "kind", "water level" );
        row.setAttribute( "value", level );
        row.setGeometry( QgsGeometry::fromWkt( QStringLiteral( "POINT(%1)" ).arg( at( east, 0 ) ) ) );
        rows << row;
      }
      layer->dataProvider()->addFeatures( rows );
      return layer;
    }

    Outcome compare( const LayerPointer &layer, const QVariantMap &changes = {} ) const
    {
      QVariantMap all =
        mSlope.parameters( { { "COMPARISON", Slope::temporary() }, { "OPTIONS", asParameter( layer ) } } );
      for ( const char *name : { "NODES", "SOURCE", "SOURCE_VALUE", "SOURCE_LOW", "SOURCE_KIND" } )
        all.remove( name );
      for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
        all.insert( change.key(), change.value() );
      return runAlgorithm( "comparesources", all );
    }

    Slope mSlope;
};

void TestCompareSources::figuresAreThoseOfEachAlone()
{
  const LayerPointer layer = options( { { 0, 150 }, { 0, 110 } } );
  const Outcome outcome = compare( layer );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.number( "OPTION_COUNT" ), 2.0 );
  // 150 − z is over 55 from east 50 down; 110 − z is short of 20 down to east 100.
  QCOMPARE( outcome.number( "BEST" ), 2.0 );
  const std::vector<Row> rows = outcome.features( "COMPARISON" );
  QCOMPARE( rows.size(), std::size_t( 2 ) );
  const QVariantMap alone { { "SOURCE_KIND", 1 }, { "SOURCE_VALUE", 150 }, { "SOURCE_LOW", 150 } };
  const Outcome one = runAlgorithm( "staticpressure", mSlope.parameters( alone ) );
  const Row &row = rows.back();
  QCOMPARE( row["rank"].toInt(), 2 );
  QCOMPARE( row["name"].toString(), QString( "east 0" ) );
  for ( const auto &[own, other] : std::vector<std::pair<const char *, const char *>> {
          { "length_within", "LENGTH_WITHIN" }, { "length_over", "LENGTH_OVER" }, { "length_short", "LENGTH_SHORT" },
          { "p_low", "P_LOWEST" }, { "p_high", "P_HIGHEST" }, { "level_high", "STATIC_LEVEL_HIGH" } } )
    STILLHEAD_NEAR( row[own].toDouble(), one.number( other ), 1e-9 );
  QCOMPARE( row["regulators"].toInt(), 1 );
  QCOMPARE( row["proven"].toBool(), true );
  QCOMPARE( row["boosters"].toInt(), 0 );
  QCOMPARE( rows.front()["regulators"].toInt(), 0 );
  // The top of 100 needs a level of 120: 10 more.
  QCOMPARE( rows.front()["boosters"].toInt(), 1 );
  STILLHEAD_NEAR( rows.front()["boost"].toDouble(), 10.0, 1e-3 );
}

void TestCompareSources::theOrderFollowsTheCriterion_data()
{
  QTest::addColumn<int>( "sortBy" );
  QTest::addColumn<int>( "best" );
  QTest::newRow( "longest within" ) << 0 << 2;
  QTest::newRow( "least over" ) << 1 << 2;
  QTest::newRow( "least short" ) << 2 << 1;
  QTest::newRow( "fewest regulators" ) << 3 << 2;
  QTest::newRow( "least boost" ) << 4 << 1;
}

void TestCompareSources::theOrderFollowsTheCriterion()
{
  QFETCH( const int, sortBy );
  QFETCH( const int, best );
  const LayerPointer layer = options( { { 0, 150 }, { 0, 110 } } );
  QCOMPARE( compare( layer, { { "SORT_BY", sortBy } } ).number( "BEST" ), static_cast<double>( best ) );
}

void TestCompareSources::anOptionThatCannotBeAnswered()
{
  const LayerPointer layer = options( { { 2000, 150 }, { 0, 110 } } );
  const Outcome outcome = compare( layer );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.number( "BEST" ), 2.0 );
  const Row row = outcome.features( "COMPARISON" ).back();
  QVERIFY( row["length_within"].isNull() );
  QVERIFY2( row["note"].toString().contains( "1,700" ) || row["note"].toString().contains( "1700" ),
    qPrintable( row["note"].toString() ) );
}

void TestCompareSources::refusedWhereNoneCan()
{
  const LayerPointer layer = options( { { 2000, 150 } } );
  const Outcome outcome = compare( layer );
  QVERIFY( !outcome.ok );
  QVERIFY( !outcome.errors.isEmpty() );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestCompareSources>( argc, argv );
}

#include "testcomparesources.moc"
