// SPDX-License-Identifier: GPL-2.0-or-later
// GDAL's block cache is one for the whole process and by default 5 % of the machine's memory. A job of ours holds it
// down while it runs and gives it back, so that a host application keeps what it had. Somebody who set GDAL_CACHEMAX
// meant it: then, and where the cache is smaller already, nothing is changed.
#pragma once

#include <cstdint>

namespace stillhead
{

  class GdalCacheLimit
  {
    public:
      static constexpr std::int64_t DEFAULT_BYTES = 64 << 20;

      /**
       * From now on no limit is set below \a bytes: for rasters whose single blocks are so large that a smaller cache would
       * decode them again for every window. The cache is still never made larger than the host had it.
       */
      static void neverBelow( std::int64_t bytes );

      //! Jobs may overlap: the largest limit counts, and the cache is given back when the last of them ends.
      explicit GdalCacheLimit( std::int64_t bytes = DEFAULT_BYTES );
      ~GdalCacheLimit();
      GdalCacheLimit( const GdalCacheLimit & ) = delete;
      GdalCacheLimit &operator=( const GdalCacheLimit & ) = delete;
  };

} // namespace stillhead
