// SPDX-License-Identifier: GPL-2.0-or-later
// The polygons of AREA as a mask over the terrain's cells.
#pragma once

#include "core/surface/areamask.h"
#include "processing/reading/terrainreader.h"

#include <qgsprocessingutils.h>

namespace stillhead
{

  /**
   * \throws QgsProcessingException where there are no polygons, none of them lies on the terrain, or they cannot be reprojected
   */
  AreaMask readArea( const QgsProcessingFeatureSource &source, const Terrain &terrain, const ParameterValues &values );

} // namespace stillhead
