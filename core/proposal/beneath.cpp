// SPDX-License-Identifier: GPL-2.0-or-later
// Sums over pipe, taken from the ends upwards.
#include "core/proposal/beneath.h"

namespace stillhead
{

  void Beneath::add( const ForestPart &part, const Forest &forest, const ProposalRules &rules )
  {
    if ( part.zone != zone )
    {
      zone = part.zone;
      anyPipe = false;
      zoneNeedM = NO_LEVEL_M;
      zoneMostM = ANY_LEVEL_M;
      lengthM = 0.0;
    }
    lengthM += part.lengthM();
    if ( !part.known )
      return;
    need.raise( needOf( part, need.any(), rules ) );
    if ( part.mend )
      standM = std::min( standM, part.lowestM() + rules.standM( part.role ) );
    const double todayM = forest.zones[static_cast<std::size_t>( part.zone )].highM;
    worstTodayM = std::max( worstTodayM, todayM - part.lowestM() );
    deepestM = std::min( deepestM, part.lowestM() );

    const bool fromIsLower = part.elevation.from <= part.elevation.to;
    const PipePlace low { part.lowestM(), { part.line, fromIsLower ? part.fromM : part.toM } };
    const PipePlace high { part.highestM(), { part.line, fromIsLower ? part.toM : part.fromM } };
    if ( !anyPipe || low.elevationM < lowest.elevationM )
      lowest = low;
    if ( !anyPipe || high.elevationM > highest.elevationM )
      highest = high;
    anyPipe = true;
    if ( part.served )
      zoneNeedM = std::max( zoneNeedM, part.highestM() + rules.leastM( part.role ) );
    if ( !part.over || part.mend )
      zoneMostM = std::min( zoneMostM, part.lowestM() + rules.mostM( part.role ) );
  }

  void Beneath::join( const Beneath &other, int ownZone )
  {
    need.raise( other.need );
    standM = std::min( standM, other.standM );
    feedLowM = std::max( feedLowM, other.feedLowM );
    feedHighM = std::min( feedHighM, other.feedHighM );
    nextHighestM = std::max( nextHighestM, other.nextHighestM );
    worstTodayM = std::max( worstTodayM, other.worstTodayM );
    deepestM = std::min( deepestM, other.deepestM );
    zone = ownZone;
    if ( other.zone != ownZone )
      return;
    lengthM += other.lengthM;
    zoneNeedM = std::max( zoneNeedM, other.zoneNeedM );
    zoneMostM = std::min( zoneMostM, other.zoneMostM );
    if ( !other.anyPipe )
      return;
    if ( !anyPipe || other.lowest.elevationM < lowest.elevationM )
      lowest = other.lowest;
    if ( !anyPipe || other.highest.elevationM > highest.elevationM )
      highest = other.highest;
    anyPipe = true;
  }

  void Beneath::passGate( const Limb &limb )
  {
    need = needAbove( limb, need );
    standM -= limb.boostHighM;
    feedLowM -= limb.boostLowM;
    feedHighM -= limb.boostHighM;
    deepestM -= limb.boostHighM;
  }

  void Beneath::passRegulator( const Planned &regulator, const ProposalRules &rules )
  {
    Beneath above;
    above.need = need;
    above.nextHighestM = highestPressureM( regulator.levelM + rules.riseM() );
    above.feedLowM = regulator.levelM + ( regulator.kept ? rules.dropM() : 0.0 );
    if ( regulator.kept && rules.mostRatio > 0.0 )
      above.feedHighM =
        regulator.elevationM + rules.mostRatio * ( regulator.levelM - regulator.elevationM ) - rules.riseM();
    above.zone = zone;
    *this = above;
  }

} // namespace stillhead
