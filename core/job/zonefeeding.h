// SPDX-License-Identifier: GPL-2.0-or-later
// Levels, doubts and device figures of all zones, and what they tell of the devices.
#pragma once

#include "core/job/staticjob.h"
#include "core/network/parting.h"
#include "core/statics/feeding.h"

#include <vector>

namespace stillhead
{

  /**
   * Fills zones, devices and failures of \a result, whose network is parted and directed and whose sources are placed.
   * \param places where the devices stand \param elevationsM their elevations, in that order
   * \throws Refusal
   */
  void feedZones( const StaticJob &job, const std::vector<DevicePlace> &places, const std::vector<double> &elevationsM,
    StaticResult &result );

  //! Findings about sources that differ and about regulators and check valves.
  void findAboutDevices( const StaticJob &job, const std::vector<SourceDifference> &differences, StaticResult &result );

} // namespace stillhead
