// SPDX-License-Identifier: GPL-2.0-or-later
// The terrain is opened in the main thread; the work itself touches neither project nor session.
#include "processing/pressuresurfacealgorithm.h"

#include "processing/parameternames.h"
#include "processing/pressuresurfacerun.h"
#include "processing/qgiscompat.h"
#include "processing/text/helptext.h"
#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsrasterlayer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  QString PressureSurfaceAlgorithm::name() const
  {
    return algorithm::PRESSURE_SURFACE;
  }

  QString PressureSurfaceAlgorithm::displayName() const
  {
    return Text::tr( "Static pressure surface" );
  }

  QString PressureSurfaceAlgorithm::shortDescription() const
  {
    return Text::tr( "Raster of the pressure that water at rest would put on a pipe anywhere on the terrain." );
  }

  QString PressureSurfaceAlgorithm::shortHelpString() const
  {
    return pressureSurfaceHelp();
  }

  QStringList PressureSurfaceAlgorithm::tags() const
  {
    return Text::tr( "irrigation,static,pressure,surface,raster,terrain,elevation,water,psi,kPa,head,slope" )
      .split( ',' );
  }

  QgsProcessingAlgorithm *PressureSurfaceAlgorithm::createInstance() const
  {
    return new PressureSurfaceAlgorithm();
  }

  void PressureSurfaceAlgorithm::initAlgorithm( const QVariantMap & )
  {
    addParameters( terrainParameters() );
    addParameters( sourceParameters( false ) );
    addParameters( coverParameter() );
    addParameters( limitParameters() );
    addParameters( areaParameter() );
    addParameters( unitParameters() );

    addParameter(
      new QgsProcessingParameterRasterDestination( output::SURFACE, Text::tr( "Static pressure surface" ) ) );
    addParameter( new QgsProcessingParameterFeatureSink(
      output::BAND_AREAS, Text::tr( "Areas of the pressure bands" ), compat::Source::Polygon, QVariant(), true ) );
    addParameter( new QgsProcessingParameterFeatureSink( output::GROUND_LIMITS,
      Text::tr( "Lines of ground too high and too low" ), compat::Source::Line, QVariant(), true ) );

    addNumberOutputs( {
      { output::STATIC_LEVEL_HIGH, Text::tr( "Elevation of the static level, high case" ) },
      { output::STATIC_LEVEL_LOW, Text::tr( "Elevation of the static level, low case" ) },
      { output::GROUND_TOO_HIGH, Text::tr( "Ground above which the lowest acceptable pressure is not met, low case" ) },
      { output::GROUND_TOO_LOW, Text::tr( "Ground below which the highest acceptable pressure is passed, high case" ) },
    } );
  }

  bool PressureSurfaceAlgorithm::prepareAlgorithm(
    const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    guarded( [&] {
      const ParameterValues values = valuesOf( parameters, context );
      values.checkAll();
      QgsProcessingFeedback silent;
      mTerrain = readTerrain( values, feedbackOr( feedback, silent ) );
      OutputSet( values, pressureSurfaceLayers() )
        .check( { { parameter::TERRAIN, parameterAsRasterLayer( parameters, parameter::TERRAIN, context ) },
          { parameter::AREA, parameterAsVectorLayer( parameters, parameter::AREA, context ) } } );
      return QVariantMap();
    } );
    return true;
  }

  QVariantMap PressureSurfaceAlgorithm::processAlgorithm(
    const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    return guarded( [&] {
      const ParameterValues values = valuesOf( parameters, context );
      QgsProcessingFeedback silent;
      PressureSurfaceRun run( values, *mTerrain, feedbackOr( feedback, silent ) );
      if ( values.isSet( parameter::AREA ) )
      {
        const std::unique_ptr<QgsProcessingFeatureSource> area(
          parameterAsSource( parameters, parameter::AREA, context ) );
        if ( !area )
          throw QgsProcessingException(
            Text::tr( "AREA (“%1”) cannot be opened as a layer of polygons; check the file and "
                      "its path." )
              .arg( parameters.value( parameter::AREA ).toString() ) );
        run.readArea( area.get() );
      }
      run.solve();
      const QVariantMap results = run.write();
      mWritten = run.written();
      mStyle = run.style();
      return results;
    } );
  }

  QVariantMap PressureSurfaceAlgorithm::postProcessAlgorithm(
    QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    QgsProcessingFeedback silent;
    finishNow( mWritten, mStyle, context, feedbackOr( feedback, silent ) );
    mWritten.clear();
    mTerrain.reset();
    return QVariantMap();
  }

} // namespace stillhead
