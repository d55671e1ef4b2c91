// SPDX-License-Identifier: GPL-2.0-or-later
// Nodes joined by cuts are one.
#include "core/proposal/pipegraph.h"

#include "core/network/disjointsets.h"

namespace stillhead
{

  PipeGraph withoutCuts( const PipeGraph &graph )
  {
    DisjointSets sets( static_cast<std::size_t>( graph.nodeCount ) );
    for ( const GraphEdge &edge : graph.edges )
    {
      if ( edge.cut )
        sets.join( edge.fromNode, edge.toNode );
    }
    PipeGraph whole = graph;
    whole.edges.clear();
    for ( GraphEdge edge : graph.edges )
    {
      edge.fromNode = sets.find( edge.fromNode );
      edge.toNode = sets.find( edge.toNode );
      if ( !edge.cut )
        whole.edges.push_back( edge );
    }
    for ( int &source : whole.sources )
      source = sets.find( source );
    return whole;
  }

} // namespace stillhead
