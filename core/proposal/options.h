// SPDX-License-Identifier: GPL-2.0-or-later
// What a place can be fed with, by cost: the same programme as the four numbers, but with whole sets of levels, because
// the rules about drop, ratio and setting step make a lower level worse as well as better.
#pragma once

#include "core/proposal/levelset.h"

#include <climits>
#include <vector>

namespace stillhead
{

  //! The water above a place: unregulated, or held by regulators (with lock-up rise off in the high case).
  struct Feed
  {
      bool regulated = false;
      double highM = ANY_LEVEL_M; //!< set level in the high case
      double lowM = ANY_LEVEL_M;  //!< in the low case; the same unless a booster came after

      //! Levels of pipe that has the levels \a today if nothing above is regulated.
      StaticLevels levels( const StaticLevels &today, double riseM ) const
      {
        return regulated ? StaticLevels { std::min( today.highM, highM + riseM ), std::min( today.lowM, lowM ) }
                         : today;
      }

      Feed boosted( double highBoostM, double lowBoostM ) const
      {
        return { regulated, highM + highBoostM, lowM + lowBoostM };
      }
  };

  //! A place where a regulator could stand: its elevation and today's levels there.
  struct StandPlace
  {
      double elevationM = 0.0;
      StaticLevels today;
  };

  //! An outlet level chosen at a place, with its distance from the nearer end of what is allowed.
  struct Outlet
  {
      bool found = false;
      double levelM = 0.0;
      double marginM = 0.0;
  };

  /**
   * The levels that a regulator at \a place may give, as far as the regulator itself is concerned, if its inlet has \a inlet.
   * With \a keep false LEAST_DROP and MOST_RATIO are left aside.
   */
  LevelRange outletRange( const StandPlace &place, const StaticLevels &inlet, bool keep, const ProposalRules &rules );

  //! The level of \a levels within \a range farthest from the ends of its range in \a levels; a multiple of the setting step if \a keepStep.
  Outlet bestOutlet( const StandPlace &place, const LevelSet &levels, const LevelRange &range, bool keepStep,
    const ProposalRules &rules );

  constexpr int NEVER = INT_MAX / 4;
  constexpr int KEPT_COST = 1; //!< a regulator that keeps all rules
  constexpr int BROKEN_COST =
    5; //!< one that cannot: as dear as four more, so that splitting a reduction is tried first

  class Options
  {
    public:
      //! Pipe with nothing to mend: any level from \a needM on costs nothing.
      static Options free( double needM );

      //! The least cost below here, fed with \a feed.
      int costOf( const Feed &feed ) const;

      //! Levels that cost no more than \a cost.
      const LevelSet &levelsWithin( int cost ) const;

      //! Passes pipe that needs \a range; unregulated water passes only if \a unregulatedToo.
      void pass( const LevelRange &range, bool unregulatedToo );

      //! Adds what is fed from the same place.
      void join( const Options &other );

      //! Allows \a regulators regulators with one outlet level at \a place.
      void stand( const StandPlace &place, int regulators, const ProposalRules &rules );

      //! As stand(), but on what was below before other regulators were allowed: \a below.
      void standOver( const Options &below, const StandPlace &place, int regulators, const ProposalRules &rules );

      //! Now all must pass the regulators that stand() allowed for: leaves only those.
      static Options behind(
        const Options &below, const StandPlace &place, int regulators, const ProposalRules &rules );

      //! Below a booster.
      void lower( double lowM, double highM );

      bool isEmpty() const { return mChoices.empty() && mUnregulated >= NEVER; }

    private:
      struct Choice
      {
          int cost = 0;
          LevelSet levels; //!< with all that cheaper ones allow
      };

      void add( int cost, const LevelSet &levels );
      void tidy();

      std::vector<Choice> mChoices; //!< rising costs, growing sets
      int mUnregulated = NEVER;
  };

} // namespace stillhead
