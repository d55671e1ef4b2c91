// SPDX-License-Identifier: GPL-2.0-or-later
// Connected parts of the network.
#include "core/statics/zones.h"

#include "core/network/disjointsets.h"

#include <cmath>

namespace stillhead
{

  ZoneMap zonesOf( const Network &network )
  {
    DisjointSets sets( network.nodes.size() );
    for ( const Span &span : network.spans )
      sets.join( span.fromNode, span.toNode );

    ZoneMap zones;
    std::vector<int> ofSet( network.nodes.size(), -1 );
    const auto number = [&]( int node ) {
      int &zone = ofSet[static_cast<std::size_t>( sets.find( node ) )];
      if ( zone < 0 )
        zone = zones.count++;
      return zone;
    };
    for ( std::size_t i = 0; i < network.nodes.size(); ++i )
    {
      if ( network.nodes[i].kind == NodeKind::Source )
        number( static_cast<int>( i ) );
    }
    zones.ofNode.reserve( network.nodes.size() );
    for ( std::size_t i = 0; i < network.nodes.size(); ++i )
      zones.ofNode.push_back( number( static_cast<int>( i ) ) );
    zones.ofSpan.reserve( network.spans.size() );
    for ( const Span &span : network.spans )
      zones.ofSpan.push_back( zones.ofNode[static_cast<std::size_t>( span.fromNode )] );
    return zones;
  }

  double doubtPa( double terrainRmseM, double readingErrorPa, int terrainPlaces, double specificWeightNPerM3 )
  {
    constexpr double NORMAL_95 = 1.96;
    const double terrainPa = NORMAL_95 * terrainRmseM * specificWeightNPerM3;
    return std::sqrt( terrainPa * terrainPa * terrainPlaces + readingErrorPa * readingErrorPa );
  }

} // namespace stillhead
