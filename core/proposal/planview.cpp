// SPDX-License-Identifier: GPL-2.0-or-later
// Feeds are found from the sources down, what lies beneath from the ends up.
#include "core/proposal/planview.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    constexpr double SAME_PLACE_M = 1e-6;
  }

  Beneath LegReach::beneathAt(
    std::size_t segment, double share, const Forest &forest, const ProposalRules &rules ) const
  {
    Beneath below = beneath[segment + 1];
    below.add( leg.segments[segment].between( share, 1.0 ), forest, rules );
    return below;
  }

  PlanView::PlanView( const MarkedForest &marked, const ProposalRules &rules, std::vector<Planned> plan )
    : mMarked( marked )
    , mRules( rules )
    , mPlan( std::move( plan ) )
  {
    settle();
  }

  void PlanView::move( std::size_t regulator, const Planned &to )
  {
    mPlan[regulator] = to;
  }

  StaticLevels PlanView::inletOf( std::size_t regulator, int zone ) const
  {
    return mFeeds[regulator].levels( today( zone ), mRules.riseM() );
  }

  std::pair<std::size_t, std::size_t> PlanView::regulatorsOn( int limb ) const
  {
    const auto before = []( const Planned &a, const Planned &b ) { return a.limb < b.limb; };
    Planned key;
    key.limb = limb;
    const auto range = std::equal_range( mPlan.begin(), mPlan.end(), key, before );
    return { static_cast<std::size_t>( range.first - mPlan.begin() ),
      static_cast<std::size_t>( range.second - mPlan.begin() ) };
  }

  void PlanView::settle()
  {
    const std::vector<Limb> &limbs = mMarked.forest.limbs;
    std::vector<Feed> below( limbs.size() );
    std::vector<int> feeder( limbs.size(), -1 );
    mFeeds.assign( mPlan.size(), Feed() );
    mFeeders.assign( mPlan.size(), -1 );
    for ( std::size_t i = 0; i < limbs.size(); ++i )
    {
      Feed feed;
      int from = -1;
      if ( limbs[i].parent >= 0 )
      {
        feed = below[static_cast<std::size_t>( limbs[i].parent )];
        from = feeder[static_cast<std::size_t>( limbs[i].parent )];
      }
      feed = feed.boosted( limbs[i].boostHighM, limbs[i].boostLowM );
      const auto [first, last] = regulatorsOn( static_cast<int>( i ) );
      const Feed atTop = feed;
      const int fromTop = from;
      for ( std::size_t r = first; r < last; ++r )
      {
        // Inlets of one body are all fed from above it.
        mFeeds[r] = mPlan[r].inlet >= 0 ? atTop : feed;
        mFeeders[r] = mPlan[r].inlet >= 0 ? fromTop : from;
        feed = { true, mPlan[r].levelM, mPlan[r].levelM };
        from = static_cast<int>( r );
      }
      below[i] = feed;
      feeder[i] = from;
    }
  }

  Beneath PlanView::joint( int limb ) const
  {
    const Limb &own = mMarked.forest.limbs[static_cast<std::size_t>( limb )];
    Beneath all;
    all.zone = own.partCount > 0 ? mMarked.forest.parts[own.firstPart + own.partCount - 1].zone : -1;
    for ( const int child : mMarked.children.of( limb ) )
      all.join( mAbove[static_cast<std::size_t>( child )], all.zone );
    return all;
  }

  void PlanView::visit( const std::function<void( const LegReach & )> &onLeg,
    const std::function<void( std::size_t first, std::size_t last, const Beneath & )> &atInlets )
  {
    const std::vector<Limb> &limbs = mMarked.forest.limbs;
    mAbove.assign( limbs.size(), Beneath() );
    for ( std::size_t i = limbs.size(); i-- > 0; )
    {
      const int limb = static_cast<int>( i );
      const auto [first, last] = regulatorsOn( limb );
      if ( first < last && !limbs[i].loop )
      {
        visitLeg( limb, onLeg );
      }
      else
      {
        Beneath now = joint( limb );
        for ( std::size_t part = limbs[i].firstPart + limbs[i].partCount; part-- > limbs[i].firstPart; )
          now.add( mMarked.forest.parts[part], mMarked.forest, mRules );
        if ( first < last )
        {
          atInlets( first, last, now );
          now.passRegulator( mPlan[first], mRules );
        }
        mAbove[i] = now;
      }
      mAbove[i].passGate( limbs[i] );
    }
    mAbove.clear();
  }

  ForestPart PlanView::asJudged( const Limb &limb, std::size_t first, std::size_t last, ForestPart part ) const
  {
    const double startM = mMarked.forest.parts[limb.firstPart].fromM;
    const auto distance = [startM]( double alongM ) { return std::abs( alongM - startM ); };
    const auto standsAt = [&]( std::size_t regulator, double alongM ) {
      return std::abs( mPlan[regulator].alongM - alongM ) < SAME_PLACE_M;
    };
    const bool startStub =
      standsAt( first, limb.standFromM ) && distance( part.toM ) <= distance( limb.standFromM ) + SAME_PLACE_M;
    const bool endStub =
      standsAt( last - 1, limb.standToM ) && distance( part.fromM ) >= distance( limb.standToM ) - SAME_PLACE_M;
    if ( startStub || endStub )
      part.mend = part.served = false;
    return part;
  }

  void PlanView::visitLeg( int limb, const std::function<void( const LegReach & )> &onLeg )
  {
    const auto [first, last] = regulatorsOn( limb );
    const Limb &own = mMarked.forest.limbs[static_cast<std::size_t>( limb )];
    // Segments are cut at all regulators; after one has moved the leg is looked at afresh.
    for ( std::size_t r = last;; )
    {
      std::vector<double> places;
      for ( std::size_t i = first; i < last; ++i )
        places.push_back( mPlan[i].alongM );
      LegReach reach;
      reach.leg = segmentLeg( mMarked.forest, own, places, mRules );
      const std::size_t count = reach.leg.segments.size();
      std::vector<std::size_t> boundaries;
      for ( std::size_t i = first; i < last; ++i )
      {
        // The leg is cut at every regulator.
        std::size_t boundary = count;
        double leastM = std::abs( reach.leg.segments.back().toM - mPlan[i].alongM );
        for ( std::size_t k = count; k-- > 0; )
        {
          const double offM = std::abs( reach.leg.segments[k].fromM - mPlan[i].alongM );
          if ( offM <= leastM )
          {
            boundary = k;
            leastM = offM;
          }
        }
        boundaries.push_back( boundary );
      }
      const bool top = r == first;
      reach.first = r > first + 1 ? boundaries[r - first - 2] : 0;
      reach.last = r < last ? boundaries[r - first] : count;
      reach.beneath.resize( count + 1 );
      Beneath now = joint( limb );
      std::size_t next = last;
      for ( std::size_t i = count + 1; i-- > 0; )
      {
        if ( i < count )
          now.add( asJudged( own, first, last, reach.leg.segments[i] ), mMarked.forest, mRules );
        for ( ; next > r && boundaries[next - 1 - first] == i; --next )
          now.passRegulator( mPlan[next - 1], mRules );
        reach.beneath[i] = now;
      }
      if ( top )
      {
        mAbove[static_cast<std::size_t>( limb )] = now;
        return;
      }
      reach.regulator = r - 1;
      reach.boundary = boundaries[r - 1 - first];
      onLeg( reach );
      --r;
    }
  }

} // namespace stillhead
