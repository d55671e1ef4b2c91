// SPDX-License-Identifier: GPL-2.0-or-later
// Pressures on both sides and the status of a regulator, judged by the low case: it is the one in which water runs.
#include "core/statics/standingdevice.h"

#include <limits>

namespace stillhead
{

  const char *regulatorStatusName( RegulatorStatus status )
  {
    switch ( status )
    {
    case RegulatorStatus::None:
      return "";
    case RegulatorStatus::HeldShut:
      return "held shut";
    case RegulatorStatus::WideOpen:
      return "wide open";
    case RegulatorStatus::ShortOfDifferential:
      return "short of differential";
    case RegulatorStatus::Holding:
      return "holding";
    }
    return "";
  }

  void setFigures( StandingDevice &standing, const Device &device, const ZoneMap &zoneMap,
    const std::vector<Zone> &zones, double leastDropPa, double specificWeightNPerM3 )
  {
    const Zone &inlet =
      zones[static_cast<std::size_t>( zoneMap.ofNode[static_cast<std::size_t>( standing.inletNode )] )];
    const Zone &outlet =
      zones[static_cast<std::size_t>( zoneMap.ofNode[static_cast<std::size_t>( standing.outletNode )] )];
    const auto pressure = [&]( const Zone &zone, double levelM ) {
      return zone.fed ? specificWeightNPerM3 * ( levelM - standing.elevationM )
                      : std::numeric_limits<double>::quiet_NaN();
    };
    standing.inletHighPa = pressure( inlet, inlet.levels.highM );
    standing.inletLowPa = pressure( inlet, inlet.levels.lowM );
    standing.outletHighPa = pressure( outlet, outlet.levels.highM );
    standing.outletLowPa = pressure( outlet, outlet.levels.lowM );
    if ( !device.regulates() || !inlet.fed )
      return;

    constexpr double LARGER_M = 1e-6;
    bool passes = false;
    const double ownM =
      levelThrough( device, standing.elevationM, inlet.levels.lowM, Case::Low, specificWeightNPerM3, passes );
    const double setPa = device.setPa.value_or( 0.0 );
    if ( outlet.levels.lowM > ownM + LARGER_M )
      standing.status = RegulatorStatus::HeldShut;
    else if ( standing.inletLowPa < setPa )
      standing.status = RegulatorStatus::WideOpen;
    else if ( standing.inletLowPa - setPa < leastDropPa )
      standing.status = RegulatorStatus::ShortOfDifferential;
    else
      standing.status = RegulatorStatus::Holding;
  }

} // namespace stillhead
