// SPDX-License-Identifier: GPL-2.0-or-later
// Factors of the units; see units.h for their definitions.
#include "core/units/units.h"

namespace stillhead
{

  double pascalsPer( PressureUnit unit, double specificWeightNPerM3 )
  {
    switch ( unit )
    {
    case PressureUnit::Psi:
      return PASCALS_PER_PSI;
    case PressureUnit::Kilopascal:
      return 1000.0;
    case PressureUnit::Bar:
      return 100000.0;
    case PressureUnit::MetreOfWater:
      return specificWeightNPerM3;
    case PressureUnit::FootOfWater:
      return specificWeightNPerM3 * METRES_PER_FOOT;
    }
    return 1.0;
  }

  double metresPer( LengthUnit unit )
  {
    return unit == LengthUnit::Foot ? METRES_PER_FOOT : 1.0;
  }

  double metresPer( ElevationUnit unit )
  {
    switch ( unit )
    {
    case ElevationUnit::Metre:
      return 1.0;
    case ElevationUnit::Foot:
      return METRES_PER_FOOT;
    case ElevationUnit::UsSurveyFoot:
      return METRES_PER_US_SURVEY_FOOT;
    }
    return 1.0;
  }

} // namespace stillhead
