// SPDX-License-Identifier: GPL-2.0-or-later
// A way along the pipe between two nodes, told as the lines it follows.
#pragma once

#include "core/network/network.h"

#include <functional>
#include <vector>

namespace stillhead
{

  /**
   * Canonical lines of the way with the fewest spans from \a fromNode to \a toNode, each once in a row; empty if there is none.
   * \param mayPass says for every link whether the way may lead through it, from its inlet to its outlet; unset: through none
   * \param reached receives whether there is a way at all (one without pipe has no lines)
   */
  std::vector<int> linesOfWay( const Network &network, int fromNode, int toNode,
    const std::function<bool( std::size_t link )> &mayPass, bool &reached );

} // namespace stillhead
