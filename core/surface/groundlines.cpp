// SPDX-License-Identifier: GPL-2.0-or-later
// The same tracing as for the band areas, so that the lines and the areas' edges fall together.
#include "core/surface/groundlines.h"

#include "core/surface/chainassembler.h"
#include "core/surface/fieldtracer.h"
#include "core/surface/rowstream.h"

#include <algorithm>
#include <limits>
#include <numeric>

namespace stillhead
{

  namespace
  {

    class Lines : public TraceSink
    {
      public:
        explicit Lines( std::size_t levels )
          : mChains( levels )
        {
        }

        void onLevel( int level, const TraceVertex &from, const TraceVertex &to ) override
        {
          mChains[static_cast<std::size_t>( level )].add( from, to );
        }

        void onBorder( int, const TraceVertex &, const TraceVertex & ) override {}

        std::vector<ChainAssembler> &chains() { return mChains; }

      private:
        std::vector<ChainAssembler> mChains;
    };

  } // namespace

  void traceGroundLines( const ElevationSource &terrain, const std::vector<double> &elevationsM, const AreaMask *area,
    unsigned threads, Monitor &monitor, double from, double to, const TakeGroundLine &take )
  {
    const RasterGrid &grid = terrain.grid();
    const std::size_t columns = static_cast<std::size_t>( grid.columns() );
    std::vector<std::size_t> order( elevationsM.size() );
    std::iota( order.begin(), order.end(), std::size_t( 0 ) );
    std::sort( order.begin(), order.end(),
      [&elevationsM]( std::size_t a, std::size_t b ) { return elevationsM[a] < elevationsM[b]; } );
    std::vector<double> rising;
    for ( const std::size_t i : order )
      rising.push_back( elevationsM[i] );

    Lines lines( rising.size() );
    FieldTracer tracer( grid.columns(), rising, lines );
    // Among pixels, higher ground lies on the positive side, which is the right one on maps whose rows run southwards.
    const std::array<double, 6> &g = grid.geoTransform();
    const bool isMirrored = g[1] * g[5] - g[2] * g[4] < 0.0;
    const auto hand = [&]( std::size_t level, const std::vector<TerrainPoint> &vertices, bool isClosed ) {
      std::vector<TerrainPoint> line;
      for ( const TerrainPoint &vertex : vertices )
        line.push_back( grid.toMap( vertex ) );
      if ( isClosed )
        line.push_back( line.front() );
      if ( isMirrored )
        std::reverse( line.begin(), line.end() );
      take( order[level], line );
    };
    const auto handRings = [&] {
      for ( std::size_t level = 0; level < rising.size(); ++level )
      {
        for ( const std::vector<TerrainPoint> &ring : lines.chains()[level].takeRings() )
          hand( level, ring, true );
      }
    };

    RowStream stream;
    stream.threads = threads;
    stream.convert = [&]( int row, double *values ) {
      if ( !area )
        return;
      std::vector<unsigned char> inside( columns );
      area->markRow( row, 0, grid.columns(), inside.data() );
      for ( std::size_t i = 0; i < columns; ++i )
        values[i] = inside[i] ? values[i] : std::numeric_limits<double>::quiet_NaN();
    };
    stream.take = [&]( int, const double *values ) {
      tracer.addRow( values );
      handRings();
    };
    streamRows( terrain, stream, monitor, from, to );
    tracer.finish();
    handRings();
    for ( std::size_t level = 0; level < rising.size(); ++level )
    {
      for ( const std::vector<TerrainPoint> &line : lines.chains()[level].takeLines() )
        hand( level, line, false );
    }
  }

} // namespace stillhead
