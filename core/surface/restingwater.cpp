// SPDX-License-Identifier: GPL-2.0-or-later
// The same expression as for a single place, so that a cell of the surface and a place asked for agree to the bit
// before rounding to 32-bit floats.
#include "core/surface/restingwater.h"

namespace stillhead
{

  void fillPressures(
    const RestingWater &water, const double *groundsM, std::size_t count, float nodata, float *pressures )
  {
    const RestingWater local = water; // keeps the loop free of reloads
    for ( std::size_t i = 0; i < count; ++i )
    {
      const float pressure = static_cast<float>( local.pressureUnder( groundsM[i] ) );
      pressures[i] = pressure == pressure ? pressure : nodata;
    }
  }

} // namespace stillhead
