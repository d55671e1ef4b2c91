// SPDX-License-Identifier: GPL-2.0-or-later
// Asks the result about the place under the cursor, whatever tool is at work, and shows the answer beside it. It changes
// nothing, in project or layers.
#pragma once

#include "core/job/placeprobe.h"
#include "plugin/maptools/readout.h"
#include "plugin/preview/previewwork.h"

#include <qgscoordinatetransform.h>
#include <qgspointxy.h>

#include <QObject>
#include <QPointer>

#include <memory>
#include <optional>

class QgsMapCanvas;

namespace stillhead
{

  class Preview;

  //! A place on pipe, found near a place of the map.
  struct PlaceFound
  {
      PlaceOnLine on;
      PlaceFigures figures;
      QgsPointXY place; //!< of the map, on the pipe
  };

  class Inquiry : public QObject
  {
      Q_OBJECT

    public:
      Inquiry( Preview &preview, QgsMapCanvas *canvas, QObject *parent );
      ~Inquiry() override;

      //! The pipe within reach of the pencil at \a place of the map.
      std::optional<PlaceFound> pipeAt( const QgsPointXY &place );

      //! The answer for \a place of the map; blank where there is none.
      QString textAt( const QgsPointXY &place );

      bool eventFilter( QObject *watched, QEvent *event ) override;

    signals:
      //! The cursor is over pipe (or no longer).
      void pipeHovered( const std::optional<PlaceOnLine> &on );

    private:
      void follow();
      void ask( const QgsPointXY &place );
      QgsCoordinateTransform toPlan() const;

      Preview &mPreview;
      QPointer<QgsMapCanvas> mCanvas;
      ReadOut mReadOut;
      PreviewResultPointer mResult;
      std::unique_ptr<PlaceProbe> mProbe; //!< of mResult
  };

} // namespace stillhead
