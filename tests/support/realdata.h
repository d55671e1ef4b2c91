// SPDX-License-Identifier: GPL-2.0-or-later
// Real terrain and lines of tests/data, read with GDAL alone: nothing of core stands between the file and the test.
#pragma once

#include "tests/support/memoryterrain.h"
#include "tests/support/networksketch.h"

#include <cmath>
#include <memory>
#include <stdexcept>
#include <string>
#include <vector>

#include <gdal_priv.h>
#include <ogrsf_frmts.h>

namespace stillhead::test
{

  inline std::string dataPath( const std::string &name )
  {
    return std::string( STILLHEAD_TEST_DATA "/" ) + name;
  }

  inline std::unique_ptr<GDALDataset> openData( const std::string &name, unsigned kind )
  {
    if ( GDALGetDriverCount() == 0 )
      GDALAllRegister();
    std::unique_ptr<GDALDataset> dataset( GDALDataset::Open( dataPath( name ).c_str(), kind | GDAL_OF_READONLY ) );
    if ( !dataset )
      throw std::runtime_error( name );
    return dataset;
  }

  //! A raster of metres with its nodata as NaN.
  inline MemoryTerrain realTerrain( const std::string &name )
  {
    const std::unique_ptr<GDALDataset> dataset = openData( name, GDAL_OF_RASTER );
    const int columns = dataset->GetRasterXSize();
    const int rows = dataset->GetRasterYSize();
    std::vector<double> elevations( static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows ) );
    GDALRasterBand *band = dataset->GetRasterBand( 1 );
    if ( band->RasterIO( GF_Read, 0, 0, columns, rows, elevations.data(), columns, rows, GDT_Float64, 0, 0, nullptr )
      != CE_None )
      throw std::runtime_error( name );
    int hasNodata = 0;
    const double nodata = band->GetNoDataValue( &hasNodata );
    for ( double &elevation : elevations )
      elevation = hasNodata && elevation == nodata ? NODATA : elevation;
    std::array<double, 6> geoTransform {};
    dataset->GetGeoTransform( geoTransform.data() );
    return MemoryTerrain( columns, rows, std::move( elevations ), geoTransform );
  }

  //! A line of a layer, and the value of one of its fields (NaN if none was asked for).
  struct RealLine
  {
      std::vector<PlanPoint> vertices;
      double value = NODATA;
  };

  //! All line parts of the only layer of a file.
  inline std::vector<RealLine> realLines( const std::string &name, const char *field = nullptr )
  {
    const std::unique_ptr<GDALDataset> dataset = openData( name, GDAL_OF_VECTOR );
    std::vector<RealLine> lines;
    const auto add = [&]( const OGRLineString &line, double value ) {
      RealLine real;
      real.value = value;
      for ( int i = 0; i < line.getNumPoints(); ++i )
        real.vertices.push_back( { line.getX( i ), line.getY( i ) } );
      lines.push_back( real );
    };
    for ( const auto &feature : dataset->GetLayer( 0 ) )
    {
      const double value = field ? feature->GetFieldAsDouble( field ) : NODATA;
      const OGRGeometry *geometry = feature->GetGeometryRef();
      if ( wkbFlatten( geometry->getGeometryType() ) == wkbLineString )
      {
        add( *geometry->toLineString(), value );
        continue;
      }
      for ( const OGRLineString *part : *geometry->toMultiLineString() )
        add( *part, value );
    }
    return lines;
  }

  //! The lines as a drawing, every third a lateral, every place times \a scale and then moved.
  inline Drawing realDrawing( const std::vector<RealLine> &lines, double scale = 1.0, double x = 0.0, double y = 0.0 )
  {
    Drawing drawing;
    for ( const RealLine &line : lines )
    {
      DrawnLine drawn;
      drawn.feature = static_cast<int>( drawing.lines.size() );
      drawn.role = drawn.feature % 3 == 2 ? Role::Lateral : Role::Mainline;
      std::vector<PlanPoint> vertices;
      for ( const PlanPoint &p : line.vertices )
        vertices.push_back( { x + scale * p.x, y + scale * p.y } );
      addLine( drawing, vertices, drawn );
    }
    return drawing;
  }

} // namespace stillhead::test
