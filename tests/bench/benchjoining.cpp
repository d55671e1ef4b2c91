// SPDX-License-Identifier: GPL-2.0-or-later
// What joining costs for each segment drawn, at growing size: a drawing file's many tiny segments end to end, combs of
// mainlines and laterals, and the worst case of near misses, everything within the tolerance of everything.
#include "core/network/joining.h"

#include <benchmark/benchmark.h>

#include <cmath>
#include <cstdint>

namespace
{

  using namespace stillhead;

  void add( Drawing &drawing, const PlanPoint &from, const PlanPoint &to )
  {
    DrawnLine line;
    line.first = drawing.vertices.size();
    line.count = 2;
    line.feature = static_cast<int>( drawing.lines.size() );
    drawing.vertices.push_back( from );
    drawing.vertices.push_back( to );
    drawing.lines.push_back( line );
  }

  //! Segments of half a metre, each a line of its own, along winding ways.
  Drawing tinySegments( std::int64_t count )
  {
    Drawing drawing;
    constexpr std::int64_t PER_WAY = 1000;
    for ( std::int64_t i = 0; i < count; ++i )
    {
      const double way = 40.0 * static_cast<double>( i / PER_WAY );
      const double along = 0.5 * static_cast<double>( i % PER_WAY );
      add( drawing, { along, way + std::sin( along ) }, { along + 0.5, way + std::sin( along + 0.5 ) } );
    }
    return drawing;
  }

  //! A mainline of 20 m legs with a lateral at every second joint.
  Drawing combs( std::int64_t count )
  {
    Drawing drawing;
    constexpr std::int64_t PER_COMB = 300;
    for ( std::int64_t i = 0; i < count; ++i )
    {
      const double row = 250.0 * static_cast<double>( i / PER_COMB );
      const double along = 20.0 * static_cast<double>( i % PER_COMB );
      if ( i % 3 == 2 )
        add( drawing, { along, row }, { along, row + 100.0 } );
      else
        add( drawing, { along, row }, { along + 20.0, row } );
    }
    return drawing;
  }

  //! Segments that all end within a few centimetres.
  Drawing bundle( std::int64_t count )
  {
    Drawing drawing;
    for ( std::int64_t i = 0; i < count; ++i )
    {
      const double turn = 6.28 * static_cast<double>( i ) / static_cast<double>( count );
      add( drawing, { 0.02 * std::cos( turn ), 0.02 * std::sin( turn ) },
        { 30.0 * std::cos( turn ), 30.0 * std::sin( turn ) } );
    }
    return drawing;
  }

  void join( benchmark::State &state, Drawing ( *make )( std::int64_t ) )
  {
    const Drawing drawn = make( state.range( 0 ) );
    const PlanarMeasure measure;
    Monitor silent;
    for ( auto _ : state )
    {
      std::vector<Finding> findings;
      const CanonicalDrawing drawing = canonicalDrawing( drawn, measure, 0, findings, silent );
      std::vector<int> nodes;
      const Network network = joinLines( drawing, measure, {}, {}, nodes, 0, findings, silent );
      benchmark::DoNotOptimize( network.nodes.size() );
    }
    state.SetItemsProcessed( state.iterations() * state.range( 0 ) );
    state.SetComplexityN( state.range( 0 ) );
  }

} // namespace

BENCHMARK_CAPTURE( join, tiny_segments, tinySegments )
  ->RangeMultiplier( 10 )
  ->Range( 5000, 500000 )
  ->Unit( benchmark::kMillisecond )
  ->UseRealTime()
  ->Complexity( benchmark::oNLogN );
BENCHMARK_CAPTURE( join, combs, combs )
  ->RangeMultiplier( 10 )
  ->Range( 5000, 500000 )
  ->Unit( benchmark::kMillisecond )
  ->UseRealTime()
  ->Complexity( benchmark::oNLogN );
BENCHMARK_CAPTURE( join, bundle, bundle )->Range( 512, 4096 )->Unit( benchmark::kMillisecond )->UseRealTime();
