// SPDX-License-Identifier: GPL-2.0-or-later
// The panel with real widgets: it guesses layers, answers as soon as it can, keeps its settings in the project and
// shows them again, picks the source on the map, and does without layers that go.
#include "plugin/panel/dock.h"

#include "plugin/panel/watersection.h"
#include "processing/parameternames.h"
#include "tests/support/processingrun.h"

#include <qgsmapcanvas.h>
#include <qgsmaplayercombobox.h>
#include <qgsmaptoolpan.h>

#include <QCheckBox>
#include <QComboBox>
#include <QLabel>
#include <QPushButton>
#include <QScrollArea>
#include <QTest>

using namespace stillhead;
using namespace stillhead::test;

class TestDock : public QObject
{
    Q_OBJECT

  private slots:
    void init();
    void cleanup();
    void guessesLayers();
    void asksStepByStep();
    void answersWhenFilledIn();
    void keepsSettingsInTheProject();
    void convertsByUnits();
    void picksTheSourceOnTheMap();
    void escapeGivesThePencilBack();
    void doesWithoutLayersThatGo();
    void fitsANarrowPlace();
    void everythingIsReachedByKeyboard();

  private:
    template <class Widget> Widget *find( const QString &name ) const { return mDock->findChild<Widget *>( name ); }
    void type( const QString &name, const QString &text ) const;
    void fillIn();
    bool waitForAnswer() const;
    QString answer() const { return mDock->answer(); }
    QPoint pixelAt( double east, double north ) const;
    void move( const QPoint &pixel ) const;

    Slope mSlope;
    QgsVectorLayer *mMains = nullptr;
    QgsVectorLayer *mLaterals = nullptr;
    std::unique_ptr<QgsMapCanvas> mCanvas;
    std::unique_ptr<Dock> mDock;
};

void TestDock::init()
{
  rememberUnits( {} );
  QgsProject *project = QgsProject::instance();
  project->clear();
  project->setCrs( QgsCoordinateReferenceSystem( "EPSG:32631" ) );
  mMains = drawLayer( Slope::lines(), { { line( { { 0, 0 }, { 300, 0 } } ) } }, "Mainlines" ).release();
  mLaterals = drawLayer( Slope::lines(), { { line( { { 100, 0 }, { 140, 37 } } ) } }, "Laterals" ).release();
  project->addMapLayers( { mMains, mLaterals, new QgsRasterLayer( mSlope.path( "slope.tif" ), "Terrain", "gdal" ) } );
  mCanvas = std::make_unique<QgsMapCanvas>();
  mCanvas->resize( 600, 400 );
  mCanvas->setDestinationCrs( project->crs() );
  mCanvas->setLayers( { mMains, mLaterals } );
  mCanvas->setExtent( QgsRectangle( 319950, 109900, 320350, 110100 ) );
  mCanvas->show();
  mDock = std::make_unique<Dock>( mCanvas.get(), project );
  mDock->resize( 320, 800 );
  mDock->show();
}

void TestDock::cleanup()
{
  mDock.reset();
  mCanvas.reset();
  QgsProject::instance()->clear();
}

void TestDock::type( const QString &name, const QString &text ) const
{
  QLineEdit *edit = find<QLineEdit>( name );
  QVERIFY2( edit, qPrintable( name ) );
  edit->clear();
  QTest::keyClicks( edit, text );
}

void TestDock::fillIn()
{
  find<WaterSection>( QString() )->setPlace( place( 0, 0 ) );
  type( "SOURCE_VALUE", "71" );
  type( "SOURCE_LOW", "62" );
}

bool TestDock::waitForAnswer() const
{
  return QTest::qWaitFor( [this] { return mDock->preview().result() && !mDock->preview().isStale(); }, 20000 );
}

QPoint TestDock::pixelAt( double east, double north ) const
{
  return mCanvas->getCoordinateTransform()->transform( 320000.0 + east, 110000.0 + north ).toQPointF().toPoint();
}

void TestDock::move( const QPoint &pixel ) const
{
  QTest::mouseMove( mCanvas->viewport(), pixel );
  QCoreApplication::processEvents();
}

void TestDock::guessesLayers()
{
  QCOMPARE( find<QgsMapLayerComboBox>( "MAINS" )->currentLayer(), mMains );
  QCOMPARE( find<QgsMapLayerComboBox>( "LATERALS" )->currentLayer(), mLaterals );
  QCOMPARE( find<QgsMapLayerComboBox>( "TERRAIN" )->currentLayer()->name(), QString( "Terrain" ) );
  // A guess is nothing to save.
  PanelSettings kept;
  QVERIFY( !readSettings( *QgsProject::instance(), kept ) );
}

