// SPDX-License-Identifier: GPL-2.0-or-later
// What one elevation costs at a place of its own, scattered and along a line, with all tiles already in the cache.
#include "core/terrain/segmentwalk.h"
#include "tests/support/memoryterrain.h"

#include <benchmark/benchmark.h>

#include <cmath>
#include <random>
#include <vector>

namespace
{

  constexpr int SIDE = 1024;

  void sample( benchmark::State &state, bool scattered )
  {
    using stillhead::test::centresAt;
    stillhead::test::MemoryTerrain terrain =
      stillhead::test::MemoryTerrain::sampled( SIDE, SIDE, centresAt( 0.0, 0.0, 1.0 ),
        []( double x, double y ) { return 100.0 + 5.0 * std::sin( x * 0.02 ) * std::cos( y * 0.03 ); } );
    stillhead::TileCache cache( terrain );
    stillhead::TerrainReader reader( cache );
    std::mt19937 random( 3 );
    std::uniform_real_distribution<double> anywhere( 0.0, SIDE - 1.0 );
    std::vector<stillhead::TerrainPoint> places( 4096 );
    for ( std::size_t i = 0; i < places.size(); ++i )
      places[i] = scattered ? stillhead::TerrainPoint { anywhere( random ), anywhere( random ) }
                            : stillhead::TerrainPoint { 0.2 * static_cast<double>( i ), 500.3 };
    std::size_t next = 0;
    for ( auto _ : state )
    {
      benchmark::DoNotOptimize( reader.elevationAtM( places[next] ) );
      next = ( next + 1 ) % places.size();
    }
    state.SetItemsProcessed( state.iterations() );
  }

} // namespace

BENCHMARK_CAPTURE( sample, along_a_line, false );
BENCHMARK_CAPTURE( sample, scattered, true );
