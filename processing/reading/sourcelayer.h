// SPDX-License-Identifier: GPL-2.0-or-later
// SOURCES: several sources, one a row.
#pragma once

#include "processing/reading/pointlayer.h"
#include "processing/reading/sourcereader.h"

#include <vector>

namespace stillhead
{

  /**
   * Reads the layer that the parameter \a parameterName gives; \a reachM holds for every source.
   * \throws QgsProcessingException for an unknown kind, a missing value, a low case above the high one, or no row at all
   */
  std::vector<SourceInput> readSources( const QgsProcessingFeatureSource &layer, const QString &parameterName,
    double reachM, const DisplayUnits &units, const QgsCoordinateReferenceSystem &crs,
    const QgsCoordinateTransformContext &transforms, Drawing &drawing );

} // namespace stillhead
