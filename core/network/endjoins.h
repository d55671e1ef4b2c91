// SPDX-License-Identifier: GPL-2.0-or-later
// Which line ends meet: each other ("within tolerance" is carried on from end to end), or the interior of a line.
#pragma once

#include "core/network/disjointsets.h"
#include "core/network/groundscales.h"
#include "core/network/legindex.h"

#include <vector>

namespace stillhead
{

  //! An end that lies within the tolerance of a line's interior.
  struct Meeting
  {
      int end = -1;
      int line = -1;
      double alongM = 0.0;
      double distanceM = 0.0;
  };

  //! An end within the tolerance of a line of another system.
  struct SystemTouch
  {
      int end = -1;
      int line = -1;
  };

  //! Sets of ends that meet (element numbers are end numbers).
  DisjointSets joinEnds(
    const CanonicalDrawing &drawing, const GroundScales &scales, double toleranceM, Monitor &monitor );

  /**
   * Meetings of ends with interiors, sorted by end, line and place; one for each passage of the line through the
   * tolerance around the end. A passage that holds the line's own end is a meeting of ends, not of an interior.
   */
  std::vector<Meeting> meetInteriors( const CanonicalDrawing &drawing, const LegIndex &index,
    const GroundScales &scales, double toleranceM, unsigned threads, std::vector<SystemTouch> &touches,
    Monitor &monitor );

} // namespace stillhead
