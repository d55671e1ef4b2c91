// SPDX-License-Identifier: GPL-2.0-or-later
// SURFACE as both algorithms give it: what to write, from the same static levels that pipe is judged by.
#pragma once

#include "core/feedback/monitor.h"
#include "core/geo/surfacewriter.h"
#include "core/statics/source.h"
#include "processing/displayunits.h"
#include "processing/reading/terrainreader.h"

#include <QString>

#include <optional>

namespace stillhead
{

  //! What the surface shows.
  struct SurfaceInput
  {
      StaticLevels levels;
      bool hasLow = false; //!< a low case was given: it becomes the second band
      double coverM = 0.0;
      std::optional<AreaMask> area;
  };

  //! Water at rest under one of the levels, told in the user's unit.
  RestingWater restingWater( double levelM, double coverM, const DisplayUnits &units );

  /**
   * Writes the surface to the file \a path. \throws Cancelled, std::runtime_error; an earlier file stays then
   */
  void writeSurfaceFile( const QString &path, const SurfaceInput &input, const Terrain &terrain,
    const DisplayUnits &units, Monitor &monitor );

} // namespace stillhead
