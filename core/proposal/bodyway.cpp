// SPDX-License-Identifier: GPL-2.0-or-later
// Nodes are reached in the order of the crest that leads to them.
#include "core/proposal/bodyway.h"

#include <algorithm>
#include <functional>
#include <map>
#include <queue>
#include <utility>

namespace stillhead
{

  namespace
  {
    class CrestFinder
    {
      public:
        CrestFinder( const PipeGraph &graph, const std::vector<int> &edges )
          : mGraph( graph )
          , mEdges( edges )
        {
          for ( const int edge : edges )
          {
            const GraphEdge &own = edgeOf( edge );
            mAt[own.fromNode].push_back( edge );
            if ( !own.oneWay )
              mAt[own.toNode].push_back( edge );
          }
        }

        void reach( const std::vector<int> &entries )
        {
          using Entry = std::pair<double, int>;
          std::priority_queue<Entry, std::vector<Entry>, std::greater<Entry>> open;
          for ( const int entry : entries )
            open.push( { NO_LEVEL_M, entry } );
          while ( !open.empty() )
          {
            const auto [crestM, node] = open.top();
            open.pop();
            if ( !mCrestM.emplace( node, crestM ).second )
              continue;
            for ( const int edge : mAt[node] )
            {
              const GraphEdge &own = edgeOf( edge );
              double highestM = crestM;
              for ( std::size_t p = own.firstPart; p < own.firstPart + own.partCount; ++p )
                highestM = crestOver( mGraph.parts[p], highestM );
              open.push( { highestM, own.fromNode == node ? own.toNode : own.fromNode } );
            }
          }
        }

        double highestNeeded( const std::vector<int> &goals ) const
        {
          double needM = NO_LEVEL_M;
          for ( const int goal : goals )
            raise( needM, crestTo( goal ) );
          for ( const int edge : mEdges )
          {
            const GraphEdge &own = edgeOf( edge );
            // Up to each part from the second node; the last entry is for the first part.
            std::vector<double> back( own.partCount );
            double crestM = crestTo( own.toNode );
            for ( std::size_t p = own.partCount; p-- > 0; )
            {
              back[p] = crestM;
              crestM = crestOver( mGraph.parts[own.firstPart + p], crestM );
            }
            crestM = crestTo( own.fromNode );
            for ( std::size_t p = 0; p < own.partCount; ++p )
            {
              const ForestPart &part = mGraph.parts[own.firstPart + p];
              if ( part.served )
                raise( needM, std::min( crestM, back[p] ) );
              crestM = crestOver( part, crestM );
            }
          }
          return needM;
        }

      private:
        const GraphEdge &edgeOf( int edge ) const { return mGraph.edges[static_cast<std::size_t>( edge )]; }

        static double crestOver( const ForestPart &part, double crestM )
        {
          return part.known ? std::max( crestM, part.highestM() ) : crestM;
        }

        double crestTo( int node ) const
        {
          const auto found = mCrestM.find( node );
          return found == mCrestM.end() ? ANY_LEVEL_M : found->second;
        }

        //! What is served but not to be reached this way (behind a device that passes the other way) asks nothing here.
        static void raise( double &needM, double crestM )
        {
          if ( crestM < ANY_LEVEL_M )
            needM = std::max( needM, crestM );
        }

        const PipeGraph &mGraph;
        const std::vector<int> &mEdges;
        std::map<int, std::vector<int>> mAt;
        std::map<int, double> mCrestM;
    };
  } // namespace

  double wayThrough( const PipeGraph &graph, const std::vector<int> &edges, const std::vector<int> &entries,
    const std::vector<int> &goals )
  {
    CrestFinder finder( graph, edges );
    finder.reach( entries );
    return finder.highestNeeded( goals );
  }

} // namespace stillhead
