// SPDX-License-Identifier: GPL-2.0-or-later
// Rows are read on several threads and traced on one; lines go on as they close, so that only open ones are held.
#include "core/surface/groundlines.h"

#include "core/surface/chainassembler.h"
#include "core/surface/groundtracer.h"
#include "core/surface/rowstream.h"

#include <algorithm>
#include <numeric>

namespace stillhead
{

  namespace
  {
    //! Strings the steps of all elevations and hands out lines on the map.
    class LineBuilder
    {
      public:
        LineBuilder( const RasterGrid &grid, std::vector<std::size_t> order, const TakeGroundLine &take )
          : mGrid( grid )
          , mOrder( std::move( order ) )
          , mTake( take )
          , mChains( mOrder.size() )
        {
          // Among pixels, higher ground lies on the positive side, which is the right one on maps whose rows run southwards.
          const std::array<double, 6> &g = grid.geoTransform();
          mIsMirrored = g[1] * g[5] - g[2] * g[4] < 0.0;
        }

        void add( int level, const TraceVertex &from, const TraceVertex &to )
        {
          mChains[static_cast<std::size_t>( level )].add( from, to );
        }

        std::size_t openVertices() const
        {
          return std::accumulate( mChains.begin(), mChains.end(), std::size_t( 0 ),
            []( std::size_t sum, const ChainAssembler &chains ) { return sum + chains.openVertices(); } );
        }

        void handRings()
        {
          for ( std::size_t level = 0; level < mChains.size(); ++level )
          {
            for ( std::vector<TerrainPoint> &ring : mChains[level].takeRings() )
            {
              ring.push_back( ring.front() );
              hand( level, ring );
            }
          }
        }

        void handLines()
        {
          for ( std::size_t level = 0; level < mChains.size(); ++level )
          {
            for ( const std::vector<TerrainPoint> &line : mChains[level].takeLines() )
              hand( level, line );
          }
        }

      private:
        void hand( std::size_t level, const std::vector<TerrainPoint> &vertices ) const
        {
          std::vector<TerrainPoint> line;
          line.reserve( vertices.size() );
          for ( std::size_t i = 0; i < vertices.size(); ++i )
          {
            // Through a cell centre that has the very elevation a line comes by every side that meets there.
            if ( i == 0 || vertices[i].x != vertices[i - 1].x || vertices[i].y != vertices[i - 1].y )
              line.push_back( mGrid.toMap( vertices[i] ) );
          }
          if ( line.size() < 2 )
            return;
          if ( mIsMirrored )
            std::reverse( line.begin(), line.end() );
          mTake( mOrder[level], line );
        }

        const RasterGrid &mGrid;
        const std::vector<std::size_t> mOrder; //!< the caller's index of every level
        const TakeGroundLine &mTake;
        std::vector<ChainAssembler> mChains;
        bool mIsMirrored = false;
    };
  } // namespace

  void traceGroundLines( const ElevationSource &terrain, const GroundLineRequest &request, Monitor &monitor,
    double from, double to, const TakeGroundLine &take )
  {
    const RasterGrid &grid = terrain.grid();
    std::vector<std::size_t> order( request.elevationsM.size() );
    std::iota( order.begin(), order.end(), std::size_t( 0 ) );
    std::sort( order.begin(), order.end(),
      [&]( std::size_t a, std::size_t b ) { return request.elevationsM[a] < request.elevationsM[b]; } );
    std::vector<double> rising;
    for ( const std::size_t i : order )
      rising.push_back( request.elevationsM[i] );

    LineBuilder lines( grid, order, take );
    GroundTracer tracer( grid.columns(), rising,
      [&lines]( int level, const TraceVertex &a, const TraceVertex &b ) { lines.add( level, a, b ); } );
    std::vector<unsigned char> inside( request.area ? static_cast<std::size_t>( grid.columns() ) : 0 );
    RowStream stream;
    stream.threads = request.threads;
    stream.convert = []( int, double * ) {};
    stream.take = [&]( int row, const double *groundsM ) {
      if ( request.area )
        request.area->markRow( row, 0, grid.columns(), inside.data() );
      tracer.addRow( groundsM, request.area ? inside.data() : nullptr );
      lines.handRings();
      if ( lines.openVertices() > request.mostOpenVertices )
        lines.handLines();
    };
    streamRows( terrain, stream, monitor, from, to );
    tracer.finish();
    lines.handRings();
    lines.handLines();
  }

} // namespace stillhead
