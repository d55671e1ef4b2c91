// SPDX-License-Identifier: GPL-2.0-or-later
// Bodies are cut until each suits one level; then it is a proposal for a forest.
#include "core/proposal/graphproposal.h"

#include "core/proposal/bodycut.h"
#include "core/proposal/growforest.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {
    constexpr int MOST_ROUNDS = 32; //!< each parts a terrace from the one above it

    bool holds( const PipeGraph &graph, const GraphEdge &edge, const PlaceOnLine &place )
    {
      if ( edge.partCount == 0 || graph.parts[edge.firstPart].line != place.line )
        return false;
      const double fromM = graph.parts[edge.firstPart].fromM;
      const double toM = graph.parts[edge.firstPart + edge.partCount - 1].toM;
      return place.alongM >= std::min( fromM, toM ) && place.alongM <= std::max( fromM, toM );
    }

    //! Forbids cuts in bodies with an edge that is \a meant; false if all of them were forbidden before.
    template <typename Meant> bool keepBodiesWhole( PipeGraph &graph, Meant meant )
    {
      const GrownForest grown = growForest( graph );
      bool any = false;
      for ( std::size_t i = 0; i < grown.forest.limbs.size(); ++i )
      {
        const std::vector<int> &edges = grown.origins[i].edges;
        const auto edgeOf = [&]( int edge ) -> GraphEdge & { return graph.edges[static_cast<std::size_t>( edge )]; };
        if ( !grown.forest.limbs[i].loop
          || std::none_of( edges.begin(), edges.end(), [&]( int edge ) { return meant( edgeOf( edge ) ); } ) )
          continue;
        for ( const int edge : edges )
        {
          any = any || !edgeOf( edge ).whole;
          edgeOf( edge ).whole = true;
        }
      }
      return any;
    }

    //! Leaves all pipe over on edges that are \a meant; false if that changes nothing.
    template <typename Meant> bool leaveOver( PipeGraph &graph, Meant meant )
    {
      bool any = false;
      for ( const GraphEdge &edge : graph.edges )
      {
        if ( !meant( edge ) )
          continue;
        for ( std::size_t p = edge.firstPart; p < edge.firstPart + edge.partCount; ++p )
        {
          any = any || !graph.parts[p].leaveOver;
          graph.parts[p].leaveOver = true;
        }
      }
      return any;
    }
  } // namespace

  Proposal proposeOnGraph( PipeGraph graph, const ProposalRules &rules )
  {
    for ( int round = 0;; ++round )
    {
      const GrownForest grown = growForest( graph );
      const MarkedForest marked = markForest( grown.forest, rules );
      const FewestRegulators fewest = fewestRegulators( marked, rules );
      if ( fewest.tornBodies.empty() )
      {
        Proposal proposal = proposeMarked( marked, fewest, rules );
        // The bound is that of the pipe uncut; what was given up on the way is left aside.
        if ( round > 0 )
          proposal.bound =
            fewestRegulators( markForest( growForest( withoutCuts( graph ) ).forest, rules ), rules ).total;
        proposal.proven = proposal.rulesKept && static_cast<int>( proposal.regulators.size() ) == proposal.bound;
        return proposal;
      }
      if ( round < MOST_ROUNDS )
        cutBodies( graph, grown, marked, fewest.tornBodies, rules );
      else
        giveUpBodies( graph, grown, marked, fewest.tornBodies );
    }
  }

  bool giveWay( PipeGraph &graph, const std::vector<PlaceOnLine> &places )
  {
    const auto holdsAny = [&]( const GraphEdge &edge ) {
      return std::any_of(
        places.begin(), places.end(), [&]( const PlaceOnLine &place ) { return holds( graph, edge, place ); } );
    };
    return keepBodiesWhole( graph, holdsAny ) || keepBodiesWhole( graph, []( const GraphEdge & ) { return true; } )
      || leaveOver( graph, holdsAny );
  }

} // namespace stillhead
