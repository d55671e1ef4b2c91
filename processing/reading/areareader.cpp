// SPDX-License-Identifier: GPL-2.0-or-later
// Invalid polygons are welcome: the mask counts crossings and needs no valid rings.
#include "processing/reading/areareader.h"

#include "core/geo/areageometry.h"
#include "processing/parameternames.h"
#include "processing/reading/layercrs.h"
#include "processing/text/text.h"

#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgsgeometry.h>

#include <algorithm>

namespace stillhead
{

  namespace
  {

    bool meetsGrid( const PixelPolygon &polygon, const RasterGrid &grid )
    {
      TerrainPoint low { HUGE_VAL, HUGE_VAL };
      TerrainPoint high { -HUGE_VAL, -HUGE_VAL };
      for ( const std::vector<TerrainPoint> &ring : polygon )
      {
        for ( const TerrainPoint &place : ring )
        {
          low = { std::min( low.x, place.x ), std::min( low.y, place.y ) };
          high = { std::max( high.x, place.x ), std::max( high.y, place.y ) };
        }
      }
      return low.x <= grid.columns() - 0.5 && high.x >= -0.5 && low.y <= grid.rows() - 0.5 && high.y >= -0.5;
    }

  } // namespace

  AreaMask readArea( const QgsProcessingFeatureSource &source, const Terrain &terrain, const ParameterValues &values )
  {
    requireCrs( source.sourceCrs(), parameter::AREA, source.sourceName() );
    const QgsCoordinateTransform transform( source.sourceCrs(), terrain.crs, values.context().transformContext() );
    const RasterGrid &grid = terrain.source->grid();
    std::vector<PixelPolygon> polygons;
    QgsFeature feature;
    QgsFeatureIterator features = source.getFeatures( QgsFeatureRequest().setNoAttributes() );
    while ( features.nextFeature( feature ) )
    {
      QgsGeometry geometry = feature.geometry();
      if ( geometry.isEmpty() )
        continue;
      try
      {
        geometry.transform( transform );
      }
      catch ( const QgsCsException & )
      {
        throw QgsProcessingException(
          Text::tr( "Feature %1 of AREA (“%2”) cannot be reprojected to the terrain's CRS, %3; "
                    "check the layer's CRS." )
            .arg( feature.id() )
            .arg( source.sourceName(), crsText( terrain.crs ) ) );
      }
      const QByteArray wkb = geometry.asWkb();
      appendPolygons( std::vector<unsigned char>( wkb.begin(), wkb.end() ), grid, polygons );
    }
    if ( polygons.empty() )
      throw QgsProcessingException(
        Text::tr( "AREA (“%1”) has no polygons; draw the area first, or leave it out." ).arg( source.sourceName() ) );
    if ( std::none_of(
           polygons.begin(), polygons.end(), [&grid]( const PixelPolygon &p ) { return meetsGrid( p, grid ); } ) )
      throw QgsProcessingException(
        Text::tr( "AREA (“%1”) lies nowhere on the terrain; choose an area that the terrain "
                  "covers." )
          .arg( source.sourceName() ) );
    return AreaMask( polygons, grid.rows() );
  }

} // namespace stillhead
