// SPDX-License-Identifier: GPL-2.0-or-later
// The line that is drawn for a piece: its drawn vertices and only as many more as keep Z near the exact profile.
#pragma once

#include "core/job/staticjob.h"

#include <vector>

namespace stillhead
{

  //! A vertex of a result line.
  struct PieceVertex
  {
      double x = 0.0;
      double y = 0.0;
      double elevationM = 0.0; //!< of the pipe; NaN where there is none
      double pressurePa = 0.0; //!< static pressure of the high case; NaN where there is none
  };

  /**
   * Fills \a vertices with the line of \a piece in the direction in which it was drawn. The first and last vertex are the
   * piece's ends. Cleared first; its memory is reused.
   */
  void pieceLine(
    const StaticResult &result, const Piece &piece, double specificWeightNPerM3, std::vector<PieceVertex> &vertices );

} // namespace stillhead
