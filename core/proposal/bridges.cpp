// SPDX-License-Identifier: GPL-2.0-or-later
// One walk in depth with low points (Tarjan), without recursion; then one walk in breadth over the bridges.
#include "core/proposal/bridges.h"

#include <algorithm>
#include <cstddef>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    class BridgeFinder
    {
      public:
        BridgeFinder( int nodeCount, const std::vector<std::pair<int, int>> &edges, const std::vector<int> &roots )
          : mEdges( edges )
          , mRoot( nodeCount )
        {
          for ( const int root : roots )
            mEdges.push_back( { mRoot, root } );
          mFirst.assign( index( nodeCount ) + 2, 0 );
          for ( const auto &[a, b] : mEdges )
          {
            ++mFirst[index( a ) + 1];
            ++mFirst[index( b ) + 1];
          }
          for ( std::size_t i = 1; i < mFirst.size(); ++i )
            mFirst[i] += mFirst[i - 1];
          mAdjacent.resize( 2 * mEdges.size() );
          std::vector<std::size_t> next( mFirst.begin(), mFirst.end() - 1 );
          for ( std::size_t i = 0; i < mEdges.size(); ++i )
          {
            mAdjacent[next[index( mEdges[i].first )]++] = static_cast<int>( i );
            mAdjacent[next[index( mEdges[i].second )]++] = static_cast<int>( i );
          }
          mTree.isBridge.assign( mEdges.size(), false );
          mTree.bodyOf.assign( index( nodeCount ) + 1, -1 );
        }

        BridgeTree run( std::size_t edgeCount )
        {
          findBridges();
          number();
          mTree.bodyOf.pop_back();
          mTree.isBridge.resize( edgeCount );
          return std::move( mTree );
        }

      private:
        int otherEnd( int edge, int node ) const
        {
          const auto &[a, b] = mEdges[index( edge )];
          return a == node ? b : a;
        }

        void findBridges()
        {
          struct Visit
          {
              int node;
              int entry;
              std::size_t next;
          };
          std::vector<int> order( mTree.bodyOf.size(), -1 );
          std::vector<int> low( mTree.bodyOf.size(), 0 );
          int count = 0;
          std::vector<Visit> stack { { mRoot, -1, mFirst[index( mRoot )] } };
          order[index( mRoot )] = low[index( mRoot )] = count++;
          while ( !stack.empty() )
          {
            Visit &visit = stack.back();
            const std::size_t node = index( visit.node );
            if ( visit.next < mFirst[node + 1] )
            {
              const int edge = mAdjacent[visit.next++];
              if ( edge == visit.entry )
                continue;
              const int other = otherEnd( edge, visit.node );
              if ( order[index( other )] >= 0 )
              {
                low[node] = std::min( low[node], order[index( other )] );
                continue;
              }
              order[index( other )] = low[index( other )] = count++;
              stack.push_back( { other, edge, mFirst[index( other )] } );
              continue;
            }
            const Visit done = visit;
            stack.pop_back();
            if ( stack.empty() )
              break;
            const std::size_t parent = index( stack.back().node );
            low[parent] = std::min( low[parent], low[node] );
            if ( low[node] > order[parent] )
              mTree.isBridge[index( done.entry )] = true;
          }
        }

        //! Numbers bodies outwards and fills each as it is met.
        void number()
        {
          std::vector<std::pair<int, int>> open { { mRoot, -1 } }; // node, bridge
          std::vector<int> parents { -1 };
          std::vector<int> inBody;
          for ( std::size_t i = 0; i < open.size(); ++i )
          {
            const int body = static_cast<int>( mTree.entryEdge.size() );
            mTree.entryEdge.push_back( open[i].second );
            mTree.parentBody.push_back( parents[i] );
            inBody.assign( 1, open[i].first );
            mTree.bodyOf[index( open[i].first )] = body;
            for ( std::size_t k = 0; k < inBody.size(); ++k )
            {
              const int node = inBody[k];
              for ( std::size_t a = mFirst[index( node )]; a < mFirst[index( node ) + 1]; ++a )
              {
                const int edge = mAdjacent[a];
                const int other = otherEnd( edge, node );
                if ( mTree.bodyOf[index( other )] >= 0 )
                  continue;
                if ( mTree.isBridge[index( edge )] )
                {
                  open.push_back( { other, edge } );
                  parents.push_back( body );
                  continue;
                }
                mTree.bodyOf[index( other )] = body;
                inBody.push_back( other );
              }
            }
          }
        }

        std::vector<std::pair<int, int>> mEdges;
        int mRoot;
        std::vector<std::size_t> mFirst;
        std::vector<int> mAdjacent;
        BridgeTree mTree;
    };
  } // namespace

  BridgeTree bridgeTree( int nodeCount, const std::vector<std::pair<int, int>> &edges, const std::vector<int> &roots )
  {
    return BridgeFinder( nodeCount, edges, roots ).run( edges.size() );
  }

} // namespace stillhead
