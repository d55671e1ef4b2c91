// SPDX-License-Identifier: GPL-2.0-or-later
// Free ends that nearly reach a line: within ten times the tolerance, and no pipe leads there nearby already.
#pragma once

#include "core/network/groundscales.h"
#include "core/network/legindex.h"
#include "core/network/network.h"

#include <vector>

namespace stillhead
{

  //! How many tolerances away an end is still said to nearly reach a line.
  constexpr double NEAR_MISS_TOLERANCES = 10.0;

  /**
   * One finding for each free end (joined to nothing) that lies so near a line: the nearest such line, the place on it and
   * the gap. A line to which pipe leads from the end within twice that radius is not missed.
   * \param nodeOfEnd node of every end (2 × line for the first vertex, 2 × line + 1 for the last)
   */
  std::vector<Finding> findNearMisses( const CanonicalDrawing &drawing, const Network &network,
    const std::vector<int> &nodeOfEnd, const LegIndex &index, const GroundScales &scales, double toleranceM,
    unsigned threads, Monitor &monitor );

} // namespace stillhead
