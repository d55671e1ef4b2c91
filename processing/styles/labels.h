// SPDX-License-Identifier: GPL-2.0-or-later
// Labels of result points: short dark text on a white halo, moved beside its point and tied to it by a thin line.
#pragma once

#include <QString>

class QgsVectorLayer;

namespace stillhead
{

  //! Labels the points of \a layer with \a expression; a point for which it is null has none.
  void labelPoints( QgsVectorLayer &layer, const QString &expression );

  //! Keeps labels of other layers off the features of \a layer as far as there is room.
  void keepLabelsOff( QgsVectorLayer &layer );

} // namespace stillhead
