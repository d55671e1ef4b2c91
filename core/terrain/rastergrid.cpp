// SPDX-License-Identifier: GPL-2.0-or-later
// Affine placement and its inverse, taken relative to the raster's corner so that large coordinates lose no digits.
#include "core/terrain/rastergrid.h"

#include <cmath>
#include <stdexcept>

namespace stillhead
{

  RasterGrid::RasterGrid( int columns, int rows, const std::array<double, 6> &geoTransform )
    : mColumns( columns )
    , mRows( rows )
    , mGeoTransform( geoTransform )
  {
    if ( columns <= 0 || rows <= 0 )
      throw std::invalid_argument( "a raster needs at least one pixel" );
    const auto &g = mGeoTransform;
    const double determinant = g[1] * g[5] - g[2] * g[4];
    if ( !std::isfinite( determinant ) || determinant == 0.0 )
      throw std::invalid_argument( "the raster's placement cannot be inverted" );
    mInverse = { g[5] / determinant, -g[2] / determinant, -g[4] / determinant, g[1] / determinant };
  }

  TerrainPoint RasterGrid::toPixel( const TerrainPoint &map ) const
  {
    const double dx = map.x - mGeoTransform[0];
    const double dy = map.y - mGeoTransform[3];
    // Without rotation a plain division keeps pixel centres exact where the pixel size is.
    if ( mGeoTransform[2] == 0.0 && mGeoTransform[4] == 0.0 )
      return { dx / mGeoTransform[1] - 0.5, dy / mGeoTransform[5] - 0.5 };
    return { mInverse[0] * dx + mInverse[1] * dy - 0.5, mInverse[2] * dx + mInverse[3] * dy - 0.5 };
  }

  TerrainPoint RasterGrid::toMap( const TerrainPoint &pixel ) const
  {
    const auto &g = mGeoTransform;
    const double column = pixel.x + 0.5;
    const double row = pixel.y + 0.5;
    return { g[0] + column * g[1] + row * g[2], g[3] + column * g[4] + row * g[5] };
  }

} // namespace stillhead
