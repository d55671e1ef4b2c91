// SPDX-License-Identifier: GPL-2.0-or-later
// From the last vertex kept, a cone of slopes that pass within the tolerance of all knots since; a knot outside the
// cone makes the one before it a vertex. One pass, vertices lie on the exact profile.
#include "core/profile/simplify.h"

#include "core/profile/profilesearch.h"
#include "core/terrain/segmentwalk.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    //! Shares of the tolerance: for the curve between knots, and for leaving knots out.
    constexpr double CURVE_TOLERANCE_M = 0.2 * DRAWN_PROFILE_TOLERANCE_M;
    constexpr double KNOT_TOLERANCE_M = 0.8 * DRAWN_PROFILE_TOLERANCE_M;

    class Drawer
    {
      public:
        explicit Drawer( std::vector<ProfileVertex> &vertices )
          : mVertices( vertices )
        {
        }

        void keep( const ProfileVertex &vertex )
        {
          mVertices.push_back( vertex );
          mAnchor = vertex;
          mHasCandidate = false;
          mLeastSlope = -HUGE_VAL;
          mMostSlope = HUGE_VAL;
        }

        //! The next place of the exact profile.
        void pass( const ProfileVertex &vertex )
        {
          const double step = vertex.alongM - mAnchor.alongM;
          const double slope = ( vertex.elevationM - mAnchor.elevationM ) / step;
          if ( mHasCandidate && !( slope >= mLeastSlope && slope <= mMostSlope ) )
          {
            keep( mCandidate );
            pass( vertex );
            return;
          }
          if ( !( step > 0.0 ) )
          {
            if ( vertex.elevationM != mAnchor.elevationM )
              keep( vertex );
            return;
          }
          mCandidate = vertex;
          mHasCandidate = true;
          mLeastSlope = std::max( mLeastSlope, slope - KNOT_TOLERANCE_M / step );
          mMostSlope = std::min( mMostSlope, slope + KNOT_TOLERANCE_M / step );
        }

        void flush()
        {
          if ( mHasCandidate )
            keep( mCandidate );
        }

        //! Pipe with elevation begins at the last vertex, which had none.
        void becomeKnown( double elevationM )
        {
          mVertices.back().elevationM = elevationM;
          mAnchor.elevationM = elevationM;
        }

      private:
        std::vector<ProfileVertex> &mVertices;
        ProfileVertex mAnchor;
        ProfileVertex mCandidate;
        bool mHasCandidate = false;
        double mLeastSlope = 0.0;
        double mMostSlope = 0.0;
    };
  } // namespace

  void appendDrawnProfile( const Profile &profile, double fromM, double toM, const double *mustHoldM, std::size_t count,
    std::vector<ProfileVertex> &vertices )
  {
    Drawer drawer( vertices );
    const double *mustHold = mustHoldM;
    const double *const mustHoldEnd = mustHoldM + count;
    const bool toLast = toM >= profile.alongM.back();
    bool started = false;
    bool known = false;
    for ( std::size_t i = pieceAt( profile, fromM );
          i + 1 < profile.knots() && ( toLast || profile.alongM[i] < toM || !started ); ++i )
    {
      const bool pieceKnown = !std::isnan( profile.bendM[i] );
      const Quadratic quadratic = quadraticOf( profile, i );
      const double low = shareAt( profile, i, fromM, 0.0 );
      const double high = shareAt( profile, i, toM, 1.0 );
      const double startM = std::max( fromM, profile.alongM[i] );
      const double endM = std::min( toM, profile.alongM[i + 1] );
      const double startElevationM = !pieceKnown ? NO_ELEVATION : ( low <= 0.0 ? quadratic.from : quadratic.at( low ) );
      const double endElevationM = !pieceKnown ? NO_ELEVATION : ( high >= 1.0 ? quadratic.to : quadratic.at( high ) );
      if ( !started )
      {
        drawer.keep( { startM, startElevationM } );
      }
      else if ( pieceKnown != known )
      {
        drawer.flush();
        if ( pieceKnown )
          drawer.becomeKnown( startElevationM );
      }
      while ( mustHold != mustHoldEnd && *mustHold <= startM )
        ++mustHold;
      const bool mustKeep = ( mustHold != mustHoldEnd && *mustHold <= endM ) || endM >= toM;
      if ( pieceKnown )
      {
        const double bulge = 0.25 * std::abs( quadratic.bend ) * ( high - low ) * ( high - low );
        const int parts =
          bulge > CURVE_TOLERANCE_M ? static_cast<int>( std::ceil( std::sqrt( bulge / CURVE_TOLERANCE_M ) ) ) : 1;
        for ( int part = 1; part < parts; ++part )
        {
          const double share = low + ( high - low ) * part / parts;
          drawer.pass( { startM + ( endM - startM ) * part / parts, quadratic.at( share ) } );
        }
        drawer.pass( { endM, endElevationM } );
        if ( mustKeep )
          drawer.flush();
      }
      else
      {
        const bool knownNext = i + 2 < profile.knots() && !std::isnan( profile.bendM[i + 1] );
        if ( mustKeep || knownNext )
          drawer.keep( { endM, NO_ELEVATION } );
      }
      known = pieceKnown;
      started = true;
    }
  }

} // namespace stillhead
