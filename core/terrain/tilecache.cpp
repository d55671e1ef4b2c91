// SPDX-License-Identifier: GPL-2.0-or-later
// The global lock guards the books only; reading happens outside it, and who needs a tile that is being read waits
// on that one tile.
#include "core/terrain/tilecache.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {
    constexpr int USUAL_SIDE = 256;
    constexpr int LARGEST_SIDE = 512;
    constexpr int LEAST_SIDE = 128;
    constexpr int LEAST_STRIP_ROWS = 16;
    // Pixels of raster under one row of tiles cut from strips: at 4 bytes each 8 MiB, which several handles
    // can keep at once within a block cache of 64 MiB.
    constexpr long long STRIP_PIXELS = 2 * 1024 * 1024;

    int evenPart( int block )
    {
      for ( int side = LARGEST_SIDE; side >= LEAST_SIDE; --side )
      {
        if ( block % side == 0 )
          return side;
      }
      return USUAL_SIDE;
    }

    int sideFor( int block )
    {
      if ( block > LARGEST_SIDE )
        return evenPart( block );
      return block * std::max( 1, USUAL_SIDE / block );
    }
  } // namespace

  TileShape tileShapeFor( int columns, int blockColumns, int blockRows )
  {
    TileShape shape { sideFor( std::max( 1, blockColumns ) ), sideFor( std::max( 1, blockRows ) ) };
    const bool strips = blockColumns >= columns && blockColumns > LARGEST_SIDE;
    if ( strips )
    {
      const int affordable = std::max( LEAST_STRIP_ROWS, static_cast<int>( STRIP_PIXELS / columns ) );
      if ( shape.rows > affordable )
        shape.rows = std::max( 1, affordable / blockRows ) * std::min( blockRows, affordable );
    }
    return shape;
  }

  TileCache::TileCache( const ElevationSource &source, std::size_t budgetBytes )
    : mSource( source )
    , mBudgetBytes( budgetBytes )
    , mShape( tileShapeFor( source.grid().columns(), source.blockColumns(), source.blockRows() ) )
    , mTilesAcross( ( source.grid().columns() + mShape.columns - 1 ) / mShape.columns )
  {
  }

  std::shared_ptr<const ElevationTile> TileCache::tileAt( int column, int row )
  {
    const long long key = static_cast<long long>( row / mShape.rows ) * mTilesAcross + column / mShape.columns;
    std::promise<TilePointer> promise;
    std::shared_future<TilePointer> loading;
    {
      const std::lock_guard<std::mutex> lock( mMutex );
      const auto [found, isNew] = mSlots.try_emplace( key );
      Slot &slot = found->second;
      if ( slot.tile )
      {
        mLoadedByUse.splice( mLoadedByUse.begin(), mLoadedByUse, slot.use );
        return slot.tile;
      }
      if ( isNew )
        slot.loading = promise.get_future().share();
      else
        loading = slot.loading;
    }
    if ( loading.valid() )
      return loading.get();

    TilePointer tile;
    try
    {
      tile = load( key );
    }
    catch ( ... )
    {
      {
        const std::lock_guard<std::mutex> lock( mMutex );
        mSlots.erase( key );
      }
      promise.set_exception( std::current_exception() );
      throw;
    }
    {
      const std::lock_guard<std::mutex> lock( mMutex );
      Slot &slot = mSlots[key];
      slot.tile = tile;
      slot.loading = {};
      mLoadedByUse.push_front( key );
      slot.use = mLoadedByUse.begin();
      mHeldBytes += tile->bytes();
      makeRoom();
    }
    promise.set_value( tile );
    return tile;
  }

  void TileCache::clear()
  {
    const std::lock_guard<std::mutex> lock( mMutex );
    mSlots.clear();
    mLoadedByUse.clear();
    mHeldBytes = 0;
  }

  TileCache::TilePointer TileCache::load( long long key ) const
  {
    auto tile = std::make_shared<ElevationTile>();
    tile->column = static_cast<int>( key % mTilesAcross ) * mShape.columns;
    tile->row = static_cast<int>( key / mTilesAcross ) * mShape.rows;
    tile->columns = std::min( mShape.columns, grid().columns() - tile->column );
    tile->rows = std::min( mShape.rows, grid().rows() - tile->row );
    // Plain new leaves the memory as it is: reading fills it.
    tile->metresPerFloat = mSource.metresPerFloat();
    if ( tile->metresPerFloat != 0.0 )
    {
      tile->floats.reset( new float[tile->pixels()] );
      mSource.readFloats( tile->column, tile->row, tile->columns, tile->rows, tile->floats.get() );
    }
    else
    {
      tile->elevationsM.reset( new double[tile->pixels()] );
      mSource.read( tile->column, tile->row, tile->columns, tile->rows, tile->elevationsM.get() );
    }
    return tile;
  }

  void TileCache::makeRoom()
  {
    while ( mHeldBytes > mBudgetBytes && mLoadedByUse.size() > 1 )
    {
      const auto oldest = mSlots.find( mLoadedByUse.back() );
      mHeldBytes -= oldest->second.tile->bytes();
      mSlots.erase( oldest );
      mLoadedByUse.pop_back();
    }
  }

} // namespace stillhead
