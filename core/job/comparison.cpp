// SPDX-License-Identifier: GPL-2.0-or-later
// Every option goes through the same jobs as it would alone; only the best one's result is kept.
#include "core/job/comparison.h"

#include "core/feedback/stagemonitor.h"
#include "core/job/boostjob.h"
#include "core/job/proposaljob.h"

#include <algorithm>
#include <numeric>
#include <tuple>

namespace stillhead
{

  namespace
  {
    StaticJob withOnly( const StaticJob &job, std::size_t option )
    {
      StaticJob own = job;
      own.sources = { job.sources[option] };
      return own;
    }

    OptionFigures figuresOf( const ComparisonJob &job, std::size_t option, Monitor &monitor )
    {
      OptionFigures figures;
      try
      {
        StageMonitor first( monitor, 0.0, 0.5 );
        ProposalJob proposal;
        proposal.statics = withOnly( job.statics, option );
        proposal.risePa = job.risePa;
        proposal.mostRatio = job.mostRatio;
        proposal.settingStepPa = job.settingStepPa;
        const ProposalResult regulated = solveProposal( proposal, first );
        figures.levels = regulated.before.sources.front().levels;
        figures.distanceM = regulated.before.sources.front().distanceM;
        figures.totals = regulated.before.totals;
        figures.regulators = static_cast<int>( regulated.proposal.regulators.size() );
        figures.proven = regulated.proposal.proven && regulated.verified;
        figures.notMendedM = regulated.notMendedM;
        if ( figures.totals.shortM > 0.0 )
        {
          StageMonitor second( monitor, 0.5, 1.0 );
          const BoostResult boosted = solveBoost( { proposal.statics, job.boostRisePa }, second );
          figures.boosters = static_cast<int>( boosted.boosters.size() );
          for ( const ProposedBooster &booster : boosted.boosters )
            figures.boostPa = std::max( figures.boostPa, booster.boostLowPa );
        }
      }
      catch ( const Refusal &refusal )
      {
        figures = {};
        figures.refusal = refusal;
      }
      return figures;
    }

    //! The smaller the better.
    double measureOf( const OptionFigures &figures, SortBy sortBy )
    {
      switch ( sortBy )
      {
      case SortBy::LongestWithin:
        return -figures.totals.withinM;
      case SortBy::LeastOver:
        return figures.totals.overM;
      case SortBy::LeastShort:
        return figures.totals.shortM;
      case SortBy::FewestRegulators:
        return figures.regulators;
      case SortBy::LeastBoost:
        return figures.boostPa;
      }
      return 0.0;
    }
  } // namespace

  std::vector<std::size_t> orderOf( const std::vector<OptionFigures> &options, SortBy sortBy )
  {
    std::vector<std::size_t> order( options.size() );
    std::iota( order.begin(), order.end(), std::size_t { 0 } );
    const auto key = [&]( std::size_t i ) {
      const OptionFigures &own = options[i];
      return std::make_tuple( own.refusal.has_value(), measureOf( own, sortBy ), -own.totals.withinM );
    };
    std::stable_sort( order.begin(), order.end(), [&]( std::size_t a, std::size_t b ) { return key( a ) < key( b ); } );
    return order;
  }

  Comparison compareOptions( const ComparisonJob &job, SortBy sortBy, Monitor &monitor )
  {
    Comparison comparison;
    const double steps = static_cast<double>( job.statics.sources.size() ) + 1.0;
    for ( std::size_t i = 0; i < job.statics.sources.size(); ++i )
    {
      StageMonitor stage( monitor, static_cast<double>( i ) / steps, static_cast<double>( i + 1 ) / steps );
      comparison.options.push_back( figuresOf( job, i, stage ) );
    }
    comparison.order = orderOf( comparison.options, sortBy );
    const std::size_t best = comparison.order.front();
    if ( comparison.options[best].refusal )
      throw *comparison.options.front().refusal;
    StageMonitor last( monitor, 1.0 - 1.0 / steps, 1.0 );
    comparison.best = solveStatics( withOnly( job.statics, best ), last );
    return comparison;
  }

} // namespace stillhead
