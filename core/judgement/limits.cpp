// SPDX-License-Identifier: GPL-2.0-or-later
// Band of a pressure.
#include "core/judgement/limits.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  int bandOf( double pressurePa, const std::vector<double> &bandsPa )
  {
    const double reached = pressurePa + EQUAL_TO_LIMIT * std::abs( pressurePa );
    return static_cast<int>( std::upper_bound( bandsPa.begin(), bandsPa.end(), reached ) - bandsPa.begin() );
  }

} // namespace stillhead
