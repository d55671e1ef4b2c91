// SPDX-License-Identifier: GPL-2.0-or-later
// What lies below a place, down to the next regulators of a plan.
#pragma once

#include "core/proposal/planner.h"

namespace stillhead
{

  //! A place of the pipe, by its elevation.
  struct PipePlace
  {
      double elevationM = 0.0;
      PlaceOnLine at;
  };

  struct Beneath
  {
      Need need;                        //!< of all that is served behind the place, past further regulators too
      double standM = ANY_LEVEL_M;      //!< the highest set level that all pipe to mend stands
      double feedLowM = NO_LEVEL_M;     //!< what the next regulators need at their inlets to keep their rules
      double feedHighM = ANY_LEVEL_M;   //!< the most they take
      double nextHighestM = NO_LEVEL_M; //!< highest pressure below the next regulators, as a height of water
      double worstTodayM = NO_LEVEL_M;  //!< highest pressure of today, as a height of water
      double deepestM = ANY_LEVEL_M;    //!< lowest pipe

      // Of the pressure zone only, which ends at given devices too.
      int zone = -1;
      bool anyPipe = false; //!< with an elevation
      PipePlace lowest;
      PipePlace highest;
      double zoneNeedM = NO_LEVEL_M;  //!< of what is served in it
      double zoneMostM = ANY_LEVEL_M; //!< the highest level at which its pipe is within MOST; excused pipe left aside
      double lengthM = 0.0;

      //! Adds pipe upstream of all this.
      void add( const ForestPart &part, const Forest &forest, const ProposalRules &rules );

      //! Adds what begins at the same place; of its zone only if that is \a ownZone.
      void join( const Beneath &other, int ownZone );

      //! At the upstream end of \a limb.
      void passGate( const Limb &limb );

      //! At \a regulator, seen from above it.
      void passRegulator( const Planned &regulator, const ProposalRules &rules );

      //! Highest pressure below a place fed with \a levelM in the high case, as a height of water.
      double highestPressureM( double levelM ) const
      {
        return std::max( nextHighestM, std::min( levelM - deepestM, worstTodayM ) );
      }
  };

} // namespace stillhead
