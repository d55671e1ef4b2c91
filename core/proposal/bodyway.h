// SPDX-License-Identifier: GPL-2.0-or-later
// Over which crests water must pass in looped pipe.
#pragma once

#include "core/proposal/pipegraph.h"

#include <vector>

namespace stillhead
{

  /**
   * The lowest level that reaches all served pipe of \a edges, and every node of \a goals, from the nodes of \a entries: of
   * all ways to a place water takes the one with the lowest crest. NO_LEVEL_M where nothing is served.
   */
  double wayThrough( const PipeGraph &graph, const std::vector<int> &edges, const std::vector<int> &entries,
    const std::vector<int> &goals );

} // namespace stillhead
