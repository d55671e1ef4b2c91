// SPDX-License-Identifier: GPL-2.0-or-later
// Sorts the pipe of a body that no single level suits: what is low and must be held lower, and what is not.
#pragma once

#include "core/proposal/growforest.h"
#include "core/proposal/marking.h"

#include <vector>

namespace stillhead
{

  //! A run of an edge's parts that are all low or all not, all dry or all not.
  struct BodyPiece
  {
      int edge = -1;
      int fromNode = -1;
      int toNode = -1;
      std::vector<ForestPart> parts;
      bool low = false;
      bool dry = false;      //!< above the static level of the low case: water does not pass
      bool fromJoint = true; //!< begins at a node of the graph, not within its edge
      bool toJoint = true;
  };

  struct BodyPieces
  {
      std::vector<BodyPiece> pieces;
      std::vector<bool> lowNode; //!< of every node: it lies in the low part
  };

  /**
   * Pieces of the body \a limb of \a marked; ends of pieces within an edge become new nodes of \a graph. Pipe that low pipe
   * encloses goes with it if it needs no more than that stands. What is served only by way of low pipe otherwise keeps that
   * way: the shortest low pipe on it is left over.
   */
  BodyPieces sortBody(
    PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, int limb, const ProposalRules &rules );

} // namespace stillhead
