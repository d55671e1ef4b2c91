// SPDX-License-Identifier: GPL-2.0-or-later
// A block cache with a fixed memory budget between a raster and the threads that walk over it. Values never depend
// on it: a tile dropped is read again.
#pragma once

#include "core/terrain/elevationsource.h"

#include <cstddef>
#include <future>
#include <list>
#include <memory>
#include <mutex>
#include <unordered_map>

namespace stillhead
{

  //! A rectangle of elevations in metres, NaN where there is none. Kept as 32-bit floats where these say the same.
  struct ElevationTile
  {
      int column = 0;
      int row = 0;
      int columns = 0;
      int rows = 0;
      std::unique_ptr<float[]> floats; //!< times metresPerFloat; null where `elevationsM` holds the values
      double metresPerFloat = 0.0;
      std::unique_ptr<double[]> elevationsM;

      std::size_t pixels() const { return static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows ); }
      std::size_t bytes() const { return pixels() * ( floats ? sizeof( float ) : sizeof( double ) ); }
      bool holds( int c, int r ) const { return c >= column && c < column + columns && r >= row && r < row + rows; }
      double at( int c, int r ) const
      {
        const std::size_t index = static_cast<std::size_t>( r - row ) * static_cast<std::size_t>( columns )
          + static_cast<std::size_t>( c - column );
        return floats ? static_cast<double>( floats[index] ) * metresPerFloat : elevationsM[index];
      }
  };

  //! Width and height of a tile in pixels.
  struct TileShape
  {
      int columns = 0;
      int rows = 0;
  };

  /**
   * The shape in which a raster of \a columns pixels across, stored in blocks of \a blockColumns × \a blockRows, is best
   * read: whole blocks where they are tiles of sensible size, several of them where they are small, an even part of
   * them where they are strips or huge (the reader's own block cache then keeps the rest of the strips for the
   * neighbours; a row of such tiles stays small enough for that).
   */
  TileShape tileShapeFor( int columns, int blockColumns, int blockRows );

  /**
   * Tiles of an ElevationSource, least recently used dropped first once \a budgetBytes is reached (tiles in use by a
   * reader stay alive until it lets go). Safe to use from several threads; no two threads read the same tile at once:
   * who comes second waits for the first. A failed read reaches everybody who waits for it and is tried again when
   * the tile is next asked for.
   */
  class TileCache
  {
    public:
      static constexpr std::size_t DEFAULT_BUDGET_BYTES = 64u << 20;

      explicit TileCache( const ElevationSource &source, std::size_t budgetBytes = DEFAULT_BUDGET_BYTES );
      TileCache( const TileCache & ) = delete;
      TileCache &operator=( const TileCache & ) = delete;

      const RasterGrid &grid() const { return mSource.grid(); }
      int tileColumns() const { return mShape.columns; }
      int tileRows() const { return mShape.rows; }

      /**
       * The tile that holds pixel (\a column, \a row), which lies within the grid.
       * \throws std::runtime_error what the source threw
       */
      std::shared_ptr<const ElevationTile> tileAt( int column, int row );

      //! Lets go of all tiles. Not while a reader works.
      void clear();

    private:
      using TilePointer = std::shared_ptr<const ElevationTile>;

      //! A tile that is there (tile set) or on its way (loading).
      struct Slot
      {
          TilePointer tile;
          std::shared_future<TilePointer> loading;
          std::list<long long>::iterator use;
      };

      TilePointer load( long long key ) const;
      void makeRoom();

      const ElevationSource &mSource;
      const std::size_t mBudgetBytes;
      const TileShape mShape;
      const long long mTilesAcross;
      std::mutex mMutex;
      std::unordered_map<long long, Slot> mSlots;
      std::list<long long> mLoadedByUse; //!< Loaded tiles only, the last used first
      std::size_t mHeldBytes = 0;
  };

} // namespace stillhead
