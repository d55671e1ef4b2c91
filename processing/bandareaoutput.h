// SPDX-License-Identifier: GPL-2.0-or-later
// BAND_AREAS: where on the ground pipe would lie in which pressure band, as polygons.
#pragma once

#include "processing/displayunits.h"
#include "processing/reading/terrainreader.h"
#include "processing/styles/resultstyle.h"
#include "processing/surfaceoutput.h"
#include "processing/writing/outputset.h"

#include <qgscoordinatetransformcontext.h>

namespace stillhead
{

  /**
   * Writes the bands of the high case of \a input; \a area of each polygon is ground area in squared length units.
   * \returns the id of the layer
   * \throws QgsProcessingException, Cancelled, std::runtime_error
   */
  QString writeBandAreas( OutputSet &outputs, const SurfaceInput &input, const Terrain &terrain, const Limits &limits,
    const ResultStyle &style, const DisplayUnits &units, const QgsCoordinateTransformContext &transforms,
    Monitor &monitor );

} // namespace stillhead