void TestDock::asksStepByStep()
{
  QTRY_VERIFY( answer().contains( "where the water comes from" ) );
  find<WaterSection>( QString() )->setPlace( place( 0, 0 ) );
  QTRY_VERIFY( answer().contains( "Give the pressure" ) );
  find<QgsMapLayerComboBox>( "MAINS" )->setLayer( nullptr );
  QTRY_VERIFY( answer().contains( "mainlines are drawn in" ) );
}

void TestDock::answersWhenFilledIn()
{
  fillIn();
  QVERIFY2( waitForAnswer(), qPrintable( answer() ) );
  QVERIFY2( answer().contains( "within limits at rest" ), qPrintable( answer() ) );
  QVERIFY( find<QLabel>( "TerrainNote" )->text().contains( "401" ) ); // columns of the terrain
  QVERIFY( find<QLabel>( "SourceNote" )->text().contains( "Water stands at elevation" ) );
  type( "MOST", "72" );
  QTRY_VERIFY2( answer().contains( "over (worst" ), qPrintable( answer() ) );
  type( "SOURCE_LOW", "90" );
  QTRY_VERIFY2( answer().contains( "SOURCE_LOW" ), qPrintable( answer() ) );
}

void TestDock::keepsSettingsInTheProject()
{
  fillIn();
  type( "LEAST", "45.5" );
  find<QComboBox>( "TERRAIN_UNIT" )->setCurrentIndex( 1 );
  emit find<QComboBox>( "TERRAIN_UNIT" )->activated( 1 );
  find<QCheckBox>( "JOIN_CROSSINGS" )->click();
  QTest::qWait( 20 );
  PanelSettings kept;
  QVERIFY( readSettings( *QgsProject::instance(), kept ) );
  QCOMPARE( kept.mains, mMains->id() );
  QCOMPARE( kept.parameters.value( "LEAST" ).toString(), QString( "45.5" ) );

  // Another panel, as after opening the project again, shows the same and has nothing to save.
  QgsProject::instance()->setDirty( false );
  mDock = std::make_unique<Dock>( mCanvas.get(), QgsProject::instance() );
  mDock->show();
  QVERIFY( waitForAnswer() );
  QCOMPARE( find<QLineEdit>( "SOURCE_VALUE" )->text(), QString( "71" ) );
  QCOMPARE( find<QLineEdit>( "LEAST" )->text(), QString( "45.5" ) );
  QCOMPARE( find<QComboBox>( "TERRAIN_UNIT" )->currentIndex(), 1 );
  QVERIFY( find<QCheckBox>( "JOIN_CROSSINGS" )->isChecked() );
  QVERIFY( !QgsProject::instance()->isDirty() );

  // A project closed and a blank one opened leave nothing behind.
  QgsProject::instance()->clear();
  QTest::qWait( 20 );
  QVERIFY( find<QLineEdit>( "SOURCE_VALUE" )->text().isEmpty() );
  QVERIFY( !readSettings( *QgsProject::instance(), kept ) );
}

void TestDock::convertsByUnits()
{
  fillIn();
  type( "BANDS", "30, 50, 80" );
  QVERIFY( waitForAnswer() );
  const double highestPa = mDock->preview().result()->plan.result.totals.highestPa;
  QComboBox *pressure = find<QComboBox>( "PRESSURE_UNIT" );
  pressure->setCurrentIndex( 1 );
  emit pressure->activated( 1 );
  QCOMPARE( find<QLineEdit>( "SOURCE_VALUE" )->text(), QString( "489.528" ) );
  QCOMPARE( find<QLineEdit>( "BANDS" )->text(), QString( "206.843, 344.738, 551.581" ) );
  QVERIFY( waitForAnswer() );
  // The same water: no figure was rounded on the way.
  QVERIFY( std::abs( mDock->preview().result()->plan.result.totals.highestPa - highestPa ) < 1e-6 );
  QCOMPARE( mDock->preview().result()->plan.style.pressureUnit, QString( "kPa" ) );
}

