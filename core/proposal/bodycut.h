// SPDX-License-Identifier: GPL-2.0-or-later
// Looped pipe that no single level suits is cut: regulators at every inlet between its low part and the rest.
#pragma once

#include "core/proposal/growforest.h"
#include "core/proposal/marking.h"

#include <vector>

namespace stillhead
{

  /**
   * Cuts the bodies \a torn (limbs of \a marked) in \a graph, from which \a grown was grown. A body in which nothing can be cut
   * is given up.
   */
  void cutBodies( PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, const std::vector<int> &torn,
    const ProposalRules &rules );

  //! Leaves over what is over in the bodies \a torn.
  void giveUpBodies(
    PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, const std::vector<int> &torn );

} // namespace stillhead
