// SPDX-License-Identifier: GPL-2.0-or-later
// One piece of a profile as a quadratic of its share τ from 0 to 1.
#pragma once

#include <algorithm>
#include <cmath>

namespace stillhead
{

  //! Elevation (1 − τ)·from + τ·to + bend·τ·(τ − 1), in metres.
  struct Quadratic
  {
      double from = 0.0;
      double to = 0.0;
      double bend = 0.0;

      double at( double tau ) const { return ( 1.0 - tau ) * from + tau * to + bend * tau * ( tau - 1.0 ); }

      //! True if the lowest or highest point lies strictly inside the piece.
      bool turnsInside() const { return std::abs( to - from ) < std::abs( bend ); }

      //! Share at which it turns; only if turnsInside().
      double turn() const { return std::clamp( 0.5 * ( 1.0 - ( to - from ) / bend ), 0.0, 1.0 ); }

      /**
       * The share in [low, high], where the quadratic is monotone, at which it takes \a value; the nearer end if rounding
       * puts the root outside. Roots are taken in the form that loses no digits, then bettered by one step of Newton.
       */
      double rootIn( double value, double low, double high ) const
      {
        const double b = to - from - bend;
        const double c = from - value;
        double tau = low;
        if ( bend == 0.0 )
        {
          tau = b != 0.0 ? -c / b : low;
        }
        else
        {
          const double discriminant = std::max( 0.0, b * b - 4.0 * bend * c );
          const double q = -0.5 * ( b + std::copysign( std::sqrt( discriminant ), b ) );
          const double first = q / bend;
          const double second = q != 0.0 ? c / q : first;
          const auto outside = [&]( double root ) {
            return std::isfinite( root ) ? std::max( { 0.0, low - root, root - high } ) : HUGE_VAL;
          };
          tau = outside( second ) < outside( first ) ? second : first;
        }
        tau = std::isfinite( tau ) ? std::clamp( tau, low, high ) : low;
        const double slope = b + 2.0 * bend * tau;
        if ( slope != 0.0 )
        {
          const double better = std::clamp( tau - ( at( tau ) - value ) / slope, low, high );
          if ( std::abs( at( better ) - value ) < std::abs( at( tau ) - value ) )
            tau = better;
        }
        return tau;
      }
  };

} // namespace stillhead
