// SPDX-License-Identifier: GPL-2.0-or-later
// The places that one regulator may take on its leg while all others stay.
#pragma once

#include "core/proposal/planview.h"

namespace stillhead
{

  //! A regulator tried at a place, with what its least margin is there.
  struct Trial
  {
      bool fits = false;
      double marginM = 0.0;
      Planned regulator;
  };

  class Seat
  {
    public:
      Seat( const PlanView &view, const LegReach &reach );

      //! Distance from the upstream end of the leg.
      double distanceM( double alongM ) const { return std::abs( alongM - mStartM ); }

      //! Segments in which it may stand as far as what feeds it goes: pipe above it must stand that.
      std::size_t firstSegment() const { return mReach.first; }
      std::size_t endSegment() const { return mEnd; }

      //! The largest share of \a segment at which the pipe above, within the segment, still stands what feeds it.
      double fedShare( std::size_t segment ) const;

      //! True if the segment keeps the distances that must be kept, and has an elevation.
      bool isOpen( std::size_t segment ) const;

      //! The best level at a place, and its margin.
      Trial tryAt( std::size_t segment, double share ) const;

      //! The same where the regulator stands now.
      Trial tryNow() const;

      //! True if the present setting works at the place.
      bool suits( std::size_t segment, double share ) const;

    private:
      const ForestPart &segmentAt( std::size_t segment ) const { return mReach.leg.segments[segment]; }
      bool standsFeed( const ForestPart &part ) const;
      bool isStub( const ForestPart &part ) const;
      LevelRange allowed( double elevationM, const StaticLevels &inlet, const Beneath &below ) const;
      bool toStep( double elevationM, const LevelRange &range, double &levelM ) const;
      Trial tryWith( double alongM, double elevationM, const ForestPart &on, const Beneath &below ) const;

      const PlanView &mView;
      const LegReach &mReach;
      const ProposalRules &mRules;
      Planned mOwn;
      const Limb &mLimb;
      double mStartM;
      double mFromM; //!< distances between which it may be written
      double mToM;
      std::size_t mEnd;
  };

} // namespace stillhead
