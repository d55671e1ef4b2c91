// SPDX-License-Identifier: GPL-2.0-or-later
// A terrain row by row, from the top: read and converted on several threads, block by block, and taken in order by one.
#pragma once

#include "core/feedback/monitor.h"
#include "core/terrain/elevationsource.h"

#include <functional>

namespace stillhead
{

  //! Where the rows go. Nothing depends on the number of threads.
  struct RowStream
  {
      unsigned threads = 0; //!< 0: as many as the machine has cores
      //! Turns a whole row of grounds into what is wanted, in place; several rows at once.
      std::function<void( int row, double *values )> convert;
      //! Takes the rows in order, one at a time.
      std::function<void( int row, const double *values )> take;
  };

  //! Runs \a stream over the whole of \a terrain. \throws Cancelled, std::runtime_error
  void streamRows( const ElevationSource &terrain, const RowStream &stream, Monitor &monitor, double from, double to );

} // namespace stillhead
