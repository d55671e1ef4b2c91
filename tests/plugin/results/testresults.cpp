// SPDX-License-Identifier: GPL-2.0-or-later
// The lists: the rows that the algorithm writes, sorted as the user likes, taken to the place by a click, and as text
// for other programs.
#include "plugin/results/resultsdock.h"

#include "plugin/preview/preview.h"
#include "plugin/results/resulttab.h"
#include "plugin/results/resulttext.h"
#include "tests/support/processingrun.h"

#include <qgsmapcanvas.h>

#include <QClipboard>
#include <QFile>
#include <QHeaderView>
#include <QSignalSpy>
#include <QTableView>
#include <QTest>

using namespace stillhead;
using namespace stillhead::test;

class TestResults : public QObject
{
    Q_OBJECT

  private slots:
    void init();
    void cleanup();
    void listsEqualTheLayers_data();
    void listsEqualTheLayers();
    void sortsNumbersAsNumbers();
    void goesToThePlace();
    void copiesWhatIsShown();
    void writesCsv();
    void isEmptyWithoutResult();

  private:
    ResultTab *tab( const QString &name ) const { return mDock->findChild<ResultTab *>( name ); }
    QVariantMap parameters() const;

    Slope mSlope;
    LayerPointer mMains;
    std::unique_ptr<QgsRasterLayer> mTerrain;
    std::unique_ptr<QgsMapCanvas> mCanvas;
    std::unique_ptr<Preview> mPreview;
    std::unique_ptr<ResultsDock> mDock;
};

QVariantMap TestResults::parameters() const
{
  return { { "TERRAIN_UNIT", 1 }, { "SOURCE", place( 0, 0 ) }, { "SOURCE_KIND", 1 }, { "SOURCE_VALUE", 150 },
    { "SOURCE_LOW", 121 }, { "PRESSURE_UNIT", 3 }, { "LENGTH_UNIT", 1 }, { "LEAST", 25 }, { "MOST", 70 } };
}

void TestResults::init()
{
  // Short near the source, over at the far end, and an end that stops short of the main.
  mMains = drawLayer(
    Slope::lines(), { { line( { { 0, 0 }, { 300, 0 } } ) }, { line( { { 150, 0.5 }, { 150, 30 } } ) } }, "mains" );
  mTerrain = std::make_unique<QgsRasterLayer>( mSlope.path( "slope.tif" ), "slope", "gdal" );
  mCanvas = std::make_unique<QgsMapCanvas>();
  mCanvas->resize( 600, 400 );
  mCanvas->setDestinationCrs( QgsCoordinateReferenceSystem( "EPSG:32631" ) );
  mCanvas->setExtent( QgsRectangle( 319000, 109000, 322000, 111000 ) );
  mPreview = std::make_unique<Preview>( QgsProject::instance() );
  mDock = std::make_unique<ResultsDock>( *mPreview, mCanvas.get(), nullptr );
  mDock->resize( 800, 250 );
  mDock->show();
  PreviewInput input;
  input.mains = mMains.get();
  input.terrain = mTerrain.get();
  input.parameters = parameters();
  mPreview->setInput( input );
  mPreview->setActive( true );
  QVERIFY( QTest::qWaitFor( [this] { return mPreview->result() && !mPreview->isStale(); }, 20000 ) );
}

void TestResults::cleanup()
{
  mDock.reset();
  mPreview.reset();
  mCanvas.reset();
}

void TestResults::listsEqualTheLayers_data()
{
  QTest::addColumn<QString>( "list" );
  QTest::addColumn<QString>( "output" );
  QTest::newRow( "places" ) << "StillheadPlaces"
                            << "EXTREMES";
  QTest::newRow( "stretches" ) << "StillheadStretches"
                               << "STRETCHES";
  QTest::newRow( "findings" ) << "StillheadFindings"
                              << "FINDINGS";
}

