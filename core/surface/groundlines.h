// SPDX-License-Identifier: GPL-2.0-or-later
// Where the ground of a terrain has a given elevation: lines, streamed, higher ground always on their left.
#pragma once

#include "core/feedback/monitor.h"
#include "core/surface/areamask.h"
#include "core/terrain/elevationsource.h"

#include <cstddef>
#include <functional>
#include <vector>

namespace stillhead
{

  struct GroundLineRequest
  {
      std::vector<double> elevationsM; //!< in any order
      const AreaMask *area = nullptr;  //!< lines stay in the cells inside; null: everywhere
      unsigned threads = 0;            //!< 0: as many as the machine has cores
      //! Vertices of unfinished lines that are held at most; where there are more, they are handed out in parts that touch.
      std::size_t mostOpenVertices = std::size_t( 1 ) << 22;
  };

  //! Takes one line: the index of its elevation, and its vertices in the terrain's CRS; the first repeated where it is closed.
  using TakeGroundLine = std::function<void( std::size_t elevation, const std::vector<TerrainPoint> &line )>;

  /**
   * Traces the lines of equal elevation on the bilinear ground. Every vertex is on the ground at its elevation to rounding, every step
   * to within GROUND_LINE_TOLERANCE_M. Lines end at the raster's edge, where the ground is unknown and at the border of the area. The
   * same lines in the same order whatever the number of threads. \throws Cancelled, std::runtime_error, and what \a take throws
   */
  void traceGroundLines( const ElevationSource &terrain, const GroundLineRequest &request, Monitor &monitor,
    double from, double to, const TakeGroundLine &take );

} // namespace stillhead
