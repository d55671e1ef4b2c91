// SPDX-License-Identifier: GPL-2.0-or-later
// Picks the place of the source on the map: the pencil catches ends and vertices first, then lines, and shows what a
// source there would mean before the click.
#pragma once

#include "plugin/maptools/readout.h"

#include <qgsmaptool.h>
#include <qgspointxy.h>
#include <qgsvectorlayer.h>

#include <QVector>

#include <functional>
#include <memory>
#include <optional>

class QgsVertexMarker;

namespace stillhead
{

  class SourcePickTool : public QgsMapTool
  {
      Q_OBJECT

    public:
      //! Tells in words what a source at a place (of the map) would mean.
      using Look = std::function<QString( const QgsPointXY &place )>;

      SourcePickTool( QgsMapCanvas *canvas, Look look );
      ~SourcePickTool() override;

      //! Layers whose pipe the pencil catches; each may be null.
      void setLayers( const QVector<QgsVectorLayer *> &layers );

      void canvasMoveEvent( QgsMapMouseEvent *event ) override;
      void canvasReleaseEvent( QgsMapMouseEvent *event ) override;
      void keyPressEvent( QKeyEvent *event ) override;
      void deactivate() override;

    signals:
      //! A place of the map was accepted.
      void picked( const QgsPointXY &place );

      //! The user has had enough.
      void givenUp();

    private:
      //! The place on the pipe nearest to \a place, within reach of the pencil.
      std::optional<QgsPointXY> caught( const QgsPointXY &place ) const;

      Look mLook;
      QVector<QPointer<QgsVectorLayer>> mLayers;
      ReadOut mReadOut;
      std::unique_ptr<QgsVertexMarker> mMarker;
  };

} // namespace stillhead
