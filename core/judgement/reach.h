// SPDX-License-Identifier: GPL-2.0-or-later
// Where water at rest reaches in one case: only along pipe no higher than the static level.
#pragma once

#include "core/judgement/piecegroups.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  //! How surely water at rest reaches a place.
  enum class Reached : unsigned char
  {
    No,        //!< only across pipe above the static level
    Uncertain, //!< every way leads through pipe of unknown elevation
    Yes
  };

  struct Reach
  {
      std::vector<Reached> ofNode;
      std::vector<Reached> ofPiece;
  };

  //! True if \a piece of a fed zone lies above \a levelM; false where its elevation is unknown.
  bool liesAbove( const Piece &piece, double levelM );

  /**
   * Spreads water from the source nodes through the fed zones in the low case, through devices the way they pass. Pipe
   * without elevation lets it pass.
   */
  Reach lowCaseReach( const PieceGraph &graph, const std::vector<Zone> &zones );

} // namespace stillhead
