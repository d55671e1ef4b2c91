// SPDX-License-Identifier: GPL-2.0-or-later
// The same rules as for the single source, row by row.
#include "processing/reading/sourcelayer.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

#include <qgsexception.h>

#include <array>

namespace stillhead
{

  namespace
  {

    SourceKind kindOf( const PointRow &row )
    {
      const std::array<std::pair<QString, SourceKind>, 3> kinds {
        { { word::PRESSURE_READING, SourceKind::PressureReading }, { word::WATER_LEVEL, SourceKind::WaterLevel },
          { word::LEVEL_ABOVE_GROUND, SourceKind::LevelAboveGround } }
      };
      const QString given = row.text( field::KIND );
      QStringList known;
      for ( const auto &[text, kind] : kinds )
      {
        if ( given.compare( text, Qt::CaseInsensitive ) == 0 )
          return kind;
        known << text;
      }
      row.refuse( Text::tr( "`kind` is “%1”; write one of: %2." ).arg( given, known.join( QStringLiteral( ", " ) ) ) );
    }

    std::optional<double> valueOf( const PointRow &row, const QString &name, SourceKind kind )
    {
      return kind == SourceKind::PressureReading ? row.pressurePa( name ) : row.lengthM( name );
    }

    Source sourceOf( const PointRow &row )
    {
      Source source;
      source.kind = kindOf( row );
      const std::optional<double> high = valueOf( row, field::VALUE, source.kind );
      if ( !high )
        row.refuse( Text::tr( "`value` is blank; give the highest that the source has at rest." ) );
      source.high = *high;
      source.low = valueOf( row, field::LOW, source.kind );
      if ( source.low && *source.low > source.high )
        row.refuse( Text::tr( "`low` is above `value`; the low case must not exceed the high one: swap them." ) );
      source.groundElevationM = row.lengthM( field::ELEVATION );
      if ( source.kind == SourceKind::PressureReading )
        source.gaugeHeightM = row.lengthM( field::GAUGE_HEIGHT ).value_or( 0.0 );
      source.boostPa = row.pressurePa( field::BOOST ).value_or( 0.0 );
      source.boostLowPa = row.pressurePa( field::BOOST_LOW );
      if ( source.boostLowPa && *source.boostLowPa > source.boostPa )
        row.refuse( Text::tr( "`boost_low` is above `boost`; a pump adds most at no flow: swap them." ) );
      return source;
    }

  } // namespace

  std::vector<SourceInput> readSources( const QgsProcessingFeatureSource &layer, const QString &parameterName,
    double reachM, const DisplayUnits &units, const QgsCoordinateReferenceSystem &crs,
    const QgsCoordinateTransformContext &transforms, Drawing &drawing )
  {
    std::vector<SourceInput> sources;
    readPoints( layer, parameterName, units, crs, transforms, drawing,
      [&]( const PointRow &row, const PlanPoint &place, int system ) {
        SourceInput input;
        input.source = sourceOf( row );
        input.source.place = place;
        input.source.system = system;
        input.reachM = reachM;
        input.name = row.name();
        input.note = row.text( field::NOTE );
        sources.push_back( input );
      } );
    if ( sources.empty() )
      throw QgsProcessingException( Text::tr( "%1 has no rows; add the points and run again." ).arg( parameterName ) );
    return sources;
  }

} // namespace stillhead
