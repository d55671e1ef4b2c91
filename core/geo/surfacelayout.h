// SPDX-License-Identifier: GPL-2.0-or-later
// How a surface is cut: tiles of the file that is written, units of work (whole tiles, and whole blocks of the terrain
// where they fit, so that nothing is decoded twice), and windows in which a unit is read.
#pragma once

#include "core/terrain/elevationsource.h"

#include <cstddef>

namespace stillhead
{

  struct SurfaceLayout
  {
      explicit SurfaceLayout( const ElevationSource &terrain );

      int columns;
      int rows;
      int tileColumns; //!< multiples of 16, as TIFF wants them
      int tileRows;
      int unitColumns; //!< multiples of the tile
      int unitRows;
      int windowColumns;
      int windowRows;
      std::size_t unitsAcross;
      std::size_t units;

      //! Cells of a unit at the edge are padded to whole tiles.
      std::size_t unitCells() const
      {
        return static_cast<std::size_t>( unitColumns ) * static_cast<std::size_t>( unitRows );
      }
  };

} // namespace stillhead
