// SPDX-License-Identifier: GPL-2.0-or-later
// Packed R-tree of leg boxes; nearest places in the ground metric.
#include "core/network/legindex.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  LegIndex::LegIndex( const CanonicalDrawing &drawing )
    : mDrawing( drawing )
  {
    for ( std::size_t i = 0; i < drawing.lines.size(); ++i )
    {
      const CanonicalLine &line = drawing.lines[i];
      for ( std::size_t v = line.first; v + 1 < line.first + line.count; ++v )
        mLegs.push_back( { static_cast<int>( i ), v } );
    }
    std::vector<Entry> entries;
    entries.reserve( mLegs.size() );
    for ( std::size_t i = 0; i < mLegs.size(); ++i )
    {
      const PlanPoint &a = drawing.vertices[mLegs[i].vertex];
      const PlanPoint &b = drawing.vertices[mLegs[i].vertex + 1];
      const Box box( BoxPoint( std::min( a.x, b.x ), std::min( a.y, b.y ) ),
        BoxPoint( std::max( a.x, b.x ), std::max( a.y, b.y ) ) );
      entries.emplace_back( box, static_cast<unsigned>( i ) );
    }
    mTree = decltype( mTree )( entries.begin(), entries.end() );
  }

  LegHit nearestOnLeg(
    const CanonicalDrawing &drawing, const Leg &leg, const PlanPoint &place, const GroundScale &scale )
  {
    const PlanPoint &a = drawing.vertices[leg.vertex];
    const PlanPoint &b = drawing.vertices[leg.vertex + 1];
    const double legEast = scale.xx * ( b.x - a.x ) + scale.xy * ( b.y - a.y );
    const double legNorth = scale.yx * ( b.x - a.x ) + scale.yy * ( b.y - a.y );
    const double east = scale.xx * ( place.x - a.x ) + scale.xy * ( place.y - a.y );
    const double north = scale.yx * ( place.x - a.x ) + scale.yy * ( place.y - a.y );
    const double squared = legEast * legEast + legNorth * legNorth;
    const double t = squared > 0.0 ? std::clamp( ( east * legEast + north * legNorth ) / squared, 0.0, 1.0 ) : 0.0;
    const double fromM = drawing.alongM[leg.vertex];
    const double toM = drawing.alongM[leg.vertex + 1];
    // The far vertex is taken as it stands, so that a hit on it has its exact place along the line.
    const double along = t >= 1.0 ? toM : fromM + t * ( toM - fromM );
    return { along, std::hypot( east - t * legEast, north - t * legNorth ) };
  }

  PlanPoint boxHalfSize( const GroundScale &scale, double radiusM )
  {
    const double determinant = std::abs( scale.xx * scale.yy - scale.xy * scale.yx );
    return { radiusM * std::hypot( scale.yy, scale.xy ) / determinant,
      radiusM * std::hypot( scale.yx, scale.xx ) / determinant };
  }

} // namespace stillhead
