// SPDX-License-Identifier: GPL-2.0-or-later
// One probe serves until the next result; it keeps the profile of the line under the cursor.
#include "plugin/maptools/inquiry.h"

#include "plugin/maptools/placetext.h"
#include "plugin/maptools/sourcepicktool.h"
#include "plugin/preview/preview.h"

#include <qgsexception.h>
#include <qgsmapcanvas.h>
#include <qgsproject.h>

#include <QEvent>

namespace stillhead
{

  namespace
  {

    constexpr double REACH_PIXELS = 8.0;

  } // namespace

  Inquiry::Inquiry( Preview &preview, QgsMapCanvas *canvas, QObject *parent )
    : QObject( parent )
    , mPreview( preview )
    , mCanvas( canvas )
    , mReadOut( canvas )
  {
    connect( &mPreview, &Preview::changed, this, &Inquiry::follow );
    connect( mCanvas, &QgsMapCanvas::xyCoordinates, this, &Inquiry::ask );
    mCanvas->viewport()->installEventFilter( this );
    follow();
  }

  Inquiry::~Inquiry() = default;

  void Inquiry::follow()
  {
    if ( mPreview.result() == mResult )
      return;
    mProbe.reset();
    mResult = mPreview.result();
    if ( !mResult )
      mReadOut.hide();
  }

  QgsCoordinateTransform Inquiry::toPlan() const
  {
    return QgsCoordinateTransform(
      mCanvas->mapSettings().destinationCrs(), mResult->plan.drawn.crs, QgsProject::instance()->transformContext() );
  }

  std::optional<PlaceFound> Inquiry::pipeAt( const QgsPointXY &place )
  {
    if ( !mResult || !mCanvas )
      return std::nullopt;
    const SolvedPlan &plan = mResult->plan;
    if ( !mProbe )
      mProbe = std::make_unique<PlaceProbe>( plan.result, *plan.planToTerrain, *mResult->terrain->cache,
        mResult->useLineZ, plan.units.specificWeightNPerM3() );
    const QgsCoordinateTransform transform = toPlan();
    const QgsPointXY here = transform.transform( place );
    const QgsPointXY beside = transform.transform( place.x() + REACH_PIXELS * mCanvas->mapUnitsPerPixel(), place.y() );
    const PlanPoint at { here.x(), here.y() };
    const double reachM = plan.measure->scaleAt( at ).distanceM( beside.x() - here.x(), beside.y() - here.y() );
    const std::optional<NearestPipe> pipe = nearestPipe( plan.result.drawing, *plan.measure, at, 0.0 );
    if ( !pipe || !( pipe->distanceM <= reachM ) )
      return std::nullopt;
    const CanonicalLine &line = plan.result.drawing.lines[static_cast<std::size_t>( pipe->on.line )];
    const PlanPoint onPipe = plan.result.drawing.placeAt( line, pipe->on.alongM );
    return PlaceFound { pipe->on, mProbe->onPipe( pipe->on ),
      transform.transform( QgsPointXY( onPipe.x, onPipe.y ), Qgis::TransformDirection::Reverse ) };
  }

  QString Inquiry::textAt( const QgsPointXY &place )
  {
    if ( !mResult || !mCanvas )
      return QString();
    try
    {
      const std::optional<PlaceFound> pipe = pipeAt( place );
      emit pipeHovered( pipe ? std::optional<PlaceOnLine>( pipe->on ) : std::nullopt );
      if ( pipe )
        return pipePlaceText( pipe->figures, mResult->plan );
      const QgsPointXY here = toPlan().transform( place );
      const std::optional<PlaceFigures> ground = mProbe->offPipe( { here.x(), here.y() }, mResult->coverM );
      return ground ? groundPlaceText( *ground, mResult->plan ) : QString();
    }
    catch ( const QgsException & )
    {
      return QString(); // beyond what the map's CRS can tell
    }
    catch ( const std::exception & )
    {
      return QString(); // the terrain cannot be read just now; the next result will say why
    }
  }

  void Inquiry::ask( const QgsPointXY &place )
  {
    // Picking the source has its own words.
    if ( !mCanvas || qobject_cast<SourcePickTool *>( mCanvas->mapTool() ) )
    {
      mReadOut.hide();
      return;
    }
    mReadOut.show( textAt( place ), mCanvas->mapFromGlobal( QCursor::pos() ) );
  }

  bool Inquiry::eventFilter( QObject *watched, QEvent *event )
  {
    if ( event->type() == QEvent::Leave )
    {
      mReadOut.hide();
      emit pipeHovered( std::nullopt );
    }
    return QObject::eventFilter( watched, event );
  }

} // namespace stillhead
