// SPDX-License-Identifier: GPL-2.0-or-later
// Pieces by place.
#include "core/profile/profilesearch.h"

#include "core/terrain/segmentwalk.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  std::size_t pieceAt( const Profile &profile, double alongM )
  {
    if ( alongM <= profile.alongM.front() )
      return 0;
    const auto after = std::upper_bound( profile.alongM.begin(), profile.alongM.end(), alongM );
    return std::min( static_cast<std::size_t>( after - profile.alongM.begin() ) - 1, profile.knots() - 2 );
  }

  Quadratic quadraticOf( const Profile &profile, std::size_t piece )
  {
    return { profile.elevationM[piece], profile.elevationM[piece + 1], profile.bendM[piece] };
  }

  double shareAt( const Profile &profile, std::size_t piece, double alongM, double otherwise )
  {
    const double from = profile.alongM[piece];
    const double length = profile.alongM[piece + 1] - from;
    return length > 0.0 ? std::clamp( ( alongM - from ) / length, 0.0, 1.0 ) : otherwise;
  }

  double elevationAtM( const Profile &profile, double alongM )
  {
    const std::size_t piece = pieceAt( profile, alongM );
    const double share = shareAt( profile, piece, alongM, 0.0 );
    if ( !std::isnan( profile.bendM[piece] ) )
      return share <= 0.0
        ? profile.elevationM[piece]
        : ( share >= 1.0 ? profile.elevationM[piece + 1] : quadraticOf( profile, piece ).at( share ) );
    // A knot between pipe without and with elevation has one.
    if ( share >= 1.0 )
      return profile.elevationM[piece + 1];
    return share <= 0.0 ? profile.elevationM[piece] : NO_ELEVATION;
  }

} // namespace stillhead
