// SPDX-License-Identifier: GPL-2.0-or-later
// Labels of results: short dark text on a white halo, moved beside its point and tied to it by a thin line, or along its line.
#pragma once

#include <QString>

class QgsVectorLayer;

namespace stillhead
{

  //! Labels the points of \a layer with \a expression; a point for which it is null has none.
  void labelPoints( QgsVectorLayer &layer, const QString &expression );

  //! Labels of some points of a layer.
  struct PointLabels
  {
      QString filter; //!< an expression that is true for them
      QString expression;
  };

  /**
   * Labels two kinds of points of \a layer: the \a first always, \a more smaller, only where there is room left and only on maps of
   * 1 : \a smallestScale or larger.
   */
  void labelPoints( QgsVectorLayer &layer, const PointLabels &first, const PointLabels &more, double smallestScale );

  //! Labels the lines of \a layer with \a expression, along them and where there is room.
  void labelLines( QgsVectorLayer &layer, const QString &expression );

  //! Keeps labels of other layers off the features of \a layer as far as there is room.
  void keepLabelsOff( QgsVectorLayer &layer );

} // namespace stillhead
