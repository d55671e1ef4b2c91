// SPDX-License-Identifier: GPL-2.0-or-later
// The preview without any widget: its figures are the algorithm's to the last digit, they follow edits, undo and redo,
// and it says what is missing in place of failing.
#include "plugin/preview/preview.h"

#include "processing/parameternames.h"
#include "processing/writing/resulttable.h"
#include "tests/support/processingrun.h"

#include <qgsexception.h>

#include <QSignalSpy>
#include <QTest>
#include <QUndoStack>

using namespace stillhead;
using namespace stillhead::test;

class TestPreview : public QObject
{
    Q_OBJECT

  private slots:
    void init();
    void cleanup();
    void equalsTheAlgorithm_data();
    void equalsTheAlgorithm();
    void followsEdits();
    void countsTheSketch();
    void isStaleUntilComputed();
    void asksForWhatIsMissing_data();
    void asksForWhatIsMissing();
    void saysWhyItFailed();
    void outlivesItsLayers();
    void survivesUnloadingAtWork();
    void restsWhileInactive();

  private:
    PreviewInput input( const QVariantMap &changes = {} ) const;
    bool waitForResult() const;
    static double highest( const Preview &preview ) { return preview.result()->plan.result.totals.highestPa; }

    Slope mSlope;
    std::unique_ptr<QgsVectorLayer> mMains;
    std::unique_ptr<QgsVectorLayer> mLaterals;
    std::unique_ptr<QgsRasterLayer> mTerrain;
    std::unique_ptr<Preview> mPreview;
};

void TestPreview::init()
{
  mMains =
    drawLayer( Slope::lines() + "&field=cover:double", { { line( { { 0, 0 }, { 300, 0 } } ), { 1.0 } } }, "mains" );
  mLaterals = drawLayer( Slope::lines(), { { line( { { 100, 0 }, { 140, 37 } } ) } }, "laterals" );
  mTerrain = std::make_unique<QgsRasterLayer>( mSlope.path( "slope.tif" ), "slope", "gdal" );
  mPreview = std::make_unique<Preview>( QgsProject::instance() );
  mPreview->setActive( true );
}

void TestPreview::cleanup()
{
  mPreview.reset();
}

PreviewInput TestPreview::input( const QVariantMap &changes ) const
{
  PreviewInput input;
  input.mains = mMains.get();
  input.laterals = mLaterals.get();
  input.terrain = mTerrain.get();
  input.parameters = { { "TERRAIN_UNIT", 1 }, { "SOURCE", place( 0, 0 ) }, { "SOURCE_KIND", 0 },
    { "SOURCE_VALUE", 71.3 }, { "SOURCE_LOW", 62.9 }, { "GAUGE_HEIGHT", 2.5 } };
  for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
    input.parameters.insert( change.key(), change.value() );
  return input;
}

bool TestPreview::waitForResult() const
{
  return QTest::qWaitFor( [this] { return mPreview->result() && !mPreview->isStale(); }, 20000 );
}

void TestPreview::equalsTheAlgorithm_data()
{
  QTest::addColumn<QVariantMap>( "changes" );
  QTest::newRow( "psi and feet" ) << QVariantMap();
  QTest::newRow( "kPa and metres" ) << QVariantMap { { "PRESSURE_UNIT", 1 }, { "LENGTH_UNIT", 1 },
    { "SOURCE_VALUE", 493 }, { "SOURCE_LOW", 431 }, { "GAUGE_HEIGHT", 0.7 } };
  QTest::newRow( "limits and doubt" ) << QVariantMap { { "LEAST", 68 }, { "MOST", 90 }, { "LATERAL_MOST", 80 },
    { "BANDS", "70, 75, 95" }, { "TERRAIN_RMSE", 0.5 }, { "READING_ERROR", 1 } };
  QTest::newRow( "water level, cover" ) << QVariantMap { { "SOURCE_KIND", 1 }, { "SOURCE_VALUE", 401.5 },
    { "SOURCE_LOW", 333.3 }, { "COVER", 1.25 }, { "WATER_TEMPERATURE", 4 } };
}

