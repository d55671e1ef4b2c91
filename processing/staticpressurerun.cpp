// SPDX-License-Identifier: GPL-2.0-or-later
// The main job adds to what all runs share: failing regulators, the schedule, and its own numbers.
#include "processing/staticpressurerun.h"

#include "processing/parameternames.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/summarytext.h"
#include "processing/text/text.h"

namespace stillhead
{

  QStringList staticPressureLayers()
  {
    return { output::SPANS, output::NODES, output::STRETCHES, output::EXTREMES, output::FINDINGS, output::SCHEDULE,
      output::SURFACE };
  }

  StaticPressureRun::StaticPressureRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback )
    : NetworkRun( values, terrain, feedback, staticPressureLayers() )
  {
  }

  void StaticPressureRun::compute( const StaticJob &job, Monitor &monitor )
  {
    StaticJob own = job;
    own.failedOpen = static_cast<FailedOpen>( mValues.choice( parameter::FAILED_OPEN ) );
    own.schedule = isAsked( output::SCHEDULE );
    const double sagDepthM = readSagDepthM( mValues, mUnits );
    if ( isAsked( output::EXTREMES ) )
      own.sagDepthM = sagDepthM;
    mResult = solveStatics( own, monitor );
    if ( own.schedule )
      mSchedule = scheduleRows( own, mResult );
  }

  std::vector<ResultTable> StaticPressureRun::tables(
    const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const
  {
    return { spanTable( context ), nodeTable( context ), stretchTable( context, outlines ), extremeTable( context ),
      findingTable( context ), regulatorTable( context, output::SCHEDULE, mSchedule ) };
  }

  QString StaticPressureRun::title() const
  {
    return Text::tr( "static pressure along pipes" );
  }

  QString StaticPressureRun::summary( const ResultContext &context ) const
  {
    return summaryText( context, mSources.front().source );
  }

  void StaticPressureRun::addNumbers( QVariantMap &results ) const
  {
    const Totals &totals = mResult.totals;
    results.insert( output::SPAN_COUNT, static_cast<qlonglong>( mResult.pieces.size() ) );
    results.insert( output::NODE_COUNT, static_cast<qlonglong>( nodeRows( mResult ).size() ) );
    results.insert( output::STRETCH_COUNT, static_cast<qlonglong>( mResult.stretches.size() ) );
    results.insert( output::FINDING_COUNT, static_cast<qlonglong>( mResult.findings.size() ) );
    results.insert( output::STATIC_LEVEL_HIGH, mUnits.lengthValue( mResult.sources.front().levels.highM ) );
    results.insert( output::STATIC_LEVEL_LOW, mUnits.lengthValue( mResult.sources.front().levels.lowM ) );
    results.insert( output::P_LOWEST, mUnits.pressureValue( totals.lowestPa ) );
    results.insert( output::P_HIGHEST, mUnits.pressureValue( totals.highestPa ) );
    results.insert( output::LENGTH_TOTAL, mUnits.lengthValue( totals.lengthM ) );
    results.insert( output::LENGTH_WITHIN, mUnits.lengthValue( totals.withinM ) );
    results.insert( output::LENGTH_OVER, mUnits.lengthValue( totals.overM ) );
    results.insert( output::LENGTH_SHORT, mUnits.lengthValue( totals.shortM ) );
    results.insert( output::LENGTH_NO_SOURCE, mUnits.lengthValue( totals.noSourceM ) );
    results.insert( output::LENGTH_NO_TERRAIN, mUnits.lengthValue( totals.noTerrainM ) );
    results.insert( output::LENGTH_CLOSE_CALL, mUnits.lengthValue( totals.closeCallM ) );
  }

} // namespace stillhead
