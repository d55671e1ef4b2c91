// SPDX-License-Identifier: GPL-2.0-or-later
// How a planning layer shows itself: aliases, lists of values, rules and the edit form, and its symbols. All of it is
// stored in the GeoPackage as the layer's default style.
#pragma once

#include "processing/newplan/planlayers.h"

#include <QString>

class QgsVectorLayer;

namespace stillhead
{

  //! Gives \a layer, whose fields are those of \a plan, its form.
  void setPlanForm( QgsVectorLayer &layer, const PlanLayer &plan );

  //! Gives \a layer its symbols: mainlines bold, laterals thin and dashed, sources and devices by shape.
  void setPlanSymbols( QgsVectorLayer &layer, const PlanLayer &plan );

  //! Both, as the text that a GeoPackage stores.
  QString planStyleText( const PlanLayer &plan );

} // namespace stillhead
