// SPDX-License-Identifier: GPL-2.0-or-later
// Counts who holds the cache down; only what we set ourselves is taken back.
#include "core/geo/gdalcachelimit.h"

#include <algorithm>
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
        std::int64_t least = 0;
    };

    Held &held()
    {
      static Held state;
      return state;
    }

    //! Raises what we set to \a bytes, if it is less.
    void raise( Held &state, std::int64_t bytes )
    {
      if ( state.set == 0 || state.set >= bytes || GDALGetCacheMax64() != state.set )
        return;
      state.set = std::min( bytes, state.before );
      GDALSetCacheMax64( state.set );
    }
  } // namespace

  void GdalCacheLimit::neverBelow( std::int64_t bytes )
  {
    Held &state = held();
    const std::lock_guard<std::mutex> lock( state.mutex );
    state.least = std::max( state.least, bytes );
    raise( state, state.least );
  }

  GdalCacheLimit::GdalCacheLimit( std::int64_t bytes )
  {
    Held &state = held();
    const std::lock_guard<std::mutex> lock( state.mutex );
    const std::int64_t wanted = std::max( bytes, state.least );
    if ( state.holders++ > 0 )
    {
      raise( state, wanted );
      return;
    }
    state.before = GDALGetCacheMax64();
    if ( state.before <= wanted || CPLGetConfigOption( "GDAL_CACHEMAX", nullptr ) )
      return;
    state.set = wanted;
    GDALSetCacheMax64( wanted );
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
