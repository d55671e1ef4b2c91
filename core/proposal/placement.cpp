// SPDX-License-Identifier: GPL-2.0-or-later
// Places are tried in every segment and then more closely about the best: pieces of pipe are quadratics and the least of
// three margins has corners, so there is no root to solve for.
#include "core/proposal/placement.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    constexpr int TRIES_IN_A_SEGMENT = 8;
    constexpr int REFINEMENTS = 3;
    constexpr int HALVINGS = 40;

    //! A regulator tried at a place, with what its least margin is there.
    struct Trial
    {
        bool fits = false;
        double marginM = 0.0;
        Planned regulator;
    };

    //! Looks at the places that one regulator may take while all others stay.
    class Seat
    {
      public:
        Seat( const PlanView &view, const LegReach &reach )
          : mView( view )
          , mReach( reach )
          , mRules( view.rules() )
          , mForest( view.marked().forest )
          , mOwn( view.at( reach.regulator ) )
          , mLimb( mForest.limbs[static_cast<std::size_t>( mOwn.limb )] )
          , mStartM( mReach.leg.segments.front().fromM )
        {
          const double apartM = mReach.leg.onePlace ? 0.0 : mRules.leastApartM() * ( 1.0 - 1e-9 );
          mFromM = distance( mLimb.standFromM );
          mToM = distance( mLimb.standToM );
          const std::size_t r = mReach.regulator;
          if ( r > 0 && view.at( r - 1 ).limb == mOwn.limb )
            mFromM = std::max( mFromM, distance( view.at( r - 1 ).alongM ) + apartM );
          if ( r + 1 < view.plan().size() && view.at( r + 1 ).limb == mOwn.limb )
            mToM = std::min( mToM, distance( view.at( r + 1 ).alongM ) - apartM );
          findHowFarFed();
        }

        double distance( double alongM ) const { return std::abs( alongM - mStartM ); }

        //! First segment in which the regulator may stand, and the one after the last.
        std::size_t firstSegment() const { return mFirst; }
        std::size_t endSegment() const { return mEnd; }

        bool isOpen( std::size_t segment ) const
        {
          const ForestPart &part = mReach.leg.segments[segment];
          return part.known && distance( part.fromM ) >= mFromM - 1e-9 && distance( part.toM ) <= mToM + 1e-9;
        }

        double elevationAt( std::size_t segment, double share ) const
        {
          return mReach.leg.segments[segment].elevation.at( share );
        }

        Beneath beneathAt( std::size_t segment, double share ) const
        {
          return mReach.beneathAt( segment, share, mForest, mRules );
        }

        //! Levels that the regulator may hold at a place with \a below beneath it.
        LevelRange allowed( double elevationM, const StaticLevels &inlet, const Beneath &below, bool keep ) const
        {
          const StandPlace place { elevationM, inlet };
          LevelRange range = outletRange( place, inlet, keep, mRules );
          range.lowM = std::max( { range.lowM, below.need.levelM, below.feedLowM } );
          range.highM = std::min( { range.highM, below.standM, below.feedHighM } );
          return range;
        }

        Trial tryAt( double alongM, double elevationM, int zone, Role role, const Beneath &below ) const
        {
          Trial trial;
          const StaticLevels inlet = mView.inletOf( mReach.regulator, zone );
          LevelRange range = allowed( elevationM, inlet, below, mOwn.kept );
          if ( range.isEmpty() )
            return trial;
          const double needM = below.zoneNeedM > NO_LEVEL_M ? below.zoneNeedM : std::max( range.lowM, elevationM );
          const double mostM = below.zoneMostM < ANY_LEVEL_M ? below.zoneMostM - mRules.riseM() : range.highM;
          double levelM = std::min( std::max( 0.5 * ( needM + mostM ), range.lowM ), range.highM );
          if ( mRules.settingStepPa > 0.0 && !toStep( elevationM, range, levelM ) )
            return trial;
          const double highM = std::min( levelM + mRules.riseM(), inlet.highM );
          trial.fits = true;
          trial.marginM = mRules.mostM( role ) - ( inlet.highM - elevationM );
          if ( below.zoneNeedM > NO_LEVEL_M )
            trial.marginM = std::min( trial.marginM, levelM - below.zoneNeedM );
          if ( below.zoneMostM < ANY_LEVEL_M )
            trial.marginM = std::min( trial.marginM, below.zoneMostM - highM );
          trial.regulator = mOwn;
          trial.regulator.alongM = alongM;
          trial.regulator.elevationM = elevationM;
          trial.regulator.levelM = levelM;
          return trial;
        }

        Trial tryAt( std::size_t segment, double share ) const
        {
          const ForestPart &part = mReach.leg.segments[segment];
          return tryAt(
            part.alongAt( share ), elevationAt( segment, share ), part.zone, part.role, beneathAt( segment, share ) );
        }

        //! The place where the regulator stands now.
        Trial tryNow() const
        {
          const std::vector<ForestPart> &segments = mReach.leg.segments;
          const std::size_t after = std::min( mReach.boundary, segments.size() - 1 );
          const ForestPart &part =
            segments[after].known || mReach.boundary == 0 ? segments[after] : segments[after - 1];
          return tryAt( mOwn.alongM, mOwn.elevationM, part.zone, part.role, mReach.beneath[mReach.boundary] );
        }

        //! True if the present setting works at the place.
        bool suits( std::size_t segment, double share ) const
        {
          const double elevationM = elevationAt( segment, share );
          const double levelM = elevationM + mOwn.levelM - mOwn.elevationM;
          const StaticLevels inlet = mView.inletOf( mReach.regulator, mReach.leg.segments[segment].zone );
          const LevelRange range = allowed( elevationM, inlet, beneathAt( segment, share ), mOwn.kept );
          return levelM >= range.lowM - SAME_LEVEL_M && levelM <= range.highM + SAME_LEVEL_M;
        }

      private:
        //! The nearest multiple of the setting step within \a range; a regulator that keeps no rule may do without.
        bool toStep( double elevationM, const LevelRange &range, double &levelM ) const
        {
          const double stepM = mRules.stepM();
          const double first = std::max( 1.0, std::ceil( ( range.lowM - SAME_LEVEL_M - elevationM ) / stepM ) );
          const double last = std::floor( ( range.highM + SAME_LEVEL_M - elevationM ) / stepM );
          if ( first > last )
            return !mOwn.kept;
          const double steps = std::min( std::max( std::round( ( levelM - elevationM ) / stepM ), first ), last );
          levelM = elevationM + steps * stepM;
          return true;
        }

        //! Pipe above the regulator must stand what feeds it; stubs are not judged.
        void findHowFarFed()
        {
          const Feed &feed = mView.feedOf( mReach.regulator );
          mFirst = mReach.first;
          mEnd = mReach.first;
          for ( ; mEnd < mReach.last; ++mEnd )
          {
            const ForestPart &part = mReach.leg.segments[mEnd];
            const bool stub = distance( part.toM ) <= distance( mLimb.standFromM ) + 1e-9;
            if ( part.mend && !stub
              && ( !feed.regulated || feed.highM > part.lowestM() + mRules.standM( part.role ) + SAME_LEVEL_M ) )
            {
              // It may stand at the upstream end of this segment, and within it as far as the pipe stands the level.
              ++mEnd;
              break;
            }
          }
        }

      public:
        //! The largest share of \a segment at which the pipe above, within the segment, still stands what feeds it.
        double fedShare( std::size_t segment ) const
        {
          const ForestPart &part = mReach.leg.segments[segment];
          const bool stub = distance( part.toM ) <= distance( mLimb.standFromM ) + 1e-9;
          if ( !part.mend || stub )
            return 1.0;
          const Feed &feed = mView.feedOf( mReach.regulator );
          if ( !feed.regulated )
            return 0.0;
          const double lowestM = feed.highM - mRules.standM( part.role );
          if ( part.lowestM() >= lowestM - SAME_LEVEL_M )
            return 1.0;
          return part.elevation.from > lowestM && part.elevation.to < lowestM ? part.shareOf( lowestM ) : 0.0;
        }

      private:
        const PlanView &mView;
        const LegReach &mReach;
        const ProposalRules &mRules;
        const Forest &mForest;
        Planned mOwn;
        const Limb &mLimb;
        double mStartM;
        double mFromM = 0.0;
        double mToM = 0.0;
        std::size_t mFirst = 0;
        std::size_t mEnd = 0;
    };

    struct Spot
    {
        std::size_t segment = 0;
        double share = 0.0;
    };

    Planned bestSeat( const PlanView &view, const LegReach &reach )
    {
      const Seat seat( view, reach );
      Trial best = seat.tryNow();
      if ( !best.fits )
        return view.at( reach.regulator );
      Spot at { std::min( reach.boundary, reach.leg.segments.size() - 1 ), 0.0 };
      const auto attempt = [&]( std::size_t segment, double share ) {
        const Trial trial = seat.tryAt( segment, share );
        if ( !trial.fits || trial.marginM <= best.marginM + SAME_LEVEL_M )
          return;
        best = trial;
        at = { segment, share };
      };
      for ( std::size_t i = seat.firstSegment(); i < seat.endSegment(); ++i )
      {
        if ( !seat.isOpen( i ) )
          continue;
        const double end = seat.fedShare( i );
        for ( int k = 0; k <= TRIES_IN_A_SEGMENT; ++k )
          attempt( i, end * k / TRIES_IN_A_SEGMENT );
      }
      double step = 1.0 / TRIES_IN_A_SEGMENT;
      for ( int round = 0; round < REFINEMENTS; ++round )
      {
        // About the best place so far, across the ends of its segment too.
        const double middle = static_cast<double>( at.segment ) + at.share;
        for ( int k = -TRIES_IN_A_SEGMENT; k <= TRIES_IN_A_SEGMENT; ++k )
        {
          const double place = middle + step * k / TRIES_IN_A_SEGMENT;
          if ( place < static_cast<double>( seat.firstSegment() ) || place >= static_cast<double>( seat.endSegment() ) )
            continue;
          const std::size_t segment = static_cast<std::size_t>( place );
          const double share = place - static_cast<double>( segment );
          if ( seat.isOpen( segment ) && share <= seat.fedShare( segment ) )
            attempt( segment, share );
        }
        step /= TRIES_IN_A_SEGMENT;
      }
      return best.regulator;
    }

    //! Follows \a segment from share \a from towards \a to as long as the setting suits; true if it suits all the way.
    bool follow( const Seat &seat, std::size_t segment, double from, double to, double &reached )
    {
      reached = from;
      for ( int k = 1; k <= TRIES_IN_A_SEGMENT; ++k )
      {
        const double next = from + ( to - from ) * k / TRIES_IN_A_SEGMENT;
        if ( seat.suits( segment, next ) )
        {
          reached = next;
          continue;
        }
        double good = reached;
        double bad = next;
        for ( int i = 0; i < HALVINGS; ++i )
        {
          const double middle = 0.5 * ( good + bad );
          ( seat.suits( segment, middle ) ? good : bad ) = middle;
        }
        reached = good;
        return false;
      }
      return true;
    }
  } // namespace

  void improvePlan( PlanView &view )
  {
    // What is better for one can make room for another; it settles at once in practice.
    constexpr int ROUNDS = 2;
    for ( int round = 0; round < ROUNDS; ++round )
    {
      view.visit( [&]( const LegReach &reach ) { view.move( reach.regulator, bestSeat( view, reach ) ); },
        []( std::size_t, std::size_t, const Beneath & ) {} );
      view.settle();
    }
  }

  PlaceRange placeRange( const PlanView &view, const LegReach &reach )
  {
    const Seat seat( view, reach );
    const double ownM = view.at( reach.regulator ).alongM;
    PlaceRange range { ownM, ownM };
    for ( std::size_t i = reach.boundary; i-- > seat.firstSegment(); )
    {
      if ( !seat.isOpen( i ) )
        break;
      double reached = 1.0;
      const bool all = seat.suits( i, 1.0 ) && follow( seat, i, 1.0, 0.0, reached );
      range.fromM = reach.leg.segments[i].alongAt( reached );
      if ( !all )
        break;
    }
    for ( std::size_t i = reach.boundary; i < seat.endSegment(); ++i )
    {
      if ( !seat.isOpen( i ) )
      {
        // The stub that leads to the written place.
        if ( seat.distance( reach.leg.segments[i].toM ) <= seat.distance( ownM ) + 1e-9 )
          continue;
        break;
      }
      const double end = seat.fedShare( i );
      double reached = 0.0;
      const bool all = seat.suits( i, 0.0 ) && follow( seat, i, 0.0, end, reached );
      range.toM = reach.leg.segments[i].alongAt( reached );
      if ( !all || end < 1.0 )
        break;
    }
    return range;
  }

} // namespace stillhead
