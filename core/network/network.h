// SPDX-License-Identifier: GPL-2.0-or-later
// The drawn lines joined into a network: nodes where pipes end or meet, spans of pipe between them.
#pragma once

#include "core/network/drawing.h"
#include "core/plan/finding.h"

#include <vector>

namespace stillhead
{

  //! Where along a line (in canonical direction) something lies.
  struct PlaceOnLine
  {
      int line = -1;
      double alongM = 0.0;
  };

  enum class NodeKind
  {
    End,
    Joint,
    Source,
    Device
  };

  //! A place where pipes end or meet.
  struct Node
  {
      NodeKind kind = NodeKind::End;
      PlanPoint place;
      PlaceOnLine on;  //!< the pipe whose elevation the node has
      int degree = 0;  //!< ends of spans that meet here
      int device = -1; //!< what stands here, index into the devices given
  };

  //! Pipe of one line between two neighbouring nodes, from `fromM` to `toM` along the line.
  struct Span
  {
      int line = -1;
      double fromM = 0.0;
      double toM = 0.0;
      int fromNode = -1;
      int toNode = -1;
  };

  //! A device between two nodes at one place. Water passes from `fromNode` to `toNode` if at all.
  struct DeviceLink
  {
      int device = -1;
      int fromNode = -1;
      int toNode = -1;
      bool passes = true; //!< false for a closed valve
  };

  //! Spans are sorted by line and along it; both follow the canonical order of the drawing.
  struct Network
  {
      std::vector<Node> nodes;
      std::vector<Span> spans;
      std::vector<DeviceLink> links; //!< where devices part the network
  };

} // namespace stillhead
