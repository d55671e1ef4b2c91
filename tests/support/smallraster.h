// SPDX-License-Identifier: GPL-2.0-or-later
// Makes the small rasters of the tests with GDAL itself, mostly in memory, so that every cell is known.
#pragma once

#include <array>
#include <memory>
#include <string>
#include <vector>

#include <gdal_priv.h>
#include <ogr_spatialref.h>

namespace stillhead::test
{

  using DatasetPointer = std::unique_ptr<GDALDataset>;

  inline void registerGdal()
  {
    if ( GDALGetDriverCount() == 0 )
      GDALAllRegister();
  }

  //! What a small raster is like; values are row by row, one vector a band.
  struct SmallRaster
  {
      int columns = 3;
      int rows = 2;
      GDALDataType type = GDT_Float32;
      std::vector<std::vector<double>> bands { { 1, 2, 3, 4, 5, 6 } };
      std::array<double, 6> geoTransform { 500000.0, 2.0, 0.0, 4000000.0, 0.0, -2.0 };
      bool isPlaced = true;
      std::string crs = "EPSG:32616";
      std::vector<std::string> creationOptions;
      std::string driver = "GTiff";
  };

  //! Writes it and leaves it open for update, so that a test can add what it needs.
  inline DatasetPointer create( const std::string &path, const SmallRaster &raster )
  {
    registerGdal();
    std::vector<const char *> options;
    for ( const std::string &option : raster.creationOptions )
      options.push_back( option.c_str() );
    options.push_back( nullptr );
    DatasetPointer dataset(
      GetGDALDriverManager()
        ->GetDriverByName( raster.driver.c_str() )
        ->Create( path.c_str(), raster.columns, raster.rows, static_cast<int>( raster.bands.size() ), raster.type,
          const_cast<char **>( options.data() ) ) );
    if ( raster.isPlaced )
    {
      std::array<double, 6> geoTransform = raster.geoTransform;
      dataset->SetGeoTransform( geoTransform.data() );
    }
    if ( !raster.crs.empty() )
    {
      OGRSpatialReference crs;
      crs.SetFromUserInput( raster.crs.c_str() );
      dataset->SetSpatialRef( &crs );
    }
    for ( std::size_t i = 0; i < raster.bands.size(); ++i )
    {
      std::vector<double> values = raster.bands[i];
      if ( values.empty() )
        continue;
      const CPLErr error = dataset->GetRasterBand( static_cast<int>( i ) + 1 )
                             ->RasterIO( GF_Write, 0, 0, raster.columns, raster.rows, values.data(), raster.columns,
                               raster.rows, GDT_Float64, 0, 0, nullptr );
      if ( error != CE_None )
        return nullptr;
    }
    return dataset;
  }

  //! A hilly surface of any size whose cells are all different, with a hole of nodata.
  inline std::vector<double> hills( int columns, int rows, double nodata )
  {
    std::vector<double> values;
    values.reserve( static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows ) );
    for ( int r = 0; r < rows; ++r )
    {
      for ( int c = 0; c < columns; ++c )
      {
        const bool hole = c > columns / 3 && c < columns / 2 && r > rows / 4 && r < rows / 3;
        const double wave = ( ( c * 7 + r * 13 ) % 97 ) * 0.25;
        values.push_back( hole ? nodata : 100.0 + 0.125 * c - 0.0625 * r + wave );
      }
    }
    return values;
  }

} // namespace stillhead::test
