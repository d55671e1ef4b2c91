// SPDX-License-Identifier: GPL-2.0-or-later
// Widgets hold the state; settings and input are read off them whenever something changes.
#include "plugin/panel/dock.h"

#include "plugin/maptools/inquiry.h"
#include "plugin/maptools/sketchwatch.h"
#include "plugin/maptools/sourcepicktool.h"
#include "plugin/overlay/resultoverlay.h"
#include "plugin/panel/answerbar.h"
#include "plugin/panel/answertext.h"
#include "plugin/panel/drawingsection.h"
#include "plugin/panel/groundsection.h"
#include "plugin/panel/limitssection.h"
#include "plugin/panel/moresection.h"
#include "plugin/panel/unitsbar.h"
#include "plugin/panel/watersection.h"
#include "plugin/preview/sourcelook.h"
#include "plugin/results/saveresults.h"

#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgsfileutils.h>
#include <qgsmapcanvas.h>
#include <qgsproject.h>

#include <QFileDialog>
#include <QScrollArea>
#include <QVBoxLayout>

namespace stillhead
{

  Dock::Dock( QgsMapCanvas *canvas, QgsProject *project, QWidget *parent )
    : QgsDockWidget( tr( "Stillhead" ), parent )
    , mCanvas( canvas )
    , mProject( project )
    , mPreview( new Preview( project, this ) )
  {
    setObjectName( QStringLiteral( "StillheadDock" ) );
    mSave.setSingleShot( true );
    mSave.setInterval( 0 );
    buildWidgets();
    new ResultOverlay( *mPreview, mCanvas, this );
    new SketchWatch( *mPreview, mCanvas, this );
    mInquiry = new Inquiry( *mPreview, mCanvas, this );
    connectAll();
    readProject();
  }

  Dock::~Dock() = default;

  QString Dock::answer() const
  {
    return mAnswer->text();
  }

  void Dock::askWhereToSave()
  {
    // The first save of a project asks; later ones go to the same place.
    const QString key = QStringLiteral( "/saved" );
    QString path = mProject->readEntry( QStringLiteral( "Stillhead" ), key );
    if ( path.isEmpty() )
    {
      path = QFileDialog::getSaveFileName(
        this, tr( "Save the results" ), mProject->homePath(), tr( "GeoPackage (*.gpkg)" ) );
      if ( path.isEmpty() )
        return;
      path = QgsFileUtils::ensureFileNameHasExtension( path, { QStringLiteral( "gpkg" ) } );
      mProject->writeEntry( QStringLiteral( "Stillhead" ), key, path );
    }
    save( path );
  }

  void Dock::save( const QString &path )
  {
    auto *work = new SaveResults( input(), path, mProject, this );
    connect( work, &SaveResults::done, this, [this]( const QString &file, const QString &problem ) {
      emit said( problem.isEmpty() ? tr( "Results saved in “%1”." ).arg( file ) : problem, !problem.isEmpty() );
    } );
  }

  void Dock::buildWidgets()
  {
    auto *contents = new QWidget( this );
    mAnswer = new AnswerBar( *mPreview, contents );
    mUnits = new UnitsBar( contents );
    auto *parts = new QWidget( contents );
    mDrawing = new DrawingSection( mUnits->units(), parts );
    mGround = new GroundSection( mUnits->units(), parts );
    mWater = new WaterSection( mUnits->units(), parts );
    mLimits = new LimitsSection( mUnits->units(), parts );
    mSections = { mDrawing, mGround, mWater, mLimits, new MoreSection( mUnits->units(), parts ) };
    auto *partColumn = new QVBoxLayout( parts );
    for ( Section *section : std::as_const( mSections ) )
      partColumn->addWidget( section );
    partColumn->addStretch( 1 );

    auto *scroll = new QScrollArea( contents );
    scroll->setWidgetResizable( true );
    scroll->setFrameShape( QFrame::NoFrame );
    scroll->setHorizontalScrollBarPolicy( Qt::ScrollBarAsNeeded );
    scroll->setWidget( parts );
    auto *column = new QVBoxLayout( contents );
    column->setContentsMargins( 0, 0, 0, 0 );
    column->setSpacing( 0 );
    column->addWidget( mAnswer );
    column->addWidget( scroll, 1 );
    column->addWidget( mUnits );
    setWidget( contents );

    mPickTool =
      std::make_unique<SourcePickTool>( mCanvas, [this]( const QgsPointXY &place ) { return look( place ); } );
  }

  void Dock::connectAll()
  {
    for ( Section *section : std::as_const( mSections ) )
      connect( section, &Section::edited, this, &Dock::apply );
    connect( mUnits, &UnitsBar::edited, this, &Dock::changeUnits );
    connect( mPreview, &Preview::changed, this, &Dock::follow );
    connect( mAnswer, &AnswerBar::saveWanted, this, &Dock::askWhereToSave );
    connect( mWater, &WaterSection::pickWanted, this, &Dock::pick );
    connect( mPickTool.get(), &SourcePickTool::picked, this, &Dock::accept );
    connect( mPickTool.get(), &SourcePickTool::givenUp, this, [this] { pick( false ); } );
    connect( mPickTool.get(), &QgsMapTool::deactivated, this, [this] { mWater->showPicking( false ); } );
    connect( &mSave, &QTimer::timeout, this, [this] { writeSettings( *mProject, settings() ); } );
    connect( mProject, &QgsProject::readProject, this, &Dock::readProject );
    connect( mProject, &QgsProject::cleared, this, &Dock::readProject );
    connect( mProject, &QgsProject::layersAdded, this, &Dock::guessAgain );
    connect(
      this, &QgsDockWidget::closedStateChanged, this, [this]( bool closed ) { mPreview->setActive( !closed ); } );
  }

