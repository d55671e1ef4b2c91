// SPDX-License-Identifier: GPL-2.0-or-later
// Chooses legs, places and levels of the regulators: as few as can be while all rules are kept.
#pragma once

#include "core/proposal/fewest.h"
#include "core/proposal/options.h"

#include <vector>

namespace stillhead
{

  //! A regulator of a plan.
  struct Planned
  {
      int limb = -1;       //!< the leg it stands on; for an inlet the body it feeds
      int inlet = -1;      //!< number among Limb::inlets, −1 on a leg
      double alongM = 0.0; //!< along the line of its leg or inlet
      double elevationM = 0.0;
      double levelM = 0.0; //!< elevation + set pressure as a height
      bool kept = true;    //!< keeps LEAST_DROP, MOST_RATIO and SETTING_STEP
  };

  /**
   * A plan for \a marked, in which every body suits one level. Regulators on one leg come from its upstream end. Among
   * plans that cost the same it prefers mainlines, then places with room to their limits.
   * \param complete receives false if something cannot be mended from the places where a regulator may be written
   */
  std::vector<Planned> planRegulators(
    const MarkedForest &marked, const FewestRegulators &fewest, const ProposalRules &rules, bool &complete );

} // namespace stillhead
