// SPDX-License-Identifier: GPL-2.0-or-later
// A plan as it stands in its forest: what feeds every regulator, and what lies beneath every place where it could stand.
#pragma once

#include "core/proposal/beneath.h"
#include "core/proposal/legstations.h"
#include "core/proposal/options.h"

#include <functional>
#include <utility>
#include <vector>

namespace stillhead
{

  //! The reach of its leg that a regulator has for itself: from the regulator above or the leg's start to the one below or the end.
  struct LegReach
  {
      std::size_t regulator = 0;
      SegmentedLeg leg;
      std::size_t boundary = 0; //!< where the regulator stands now
      std::size_t first = 0;    //!< boundaries of the reach
      std::size_t last = 0;
      std::vector<Beneath> beneath; //!< at all boundaries of the leg; only those of the reach are filled in

      //! What lies beneath the place at \a share of \a segment.
      Beneath beneathAt( std::size_t segment, double share, const Forest &forest, const ProposalRules &rules ) const;
  };

  class PlanView
  {
    public:
      PlanView( const MarkedForest &marked, const ProposalRules &rules, std::vector<Planned> plan );

      const std::vector<Planned> &plan() const { return mPlan; }
      const Planned &at( std::size_t regulator ) const { return mPlan[regulator]; }
      const MarkedForest &marked() const { return mMarked; }
      const ProposalRules &rules() const { return mRules; }

      //! Takes another place or level for a regulator on its leg.
      void move( std::size_t regulator, const Planned &to );

      //! What feeds \a regulator, and the regulator from which it comes (−1: none).
      const Feed &feedOf( std::size_t regulator ) const { return mFeeds[regulator]; }
      int feederOf( std::size_t regulator ) const { return mFeeders[regulator]; }

      //! Levels at the inlet of \a regulator if it stood in \a zone of today.
      StaticLevels inletOf( std::size_t regulator, int zone ) const;

      const StaticLevels &today( int zone ) const { return mMarked.forest.zones[static_cast<std::size_t>( zone )]; }

      //! Finds out what feeds what, after regulators have moved.
      void settle();

      /**
       * From the ends of the pipe up to the sources calls \a onLeg for every regulator on a leg, which it may move, and
       * \a atInlets for the regulators [first, last) that feed a body together.
       */
      void visit( const std::function<void( const LegReach & )> &onLeg,
        const std::function<void( std::size_t first, std::size_t last, const Beneath & )> &atInlets );

    private:
      std::pair<std::size_t, std::size_t> regulatorsOn( int limb ) const;
      Beneath joint( int limb ) const;

      //! The stub between a joint and a regulator that is written at its end is not judged.
      ForestPart asJudged( const Limb &limb, std::size_t first, std::size_t last, ForestPart part ) const;

      void visitLeg( int limb, const std::function<void( const LegReach & )> &onLeg );

      const MarkedForest &mMarked;
      const ProposalRules &mRules;
      std::vector<Planned> mPlan;
      std::vector<Feed> mFeeds;
      std::vector<int> mFeeders;
      std::vector<Beneath> mAbove; //!< of every limb, while visit() runs
  };

} // namespace stillhead
