// SPDX-License-Identifier: GPL-2.0-or-later
// core/geo streams the raster; here only its request is made.
#include "processing/surfaceoutput.h"

#include "core/geo/gdalcachelimit.h"
#include "processing/reading/layercrs.h"
#include "processing/text/text.h"

namespace stillhead
{

  RestingWater restingWater( double levelM, double coverM, const DisplayUnits &units )
  {
    return { levelM, coverM, units.specificWeightNPerM3(), units.pascals( 1.0 ) };
  }

  void writeSurfaceFile( const QString &path, const SurfaceInput &input, const Terrain &terrain,
    const DisplayUnits &units, Monitor &monitor )
  {
    const GdalCacheLimit cacheLimit;
    SurfaceRequest request;
    request.destination = path.toStdString();
    request.unitName = units.pressureName().toStdString();
    request.crsDefinition = crsDefinition( terrain.crs );
    request.area = input.area ? &*input.area : nullptr;
    request.threads = terrain.threads;
    request.bands.push_back( { restingWater( input.levels.highM, input.coverM, units ),
      Text::tr( "Static pressure, high case (%1)" ).arg( units.pressureName() ).toStdString() } );
    if ( input.hasLow )
      request.bands.push_back( { restingWater( input.levels.lowM, input.coverM, units ),
        Text::tr( "Static pressure, low case (%1)" ).arg( units.pressureName() ).toStdString() } );
    writeSurface( *terrain.source, request, monitor, 0.0, 1.0 );
  }

} // namespace stillhead
