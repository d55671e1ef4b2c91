// SPDX-License-Identifier: GPL-2.0-or-later
// Parts the network where devices stand, and finds out which way they let water pass.
#pragma once

#include "core/network/canonicaldrawing.h"
#include "core/network/device.h"
#include "core/network/network.h"

#include <vector>

namespace stillhead
{

  //! A device that found its pipe: which, where, and the node that stands there.
  struct DevicePlace
  {
      int device = -1;
      PlaceOnLine on;
      int node = -1;
  };

  /**
   * Splits the node of every device that parts into two, one a side; links are in the order of \a places. A device where
   * three or more pipes meet, or two at a source, stands on no clear leg: it is left out with a finding (a control valve
   * that only passes needs no leg). At the source's end of a single leg it stands on that leg.
   */
  void partAtDevices( Network &network, const CanonicalDrawing &drawing, const std::vector<Device> &devices,
    const std::vector<DevicePlace> &places, std::vector<Finding> &findings );

  /**
   * Turns every link so that water passes from fromNode to toNode: as the line was drawn where the device says so, else
   * away from the nearest source along the pipe. Closed valves are no way.
   */
  void directLinks( Network &network, const CanonicalDrawing &drawing, const std::vector<Device> &devices,
    const std::vector<DevicePlace> &places );

} // namespace stillhead
