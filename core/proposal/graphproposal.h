// SPDX-License-Identifier: GPL-2.0-or-later
// The proposal for pipe as it is joined, loops and all.
#pragma once

#include "core/proposal/pipegraph.h"
#include "core/proposal/proposal.h"

namespace stillhead
{

  /**
   * Looped pipe is held at one level where one suits all of it; else its low part is fed through regulators at every inlet,
   * each counted. The bound stays true then, but it may be less than what any plan can reach: see FewestRegulators.
   */
  Proposal proposeOnGraph( PipeGraph graph, const ProposalRules &rules );

  /**
   * After a plan failed at \a places when it was tried: forbids cuts in the looped pipe there; if that is done already, in
   * all looped pipe; last, leaves over the pipe there (legs that coincide with others, on which no device stands plainly).
   * \returns false if nothing is left to give
   */
  bool giveWay( PipeGraph &graph, const std::vector<PlaceOnLine> &places );

} // namespace stillhead
