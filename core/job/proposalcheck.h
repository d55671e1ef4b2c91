// SPDX-License-Identifier: GPL-2.0-or-later
// Compares the pipe before and after a proposal: what is over that should not be, what has become short.
#pragma once

#include "core/job/proposaljob.h"

#include <vector>

namespace stillhead
{

  /**
   * Sets `verified` and `notMendedM` of \a result. Pipe within \a stubM of a node is not judged (a regulator is written no
   * nearer), nor the last FROM_GAP_M beside pipe without elevation.
   * \returns places where the plan fails, in canonical lines; empty if it holds
   */
  std::vector<PlaceOnLine> checkProposal( ProposalResult &result, double stubM );

} // namespace stillhead
