// SPDX-License-Identifier: GPL-2.0-or-later
// Polygons go on as they are closed; none is kept in memory.
#include "processing/bandareaoutput.h"

#include "core/geo/gdalcachelimit.h"
#include "core/judgement/limits.h"
#include "core/surface/bandareas.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"

#include <qgsdistancearea.h>
#include <qgsexception.h>
#include <qgslinestring.h>
#include <qgspolygon.h>

#include <cmath>
#include <limits>

namespace stillhead
{

  namespace
  {

    constexpr double NO_AREA = std::numeric_limits<double>::quiet_NaN();

    using Rings = std::vector<std::vector<TerrainPoint>>;

    QgsGeometry polygonOf( const Rings &rings )
    {
      auto polygon = std::make_unique<QgsPolygon>();
      for ( const std::vector<TerrainPoint> &ring : rings )
      {
        QVector<double> x;
        QVector<double> y;
        for ( const TerrainPoint &vertex : ring )
        {
          x << vertex.x;
          y << vertex.y;
        }
        auto line = std::make_unique<QgsLineString>( x, y );
        if ( polygon->exteriorRing() )
          polygon->addInteriorRing( line.release() );
        else
          polygon->setExteriorRing( line.release() );
      }
      return QgsGeometry( std::move( polygon ) );
    }

    //! Ground area in m²; NaN where it cannot be measured.
    double groundAreaM2( const QgsDistanceArea &measure, const QgsGeometry &polygon )
    {
      try
      {
        return measure.measureArea( polygon );
      }
      catch ( const QgsCsException & )
      {
        return NO_AREA;
      }
    }

    QVariant limitValue( const std::vector<double> &limits, int number )
    {
      const bool isOpen = number < 0 || number >= static_cast<int>( limits.size() );
      return isOpen ? QVariant() : QVariant( limits[static_cast<std::size_t>( number )] );
    }

  } // namespace

  QgsFields bandAreaFields()
  {
    QgsFields fields;
    fields.append( QgsField( field::BAND, compat::Field::Int ) );
    fields.append( QgsField( field::BAND_TEXT, compat::Field::String ) );
    fields.append( QgsField( field::P_FROM, compat::Field::Double ) );
    fields.append( QgsField( field::P_TO, compat::Field::Double ) );
    fields.append( QgsField( field::AREA, compat::Field::Double ) );
    return fields;
  }

  void collectBandAreas( RowSpool &spool, const SurfaceInput &input, const Terrain &terrain, const Limits &limits,
    const ResultStyle &style, const DisplayUnits &units, const QgsCoordinateTransformContext &transforms,
    Monitor &monitor )
  {
    const GdalCacheLimit cacheLimit;
    BandAreaRequest request;
    request.water = restingWater( input.levels.highM, input.coverM, units );
    for ( const double limit : limits.bandsPa )
      request.limits.push_back( units.pressure( limit ) );
    request.area = input.area ? &*input.area : nullptr;
    request.threads = terrain.threads;

    QgsDistanceArea measure;
    measure.setSourceCrs( terrain.crs, transforms );
    measure.setEllipsoid( terrain.crs.ellipsoidAcronym() );
    const double squareMetresPerUnit = units.metres( 1.0 ) * units.metres( 1.0 );

    traceBandAreas( *terrain.source, request, monitor, 0.0, 1.0, [&]( int band, const Rings &rings ) {
      QgsFeature row;
      row.setGeometry( polygonOf( rings ) );
      const double areaM2 = groundAreaM2( measure, row.geometry() );
      QgsAttributes attributes;
      attributes << band << bandText( band, style ) << limitValue( request.limits, band - 1 )
                 << limitValue( request.limits, band )
                 << ( std::isnan( areaM2 ) ? QVariant() : QVariant( areaM2 / squareMetresPerUnit ) );
      row.setAttributes( attributes );
      spool.add( row );
    } );
  }

} // namespace stillhead
