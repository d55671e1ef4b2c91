// SPDX-License-Identifier: GPL-2.0-or-later
// GDAL's own contour generator, the reference for ours.
#pragma once

#include "tests/support/smallraster.h"

#include <vector>

#include <gdal_alg.h>
#include <ogrsf_frmts.h>

namespace stillhead::test
{

  //! GDAL's contours of a raster at \a levels, in a layer in memory: fields least, most (areas) or elevation (lines).
  inline DatasetPointer gdalContours( GDALRasterBand *band, const std::vector<double> &levels, bool areas )
  {
    DatasetPointer result(
      GetGDALDriverManager()->GetDriverByName( "Memory" )->Create( "", 0, 0, 0, GDT_Unknown, nullptr ) );
    OGRLayer *layer = result->CreateLayer( "contours" );
    OGRFieldDefn least( "least", OFTReal );
    OGRFieldDefn most( "most", OFTReal );
    layer->CreateField( &least );
    layer->CreateField( &most );
    CPLString fixed = "FIXED_LEVELS=";
    for ( std::size_t i = 0; i < levels.size(); ++i )
      fixed += CPLSPrintf( i == 0 ? "%.17g" : ",%.17g", levels[i] );
    CPLStringList options;
    options.AddString( fixed );
    if ( areas )
    {
      options.AddString( "POLYGONIZE=YES" );
      options.AddString( "ELEV_FIELD_MIN=0" );
      options.AddString( "ELEV_FIELD_MAX=1" );
    }
    else
    {
      options.AddString( "ELEV_FIELD=0" );
    }
    if ( GDALContourGenerateEx( band, layer, options.List(), nullptr, nullptr ) != CE_None )
      return nullptr;
    return result;
  }

} // namespace stillhead::test
