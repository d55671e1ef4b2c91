// SPDX-License-Identifier: GPL-2.0-or-later
// The turns of a profile: where the pipe changes between rising and falling, exact as the profile is. Rises and falls too
// small to matter are left out in one pass, so that what is kept of a long line is short.
#pragma once

#include "core/network/network.h"
#include "core/profile/profile.h"

#include <cstddef>
#include <functional>
#include <vector>

namespace stillhead
{

  //! Pipe whose elevations differ by no more is level: what rounding makes of level ground, and far below any terrain.
  constexpr double LEVEL_PIPE_M = 1e-9;

  //! A place where the pipe turns, or where known pipe begins or ends.
  struct Turn
  {
      double alongM = 0.0; //!< along the line; of a level top or bottom the place that goes before the others
      double elevationM = 0.0;
  };

  //! Pipe of one span with known elevation throughout: turns [first, first + count), rising and falling by turns.
  struct TurnRun
  {
      int span = -1;
      std::size_t first = 0;
      std::size_t count = 0;
      bool fromNode = false; //!< it begins at the span's own beginning
      bool toNode = false;   //!< it ends at the span's own end
  };

  //! Turns of many spans.
  struct Turns
  {
      std::vector<Turn> turns;
      std::vector<TurnRun> runs;
  };

  //! True if the place at the first distance along the line goes before the one at the second; decides among level places.
  using GoesBefore = std::function<bool( double alongM, double otherAlongM )>;

  /**
   * Appends the turns of \a span (its number is \a number) on \a profile to \a turns. Gaps in the elevation of a millimetre and more
   * part the runs.
   *
   * A rise or fall of less than \a leastM between two greater ones is left out: whatever depends only on how far the pipe falls and
   * rises by \a leastM or more comes out the same. Linear in the pieces of the profile.
   */
  void appendTurns(
    const Profile &profile, int number, const Span &span, double leastM, const GoesBefore &goesBefore, Turns &turns );

} // namespace stillhead
