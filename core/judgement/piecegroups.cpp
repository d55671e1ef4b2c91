// SPDX-License-Identifier: GPL-2.0-or-later
// Groups by union of touching pieces.
#include "core/judgement/piecegroups.h"

namespace stillhead
{

  PieceGraph::PieceGraph( const Network &network, const std::vector<Piece> &pieces )
    : mNetwork( network )
    , mPieces( pieces )
    , mAdjacency( network )
    , mFirst( network.spans.size() + 1, 0 )
  {
    for ( const Piece &piece : pieces )
      ++mFirst[static_cast<std::size_t>( piece.span ) + 1];
    for ( std::size_t i = 1; i < mFirst.size(); ++i )
      mFirst[i] += mFirst[i - 1];
  }

  void PieceGraph::piecesAt( int node, std::vector<int> &pieces ) const
  {
    pieces.clear();
    int before = -1;
    for ( const int span : mAdjacency.spansAt( node ) )
    {
      // A span that begins and ends here stands twice.
      if ( span == before )
        continue;
      before = span;
      const Span &pipe = mNetwork.spans[static_cast<std::size_t>( span )];
      if ( pipe.fromNode == node )
        pieces.push_back( firstOf( span ) );
      if ( pipe.toNode == node && ( pipe.fromNode != node || firstOf( span + 1 ) - 1 != firstOf( span ) ) )
        pieces.push_back( firstOf( span + 1 ) - 1 );
    }
  }

  DisjointSets PieceGraph::groups( const std::function<bool( int )> &belongs ) const
  {
    DisjointSets sets( mPieces.size() );
    visitPlaces( [&]( int, const std::vector<int> &here ) {
      int first = -1;
      for ( const int piece : here )
      {
        if ( !belongs( piece ) )
          continue;
        if ( first >= 0 )
          sets.join( first, piece );
        else
          first = piece;
      }
    } );
    return sets;
  }

  void PieceGraph::visitPlaces( const std::function<void( int, const std::vector<int> & )> &visit ) const
  {
    std::vector<int> here;
    for ( std::size_t i = 1; i < mPieces.size(); ++i )
    {
      if ( mPieces[i].span != mPieces[i - 1].span )
        continue;
      here = { static_cast<int>( i ) - 1, static_cast<int>( i ) };
      visit( -1, here );
    }
    for ( int node = 0; node < static_cast<int>( mNetwork.nodes.size() ); ++node )
    {
      piecesAt( node, here );
      visit( node, here );
    }
    std::vector<int> beyond;
    for ( const DeviceLink &link : mNetwork.links )
    {
      if ( !link.passes )
        continue;
      piecesAt( link.fromNode, here );
      piecesAt( link.toNode, beyond );
      here.insert( here.end(), beyond.begin(), beyond.end() );
      visit( link.fromNode, here );
    }
  }

} // namespace stillhead
