// SPDX-License-Identifier: GPL-2.0-or-later
// The fewest regulators, by a dynamic programme in which four numbers sum up everything behind a place.
#pragma once

#include "core/proposal/marking.h"

#include <vector>

namespace stillhead
{

  /**
   * All pipe behind a place. Let f(λ) be the fewest regulators behind it when regulators above hold the set level at λ,
   * f(∞) when there are none above.
   *
   * Why four numbers are enough. The set level λ at a place is the least of the set levels of all regulators above it, in
   * both cases (lock-up adds the same rise to each), so a regulator only ever replaces λ by something lower. Pipe to be
   * served asks λ ≥ need, pipe to mend asks λ ≤ stand; neither asks more. Hence below `needM` nothing works, and for
   * λ ≥ needM a lower λ breaks nothing: f does not fall as λ rises. One regulator at the top of a leg resets any λ to needM,
   * so f(λ) ≤ f(needM) + 1: f is `count` up to some level `topM` and count + 1 above it, and that is all there is to know.
   * Pipe upstream on the leg raises needM or lowers topM; where topM falls below needM no single λ is left, and every plan
   * has a regulator between the two places that disagree; just below the upper one it covers most, and above it f does not
   * depend on λ any more. At a joint no regulator can stand, so the legs' f are added at one λ: needM is the largest; a leg
   * whose topM lies below that costs one more whatever λ is; topM is the least of the others. f(∞) cannot be told from the
   * first three there (each leg may need its own), so it is the fourth, `unregulated`: it adds up at joints and is at most
   * 1 + count again once a regulator can stand on the leg above. A source has nothing above it and takes f(∞).
   *
   * Pipe is to be mended only where it is over today. Elsewhere λ + rise above MOST does no harm: the level itself is lower.
   */
  struct FourNumbers
  {
      double needM = NO_LEVEL_M;
      int count = 0;
      double topM = ANY_LEVEL_M;
      int unregulated = 0;
  };

  //! A place at which the programme puts a regulator: along a part's line, at an elevation.
  struct Break
  {
      int limb = -1;
      double alongM = 0.0;
  };

  struct FewestRegulators
  {
      int total = 0;                  //!< no plan can have fewer
      std::vector<FourNumbers> above; //!< of every limb, at its upstream end
      std::vector<Break> breaks;      //!< sorted by limb, then from its upstream end
      std::vector<int> tornBodies;    //!< bodies of looped pipe that no single level suits; rising
  };

  /**
   * Exact on legs. A body of looped pipe takes part with all of its pipe at one level; where that cannot be, or where legs
   * on it could share a cut through it, the total is a lower bound: to part looped pipe takes Limb::loopCuts regulators.
   */
  FewestRegulators fewestRegulators( const MarkedForest &marked, const ProposalRules &rules );

} // namespace stillhead
