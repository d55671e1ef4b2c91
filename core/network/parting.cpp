// SPDX-License-Identifier: GPL-2.0-or-later
// Nodes are split by handing one of their two span ends to a new node; directions come from one walk along the pipe
// from all sources at once.
#include "core/network/parting.h"

#include "core/network/adjacency.h"

#include <algorithm>
#include <cmath>
#include <functional>
#include <queue>
#include <tuple>
#include <utility>

namespace stillhead
{

  namespace
  {
    //! One end of a span at a node.
    struct SpanEnd
    {
        int span = -1;
        bool atFrom = false;
    };

    std::vector<SpanEnd> endsAt( const Network &network, const Adjacency &adjacency, int node )
    {
      std::vector<SpanEnd> ends;
      int before = -1;
      for ( const int span : adjacency.spansAt( node ) )
      {
        if ( span == before )
          continue;
        before = span;
        const Span &pipe = network.spans[static_cast<std::size_t>( span )];
        if ( pipe.toNode == node )
          ends.push_back( { span, false } );
        if ( pipe.fromNode == node )
          ends.push_back( { span, true } );
      }
      return ends;
    }

    Finding atAJoint( const CanonicalDrawing &drawing, const Network &network, const DevicePlace &place )
    {
      Finding finding;
      finding.code = FindingCode::DeviceAtAJoint;
      finding.place = network.nodes[static_cast<std::size_t>( place.node )].place;
      finding.line = drawing.lines[static_cast<std::size_t>( place.on.line )].drawn;
      finding.device = place.device;
      return finding;
    }

    //! Distance along the pipe from the nearest source, and in which order nodes are come to.
    std::vector<int> orderFromSources( const Network &network )
    {
      const Adjacency adjacency( network );
      std::vector<std::vector<int>> across( network.nodes.size() );
      for ( const DeviceLink &link : network.links )
      {
        if ( !link.passes )
          continue;
        across[static_cast<std::size_t>( link.fromNode )].push_back( link.toNode );
        across[static_cast<std::size_t>( link.toNode )].push_back( link.fromNode );
      }
      using Entry = std::tuple<double, int, int>; // distance, devices passed, node
      std::priority_queue<Entry, std::vector<Entry>, std::greater<Entry>> open;
      for ( std::size_t i = 0; i < network.nodes.size(); ++i )
      {
        if ( network.nodes[i].kind == NodeKind::Source )
          open.push( { 0.0, 0, static_cast<int>( i ) } );
      }
      std::vector<int> order( network.nodes.size(), -1 );
      int next = 0;
      while ( !open.empty() )
      {
        const auto [distance, passed, node] = open.top();
        open.pop();
        int &place = order[static_cast<std::size_t>( node )];
        if ( place >= 0 )
          continue;
        place = next++;
        for ( const int span : adjacency.spansAt( node ) )
        {
          const Span &pipe = network.spans[static_cast<std::size_t>( span )];
          open.push(
            { distance + pipe.toM - pipe.fromM, passed, pipe.fromNode == node ? pipe.toNode : pipe.fromNode } );
        }
        for ( const int other : across[static_cast<std::size_t>( node )] )
          open.push( { distance, passed + 1, other } );
      }
      return order;
    }
  } // namespace

  void partAtDevices( Network &network, const CanonicalDrawing &drawing, const std::vector<Device> &devices,
    const std::vector<DevicePlace> &places, std::vector<Finding> &findings )
  {
    const Adjacency adjacency( network );
    for ( const DevicePlace &place : places )
    {
      const Device &device = devices[static_cast<std::size_t>( place.device )];
      Node &node = network.nodes[static_cast<std::size_t>( place.node )];
      const bool isSource = node.kind == NodeKind::Source;
      const std::vector<SpanEnd> ends = endsAt( network, adjacency, place.node );
      const bool clear = node.device < 0 && ( isSource ? ends.size() == 1 : ends.size() <= 2 );
      if ( !clear && ( device.parts() || node.device >= 0 ) )
      {
        findings.push_back( atAJoint( drawing, network, place ) );
        continue;
      }
      node.device = place.device;
      if ( !isSource )
        node.kind = NodeKind::Device;
      if ( !device.parts() )
        continue;

      // The source keeps the old node; elsewhere the pipe that ends here first does.
      const SpanEnd handed = isSource ? ends.front() : ends.back();
      Node other = node;
      other.kind = NodeKind::Device;
      const int newNode = static_cast<int>( network.nodes.size() );
      if ( isSource || ends.size() == 2 )
      {
        Span &span = network.spans[static_cast<std::size_t>( handed.span )];
        ( handed.atFrom ? span.fromNode : span.toNode ) = newNode;
        other.degree = 1;
        --node.degree;
      }
      else
      {
        other.degree = 0;
      }
      network.nodes.push_back( other );
      network.links.push_back( { place.device, place.node, newNode, device.kind != DeviceKind::ClosedValve } );
    }
  }

  void directLinks( Network &network, const CanonicalDrawing &drawing, const std::vector<Device> &devices,
    const std::vector<DevicePlace> &places )
  {
    if ( network.links.empty() )
      return;
    const std::vector<int> order = orderFromSources( network );
    const Adjacency adjacency( network );
    for ( DeviceLink &link : network.links )
    {
      const Device &device = devices[static_cast<std::size_t>( link.device )];
      bool turn = false;
      if ( device.direction == DeviceDirection::FromTheSource )
      {
        const int from = order[static_cast<std::size_t>( link.fromNode )];
        const int to = order[static_cast<std::size_t>( link.toNode )];
        turn = to >= 0 && ( from < 0 || to < from );
      }
      else
      {
        const auto place =
          std::find_if( places.begin(), places.end(), [&]( const DevicePlace &p ) { return p.device == link.device; } );
        const CanonicalLine &line = drawing.lines[static_cast<std::size_t>( place->on.line )];
        // Water that passes along the canonical direction leaves the span that ends here.
        const bool along = ( device.direction == DeviceDirection::StartToEnd ) != line.reversed;
        const auto endsHere = [&]( int node ) {
          const std::vector<SpanEnd> ends = endsAt( network, adjacency, node );
          return std::any_of( ends.begin(), ends.end(), [&]( const SpanEnd &end ) {
            return network.spans[static_cast<std::size_t>( end.span )].line == place->on.line && !end.atFrom;
          } );
        };
        const auto beginsHere = [&]( int node ) {
          const std::vector<SpanEnd> ends = endsAt( network, adjacency, node );
          return std::any_of( ends.begin(), ends.end(), [&]( const SpanEnd &end ) {
            return network.spans[static_cast<std::size_t>( end.span )].line == place->on.line && end.atFrom;
          } );
        };
        const bool fromIsBefore = endsHere( link.fromNode ) || beginsHere( link.toNode );
        turn = fromIsBefore != along;
      }
      if ( turn )
        std::swap( link.fromNode, link.toNode );
    }
  }

} // namespace stillhead
