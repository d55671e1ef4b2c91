// SPDX-License-Identifier: GPL-2.0-or-later
// The fewest regulators on a branching network over hills, at growing size, beside the whole core run (joining, profiles,
// levels, cuts) on the same drawing: the proposal should stay within ten times of it.
#include "core/job/proposalgraph.h"
#include "core/proposal/graphproposal.h"
#include "tests/support/memoryterrain.h"

#include <benchmark/benchmark.h>

#include <cmath>

namespace
{

  using namespace stillhead;
  using stillhead::test::MemoryTerrain;

  constexpr double WEIGHT_N_PER_M3 = 9797.85;
  constexpr int LEGS_IN_A_ROW = 50;
  constexpr double LEG_M = 12.0;
  constexpr double ROW_M = 30.0;

  void add( Drawing &drawing, Role role, const PlanPoint &from, const PlanPoint &to )
  {
    DrawnLine line;
    line.role = role;
    line.first = drawing.vertices.size();
    line.count = 2;
    line.feature = static_cast<int>( drawing.lines.size() );
    drawing.vertices.push_back( from );
    drawing.vertices.push_back( to );
    drawing.lines.push_back( line );
  }

  //! A trunk with a row of mainlines at every joint and a lateral at every joint of a row: about `spans` spans, no loop.
  Drawing tree( std::int64_t spans )
  {
    Drawing drawing;
    const std::int64_t rows = spans / ( 2 * LEGS_IN_A_ROW + 1 );
    for ( std::int64_t row = 0; row < rows; ++row )
    {
      const double y = ROW_M * static_cast<double>( row );
      add( drawing, Role::Mainline, { 0.0, y }, { 0.0, y + ROW_M } );
      for ( int i = 0; i < LEGS_IN_A_ROW; ++i )
      {
        const double x = LEG_M * i;
        add( drawing, Role::Mainline, { x, y }, { x + LEG_M, y } );
        add( drawing, Role::Lateral, { x + LEG_M, y }, { x + LEG_M, y + 0.6 * ROW_M } );
      }
    }
    return drawing;
  }

  struct Setup
  {
      explicit Setup( std::int64_t spans )
        : drawing( tree( spans ) )
        , terrain( MemoryTerrain::sampled( 640, static_cast<int>( 0.3 * static_cast<double>( spans ) ) + 80,
            test::centresAt( -10.0, ROW_M * static_cast<double>( spans ) / 101.0 + 40.0, 1.0 ),
            [](
              double x, double y ) { return 60.0 - 0.03 * x + 14.0 * std::sin( x * 0.02 ) * std::cos( y * 0.013 ); } ) )
        , cache( terrain )
      {
        job.drawing = &drawing;
        job.measure = &planar;
        job.planToTerrain = &samePlan;
        job.terrain = &cache;
        job.sources.resize( 1 );
        job.sources.front().kind = SourceKind::WaterLevel;
        job.sources.front().high = 108.0;
        job.sources.front().low = 104.0;
        job.limits.leastPa = job.limits.lateralLeastPa = 2e5;
        job.limits.mostPa = job.limits.lateralMostPa = 4.5e5;
        job.specificWeightNPerM3 = WEIGHT_N_PER_M3;
        rules.limits = job.limits;
        rules.specificWeightNPerM3 = WEIGHT_N_PER_M3;
        rules.risePa = 5e4;
      }

      Drawing drawing;
      PlanarMeasure planar;
      SamePlan samePlan;
      MemoryTerrain terrain;
      TileCache cache;
      StaticJob job;
      ProposalRules rules;
      Monitor silent;
  };

  void coreRun( benchmark::State &state )
  {
    Setup setup( state.range( 0 ) );
    for ( auto _ : state )
      benchmark::DoNotOptimize( solveStatics( setup.job, setup.silent ).pieces.size() );
    state.SetComplexityN( state.range( 0 ) );
  }

  void proposal( benchmark::State &state, bool withRules )
  {
    Setup setup( state.range( 0 ) );
    if ( withRules )
    {
      setup.rules.leastDropPa = 7e4;
      setup.rules.mostRatio = 3.0;
    }
    const StaticResult result = solveStatics( setup.job, setup.silent );
    std::size_t regulators = 0;
    for ( auto _ : state )
    {
      const PipeGraph graph = proposalGraph( setup.job, result, setup.silent );
      regulators = proposeOnGraph( graph, setup.rules ).regulators.size();
    }
    state.counters["regulators"] = static_cast<double>( regulators );
    state.counters["spans"] = static_cast<double>( result.network.spans.size() );
    state.SetComplexityN( state.range( 0 ) );
  }

} // namespace

BENCHMARK( coreRun )
  ->Arg( 2500 )
  ->Arg( 10000 )
  ->Arg( 40000 )
  ->Unit( benchmark::kMillisecond )
  ->UseRealTime()
  ->Complexity( benchmark::oNLogN );
BENCHMARK_CAPTURE( proposal, fewest_only, false )
  ->Arg( 2500 )
  ->Arg( 10000 )
  ->Arg( 40000 )
  ->Unit( benchmark::kMillisecond )
  ->UseRealTime()
  ->Complexity( benchmark::oNLogN );
BENCHMARK_CAPTURE( proposal, drop_and_ratio, true )
  ->Arg( 2500 )
  ->Arg( 10000 )
  ->Arg( 40000 )
  ->Unit( benchmark::kMillisecond )
  ->UseRealTime()
  ->Complexity( benchmark::oNLogN );
