// SPDX-License-Identifier: GPL-2.0-or-later
// A device that stands in the network, and what it does at rest.
#pragma once

#include "core/network/network.h"
#include "core/statics/levels.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  //! What a regulator does; the order is that in which it is decided.
  enum class RegulatorStatus
  {
    None,                //!< no regulator, or not fed
    HeldShut,            //!< its outlet side is fed to a larger level
    WideOpen,            //!< low inlet below set: it passes what comes
    ShortOfDifferential, //!< low inlet less than the least drop above set
    Holding
  };

  //! The text of \a status in the outputs; blank for None.
  const char *regulatorStatusName( RegulatorStatus status );

  //! Figures of a standing device; pressures are NaN where the side has none.
  struct StandingDevice
  {
      int device = -1;
      PlaceOnLine on;
      int inletNode = -1; //!< for a control valve that only passes the same as outletNode
      int outletNode = -1;
      double elevationM = 0.0;
      double inletHighPa = 0.0;
      double inletLowPa = 0.0;
      double outletHighPa = 0.0;
      double outletLowPa = 0.0;
      RegulatorStatus status = RegulatorStatus::None;
  };

  //! Fills the figures of \a standing from the levels of its zones.
  void setFigures( StandingDevice &standing, const Device &device, const ZoneMap &zoneMap,
    const std::vector<Zone> &zones, double leastDropPa, double specificWeightNPerM3 );

} // namespace stillhead
