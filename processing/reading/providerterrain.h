// SPDX-License-Identifier: GPL-2.0-or-later
// Terrain that GDAL does not open (databases, web coverages, virtual rasters) through the platform's own raster
// provider: the same pixels, so the same answers.
#pragma once

#include "core/terrain/elevationsource.h"

#include <memory>
#include <mutex>

class QgsRasterDataProvider;

namespace stillhead
{

  class ProviderTerrain : public ElevationSource
  {
    public:
      /**
       * \param provider its own provider of the raster, used by nobody else
       * \throws QgsProcessingException where the raster has no pixels of its own
       */
      ProviderTerrain( std::unique_ptr<QgsRasterDataProvider> provider, int band, double metresPerUnit );
      ~ProviderTerrain() override;

      const RasterGrid &grid() const override { return mGrid; }
      int blockColumns() const override;
      int blockRows() const override;
      void read( int column, int row, int columns, int rows, double *elevationsM ) const override;

    private:
      std::unique_ptr<QgsRasterDataProvider> mProvider;
      int mBand;
      double mMetresPerUnit;
      RasterGrid mGrid;
      mutable std::mutex mMutex; //!< Providers serve one reader at a time
  };

} // namespace stillhead
