// SPDX-License-Identifier: GPL-2.0-or-later
// The style of a result as text, so that a file can carry it as the layer's default style and the result comes up styled
// wherever it is opened, also when the run was headless.
#pragma once

#include "processing/qgiscompat.h"
#include "processing/styles/resultstyle.h"

#include <qgsfields.h>

#include <QString>
#include <QStringList>

namespace stillhead
{

  //! Values that stand in a field and that the legend therefore shows (states, findings, kinds of device).
  struct LegendValues
  {
      QString field; //!< blank: the legend depends on no field
      QStringList values;
  };

  /**
   * The style of the output \a what with \a fields and geometries of \a type, in the platform's own format. Call it in the main
   * thread: it makes symbols.
   */
  QString styleText( ResultLayer what, const QgsFields &fields, compat::WkbType type, const LegendValues &legend,
    const ResultStyle &style );

} // namespace stillhead
