// SPDX-License-Identifier: GPL-2.0-or-later
// Settles what lies past a summit, and tells of summits, of summits that cannot be ruled out, of pipe without source
// and of pipe without terrain.
#pragma once

#include "core/judgement/reach.h"
#include "core/network/canonicaldrawing.h"
#include "core/plan/finding.h"

#include <vector>

namespace stillhead
{

  //! Marks the pieces of fed zones that \a reach does not reach.
  void settleSummits( std::vector<Piece> &pieces, const std::vector<Zone> &zones, const Reach &reach );

  //! Findings `summit`, `summit unknown`, `no source` and `no terrain`, in the order of the pieces.
  void findSummitsAndGaps( const PieceGraph &graph, const CanonicalDrawing &drawing, const std::vector<Zone> &zones,
    const Reach &reach, std::vector<Finding> &findings );

} // namespace stillhead
