// SPDX-License-Identifier: GPL-2.0-or-later
// Even-odd crossings of a cell row with the sides of each polygon. A side is always taken from its lower row to its
// higher one, so that two polygons that share it find the very same crossing.
#include "core/surface/areamask.h"

#include <algorithm>
#include <cmath>
#include <cstring>

namespace stillhead
{

  namespace
  {
    constexpr int STRIPE_ROWS = 32;
  }

  AreaMask::AreaMask( const std::vector<PixelPolygon> &polygons, int rows )
    : mRows( rows )
    , mStripes( static_cast<std::size_t>( rows / STRIPE_ROWS + 1 ) )
  {
    const auto stripeOf = [rows]( double row ) {
      return static_cast<std::size_t>( std::clamp( row, 0.0, static_cast<double>( rows ) ) ) / STRIPE_ROWS;
    };
    for ( std::size_t polygon = 0; polygon < polygons.size(); ++polygon )
    {
      for ( const std::vector<TerrainPoint> &ring : polygons[polygon] )
      {
        for ( std::size_t i = 0; i < ring.size(); ++i )
        {
          Edge edge { ring[i], ring[( i + 1 ) % ring.size()], static_cast<int>( polygon ) };
          if ( edge.from.y == edge.to.y || !std::isfinite( edge.from.y ) || !std::isfinite( edge.to.y ) )
            continue;
          if ( edge.from.y > edge.to.y )
            std::swap( edge.from, edge.to );
          if ( edge.to.y < 0.0 || edge.from.y > rows )
            continue;
          for ( std::size_t stripe = stripeOf( edge.from.y ); stripe <= stripeOf( edge.to.y ); ++stripe )
            mStripes[stripe].push_back( edge );
        }
      }
    }
  }

  bool AreaMask::markRow( int row, int column, int columns, unsigned char *inside ) const
  {
    std::memset( inside, 0, static_cast<std::size_t>( columns ) );
    const std::vector<Edge> &edges = mStripes[static_cast<std::size_t>( std::clamp( row, 0, mRows ) / STRIPE_ROWS )];
    thread_local std::vector<double> crossings;
    bool any = false;
    for ( std::size_t first = 0; first < edges.size(); )
    {
      crossings.clear();
      std::size_t next = first;
      for ( ; next < edges.size() && edges[next].polygon == edges[first].polygon; ++next )
      {
        const Edge &edge = edges[next];
        // Half open, so that a vertex at the height of the centres counts once.
        if ( row < edge.from.y || row >= edge.to.y )
          continue;
        crossings.push_back(
          edge.from.x + ( row - edge.from.y ) * ( edge.to.x - edge.from.x ) / ( edge.to.y - edge.from.y ) );
      }
      first = next;
      std::sort( crossings.begin(), crossings.end() );
      for ( std::size_t i = 0; i + 1 < crossings.size(); i += 2 )
      {
        const double last = column + columns;
        const int from = static_cast<int>( std::clamp( std::ceil( crossings[i] ), double( column ), last ) );
        const int to = static_cast<int>( std::clamp( std::ceil( crossings[i + 1] ), double( column ), last ) );
        if ( to > from )
        {
          std::memset( inside + ( from - column ), 1, static_cast<std::size_t>( to - from ) );
          any = true;
        }
      }
    }
    return any;
  }

} // namespace stillhead