  void Dock::readProject()
  {
    mSave.stop();
    PanelSettings kept;
    showSettings( readSettings( *mProject, kept ) ? kept : guessedSettings( *mProject ) );
  }

  void Dock::guessAgain()
  {
    PanelSettings settings = guessedSettings( *mProject );
    PanelSettings kept;
    if ( readSettings( *mProject, kept ) )
    {
      // Only what was never chosen is guessed.
      const auto keptOr = []( const QString &id, const QString &guess ) { return id.isEmpty() ? guess : id; };
      kept.mains = keptOr( kept.mains, settings.mains );
      kept.laterals = keptOr( kept.laterals, settings.laterals );
      kept.terrain = keptOr( kept.terrain, settings.terrain );
      settings = kept;
    }
    showSettings( settings );
  }

  void Dock::showSettings( const PanelSettings &settings )
  {
    mUnits->showParameters( settings.parameters );
    for ( Section *section : std::as_const( mSections ) )
    {
      section->setUnits( mUnits->units() );
      section->showParameters( settings.parameters );
    }
    mDrawing->setLayers( mProject->mapLayer<QgsVectorLayer *>( settings.mains ),
      mProject->mapLayer<QgsVectorLayer *>( settings.laterals ) );
    mGround->setTerrain( mProject->mapLayer<QgsRasterLayer *>( settings.terrain ) );
    mPreview->setInput( input() );
    follow();
  }

  PanelSettings Dock::settings() const
  {
    const auto idOf = []( const QgsMapLayer *layer ) { return layer ? layer->id() : QString(); };
    PanelSettings settings;
    settings.mains = idOf( mDrawing->mains() );
    settings.laterals = idOf( mDrawing->laterals() );
    settings.terrain = idOf( mGround->terrain() );
    mUnits->fill( settings.parameters );
    for ( const Section *section : mSections )
      section->fill( settings.parameters );
    return settings;
  }

  PreviewInput Dock::input() const
  {
    PreviewInput input;
    input.mains = mDrawing->mains();
    input.laterals = mDrawing->laterals();
    input.terrain = mGround->terrain();
    input.parameters = settings().parameters;
    return input;
  }

  void Dock::apply()
  {
    mSave.start();
    mPreview->setInput( input() );
  }

  void Dock::changeUnits()
  {
    for ( Section *section : std::as_const( mSections ) )
      section->setUnits( mUnits->units() );
    rememberUnits( settings().parameters );
    apply();
  }

  void Dock::follow()
  {
    const PreviewResultPointer &result = mPreview->result();
    mLimits->describe( result ? &result->plan : nullptr );
    mGround->describe( result ? result->terrain.get() : nullptr );
    mWater->describe( result ? waterText( result->plan ) : QString() );
    mDrawing->setSummary(
      result ? tr( "%n features", nullptr, static_cast<int>( result->plan.drawn.features.size() ) ) : QString() );
  }

  void Dock::pick( bool wanted )
  {
    if ( wanted == ( mCanvas->mapTool() == mPickTool.get() ) )
      return;
    if ( !wanted )
    {
      if ( mToolBefore )
        mCanvas->setMapTool( mToolBefore );
      else
        mCanvas->unsetMapTool( mPickTool.get() );
      return;
    }
    mToolBefore = mCanvas->mapTool();
    mPickTool->setLayers( { mDrawing->mains(), mDrawing->laterals() } );
    mCanvas->setMapTool( mPickTool.get() );
    mCanvas->setFocus();
  }

  QgsPointXY Dock::toPlan( const QgsPointXY &place ) const
  {
    return QgsCoordinateTransform(
      mCanvas->mapSettings().destinationCrs(), mDrawing->mains()->crs(), mProject->transformContext() )
      .transform( place );
  }

  QString Dock::look( const QgsPointXY &place )
  {
    if ( !mDrawing->mains() || !mGround->terrain() )
      return tr( "Click to set the source here." );
    try
    {
      const SourceLook found = lookAtSource( input(), toPlan( place ), mProject->transformContext(), mLookTerrain );
      return sourceLookText( found, mUnits->units() );
    }
    catch ( const QgsException &e )
    {
      return e.what();
    }
    catch ( const std::exception &e )
    {
      return QString::fromUtf8( e.what() );
    }
  }

  void Dock::accept( const QgsPointXY &place )
  {
    pick( false );
    if ( !mDrawing->mains() )
      return;
    try
    {
      mWater->setPlace( pointParameter( toPlan( place ), mDrawing->mains()->crs() ) );
    }
    catch ( const QgsCsException & )
    {
      mWater->describe(
        tr( "This place cannot be told in the CRS of the mainlines; check the CRSs of map and layer." ) );
    }
  }

} // namespace stillhead
