// SPDX-License-Identifier: GPL-2.0-or-later
// Names, texts, parameters and outputs of the proposal of boosters.
#include "processing/proposeboostalgorithm.h"

#include "processing/parameternames.h"
#include "processing/proposeboostrun.h"
#include "processing/qgiscompat.h"
#include "processing/text/helptext.h"
#include "processing/text/text.h"

namespace stillhead
{

  QString ProposeBoostAlgorithm::name() const
  {
    return algorithm::PROPOSE_BOOST;
  }

  QString ProposeBoostAlgorithm::displayName() const
  {
    return Text::tr( "Propose boost" );
  }

  QString ProposeBoostAlgorithm::shortDescription() const
  {
    return Text::tr( "Where drawn pipe is short of pressure: the least to add, and the place for a booster." );
  }

  QString ProposeBoostAlgorithm::shortHelpString() const
  {
    return proposeBoostHelp();
  }

  QStringList ProposeBoostAlgorithm::tags() const
  {
    return Text::tr( "irrigation,booster,pump,short,pressure,static,mainline,terrain,psi,kPa" ).split( ',' );
  }

  QgsProcessingAlgorithm *ProposeBoostAlgorithm::createInstance() const
  {
    return new ProposeBoostAlgorithm();
  }

  void ProposeBoostAlgorithm::initAlgorithm( const QVariantMap & )
  {
    addNetworkParameters();
    addParameters( boostRiseParameter() );

    addSink( output::BOOSTERS, Text::tr( "Boosters proposed" ), static_cast<int>( compat::Source::Point ), false );
    addSink(
      output::SPANS, Text::tr( "Pipe by static pressure, boosted" ), static_cast<int>( compat::Source::Line ), true );
    addSink( output::STRETCHES, Text::tr( "Stretches over or short, boosted" ),
      static_cast<int>( compat::Source::Polygon ), true );
    addSink( output::EXTREMES, Text::tr( "Worst places, boosted" ), static_cast<int>( compat::Source::Point ), true );
    addSink( output::FINDINGS, Text::tr( "Findings" ), static_cast<int>( compat::Source::Point ), true );

    addOutput( new QgsProcessingOutputString( output::SUMMARY, Text::tr( "Summary" ) ) );
    addNumberOutputs( {
      { output::BOOSTER_COUNT, Text::tr( "Number of boosters" ) },
      { output::BOOST_MOST, Text::tr( "Largest pressure that one must add while water runs" ) },
      { output::LENGTH_SHORT, Text::tr( "Length still short" ) },
      { output::LENGTH_OVER, Text::tr( "Length over" ) },
      { output::LENGTH_NEWLY_OVER, Text::tr( "Length over that was not before" ) },
    } );
  }

  QStringList ProposeBoostAlgorithm::layers() const
  {
    return proposeBoostLayers();
  }

  std::unique_ptr<NetworkRun> ProposeBoostAlgorithm::makeRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const
  {
    return std::make_unique<ProposeBoostRun>( values, terrain, feedback );
  }

} // namespace stillhead
