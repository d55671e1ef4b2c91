// SPDX-License-Identifier: GPL-2.0-or-later
// The static level comes from the same functions as that of the main job.
#include "processing/pressuresurfacerun.h"

#include "core/terrain/terrainreader.h"
#include "processing/bandareaoutput.h"
#include "processing/feedbackmonitor.h"
#include "processing/groundlimitoutput.h"
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
    constexpr double AREAS_SHARE = 35.0;
    constexpr double LIMITS_SHARE = 20.0;
    constexpr double SURFACE_TO = 92.0;
    constexpr double AREAS_WRITTEN = 96.0;
    constexpr double WRITE_TO = 99.0;

  } // namespace

  QStringList pressureSurfaceLayers()
  {
    return { output::SURFACE, output::BAND_AREAS, output::GROUND_LIMITS };
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

  void PressureSurfaceRun::writeRows(
    OutputSet &outputs, const RowLayer &layer, double fromPercent, double toPercent, QVariantMap &results )
  {
    FeedbackMonitor monitor( &mFeedback, fromPercent, toPercent );
    WrittenLayer written;
    written.id = outputs.writeSpool( layer.output, layer.fields, layer.type, mTerrain.crs, layer.rows, monitor );
    written.what = layer.what;
    written.metadata =
      resultMetadata( facts(), mValues.definition( layer.output )->description(), layerNameOf( written.id ) );
    written.geoPackage = outputs.geoPackageOf( layer.output );
    written.fields = layer.fields;
    written.type = layer.type;
    finishOnLoading( written, mStyle, mValues.context() );
    mWritten.push_back( written );
    results.insert( layer.output, written.id );
  }

  QVariantMap PressureSurfaceRun::write()
  {
    OutputSet outputs( mValues, pressureSurfaceLayers() );
    const bool wantsAreas = outputs.isAsked( output::BAND_AREAS );
    const bool wantsLimits = outputs.isAsked( output::GROUND_LIMITS );
    RowSpool areas;
    RowSpool limits;
    double done = 0.0;
    if ( wantsAreas )
    {
      FeedbackMonitor monitor( &mFeedback, done, done + AREAS_SHARE );
      collectBandAreas(
        areas, mInput, mTerrain, mLimits, mStyle, mUnits, mValues.context().transformContext(), monitor );
      done += AREAS_SHARE;
    }
    if ( wantsLimits )
    {
      FeedbackMonitor monitor( &mFeedback, done, done + LIMITS_SHARE );
      collectGroundLimits( limits, mInput, mTerrain, mLimits, mUnits, monitor );
      done += LIMITS_SHARE;
    }
    // From here on a cancel may come too late: the surface takes an earlier one's place when it is whole.
    QVariantMap results;
    writeSurface( outputs, done, results );
    if ( wantsAreas )
      writeRows( outputs,
        { output::BAND_AREAS, ResultLayer::BandAreas, bandAreaFields(), compat::WkbType::Polygon, areas }, SURFACE_TO,
        AREAS_WRITTEN, results );
    if ( wantsLimits )
      writeRows( outputs,
        { output::GROUND_LIMITS, ResultLayer::GroundLimits, groundLimitFields(), compat::WkbType::LineString, limits },
        AREAS_WRITTEN, WRITE_TO, results );
    outputs.commit();
    mFeedback.setProgress( 100.0 );

    const GroundLimits grounds = groundLimits( mInput, mLimits, mUnits );
    results.insert( output::STATIC_LEVEL_HIGH, mUnits.lengthValue( mInput.levels.highM ) );
    results.insert( output::STATIC_LEVEL_LOW, mUnits.lengthValue( mInput.levels.lowM ) );
    results.insert( output::GROUND_TOO_HIGH, mUnits.lengthValue( grounds.ceilingM ) );
    results.insert( output::GROUND_TOO_LOW, mUnits.lengthValue( grounds.floorM ) );
    return results;
  }

} // namespace stillhead
