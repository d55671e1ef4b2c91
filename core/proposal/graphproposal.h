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

} // namespace stillhead
