// SPDX-License-Identifier: GPL-2.0-or-later
// Counted once, filled once.
#include "core/network/adjacency.h"

namespace stillhead
{

  Adjacency::Adjacency( const Network &network )
    : mFirst( network.nodes.size() + 1, 0 )
    , mSpans( network.spans.size() * 2 )
  {
    for ( const Span &span : network.spans )
    {
      ++mFirst[static_cast<std::size_t>( span.fromNode ) + 1];
      ++mFirst[static_cast<std::size_t>( span.toNode ) + 1];
    }
    for ( std::size_t i = 1; i < mFirst.size(); ++i )
      mFirst[i] += mFirst[i - 1];
    std::vector<std::size_t> next( mFirst.begin(), mFirst.end() - 1 );
    for ( std::size_t i = 0; i < network.spans.size(); ++i )
    {
      mSpans[next[static_cast<std::size_t>( network.spans[i].fromNode )]++] = static_cast<int>( i );
      mSpans[next[static_cast<std::size_t>( network.spans[i].toNode )]++] = static_cast<int>( i );
    }
  }

} // namespace stillhead
