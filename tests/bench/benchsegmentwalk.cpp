// SPDX-License-Identifier: GPL-2.0-or-later
// What a walk over the bilinear surface costs per cell crossed: long skew segments over a terrain in memory, with
// all tiles already in the cache, so that only the walk itself is timed.
#include "core/terrain/segmentwalk.h"
#include "tests/support/memoryterrain.h"

#include <benchmark/benchmark.h>

#include <algorithm>
#include <cmath>
#include <cstdint>

namespace
{

  constexpr int SIDE = 1024;

  void walk( benchmark::State &state )
  {
    using stillhead::test::centresAt;
    stillhead::test::MemoryTerrain terrain =
      stillhead::test::MemoryTerrain::sampled( SIDE, SIDE, centresAt( 0.0, 0.0, 1.0 ),
        []( double x, double y ) { return 100.0 + 5.0 * std::sin( x * 0.02 ) * std::cos( y * 0.03 ); } );
    stillhead::TileCache cache( terrain );
    stillhead::TerrainReader reader( cache );
    std::int64_t pieces = 0;
    double row = 0.0;
    for ( auto _ : state )
    {
      double highest = 0.0;
      stillhead::walkSegment(
        reader, { 0.25, row }, { SIDE - 1.25, SIDE - 1.0 - row }, [&]( double, double, double fromM, double, double ) {
          highest = std::max( highest, fromM );
          ++pieces;
        } );
      benchmark::DoNotOptimize( highest );
      row = row < SIDE - 2.0 ? row + 0.75 : 0.0;
    }
    state.SetItemsProcessed( pieces );
  }

} // namespace

BENCHMARK( walk );
