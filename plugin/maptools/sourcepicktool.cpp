// SPDX-License-Identifier: GPL-2.0-or-later
// Catching goes through QGIS's own index of the layers, which knows the map's CRS.
#include "plugin/maptools/sourcepicktool.h"

#include <qgsmapcanvas.h>
#include <qgsmapmouseevent.h>
#include <qgspointlocator.h>
#include <qgssnappingutils.h>
#include <qgsvertexmarker.h>

#include <QKeyEvent>

namespace stillhead
{

  namespace
  {

    constexpr double REACH_PIXELS = 14.0;

  } // namespace

  SourcePickTool::SourcePickTool( QgsMapCanvas *canvas, Look look )
    : QgsMapTool( canvas )
    , mLook( std::move( look ) )
    , mReadOut( canvas )
    , mMarker( std::make_unique<QgsVertexMarker>( canvas ) )
  {
    setCursor( Qt::CrossCursor );
    setToolName( tr( "Pick the source" ) );
    mMarker->setIconType( QgsVertexMarker::ICON_CIRCLE );
    mMarker->setIconSize( 14 );
    mMarker->setPenWidth( 3 );
    mMarker->setColor( Qt::black );
    mMarker->hide();
  }

  SourcePickTool::~SourcePickTool() = default;

  void SourcePickTool::setLayers( const QVector<QgsVectorLayer *> &layers )
  {
    mLayers.clear();
    for ( QgsVectorLayer *layer : layers )
      mLayers << layer;
  }

  std::optional<QgsPointXY> SourcePickTool::caught( const QgsPointXY &place ) const
  {
    const double reach = REACH_PIXELS * canvas()->mapUnitsPerPixel();
    QgsPointLocator::Match best;
    for ( const bool vertices : { true, false } )
    {
      for ( const QPointer<QgsVectorLayer> &layer : mLayers )
      {
        if ( !layer || !layer->isValid() )
          continue;
        QgsPointLocator *locator = canvas()->snappingUtils()->locatorForLayer( layer );
        const QgsPointLocator::Match match =
          vertices ? locator->nearestVertex( place, reach ) : locator->nearestEdge( place, reach );
        if ( match.isValid() && ( !best.isValid() || match.distance() < best.distance() ) )
          best = match;
      }
      if ( best.isValid() )
        return best.point();
    }
    return std::nullopt;
  }

  void SourcePickTool::canvasMoveEvent( QgsMapMouseEvent *event )
  {
    const std::optional<QgsPointXY> place = caught( event->mapPoint() );
    mMarker->setVisible( place.has_value() );
    if ( place )
      mMarker->setCenter( *place );
    mReadOut.show( place ? mLook( *place ) : tr( "Point at a pipe." ), event->pos() );
  }

  void SourcePickTool::canvasReleaseEvent( QgsMapMouseEvent *event )
  {
    if ( event->button() == Qt::RightButton )
    {
      emit givenUp();
      return;
    }
    if ( const std::optional<QgsPointXY> place = caught( event->mapPoint() ) )
      emit picked( *place );
    else
      mReadOut.show( tr( "No pipe within reach here; click on a pipe." ), event->pos() );
  }

  void SourcePickTool::keyPressEvent( QKeyEvent *event )
  {
    if ( event->key() == Qt::Key_Escape )
    {
      event->accept();
      emit givenUp();
      return;
    }
    QgsMapTool::keyPressEvent( event );
  }

  void SourcePickTool::deactivate()
  {
    mReadOut.hide();
    mMarker->hide();
    QgsMapTool::deactivate();
  }

} // namespace stillhead
