// SPDX-License-Identifier: GPL-2.0-or-later
// Breadth first, the way read back from the goal.
#include "core/network/way.h"

#include "core/network/adjacency.h"

#include <algorithm>
#include <deque>

namespace stillhead
{

  std::vector<int> linesOfWay( const Network &network, int fromNode, int toNode,
    const std::function<bool( std::size_t link )> &mayPass, bool &reached )
  {
    struct Step
    {
        int node = -2; //!< the node before; −2: not come to
        int span = -1;
    };
    const Adjacency adjacency( network );
    std::vector<std::vector<int>> beyond( network.nodes.size() );
    for ( std::size_t i = 0; mayPass && i < network.links.size(); ++i )
    {
      if ( mayPass( i ) )
        beyond[static_cast<std::size_t>( network.links[i].fromNode )].push_back( network.links[i].toNode );
    }
    std::vector<Step> steps( network.nodes.size() );
    steps[static_cast<std::size_t>( fromNode )].node = -1;
    std::deque<int> open { fromNode };
    const auto go = [&]( int from, int to, int span ) {
      Step &step = steps[static_cast<std::size_t>( to )];
      if ( step.node != -2 )
        return;
      step = { from, span };
      open.push_back( to );
    };
    while ( !open.empty() && steps[static_cast<std::size_t>( toNode )].node == -2 )
    {
      const int node = open.front();
      open.pop_front();
      for ( const int span : adjacency.spansAt( node ) )
      {
        const Span &pipe = network.spans[static_cast<std::size_t>( span )];
        go( node, pipe.fromNode == node ? pipe.toNode : pipe.fromNode, span );
      }
      for ( const int next : beyond[static_cast<std::size_t>( node )] )
        go( node, next, -1 );
    }
    reached = steps[static_cast<std::size_t>( toNode )].node != -2;
    std::vector<int> lines;
    for ( int node = toNode; reached && node >= 0; node = steps[static_cast<std::size_t>( node )].node )
    {
      const int span = steps[static_cast<std::size_t>( node )].span;
      if ( span < 0 )
        continue;
      const int line = network.spans[static_cast<std::size_t>( span )].line;
      if ( lines.empty() || lines.back() != line )
        lines.push_back( line );
    }
    std::reverse( lines.begin(), lines.end() );
    return lines;
  }

} // namespace stillhead
