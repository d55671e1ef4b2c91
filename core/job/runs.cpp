// SPDX-License-Identifier: GPL-2.0-or-later
// One walk over the pieces of the profile; a run goes on as long as the pipe does not turn.
#include "core/job/runs.h"

#include "core/profile/profilesearch.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    class RunMaker
    {
      public:
        RunMaker( const std::vector<double> &cutsM, std::vector<Run> &runs )
          : mCutsM( cutsM )
          , mRuns( runs )
        {
        }

        void start( double alongM, double elevationM )
        {
          mOpen = false;
          mAlongM = alongM;
          mElevationM = elevationM;
          mNext = static_cast<std::size_t>( std::upper_bound( mCutsM.begin(), mCutsM.end(), alongM ) - mCutsM.begin() );
        }

        //! Goes on to a place up to which the pipe does not turn; \a elevationAt tells elevations on the way.
        template <typename ElevationAt> void goOn( double alongM, double elevationM, ElevationAt elevationAt )
        {
          for ( ; mNext < mCutsM.size() && mCutsM[mNext] < alongM; ++mNext )
          {
            extend( mCutsM[mNext], elevationAt( mCutsM[mNext] ) );
            mOpen = false;
          }
          extend( alongM, elevationM );
        }

      private:
        void extend( double alongM, double elevationM )
        {
          if ( alongM <= mAlongM )
            return;
          const double rise = elevationM - mElevationM;
          if ( mOpen )
          {
            Run &last = mRuns.back();
            const double before = last.toElevationM - last.fromElevationM;
            if ( rise * before >= 0.0 )
            {
              last.toM = alongM;
              last.toElevationM = elevationM;
              mAlongM = alongM;
              mElevationM = elevationM;
              return;
            }
          }
          mRuns.push_back( { mAlongM, alongM, mElevationM, elevationM } );
          mOpen = true;
          mAlongM = alongM;
          mElevationM = elevationM;
        }

        const std::vector<double> &mCutsM;
        std::vector<Run> &mRuns;
        std::size_t mNext = 0;
        bool mOpen = false;
        double mAlongM = 0.0;
        double mElevationM = 0.0;
    };
  } // namespace

  void runsOf(
    const Profile &profile, double fromM, double toM, const std::vector<double> &cutsM, std::vector<Run> &runs )
  {
    runs.clear();
    RunMaker maker( cutsM, runs );
    bool started = false;
    for ( std::size_t i = pieceAt( profile, fromM ); i + 1 < profile.knots() && profile.alongM[i] < toM; ++i )
    {
      if ( std::isnan( profile.bendM[i] ) || profile.alongM[i + 1] <= profile.alongM[i] )
        continue;
      const Quadratic piece = quadraticOf( profile, i );
      const double low = shareAt( profile, i, fromM, 0.0 );
      const double high = shareAt( profile, i, toM, 1.0 );
      const double startM = profile.alongM[i];
      const double lengthM = profile.alongM[i + 1] - startM;
      const auto elevationAt = [&]( double alongM ) { return piece.at( ( alongM - startM ) / lengthM ); };
      if ( !started )
        maker.start( std::max( fromM, startM ), low <= 0.0 ? piece.from : piece.at( low ) );
      started = true;
      const double turn = piece.turnsInside() ? piece.turn() : low;
      if ( turn > low && turn < high )
        maker.goOn( startM + turn * lengthM, piece.at( turn ), elevationAt );
      maker.goOn( high >= 1.0 ? profile.alongM[i + 1] : toM, high >= 1.0 ? piece.to : piece.at( high ), elevationAt );
    }
  }

  double alongAtElevation( const Profile &profile, const Run &run, double elevationM )
  {
    for ( std::size_t i = pieceAt( profile, run.fromM ); i + 1 < profile.knots() && profile.alongM[i] < run.toM; ++i )
    {
      if ( std::isnan( profile.bendM[i] ) || profile.alongM[i + 1] <= profile.alongM[i] )
        continue;
      const Quadratic piece = quadraticOf( profile, i );
      const double low = shareAt( profile, i, run.fromM, 0.0 );
      const double high = shareAt( profile, i, run.toM, 1.0 );
      const double fromElevationM = piece.at( low );
      const double toElevationM = piece.at( high );
      if ( elevationM < std::min( fromElevationM, toElevationM )
        || elevationM > std::max( fromElevationM, toElevationM ) )
        continue;
      const double share = piece.rootIn( elevationM, low, high );
      return std::clamp(
        profile.alongM[i] + share * ( profile.alongM[i + 1] - profile.alongM[i] ), run.fromM, run.toM );
    }
    // Within rounding of one end.
    const bool nearFrom = std::abs( elevationM - run.fromElevationM ) <= std::abs( elevationM - run.toElevationM );
    return nearFrom ? run.fromM : run.toM;
  }

} // namespace stillhead
