// SPDX-License-Identifier: GPL-2.0-or-later
// Where to add pressure: for pipe that is short, the place nearest the source at which a booster brings all pipe beyond it
// to LEAST while water runs, without lifting any of it above MOST at no flow.
#pragma once

#include "core/proposal/pipegraph.h"
#include "core/proposal/rules.h"

#include <vector>

namespace stillhead
{

  struct BoostRules
  {
      Limits limits;
      double specificWeightNPerM3 = 0.0;
      double risePa = 0.0; //!< how far a booster's pressure at no flow stands above that while water runs
  };

  struct ProposedBooster
  {
      bool atSource =
        false;        //!< the short pipe is looped from the source on: only a pump at the source reaches all of it
      PlaceOnLine at; //!< not if atSource
      bool againstLine = false; //!< water passes against the direction of the line
      Role role = Role::Mainline;
      int zone = -1; //!< pressure zone of today in which it stands
      double elevationM = 0.0;
      double boostLowPa = 0.0;       //!< least pressure to add while water runs
      double boostPa = 0.0;          //!< what it adds at no flow then
      bool regulatorFollows = false; //!< some pipe beyond is over MOST with it
      double shortM = 0.0;           //!< length of pipe beyond that is short today
      double neededByM = 0.0;        //!< elevation of the pipe that needs most
      PlaceOnLine neededAt;
      double lowestM = 0.0; //!< elevation of the pipe beyond that stands least
      PlaceOnLine lowestAt;
  };

  /**
   * Boosters for all short pipe of \a graph that is fed, those nearer a source first; none lies beyond another. A booster stands on a
   * leg that alone feeds what is beyond it; pipe beyond a given regulator is not counted as beyond. Where no place keeps all
   * within MOST, the booster stands just before the pipe that is short, and a regulator must follow.
   */
  std::vector<ProposedBooster> proposeBoosters( const PipeGraph &graph, const BoostRules &rules );

} // namespace stillhead
