// SPDX-License-Identifier: GPL-2.0-or-later
// CIPM 2001 density formula.
#include "core/units/water.h"

#include "core/units/units.h"

namespace stillhead
{

  double waterDensityKgPerM3( double celsius )
  {
    constexpr double a1 = -3.983035;
    constexpr double a2 = 301.797;
    constexpr double a3 = 522528.9;
    constexpr double a4 = 69.34881;
    constexpr double a5 = 999.974950;
    const double offset = celsius + a1;
    return a5 * ( 1.0 - offset * offset * ( celsius + a2 ) / ( a3 * ( celsius + a4 ) ) );
  }

  double waterSpecificWeightNPerM3( double celsius )
  {
    return waterDensityKgPerM3( celsius ) * STANDARD_GRAVITY_M_PER_S2;
  }

} // namespace stillhead
