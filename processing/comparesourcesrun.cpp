// SPDX-License-Identifier: GPL-2.0-or-later
// After the comparison the run goes on as if the best option had been the only source.
#include "processing/comparesourcesrun.h"

#include "processing/parameternames.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/summarytext.h"
#include "processing/text/text.h"

namespace stillhead
{

  QStringList compareSourcesLayers()
  {
    return { output::COMPARISON, output::SPANS, output::STRETCHES, output::EXTREMES, output::FINDINGS };
  }

  CompareSourcesRun::CompareSourcesRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback )
    : NetworkRun( values, terrain, feedback, compareSourcesLayers() )
  {
  }

  void CompareSourcesRun::compute( const StaticJob &job, Monitor &monitor )
  {
    ComparisonJob own;
    own.statics = job;
    own.statics.leastDropPa = regulatorMarginPa( parameter::LEAST_DROP );
    own.risePa = regulatorMarginPa( parameter::LOCKUP_RISE );
    own.mostRatio = mValues.number( parameter::MOST_RATIO );
    own.settingStepPa = readPressure( mValues, parameter::SETTING_STEP, mUnits ).value_or( 0.0 );
    own.boostRisePa = regulatorMarginPa( parameter::BOOST_RISE );
    Comparison comparison = compareOptions( own, static_cast<SortBy>( mValues.choice( parameter::SORT_BY ) ), monitor );

    for ( const std::size_t option : comparison.order )
    {
      const OptionFigures &figures = comparison.options[option];
      const SourceInput &input = mSources[option];
      OptionRow row;
      row.number = static_cast<int>( option );
      row.name = input.name.isEmpty() ? Text::tr( "Option %1" ).arg( option + 1 ) : input.name;
      row.source = input.source;
      row.figures = figures;
      if ( figures.refusal )
        row.note = refusalText( *figures.refusal, refusalNames( QStringList( input.name ) ), input.reachM, mUnits );
      else
        row.note = input.note;
      mRows.push_back( row );
    }
    mBest = mRows.front().number;
    const SourceInput best = mSources[static_cast<std::size_t>( mBest )];
    mSources.assign( 1, best );
    mNames.sources = QStringList( mSources.front().name );
    mResult = std::move( comparison.best );
  }

  std::vector<ResultTable> CompareSourcesRun::tables(
    const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const
  {
    return { comparisonTable( context, mRows ), spanTable( context ), stretchTable( context, outlines ),
      extremeTable( context ), findingTable( context ) };
  }

  QString CompareSourcesRun::sourcesParameter() const
  {
    return parameter::OPTIONS;
  }

  QString CompareSourcesRun::title() const
  {
    return Text::tr( "comparison of sources" );
  }

  QString CompareSourcesRun::summary( const ResultContext &context ) const
  {
    QStringList lines;
    for ( std::size_t i = 0; i < mRows.size(); ++i )
    {
      const OptionRow &row = mRows[i];
      const QString number = Text::tr( "%1. %2" ).arg( i + 1 ).arg( row.name );
      if ( row.figures.refusal )
      {
        lines << Text::tr( "%1: no figures. %2" ).arg( number, row.note );
        continue;
      }
      const Totals &totals = row.figures.totals;
      lines << Text::tr( "%1: %2 within limits, %3 over, %4 short; regulators %5, boost %6." )
                 .arg( number, mUnits.lengthText( totals.withinM ), mUnits.lengthText( totals.overM ),
                   mUnits.lengthText( totals.shortM ) )
                 .arg( row.figures.regulators )
                 .arg( mUnits.pressureText( row.figures.boostPa ) );
    }
    return lines.join( '\n' ) + QStringLiteral( "\n\n" )
      + Text::tr( "The best, as it is: %1" ).arg( summaryText( context, mSources.front().source ) );
  }

  void CompareSourcesRun::addNumbers( QVariantMap &results ) const
  {
    results.insert( output::OPTION_COUNT, static_cast<qlonglong>( mRows.size() ) );
    results.insert( output::BEST, mBest + 1 );
  }

} // namespace stillhead
