// SPDX-License-Identifier: GPL-2.0-or-later
// The one abstract door through which terrain reaches core. Implementations: core/geo (GDAL), processing (QGIS raster
// providers), tests (in memory).
#pragma once

#include "core/terrain/rastergrid.h"

#include <stdexcept>

namespace stillhead
{

  /**
   * A raster of ground elevations in metres. Scale, offset, nodata and unit of the band are already applied.
   * read() may be called from several threads at once.
   */
  class ElevationSource
  {
    public:
      virtual ~ElevationSource() = default;

      virtual const RasterGrid &grid() const = 0;

      //! The raster's natural block size in pixels; reading along it is cheapest.
      virtual int blockColumns() const { return 256; }
      virtual int blockRows() const { return 256; }

      /**
       * Fills \a elevationsM (row by row, columns × rows values, metres) with the window whose first pixel is (\a column, \a row).
       * NaN where the raster has no elevation. The window lies within the grid.
       * \throws std::runtime_error with a sentence that says what could not be read
       */
      virtual void read( int column, int row, int columns, int rows, double *elevationsM ) const = 0;

      /**
       * Where every elevation is, to the bit, a 32-bit float times one factor: that factor in metres, and readFloats() gives the
       * floats, which take half the memory. 0 where it is not so.
       */
      virtual double metresPerFloat() const { return 0.0; }

      //! As read(), in 32-bit floats; called only where metresPerFloat() is not 0.
      virtual void readFloats( int column, int row, int columns, int rows, float *values ) const;
  };

  inline void ElevationSource::readFloats( int, int, int, int, float * ) const
  {
    throw std::logic_error( "This terrain offers no 32-bit floats." );
  }

} // namespace stillhead
