// SPDX-License-Identifier: GPL-2.0-or-later
// Paints pipe and worst places over the map, in the colours, widths and marks of the styled results.
#pragma once

#include "plugin/overlay/overlaypath.h"

#include <qgsmapcanvasitem.h>

class QPainter;

namespace stillhead
{

  //! Paints a picture; the canvas owns it.
  class OverlayItem : public QgsMapCanvasItem
  {
    public:
      explicit OverlayItem( QgsMapCanvas *canvas );

      void show( const OverlayPicture &picture, bool isStale );
      const OverlayPicture &picture() const { return mPicture; }

    protected:
      void paint( QPainter *painter ) override;
      void updatePosition() override;

    private:
      double pixelsPerMm() const;
      QPolygonF toPixels( const QPolygonF &line ) const;
      void paintCasing( QPainter &painter, const OverlayPipe &pipe ) const;
      void paintPipe( QPainter &painter, const OverlayPipe &pipe ) const;
      void paintMarks( QPainter &painter, const OverlayPipe &pipe ) const;
      void paintTriangle( QPainter &painter, const QPointF &pixel, bool up, bool isBlack ) const;
      void paintWorst( QPainter &painter, const OverlayMark &mark ) const;
      void paintSource( QPainter &painter ) const;

      OverlayPicture mPicture;
      bool mIsStale = false;
  };

} // namespace stillhead
