// SPDX-License-Identifier: GPL-2.0-or-later
// Pressure of water at rest as a function of the ground above the pipe, for whole blocks of terrain at a time, and the
// ground at which a pressure is met. Unregulated and without a network: what a pipe anywhere here would hold.
#pragma once

#include <cstddef>

namespace stillhead
{

  //! Water at rest under one static level, and how its pressure is told.
  struct RestingWater
  {
      double levelM = 0.0; //!< static level (elevation)
      double coverM = 0.0; //!< depth of cover: ground down to the top of the pipe
      double specificWeightNPerM3 = 0.0;
      double pascalsPerUnit = 1.0; //!< of the pressures told

      //! Pressure in the chosen unit under ground at \a groundM; negative above the static level, NaN for NaN.
      double pressureUnder( double groundM ) const
      {
        return specificWeightNPerM3 * ( levelM - ( groundM - coverM ) ) / pascalsPerUnit;
      }

      //! Elevation of the ground under which the pressure is \a pressure (in the chosen unit); higher ground has less.
      double groundWhereM( double pressure ) const
      {
        return levelM + coverM - pressure * pascalsPerUnit / specificWeightNPerM3;
      }
  };

  /**
   * Pressures under \a count grounds, as 32-bit floats; \a nodata where there is no ground.
   */
  void fillPressures(
    const RestingWater &water, const double *groundsM, std::size_t count, float nodata, float *pressures );

} // namespace stillhead
