// SPDX-License-Identifier: GPL-2.0-or-later
// Where a piece and the node at its end are not both low or both not, the piece gets an end of its own and a cut between.
#include "core/proposal/bodycut.h"

#include "core/proposal/bodypieces.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    class Parter
    {
      public:
        Parter( PipeGraph &graph, const ProposalRules &rules )
          : mGraph( graph )
          , mRules( rules )
        {
        }

        void part( BodyPieces &body )
        {
          for ( BodyPiece &piece : body.pieces )
          {
            const GraphEdge edge = mGraph.edges[index( piece.edge )];
            if ( piece.parts.empty() )
              continue;
            const bool cutFrom = piece.low != body.lowNode[index( piece.fromNode )];
            const bool cutTo = piece.low != body.lowNode[index( piece.toNode )];
            GraphEdge own = edge;
            own.firstPart = mGraph.parts.size();
            own.partCount = piece.parts.size();
            mGraph.parts.insert( mGraph.parts.end(), piece.parts.begin(), piece.parts.end() );
            own.fromNode = cutFrom ? mGraph.nodeCount++ : piece.fromNode;
            own.toNode = cutTo ? mGraph.nodeCount++ : piece.toNode;
            own.stubFromM = cutFrom || !piece.fromJoint ? mRules.leastApartM() : edge.stubFromM;
            own.stubToM = cutTo || !piece.toJoint ? mRules.leastApartM() : edge.stubToM;
            const double startM = mGraph.parts[edge.firstPart].fromM;
            const double endM = mGraph.parts[edge.firstPart + edge.partCount - 1].toM;
            if ( cutFrom )
              addCut( piece, own, true, piece.fromNode, writable( piece.parts.front().fromM, startM, endM, edge ) );
            if ( cutTo )
              addCut( piece, own, false, piece.toNode, writable( piece.parts.back().toM, startM, endM, edge ) );
            mEdges.push_back( own );
          }
        }

        //! Puts the new edges in the place of \a old ones; devices in the body stay.
        void finish( const std::vector<int> &old )
        {
          std::vector<bool> gone( mGraph.edges.size(), false );
          for ( const int edge : old )
            gone[index( edge )] = mGraph.edges[index( edge )].partCount > 0;
          std::vector<GraphEdge> edges;
          for ( std::size_t i = 0; i < mGraph.edges.size(); ++i )
          {
            if ( !gone[i] )
              edges.push_back( mGraph.edges[i] );
          }
          edges.insert( edges.end(), mEdges.begin(), mEdges.end() );
          mGraph.edges = std::move( edges );
        }

      private:
        //! The place nearest to \a alongM on the edge from \a startM to \a endM where a regulator may be written.
        static double writable( double alongM, double startM, double endM, const GraphEdge &edge )
        {
          const double sign = endM < startM ? -1.0 : 1.0;
          const double lengthM = std::abs( endM - startM );
          if ( edge.stubFromM + edge.stubToM >= lengthM )
            return 0.5 * ( startM + endM );
          return startM + sign * std::clamp( sign * ( alongM - startM ), edge.stubFromM, lengthM - edge.stubToM );
        }

        //! A cut between the end of \a piece and \a node, with its regulator at \a alongM.
        void addCut( const BodyPiece &piece, const GraphEdge &own, bool atFrom, int node, double alongM )
        {
          const std::vector<ForestPart> &parts = piece.parts;
          const double sign = parts.back().toM < parts.front().fromM ? -1.0 : 1.0;
          GraphEdge cut;
          cut.cut = true;
          cut.inlet.on = { parts.front().line, alongM };
          setPlace( parts, atFrom, cut.inlet );
          // Water passes from what is not low to what is.
          const bool inward = piece.low == atFrom; // along the piece
          cut.inlet.againstLine = inward == ( sign < 0.0 );
          cut.fromNode = piece.low ? node : ( atFrom ? own.fromNode : own.toNode );
          cut.toNode = piece.low ? ( atFrom ? own.fromNode : own.toNode ) : node;
          mEdges.push_back( cut );
        }

        void setPlace( const std::vector<ForestPart> &parts, bool atFrom, Inlet &inlet ) const
        {
          const ForestPart *nearest = nullptr;
          double leastM = ANY_LEVEL_M;
          for ( const ForestPart &part : parts )
          {
            if ( !part.known )
              continue;
            const double low = std::min( part.fromM, part.toM );
            const double high = std::max( part.fromM, part.toM );
            const double offM = std::max( { 0.0, low - inlet.on.alongM, inlet.on.alongM - high } );
            if ( offM < leastM || ( offM == leastM && !atFrom ) )
            {
              nearest = &part;
              leastM = offM;
            }
          }
          if ( !nearest )
            return;
          const double lengthM = nearest->toM - nearest->fromM;
          const double share =
            lengthM != 0.0 ? std::clamp( ( inlet.on.alongM - nearest->fromM ) / lengthM, 0.0, 1.0 ) : 0.0;
          inlet.on.alongM = nearest->alongAt( share );
          inlet.elevationM = nearest->elevation.at( share );
          inlet.zone = nearest->zone;
          inlet.role = nearest->role;
        }

        PipeGraph &mGraph;
        const ProposalRules &mRules;
        std::vector<GraphEdge> mEdges;
    };

    void giveUp( PipeGraph &graph, const LimbOrigin &origin )
    {
      for ( const int edge : origin.edges )
      {
        const GraphEdge &own = graph.edges[index( edge )];
        for ( std::size_t p = own.firstPart; p < own.firstPart + own.partCount; ++p )
          graph.parts[p].leaveOver = true;
      }
    }
  } // namespace

  void cutBodies( PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, const std::vector<int> &torn,
    const ProposalRules &rules )
  {
    Parter parter( graph, rules );
    std::vector<int> gone;
    for ( const int limb : torn )
    {
      const LimbOrigin &origin = grown.origins[index( marked.given[index( limb )] )];
      if ( std::any_of(
             origin.edges.begin(), origin.edges.end(), [&]( int edge ) { return graph.edges[index( edge )].whole; } ) )
      {
        giveUp( graph, origin );
        continue;
      }
      BodyPieces body = sortBody( graph, grown, marked, limb, rules );
      const bool changed = std::any_of( body.pieces.begin(), body.pieces.end(), []( const BodyPiece &piece ) {
        return piece.low || std::any_of( piece.parts.begin(), piece.parts.end(), []( const ForestPart &part ) {
          return part.leaveOver;
        } );
      } );
      if ( changed )
      {
        parter.part( body );
        gone.insert( gone.end(), origin.edges.begin(), origin.edges.end() );
      }
      else
      {
        giveUp( graph, origin );
      }
    }
    parter.finish( gone );
  }

  void giveUpBodies(
    PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, const std::vector<int> &torn )
  {
    for ( const int limb : torn )
      giveUp( graph, grown.origins[index( marked.given[index( limb )] )] );
  }

} // namespace stillhead
