// SPDX-License-Identifier: GPL-2.0-or-later
// Which spans end at which node.
#pragma once

#include "core/network/network.h"

#include <cstddef>
#include <vector>

namespace stillhead
{

  //! Spans by node, in rising order; a span that begins and ends at one node stands there twice.
  class Adjacency
  {
    public:
      explicit Adjacency( const Network &network );

      //! A run of span numbers.
      struct Range
      {
          const int *first = nullptr;
          const int *last = nullptr;
          const int *begin() const { return first; }
          const int *end() const { return last; }
      };

      Range spansAt( int node ) const
      {
        const std::size_t n = static_cast<std::size_t>( node );
        return { mSpans.data() + mFirst[n], mSpans.data() + mFirst[n + 1] };
      }

    private:
      std::vector<std::size_t> mFirst;
      std::vector<int> mSpans;
  };

} // namespace stillhead
