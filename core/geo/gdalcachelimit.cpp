// SPDX-License-Identifier: GPL-2.0-or-later
// Counts who holds the cache down; only what we set ourselves is taken back.
#include "core/geo/gdalcachelimit.h"

#include <mutex>

#include <cpl_conv.h>
#include <gdal.h>

namespace stillhead
{

  namespace
  {
    struct Held
    {
        std::mutex mutex;
        int holders = 0;
        std::int64_t before = 0;
        std::int64_t set = 0; //!< 0: the cache was left alone
    };

    Held &held()
    {
      static Held state;
      return state;
    }
  } // namespace

  GdalCacheLimit::GdalCacheLimit( std::int64_t bytes )
  {
    Held &state = held();
    const std::lock_guard<std::mutex> lock( state.mutex );
    if ( state.holders++ > 0 || CPLGetConfigOption( "GDAL_CACHEMAX", nullptr ) )
      return;
    state.before = GDALGetCacheMax64();
    if ( state.before <= bytes )
      return;
    state.set = bytes;
    GDALSetCacheMax64( bytes );
  }

  GdalCacheLimit::~GdalCacheLimit()
  {
    Held &state = held();
    const std::lock_guard<std::mutex> lock( state.mutex );
    if ( --state.holders > 0 || state.set == 0 )
      return;
    if ( GDALGetCacheMax64() == state.set )
      GDALSetCacheMax64( state.before );
    state.set = 0;
  }

} // namespace stillhead
