// SPDX-License-Identifier: GPL-2.0-or-later
// Places are taken to the map's CRS once for each result, not with every pan.
#include "plugin/overlay/resultoverlay.h"

#include "plugin/overlay/overlayitem.h"
#include "plugin/preview/preview.h"

#include <qgsproject.h>

namespace stillhead
{

  ResultOverlay::ResultOverlay( Preview &preview, QgsMapCanvas *canvas, QObject *parent )
    : QObject( parent )
    , mPreview( preview )
    , mCanvas( canvas )
  {
    connect( &mPreview, &Preview::changed, this, &ResultOverlay::follow );
    connect( mCanvas, &QgsMapCanvas::destinationCrsChanged, this, &ResultOverlay::rebuild );
    follow();
  }

  ResultOverlay::~ResultOverlay()
  {
    // The canvas takes its items with it.
    if ( mCanvas )
      delete mItem;
  }

  void ResultOverlay::follow()
  {
    if ( !mCanvas )
      return;
    if ( mPreview.result() != mShown )
    {
      mShown = mPreview.result();
      rebuild();
    }
    else if ( mItem )
    {
      mItem->show( mItem->picture(), mPreview.isStale() );
    }
  }

  void ResultOverlay::rebuild()
  {
    if ( !mShown )
    {
      delete mItem;
      mItem = nullptr;
      return;
    }
    if ( !mItem )
      mItem = new OverlayItem( mCanvas );
    const QgsCoordinateTransform toMap(
      mShown->plan.drawn.crs, mCanvas->mapSettings().destinationCrs(), QgsProject::instance()->transformContext() );
    mItem->show( overlayPicture( *mShown, toMap ), mPreview.isStale() );
  }

} // namespace stillhead
