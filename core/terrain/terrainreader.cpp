// SPDX-License-Identifier: GPL-2.0-or-later
// Tile switching, and the surface at a single place.
#include "core/terrain/terrainreader.h"

#include "core/terrain/segmentwalk.h"

#include <utility>

namespace stillhead
{

  void TerrainReader::fetch( int column, int row )
  {
    for ( auto &recent : mRecent )
    {
      if ( recent && recent->holds( column, row ) )
      {
        std::swap( recent, mCurrent );
        return;
      }
    }
    mRecent[mNextRecent] = std::move( mCurrent );
    mNextRecent = ( mNextRecent + 1 ) % mRecent.size();
    mCurrent = mCache.tileAt( column, row );
  }

  double TerrainReader::elevationAtM( const TerrainPoint &pixel )
  {
    const GridAxis columns( pixel.x, 0.0, mColumns );
    const GridAxis rows( pixel.y, 0.0, mRows );
    if ( columns.outside() || rows.outside() )
      return NO_ELEVATION;
    const CellCorners corners( *this, columns.cell(), rows.cell() );
    return corners.at( columns.cell().share( pixel.x ), rows.cell().share( pixel.y ) );
  }

} // namespace stillhead
