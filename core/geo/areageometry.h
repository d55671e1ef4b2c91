// SPDX-License-Identifier: GPL-2.0-or-later
// Polygons as they come from a layer (WKB in the terrain's CRS) to the pixel coordinates that a mask works in.
#pragma once

#include "core/surface/areamask.h"

#include <vector>

namespace stillhead
{

  /**
   * The polygons of a WKB geometry (polygon, multipolygon, collection; curves are segmentised by GDAL's default step of
   * 4 degrees), in pixel-centre coordinates of \a grid, appended to \a polygons.
   * \throws std::runtime_error where the bytes are no geometry
   */
  void appendPolygons(
    const std::vector<unsigned char> &wkb, const RasterGrid &grid, std::vector<PixelPolygon> &polygons );

} // namespace stillhead
