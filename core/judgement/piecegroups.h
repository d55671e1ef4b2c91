// SPDX-License-Identifier: GPL-2.0-or-later
// Which pieces touch which: neighbours along a span, and all that end at one node.
#pragma once

#include "core/judgement/piece.h"
#include "core/network/adjacency.h"
#include "core/network/disjointsets.h"
#include "core/network/network.h"

#include <functional>
#include <vector>

namespace stillhead
{

  //! The pieces of a network, sorted by span, and how they hang together (across devices too, but for closed valves).
  class PieceGraph
  {
    public:
      PieceGraph( const Network &network, const std::vector<Piece> &pieces );

      const Network &network() const { return mNetwork; }
      const std::vector<Piece> &pieces() const { return mPieces; }
      const Adjacency &adjacency() const { return mAdjacency; }

      //! First piece of \a span; that of span + 1 is the one after its last.
      int firstOf( int span ) const { return mFirst[static_cast<std::size_t>( span )]; }

      //! Pieces that end at \a node.
      void piecesAt( int node, std::vector<int> &pieces ) const;

      //! Sets of pieces for which \a belongs is true that touch each other; the others stay alone.
      DisjointSets groups( const std::function<bool( int )> &belongs ) const;

      /**
       * Calls \a visit( node, pieces ) for every place where pieces end: at each node, at each device that lets water pass
       * (both sides together), and (node −1) at each cut within a span.
       */
      void visitPlaces( const std::function<void( int, const std::vector<int> & )> &visit ) const;

    private:
      const Network &mNetwork;
      const std::vector<Piece> &mPieces;
      Adjacency mAdjacency;
      std::vector<int> mFirst;
  };

} // namespace stillhead
