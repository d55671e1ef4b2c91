// SPDX-License-Identifier: GPL-2.0-or-later
// Says of a cut piece what it is: figures, band, truth fields and state.
#pragma once

#include "core/judgement/cutting.h"
#include "core/judgement/piece.h"

namespace stillhead
{

  /**
   * The piece of \a span that \a cut is, judged by pressure alone; whether water reaches it is settled later (settleSummits).
   * Because all of it lies between two neighbouring limits, any of its elevations decides; CutPiece::middleM is taken.
   */
  Piece judgedPiece( const CutPiece &cut, int span, int zoneNumber, const Zone &zone, Role role, const Limits &limits,
    double specificWeightNPerM3 );

  //! Marks a piece that water at rest does not reach in the low case (it lies past a summit).
  void markPastASummit( Piece &piece );

} // namespace stillhead
