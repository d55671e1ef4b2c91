// SPDX-License-Identifier: GPL-2.0-or-later
// Chunks are handed out by a counter; threads are joined before returning.
#include "core/feedback/parallel.h"

#include <algorithm>
#include <atomic>
#include <exception>
#include <mutex>
#include <thread>
#include <vector>

namespace stillhead
{

  unsigned threadCount( unsigned requested )
  {
    return requested > 0 ? requested : std::max( 1u, std::thread::hardware_concurrency() );
  }

  void parallelRanges( std::size_t count, std::size_t chunk, unsigned threads, Monitor &monitor, double from, double to,
    const RangeWork &work )
  {
    if ( count == 0 )
      return;
    chunk = std::max<std::size_t>( 1, chunk );
    std::atomic<std::size_t> next { 0 };
    std::atomic<bool> stop { false };
    std::mutex failureMutex;
    std::exception_ptr failure;

    const auto run = [&]( unsigned worker ) {
      try
      {
        while ( !stop )
        {
          const std::size_t first = next.fetch_add( chunk );
          if ( first >= count )
            break;
          stopIfCancelled( monitor );
          const std::size_t last = std::min( count, first + chunk );
          work( first, last, worker );
          if ( worker == 0 )
            monitor.progress( from + ( to - from ) * static_cast<double>( last ) / static_cast<double>( count ) );
        }
      }
      catch ( ... )
      {
        const std::lock_guard<std::mutex> lock( failureMutex );
        if ( !failure )
          failure = std::current_exception();
        stop = true;
      }
    };

    const std::size_t chunks = ( count + chunk - 1 ) / chunk;
    const unsigned used = static_cast<unsigned>( std::min<std::size_t>( threadCount( threads ), chunks ) );
    std::vector<std::thread> helpers;
    for ( unsigned worker = 1; worker < used; ++worker )
      helpers.emplace_back( run, worker );
    run( 0 );
    for ( std::thread &helper : helpers )
      helper.join();
    if ( failure )
      std::rethrow_exception( failure );
    monitor.progress( to );
  }

} // namespace stillhead
