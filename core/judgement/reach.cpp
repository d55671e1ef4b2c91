// SPDX-License-Identifier: GPL-2.0-or-later
// Two floods over the network, one along pipe that is known and low enough, one along pipe that may be; then every
// span is filled from both ends.
#include "core/judgement/reach.h"

#include "core/judgement/limits.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {
    enum class Way : unsigned char
    {
      Open,
      Unknown,
      Blocked
    };

    Way wayThrough( const Piece &piece, const std::vector<Zone> &zones )
    {
      if ( piece.state == State::NoTerrain )
        return Way::Unknown;
      return liesAbove( piece, zones[static_cast<std::size_t>( piece.zone )].levels.lowM ) ? Way::Blocked : Way::Open;
    }

    class Flood
    {
      public:
        Flood( const PieceGraph &graph, const std::vector<Zone> &zones )
          : mGraph( graph )
          , mZones( zones )
          , mBeyond( graph.network().nodes.size() )
        {
          for ( const DeviceLink &link : graph.network().links )
          {
            if ( link.passes )
              mBeyond[static_cast<std::size_t>( link.fromNode )].push_back( link.toNode );
          }
          mReach.ofNode.assign( graph.network().nodes.size(), Reached::No );
          mReach.ofPiece.assign( graph.pieces().size(), Reached::No );
        }

        Reach run()
        {
          std::vector<int> start;
          for ( std::size_t node = 0; node < mReach.ofNode.size(); ++node )
          {
            if ( mGraph.network().nodes[node].kind == NodeKind::Source )
              start.push_back( static_cast<int>( node ) );
          }
          spread( start, Reached::Yes, Way::Open );
          for ( std::size_t node = 0; node < mReach.ofNode.size(); ++node )
          {
            if ( mReach.ofNode[node] == Reached::Yes )
              start.push_back( static_cast<int>( node ) );
          }
          spread( start, Reached::Uncertain, Way::Unknown );
          for ( int span = 0; span < static_cast<int>( mGraph.network().spans.size() ); ++span )
            fill( span );
          return std::move( mReach );
        }

      private:
        Way worstOf( int span ) const
        {
          Way worst = Way::Open;
          for ( int piece = mGraph.firstOf( span ); piece < mGraph.firstOf( span + 1 ); ++piece )
            worst = std::max( worst, way( piece ) );
          return worst;
        }

        Way way( int piece ) const { return wayThrough( mGraph.pieces()[static_cast<std::size_t>( piece )], mZones ); }

        void spread( std::vector<int> open, Reached as, Way worstAllowed )
        {
          for ( const int node : open )
            raise( mReach.ofNode[static_cast<std::size_t>( node )], as );
          while ( !open.empty() )
          {
            const int node = open.back();
            open.pop_back();
            for ( const int next : mBeyond[static_cast<std::size_t>( node )] )
            {
              if ( mReach.ofNode[static_cast<std::size_t>( next )] >= as )
                continue;
              mReach.ofNode[static_cast<std::size_t>( next )] = as;
              open.push_back( next );
            }
            for ( const int span : mGraph.adjacency().spansAt( node ) )
            {
              const Span &pipe = mGraph.network().spans[static_cast<std::size_t>( span )];
              const int next = pipe.fromNode == node ? pipe.toNode : pipe.fromNode;
              if ( mReach.ofNode[static_cast<std::size_t>( next )] >= as || worstOf( span ) > worstAllowed )
                continue;
              mReach.ofNode[static_cast<std::size_t>( next )] = as;
              open.push_back( next );
            }
          }
        }

        static void raise( Reached &reached, Reached to ) { reached = std::max( reached, to ); }

        void fill( int span )
        {
          const Span &pipe = mGraph.network().spans[static_cast<std::size_t>( span )];
          const int first = mGraph.firstOf( span );
          const int last = mGraph.firstOf( span + 1 ) - 1;
          fillFrom( mReach.ofNode[static_cast<std::size_t>( pipe.fromNode )], first, last + 1, 1 );
          fillFrom( mReach.ofNode[static_cast<std::size_t>( pipe.toNode )], last, first - 1, -1 );
        }

        void fillFrom( Reached reached, int piece, int end, int step )
        {
          for ( ; piece != end && reached != Reached::No; piece += step )
          {
            const Way through = way( piece );
            if ( through == Way::Blocked )
              return;
            if ( through == Way::Unknown )
              reached = Reached::Uncertain;
            raise( mReach.ofPiece[static_cast<std::size_t>( piece )], reached );
          }
        }

        const PieceGraph &mGraph;
        const std::vector<Zone> &mZones;
        std::vector<std::vector<int>> mBeyond; //!< nodes behind the devices at each node
        Reach mReach;
    };
  } // namespace

  bool liesAbove( const Piece &piece, double levelM )
  {
    return piece.middleM - levelM > EQUAL_LEVEL_M;
  }

  Reach lowCaseReach( const PieceGraph &graph, const std::vector<Zone> &zones )
  {
    return Flood( graph, zones ).run();
  }

} // namespace stillhead
