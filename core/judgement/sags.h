// SPDX-License-Identifier: GPL-2.0-or-later
// Summits and sags of mainlines: where air gathers and has to be let out, and where water and silt gather and have to be
// drained or blown out.
#pragma once

#include "core/judgement/piecegroups.h"
#include "core/judgement/stretch.h"
#include "core/network/canonicaldrawing.h"
#include "core/profile/turns.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  //! The least depth that is looked for: below it the ground's own grain would be all there is to find.
  constexpr double LEAST_SAG_DEPTH_M = 0.001;

  //! The fall and rise that counts where \a depthM is asked for; equal to it is enough, rounding set aside.
  double countedSagDepthM( double depthM );

  /**
   * The summits and sags of the mainlines whose \a turns are given, in the order of the spans and along them.
   *
   * What is looked at is the mainline as joined pipe, wherever features begin and end; laterals are left out. A summit is a place
   * - from which no way along mainlines leads to higher pipe without falling by the depth first, and
   * - from which the pipe falls by the depth on two sides at least: a dead end at the top of its pipe is none.
   * At a joint every mainline leg is a way and a side of its own: one that rises takes the summit up with it, one that neither rises
   * nor falls by the depth (a stub) changes nothing. A sag is the same upside down. Pipe without elevation ends the ways that lead
   * into it, as if the pipe ended there. Of a level top, and of tops equally high with less than the depth between them, one
   * place stands: the one with the least (x, y).
   *
   * So the answer depends on the pipe alone: not on order and direction of drawing, nor on where lines are split.
   *
   * \param turns of mainlines only, those of one span together and rises below \a depthM (counted) left out
   * \param depthM as countedSagDepthM() gives it
   */
  std::vector<Extreme> findSummitsAndSags( const PieceGraph &graph, const CanonicalDrawing &drawing, const Turns &turns,
    double depthM, const std::vector<Zone> &zones, double specificWeightNPerM3 );

} // namespace stillhead
