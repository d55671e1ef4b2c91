// SPDX-License-Identifier: GPL-2.0-or-later
// A result made ready to be painted: pipe in the map's CRS, sorted by what it looks like.
#pragma once

#include "core/judgement/piece.h"
#include "core/network/drawing.h"
#include "plugin/preview/previewwork.h"

#include <qgscoordinatetransform.h>
#include <qgsrectangle.h>

#include <QPolygonF>
#include <QVector>

namespace stillhead
{

  //! Pipe of one look, in map units.
  struct OverlayPipe
  {
      QPolygonF line;
      QgsRectangle box;
      int band = -1;
      State state = State::NoSource;
      Role role = Role::Mainline;
  };

  //! A worst place with its words.
  struct OverlayMark
  {
      QPointF place;
      bool high = false;
      QString text;
  };

  struct OverlayPicture
  {
      QVector<OverlayPipe> pipes;
      QVector<OverlayMark> marks;
      QPointF source;
      int bands = 0;
  };

  /**
   * The picture of \a result; what cannot be taken to the map's CRS is left out.
   * \param toMap from the CRS of the mainlines to the map's
   */
  OverlayPicture overlayPicture( const PreviewResult &result, const QgsCoordinateTransform &toMap );

} // namespace stillhead
