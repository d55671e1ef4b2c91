// SPDX-License-Identifier: GPL-2.0-or-later
// Small builders for the parts that result symbols are made of; every size is in millimetres on paper. The pass of a
// part decides what lies over what across all pipe of a layer: casings never cover a pipe line or a mark.
#pragma once

#include "processing/qgiscompat.h"

#include <qgslinesymbol.h>
#include <qgsmarkersymbol.h>

#include <QColor>
#include <QList>

#include <memory>

namespace stillhead
{

  //! Order of drawing along pipe, lowest first.
  enum class Pass
  {
    Edge,
    Casing,
    Hatch,
    Pipe,
    Mark
  };

  //! A plain line. The caller owns it, as symbols take what they are given.
  QgsSimpleLineSymbolLayer *lineLayer( const QColor &color, double widthMm, Pass pass );

  //! Dashes of \a dashMm parted by \a gapMm; \a early lets each dash begin and end by so much sooner and later.
  void setDashes( QgsSimpleLineSymbolLayer &layer, double dashMm, double gapMm, double earlyMm = 0.0 );

  //! A marker of one shape. Shapes made of lines only take \a stroke.
  QgsSimpleMarkerSymbolLayer *shapeLayer(
    compat::MarkerShape shape, double sizeMm, const QColor &fill, const QColor &stroke, double strokeMm = 0.25 );

  std::unique_ptr<QgsMarkerSymbol> markerSymbol( const QList<QgsSymbolLayer *> &layers );
  std::unique_ptr<QgsLineSymbol> lineSymbol( const QList<QgsSymbolLayer *> &layers );

  //! Where markers stand along pipe: one every interval, the first at the offset, turned with the pipe or upright.
  struct Spacing
  {
      double intervalMm = 15.0;
      double offsetMm = 4.0;
      bool turned = false;
  };

  //! The marker along the line, in the pass of marks.
  QgsSymbolLayer *markersAlong( std::unique_ptr<QgsMarkerSymbol> marker, const Spacing &spacing );

  //! Strokes of \a line across the pipe, \a lengthMm long, turned by \a angle degrees from square to it.
  QgsSymbolLayer *strokesAcross(
    std::unique_ptr<QgsLineSymbol> line, double lengthMm, double intervalMm, double angle, Pass pass );

} // namespace stillhead
