// SPDX-License-Identifier: GPL-2.0-or-later
// Where the ground of a terrain has a given elevation: lines, streamed, higher ground always on their left.
#pragma once

#include "core/feedback/monitor.h"
#include "core/surface/areamask.h"
#include "core/terrain/elevationsource.h"

#include <functional>
#include <vector>

namespace stillhead
{

  //! Takes one line: the index of its elevation, and its vertices in the terrain's CRS; the first repeated where it is closed.
  using TakeGroundLine = std::function<void( std::size_t elevation, const std::vector<TerrainPoint> &line )>;

  /**
   * Traces the lines of \a elevationsM (any order) on the ground, inside \a area if it is not null. The same lines in the same order
   * whatever the number of \a threads (0: as many as the machine has cores). \throws Cancelled, std::runtime_error
   */
  void traceGroundLines( const ElevationSource &terrain, const std::vector<double> &elevationsM, const AreaMask *area,
    unsigned threads, Monitor &monitor, double from, double to, const TakeGroundLine &take );

} // namespace stillhead
