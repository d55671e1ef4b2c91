// SPDX-License-Identifier: GPL-2.0-or-later
// A unit is one row of blocks, or a few strips: each block is decoded once.
#include "core/surface/rowstream.h"

#include "core/feedback/orderedpipeline.h"
#include "core/feedback/parallel.h"

#include <algorithm>
#include <vector>

namespace stillhead
{

  namespace
  {
    constexpr long long USUAL_CELLS = 1 << 20;
    constexpr long long LARGEST_CELLS = 12 << 20;
    constexpr long long WINDOW_CELLS = 1 << 17;
    constexpr std::size_t MEMORY_BYTES = 128u << 20;

    int rowsOfUnit( int columns, int blockRows )
    {
      const int most = static_cast<int>( std::max( 1LL, LARGEST_CELLS / columns ) );
      if ( blockRows >= most )
        return most;
      const long long usual = USUAL_CELLS / columns;
      return static_cast<int>( std::max( 1LL, usual / blockRows ) ) * blockRows;
    }

    //! Some rows, read in windows along the blocks.
    void readRows(
      const ElevationSource &terrain, int row, int rows, const Monitor &monitor, std::vector<double> &values )
    {
      const int columns = terrain.grid().columns();
      const int windowColumns = std::clamp( terrain.blockColumns(), std::min( 256, columns ), columns );
      const int windowRows = static_cast<int>( std::clamp<long long>( WINDOW_CELLS / windowColumns, 1, rows ) );
      std::vector<double> window( static_cast<std::size_t>( windowColumns ) * static_cast<std::size_t>( windowRows ) );
      for ( int column = 0; column < columns; column += windowColumns )
      {
        const int width = std::min( windowColumns, columns - column );
        for ( int first = 0; first < rows; first += windowRows )
        {
          stopIfCancelled( monitor );
          const int height = std::min( windowRows, rows - first );
          terrain.read( column, row + first, width, height, window.data() );
          for ( int r = 0; r < height; ++r )
            std::copy_n( window.begin() + static_cast<std::ptrdiff_t>( r ) * width, width,
              values.begin() + static_cast<std::ptrdiff_t>( first + r ) * columns + column );
        }
      }
    }
  } // namespace

  void streamRows( const ElevationSource &terrain, const RowStream &stream, Monitor &monitor, double from, double to )
  {
    const int columns = terrain.grid().columns();
    const int rows = terrain.grid().rows();
    const int unitRows = std::min( rows, rowsOfUnit( columns, std::clamp( terrain.blockRows(), 1, rows ) ) );
    const std::size_t unitCells = static_cast<std::size_t>( unitRows ) * static_cast<std::size_t>( columns );
    const auto rowsIn = [rows, unitRows]( std::size_t unit ) {
      return std::min( unitRows, rows - static_cast<int>( unit ) * unitRows );
    };

    OrderedPipeline pipeline;
    pipeline.units = static_cast<std::size_t>( ( rows + unitRows - 1 ) / unitRows );
    pipeline.threads = threadCount( stream.threads );
    pipeline.places =
      std::clamp<std::size_t>( MEMORY_BYTES / ( unitCells * sizeof( double ) ), 1, pipeline.threads + 1 );
    std::vector<std::vector<double>> values( pipeline.places );
    pipeline.make = [&]( std::size_t unit, std::size_t place ) {
      values[place].resize( unitCells );
      const int firstRow = static_cast<int>( unit ) * unitRows;
      readRows( terrain, firstRow, rowsIn( unit ), monitor, values[place] );
      for ( int r = 0; r < rowsIn( unit ); ++r )
        stream.convert( firstRow + r, values[place].data() + static_cast<std::ptrdiff_t>( r ) * columns );
    };
    pipeline.take = [&]( std::size_t unit, std::size_t place ) {
      for ( int r = 0; r < rowsIn( unit ); ++r )
      {
        stopIfCancelled( monitor );
        stream.take(
          static_cast<int>( unit ) * unitRows + r, values[place].data() + static_cast<std::ptrdiff_t>( r ) * columns );
      }
    };
    runOrdered( pipeline, monitor, from, to );
  }

} // namespace stillhead
