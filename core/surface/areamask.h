// SPDX-License-Identifier: GPL-2.0-or-later
// Which cells of a raster lie inside given polygons: a cell is inside where its centre is. Polygons that share an edge
// share no cell and leave none out between them; overlapping ones are joined.
#pragma once

#include "core/terrain/rastergrid.h"

#include <vector>

namespace stillhead
{

  //! A polygon: outer ring and holes in any order and direction, in pixel-centre coordinates, closed or not.
  using PixelPolygon = std::vector<std::vector<TerrainPoint>>;

  class AreaMask
  {
    public:
      //! \param rows of the raster
      AreaMask( const std::vector<PixelPolygon> &polygons, int rows );

      /**
       * Sets \a inside (\a columns values) to 1 where the centre of the cell in \a row, from \a column on, is inside, else 0.
       * \returns true if any is
       */
      bool markRow( int row, int column, int columns, unsigned char *inside ) const;

    private:
      //! A side of a polygon, its lower row first.
      struct Edge
      {
          TerrainPoint from;
          TerrainPoint to;
          int polygon = 0;
      };

      int mRows;
      std::vector<std::vector<Edge>> mStripes; //!< Edges by stripes of rows, in the order of their polygons
  };

} // namespace stillhead
