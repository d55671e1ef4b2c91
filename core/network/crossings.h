// SPDX-License-Identifier: GPL-2.0-or-later
// Places where drawn lines cross or touch between their vertices, a line with itself included.
#pragma once

#include "core/network/legindex.h"

#include <vector>

namespace stillhead
{

  //! A crossing; lineA ≤ lineB, and alongA < alongB where a line crosses itself.
  struct Crossing
  {
      int lineA = -1;
      double alongA = 0.0;
      int lineB = -1;
      double alongB = 0.0;
      PlanPoint place;
  };

  /**
   * All crossings, sorted by lines and place, one for each place: hits nearer than \a toleranceM along both lines count
   * once (a crossing at a vertex is met by several legs). Legs that lie on each other do not cross, nor do
   * lines drawn twice, nor a line itself within \a toleranceM along it.
   */
  std::vector<Crossing> findCrossings(
    const CanonicalDrawing &drawing, const LegIndex &index, double toleranceM, unsigned threads, Monitor &monitor );

} // namespace stillhead
