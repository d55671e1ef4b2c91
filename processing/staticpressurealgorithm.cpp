// SPDX-License-Identifier: GPL-2.0-or-later
// Names, texts, parameters and outputs of the main job.
#include "processing/staticpressurealgorithm.h"

#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/staticpressurerun.h"
#include "processing/text/helptext.h"
#include "processing/text/text.h"

namespace stillhead
{

  QString StaticPressureAlgorithm::name() const
  {
    return algorithm::STATIC_PRESSURE;
  }

  QString StaticPressureAlgorithm::displayName() const
  {
    return Text::tr( "Static pressure along pipes" );
  }

  QString StaticPressureAlgorithm::shortDescription() const
  {
    return Text::tr(
      "Pressure of water at rest on every metre of drawn irrigation pipe, from terrain and its sources." );
  }

  QString StaticPressureAlgorithm::shortHelpString() const
  {
    return staticPressureHelp();
  }

  QStringList StaticPressureAlgorithm::tags() const
  {
    return Text::tr( "irrigation,static,pressure,pipe,mainline,lateral,terrain,elevation,water,psi,kPa,head,slope" )
      .split( ',' );
  }

  QgsProcessingAlgorithm *StaticPressureAlgorithm::createInstance() const
  {
    return new StaticPressureAlgorithm();
  }

  void StaticPressureAlgorithm::initAlgorithm( const QVariantMap & )
  {
    addNetworkParameters();
    addParameters( sagParameter() );
    addParameters( failedOpenParameter() );

    addSink( output::SPANS, Text::tr( "Pipe by static pressure" ), static_cast<int>( compat::Source::Line ), false );
    addSink( output::NODES, Text::tr( "Nodes" ), static_cast<int>( compat::Source::Point ), true );
    addSink(
      output::STRETCHES, Text::tr( "Stretches over or short" ), static_cast<int>( compat::Source::Polygon ), true );
    addSink( output::EXTREMES, Text::tr( "Worst places" ), static_cast<int>( compat::Source::Point ), true );
    addSink( output::FINDINGS, Text::tr( "Findings" ), static_cast<int>( compat::Source::Point ), true );
    addSink( output::SCHEDULE, Text::tr( "Schedule of devices" ), static_cast<int>( compat::Source::Point ), true );
    addParameter( new QgsProcessingParameterRasterDestination(
      output::SURFACE, Text::tr( "Static pressure surface" ), QVariant(), true, false ) );

    addOutput( new QgsProcessingOutputString( output::SUMMARY, Text::tr( "Summary" ) ) );
    addNumberOutputs( {
      { output::SPAN_COUNT, Text::tr( "Number of spans" ) },
      { output::NODE_COUNT, Text::tr( "Number of nodes" ) },
      { output::STRETCH_COUNT, Text::tr( "Number of stretches" ) },
      { output::FINDING_COUNT, Text::tr( "Number of findings" ) },
      { output::STATIC_LEVEL_HIGH, Text::tr( "Elevation of the static level, high case" ) },
      { output::STATIC_LEVEL_LOW, Text::tr( "Elevation of the static level, low case" ) },
      { output::P_LOWEST, Text::tr( "Lowest pressure, low case" ) },
      { output::P_HIGHEST, Text::tr( "Highest pressure, high case" ) },
      { output::LENGTH_TOTAL, Text::tr( "Length of all pipe" ) },
      { output::LENGTH_WITHIN, Text::tr( "Length within limits" ) },
      { output::LENGTH_OVER, Text::tr( "Length over" ) },
      { output::LENGTH_SHORT, Text::tr( "Length short" ) },
      { output::LENGTH_NO_SOURCE, Text::tr( "Length joined to no source" ) },
      { output::LENGTH_NO_TERRAIN, Text::tr( "Length without terrain" ) },
      { output::LENGTH_CLOSE_CALL, Text::tr( "Length too close to call" ) },
    } );
  }

  QStringList StaticPressureAlgorithm::layers() const
  {
    return staticPressureLayers();
  }

  std::unique_ptr<NetworkRun> StaticPressureAlgorithm::makeRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const
  {
    return std::make_unique<StaticPressureRun>( values, terrain, feedback );
  }

} // namespace stillhead
