// SPDX-License-Identifier: GPL-2.0-or-later
// The bilinear surface a second time, written apart from core and in another form (a sum of weighted pixels), to check
// core against. Positions are pixel-centre coordinates.
#pragma once

#include "tests/support/memoryterrain.h"

#include <algorithm>
#include <cmath>
#include <vector>

namespace stillhead::test
{

  inline double bilinear( const MemoryTerrain &terrain, double column, double row )
  {
    const int columns = terrain.grid().columns();
    const int rows = terrain.grid().rows();
    if ( !( column >= -0.5 && column <= columns - 0.5 && row >= -0.5 && row <= rows - 0.5 ) )
      return NODATA;
    column = std::clamp( column, 0.0, columns - 1.0 );
    row = std::clamp( row, 0.0, rows - 1.0 );
    double sum = 0.0;
    for ( int r = static_cast<int>( std::floor( row ) ); r <= static_cast<int>( std::ceil( row ) ); ++r )
    {
      for ( int c = static_cast<int>( std::floor( column ) ); c <= static_cast<int>( std::ceil( column ) ); ++c )
        sum += ( 1.0 - std::abs( column - c ) ) * ( 1.0 - std::abs( row - r ) ) * terrain.at( c, r );
    }
    return sum;
  }

  /**
   * Shares of a segment, rising from 0 to 1: \a dense even ones, and every place where it crosses a line through pixel centres
   * or the raster's edge.
   */
  inline std::vector<double> samplingShares(
    const MemoryTerrain &terrain, const TerrainPoint &from, const TerrainPoint &to, int dense, bool withCrossings )
  {
    std::vector<double> shares;
    for ( int i = 0; i <= dense; ++i )
      shares.push_back( static_cast<double>( i ) / dense );
    const auto cross = [&]( double start, double end, int pixels ) {
      const int low = std::max( -1, static_cast<int>( std::floor( std::min( start, end ) ) ) );
      const int high = std::min( pixels, static_cast<int>( std::ceil( std::max( start, end ) ) ) );
      for ( int line = low; line <= high; ++line )
      {
        const double share = ( std::clamp( line + 0.0, -0.5, pixels - 0.5 ) - start ) / ( end - start );
        if ( share > 0.0 && share < 1.0 )
          shares.push_back( share );
      }
    };
    if ( withCrossings )
    {
      cross( from.x, to.x, terrain.grid().columns() );
      cross( from.y, to.y, terrain.grid().rows() );
    }
    std::sort( shares.begin(), shares.end() );
    return shares;
  }

} // namespace stillhead::test
