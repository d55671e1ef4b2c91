// SPDX-License-Identifier: GPL-2.0-or-later
// The user's limits: least and most acceptable static pressure, and the limits between bands.
#pragma once

#include "core/network/drawing.h"

#include <vector>

namespace stillhead
{

  struct Limits
  {
      double leastPa = 0.0;
      double mostPa = 0.0;
      double lateralLeastPa = 0.0;
      double lateralMostPa = 0.0;
      std::vector<double> bandsPa; //!< rising; band 0 lies below the first

      double leastFor( Role role ) const { return role == Role::Lateral ? lateralLeastPa : leastPa; }
      double mostFor( Role role ) const { return role == Role::Lateral ? lateralMostPa : mostPa; }
  };

  //! Band of a pressure: the number of limits it reaches (one equal to a limit belongs to the band above).
  int bandOf( double pressurePa, const std::vector<double> &bandsPa );

  //! Relative difference below which a pressure counts as equal to a limit; far above rounding, far below any gauge.
  constexpr double EQUAL_TO_LIMIT = 1e-9;

  //! Pipe this near to a static level is not above it.
  constexpr double EQUAL_LEVEL_M = 1e-8;

} // namespace stillhead
