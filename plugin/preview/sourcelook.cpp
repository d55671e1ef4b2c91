// SPDX-License-Identifier: GPL-2.0-or-later
// The same readers and the same rule for the static level as in a run; only the pipe is left out.
#include "plugin/preview/sourcelook.h"

#include "core/geo/terraintransform.h"
#include "core/terrain/terrainreader.h"
#include "processing/parameternames.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/unitsreader.h"
#include "processing/staticpressurealgorithm.h"

#include <QCoreApplication>

#include <cmath>

namespace stillhead
{

  namespace
  {

    class Look
    {
        Q_DECLARE_TR_FUNCTIONS( stillhead::SourceLook )
    };

    double groundAt( const QgsPointXY &place, const QgsCoordinateReferenceSystem &crs, Terrain &terrain )
    {
      const std::unique_ptr<PlanToTerrain> way =
        makePlanToTerrain( crsDefinition( crs ), crsDefinition( terrain.crs ) );
      const PlanPoint plan { place.x(), place.y() };
      TerrainPoint onTerrain;
      way->transform( &plan, &onTerrain, 1 );
      TerrainReader reader( *terrain.cache );
      return reader.elevationAtM( reader.grid().toPixel( onTerrain ) );
    }

  } // namespace

  SourceLook lookAtSource( const PreviewInput &input, const QgsPointXY &place,
    const QgsCoordinateTransformContext &transforms, TerrainKeeper &terrains )
  {
    const std::unique_ptr<QgsProcessingAlgorithm> algorithm( StaticPressureAlgorithm().create() );
    const QgsCoordinateReferenceSystem crs = input.mains->crs();
    QgsProcessingContext context;
    context.setTransformContext( transforms );
    QgsProcessingFeedback silent( false );
    QVariantMap parameters = input.parameters;
    parameters.insert( parameter::TERRAIN, QVariant::fromValue( input.terrain.data() ) );
    parameters.insert( parameter::SOURCE, pointParameter( place, crs ) );
    const ParameterValues values( algorithm->parameterDefinitions(), parameters, context );

    SourceLook look;
    look.groundM = groundAt( place, crs, *terrains.terrainFor( *input.terrain, values, silent ) );
    if ( !values.isSet( parameter::SOURCE_VALUE ) )
      return look;
    const DisplayUnits units = readUnits( values );
    const Source source = readSource( values, units, crs, silent ).source;
    const double groundM = source.groundElevationM.value_or( look.groundM );
    if ( source.kind == SourceKind::WaterLevel || !std::isnan( groundM ) )
      look.levels = staticLevels( source, groundM, units.specificWeightNPerM3() );
    return look;
  }

  QString sourceLookText( const SourceLook &look, const DisplayUnits &units )
  {
    QString text = std::isnan( look.groundM ) ? Look::tr( "No terrain here." )
                                              : Look::tr( "Ground %1." ).arg( units.lengthText( look.groundM, 1 ) );
    if ( !look.levels )
      return text;
    text += ' ';
    if ( look.levels->lowM == look.levels->highM )
      return text + Look::tr( "Water would stand at elevation %1." ).arg( units.lengthText( look.levels->highM, 1 ) );
    return text
      + Look::tr( "Water would stand at elevation %1 (summer peak) to %2 (night, winter)." )
          .arg( units.lengthText( look.levels->lowM, 1 ), units.lengthText( look.levels->highM, 1 ) );
  }

  QString pointParameter( const QgsPointXY &place, const QgsCoordinateReferenceSystem &crs )
  {
    const QString point = QStringLiteral( "%1,%2" ).arg( place.x(), 0, 'f', 9 ).arg( place.y(), 0, 'f', 9 );
    return crs.authid().isEmpty() ? point : QStringLiteral( "%1 [%2]" ).arg( point, crs.authid() );
  }

  DisplayUnits unitsOf( const QVariantMap &parameters )
  {
    constexpr double WATER_CELSIUS = 15.0;
    return DisplayUnits( static_cast<PressureUnit>( parameters.value( parameter::PRESSURE_UNIT, 0 ).toInt() ),
      static_cast<LengthUnit>( parameters.value( parameter::LENGTH_UNIT, 0 ).toInt() ), WATER_CELSIUS );
  }

} // namespace stillhead
