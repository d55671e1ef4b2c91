// SPDX-License-Identifier: GPL-2.0-or-later
// Gathers stretches and worst places from the judged pieces.
#pragma once

#include "core/judgement/limits.h"
#include "core/judgement/piecegroups.h"
#include "core/judgement/stretch.h"
#include "core/network/canonicaldrawing.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  //! Stretches: over ones first, each kind with the one farthest beyond its limit first.
  std::vector<Stretch> findStretches( const PieceGraph &graph, const CanonicalDrawing &canonical,
    const Drawing &drawing, const std::vector<Zone> &zones, const Limits &limits );

  //! The worst place of every stretch, then the highest and lowest pressure of every fed zone.
  std::vector<Extreme> findExtremes(
    const PieceGraph &graph, const std::vector<Stretch> &stretches, const std::vector<Zone> &zones );

} // namespace stillhead
