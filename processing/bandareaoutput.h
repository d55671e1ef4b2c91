// SPDX-License-Identifier: GPL-2.0-or-later
// BAND_AREAS: where on the ground pipe would lie in which pressure band, as polygons.
#pragma once

#include "processing/displayunits.h"
#include "processing/reading/terrainreader.h"
#include "processing/styles/resultstyle.h"
#include "processing/surfaceoutput.h"
#include "processing/writing/rowspool.h"

#include <qgscoordinatetransformcontext.h>
#include <qgsfields.h>

namespace stillhead
{

  QgsFields bandAreaFields();

  /**
   * Puts the polygons of the bands of the high case of \a input into \a spool; `area` is ground area in squared length units.
   * \throws QgsProcessingException, Cancelled, std::runtime_error
   */
  void collectBandAreas( RowSpool &spool, const SurfaceInput &input, const Terrain &terrain, const Limits &limits,
    const ResultStyle &style, const DisplayUnits &units, const QgsCoordinateTransformContext &transforms,
    Monitor &monitor );

} // namespace stillhead