void TestPreview::equalsTheAlgorithm()
{
  QFETCH( QVariantMap, changes );
  mPreview->setInput( input( changes ) );
  QVERIFY2( waitForResult(), qPrintable( mPreview->reason() ) );

  QVariantMap parameters = mPreview->input().parameters;
  parameters.insert( "MAINS", asParameter( mMains ) );
  parameters.insert( "LATERALS", asParameter( mLaterals ) );
  parameters.insert( "TERRAIN", mSlope.path( "slope.tif" ) );
  for ( const char *output : { "SPANS", "NODES", "EXTREMES", "FINDINGS" } )
    parameters.insert( output, Slope::temporary() );
  const Outcome outcome = runAlgorithm( "staticpressure", parameters );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( ' ' ) ) );
  QCOMPARE( mPreview->result()->summary, outcome.results.value( "SUMMARY" ).toString() );

  const ResultContext context = mPreview->result()->plan.context();
  for ( const ResultTable &table :
    { spanTable( context ), nodeTable( context ), extremeTable( context ), findingTable( context ) } )
  {
    const std::vector<Row> rows = outcome.features( table.output );
    QCOMPARE( rows.size(), table.rows );
    std::vector<QgsFeature> shown( table.rows );
    table.make( 0, table.rows, shown.data() );
    for ( std::size_t i = 0; i < rows.size(); ++i )
    {
      for ( int field = 0; field < table.fields.count(); ++field )
        QCOMPARE( shown[i].attribute( field ), rows[i].attribute( table.fields.at( field ).name() ) );
      QCOMPARE( shown[i].geometry().asWkt( 17 ), rows[i].geometry().asWkt( 17 ) );
    }
  }
}

void TestPreview::followsEdits()
{
  mPreview->setInput( input() );
  QVERIFY( waitForResult() );
  const double before = highest( *mPreview );

  QVERIFY( mMains->startEditing() );
  QgsFeature pipe( mMains->fields() );
  pipe.setGeometry( QgsGeometry::fromWkt( line( { { 300, 0 }, { 360, 0 } } ) ) );
  QVERIFY( mMains->addFeature( pipe ) );
  QVERIFY( mPreview->isStale() );
  QVERIFY( waitForResult() );
  const double drawn = highest( *mPreview );
  QVERIFY( drawn > before );

  mMains->undoStack()->undo();
  QVERIFY( waitForResult() );
  QCOMPARE( highest( *mPreview ), before );
  mMains->undoStack()->redo();
  QVERIFY( waitForResult() );
  QCOMPARE( highest( *mPreview ), drawn );
  QVERIFY( mMains->rollBack() );
  QVERIFY( waitForResult() );
  QCOMPARE( highest( *mPreview ), before );

  // A depth typed into the form counts like a vertex that is moved.
  QVERIFY( mMains->startEditing() );
  QVERIFY( mMains->changeAttributeValue( 1, 0, 5.0 ) );
  QVERIFY( waitForResult() );
  QVERIFY( highest( *mPreview ) > before );
  QVERIFY( mMains->rollBack() );
}

void TestPreview::countsTheSketch()
{
  mPreview->setInput( input() );
  QVERIFY( waitForResult() );
  const double before = mPreview->result()->plan.result.totals.lengthM;
  SketchedLine sketch;
  sketch.geometry = QgsGeometry::fromWkt( line( { { 300, 0 }, { 350, 0 } } ) );
  sketch.crs = mMains->crs();
  mPreview->setSketch( sketch );
  QVERIFY( waitForResult() );
  QVERIFY( mPreview->result()->sketched );
  QVERIFY( std::abs( mPreview->result()->plan.result.totals.lengthM - before - 50.0 ) < 0.1 );
  QCOMPARE( mPreview->result()->plan.result.totals.noSourceM, 0.0 );
  mPreview->setSketch( std::nullopt );
  QVERIFY( waitForResult() );
  QCOMPARE( mPreview->result()->plan.result.totals.lengthM, before );
}

