// SPDX-License-Identifier: GPL-2.0-or-later
// Proposes boosters for pipe that is short: the main job, the places, and the main job again with them in place.
#pragma once

#include "core/job/staticjob.h"
#include "core/proposal/boost.h"

#include <vector>

namespace stillhead
{

  struct BoostJob
  {
      StaticJob statics;   //!< its devices stay as they are
      double risePa = 0.0; //!< how far a booster's pressure at no flow stands above that while water runs
  };

  struct BoostResult
  {
      StaticResult before;
      std::vector<ProposedBooster> boosters; //!< places are exact
      std::vector<Device> devices;           //!< of `after`: those given, then one for each booster that stands on pipe
      StaticResult after;                    //!< with all of them in place; a pump at the source is added to the source
      double newlyOverM = 0.0;               //!< pipe over MOST after and not before
      double stillShortM = 0.0;              //!< pipe short after
  };

  /**
   * \throws Refusal, Cancelled, std::runtime_error as solveStatics()
   */
  BoostResult solveBoost( const BoostJob &job, Monitor &monitor );

} // namespace stillhead
