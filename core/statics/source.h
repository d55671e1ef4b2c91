// SPDX-License-Identifier: GPL-2.0-or-later
// Where the pressure comes from, and the static level that follows from it.
#pragma once

#include "core/plan/plan.h"

#include <optional>

namespace stillhead
{

  //! What the source's value is; the order is that of the SOURCE_KIND parameter.
  enum class SourceKind
  {
    PressureReading, //!< pressure read on a gauge, Pa
    WaterLevel,      //!< open water level as elevation, m
    LevelAboveGround //!< open water level above ground, m
  };

  struct Source
  {
      PlanPoint place;
      int system = 0; //!< index into Drawing::systems; a blank one joins any line
      SourceKind kind = SourceKind::PressureReading;
      double high = 0.0;                      //!< high case: Pa for a reading, m for a level
      std::optional<double> low;              //!< low case; unset: as high
      double gaugeHeightM = 0.0;              //!< of the gauge above ground
      std::optional<double> groundElevationM; //!< surveyed ground; unset: the terrain at the place
      double boostPa = 0.0;                   //!< pump at the source, at no flow
      std::optional<double> boostLowPa;       //!< while running; unset: as boostPa
  };

  //! Elevation at which water at rest would stand in an open riser, in each case.
  struct StaticLevels
  {
      double highM = 0.0;
      double lowM = 0.0;
  };

  /**
   * Static levels of \a source over \a groundM (NaN is allowed for SourceKind::WaterLevel, which needs no ground).
   * A pressure p read at height h above ground z gives z + h + p/γ; an open water level gives itself; a pump adds its boost.
   */
  StaticLevels staticLevels( const Source &source, double groundM, double specificWeightNPerM3 );

} // namespace stillhead
