// SPDX-License-Identifier: GPL-2.0-or-later
// The static pressure surface: a terrain streamed block by block into a compressed GeoTIFF of pressures on the same
// grid, on several threads, in memory that does not grow with the raster. The file appears under its name only when it
// is whole.
#pragma once

#include "core/feedback/monitor.h"
#include "core/surface/areamask.h"
#include "core/surface/restingwater.h"
#include "core/terrain/elevationsource.h"

#include <optional>
#include <string>
#include <vector>

namespace stillhead
{

  //! One band of the surface.
  struct SurfaceBand
  {
      RestingWater water;
      std::string description;
  };

  //! What to write where.
  struct SurfaceRequest
  {
      std::string destination; //!< path of the GeoTIFF; an existing file is replaced when the new one is whole
      std::vector<SurfaceBand> bands;
      std::string unitName;               //!< of the pressures, kept with the bands
      std::string crsDefinition;          //!< of the terrain; kept whole, vertical part left out
      const AreaMask *area = nullptr;     //!< cells outside get no pressure; null: everywhere
      unsigned threads = 0;               //!< 0: as many as the machine has cores
      std::size_t memoryBytes = 96 << 20; //!< for results that wait to be written
  };

  //! Value of cells without pressure: the least 32-bit float, which no pressure reaches.
  float surfaceNodata();

  /**
   * Writes the surface. The same bytes whatever the number of threads.
   * \throws Cancelled, std::runtime_error with a sentence; nothing is left behind then, and an earlier file stays as it was
   */
  void writeSurface(
    const ElevationSource &terrain, const SurfaceRequest &request, Monitor &monitor, double from, double to );

} // namespace stillhead
