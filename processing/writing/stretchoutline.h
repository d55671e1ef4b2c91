// SPDX-License-Identifier: GPL-2.0-or-later
// The areas drawn around stretches: their pipe, widened by the same distance on the ground everywhere.
#pragma once

#include "core/feedback/monitor.h"
#include "processing/writing/resulttable.h"

#include <vector>

namespace stillhead
{

  /**
   * One polygon for each stretch of \a context, \a distanceM around its pipe, made on all threads. Progress goes from 0 to 1.
   * \throws Cancelled
   */
  std::vector<QgsGeometry> stretchOutlines( const ResultContext &context, double distanceM, Monitor &monitor );

  //! 10 ft, or 3 m where lengths are in metres.
  double outlineDistanceM( LengthUnit unit );

} // namespace stillhead
