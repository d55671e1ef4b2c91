// SPDX-License-Identifier: GPL-2.0-or-later
// The static level comes from the same functions as that of the main job.
#include "processing/pressuresurfacerun.h"

#include "core/terrain/terrainreader.h"
#include "processing/bandareaoutput.h"
#include "processing/feedbackmonitor.h"
#include "processing/parameternames.h"
#include "processing/reading/areareader.h"
#include "processing/reading/limitsreader.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/refusaltext.h"
#include "processing/text/text.h"

#include <qgsexception.h>

#include <cmath>

namespace stillhead
{

  namespace
  {

    // How the progress bar is shared out.
    constexpr double AREAS_TO = 45.0;
    constexpr double SURFACE_TO = 92.0;
    constexpr double WRITE_TO = 99.0;

  } // namespace

  QStringList pressureSurfaceLayers()
  {
    return { output::SURFACE, output::BAND_AREAS };
  }

  PressureSurfaceRun::PressureSurfaceRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback )
    : mValues( values )
    , mTerrain( terrain )
    , mFeedback( feedback )
    , mUnits( readUnits( values ) )
    , mLimits( readLimits( values, mUnits ) )
    , mStyle( resultStyle( mLimits, mUnits ) )
    , mSource( readSource( values, mUnits, terrain.crs, feedback ) )
  {
    mInput.coverM = mUnits.metres( values.number( parameter::COVER ) );
    mInput.hasLow = mSource.source.low.has_value();
  }

  void PressureSurfaceRun::readArea( const QgsProcessingFeatureSource *area )
  {
    if ( area )
      mInput.area = stillhead::readArea( *area, mTerrain, mValues );
  }

  void PressureSurfaceRun::solve()
  {
    const Source &source = mSource.source;
    TerrainReader reader( *mTerrain.cache );
    const TerrainPoint pixel = mTerrain.source->grid().toPixel( { source.place.x, source.place.y } );
    const double groundM = source.groundElevationM.value_or( reader.elevationAtM( pixel ) );
    if ( source.kind != SourceKind::WaterLevel && std::isnan( groundM ) )
      throw QgsProcessingException(
        refusalText( { Refusal::Reason::SourceNoTerrain, 0.0, {}, {}, {} }, {}, mSource.reachM, mUnits ) );
    mInput.levels = staticLevels( source, groundM, mUnits.specificWeightNPerM3() );
    if ( !std::isnan( groundM ) )
      mFeedback.pushInfo( Text::tr( "Ground at the source: %1." ).arg( mUnits.lengthText( groundM, 1 ) ) );
    mFeedback.pushInfo( Text::tr( "Static level: elevation %1 in the high case, %2 in the low case (%3)." )
                          .arg( mUnits.lengthText( mInput.levels.highM, 1 ), mUnits.lengthText( mInput.levels.lowM, 1 ),
                            mUnits.constantText() ) );
  }

  RunFacts PressureSurfaceRun::facts() const
  {
    RunFacts facts;
    facts.algorithm = Text::tr( "static pressure surface" );
    facts.source = sourceText( mSource.source, mUnits );
    facts.sourceNote = mSource.note;
    facts.terrain = mTerrain.description();
    facts.constant = mUnits.constantText();
    facts.parameters = parameterLines( mValues.values(), pressureSurfaceLayers() );
    return facts;
  }

  void PressureSurfaceRun::writeSurface( OutputSet &outputs, double fromPercent, QVariantMap &results )
  {
    FeedbackMonitor monitor( &mFeedback, fromPercent, SURFACE_TO );
    const QgsProcessingParameterDefinition *definition = mValues.definition( output::SURFACE );
    WrittenLayer surface;
    surface.id = QgsProcessingParameters::parameterAsOutputLayer( definition, mValues.values(), mValues.context() );
    surface.what = ResultLayer::Surface;
    surface.metadata = resultMetadata( facts(), definition->description(), layerNameOf( surface.id ) );
    writeSurfaceFile( surface.id, mInput, mTerrain, mUnits, monitor );
    outputs.noteWritten( output::SURFACE );
    finishOnLoading( surface, mStyle, mValues.context() );
    mWritten.push_back( surface );
    results.insert( output::SURFACE, surface.id );
  }

  void PressureSurfaceRun::writeAreas( OutputSet &outputs, RowSpool &areas, QVariantMap &results )
  {
    FeedbackMonitor monitor( &mFeedback, SURFACE_TO, WRITE_TO );
    WrittenLayer layer;
    layer.id = outputs.writeSpool(
      output::BAND_AREAS, bandAreaFields(), compat::WkbType::Polygon, mTerrain.crs, areas, monitor );
    layer.what = ResultLayer::BandAreas;
    layer.metadata =
      resultMetadata( facts(), mValues.definition( output::BAND_AREAS )->description(), layerNameOf( layer.id ) );
    layer.geoPackage = outputs.geoPackageOf( output::BAND_AREAS );
    layer.fields = bandAreaFields();
    layer.type = compat::WkbType::Polygon;
    finishOnLoading( layer, mStyle, mValues.context() );
    mWritten.push_back( layer );
    results.insert( output::BAND_AREAS, layer.id );
  }

  QVariantMap PressureSurfaceRun::write()
  {
    OutputSet outputs( mValues, pressureSurfaceLayers() );
    const bool wantsAreas = outputs.isAsked( output::BAND_AREAS );
    RowSpool areas;
    if ( wantsAreas )
    {
      FeedbackMonitor monitor( &mFeedback, 0.0, AREAS_TO );
      collectBandAreas(
        areas, mInput, mTerrain, mLimits, mStyle, mUnits, mValues.context().transformContext(), monitor );
    }
    // From here on a cancel may come too late: the surface takes an earlier one's place when it is whole.
    QVariantMap results;
    writeSurface( outputs, wantsAreas ? AREAS_TO : 0.0, results );
    if ( wantsAreas )
      writeAreas( outputs, areas, results );
    outputs.commit();
    mFeedback.setProgress( 100.0 );

    const RestingWater high = restingWater( mInput.levels.highM, mInput.coverM, mUnits );
    const RestingWater low = restingWater( mInput.levels.lowM, mInput.coverM, mUnits );
    results.insert( output::STATIC_LEVEL_HIGH, mUnits.lengthValue( mInput.levels.highM ) );
    results.insert( output::STATIC_LEVEL_LOW, mUnits.lengthValue( mInput.levels.lowM ) );
    results.insert(
      output::GROUND_TOO_HIGH, mUnits.lengthValue( low.groundWhereM( mUnits.pressure( mLimits.leastPa ) ) ) );
    results.insert(
      output::GROUND_TOO_LOW, mUnits.lengthValue( high.groundWhereM( mUnits.pressure( mLimits.mostPa ) ) ) );
    return results;
  }

} // namespace stillhead
