// SPDX-License-Identifier: GPL-2.0-or-later
// Dijkstra from the source's node over spans; the last leg is cut where the place lies.
#include "core/job/waytoplace.h"

#include "core/network/adjacency.h"

#include <algorithm>
#include <cmath>
#include <queue>

namespace stillhead
{

  namespace
  {

    //! How a node was come to.
    struct Step
    {
        double distanceM = HUGE_VAL;
        int span = -1;
        int before = -1;
    };

    std::vector<Step> stepsFrom( int source, const Network &network )
    {
      const Adjacency adjacency( network );
      std::vector<Step> steps( network.nodes.size() );
      using Open = std::pair<double, int>;
      std::priority_queue<Open, std::vector<Open>, std::greater<Open>> open;
      steps[static_cast<std::size_t>( source )].distanceM = 0.0;
      open.push( { 0.0, source } );
      while ( !open.empty() )
      {
        const auto [distanceM, node] = open.top();
        open.pop();
        if ( distanceM > steps[static_cast<std::size_t>( node )].distanceM )
          continue;
        for ( const int number : adjacency.spansAt( node ) )
        {
          const Span &span = network.spans[static_cast<std::size_t>( number )];
          const int next = span.fromNode == node ? span.toNode : span.fromNode;
          const double nextM = distanceM + ( span.toM - span.fromM );
          if ( !( nextM < steps[static_cast<std::size_t>( next )].distanceM ) )
            continue;
          steps[static_cast<std::size_t>( next )] = { nextM, number, node };
          open.push( { nextM, next } );
        }
      }
      return steps;
    }

    int sourceNode( const Network &network )
    {
      for ( std::size_t i = 0; i < network.nodes.size(); ++i )
      {
        if ( network.nodes[i].kind == NodeKind::Source )
          return static_cast<int>( i );
      }
      return -1;
    }

    //! The span on which \a on lies, −1 for none.
    int spanOn( const Network &network, const PlaceOnLine &on )
    {
      for ( std::size_t i = 0; i < network.spans.size(); ++i )
      {
        const Span &span = network.spans[i];
        if ( span.line == on.line && on.alongM >= span.fromM && on.alongM <= span.toM )
          return static_cast<int>( i );
      }
      return -1;
    }

    //! Neighbouring legs of one line that run on in one direction become one.
    void append( std::vector<WayLeg> &way, const WayLeg &leg )
    {
      const bool joins = !way.empty() && way.back().line == leg.line && way.back().toM == leg.fromM
        && ( way.back().toM - way.back().fromM ) * ( leg.toM - leg.fromM ) >= 0.0;
      if ( joins )
        way.back().toM = leg.toM;
      else
        way.push_back( leg );
    }

  } // namespace

  std::vector<WayLeg> wayToPlace( const StaticResult &result, const PlaceOnLine &on )
  {
    const Network &network = result.network;
    const int source = sourceNode( network );
    const int last = spanOn( network, on );
    if ( source < 0 || last < 0 )
      return {};
    const std::vector<Step> steps = stepsFrom( source, network );
    const Span &span = network.spans[static_cast<std::size_t>( last )];
    const double byStartM = steps[static_cast<std::size_t>( span.fromNode )].distanceM + ( on.alongM - span.fromM );
    const double byEndM = steps[static_cast<std::size_t>( span.toNode )].distanceM + ( span.toM - on.alongM );
    if ( !std::isfinite( std::min( byStartM, byEndM ) ) )
      return {};

    std::vector<WayLeg> backwards;
    const bool byStart = byStartM <= byEndM;
    backwards.push_back( { on.line, byStart ? span.fromM : span.toM, on.alongM } );
    for ( int node = byStart ? span.fromNode : span.toNode; node != source; )
    {
      const Step &step = steps[static_cast<std::size_t>( node )];
      const Span &pipe = network.spans[static_cast<std::size_t>( step.span )];
      const bool forwards = pipe.fromNode == step.before;
      backwards.push_back( { pipe.line, forwards ? pipe.fromM : pipe.toM, forwards ? pipe.toM : pipe.fromM } );
      node = step.before;
    }
    std::vector<WayLeg> way;
    for ( auto leg = backwards.rbegin(); leg != backwards.rend(); ++leg )
      append( way, *leg );
    return way;
  }

} // namespace stillhead
