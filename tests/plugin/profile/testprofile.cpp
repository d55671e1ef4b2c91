// SPDX-License-Identifier: GPL-2.0-or-later
// The profile: it runs from the source to the clicked place, shows what the result holds, follows edits, points both
// ways between plot and map, and is saved as picture and table.
#include "plugin/profile/profiletab.h"

#include "plugin/maptools/inquiry.h"
#include "plugin/preview/preview.h"
#include "plugin/profile/profileplot.h"
#include "tests/support/processingrun.h"

#include <qgsmapcanvas.h>

#include <QFile>
#include <QImage>
#include <QLabel>
#include <QSignalSpy>
#include <QTest>

#include <qwt_plot_curve.h>
#include <qwt_text.h>

using namespace stillhead;
using namespace stillhead::test;

class TestProfile : public QObject
{
    Q_OBJECT

  private slots:
    void init();
    void cleanup();
    void runsFromTheSource();
    void followsEdits();
    void saysWhyThereIsNone();
    void pointsBothWays();
    void isSaved_data();
    void isSaved();
    void readOutSpeaksOfThePlace();

  private:
    bool ready() const
    {
      return QTest::qWaitFor( [this] { return mPreview->result() && !mPreview->isStale(); }, 20000 );
    }
    QStringList curves() const;
    static QgsPointXY place( double east, double north ) { return QgsPointXY( 320000.0 + east, 110000.0 + north ); }

    Slope mSlope;
    LayerPointer mMains;
    std::unique_ptr<QgsRasterLayer> mTerrain;
    std::unique_ptr<QgsMapCanvas> mCanvas;
    std::unique_ptr<Preview> mPreview;
    std::unique_ptr<Inquiry> mInquiry;
    std::unique_ptr<ProfileTab> mTab;
};

void TestProfile::init()
{
  mMains = drawLayer( Slope::lines(),
    { { line( { { 0, 0 }, { 300, 0 } } ) }, { line( { { 100, 0 }, { 100, 30 } } ) },
      { line( { { 10, -30 }, { 60, -30 } } ) } },
    "mains" );
  mTerrain = std::make_unique<QgsRasterLayer>( mSlope.path( "slope.tif" ), "slope", "gdal" );
  mCanvas = std::make_unique<QgsMapCanvas>();
  mCanvas->resize( 600, 400 );
  mCanvas->setDestinationCrs( QgsCoordinateReferenceSystem( "EPSG:32631" ) );
  mCanvas->setExtent( QgsRectangle( 319950, 109900, 320350, 110100 ) );
  mPreview = std::make_unique<Preview>( QgsProject::instance() );
  mInquiry = std::make_unique<Inquiry>( *mPreview, mCanvas.get(), nullptr );
  mTab = std::make_unique<ProfileTab>( *mPreview, *mInquiry, mCanvas.get(), nullptr );
  mTab->resize( 700, 300 );
  PreviewInput input;
  input.mains = mMains.get();
  input.terrain = mTerrain.get();
  // Water at 150 m (121 m in the summer peak) over ground that falls from 100 m by 1 m in 10.
  input.parameters = { { "TERRAIN_UNIT", 1 }, { "SOURCE", test::place( 0, 0 ) }, { "SOURCE_KIND", 1 },
    { "SOURCE_VALUE", 150 }, { "SOURCE_LOW", 121 }, { "PRESSURE_UNIT", 3 }, { "LENGTH_UNIT", 1 }, { "LEAST", 25 },
    { "MOST", 70 } };
  mPreview->setInput( input );
  mPreview->setActive( true );
  QVERIFY( ready() );
}

void TestProfile::cleanup()
{
  mTab.reset();
  mInquiry.reset();
  mPreview.reset();
  mCanvas.reset();
}

QStringList TestProfile::curves() const
{
  QStringList titles;
  for ( const QwtPlotItem *item : mTab->findChild<ProfilePlot *>()->itemList( QwtPlotItem::Rtti_PlotCurve ) )
    titles << item->title().text();
  titles.removeDuplicates();
  return titles;
}

void TestProfile::runsFromTheSource()
{
  mTab->showWayTo( place( 100, 20 ) );
  const std::vector<WayPoint> &points = mTab->points();
  QVERIFY( points.size() > 100 );
  QCOMPARE( points.front().distanceM, 0.0 );
  QCOMPARE( points.front().figures.pipeM, 100.0 );
  // 100 m along the main and 20 m up the branch, measured on the ellipsoid.
  QVERIFY2(
    std::abs( points.back().distanceM - 120.0 ) < 0.1, qPrintable( QString::number( points.back().distanceM ) ) );
  QVERIFY( std::abs( points.back().figures.pipeM - 90.0 ) < 1e-6 );
  QVERIFY( std::abs( points.back().figures.groundM - 90.0 ) < 1e-6 );
  QCOMPARE( points.back().figures.levels.highM, 150.0 );
  QCOMPARE( points.back().figures.levels.lowM, 121.0 );
  QCOMPARE( points.back().leastElevationM, 96.0 );
  QCOMPARE( points.back().mostElevationM, 80.0 );
  QCOMPARE( curves(),
    QStringList( { "ground", "static level, night and winter", "static level, summer peak", "pipe, by band" } ) );
}

