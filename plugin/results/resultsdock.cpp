// SPDX-License-Identifier: GPL-2.0-or-later
// Lists are filled only while they can be seen, and not while a line is being drawn.
#include "plugin/results/resultsdock.h"

#include "plugin/preview/preview.h"
#include "plugin/results/resulttab.h"

#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgsmapcanvas.h>
#include <qgsmessagebar.h>
#include <qgsproject.h>

#include <QTabWidget>

namespace stillhead
{

  namespace
  {

    //! How much of the map a single place is shown with: enough to see where it lies.
    constexpr double PLACE_WIDTH_SCREENS = 0.2;

  } // namespace

  ResultsDock::ResultsDock( Preview &preview, QgsMapCanvas *canvas, QgsMessageBar *messages, QWidget *parent )
    : QgsDockWidget( tr( "Stillhead results" ), parent )
    , mPreview( preview )
    , mCanvas( canvas )
    , mMessages( messages )
    , mTabs( new QTabWidget( this ) )
  {
    setObjectName( QStringLiteral( "StillheadResultsDock" ) );
    mPlaces = addList( QStringLiteral( "StillheadPlaces" ) );
    mStretches = addList( QStringLiteral( "StillheadStretches" ) );
    mFindings = addList( QStringLiteral( "StillheadFindings" ) );
    setWidget( mTabs );
    connect( &mPreview, &Preview::changed, this, &ResultsDock::follow );
    connect( this, &QgsDockWidget::closedStateChanged, this, [this]( bool closed ) {
      mIsOpen = !closed;
      follow();
    } );
    fill();
  }

  ResultTab *ResultsDock::addList( const QString &name )
  {
    auto *tab = new ResultTab( mTabs );
    tab->setObjectName( name );
    mTabs->addTab( tab, QString() );
    connect( tab, &ResultTab::placeChosen, this, &ResultsDock::goTo );
    connect( tab, &ResultTab::said, this, &ResultsDock::say );
    return tab;
  }

  void ResultsDock::addTab( QWidget *tab, const QString &title )
  {
    mTabs->addTab( tab, title );
  }

  void ResultsDock::follow()
  {
    const PreviewResultPointer &result = mPreview.result();
    if ( !mIsOpen || result == mShown || ( result && result->sketched ) )
      return;
    mShown = result;
    fill();
  }

  void ResultsDock::fill()
  {
    mPlaces->setList( mShown ? placeList( mShown->plan ) : ResultList() );
    mStretches->setList( mShown ? stretchList( mShown->plan ) : ResultList() );
    mFindings->setList( mShown ? findingList( mShown->plan ) : ResultList() );
    const auto title = [this]( ResultTab *tab, const QString &text ) {
      mTabs->setTabText( mTabs->indexOf( tab ), tr( "%1 (%2)" ).arg( text ).arg( tab->model().rowCount() ) );
    };
    title( mPlaces, tr( "&Places" ) );
    title( mStretches, tr( "&Stretches" ) );
    title( mFindings, tr( "&Findings" ) );
  }

  void ResultsDock::goTo( const QgsGeometry &place )
  {
    if ( !mCanvas || !mShown )
      return;
    QgsGeometry onMap( place );
    try
    {
      onMap.transform( QgsCoordinateTransform(
        mShown->plan.drawn.crs, mCanvas->mapSettings().destinationCrs(), QgsProject::instance()->transformContext() ) );
    }
    catch ( const QgsCsException & )
    {
      say( tr( "This place cannot be shown in the map's CRS." ), true );
      return;
    }
    QgsRectangle box = onMap.boundingBox();
    if ( box.width() <= 0.0 && box.height() <= 0.0 )
    {
      // A map that is near enough stays as it is, but for its middle.
      QgsRectangle near = mCanvas->extent();
      const QgsRectangle full = mCanvas->fullExtent();
      const double scale = near.width() > PLACE_WIDTH_SCREENS * full.width() && full.width() > 0.0
        ? PLACE_WIDTH_SCREENS * full.width() / near.width()
        : 1.0;
      near.scale( scale );
      box = QgsRectangle::fromCenterAndSize( box.center(), near.width(), near.height() );
    }
    else
    {
      box.scale( 1.5 );
    }
    mCanvas->setExtent( box );
    mCanvas->refresh();
    mCanvas->flashGeometries( { onMap }, mCanvas->mapSettings().destinationCrs() );
  }

  void ResultsDock::say( const QString &text, bool isProblem )
  {
    if ( !mMessages )
      return;
    mMessages->pushMessage( windowTitle(), text, isProblem ? Qgis::MessageLevel::Warning : Qgis::MessageLevel::Info );
  }

} // namespace stillhead
