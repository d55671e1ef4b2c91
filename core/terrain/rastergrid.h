// SPDX-License-Identifier: GPL-2.0-or-later
// Where the pixels of a terrain raster lie. Pixel positions are counted between pixel CENTRES: (0, 0) is the centre
// of the first pixel, (columns − 1, rows − 1) that of the last; the raster's edge is half a pixel farther out.
#pragma once

#include <array>

namespace stillhead
{

  //! A place in the terrain's own CRS, or in pixel-centre coordinates (x = column, y = row).
  struct TerrainPoint
  {
      double x = 0.0;
      double y = 0.0;
  };

  //! Size and affine placement of a raster; rotated and sheared grids included.
  class RasterGrid
  {
    public:
      RasterGrid() = default;

      /**
       * \param columns, rows size in pixels, both above 0
       * \param geoTransform GDAL order: x = g0 + column·g1 + row·g2, y = g3 + column·g4 + row·g5, from the outer corner of the first pixel
       * \throws std::invalid_argument if a size is not above 0 or the transform cannot be inverted
       */
      RasterGrid( int columns, int rows, const std::array<double, 6> &geoTransform );

      int columns() const { return mColumns; }
      int rows() const { return mRows; }
      const std::array<double, 6> &geoTransform() const { return mGeoTransform; }

      //! Pixel-centre coordinates of a place in the terrain's CRS.
      TerrainPoint toPixel( const TerrainPoint &map ) const;

      //! Place in the terrain's CRS of pixel-centre coordinates.
      TerrainPoint toMap( const TerrainPoint &pixel ) const;

    private:
      int mColumns = 0;
      int mRows = 0;
      std::array<double, 6> mGeoTransform {};
      std::array<double, 4> mInverse {};
  };

} // namespace stillhead
