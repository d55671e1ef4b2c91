// SPDX-License-Identifier: GPL-2.0-or-later
// Tiled terrain: the file takes over its tiles and a unit is a few of them in a row. Striped terrain: a unit is one full
// row of tiles, of lower tiles where the raster is very wide.
#include "core/geo/surfacelayout.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {
    constexpr int USUAL_TILE = 256;
    constexpr int LEAST_TILE = 128;
    constexpr int LARGEST_TILE = 512;
    constexpr int TIFF_STEP = 16;
    constexpr long long UNIT_CELLS = 1 << 20;
    constexpr long long LARGEST_UNIT_CELLS = 4 << 20;
    constexpr int WINDOW_CELLS = 1 << 17; // 1 MiB of elevations: about what the second-level cache of a core holds

    int roundedUp( long long value, long long step )
    {
      return static_cast<int>( ( value + step - 1 ) / step * step );
    }

    int tileSide( int block )
    {
      return block >= LEAST_TILE && block <= LARGEST_TILE && block % TIFF_STEP == 0 ? block : USUAL_TILE;
    }
  } // namespace

  SurfaceLayout::SurfaceLayout( const ElevationSource &terrain )
    : columns( terrain.grid().columns() )
    , rows( terrain.grid().rows() )
  {
    const int blockColumns = std::clamp( terrain.blockColumns(), 1, columns );
    const int blockRows = std::clamp( terrain.blockRows(), 1, rows );
    const bool strips = blockColumns == columns && columns > LARGEST_TILE;
    tileColumns = strips ? USUAL_TILE : tileSide( terrain.blockColumns() );
    tileRows = strips ? USUAL_TILE : tileSide( terrain.blockRows() );
    if ( strips )
    {
      unitColumns = roundedUp( columns, tileColumns );
      const long long affordable = LARGEST_UNIT_CELLS / unitColumns / TIFF_STEP * TIFF_STEP;
      tileRows = static_cast<int>( std::clamp<long long>( affordable, TIFF_STEP, tileRows ) );
      unitRows = tileRows;
      windowColumns = columns;
      windowRows = std::clamp( WINDOW_CELLS / columns, 1, unitRows );
    }
    else
    {
      const bool rowsFit =
        blockRows % tileRows == 0 && static_cast<long long>( blockRows ) * tileColumns <= LARGEST_UNIT_CELLS;
      unitRows = rowsFit ? blockRows : tileRows;
      const bool columnsFit =
        blockColumns % tileColumns == 0 && static_cast<long long>( blockColumns ) * unitRows <= LARGEST_UNIT_CELLS;
      const int step = columnsFit ? blockColumns : tileColumns;
      const long long steps = std::max<long long>( 1, UNIT_CELLS / unitRows / step );
      unitColumns = static_cast<int>( std::min<long long>( steps * step, roundedUp( columns, step ) ) );
      windowColumns = std::min( blockColumns, unitColumns );
      windowRows = std::clamp( WINDOW_CELLS / windowColumns, 1, std::min( blockRows, unitRows ) );
      if ( windowColumns * windowRows < USUAL_TILE * USUAL_TILE / 4 )
      {
        // Small blocks: fewer, larger reads.
        windowColumns = std::min( USUAL_TILE, unitColumns );
        windowRows = std::min( USUAL_TILE, unitRows );
      }
    }
    unitsAcross = static_cast<std::size_t>( ( columns + unitColumns - 1 ) / unitColumns );
    units = unitsAcross * static_cast<std::size_t>( ( rows + unitRows - 1 ) / unitRows );
  }

} // namespace stillhead
