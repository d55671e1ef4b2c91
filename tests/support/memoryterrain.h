// SPDX-License-Identifier: GPL-2.0-or-later
// A terrain in memory, so that every pixel is known and nothing stands between a test and the surface.
#pragma once

#include "core/terrain/elevationsource.h"

#include <array>
#include <cstddef>
#include <functional>
#include <limits>
#include <vector>

namespace stillhead::test
{

  constexpr double NODATA = std::numeric_limits<double>::quiet_NaN();

  //! Placement whose pixel centres stand at whole numbers of \a cell: pixel (0, 0) at (x, y), rows going south.
  inline std::array<double, 6> centresAt( double x, double y, double cell )
  {
    return { x - 0.5 * cell, cell, 0.0, y + 0.5 * cell, 0.0, -cell };
  }

  class MemoryTerrain : public ElevationSource
  {
    public:
      //! \param elevationsM row by row
      MemoryTerrain( int columns, int rows, std::vector<double> elevationsM, const std::array<double, 6> &geoTransform )
        : mGrid( columns, rows, geoTransform )
        , mElevationsM( std::move( elevationsM ) )
      {
      }

      //! Pixel centres at whole coordinates: pixel (column, row) at (column, −row).
      MemoryTerrain( int columns, int rows, std::vector<double> elevationsM )
        : MemoryTerrain( columns, rows, std::move( elevationsM ), centresAt( 0.0, 0.0, 1.0 ) )
      {
      }

      //! Every pixel from \a surface( x, y ) at its centre.
      static MemoryTerrain sampled( int columns, int rows, const std::array<double, 6> &geoTransform,
        const std::function<double( double x, double y )> &surface )
      {
        const RasterGrid grid( columns, rows, geoTransform );
        std::vector<double> elevations;
        for ( int row = 0; row < rows; ++row )
        {
          for ( int column = 0; column < columns; ++column )
          {
            const TerrainPoint place = grid.toMap( { static_cast<double>( column ), static_cast<double>( row ) } );
            elevations.push_back( surface( place.x, place.y ) );
          }
        }
        return MemoryTerrain( columns, rows, std::move( elevations ), geoTransform );
      }

      const RasterGrid &grid() const override { return mGrid; }
      int blockColumns() const override { return mBlock; }
      int blockRows() const override { return mBlock; }
      void setBlock( int pixels ) { mBlock = pixels; }

      void read( int column, int row, int columns, int rows, double *elevationsM ) const override
      {
        for ( int r = row; r < row + rows; ++r )
        {
          for ( int c = column; c < column + columns; ++c )
            *elevationsM++ = at( c, r );
        }
      }

      double at( int column, int row ) const { return mElevationsM[index( column, row )]; }
      void set( int column, int row, double elevationM ) { mElevationsM[index( column, row )] = elevationM; }

    private:
      RasterGrid mGrid;
      std::vector<double> mElevationsM;
      int mBlock = 256;

      std::size_t index( int column, int row ) const
      {
        return static_cast<std::size_t>( row ) * static_cast<std::size_t>( mGrid.columns() )
          + static_cast<std::size_t>( column );
      }
  };

} // namespace stillhead::test
