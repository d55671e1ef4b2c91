// SPDX-License-Identifier: GPL-2.0-or-later
// Density and specific weight of water at rest.
#pragma once

namespace stillhead
{

  /**
   * Density of air-free water in kg/m3 at \a celsius (0 to 40 degC) and 101 325 Pa.
   * Source: CIPM formula, M. Tanaka et al., Metrologia 38 (2001) 301-309, p. 305.
   */
  double waterDensityKgPerM3( double celsius );

  //! Specific weight in N/m3 (pascals per metre of height) at \a celsius and standard gravity 9.80665 m/s2.
  double waterSpecificWeightNPerM3( double celsius );

} // namespace stillhead
