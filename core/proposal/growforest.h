// SPDX-License-Identifier: GPL-2.0-or-later
// Grows a forest from a graph: bridges become legs, what has two ways becomes a body.
#pragma once

#include "core/proposal/forest.h"
#include "core/proposal/pipegraph.h"

#include <vector>

namespace stillhead
{

  //! Where a limb of a forest came from.
  struct LimbOrigin
  {
      std::vector<int> edges;   //!< of the graph
      std::vector<int> entries; //!< nodes at which water comes in
  };

  struct GrownForest
  {
      Forest forest;
      std::vector<LimbOrigin> origins; //!< of every limb
      std::vector<int>
        limbAt; //!< of every node: the limb at whose lower end or on which it lies; −1: a source, −2: not fed
  };

  //! A leg too short for its stubs holds a regulator in its middle.
  GrownForest growForest( const PipeGraph &graph );

} // namespace stillhead
