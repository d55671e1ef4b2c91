// SPDX-License-Identifier: GPL-2.0-or-later
// Polygons of the pressure bands over a terrain, streamed: the lowest and the highest band are open, a pressure equal to
// a limit belongs to the band above, cells without pressure belong to none.
#pragma once

#include "core/feedback/monitor.h"
#include "core/surface/areamask.h"
#include "core/surface/restingwater.h"
#include "core/terrain/elevationsource.h"

#include <functional>
#include <vector>

namespace stillhead
{

  struct BandAreaRequest
  {
      RestingWater water;
      std::vector<double> limits;     //!< rising, in the unit of the pressures
      const AreaMask *area = nullptr; //!< cells outside belong to no band; null: everywhere
      unsigned threads = 0;           //!< 0: as many as the machine has cores
  };

  /**
   * Takes one polygon: its band (0 is below the first limit), and its rings in the terrain's CRS, closed, the outer one
   * first and counter-clockwise, holes clockwise.
   */
  using TakeBandArea = std::function<void( int band, const std::vector<std::vector<TerrainPoint>> &rings )>;

  /**
   * Traces the bands. The same polygons in the same order whatever the number of threads; \a take is called from one thread
   * at a time. \throws Cancelled, std::runtime_error, and what \a take throws
   */
  void traceBandAreas( const ElevationSource &terrain, const BandAreaRequest &request, Monitor &monitor, double from,
    double to, const TakeBandArea &take );

} // namespace stillhead
