// SPDX-License-Identifier: GPL-2.0-or-later
// From the lower end up: each segment narrows the levels that pass, each station widens them.
#include "core/proposal/legoptions.h"

#include "core/proposal/marking.h"

#include <algorithm>

namespace stillhead
{

  StandPlace placeOf( const Station &station, const Forest &forest )
  {
    return { station.elevationM, forest.zones[static_cast<std::size_t>( station.zone )] };
  }

  LegOptions optionsOfLeg( const Forest &forest, const Limb &limb, const std::vector<double> &breaks,
    const Options &joint, double needM, bool keepAll, const ProposalRules &rules )
  {
    LegOptions leg;
    leg.leg = segmentLeg( forest, limb, breaks, rules );
    const bool onePlace = leg.leg.onePlace;
    const std::size_t count = leg.leg.segments.size();
    const std::size_t kept = keepAll ? count + 1 : 1;
    leg.below.resize( kept );
    leg.bare.resize( onePlace ? kept : 0 );
    leg.at.resize( kept );
    leg.stationAt.assign( count + 1, -1 );
    for ( std::size_t i = 0; i < leg.leg.stations.size(); ++i )
      leg.stationAt[leg.leg.stations[i].boundary] = static_cast<int>( i );

    Options below = joint;
    Options at = joint;
    Options bare = joint;
    for ( std::size_t i = count + 1; i-- > 0; )
    {
      if ( i < count )
      {
        const ForestPart &part = leg.leg.segments[i];
        needM = std::max( needM, needOf( part, needM > NO_LEVEL_M, rules ).levelM );
        const LevelRange range { needM, part.mend ? part.lowestM() + rules.standM( part.role ) : ANY_LEVEL_M };
        at.pass( range, !part.mend );
        below = at;
        if ( onePlace )
          bare.pass( range, !part.mend );
      }
      if ( leg.stationAt[i] >= 0 )
      {
        const Station &station = leg.leg.stations[static_cast<std::size_t>( leg.stationAt[i] )];
        at.standOver( onePlace ? bare : below, placeOf( station, forest ), 1, rules );
      }
      if ( !keepAll && i > 0 )
        continue;
      leg.below[i] = below;
      leg.at[i] = at;
      if ( onePlace )
        leg.bare[i] = bare;
    }
    return leg;
  }

} // namespace stillhead
