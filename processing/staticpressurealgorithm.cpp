// SPDX-License-Identifier: GPL-2.0-or-later
// Layers are asked in the main thread for what only they know (keys, the terrain's provider); the work itself touches
// neither project nor session.
#include "processing/staticpressurealgorithm.h"

#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/staticpressurerun.h"
#include "processing/text/helptext.h"
#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsrasterlayer.h>
#include <qgsvectordataprovider.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    QList<int> keysOf( const QgsVectorLayer *layer )
    {
      return layer && layer->dataProvider() ? layer->dataProvider()->pkAttributeIndexes() : QList<int>();
    }

  } // namespace

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
      "Pressure of water at rest on every metre of drawn irrigation pipe, from terrain and one source." );
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

  void StaticPressureAlgorithm::addSink(
    const QString &name, const QString &description, int sourceType, bool optional )
  {
    addParameter( new QgsProcessingParameterFeatureSink(
      name, description, static_cast<compat::SourceType>( sourceType ), QVariant(), optional ) );
  }

  void StaticPressureAlgorithm::initAlgorithm( const QVariantMap & )
  {
    addParameters( drawingParameters() );
    addParameters( terrainParameters() );
    addParameters( sourceParameters( true ) );
    addParameters( pipeParameters() );
    addParameters( limitParameters() );
    addParameters( sagParameter() );
    addParameters( unitParameters() );
    addParameters( judgementParameters() );

    addSink( output::SPANS, Text::tr( "Pipe by static pressure" ), static_cast<int>( compat::Source::Line ), false );
    addSink( output::NODES, Text::tr( "Nodes" ), static_cast<int>( compat::Source::Point ), true );
    addSink(
      output::STRETCHES, Text::tr( "Stretches over or short" ), static_cast<int>( compat::Source::Polygon ), true );
    addSink( output::EXTREMES, Text::tr( "Worst places" ), static_cast<int>( compat::Source::Point ), true );
    addSink( output::FINDINGS, Text::tr( "Findings" ), static_cast<int>( compat::Source::Point ), true );
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

  bool StaticPressureAlgorithm::prepareAlgorithm(
    const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    QgsProcessingFeedback silent;
    guarded( [&] {
      const ParameterValues values = valuesOf( parameters, context );
      values.checkAll();
      const QgsVectorLayer *mains = parameterAsVectorLayer( parameters, parameter::MAINS, context );
      const QgsVectorLayer *laterals = parameterAsVectorLayer( parameters, parameter::LATERALS, context );
      mMainKeys = keysOf( mains );
      mLateralKeys = keysOf( laterals );
      mTerrain = readTerrain( values, feedbackOr( feedback, silent ) );
      const QgsRasterLayer *terrain = parameterAsRasterLayer( parameters, parameter::TERRAIN, context );
      OutputSet( values, staticPressureLayers() )
        .check( { { parameter::MAINS, mains }, { parameter::LATERALS, laterals }, { parameter::TERRAIN, terrain } } );
      return QVariantMap();
    } );
    return true;
  }

  DrawnLayer StaticPressureAlgorithm::drawnLayer(
    const QString &name, const QList<int> &keys, const QVariantMap &parameters, QgsProcessingContext &context ) const
  {
    DrawnLayer layer;
    layer.parameterName = name;
    layer.role = name == parameter::MAINS ? Role::Mainline : Role::Lateral;
    layer.source.reset( parameterAsSource( parameters, name, context ) );
    layer.keys = keys;
    if ( !layer.source )
    {
      const QString given = parameters.value( name ).toString();
      throw QgsProcessingException( given.isEmpty()
          ? Text::tr( "%1 is not given; choose a layer of lines." ).arg( name )
          : Text::tr( "%1 (“%2”) cannot be opened as a layer of lines; check the file and its path." )
              .arg( name, given ) );
    }
    layer.expressions = createExpressionContext( parameters, context, layer.source.get() );
    return layer;
  }

  QVariantMap StaticPressureAlgorithm::processAlgorithm(
    const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    QgsProcessingFeedback silent;
    return guarded( [&] {
      const ParameterValues values = valuesOf( parameters, context );
      StaticPressureRun run( values, *mTerrain, feedbackOr( feedback, silent ) );
      std::vector<DrawnLayer> layers;
      layers.push_back( drawnLayer( parameter::MAINS, mMainKeys, parameters, context ) );
      if ( values.isSet( parameter::LATERALS ) )
        layers.push_back( drawnLayer( parameter::LATERALS, mLateralKeys, parameters, context ) );
      run.read( layers );
      run.solve();
      const QVariantMap results = run.write();
      mWritten = run.written();
      mStyle = run.style();
      return results;
    } );
  }

  QVariantMap StaticPressureAlgorithm::postProcessAlgorithm(
    QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    QgsProcessingFeedback silent;
    finishNow( mWritten, mStyle, context, feedbackOr( feedback, silent ) );
    mWritten.clear();
    mTerrain.reset();
    return QVariantMap();
  }

} // namespace stillhead
