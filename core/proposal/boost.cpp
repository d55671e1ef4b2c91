// SPDX-License-Identifier: GPL-2.0-or-later
// From the source outwards over the tree of bridges. Moving a booster towards the source only ever adds pipe beyond it: what
// it must add grows, what it may add shrinks. So the first place that fits is the nearest to the source.
#include "core/proposal/boost.h"

#include "core/network/disjointsets.h"
#include "core/proposal/bridges.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    //! What pipe needs and stands, in pascals to be added to today's pressures.
    struct Beyond
    {
        double needPa = -std::numeric_limits<double>::infinity();
        double neededByM = 0.0;
        PlaceOnLine neededAt;
        double mayPa = std::numeric_limits<double>::infinity();
        double lowestM = 0.0;
        PlaceOnLine lowestAt;
        double shortM = 0.0;
        bool hasShort = false;

        void add( const Beyond &other )
        {
          if ( other.needPa > needPa )
          {
            needPa = other.needPa;
            neededByM = other.neededByM;
            neededAt = other.neededAt;
          }
          if ( other.mayPa < mayPa )
          {
            mayPa = other.mayPa;
            lowestM = other.lowestM;
            lowestAt = other.lowestAt;
          }
          shortM += other.shortM;
          hasShort = hasShort || other.hasShort;
        }
    };

    bool isShort( const ForestPart &part )
    {
      return part.known && !part.served;
    }

    class BoostPlanner
    {
      public:
        BoostPlanner( const PipeGraph &graph, const BoostRules &rules )
          : mGraph( graph )
          , mRules( rules )
          , mGroups( index( graph.nodeCount ) )
        {
          std::vector<std::pair<int, int>> ends;
          for ( const GraphEdge &edge : graph.edges )
          {
            ends.emplace_back( edge.fromNode, edge.toNode );
            if ( !edge.regulates )
              mGroups.join( edge.fromNode, edge.toNode );
          }
          mTree = bridgeTree( graph.nodeCount, ends, graph.sources );
          sumUp();
        }

        std::vector<ProposedBooster> run()
        {
          for ( std::size_t body = 0; body < mOwn.size(); ++body )
          {
            if ( !isRoot( static_cast<int>( body ) ) )
              continue;
            if ( mOwn[body].hasShort )
              atSource( mAll[body] );
            else
              mOpen.push_back( static_cast<int>( body ) );
          }
          for ( std::size_t next = 0; next < mOpen.size(); ++next )
          {
            const std::vector<int> children = mChildren[index( mOpen[next] )];
            for ( const int child : children )
              visit( child );
          }
          return std::move( mBoosters );
        }

      private:
        bool sameGroup( int a, int b ) const { return mGroups.find( a ) == mGroups.find( b ); }

        //! True if a source stands in \a body: no pipe leads into it.
        bool isRoot( int body ) const
        {
          const int entry = mTree.entryEdge[index( body )];
          return entry < 0 || index( entry ) >= mGraph.edges.size();
        }

        const GraphEdge &entryOf( int body ) const { return mGraph.edges[index( mTree.entryEdge[index( body )] )]; }

        //! The node by which \a body is entered; a source where none leads into it.
        int entryNode( int body ) const
        {
          if ( isRoot( body ) )
          {
            const auto own = std::find_if( mGraph.sources.begin(), mGraph.sources.end(),
              [&]( int source ) { return mTree.bodyOf[index( source )] == body; } );
            return own == mGraph.sources.end() ? mGraph.sources.front() : *own;
          }
          const GraphEdge &edge = entryOf( body );
          return mTree.bodyOf[index( edge.toNode )] == body ? edge.toNode : edge.fromNode;
        }

        //! Parts of the bridge into \a body, the one nearest the source first.
        std::vector<ForestPart> partsInto( int body ) const
        {
          const GraphEdge &edge = entryOf( body );
          const auto first = mGraph.parts.begin() + static_cast<std::ptrdiff_t>( edge.firstPart );
          std::vector<ForestPart> parts( first, first + static_cast<std::ptrdiff_t>( edge.partCount ) );
          if ( entryNode( body ) == edge.toNode )
            return parts;
          std::reverse( parts.begin(), parts.end() );
          for ( ForestPart &part : parts )
          {
            std::swap( part.fromM, part.toM );
            std::swap( part.elevation.from, part.elevation.to );
          }
          return parts;
        }

        Beyond of( const ForestPart &part ) const
        {
          Beyond own;
          if ( !part.known )
            return own;
          const StaticLevels &levels = mGraph.zones[index( part.zone )];
          const bool fromIsHigher = part.elevation.from >= part.elevation.to;
          own.neededByM = part.highestM();
          own.neededAt = { part.line, fromIsHigher ? part.fromM : part.toM };
          own.needPa =
            mRules.limits.leastFor( part.role ) - mRules.specificWeightNPerM3 * ( levels.lowM - own.neededByM );
          own.lowestM = part.lowestM();
          own.lowestAt = { part.line, fromIsHigher ? part.toM : part.fromM };
          own.mayPa = mRules.limits.mostFor( part.role ) - mRules.specificWeightNPerM3 * ( levels.highM - own.lowestM );
          own.hasShort = isShort( part );
          own.shortM = own.hasShort ? part.lengthM() : 0.0;
          return own;
        }

        //! True if a booster that leaves these beyond lifts nothing above MOST.
        bool fits( const Beyond &beyond ) const { return beyond.needPa + mRules.risePa <= beyond.mayPa; }

        void sumUp()
        {
          const std::size_t bodies = mTree.entryEdge.size();
          mOwn.resize( bodies );
          mAll.resize( bodies );
          mAnyShort.assign( bodies, false );
          mChildren.resize( bodies );
          for ( std::size_t i = 0; i < mGraph.edges.size(); ++i )
          {
            const GraphEdge &edge = mGraph.edges[i];
            const int body = mTree.bodyOf[index( edge.fromNode )];
            if ( body < 0 || mTree.isBridge[i] )
              continue;
            const int anchor = entryNode( body );
            for ( std::size_t p = edge.firstPart; p < edge.firstPart + edge.partCount; ++p )
            {
              if ( sameGroup( edge.fromNode, anchor ) )
                mOwn[index( body )].add( of( mGraph.parts[p] ) );
              mAnyShort[index( body )] = mAnyShort[index( body )] || isShort( mGraph.parts[p] );
            }
          }
          // Bodies are numbered outwards: children come after their parents.
          for ( std::size_t b = bodies; b-- > 0; )
          {
            const int body = static_cast<int>( b );
            mAll[b].add( mOwn[b] );
            if ( isRoot( body ) )
              continue;
            const std::size_t parent = index( mTree.parentBody[b] );
            mChildren[parent].push_back( body );
            Beyond through = mAll[b];
            bool anyShort = mAnyShort[b];
            for ( const ForestPart &part : partsInto( body ) )
            {
              through.add( of( part ) );
              anyShort = anyShort || isShort( part );
            }
            mAnyShort[parent] = mAnyShort[parent] || anyShort;
            if ( sameGroup( entryNode( body ), entryNode( static_cast<int>( parent ) ) ) )
              mAll[parent].add( through );
          }
          for ( std::vector<int> &children : mChildren )
            std::reverse( children.begin(), children.end() );
        }

        //! The bridge into \a body and, if no booster stands on it, what is beyond.
        void visit( int body )
        {
          const std::vector<ForestPart> parts = partsInto( body );
          // beyond[k]: from the start of part k on; the last: what lies beyond the bridge.
          std::vector<Beyond> beyond( parts.size() + 1, mAll[index( body )] );
          for ( std::size_t k = parts.size(); k-- > 0; )
          {
            beyond[k] = beyond[k + 1];
            beyond[k].add( of( parts[k] ) );
          }
          const bool anyShort = mAnyShort[index( body )] || beyond.front().hasShort;
          if ( !anyShort )
            return;
          if ( parts.empty() || !beyond.front().hasShort )
          {
            mOpen.push_back( body );
            return;
          }
          const auto firstShort = std::find_if( parts.begin(), parts.end(), isShort );
          const std::size_t limit = static_cast<std::size_t>( firstShort - parts.begin() );
          for ( std::size_t k = 0; k <= limit; ++k )
          {
            if ( fits( beyond[k] ) )
            {
              place( body, parts, k, k > 0 ? fittingShare( parts[k - 1], beyond[k] ) : 0.0, beyond[k], false );
              return;
            }
          }
          if ( firstShort != parts.end() || mOwn[index( body )].hasShort )
            place( body, parts, limit, 1.0, beyond[limit], true );
          else
            mOpen.push_back( body );
        }

        //! How far along \a part, before what is beyond its end, a booster fits first.
        double fittingShare( const ForestPart &part, const Beyond &beyond ) const
        {
          if ( !part.known )
            return 1.0;
          const StaticLevels &levels = mGraph.zones[index( part.zone )];
          const double gamma = mRules.specificWeightNPerM3;
          const Beyond whole = of( part );
          if ( part.elevation.to < part.elevation.from )
          {
            const double mayPa = std::min( beyond.mayPa, whole.mayPa );
            if ( beyond.needPa + mRules.risePa > mayPa )
              return 1.0;
            return part.shareOf(
              levels.lowM + ( mayPa - mRules.risePa - mRules.limits.leastFor( part.role ) ) / gamma );
          }
          const double needPa = std::max( beyond.needPa, whole.needPa );
          if ( needPa + mRules.risePa > beyond.mayPa )
            return 1.0;
          return part.shareOf( levels.highM + ( needPa + mRules.risePa - mRules.limits.mostFor( part.role ) ) / gamma );
        }

        /**
         * A booster before part \a k of the bridge into \a body, at \a share of the part before it; as near as the leg's plain
         * middle allows.
         */
        void place( int body, const std::vector<ForestPart> &parts, std::size_t k, double share, const Beyond &beyond,
          bool regulatorFollows )
        {
          const GraphEdge &edge = entryOf( body );
          const bool forward = entryNode( body ) == edge.toNode;
          const double startM = parts.front().fromM;
          const double endM = parts.back().toM;
          const double way = endM >= startM ? 1.0 : -1.0;
          const double lengthM = std::abs( endM - startM );
          const double atM = k == 0 ? startM : parts[k - 1].alongAt( share );
          double fromStartM = std::abs( atM - startM );
          const double stubUpM = forward ? edge.stubFromM : edge.stubToM;
          const double stubDownM = forward ? edge.stubToM : edge.stubFromM;
          fromStartM =
            stubUpM + stubDownM > lengthM ? 0.5 * lengthM : std::clamp( fromStartM, stubUpM, lengthM - stubDownM );
          ProposedBooster booster = figuresOf( beyond );
          booster.at = { parts.front().line, startM + way * fromStartM };
          booster.againstLine = way < 0.0;
          booster.role = parts.front().role;
          booster.zone = parts.front().zone;
          booster.elevationM = elevationAt( parts, booster.at.alongM );
          booster.regulatorFollows = regulatorFollows;
          mBoosters.push_back( booster );
        }

        static double elevationAt( const std::vector<ForestPart> &parts, double alongM )
        {
          for ( const ForestPart &part : parts )
          {
            const double share = part.toM == part.fromM ? 0.0 : ( alongM - part.fromM ) / ( part.toM - part.fromM );
            if ( share >= 0.0 && share <= 1.0 && part.known )
              return part.elevation.at( share );
          }
          return std::numeric_limits<double>::quiet_NaN();
        }

        ProposedBooster figuresOf( const Beyond &beyond ) const
        {
          ProposedBooster booster;
          booster.boostLowPa = std::max( 0.0, beyond.needPa );
          booster.boostPa = booster.boostLowPa + mRules.risePa;
          booster.shortM = beyond.shortM;
          booster.neededByM = beyond.neededByM;
          booster.neededAt = beyond.neededAt;
          booster.lowestM = beyond.lowestM;
          booster.lowestAt = beyond.lowestAt;
          return booster;
        }

        void atSource( const Beyond &beyond )
        {
          ProposedBooster booster = figuresOf( beyond );
          booster.atSource = true;
          booster.regulatorFollows = !fits( beyond );
          mBoosters.push_back( booster );
        }

        const PipeGraph &mGraph;
        BoostRules mRules;
        mutable DisjointSets mGroups; //!< nodes with no regulating device between
        BridgeTree mTree;
        std::vector<Beyond> mOwn; //!< looped pipe of every body
        std::vector<Beyond> mAll; //!< and all beyond it that a booster before it lifts
        std::vector<bool> mAnyShort;
        std::vector<std::vector<int>> mChildren;
        std::vector<int> mOpen;
        std::vector<ProposedBooster> mBoosters;
    };
  } // namespace

  std::vector<ProposedBooster> proposeBoosters( const PipeGraph &graph, const BoostRules &rules )
  {
    return BoostPlanner( graph, rules ).run();
  }

} // namespace stillhead
