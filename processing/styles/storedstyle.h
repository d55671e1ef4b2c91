// SPDX-License-Identifier: GPL-2.0-or-later
// Keeps the style of a result with its data: a result in a GeoPackage carries it as the layer's default style, so that
// it comes up styled wherever it is opened, also when the run was headless.
#pragma once

#include "processing/styles/resultstyle.h"

#include <QString>

namespace stillhead
{

  /**
   * Stores the style of the output beside the vector layer that \a source names, once the sink has been closed. Does
   * nothing for formats that keep no styles. \returns an error text, empty when all is well
   */
  QString storeDefaultStyle( const QString &source, ResultLayer what, const ResultStyle &style );

} // namespace stillhead
