// SPDX-License-Identifier: GPL-2.0-or-later
// Layers are asked in the main thread for what only they know (keys, the terrain's provider); the work itself touches
// neither project nor session.
#include "processing/networkalgorithm.h"

#include "processing/networkrun.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
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

  void NetworkAlgorithm::addSink( const QString &name, const QString &description, int sourceType, bool optional )
  {
    addParameter( new QgsProcessingParameterFeatureSink(
      name, description, static_cast<compat::SourceType>( sourceType ), QVariant(), optional ) );
  }

  void NetworkAlgorithm::addNetworkParameters()
  {
    addParameters( drawingParameters() );
    addParameters( terrainParameters() );
    addParameters( sourceParameters( true ) );
    addParameters( feedLayerParameters() );
    addParameters( pipeParameters() );
    addParameters( limitParameters() );
    addParameters( unitParameters() );
    addParameters( judgementParameters() );
    addParameters( lockupParameter() );
  }

  QString NetworkAlgorithm::sourcesParameter() const
  {
    return parameter::SOURCES;
  }

  bool NetworkAlgorithm::prepareAlgorithm(
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
      OutputSet( values, layers() )
        .check( { { parameter::MAINS, mains }, { parameter::LATERALS, laterals }, { parameter::TERRAIN, terrain },
          { sourcesParameter(), parameterAsVectorLayer( parameters, sourcesParameter(), context ) },
          { parameter::DEVICES, parameterAsVectorLayer( parameters, parameter::DEVICES, context ) } } );
      return QVariantMap();
    } );
    return true;
  }

  DrawnLayer NetworkAlgorithm::drawnLayer(
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

  std::unique_ptr<QgsProcessingFeatureSource> NetworkAlgorithm::pointSource( const ParameterValues &values,
    const QString &name, const QVariantMap &parameters, QgsProcessingContext &context ) const
  {
    if ( !values.isSet( name ) )
      return nullptr;
    std::unique_ptr<QgsProcessingFeatureSource> source( parameterAsSource( parameters, name, context ) );
    if ( !source )
      throw QgsProcessingException(
        Text::tr( "%1 (“%2”) cannot be opened as a layer of points; check the file and its path." )
          .arg( name, parameters.value( name ).toString() ) );
    return source;
  }

  QVariantMap NetworkAlgorithm::processAlgorithm(
    const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    QgsProcessingFeedback silent;
    return guarded( [&] {
      const ParameterValues values = valuesOf( parameters, context );
      const std::unique_ptr<NetworkRun> run = makeRun( values, *mTerrain, feedbackOr( feedback, silent ) );
      std::vector<DrawnLayer> layers;
      layers.push_back( drawnLayer( parameter::MAINS, mMainKeys, parameters, context ) );
      if ( values.isSet( parameter::LATERALS ) )
        layers.push_back( drawnLayer( parameter::LATERALS, mLateralKeys, parameters, context ) );
      const auto sources = pointSource( values, sourcesParameter(), parameters, context );
      const auto devices = pointSource( values, parameter::DEVICES, parameters, context );
      run->read( layers, sources.get(), devices.get() );
      run->solve();
      const QVariantMap results = run->write();
      mWritten = run->written();
      mStyle = run->style();
      return results;
    } );
  }

  QVariantMap NetworkAlgorithm::postProcessAlgorithm( QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    QgsProcessingFeedback silent;
    finishNow( mWritten, mStyle, context, feedbackOr( feedback, silent ) );
    mWritten.clear();
    mTerrain.reset();
    return QVariantMap();
  }

} // namespace stillhead
