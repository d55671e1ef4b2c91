// SPDX-License-Identifier: GPL-2.0-or-later
// The preview's result over the map. Nothing of it is a layer, and it goes when the preview does.
#pragma once

#include "plugin/preview/previewwork.h"

#include <qgsmapcanvas.h>

#include <QObject>
#include <QPointer>

namespace stillhead
{

  class OverlayItem;
  class Preview;

  //! Keeps the item in step with preview and map.
  class ResultOverlay : public QObject
  {
      Q_OBJECT

    public:
      ResultOverlay( Preview &preview, QgsMapCanvas *canvas, QObject *parent );
      ~ResultOverlay() override;

      //! What is painted; null where nothing is.
      const OverlayItem *item() const { return mItem; }

    private:
      void follow();
      void rebuild();

      Preview &mPreview;
      QPointer<QgsMapCanvas> mCanvas;
      OverlayItem *mItem = nullptr;
      PreviewResultPointer mShown;
  };

} // namespace stillhead
