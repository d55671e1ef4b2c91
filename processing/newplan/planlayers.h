// SPDX-License-Identifier: GPL-2.0-or-later
// The planning layers as a table: which layers there are, their fields, what each field means, what may stand in it and
// how the form asks for it. Names of layers and fields, and words that stand in them, are contract; all else is text.
#pragma once

#include "processing/displayunits.h"
#include "processing/qgiscompat.h"

#include <qgsfields.h>

#include <QString>
#include <QVector>

namespace stillhead
{

  //! The four layers of a plan.
  enum class PlanLayerKind
  {
    Mainlines,
    Laterals,
    Sources,
    Devices
  };

  //! A word that a field may hold, and what the user reads for it.
  struct PlanChoice
  {
      QString word;
      QString label;
  };

  struct PlanField
  {
      QString name;
      QString alias;               //!< with its unit
      bool isText = false;         //!< else a number
      bool isLong = false;         //!< text of several lines
      QVector<PlanChoice> choices; //!< blank: anything; else the first is the default
      QString rule;                //!< expression that holds for a good value; blank: any value is good
      QString ruleText;            //!< what the rule asks for, as a sentence
      QString group;               //!< heading in the form
      QString groupShown = {};     //!< expression that says when the group is shown; blank: always
  };

  struct PlanLayer
  {
      PlanLayerKind kind = PlanLayerKind::Mainlines;
      QString table; //!< its name in the GeoPackage
      QString title; //!< its name in the project
      compat::WkbType type = compat::WkbType::LineString;
      QVector<PlanField> fields;

      QgsFields plainFields() const;
  };

  //! All four, in the order in which they are drawn from the top: devices, sources, mainlines, laterals.
  QVector<PlanLayer> planLayers( const DisplayUnits &units );

} // namespace stillhead