void TestDock::picksTheSourceOnTheMap()
{
  type( "SOURCE_VALUE", "71" );
  QPushButton *button = find<QPushButton>( "SOURCE" );
  QTest::mouseClick( button, Qt::LeftButton );
  QVERIFY( button->isChecked() );
  QLabel *words = mCanvas->findChild<QLabel *>( "StillheadReadOut" );
  QVERIFY( words );

  move( pixelAt( 200, 60 ) );
  QTRY_VERIFY2( words->text().contains( "Point at a pipe" ), qPrintable( words->text() ) );
  QTest::mouseClick( mCanvas->viewport(), Qt::LeftButton, Qt::NoModifier, pixelAt( 200, 60 ) );
  QVERIFY( button->isChecked() );

  // Near the end of the main: ground at its end is 100 m, 328.1 ft, and 71 psi carry water 163.9 ft higher.
  move( pixelAt( 2, 2 ) );
  QTRY_VERIFY2( words->text().contains( "Ground 328.1 ft" ), qPrintable( words->text() ) );
  QVERIFY2( words->text().contains( "492.0 ft" ), qPrintable( words->text() ) );
  QTest::mouseClick( mCanvas->viewport(), Qt::LeftButton, Qt::NoModifier, pixelAt( 2, 2 ) );
  QVERIFY( !button->isChecked() );
  QVERIFY( !words->isVisible() );
  QVERIFY( waitForAnswer() );
  QCOMPARE( mDock->preview().result()->plan.result.source.distanceM, 0.0 );
}

void TestDock::escapeGivesThePencilBack()
{
  QgsMapToolPan pan( mCanvas.get() );
  mCanvas->setMapTool( &pan );
  QPushButton *button = find<QPushButton>( "SOURCE" );
  QTest::mouseClick( button, Qt::LeftButton );
  QVERIFY( mCanvas->mapTool() != &pan );
  QTest::keyClick( mCanvas.get(), Qt::Key_Escape );
  QCOMPARE( mCanvas->mapTool(), &pan );
  QVERIFY( !button->isChecked() );
  QTest::mouseClick( button, Qt::LeftButton );
  mCanvas->setMapTool( &pan );
  QVERIFY( !button->isChecked() );
}

void TestDock::doesWithoutLayersThatGo()
{
  fillIn();
  QVERIFY( waitForAnswer() );
  QgsProject::instance()->removeMapLayer( mLaterals->id() );
  QVERIFY( waitForAnswer() );
  QVERIFY( mDock->preview().result()->plan.result.totals.lengthM < 301.0 );
  QgsProject::instance()->removeMapLayer( mMains->id() );
  QTRY_VERIFY( answer().contains( "mainlines are drawn in" ) );
}

void TestDock::fitsANarrowPlace()
{
  fillIn();
  QVERIFY( waitForAnswer() );
  mDock->setFloating( true );
  mDock->resize( 300, 700 );
  QTest::qWait( 50 );
  mDock->grab().save( QStringLiteral( STILLHEAD_BINARY_DIR ) + "/tests/dock_narrow.png" );
  // Whatever is wider is named.
  for ( const QWidget *part : mDock->findChildren<QWidget *>() )
  {
    const int width = part->minimumSizeHint().width();
    QVERIFY2( width <= 290,
      qPrintable( QString( "%1 %2: %3" ).arg( part->metaObject()->className(), part->objectName() ).arg( width ) ) );
  }
  const auto *scroll = mDock->findChild<QScrollArea *>();
  QVERIFY2( scroll->widget()->minimumSizeHint().width() <= 300,
    qPrintable( QString::number( scroll->widget()->minimumSizeHint().width() ) ) );
}

void TestDock::everythingIsReachedByKeyboard()
{
  int fields = 0;
  for ( const QWidget *widget : mDock->findChildren<QWidget *>() )
  {
    const bool isField = qobject_cast<const QLineEdit *>( widget ) || qobject_cast<const QComboBox *>( widget )
      || qobject_cast<const QCheckBox *>( widget ) || qobject_cast<const QPushButton *>( widget );
    if ( !isField || widget->objectName().isEmpty() || widget->objectName().startsWith( "qt_" ) )
      continue;
    ++fields;
    QVERIFY2( widget->focusPolicy() & Qt::TabFocus, qPrintable( widget->objectName() ) );
    QVERIFY2( !widget->toolTip().isEmpty(), qPrintable( widget->objectName() ) );
    const bool isNamed = !widget->accessibleName().isEmpty();
    QVERIFY2( isNamed, qPrintable( widget->objectName() ) );
  }
  QVERIFY( fields > 20 );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestDock>( argc, argv );
}
#include "testdock.moc"