void TestProfile::followsEdits()
{
  mTab->showWayTo( place( 290, 0 ) );
  const double before = mTab->points().back().figures.pipeM;
  QVERIFY( mMains->startEditing() );
  QVERIFY( mMains->changeGeometry( 1, QgsGeometry::fromWkt( line( { { 0, 0 }, { 150, 35 }, { 289, 1 } } ) ) ) );
  QVERIFY( ready() );
  QVERIFY( std::abs( mTab->points().back().distanceM - 290.0 ) > 5.0 );
  QVERIFY( std::abs( mTab->points().back().figures.pipeM - before ) < 0.5 );
  QVERIFY( mMains->rollBack() );
  QVERIFY( ready() );
  QCOMPARE( mTab->points().back().figures.pipeM, before );
}

void TestProfile::saysWhyThereIsNone()
{
  const auto says = [this]( const char *part ) {
    for ( const QLabel *label : mTab->findChildren<QLabel *>() )
    {
      if ( label->text().contains( part ) )
        return true;
    }
    return false;
  };
  QVERIFY( says( "click on a pipe" ) );
  mTab->showWayTo( place( 200, 80 ) );
  QVERIFY( says( "No pipe there" ) );
  mTab->showWayTo( place( 30, -30 ) );
  QVERIFY( says( "No joined pipe leads there" ) );
  QVERIFY( mTab->points().empty() );
}

void TestProfile::pointsBothWays()
{
  mTab->showWayTo( place( 290, 0 ) );
  auto *plot = mTab->findChild<ProfilePlot *>();
  mTab->show();
  QTest::qWait( 20 );
  QSignalSpy pointed( plot, &ProfilePlot::pointed );
  const int x = static_cast<int>( plot->transform( QwtPlot::xBottom, 150.0 ) );
  QTest::mouseMove( plot->canvas(), QPoint( x, 40 ) );
  QTRY_VERIFY( !pointed.isEmpty() );
  const int index = pointed.last().first().toInt();
  QVERIFY( std::abs( mTab->points()[static_cast<std::size_t>( index )].distanceM - 150.0 ) < 2.0 );
  QSignalSpy hovered( mInquiry.get(), &Inquiry::pipeHovered );
  mInquiry->textAt( place( 220, 0 ) );
  QCOMPARE( hovered.count(), 1 );
}

void TestProfile::isSaved_data()
{
  QTest::addColumn<QString>( "file" );
  QTest::newRow( "picture" ) << "profile.png";
  QTest::newRow( "drawing" ) << "profile.svg";
  QTest::newRow( "table" ) << "profile.csv";
}

void TestProfile::isSaved()
{
  QFETCH( QString, file );
  mTab->showWayTo( place( 290, 0 ) );
  const QString path = mSlope.path( file );
  QCOMPARE( mTab->save( path ), QString() );
  QFile saved( path );
  QVERIFY( saved.open( QIODevice::ReadOnly ) );
  const QByteArray content = saved.readAll();
  if ( file.endsWith( "png" ) )
    QVERIFY( QImage::fromData( content ).width() > 1000 );
  if ( file.endsWith( "svg" ) )
    QVERIFY( content.contains( "<svg" ) );
  if ( file.endsWith( "csv" ) )
  {
    const QList<QByteArray> lines = content.split( '\n' );
    QVERIFY( lines.first().startsWith( "\"distance, m\"" ) );
    QCOMPARE( lines.size(), static_cast<int>( mTab->points().size() ) + 2 );
    QCOMPARE( lines.at( 1 ).trimmed(), QByteArray( "0,100,100,21,50,121,150" ) );
  }
  QVERIFY( !mTab->save( mSlope.path( "nowhere/" + file ) ).isEmpty() );
}

void TestProfile::readOutSpeaksOfThePlace()
{
  // 150 - 80 m of water at 200 m: just the limit of 70 m; 1 m farther east it is 0.1 m over.
  QVERIFY2( mInquiry->textAt( place( 240, 0 ) ).contains( "4.0 m of water over" ),
    qPrintable( mInquiry->textAt( place( 240, 0 ) ) ) );
  QVERIFY( mInquiry->textAt( place( 240, 0 ) ).contains( "mainlines feature 1" ) );
  QVERIFY( mInquiry->textAt( place( 100, 10 ) ).contains( "within limits" ) );
  QVERIFY( mInquiry->textAt( place( 10, 0 ) ).contains( "3.0 m of water under" ) );
  QVERIFY( mInquiry->textAt( place( 30, -30 ) ).contains( "joined to no source" ) );
  const QString ground = mInquiry->textAt( place( 200, -30 ) );
  QVERIFY2(
    ground.contains( "Pipe here would hold 41.0 m of water (summer peak) to 70.0 m of water" ), qPrintable( ground ) );
  QVERIFY( mInquiry->textAt( place( 200, 90 ) ).contains( "no terrain here" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestProfile>( argc, argv );
}
#include "testprofile.moc"
