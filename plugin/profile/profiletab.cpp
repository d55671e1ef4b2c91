// SPDX-License-Identifier: GPL-2.0-or-later
// The place is kept, so the profile follows every edit of what lies on the way.
#include "plugin/profile/profiletab.h"

#include "plugin/maptools/inquiry.h"
#include "plugin/preview/preview.h"
#include "plugin/profile/profileplot.h"
#include "plugin/results/resulttext.h"
#include "processing/qgiscompat.h"

#include <qgsapplication.h>
#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgsmapcanvas.h>
#include <qgsmaptoolemitpoint.h>
#include <qgsproject.h>
#include <qgsrubberband.h>
#include <qgsvertexmarker.h>

#include <QFileDialog>
#include <QFileInfo>
#include <QHBoxLayout>
#include <QLabel>
#include <QSaveFile>
#include <QToolButton>
#include <QVBoxLayout>

#include <qwt_plot_renderer.h>

#include <cmath>

namespace stillhead
{

  ProfileTab::ProfileTab( Preview &preview, Inquiry &inquiry, QgsMapCanvas *canvas, QWidget *parent )
    : QWidget( parent )
    , mPreview( preview )
    , mInquiry( inquiry )
    , mCanvas( canvas )
    , mPlot( new ProfilePlot( this ) )
    , mWords( new QLabel( this ) )
    , mPick( new QToolButton( this ) )
    , mTool( std::make_unique<QgsMapToolEmitPoint>( canvas ) )
    , mWay( std::make_unique<QgsRubberBand>( canvas, compat::Geometry::Line ) )
    , mMarker( std::make_unique<QgsVertexMarker>( canvas ) )
  {
    mWay->setColor( QColor( 0, 0, 0, 110 ) );
    mWay->setWidth( 5 );
    mWay->setLineStyle( Qt::DotLine );
    mMarker->setColor( Qt::black );
    mMarker->setIconType( QgsVertexMarker::ICON_CIRCLE );
    mMarker->setPenWidth( 3 );
    mMarker->hide();
    mPick->setCheckable( true );
    mPick->setText( tr( "&Way to…" ) );
    mPick->setToolTip( tr( "Click on a pipe: the profile runs to it from the source" ) );
    auto *save = new QToolButton( this );
    save->setIcon( QgsApplication::getThemeIcon( QStringLiteral( "/mActionFileSave.svg" ) ) );
    save->setToolTip( tr( "Save the profile as PNG, SVG or CSV…" ) );
    save->setAccessibleName( save->toolTip() );

    auto *buttons = new QVBoxLayout();
    buttons->addWidget( mPick );
    buttons->addWidget( save );
    buttons->addStretch( 1 );
    auto *column = new QVBoxLayout();
    column->addWidget( mPlot, 1 );
    column->addWidget( mWords );
    auto *row = new QHBoxLayout( this );
    row->setContentsMargins( 0, 0, 0, 0 );
    row->addLayout( buttons );
    row->addLayout( column, 1 );

    connect( &mPreview, &Preview::changed, this, &ProfileTab::follow );
    connect( mPlot, &ProfilePlot::pointed, this, &ProfileTab::point );
    connect( &mInquiry, &Inquiry::pipeHovered, this, &ProfileTab::markHovered );
    connect( mPick, &QToolButton::toggled, this, &ProfileTab::pick );
    connect( save, &QToolButton::clicked, this, &ProfileTab::askForFile );
    connect( mTool.get(), &QgsMapToolEmitPoint::canvasClicked, this,
      [this]( const QgsPointXY &place ) { showWayTo( place ); } );
    connect( mTool.get(), &QgsMapTool::deactivated, this, [this] { mPick->setChecked( false ); } );
    clear( tr( "Choose “Way to…” and click on a pipe." ) );
  }

  ProfileTab::~ProfileTab()
  {
    // The canvas takes its items with it.
    if ( !mCanvas )
    {
      static_cast<void>( mWay.release() );
      static_cast<void>( mMarker.release() );
    }
  }

  void ProfileTab::pick( bool wanted )
  {
    if ( !mCanvas )
      return;
    if ( wanted )
      mCanvas->setMapTool( mTool.get() );
    else
      mCanvas->unsetMapTool( mTool.get() );
  }

  void ProfileTab::showWayTo( const QgsPointXY &place )
  {
    mPlace = place;
    rebuild();
  }

  void ProfileTab::follow()
  {
    const PreviewResultPointer &result = mPreview.result();
    if ( result == mShown || ( result && result->sketched ) )
      return;
    rebuild();
  }

  void ProfileTab::rebuild()
  {
    mShown = mPreview.result();
    if ( !mPlace )
      return;
    if ( !mShown )
    {
      clear( mPreview.reason() );
      return;
    }
    try
    {
      const SolvedPlan &plan = mShown->plan;
      const std::optional<PlaceFound> pipe = mInquiry.pipeAt( *mPlace );
      if ( !pipe )
      {
        clear( tr( "No pipe there; click on a pipe." ) );
        return;
      }
      const std::vector<WayLeg> way = wayToPlace( plan.result, pipe->on );
      if ( way.empty() )
      {
        clear( tr( "No joined pipe leads there from the source." ) );
        return;
      }
      PlaceProbe probe( plan.result, *plan.planToTerrain, *mShown->terrain->cache, mShown->useLineZ,
        plan.units.specificWeightNPerM3() );
      mPoints = wayProfile( plan.result, way, plan.limits, probe );
      mPlot->showProfile( mPoints, &plan );
      drawWay();
      point( static_cast<int>( mPoints.size() ) - 1 );
    }
    catch ( const QgsException &e )
    {
      clear( e.what() );
    }
    catch ( const std::exception &e )
    {
      clear( QString::fromUtf8( e.what() ) );
    }
  }

