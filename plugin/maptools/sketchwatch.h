// SPDX-License-Identifier: GPL-2.0-or-later
// Watches QGIS's own drawing tools and hands the line under way to the preview, so that its pressures show before it is
// finished. It adds no pencil of its own and takes nothing from the tool.
#pragma once

#include <qgspointxy.h>

#include <QObject>
#include <QPointer>

class QgsMapCanvas;

namespace stillhead
{

  class Preview;

  class SketchWatch : public QObject
  {
      Q_OBJECT

    public:
      SketchWatch( Preview &preview, QgsMapCanvas *canvas, QObject *parent );

    private:
      void look( const QgsPointXY &cursor );

      Preview &mPreview;
      QPointer<QgsMapCanvas> mCanvas;
  };

} // namespace stillhead
