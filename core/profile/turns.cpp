// SPDX-License-Identifier: GPL-2.0-or-later
// A stack of turns: of the last four the inner two go when the step between them is the least of the three.
#include "core/profile/turns.h"

#include "core/network/noding.h"
#include "core/profile/profilesearch.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    bool isLevel( const Turn &a, const Turn &b )
    {
      return std::abs( a.elevationM - b.elevationM ) <= LEVEL_PIPE_M;
    }

    //! The run at the end of a list of turns.
    class OpenRun
    {
      public:
        OpenRun( std::vector<Turn> &turns, double leastM, const GoesBefore &goesBefore )
          : mTurns( turns )
          , mLeastM( leastM )
          , mGoesBefore( goesBefore )
        {
        }

        void begin() { mFirst = mTurns.size(); }
        std::size_t first() const { return mFirst; }
        std::size_t count() const { return mTurns.size() - mFirst; }

        void add( const Turn &next )
        {
          if ( count() == 0 )
          {
            mTurns.push_back( next );
            return;
          }
          Turn &last = mTurns.back();
          if ( isLevel( last, next ) )
          {
            unite( last, next );
            return;
          }
          const bool goesOn = count() > 1
            && ( next.elevationM > last.elevationM ) == ( last.elevationM > mTurns[mTurns.size() - 2].elevationM );
          if ( goesOn )
            last = next;
          else
            mTurns.push_back( next );
          reduce();
        }

      private:
        //! \a kept and \a other are one level place.
        void unite( Turn &kept, const Turn &other ) const
        {
          if ( mGoesBefore( other.alongM, kept.alongM ) )
            kept.alongM = other.alongM;
        }

        void reduce()
        {
          while ( count() >= 4 )
          {
            Turn *const four = &mTurns[mTurns.size() - 4];
            const auto step = [four]( int i ) { return std::abs( four[i].elevationM - four[i + 1].elevationM ); };
            if ( !( step( 1 ) < mLeastM ) || step( 1 ) > step( 0 ) || step( 1 ) > step( 2 ) )
              return;
            if ( isLevel( four[0], four[2] ) )
              unite( four[0], four[2] );
            if ( isLevel( four[1], four[3] ) )
              unite( four[3], four[1] );
            four[1] = four[3];
            mTurns.resize( mTurns.size() - 2 );
          }
        }

        std::vector<Turn> &mTurns;
        const double mLeastM;
        const GoesBefore &mGoesBefore;
        std::size_t mFirst = 0;
    };
  } // namespace

  void appendTurns(
    const Profile &profile, int number, const Span &span, double leastM, const GoesBefore &goesBefore, Turns &turns )
  {
    OpenRun run( turns.turns, leastM, goesBefore );
    run.begin();
    double beginM = span.fromM;
    double endM = span.fromM;
    const auto close = [&] {
      if ( run.count() > 0 )
        turns.runs.push_back(
          { number, run.first(), run.count(), beginM - span.fromM < LEAST_SPAN_M, span.toM - endM < LEAST_SPAN_M } );
      run.begin();
    };
    for ( std::size_t piece = pieceAt( profile, span.fromM );
          piece + 1 < profile.knots() && profile.alongM[piece] < span.toM; ++piece )
    {
      const Quadratic quadratic = quadraticOf( profile, piece );
      if ( std::isnan( quadratic.bend ) )
        continue;
      const double fromM = std::max( profile.alongM[piece], span.fromM );
      const double toM = std::min( profile.alongM[piece + 1], span.toM );
      const double low = shareAt( profile, piece, fromM, 0.0 );
      const double high = shareAt( profile, piece, toM, 1.0 );
      if ( run.count() == 0 || fromM - endM >= LEAST_SPAN_M )
      {
        close();
        beginM = fromM;
      }
      const auto elevationAt = [&]( double share ) {
        return share <= 0.0 ? quadratic.from : ( share >= 1.0 ? quadratic.to : quadratic.at( share ) );
      };
      run.add( { fromM, elevationAt( low ) } );
      const double turn = quadratic.turnsInside() ? quadratic.turn() : 0.0;
      if ( turn > low && turn < high )
      {
        const double lengthM = profile.alongM[piece + 1] - profile.alongM[piece];
        run.add( { std::clamp( profile.alongM[piece] + turn * lengthM, fromM, toM ), quadratic.at( turn ) } );
      }
      run.add( { toM, elevationAt( high ) } );
      endM = toM;
    }
    close();
  }

} // namespace stillhead
