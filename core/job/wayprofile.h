// SPDX-License-Identifier: GPL-2.0-or-later
// The profile along a way: pipe, ground, static levels, and the elevations at which the limits are met.
#pragma once

#include "core/job/placeprobe.h"
#include "core/job/waytoplace.h"

#include <vector>

namespace stillhead
{

  //! A place of a way's profile. Elevations are NaN where there are none.
  struct WayPoint
  {
      double distanceM = 0.0; //!< from the start of the way
      PlaceOnLine on;
      PlaceFigures figures;
      double mostElevationM = 0.0;  //!< pipe below it is over MOST in the high case
      double leastElevationM = 0.0; //!< pipe above it is under LEAST in the low case
  };

  /**
   * The profile of \a way: a point at each knot of the exact profile and at each end of a leg. Between two points of one leg
   * the pipe is as good as straight.
   */
  std::vector<WayPoint> wayProfile(
    const StaticResult &result, const std::vector<WayLeg> &way, const Limits &limits, PlaceProbe &probe );

} // namespace stillhead
