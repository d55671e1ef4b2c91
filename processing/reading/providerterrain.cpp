// SPDX-License-Identifier: GPL-2.0-or-later
// Asks for whole pixels, so that no provider has a reason to resample.
#include "processing/reading/providerterrain.h"

#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsrasterblock.h>
#include <qgsrasterdataprovider.h>

#include <limits>
#include <stdexcept>

namespace stillhead
{

  namespace
  {

    constexpr int BLOCK_PIXELS = 512;

    RasterGrid gridOf( const QgsRasterDataProvider &provider )
    {
      const int columns = provider.xSize();
      const int rows = provider.ySize();
      const QgsRectangle extent = provider.extent();
      if ( columns <= 0 || rows <= 0 || extent.isEmpty() )
        throw QgsProcessingException( Text::tr(
          "TERRAIN has no pixels of its own (a map picture?); choose a raster whose cells hold ground elevations." ) );
      return RasterGrid( columns, rows,
        { extent.xMinimum(), extent.width() / columns, 0.0, extent.yMaximum(), 0.0, -extent.height() / rows } );
    }

  } // namespace

  ProviderTerrain::ProviderTerrain( std::unique_ptr<QgsRasterDataProvider> provider, int band, double metresPerUnit )
    : mProvider( std::move( provider ) )
    , mBand( band )
    , mMetresPerUnit( metresPerUnit )
    , mGrid( gridOf( *mProvider ) )
  {
  }

  ProviderTerrain::~ProviderTerrain() = default;

  int ProviderTerrain::blockColumns() const
  {
    const int own = mProvider->xBlockSize();
    return own > 0 ? own : BLOCK_PIXELS;
  }

  int ProviderTerrain::blockRows() const
  {
    const int own = mProvider->yBlockSize();
    return own > 0 ? own : BLOCK_PIXELS;
  }

  void ProviderTerrain::read( int column, int row, int columns, int rows, double *elevationsM ) const
  {
    const std::array<double, 6> &g = mGrid.geoTransform();
    const QgsRectangle window(
      g[0] + column * g[1], g[3] + ( row + rows ) * g[5], g[0] + ( column + columns ) * g[1], g[3] + row * g[5] );
    const std::lock_guard<std::mutex> lock( mMutex );
    const std::unique_ptr<QgsRasterBlock> block( mProvider->block( mBand, window, columns, rows ) );
    if ( !block || !block->isValid() || block->width() != columns || block->height() != rows )
      throw std::runtime_error(
        Text::tr( "The terrain could not be read from its provider; check the connection and run again." )
          .toStdString() );
    const qgssize count = static_cast<qgssize>( columns ) * static_cast<qgssize>( rows );
    for ( qgssize i = 0; i < count; ++i )
    {
      bool isNoData = false;
      const double value = block->valueAndNoData( i, isNoData );
      elevationsM[i] = isNoData ? std::numeric_limits<double>::quiet_NaN() : value * mMetresPerUnit;
    }
  }

} // namespace stillhead
