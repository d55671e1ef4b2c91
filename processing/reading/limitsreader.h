// SPDX-License-Identifier: GPL-2.0-or-later
// The user's limits, with what is unset filled in: round figures for each pressure unit.
#pragma once

#include "core/judgement/limits.h"
#include "processing/displayunits.h"
#include "processing/reading/parametervalues.h"

namespace stillhead
{

  /**
   * Reads LEAST, MOST, BANDS and, where \a values knows them, LATERAL_LEAST and LATERAL_MOST.
   * \throws QgsProcessingException where they contradict each other or are out of range
   */
  Limits readLimits( const ParameterValues &values, const DisplayUnits &units );

  //! What LOCKUP_RISE and LEAST_DROP are where they are unset.
  double usualRegulatorMarginPa( const DisplayUnits &units );

} // namespace stillhead
