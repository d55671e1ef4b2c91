// SPDX-License-Identifier: GPL-2.0-or-later
// Units in which people give and read pressures, lengths and elevations. Inside core everything is SI
// (pascal, metre); these factors are exact by definition. Source: NIST SP 811 (inch 25.4 mm, foot 0.3048 m,
// pound 0.45359237 kg, standard gravity 9.80665 m/s2); US survey foot 1200/3937 m, Federal Register 85 FR 62698.
#pragma once

namespace stillhead
{

  constexpr double STANDARD_GRAVITY_M_PER_S2 = 9.80665;
  constexpr double METRES_PER_FOOT = 0.3048;
  constexpr double METRES_PER_US_SURVEY_FOOT = 1200.0 / 3937.0;
  constexpr double PASCALS_PER_PSI = 0.45359237 * STANDARD_GRAVITY_M_PER_S2 / ( 0.0254 * 0.0254 );

  //! Units a pressure may be given in; the order is that of the PRESSURE_UNIT parameter.
  enum class PressureUnit
  {
    Psi,
    Kilopascal,
    Bar,
    MetreOfWater,
    FootOfWater
  };

  //! Units of elevations, lengths, depths and heights; the order is that of the LENGTH_UNIT parameter.
  enum class LengthUnit
  {
    Foot, //!< International foot
    Metre
  };

  //! Units a terrain model or a surveyed Z may be in.
  enum class ElevationUnit
  {
    Metre,
    Foot,
    UsSurveyFoot
  };

  //! Pascals in one \a unit; heights of water are taken at \a specificWeightNPerM3.
  double pascalsPer( PressureUnit unit, double specificWeightNPerM3 );

  //! Metres in one \a unit (exact).
  double metresPer( LengthUnit unit );

  //! Metres in one \a unit (exact).
  double metresPer( ElevationUnit unit );

} // namespace stillhead
