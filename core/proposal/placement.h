// SPDX-License-Identifier: GPL-2.0-or-later
// Where on its leg a regulator stands best, and how far it may be moved with the same setting.
#pragma once

#include "core/proposal/planview.h"

namespace stillhead
{

  /**
   * Moves every regulator of \a view to the place and level on its leg with the largest least of three margins: MOST less its
   * high inlet, lowest low pressure of its zone less LEAST, MOST less highest high pressure of its zone. The plan keeps what
   * it kept.
   */
  void improvePlan( PlanView &view );

  //! Distances along the line between which the regulator of \a reach may stand with the same setting.
  struct PlaceRange
  {
      double fromM = 0.0; //!< nearest the source
      double toM = 0.0;
  };

  PlaceRange placeRange( const PlanView &view, const LegReach &reach );

} // namespace stillhead
