// SPDX-License-Identifier: GPL-2.0-or-later
// Layers are read through snapshots, so the user may edit them, or take them out of the project, meanwhile.
#include "plugin/preview/previewwork.h"

#include "plugin/preview/layersnapshot.h"
#include "processing/parameternames.h"
#include "processing/reading/unitsreader.h"
#include "processing/staticpressurealgorithm.h"
#include "processing/staticpressurerun.h"
#include "processing/text/summarytext.h"

#include <qgsexception.h>
#include <qgsexpressioncontextutils.h>
#include <qgsrasterdataprovider.h>
#include <qgsvectordataprovider.h>

namespace stillhead
{

  namespace
  {

    //! All that decides how a raster is read.
    QString terrainKey( const QgsRasterLayer &layer, const QVariantMap &parameters )
    {
      QStringList parts { layer.id(), layer.source(), layer.crs().toWkt(),
        parameters.value( parameter::TERRAIN_BAND ).toString(),
        parameters.value( parameter::TERRAIN_UNIT ).toString() };
      const QgsRasterDataProvider *provider = layer.dataProvider();
      for ( int band = 1; provider && band <= provider->bandCount(); ++band )
      {
        parts << QString::number( provider->useSourceNoDataValue( band ) );
        for ( const QgsRasterRange &range : provider->userNoDataValues( band ) )
          parts << QStringLiteral( "%1 %2" ).arg( range.min(), 0, 'g', 17 ).arg( range.max(), 0, 'g', 17 );
      }
      return parts.join( '\n' );
    }

    QList<int> keysOf( const QgsVectorLayer &layer )
    {
      return layer.dataProvider() ? layer.dataProvider()->pkAttributeIndexes() : QList<int>();
    }

  } // namespace

  std::shared_ptr<Terrain> TerrainKeeper::terrainFor(
    const QgsRasterLayer &layer, const ParameterValues &values, QgsProcessingFeedback &feedback )
  {
    const QString key = terrainKey( layer, values.values() );
    if ( !mTerrain || key != mKey )
    {
      mTerrain = readTerrain( values, feedback );
      mKey = key;
    }
    return mTerrain;
  }

  PreviewWork::PreviewWork(
    const PreviewInput &input, const QgsCoordinateTransformContext &transforms, TerrainKeeper &terrains )
    : mAlgorithm( StaticPressureAlgorithm().create() )
    , mParameters( input.parameters )
    , mSketched( input.sketch.has_value() )
  {
    mContext.setTransformContext( transforms );
    // The layer itself, for one that is not in the project is as good.
    mParameters.insert( parameter::TERRAIN, QVariant::fromValue( input.terrain.data() ) );
    // Summits and sags are found only for those who ask for worst places.
    mParameters.insert( output::EXTREMES, QgsProcessing::TEMPORARY_OUTPUT );
    mValues = std::make_unique<ParameterValues>( mAlgorithm->parameterDefinitions(), mParameters, mContext );
    mValues->checkAll();
    mTerrain = terrains.terrainFor( *input.terrain, *mValues, mFeedback );
    mParameters.remove( parameter::TERRAIN );

    addLayer(
      parameter::MAINS, Role::Mainline, std::make_unique<LayerSnapshot>( *input.mains ), keysOf( *input.mains ) );
    if ( input.laterals )
      addLayer( parameter::LATERALS, Role::Lateral, std::make_unique<LayerSnapshot>( *input.laterals ),
        keysOf( *input.laterals ) );
    if ( input.sketch )
      addLayer( input.sketch->role == Role::Mainline ? parameter::MAINS : parameter::LATERALS, input.sketch->role,
        sketchSource( *input.sketch ), {} );
  }

  PreviewWork::~PreviewWork() = default;

  void PreviewWork::addLayer(
    const QString &name, Role role, std::unique_ptr<QgsFeatureSource> source, const QList<int> &keys )
  {
    DrawnLayer layer;
    layer.parameterName = name;
    layer.role = role;
    layer.source = std::make_unique<QgsProcessingFeatureSource>( source.release(), mContext, true );
    layer.keys = keys;
    layer.expressions.appendScope( QgsExpressionContextUtils::globalScope() );
    mLayers.push_back( std::move( layer ) );
  }

  PreviewResultPointer PreviewWork::run()
  {
    try
    {
      StaticPressureRun run( *mValues, *mTerrain, mFeedback );
      run.read( mLayers );
      run.solve();
      auto result = std::make_shared<PreviewResult>( PreviewResult { run.takeSolved(), mTerrain } );
      result->summary = summaryText( result->plan.context(), result->plan.source.source );
      result->warnings = mFeedback.warnings;
      result->coverM = result->plan.units.metres( mValues->number( parameter::COVER ) );
      result->useLineZ = mValues->boolean( parameter::USE_LINE_Z );
      result->sketched = mSketched;
      return result;
    }
    catch ( const QgsException & )
    {
      throw;
    }
    catch ( const Cancelled & )
    {
      throw QgsProcessingException( QString() );
    }
    catch ( const std::exception &e )
    {
      throw QgsProcessingException( QString::fromUtf8( e.what() ) );
    }
  }

} // namespace stillhead
