// SPDX-License-Identifier: GPL-2.0-or-later
// Places are tried in every segment and then more closely about the best: pieces of pipe are quadratics and the least of
// three margins has corners, so there is no root to solve for.
#include "core/proposal/placement.h"

#include "core/proposal/seat.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    constexpr int TRIES_IN_A_SEGMENT = 8;
    constexpr int REFINEMENTS = 3;
    constexpr int HALVINGS = 40;

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
        if ( seat.distanceM( reach.leg.segments[i].toM ) <= seat.distanceM( ownM ) + 1e-9 )
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
