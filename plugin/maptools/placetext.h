// SPDX-License-Identifier: GPL-2.0-or-later
// What is known of a place, in a few short lines: pressures, heights, and how far it is from the limits.
#pragma once

#include "core/job/placeprobe.h"
#include "processing/solvedplan.h"

#include <QString>

namespace stillhead
{

  //! A place on drawn pipe.
  QString pipePlaceText( const PlaceFigures &figures, const SolvedPlan &plan );

  //! A place where no pipe is drawn.
  QString groundPlaceText( const PlaceFigures &figures, const SolvedPlan &plan );

} // namespace stillhead
