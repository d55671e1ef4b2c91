// SPDX-License-Identifier: GPL-2.0-or-later
// Lines go on as they are closed; none is kept in memory.
#include "processing/groundlimitoutput.h"

#include "core/geo/gdalcachelimit.h"
#include "core/surface/groundlines.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/text/text.h"

#include <qgsgeometry.h>
#include <qgslinestring.h>

namespace stillhead
{

  namespace
  {

    QgsGeometry lineOf( const std::vector<TerrainPoint> &places )
    {
      QVector<double> x;
      QVector<double> y;
      x.reserve( static_cast<int>( places.size() ) );
      y.reserve( static_cast<int>( places.size() ) );
      for ( const TerrainPoint &place : places )
      {
        x << place.x;
        y << place.y;
      }
      return QgsGeometry( new QgsLineString( x, y ) );
    }

    //! The attributes of every line of one of the two.
    QgsAttributes attributesOf( const QString &what, double groundM, double limitPa, const DisplayUnits &units )
    {
      QgsAttributes attributes;
      attributes
        << what << units.lengthValue( groundM ) << units.pressureValue( limitPa )
        << Text::tr( "%1, %2, ground %3" ).arg( what, units.givenPressureText( limitPa ), units.lengthText( groundM ) );
      return attributes;
    }

  } // namespace

  GroundLimits groundLimits( const SurfaceInput &input, const Limits &limits, const DisplayUnits &units )
  {
    const RestingWater high = restingWater( input.levels.highM, input.coverM, units );
    const RestingWater low = restingWater( input.levels.lowM, input.coverM, units );
    return { low.groundWhereM( units.pressure( limits.leastPa ) ),
      high.groundWhereM( units.pressure( limits.mostPa ) ) };
  }

  QgsFields groundLimitFields()
  {
    QgsFields fields;
    fields.append( QgsField( field::WHAT, compat::Field::String ) );
    fields.append( QgsField( field::ELEVATION, compat::Field::Double ) );
    fields.append( QgsField( field::P, compat::Field::Double ) );
    fields.append( QgsField( field::LABEL, compat::Field::String ) );
    return fields;
  }

  void collectGroundLimits( RowSpool &spool, const SurfaceInput &input, const Terrain &terrain, const Limits &limits,
    const DisplayUnits &units, Monitor &monitor )
  {
    const GdalCacheLimit cacheLimit;
    const GroundLimits grounds = groundLimits( input, limits, units );
    const std::vector<QgsAttributes> attributes { attributesOf(
                                                    word::CEILING, grounds.ceilingM, limits.leastPa, units ),
      attributesOf( word::FLOOR, grounds.floorM, limits.mostPa, units ) };
    GroundLineRequest request;
    request.elevationsM = { grounds.ceilingM, grounds.floorM };
    request.area = input.area ? &*input.area : nullptr;
    request.threads = terrain.threads;
    traceGroundLines(
      *terrain.source, request, monitor, 0.0, 1.0, [&]( std::size_t elevation, const std::vector<TerrainPoint> &line ) {
        QgsFeature row;
        row.setGeometry( lineOf( line ) );
        row.setAttributes( attributes[elevation] );
        spool.add( row );
      } );
  }

} // namespace stillhead
