// SPDX-License-Identifier: GPL-2.0-or-later
// What a proposal must keep, turned into heights of water: at rest every limit of pressure is a level over the pipe.
#pragma once

#include "core/judgement/limits.h"

namespace stillhead
{

  //! Two levels nearer than this are one; the judging of pipe allows more (EQUAL_TO_LIMIT of a pressure).
  constexpr double SAME_LEVEL_M = EQUAL_LEVEL_M;

  //! A set pressure is at least this height of water: a regulator set to nothing is a closed valve.
  constexpr double LEAST_SET_M = 0.01;

  struct ProposalRules
  {
      Limits limits;
      double specificWeightNPerM3 = 0.0;
      double risePa = 0.0;        //!< lock-up rise of the regulators proposed
      double leastDropPa = 0.0;   //!< least difference of low inlet over set
      double mostRatio = 0.0;     //!< largest high inlet to set; 0: no limit
      double settingStepPa = 0.0; //!< settings are multiples of it; 0: any
      double toleranceM = 0.1;    //!< join tolerance: regulators in a row stand at least twice as far apart

      double heightM( double pressurePa ) const { return pressurePa / specificWeightNPerM3; }
      double pressurePa( double heightM ) const { return heightM * specificWeightNPerM3; }

      //! Served pipe needs its level at least this far above it.
      double leastM( Role role ) const { return heightM( limits.leastFor( role ) ); }

      //! Pipe stands a level no farther above it than this.
      double mostM( Role role ) const { return heightM( limits.mostFor( role ) ); }

      double riseM() const { return heightM( risePa ); }

      //! Pipe stands a set level (water running) no farther above it than this: lock-up comes on top.
      double standM( Role role ) const { return mostM( role ) - riseM(); }

      double dropM() const { return heightM( leastDropPa ); }
      double stepM() const { return heightM( settingStepPa ); }
      double leastApartM() const { return 2.0 * toleranceM; }

      //! The same rules without those that concern the regulator itself rather than the pipe.
      ProposalRules onlyForPipe() const
      {
        ProposalRules rules = *this;
        rules.leastDropPa = rules.mostRatio = rules.settingStepPa = 0.0;
        return rules;
      }
  };

} // namespace stillhead
