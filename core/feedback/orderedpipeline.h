// SPDX-License-Identifier: GPL-2.0-or-later
// Units of work done on several threads, their results taken in order by one at a time: what is written does not
// depend on the number of threads, and never more than a few results wait.
#pragma once

#include "core/feedback/monitor.h"

#include <cstddef>
#include <functional>

namespace stillhead
{

  //! What a pipeline does with its units; \a slot (below `places`) names the place that holds the result.
  struct OrderedPipeline
  {
      std::size_t units = 0;
      unsigned threads = 1;
      std::size_t places = 2; //!< Results that may be held at once; at least 1
      //! Makes the result of \a unit in \a slot; several at once, each in its own slot.
      std::function<void( std::size_t unit, std::size_t slot )> make;
      //! Takes the result of \a unit out of \a slot; units in rising order, one at a time, in any thread.
      std::function<void( std::size_t unit, std::size_t slot )> take;
  };

  /**
   * Runs the pipeline on this thread and helpers. Progress goes from \a from to \a to. The first exception (Cancelled included)
   * stops it and is rethrown once every thread has ended.
   */
  void runOrdered( const OrderedPipeline &pipeline, Monitor &monitor, double from, double to );

} // namespace stillhead
