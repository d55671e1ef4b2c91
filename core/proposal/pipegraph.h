// SPDX-License-Identifier: GPL-2.0-or-later
// Fed pipe as it is joined, loops and all: what a forest is grown from.
#pragma once

#include "core/proposal/forest.h"

#include <vector>

namespace stillhead
{

  /**
   * Pipe between two nodes, or (without parts) a given device that passes from its first node to its second. Parts are in
   * order from the first node, each with its end nearest to it first.
   */
  struct GraphEdge
  {
      int fromNode = -1;
      int toNode = -1;
      std::size_t firstPart = 0;
      std::size_t partCount = 0;
      double stubFromM = 0.0;  //!< a regulator is written no nearer than this to the first node
      double stubToM = 0.0;    //!< and to the second
      bool oneWay = false;     //!< a given device
      bool regulates = false;  //!< a given device that holds a level of its own beyond it
      double boostHighM = 0.0; //!< what a given booster adds
      double boostLowM = 0.0;
      double inletNeedM = NO_LEVEL_M; //!< what it needs at its inlet
      bool whole = false;             //!< looped pipe that must not be cut: a plan that did so failed
      bool cut = false;               //!< here a regulator must stand: `inlet`
      Inlet inlet;
  };

  struct PipeGraph
  {
      int nodeCount = 0;
      std::vector<int> sources; //!< nodes
      std::vector<GraphEdge> edges;
      std::vector<StaticLevels> zones;
      std::vector<ForestPart> parts;
  };

  //! \a graph with the ends of every cut joined again, as if no regulator stood there.
  PipeGraph withoutCuts( const PipeGraph &graph );

} // namespace stillhead
