// SPDX-License-Identifier: GPL-2.0-or-later
// In which unit a terrain's heights are, and who said so: the user, else the band, else the vertical part of the CRS; if
// none of them does, metres are assumed, and whoever runs the job tells the user.
#pragma once

#include "core/units/units.h"

#include <optional>
#include <string>

namespace stillhead
{

  //! Who said in which unit the heights are.
  enum class ElevationUnitOrigin
  {
    Given,  //!< The user
    Band,   //!< The unit text of the raster band
    Crs,    //!< The vertical part of the CRS
    Assumed //!< Nobody: metres
  };

  //! The decision and its reason.
  struct ElevationUnitDecision
  {
      double metresPerUnit = 1.0;
      std::string unitName = "metre";
      ElevationUnitOrigin origin = ElevationUnitOrigin::Assumed;
      std::string bandText; //!< The band's unit text as found, also where it was not understood
  };

  //! Metres in one of the unit that a band calls \a text; nothing where that is no unit of length known here.
  std::optional<double> metresPerUnitText( const std::string &text );

  /**
   * Decides.
   * \param given what the user chose, if anything
   * \param bandText the band's unit text, may be blank
   * \param crsDefinition the terrain's full CRS, vertical part included; may be blank
   */
  ElevationUnitDecision decideElevationUnit(
    std::optional<ElevationUnit> given, const std::string &bandText, const std::string &crsDefinition );

} // namespace stillhead
