// SPDX-License-Identifier: GPL-2.0-or-later
// Runs numbered work on a few threads. Every item writes only into its own slot, so the result does not depend on
// the number of threads; an exception (Cancelled included) stops the rest and is rethrown to the caller.
#pragma once

#include "core/feedback/monitor.h"

#include <cstddef>
#include <functional>

namespace stillhead
{

  //! Work on items [first, last); \a worker tells the thread slot (0 to threads − 1), for per-thread handles.
  using RangeWork = std::function<void( std::size_t first, std::size_t last, unsigned worker )>;

  //! The number of threads used for \a requested (0: as many as the machine has cores).
  unsigned threadCount( unsigned requested );

  /**
   * Calls \a work over [0, \a count) in chunks of \a chunk items on \a threads threads, lowest chunks first.
   * Cancel is asked before every chunk; progress goes from \a from to \a to.
   */
  void parallelRanges( std::size_t count, std::size_t chunk, unsigned threads, Monitor &monitor, double from, double to,
    const RangeWork &work );

} // namespace stillhead
