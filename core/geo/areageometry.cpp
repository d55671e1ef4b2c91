// SPDX-License-Identifier: GPL-2.0-or-later
// OGR reads the bytes and straightens curves; whatever is no polygon has no inside and is passed over.
#include "core/geo/areageometry.h"

#include <memory>
#include <stdexcept>

#include <ogr_geometry.h>

namespace stillhead
{

  namespace
  {
    std::vector<TerrainPoint> toPixels( const OGRLinearRing &ring, const RasterGrid &grid )
    {
      std::vector<TerrainPoint> pixels;
      pixels.reserve( static_cast<std::size_t>( ring.getNumPoints() ) );
      for ( int i = 0; i < ring.getNumPoints(); ++i )
        pixels.push_back( grid.toPixel( { ring.getX( i ), ring.getY( i ) } ) );
      return pixels;
    }

    void append( const OGRGeometry &geometry, const RasterGrid &grid, std::vector<PixelPolygon> &polygons )
    {
      if ( wkbFlatten( geometry.getGeometryType() ) == wkbPolygon )
      {
        PixelPolygon polygon;
        for ( const OGRLinearRing *ring : *geometry.toPolygon() )
          polygon.push_back( toPixels( *ring, grid ) );
        polygons.push_back( std::move( polygon ) );
      }
      else if ( OGR_GT_IsSubClassOf( geometry.getGeometryType(), wkbGeometryCollection ) )
      {
        for ( const OGRGeometry *part : *geometry.toGeometryCollection() )
          append( *part, grid, polygons );
      }
    }
  } // namespace

  void appendPolygons(
    const std::vector<unsigned char> &wkb, const RasterGrid &grid, std::vector<PixelPolygon> &polygons )
  {
    OGRGeometry *read = nullptr;
    const OGRErr error = OGRGeometryFactory::createFromWkb( wkb.data(), nullptr, &read, wkb.size() );
    const std::unique_ptr<OGRGeometry> geometry( read );
    if ( error != OGRERR_NONE || !geometry )
      throw std::runtime_error( "A polygon of the area cannot be read; check the geometries of its layer." );
    const std::unique_ptr<OGRGeometry> straight( geometry->getLinearGeometry() );
    append( *straight, grid, polygons );
  }

} // namespace stillhead
