// SPDX-License-Identifier: GPL-2.0-or-later
// The vertices drawn so far, and the cursor where the pencil would be caught.
#include "plugin/maptools/sketchwatch.h"

#include "plugin/preview/preview.h"

#include <qgscompoundcurve.h>
#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgslinestring.h>
#include <qgsmapcanvas.h>
#include <qgsmaptoolcapture.h>
#include <qgsproject.h>
#include <qgssnappingutils.h>

namespace stillhead
{

  namespace
  {

    //! What of \a tool's line stands already, and the cursor, in the CRS of \a layer.
    QgsGeometry lineUnderWay(
      const QgsMapToolCapture &tool, const QgsVectorLayer &layer, const QgsPointXY &cursor, const QgsMapCanvas &canvas )
    {
      const QgsCompoundCurve *curve = tool.captureCurve();
      if ( !curve || curve->isEmpty() )
        return QgsGeometry();
      const std::unique_ptr<QgsLineString> line( curve->curveToLine() );
      const QgsPointLocator::Match caught = canvas.snappingUtils()->snapToMap( cursor );
      const QgsCoordinateTransform toLayer(
        canvas.mapSettings().destinationCrs(), layer.crs(), QgsProject::instance()->transformContext() );
      line->dropZValue();
      line->dropMValue();
      line->addVertex( QgsPoint( toLayer.transform( caught.isValid() ? caught.point() : cursor ) ) );
      return line->numPoints() < 2 ? QgsGeometry() : QgsGeometry( line->clone() );
    }

  } // namespace

  SketchWatch::SketchWatch( Preview &preview, QgsMapCanvas *canvas, QObject *parent )
    : QObject( parent )
    , mPreview( preview )
    , mCanvas( canvas )
  {
    connect( mCanvas, &QgsMapCanvas::xyCoordinates, this, &SketchWatch::look );
    connect( mCanvas, &QgsMapCanvas::mapToolSet, this, [this] { mPreview.setSketch( std::nullopt ); } );
  }

  void SketchWatch::look( const QgsPointXY &cursor )
  {
    const auto *tool = mCanvas ? qobject_cast<QgsMapToolCapture *>( mCanvas->mapTool() ) : nullptr;
    auto *layer = mCanvas ? qobject_cast<QgsVectorLayer *>( mCanvas->currentLayer() ) : nullptr;
    const PreviewInput &input = mPreview.input();
    const bool isPipe = layer && ( layer == input.mains || layer == input.laterals );
    if ( !tool || !isPipe || !mPreview.isActive() )
    {
      mPreview.setSketch( std::nullopt );
      return;
    }
    try
    {
      SketchedLine sketch;
      sketch.geometry = lineUnderWay( *tool, *layer, cursor, *mCanvas );
      sketch.crs = layer->crs();
      sketch.role = layer == input.mains ? Role::Mainline : Role::Lateral;
      mPreview.setSketch( sketch.geometry.isNull() ? std::nullopt : std::optional<SketchedLine>( sketch ) );
    }
    catch ( const QgsCsException & )
    {
      mPreview.setSketch( std::nullopt );
    }
  }

} // namespace stillhead
