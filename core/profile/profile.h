// SPDX-License-Identifier: GPL-2.0-or-later
// Elevation of the pipe along a line, exact: between knots it is a quadratic, because a straight line over a bilinear
// cell is one. Knots stand at vertices and wherever the line crosses the lines through pixel centres.
#pragma once

#include <cstddef>
#include <vector>

namespace stillhead
{

  /**
   * Piece i runs from knot i to knot i + 1. With τ from 0 to 1 along it, elevation = (1 − τ)·z[i] + τ·z[i + 1] + bend[i]·τ·(τ − 1).
   * bend[i] is NaN where the piece has no elevation. The last knot's bend is 0 and unused.
   */
  struct Profile
  {
      std::vector<double> alongM;
      std::vector<double> elevationM;
      std::vector<double> bendM;

      std::size_t knots() const { return alongM.size(); }
  };

} // namespace stillhead
