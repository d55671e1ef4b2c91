// SPDX-License-Identifier: GPL-2.0-or-later
// Tells when anything about a few layers changes that pressures depend on: drawing (undo and redo included), saving or
// dropping edits, CRS, file, and the layer's end.
#pragma once

#include <qgsrasterlayer.h>
#include <qgsvectorlayer.h>

#include <QObject>
#include <QPointer>
#include <QVector>

namespace stillhead
{

  class LayerWatch : public QObject
  {
      Q_OBJECT

    public:
      using QObject::QObject;

      //! Watches these in place of those watched before; each may be null.
      void watch( const QVector<QgsVectorLayer *> &drawn, QgsRasterLayer *terrain );

    signals:
      void changed();

    private:
      void watchAny( QgsMapLayer *layer );

      QVector<QPointer<QgsMapLayer>> mLayers;
  };

} // namespace stillhead