  void ProfileTab::clear( const QString &why )
  {
    mPoints.clear();
    mPlot->showProfile( mPoints, nullptr );
    mWords->setText( why );
    if ( !mCanvas )
      return;
    mWay->reset( compat::Geometry::Line );
    mMarker->hide();
  }

  void ProfileTab::drawWay()
  {
    const SolvedPlan &plan = mShown->plan;
    QgsPolylineXY line;
    for ( const WayPoint &point : mPoints )
    {
      const PlanPoint place = plan.result.drawing.placeAt(
        plan.result.drawing.lines[static_cast<std::size_t>( point.on.line )], point.on.alongM );
      line << QgsPointXY( place.x, place.y );
    }
    mWay->setToGeometry( QgsGeometry::fromPolylineXY( line ), plan.drawn.crs );
  }

  void ProfileTab::point( int index )
  {
    if ( index < 0 || index >= static_cast<int>( mPoints.size() ) || !mShown || !mCanvas )
    {
      mMarker->hide();
      return;
    }
    const SolvedPlan &plan = mShown->plan;
    const WayPoint &at = mPoints[static_cast<std::size_t>( index )];
    const DisplayUnits &units = plan.units;
    mWords->setText( std::isnan( at.figures.highPa )
        ? tr( "%1 from the source: no figure" ).arg( units.lengthText( at.distanceM, 1 ) )
        : tr( "%1 from the source: pipe %2, %3 (summer peak) to %4 (night, winter)" )
            .arg( units.lengthText( at.distanceM, 1 ), units.lengthText( at.figures.pipeM, 1 ),
              units.pressureText( at.figures.lowPa, 1 ), units.pressureText( at.figures.highPa, 1 ) ) );
    const PlanPoint place =
      plan.result.drawing.placeAt( plan.result.drawing.lines[static_cast<std::size_t>( at.on.line )], at.on.alongM );
    try
    {
      const QgsCoordinateTransform toMap(
        plan.drawn.crs, mCanvas->mapSettings().destinationCrs(), QgsProject::instance()->transformContext() );
      mMarker->setCenter( toMap.transform( QgsPointXY( place.x, place.y ) ) );
      mMarker->show();
    }
    catch ( const QgsCsException & )
    {
      mMarker->hide();
    }
  }

  void ProfileTab::markHovered( const std::optional<PlaceOnLine> &on )
  {
    if ( mPoints.empty() || !mShown )
      return;
    double nearest = std::nan( "" );
    double gapM = HUGE_VAL;
    for ( const WayPoint &point : mPoints )
    {
      if ( on && point.on.line == on->line && std::abs( point.on.alongM - on->alongM ) < gapM )
      {
        gapM = std::abs( point.on.alongM - on->alongM );
        nearest = mShown->plan.units.length( point.distanceM );
      }
    }
    mPlot->mark( nearest );
  }

  QString ProfileTab::csv() const
  {
    if ( !mShown )
      return QString();
    const DisplayUnits &units = mShown->plan.units;
    const QString length = units.lengthName();
    const QString pressure = units.pressureName();
    ResultList list;
    list.headings = QStringList { tr( "distance, %1" ).arg( length ), tr( "ground, %1" ).arg( length ),
      tr( "pipe, %1" ).arg( length ), tr( "low pressure, %1" ).arg( pressure ),
      tr( "high pressure, %1" ).arg( pressure ), tr( "low static level, %1" ).arg( length ),
      tr( "high static level, %1" ).arg( length ) };
    for ( const WayPoint &point : mPoints )
      list.rows << ResultRow { { units.lengthValue( point.distanceM ), units.lengthValue( point.figures.groundM ),
                                 units.lengthValue( point.figures.pipeM ), units.pressureValue( point.figures.lowPa ),
                                 units.pressureValue( point.figures.highPa ),
                                 units.lengthValue( point.figures.levels.lowM ),
                                 units.lengthValue( point.figures.levels.highM ) },
        QgsGeometry() };
    return csvText( list );
  }

  QString ProfileTab::save( const QString &path ) const
  {
    bool saved = false;
    if ( path.endsWith( QLatin1String( ".csv" ), Qt::CaseInsensitive ) )
    {
      QSaveFile file( path );
      saved = file.open( QIODevice::WriteOnly ) && file.write( csv().toUtf8() ) >= 0 && file.commit();
    }
    else
    {
      const QSizeF sizeMm( 240.0, 120.0 );
      constexpr int DOTS_PER_INCH = 150;
      QwtPlotRenderer().renderDocument( mPlot, path, sizeMm, DOTS_PER_INCH );
      saved = QFileInfo( path ).size() > 0;
    }
    return saved ? QString() : tr( "“%1” could not be written; check the folder." ).arg( path );
  }

  void ProfileTab::askForFile()
  {
    const QString path = QFileDialog::getSaveFileName(
      this, tr( "Save the profile" ), QString(), tr( "PNG (*.png);;SVG (*.svg);;CSV (*.csv)" ) );
    if ( path.isEmpty() )
      return;
    const QString problem = save( path );
    emit said( problem.isEmpty() ? tr( "Saved “%1”." ).arg( path ) : problem, !problem.isEmpty() );
  }

} // namespace stillhead
