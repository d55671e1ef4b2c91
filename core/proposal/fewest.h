// SPDX-License-Identifier: GPL-2.0-or-later
// The fewest regulators, by a dynamic programme in which a few numbers sum up everything behind a place.
#pragma once

#include "core/proposal/marking.h"

#include <vector>

namespace stillhead
{

  /**
   * All pipe behind a place. Let f(λ) be the fewest regulators behind it when regulators above hold the set level at λ,
   * f(∞) when there are none above.
   *
   * Why so little is enough. The set level λ at a place is the least of the set levels of all regulators above it, in both
   * cases (lock-up adds the same rise to each), so a regulator only ever replaces λ by something lower. Pipe to be served
   * asks λ ≥ need, pipe to mend asks λ ≤ stand; no pipe asks anything else. Hence below `needM` nothing works, and from there on
   * a lower λ breaks nothing: f rises with λ, in steps of one at levels called tops, from `count`:
   *   f(λ) = count + number of tops below λ.
   * Upstream along pipe, needM rises to what each place needs; tops that come to lie below it count for every λ from now on
   * and go into count: there a regulator stands just below the place, as high up as it can and so covering most. Pipe to mend
   * adds a top at what it stands. A regulator at a place resets any λ to needM, so f(λ) ≤ 1 + f(needM): of all tops the lowest
   * stays. At a joint no regulator can stand, so the legs' f are added at one λ: needM is the largest, counts and tops are put
   * together. A source has nothing above it and takes f(∞). So a leg has four numbers at most: needM, count, its one top and
   * f(∞); only joints have more, until the leg above.
   * (The elevation of the place bounds what a regulator there can hold from below. Where anything is to be served needM lies
   * above it anyway; only on pipe past a summit, which asks no level at all, it keeps tops apart that lie below the place.)
   *
   * Pipe is to be mended only where it is over today. Elsewhere λ + rise above MOST does no harm: the level itself is lower.
   */
  struct Behind
  {
      double needM = NO_LEVEL_M;
      int count = 0;
      std::vector<double> topsM; //!< rising

      int unregulated() const { return count + static_cast<int>( topsM.size() ); }
  };

  //! A place at which the programme puts a regulator.
  struct Break
  {
      int limb = -1;
      double alongM = 0.0;
  };

  struct FewestRegulators
  {
      int total = 0;               //!< no plan can have fewer
      std::vector<Break> breaks;   //!< sorted by limb, then from its upstream end
      std::vector<int> tornBodies; //!< bodies of looped pipe that no single level suits; rising
  };

  /**
   * Exact on legs. A body of looped pipe takes part with all of its pipe at one level; where that cannot be, or where legs
   * on it could share a cut through it, the total is a lower bound: to part looped pipe takes Limb::loopCuts regulators.
   */
  FewestRegulators fewestRegulators( const MarkedForest &marked, const ProposalRules &rules );

} // namespace stillhead
