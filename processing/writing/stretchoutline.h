// SPDX-License-Identifier: GPL-2.0-or-later
// The area drawn around a stretch: its pipe, widened by the same distance on the ground everywhere.
#pragma once

#include "processing/writing/resulttable.h"

namespace stillhead
{

  //! A polygon \a distanceM around the pipe of \a stretch. \a measure is the calling thread's own.
  QgsGeometry stretchOutline(
    const ResultContext &context, const Stretch &stretch, double distanceM, const PlanMeasure &measure );

} // namespace stillhead
