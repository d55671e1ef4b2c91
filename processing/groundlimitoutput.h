// SPDX-License-Identifier: GPL-2.0-or-later
// GROUND_LIMITS: the ground up to which the lowest acceptable pressure is met (the ceiling) and down to which the highest is
// not passed (the floor), as lines on the terrain.
#pragma once

#include "core/judgement/limits.h"
#include "processing/displayunits.h"
#include "processing/reading/terrainreader.h"
#include "processing/surfaceoutput.h"
#include "processing/writing/rowspool.h"

#include <qgsfields.h>

namespace stillhead
{

  //! Elevations of the ground, in metres, between which a pipe at the depth of cover keeps within both limits.
  struct GroundLimits
  {
      double ceilingM = 0.0; //!< higher ground has less than the lowest acceptable pressure, low case
      double floorM = 0.0;   //!< lower ground has more than the highest acceptable pressure, high case
  };

  GroundLimits groundLimits( const SurfaceInput &input, const Limits &limits, const DisplayUnits &units );

  QgsFields groundLimitFields();

  /**
   * Puts the lines of ceiling and floor into \a spool, higher ground on their left.
   * \throws QgsProcessingException, Cancelled, std::runtime_error
   */
  void collectGroundLimits( RowSpool &spool, const SurfaceInput &input, const Terrain &terrain, const Limits &limits,
    const DisplayUnits &units, Monitor &monitor );

} // namespace stillhead
