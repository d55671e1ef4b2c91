// SPDX-License-Identifier: GPL-2.0-or-later
// The user's units and water temperature from the parameters.
#pragma once

#include "processing/displayunits.h"
#include "processing/reading/parametervalues.h"

namespace stillhead
{

  /**
   * Reads PRESSURE_UNIT, LENGTH_UNIT and WATER_TEMPERATURE.
   * \throws QgsProcessingException where one is out of range
   */
  DisplayUnits readUnits( const ParameterValues &values );

  /**
   * The highest pressure taken for real: 100 bar, far above any supply to irrigation. What passes it is a slip
   * of the unit or the decimal mark.
   */
  constexpr double HIGHEST_PRESSURE_PA = 1e7;

  /**
   * A pressure in pascals if it is set.
   * \throws QgsProcessingException where it lies outside 0 to HIGHEST_PRESSURE_PA
   */
  std::optional<double> readPressure( const ParameterValues &values, const QString &name, const DisplayUnits &units );

  /**
   * A length in metres if it is set.
   * \throws QgsProcessingException where it is negative
   */
  std::optional<double> readDistance( const ParameterValues &values, const QString &name, const DisplayUnits &units );

  /**
   * SAG_DEPTH in metres: how far a mainline falls or rises on both sides of a summit or sag.
   * \throws QgsProcessingException where it is negative
   */
  double readSagDepthM( const ParameterValues &values, const DisplayUnits &units );

} // namespace stillhead