void TestResults::listsEqualTheLayers()
{
  QFETCH( QString, list );
  QFETCH( QString, output );
  QVariantMap all = parameters();
  all.insert( "MAINS", asParameter( mMains ) );
  all.insert( "TERRAIN", mSlope.path( "slope.tif" ) );
  for ( const char *name : { "SPANS", "EXTREMES", "STRETCHES", "FINDINGS" } )
    all.insert( name, Slope::temporary() );
  const Outcome outcome = runAlgorithm( "staticpressure", all );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( ' ' ) ) );
  const std::vector<Row> rows = outcome.features( output );
  QVERIFY( !rows.empty() );
  const ResultModel &model = tab( list )->model();
  QCOMPARE( model.rowCount(), static_cast<int>( rows.size() ) );
  for ( int row = 0; row < model.rowCount(); ++row )
  {
    QVERIFY( !model.list().rows.at( row ).place.isNull() );
    for ( int column = 0; column < model.columnCount(); ++column )
      QCOMPARE(
        model.list().rows.at( row ).values.at( column ), rows[static_cast<std::size_t>( row )].attribute( column ) );
  }
}

void TestResults::sortsNumbersAsNumbers()
{
  ResultTab alone( nullptr );
  ResultList list;
  list.headings = QStringList { "p" };
  for ( const double value : { 100.0, 9.5, -3.0 } )
    list.rows << ResultRow { { value }, QgsGeometry() };
  alone.setList( list );
  alone.view()->sortByColumn( 0, Qt::AscendingOrder );
  QCOMPARE( alone.view()->model()->index( 0, 0 ).data().toDouble(), -3.0 );
  QCOMPARE( alone.view()->model()->index( 2, 0 ).data().toDouble(), 100.0 );
  // The order stays when the next result comes.
  list.rows << ResultRow { { -7.0 }, QgsGeometry() };
  alone.setList( list );
  QCOMPARE( alone.view()->model()->index( 0, 0 ).data().toDouble(), -7.0 );
}

void TestResults::goesToThePlace()
{
  ResultTab *findings = tab( "StillheadFindings" );
  QTableView *view = findings->view();
  int nearMiss = -1;
  for ( int row = 0; row < view->model()->rowCount(); ++row )
    nearMiss = view->model()->index( row, 0 ).data().toString() == "near miss" ? row : nearMiss;
  QVERIFY( nearMiss >= 0 );
  emit view->clicked( view->model()->index( nearMiss, 0 ) );
  const QgsPointXY middle = mCanvas->extent().center();
  QVERIFY2( middle.distance( QgsPointXY( 320150, 110000.5 ) ) < 2.0, qPrintable( middle.toString( 2 ) ) );

  ResultTab *stretches = tab( "StillheadStretches" );
  emit stretches->view()->clicked( stretches->view()->model()->index( 0, 0 ) );
  const QgsRectangle stretch = stretches->model().list().rows.at( 0 ).place.boundingBox();
  QVERIFY( mCanvas->extent().contains( stretch ) );
  QVERIFY( mCanvas->extent().width() < 3.0 * stretch.width() );
}

void TestResults::copiesWhatIsShown()
{
  ResultTab *stretches = tab( "StillheadStretches" );
  stretches->copy();
  QStringList lines = QgsApplication::clipboard()->text().split( '\n' );
  QCOMPARE( lines.size(), stretches->model().rowCount() + 1 );
  QVERIFY( lines.first().contains( "m of water" ) );
  stretches->view()->selectRow( 0 );
  stretches->copy();
  QCOMPARE( QgsApplication::clipboard()->text().split( '\n' ).size(), 2 );
}

void TestResults::writesCsv()
{
  ResultList list;
  list.headings = QStringList { "what, unit", "p" };
  list.rows << ResultRow { { QString( "a \"b\"" ), 70.25 }, QgsGeometry() }
            << ResultRow { { QVariant(), QVariant() }, QgsGeometry() };
  // By RFC 4180, section 2.
  QCOMPARE( csvText( list ), QString( "\"what, unit\",p\r\n\"a \"\"b\"\"\",70.25\r\n,\r\n" ) );

  const ResultTab *findings = tab( "StillheadFindings" );
  const QString path = mSlope.path( "findings.csv" );
  QCOMPARE( findings->saveCsv( path ), QString() );
  QFile file( path );
  QVERIFY( file.open( QIODevice::ReadOnly ) );
  QCOMPARE( QString::fromUtf8( file.readAll() ), csvText( findings->model().list() ) );
  QVERIFY( findings->saveCsv( mSlope.path( "nowhere/findings.csv" ) ).contains( "could not be written" ) );
}

void TestResults::isEmptyWithoutResult()
{
  QVERIFY( tab( "StillheadPlaces" )->model().rowCount() > 0 );
  mPreview->setActive( false );
  QCOMPARE( tab( "StillheadPlaces" )->model().rowCount(), 0 );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestResults>( argc, argv );
}
#include "testresults.moc"
