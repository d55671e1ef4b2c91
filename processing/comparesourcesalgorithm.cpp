// SPDX-License-Identifier: GPL-2.0-or-later
// Names, texts, parameters and outputs of the comparison.
#include "processing/comparesourcesalgorithm.h"

#include "processing/comparesourcesrun.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/text/helptext.h"
#include "processing/text/text.h"

namespace stillhead
{

  QString CompareSourcesAlgorithm::name() const
  {
    return algorithm::COMPARE_SOURCES;
  }

  QString CompareSourcesAlgorithm::displayName() const
  {
    return Text::tr( "Compare sources" );
  }

  QString CompareSourcesAlgorithm::shortDescription() const
  {
    return Text::tr( "Options for the connection side by side: lengths within limits, over and short, regulators and "
                     "boost needed." );
  }

  QString CompareSourcesAlgorithm::shortHelpString() const
  {
    return compareSourcesHelp();
  }

  QStringList CompareSourcesAlgorithm::tags() const
  {
    return Text::tr( "irrigation,source,connection,option,compare,master plan,static,pressure,terrain" ).split( ',' );
  }

  QgsProcessingAlgorithm *CompareSourcesAlgorithm::createInstance() const
  {
    return new CompareSourcesAlgorithm();
  }

  void CompareSourcesAlgorithm::initAlgorithm( const QVariantMap & )
  {
    addParameters( drawingParameters() );
    addParameters( terrainParameters() );
    addParameters( optionParameters() );
    addParameters( pipeParameters() );
    addParameters( limitParameters() );
    addParameters( unitParameters() );
    addParameters( judgementParameters() );
    addParameters( lockupParameter() );
    addParameters( proposalParameters() );
    addParameters( boostRiseParameter() );

    addSink( output::COMPARISON, Text::tr( "Options side by side" ), static_cast<int>( compat::Source::Point ), false );
    addSink( output::SPANS, Text::tr( "Pipe by static pressure, best option" ),
      static_cast<int>( compat::Source::Line ), true );
    addSink( output::STRETCHES, Text::tr( "Stretches over or short, best option" ),
      static_cast<int>( compat::Source::Polygon ), true );
    addSink(
      output::EXTREMES, Text::tr( "Worst places, best option" ), static_cast<int>( compat::Source::Point ), true );
    addSink( output::FINDINGS, Text::tr( "Findings, best option" ), static_cast<int>( compat::Source::Point ), true );

    addOutput( new QgsProcessingOutputString( output::SUMMARY, Text::tr( "Summary" ) ) );
    addNumberOutputs( {
      { output::OPTION_COUNT, Text::tr( "Number of options" ) },
      { output::BEST, Text::tr( "Number of the best option, in the order of the layer" ) },
    } );
  }

  QString CompareSourcesAlgorithm::sourcesParameter() const
  {
    return parameter::OPTIONS;
  }

  QStringList CompareSourcesAlgorithm::layers() const
  {
    return compareSourcesLayers();
  }

  std::unique_ptr<NetworkRun> CompareSourcesAlgorithm::makeRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const
  {
    return std::make_unique<CompareSourcesRun>( values, terrain, feedback );
  }

} // namespace stillhead
