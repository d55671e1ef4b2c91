// SPDX-License-Identifier: GPL-2.0-or-later
// One thread's view of the terrain: pixels by number through the shared tile cache, the last tiles kept at hand.
#pragma once

#include "core/terrain/tilecache.h"

#include <array>
#include <memory>

namespace stillhead
{

  class TerrainReader
  {
    public:
      explicit TerrainReader( TileCache &cache )
        : mCache( cache )
        , mColumns( cache.grid().columns() )
        , mRows( cache.grid().rows() )
      {
      }

      const RasterGrid &grid() const { return mCache.grid(); }
      int columns() const { return mColumns; }
      int rows() const { return mRows; }

      //! Elevation of a pixel of the grid in metres, NaN where there is none.
      double at( int column, int row )
      {
        if ( !mCurrent || !mCurrent->holds( column, row ) )
          fetch( column, row );
        return mCurrent->at( column, row );
      }

      /**
       * Elevation of the bilinear surface at pixel-centre coordinates; held in the outer half pixel. NaN outside the raster
       * and where a neighbour that carries weight has no elevation.
       */
      double elevationAtM( const TerrainPoint &pixel );

    private:
      void fetch( int column, int row );

      TileCache &mCache;
      int mColumns;
      int mRows;
      std::shared_ptr<const ElevationTile> mCurrent;
      std::array<std::shared_ptr<const ElevationTile>, 4> mRecent;
      std::size_t mNextRecent = 0;
  };

} // namespace stillhead
