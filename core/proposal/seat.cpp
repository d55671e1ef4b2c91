// SPDX-License-Identifier: GPL-2.0-or-later
// Every condition on place and level, and the three margins.
#include "core/proposal/seat.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    constexpr double SAME_PLACE_M = 1e-9;
  }

  Seat::Seat( const PlanView &view, const LegReach &reach )
    : mView( view )
    , mReach( reach )
    , mRules( view.rules() )
    , mOwn( view.at( reach.regulator ) )
    , mLimb( view.marked().forest.limbs[static_cast<std::size_t>( mOwn.limb )] )
    , mStartM( reach.leg.segments.front().fromM )
    , mFromM( distanceM( mLimb.standFromM ) )
    , mToM( distanceM( mLimb.standToM ) )
    , mEnd( reach.first )
  {
    const double apartM = mReach.leg.onePlace ? 0.0 : mRules.leastApartM();
    const std::size_t r = mReach.regulator;
    if ( r > 0 && view.at( r - 1 ).limb == mOwn.limb )
      mFromM = std::max( mFromM, distanceM( view.at( r - 1 ).alongM ) + apartM );
    if ( r + 1 < view.plan().size() && view.at( r + 1 ).limb == mOwn.limb )
      mToM = std::min( mToM, distanceM( view.at( r + 1 ).alongM ) - apartM );
    bool fed = true;
    while ( fed && mEnd < mReach.last )
      fed = standsFeed( segmentAt( mEnd++ ) );
  }

  bool Seat::isStub( const ForestPart &part ) const
  {
    return distanceM( part.toM ) <= distanceM( mLimb.standFromM ) + SAME_PLACE_M;
  }

  bool Seat::standsFeed( const ForestPart &part ) const
  {
    if ( !part.mend || isStub( part ) )
      return true;
    const Feed &feed = mView.feedOf( mReach.regulator );
    return feed.regulated && feed.highM <= part.lowestM() + mRules.standM( part.role ) + SAME_LEVEL_M;
  }

  double Seat::fedShare( std::size_t segment ) const
  {
    const ForestPart &part = segmentAt( segment );
    if ( standsFeed( part ) )
      return 1.0;
    const Feed &feed = mView.feedOf( mReach.regulator );
    const double lowestM = feed.highM - mRules.standM( part.role );
    const bool comesDown = part.elevation.from > lowestM && part.elevation.to < lowestM;
    return feed.regulated && comesDown ? part.shareOf( lowestM ) : 0.0;
  }

  bool Seat::isOpen( std::size_t segment ) const
  {
    const ForestPart &part = segmentAt( segment );
    return part.known && part.canStand && distanceM( part.fromM ) >= mFromM - SAME_PLACE_M
      && distanceM( part.toM ) <= mToM + SAME_PLACE_M;
  }

  LevelRange Seat::allowed( double elevationM, const StaticLevels &inlet, const Beneath &below ) const
  {
    LevelRange range = outletRange( { elevationM, inlet }, inlet, mOwn.kept, mRules );
    range.lowM = std::max( { range.lowM, below.need.levelM, below.feedLowM } );
    range.highM = std::min( { range.highM, below.standM, below.feedHighM } );
    return range;
  }

  //! The nearest multiple of the setting step within \a range; a regulator that keeps no rule may do without.
  bool Seat::toStep( double elevationM, const LevelRange &range, double &levelM ) const
  {
    const double stepM = mRules.stepM();
    if ( stepM <= 0.0 )
      return true;
    const double first = std::max( 1.0, std::ceil( ( range.lowM - SAME_LEVEL_M - elevationM ) / stepM ) );
    const double last = std::floor( ( range.highM + SAME_LEVEL_M - elevationM ) / stepM );
    if ( first > last )
      return !mOwn.kept;
    const double steps = std::min( std::max( std::round( ( levelM - elevationM ) / stepM ), first ), last );
    levelM = elevationM + steps * stepM;
    return true;
  }

  Trial Seat::tryWith( double alongM, double elevationM, const ForestPart &on, const Beneath &below ) const
  {
    Trial trial;
    const StaticLevels inlet = mView.inletOf( mReach.regulator, on.zone );
    const LevelRange range = allowed( elevationM, inlet, below );
    if ( range.isEmpty() )
      return trial;
    const bool anyServed = below.zoneNeedM > NO_LEVEL_M;
    const bool anyLimit = below.zoneMostM < ANY_LEVEL_M;
    const double needM = anyServed ? below.zoneNeedM : std::max( range.lowM, elevationM );
    const double mostM = anyLimit ? below.zoneMostM - mRules.riseM() : range.highM;
    double levelM = std::min( std::max( 0.5 * ( needM + mostM ), range.lowM ), range.highM );
    if ( !toStep( elevationM, range, levelM ) )
      return trial;
    trial.fits = true;
    trial.marginM = mRules.mostM( on.role ) - ( inlet.highM - elevationM );
    if ( anyServed )
      trial.marginM = std::min( trial.marginM, levelM - below.zoneNeedM );
    if ( anyLimit )
      trial.marginM = std::min( trial.marginM, below.zoneMostM - std::min( levelM + mRules.riseM(), inlet.highM ) );
    trial.regulator = mOwn;
    trial.regulator.alongM = alongM;
    trial.regulator.elevationM = elevationM;
    trial.regulator.levelM = levelM;
    return trial;
  }

  Trial Seat::tryAt( std::size_t segment, double share ) const
  {
    const ForestPart &part = segmentAt( segment );
    return tryWith( part.alongAt( share ), part.elevation.at( share ), part,
      mReach.beneathAt( segment, share, mView.marked().forest, mRules ) );
  }

  Trial Seat::tryNow() const
  {
    const std::size_t after = std::min( mReach.boundary, mReach.leg.segments.size() - 1 );
    const bool useAfter = segmentAt( after ).known || mReach.boundary == 0;
    return tryWith(
      mOwn.alongM, mOwn.elevationM, segmentAt( useAfter ? after : after - 1 ), mReach.beneath[mReach.boundary] );
  }

  bool Seat::suits( std::size_t segment, double share ) const
  {
    const ForestPart &part = segmentAt( segment );
    const double elevationM = part.elevation.at( share );
    const double levelM = elevationM + mOwn.levelM - mOwn.elevationM;
    const LevelRange range = allowed( elevationM, mView.inletOf( mReach.regulator, part.zone ),
      mReach.beneathAt( segment, share, mView.marked().forest, mRules ) );
    return levelM >= range.lowM - SAME_LEVEL_M && levelM <= range.highM + SAME_LEVEL_M;
  }

} // namespace stillhead
