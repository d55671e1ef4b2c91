// SPDX-License-Identifier: GPL-2.0-or-later
// Names, texts, parameters and outputs of the proposal.
#include "processing/proposeregulatorsalgorithm.h"

#include "processing/parameternames.h"
#include "processing/proposeregulatorsrun.h"
#include "processing/qgiscompat.h"
#include "processing/text/helptext.h"
#include "processing/text/text.h"

namespace stillhead
{

  QString ProposeRegulatorsAlgorithm::name() const
  {
    return algorithm::PROPOSE_REGULATORS;
  }

  QString ProposeRegulatorsAlgorithm::displayName() const
  {
    return Text::tr( "Propose regulators" );
  }

  QString ProposeRegulatorsAlgorithm::shortDescription() const
  {
    return Text::tr( "The fewest regulators that bring drawn pipe within its highest pressure at rest, with places and "
                     "settings." );
  }

  QString ProposeRegulatorsAlgorithm::shortHelpString() const
  {
    return proposeRegulatorsHelp();
  }

  QStringList ProposeRegulatorsAlgorithm::tags() const
  {
    return Text::tr( "irrigation,regulator,pressure,reducing,valve,lock-up,zone,static,mainline,terrain,psi,kPa" )
      .split( ',' );
  }

  QgsProcessingAlgorithm *ProposeRegulatorsAlgorithm::createInstance() const
  {
    return new ProposeRegulatorsAlgorithm();
  }

  void ProposeRegulatorsAlgorithm::initAlgorithm( const QVariantMap & )
  {
    addNetworkParameters();
    addParameters( proposalParameters() );

    addSink( output::REGULATORS, Text::tr( "Regulators proposed" ), static_cast<int>( compat::Source::Point ), false );
    addSink(
      output::SPANS, Text::tr( "Pipe by static pressure, regulated" ), static_cast<int>( compat::Source::Line ), true );
    addSink( output::STRETCHES, Text::tr( "Stretches over or short, regulated" ),
      static_cast<int>( compat::Source::Polygon ), true );
    addSink( output::EXTREMES, Text::tr( "Worst places, regulated" ), static_cast<int>( compat::Source::Point ), true );
    addSink( output::FINDINGS, Text::tr( "Findings" ), static_cast<int>( compat::Source::Point ), true );

    addOutput( new QgsProcessingOutputString( output::SUMMARY, Text::tr( "Summary" ) ) );
    addNumberOutputs( {
      { output::REGULATOR_COUNT, Text::tr( "Number of regulators" ) },
      { output::REGULATOR_BOUND, Text::tr( "No plan can have fewer than" ) },
      { output::PROVEN, Text::tr( "The number is proven to be the least (1) or not (0)" ) },
      { output::LENGTH_OVER, Text::tr( "Length still over" ) },
      { output::LENGTH_SHORT, Text::tr( "Length short" ) },
      { output::LENGTH_NOT_MENDED, Text::tr( "Length that no regulator can mend" ) },
    } );
  }

  QStringList ProposeRegulatorsAlgorithm::layers() const
  {
    return proposeRegulatorsLayers();
  }

  std::unique_ptr<NetworkRun> ProposeRegulatorsAlgorithm::makeRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const
  {
    return std::make_unique<ProposeRegulatorsRun>( values, terrain, feedback );
  }

} // namespace stillhead
