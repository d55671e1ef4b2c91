// SPDX-License-Identifier: GPL-2.0-or-later
// Takes a graph apart at its bridges: what is left are bodies in which every two nodes are joined by two ways.
#pragma once

#include <utility>
#include <vector>

namespace stillhead
{

  struct BridgeTree
  {
      std::vector<int> bodyOf;     //!< of every node; −1: not reached
      std::vector<bool> isBridge;  //!< every edge
      std::vector<int> entryEdge;  //!< of every body: the bridge by which it is reached; −1 for body 0, the roots'
      std::vector<int> parentBody; //!< −1 for body 0
  };

  /**
   * Bodies reached from \a roots, which count as joined with each other, so that pipe between two of them is looped. Bodies
   * are numbered from the roots' outwards.
   */
  BridgeTree bridgeTree( int nodeCount, const std::vector<std::pair<int, int>> &edges, const std::vector<int> &roots );

} // namespace stillhead