void TestPreview::isStaleUntilComputed()
{
  QTRY_VERIFY( !mPreview->isStale() );
  QSignalSpy changes( mPreview.get(), &Preview::changed );
  mPreview->setInput( input() );
  QVERIFY( mPreview->isStale() );
  QCOMPARE( changes.count(), 1 );
  QVERIFY( !mPreview->result() );
  QVERIFY( waitForResult() );
  const PreviewResultPointer first = mPreview->result();
  mPreview->setInput( input( { { "SOURCE_VALUE", 75 } } ) );
  QVERIFY( mPreview->isStale() );
  // What was found stays in sight until there is something newer.
  QCOMPARE( mPreview->result(), first );
  QVERIFY( waitForResult() );
  QVERIFY( mPreview->result() != first );
}

void TestPreview::asksForWhatIsMissing_data()
{
  QTest::addColumn<QString>( "without" );
  QTest::addColumn<QString>( "says" );
  QTest::newRow( "mains" ) << "MAINS"
                           << "mainlines are drawn in";
  QTest::newRow( "terrain" ) << "TERRAIN"
                             << "Choose the terrain";
  QTest::newRow( "source" ) << "SOURCE"
                            << "where the water comes from";
  QTest::newRow( "value" ) << "SOURCE_VALUE"
                           << "Give the pressure";
}

void TestPreview::asksForWhatIsMissing()
{
  QFETCH( QString, without );
  QFETCH( QString, says );
  PreviewInput incomplete = input();
  if ( without == "MAINS" )
    incomplete.mains.clear();
  if ( without == "TERRAIN" )
    incomplete.terrain.clear();
  incomplete.parameters.remove( without );
  mPreview->setInput( incomplete );
  QVERIFY( QTest::qWaitFor( [this] { return !mPreview->isStale(); } ) );
  QVERIFY( !mPreview->result() );
  QVERIFY2( mPreview->reason().contains( says ), qPrintable( mPreview->reason() ) );
}

void TestPreview::saysWhyItFailed()
{
  mPreview->setInput( input( { { "SOURCE", place( 0, 35 ) } } ) );
  QVERIFY( QTest::qWaitFor( [this] { return !mPreview->isStale() && !mPreview->reason().isEmpty(); }, 20000 ) );
  QVERIFY2( mPreview->reason().contains( "114.83 ft" ), qPrintable( mPreview->reason() ) ); // 35 m
  mPreview->setInput( input( { { "SOURCE_LOW", 90 } } ) );
  QVERIFY( QTest::qWaitFor( [this] { return mPreview->reason().contains( "SOURCE_LOW" ); }, 20000 ) );
  mPreview->setInput( input() );
  QVERIFY( waitForResult() );
  QVERIFY( mPreview->reason().isEmpty() );
}

void TestPreview::outlivesItsLayers()
{
  mPreview->setInput( input() );
  QTest::qWait( 45 ); // while the work may be under way
  mMains.reset();
  mTerrain.reset();
  QVERIFY( QTest::qWaitFor( [this] { return !mPreview->isStale(); }, 20000 ) );
  QVERIFY2( mPreview->reason().contains( "mainlines are drawn in" ), qPrintable( mPreview->reason() ) );
}

void TestPreview::survivesUnloadingAtWork()
{
  for ( int wait : { 0, 41, 50, 60 } )
  {
    Preview preview( QgsProject::instance() );
    preview.setActive( true );
    preview.setInput( input() );
    QTest::qWait( wait );
  }
  QTest::qWait( 100 );
}

void TestPreview::restsWhileInactive()
{
  mPreview->setInput( input() );
  QVERIFY( waitForResult() );
  mPreview->setActive( false );
  QVERIFY( !mPreview->result() );
  mPreview->setInput( input( { { "SOURCE_VALUE", 80 } } ) );
  QTest::qWait( 200 );
  QVERIFY( !mPreview->result() && !mPreview->isStale() );
  mPreview->setActive( true );
  QVERIFY( waitForResult() );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestPreview>( argc, argv );
}
#include "testpreview.moc"
