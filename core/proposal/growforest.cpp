// SPDX-License-Identifier: GPL-2.0-or-later
// First what the sources feed, then, round by round, what is fed only by regulators that must stand: those inlets are the
// roots of a body of their own.
#include "core/proposal/growforest.h"

#include "core/proposal/bodyway.h"
#include "core/proposal/bridges.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    constexpr int NOT_FED = -2;

    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    ForestPart turned( ForestPart part )
    {
      std::swap( part.fromM, part.toM );
      std::swap( part.elevation.from, part.elevation.to );
      return part;
    }

    //! What a given device between two limbs adds, until the next limb takes it.
    struct Gate
    {
        double boostHighM = 0.0;
        double boostLowM = 0.0;
        double needM = NO_LEVEL_M;

        void add( const GraphEdge &device )
        {
          needM = std::max( needM, device.inletNeedM - boostLowM );
          boostHighM += device.boostHighM;
          boostLowM += device.boostLowM;
        }
    };

    class Grower
    {
      public:
        explicit Grower( const PipeGraph &graph )
          : mGraph( graph )
        {
          mGrown.forest.zones = graph.zones;
          mGrown.limbAt.assign( index( graph.nodeCount ), NOT_FED );
          for ( std::size_t i = 0; i < graph.edges.size(); ++i )
          {
            if ( graph.edges[i].cut )
              continue;
            mEdges.push_back( { graph.edges[i].fromNode, graph.edges[i].toNode } );
            mNumbers.push_back( static_cast<int>( i ) );
          }
        }

        GrownForest run()
        {
          grow( mGraph.sources, -1, {} );
          while ( growBehindCuts() )
          {
          }
          findWays();
          return std::move( mGrown );
        }

      private:
        const GraphEdge &edgeOf( int edge ) const { return mGraph.edges[index( mNumbers[index( edge )] )]; }

        void grow( const std::vector<int> &roots, int parentLimb, const std::vector<Inlet> &inlets )
        {
          const BridgeTree tree = bridgeTree( mGraph.nodeCount, mEdges, roots );
          const std::size_t bodies = tree.entryEdge.size();
          std::vector<std::vector<int>> inner( bodies );
          for ( std::size_t e = 0; e < mEdges.size(); ++e )
          {
            const int body = tree.bodyOf[index( mEdges[e].first )];
            if ( body >= 0 && !tree.isBridge[e] && tree.bodyOf[index( mEdges[e].second )] == body )
              inner[index( body )].push_back( static_cast<int>( e ) );
          }
          std::vector<int> limbOf( bodies, parentLimb );
          std::vector<Gate> gateOf( bodies );
          std::vector<int> entryNode( bodies, -1 );
          for ( std::size_t b = 0; b < bodies; ++b )
          {
            const int entry = tree.entryEdge[b];
            if ( b > 0 )
            {
              const std::size_t parent = index( tree.parentBody[b] );
              limbOf[b] = limbOf[parent];
              gateOf[b] = gateOf[parent];
              if ( index( entry ) >= mEdges.size() )
                entryNode[b] = roots[index( entry ) - mEdges.size()];
              else
                passBridge( entry, tree.bodyOf[index( mEdges[index( entry )].first )] == static_cast<int>( b ),
                  limbOf[b], gateOf[b], entryNode[b] );
            }
            if ( hasPipe( inner[b] ) || ( b == 0 && !inlets.empty() ) )
            {
              std::vector<int> entries = b == 0 ? roots : std::vector<int> { entryNode[b] };
              limbOf[b] = addBody( inner[b], limbOf[b], gateOf[b], entries );
              if ( b == 0 )
                mGrown.forest.limbs.back().inlets = inlets;
              gateOf[b] = {};
            }
          }
          for ( std::size_t node = 0; node < mGrown.limbAt.size(); ++node )
          {
            if ( tree.bodyOf[node] >= 0 )
              mGrown.limbAt[node] = limbOf[index( tree.bodyOf[node] )];
          }
        }

        bool hasPipe( const std::vector<int> &edges ) const
        {
          return std::any_of( edges.begin(), edges.end(), [&]( int edge ) { return edgeOf( edge ).partCount > 0; } );
        }

        //! \param turn the bridge's first node is its far end
        void passBridge( int edge, bool turn, int &limb, Gate &gate, int &entryNode )
        {
          const GraphEdge &bridge = edgeOf( edge );
          entryNode = turn ? bridge.fromNode : bridge.toNode;
          if ( bridge.partCount == 0 )
          {
            gate.add( bridge );
            return;
          }
          const int number = addLimb( limb, gate );
          Limb &own = mGrown.forest.limbs.back();
          std::vector<ForestPart> &parts = mGrown.forest.parts;
          for ( std::size_t p = 0; p < bridge.partCount; ++p )
          {
            const std::size_t part = turn ? bridge.firstPart + bridge.partCount - 1 - p : bridge.firstPart + p;
            parts.push_back( turn ? turned( mGraph.parts[part] ) : mGraph.parts[part] );
          }
          own.partCount = bridge.partCount;
          const double fromM = parts[own.firstPart].fromM;
          const double toM = parts.back().toM;
          const double lengthM = std::abs( toM - fromM );
          const double startM = turn ? bridge.stubToM : bridge.stubFromM;
          const double endM = turn ? bridge.stubFromM : bridge.stubToM;
          const double sign = toM < fromM ? -1.0 : 1.0;
          const bool room = startM + endM < lengthM;
          own.standFromM = fromM + sign * ( room ? startM : 0.5 * lengthM );
          own.standToM = room ? toM - sign * endM : own.standFromM;
          mGrown.origins.back().edges.push_back( mNumbers[index( edge )] );
          mGrown.origins.back().entries.push_back( turn ? bridge.toNode : bridge.fromNode );
          limb = number;
          gate = {};
        }

        int addLimb( int parent, const Gate &gate )
        {
          Limb limb;
          limb.parent = parent;
          limb.firstPart = mGrown.forest.parts.size();
          limb.boostHighM = gate.boostHighM;
          limb.boostLowM = gate.boostLowM;
          limb.wayM = gate.needM;
          mGrown.forest.limbs.push_back( limb );
          mGrown.origins.emplace_back();
          return static_cast<int>( mGrown.forest.limbs.size() ) - 1;
        }

        int addBody( const std::vector<int> &edges, int parent, const Gate &gate, const std::vector<int> &entries )
        {
          const int number = addLimb( parent, gate );
          Limb &limb = mGrown.forest.limbs.back();
          limb.loop = true;
          for ( const int edge : edges )
          {
            const GraphEdge &own = edgeOf( edge );
            // Round a device that passes one way only, one regulator may be enough.
            if ( own.oneWay )
              limb.loopCuts = 1;
            const auto first = mGraph.parts.begin() + static_cast<std::ptrdiff_t>( own.firstPart );
            mGrown.forest.parts.insert(
              mGrown.forest.parts.end(), first, first + static_cast<std::ptrdiff_t>( own.partCount ) );
            mGrown.origins.back().edges.push_back( mNumbers[index( edge )] );
          }
          limb.partCount = mGrown.forest.parts.size() - limb.firstPart;
          mGrown.origins.back().entries = entries;
          return number;
        }

        //! One round over the cuts; false if there was nothing left behind them.
        bool growBehindCuts()
        {
          for ( const GraphEdge &edge : mGraph.edges )
          {
            if ( !edge.cut || mGrown.limbAt[index( edge.fromNode )] == NOT_FED
              || mGrown.limbAt[index( edge.toNode )] != NOT_FED )
              continue;
            const std::vector<bool> reached = reachedFrom( edge.toNode );
            std::vector<int> roots;
            std::vector<Inlet> inlets;
            int parent = NOT_FED;
            for ( const GraphEdge &other : mGraph.edges )
            {
              const int from = other.cut ? mGrown.limbAt[index( other.fromNode )] : NOT_FED;
              if ( from == NOT_FED || !reached[index( other.toNode )] )
                continue;
              roots.push_back( other.toNode );
              inlets.push_back( other.inlet );
              parent = parent == NOT_FED ? from : commonLimb( parent, from );
            }
            std::sort( roots.begin(), roots.end() );
            roots.erase( std::unique( roots.begin(), roots.end() ), roots.end() );
            grow( roots, parent, inlets );
            return true;
          }
          return false;
        }

        std::vector<bool> reachedFrom( int start ) const
        {
          std::vector<std::vector<int>> next( mGrown.limbAt.size() );
          for ( const auto &[a, b] : mEdges )
          {
            next[index( a )].push_back( b );
            next[index( b )].push_back( a );
          }
          std::vector<bool> reached( mGrown.limbAt.size(), false );
          std::vector<int> open { start };
          reached[index( start )] = true;
          while ( !open.empty() )
          {
            const int node = open.back();
            open.pop_back();
            for ( const int other : next[index( node )] )
            {
              if ( reached[index( other )] )
                continue;
              reached[index( other )] = true;
              open.push_back( other );
            }
          }
          return reached;
        }

        //! The limb nearest the source's end that feeds both; a parent has a lower number than its children.
        int commonLimb( int a, int b ) const
        {
          while ( a != b )
          {
            int &lower = a > b ? a : b;
            lower = mGrown.forest.limbs[index( lower )].parent;
          }
          return a;
        }

        //! Lets every body ask for the level that must pass it if all that is served in it, or hangs on it, is to be reached.
        void findWays()
        {
          std::vector<Limb> &limbs = mGrown.forest.limbs;
          std::vector<bool> served( limbs.size(), false );
          std::vector<std::vector<int>> goals( limbs.size() );
          for ( std::size_t i = limbs.size(); i-- > 0; )
          {
            Limb &limb = limbs[i];
            const auto first = mGrown.forest.parts.begin() + static_cast<std::ptrdiff_t>( limb.firstPart );
            served[i] = !goals[i].empty()
              || std::any_of( first, first + static_cast<std::ptrdiff_t>( limb.partCount ),
                []( const ForestPart &part ) { return part.served; } );
            const LimbOrigin &origin = mGrown.origins[i];
            if ( limb.loop )
              limb.wayM =
                std::max( limb.wayM, wayThrough( mGraph, origin.edges, origin.entries, goals[i] ) - limb.boostLowM );
            if ( served[i] && limb.parent >= 0 )
              goals[index( limb.parent )].push_back( origin.entries.front() );
          }
        }

        const PipeGraph &mGraph;
        std::vector<std::pair<int, int>> mEdges; //!< without cuts
        std::vector<int> mNumbers;               //!< of mEdges in the graph
        GrownForest mGrown;
    };
  } // namespace

  GrownForest growForest( const PipeGraph &graph )
  {
    return Grower( graph ).run();
  }

} // namespace stillhead
