// SPDX-License-Identifier: GPL-2.0-or-later
// Static level of a source.
#include "core/statics/source.h"

namespace stillhead
{

  StaticLevels staticLevels( const Source &source, double groundM, double specificWeightNPerM3 )
  {
    const auto level = [&]( double value, double boostPa ) {
      const double boostM = boostPa / specificWeightNPerM3;
      switch ( source.kind )
      {
      case SourceKind::PressureReading:
        return groundM + source.gaugeHeightM + value / specificWeightNPerM3 + boostM;
      case SourceKind::WaterLevel:
        return value + boostM;
      case SourceKind::LevelAboveGround:
        return groundM + value + boostM;
      }
      return value;
    };
    return { level( source.high, source.boostPa ),
      level( source.low.value_or( source.high ), source.boostLowPa.value_or( source.boostPa ) ) };
  }

} // namespace stillhead
