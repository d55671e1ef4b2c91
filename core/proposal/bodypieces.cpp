// SPDX-License-Identifier: GPL-2.0-or-later
// Floods from where water comes in, along pipe that is not low.
#include "core/proposal/bodypieces.h"

#include <algorithm>
#include <functional>
#include <queue>
#include <utility>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    class Sorter
    {
      public:
        Sorter( PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, const ProposalRules &rules )
          : mGraph( graph )
          , mGrown( grown )
          , mMarked( marked )
          , mRules( rules )
        {
        }

        BodyPieces run( int limb )
        {
          const Limb &body = mMarked.forest.limbs[index( limb )];
          const bool fromSource = body.parent < 0 && body.inlets.empty();
          mLevelM = fromSource ? ANY_LEVEL_M : mMarked.above[index( limb )].levelM + body.boostLowM;
          for ( const Inlet &inlet : body.inlets )
            mLevelM = std::max( mLevelM, inlet.elevationM + LEAST_SET_M );
          const LimbOrigin &origin = originOf( limb );
          for ( const int edge : origin.edges )
            takeApart( edge );
          findNeeds( limb );
          mAt.resize( index( mGraph.nodeCount ) );
          for ( std::size_t i = 0; i < mPieces.size(); ++i )
          {
            mAt[index( mPieces[i].fromNode )].push_back( i );
            mAt[index( mPieces[i].toNode )].push_back( i );
          }
          do
          {
            mWet = joinedWith( origin.entries, false );
            mFed = joinedWith( origin.entries, true );
          }
          while ( settleCutOff() );
          takeInEnclosed();
          chooseNodes( origin.entries );
          return { std::move( mPieces ), std::move( mLowNode ) };
        }

      private:
        const LimbOrigin &originOf( int limb ) const { return mGrown.origins[index( mMarked.given[index( limb )] )]; }

        //! Pipe of \a part below this elevation is low: it is over, and the level that the body needs is too much for it.
        double lowBelowM( const ForestPart &part ) const
        {
          if ( !part.known || part.leaveOver || hasNoWindow( part, mRules ) )
            return NO_LEVEL_M;
          return std::min( overBelowM( part, mMarked.forest, mRules ), mLevelM - mRules.standM( part.role ) );
        }

        void takeApart( int number )
        {
          const GraphEdge edge = mGraph.edges[index( number )];
          mPieces.emplace_back();
          mPieces.back().edge = number;
          mPieces.back().fromNode = edge.fromNode;
          for ( std::size_t p = edge.firstPart; p < edge.firstPart + edge.partCount; ++p )
          {
            const ForestPart &part = mGraph.parts[p];
            const double lowM = lowBelowM( part );
            const double dryM = mMarked.forest.zones[index( part.zone )].lowM;
            double shares[4] = { 0.0, 1.0, 1.0, 1.0 };
            int count = 1;
            for ( const double cutM : { lowM, dryM } )
            {
              if ( part.known && cutM > part.lowestM() + SAME_LEVEL_M && cutM < part.highestM() - SAME_LEVEL_M )
                shares[count++] = part.shareOf( cutM );
            }
            if ( count == 3 && shares[2] < shares[1] )
              std::swap( shares[1], shares[2] );
            shares[count] = 1.0;
            for ( int i = 0; i < count; ++i )
              append( count == 1 ? part : part.between( shares[i], shares[i + 1] ), lowM, dryM );
          }
          mPieces.back().toNode = edge.toNode;
        }

        void append( const ForestPart &part, double lowM, double dryM )
        {
          const double middleM = 0.5 * ( part.elevation.from + part.elevation.to );
          const bool low = part.known && middleM < lowM - 0.1 * SAME_LEVEL_M;
          const bool dry = part.known && middleM > dryM + SAME_LEVEL_M;
          if ( !mPieces.back().parts.empty() && ( low != mPieces.back().low || dry != mPieces.back().dry ) )
          {
            const int node = mGraph.nodeCount++;
            BodyPiece next;
            next.edge = mPieces.back().edge;
            next.fromNode = mPieces.back().toNode = node;
            next.fromJoint = mPieces.back().toJoint = false;
            mPieces.push_back( next );
          }
          mPieces.back().low = low;
          mPieces.back().dry = dry;
          mPieces.back().parts.push_back( part );
        }

        //! What hangs on the nodes, and what the low pipe stands.
        void findNeeds( int limb )
        {
          mNeedM.assign( index( mGraph.nodeCount ), NO_LEVEL_M );
          for ( const int child : mMarked.children.of( limb ) )
          {
            for ( const int node : originOf( child ).entries )
              mNeedM[index( node )] = std::max( mNeedM[index( node )], mMarked.above[index( child )].levelM );
          }
          for ( const BodyPiece &piece : mPieces )
          {
            for ( const ForestPart &part : piece.parts )
            {
              if ( piece.low )
                mStandM = std::min( mStandM, part.lowestM() + mRules.standM( part.role ) );
            }
          }
        }

        int otherEnd( const BodyPiece &piece, int node ) const
        {
          return piece.fromNode == node ? piece.toNode : piece.fromNode;
        }

        //! Nodes joined with \a open by pipe that is not low, and (unless \a throughDry) not dry.
        std::vector<bool> joinedWith( std::vector<int> open, bool throughDry ) const
        {
          std::vector<bool> joined( mAt.size(), false );
          for ( const int node : open )
            joined[index( node )] = true;
          while ( !open.empty() )
          {
            const int node = open.back();
            open.pop_back();
            for ( const std::size_t i : mAt[index( node )] )
            {
              const int other = otherEnd( mPieces[i], node );
              if ( mPieces[i].low || ( mPieces[i].dry && !throughDry ) || joined[index( other )] )
                continue;
              joined[index( other )] = true;
              open.push_back( other );
            }
          }
          return joined;
        }

        //! Deals with one place that is served only by way of low pipe; false if there is none left.
        bool settleCutOff()
        {
          for ( std::size_t start = 0; start < mAt.size(); ++start )
          {
            if ( mAt[start].empty() || mWet[start] )
              continue;
            const std::vector<bool> region = joinedWith( { static_cast<int>( start ) }, false );
            double needM = NO_LEVEL_M;
            bool enclosed = true;
            std::vector<std::size_t> own;
            for ( std::size_t node = 0; node < mAt.size(); ++node )
            {
              if ( !region[node] )
                continue;
              needM = std::max( needM, mNeedM[node] );
              enclosed = enclosed && !mFed[node];
              for ( const std::size_t i : mAt[node] )
              {
                if ( mPieces[i].low || mPieces[i].dry )
                  continue;
                own.push_back( i );
                for ( const ForestPart &part : mPieces[i].parts )
                  needM = std::max( needM, needOf( part, false, mRules ).levelM );
              }
            }
            if ( needM == NO_LEVEL_M )
              continue;
            if ( !enclosed || needM > mStandM + SAME_LEVEL_M )
            {
              if ( leaveWayTo( region ) )
                return true;
              continue;
            }
            for ( const std::size_t i : own )
              mPieces[i].low = true;
            if ( !own.empty() )
              return true;
          }
          return false;
        }

        //! What low pipe encloses and nobody needs goes with it.
        void takeInEnclosed()
        {
          for ( BodyPiece &piece : mPieces )
            piece.low = piece.low || !mFed[index( piece.fromNode )];
        }

        //! Leaves over the shortest low pipe by which water reaches \a goal; false if there is no such way.
        bool leaveWayTo( const std::vector<bool> &goal )
        {
          using Entry = std::pair<double, int>;
          std::priority_queue<Entry, std::vector<Entry>, std::greater<Entry>> open;
          std::vector<double> lengthM( mAt.size(), ANY_LEVEL_M );
          std::vector<std::size_t> by( mAt.size(), mPieces.size() );
          const auto reach = [&]( int node, double length, std::size_t piece ) {
            if ( length >= lengthM[index( node )] )
              return;
            lengthM[index( node )] = length;
            by[index( node )] = piece;
            open.push( { length, node } );
          };
          for ( std::size_t node = 0; node < mAt.size(); ++node )
          {
            if ( mWet[node] )
              reach( static_cast<int>( node ), 0.0, mPieces.size() );
          }
          while ( !open.empty() )
          {
            const auto [length, node] = open.top();
            open.pop();
            if ( length > lengthM[index( node )] )
              continue;
            if ( goal[index( node )] )
            {
              for ( int at = node; by[index( at )] < mPieces.size(); )
              {
                BodyPiece &piece = mPieces[by[index( at )]];
                at = otherEnd( piece, at );
                leaveOver( piece );
              }
              return true;
            }
            for ( const std::size_t i : mAt[index( node )] )
            {
              if ( mPieces[i].dry )
                continue;
              double ownM = 0.0;
              for ( const ForestPart &part : mPieces[i].parts )
                ownM += mPieces[i].low ? part.lengthM() : 0.0;
              reach( otherEnd( mPieces[i], node ), length + ownM, i );
            }
          }
          return false;
        }

        void leaveOver( BodyPiece &piece ) const
        {
          if ( !piece.low )
            return;
          piece.low = false;
          for ( ForestPart &part : piece.parts )
            part.leaveOver = true;
        }

        //! A node at which one piece that is not low ends among low ones is parted from them by one regulator if it is low too.
        void chooseNodes( const std::vector<int> &entries )
        {
          mLowNode.assign( mAt.size(), false );
          for ( std::size_t node = 0; node < mAt.size(); ++node )
          {
            const auto isLow = [&]( std::size_t piece ) { return mPieces[piece].low; };
            const auto low = std::count_if( mAt[node].begin(), mAt[node].end(), isLow );
            const auto rest = static_cast<std::ptrdiff_t>( mAt[node].size() ) - low;
            // A given device stays where it is: no cut can be made on it.
            const bool device = std::any_of( mAt[node].begin(), mAt[node].end(),
              [&]( std::size_t piece ) { return mPieces[piece].parts.empty() && !mPieces[piece].low; } );
            const bool entry = std::find( entries.begin(), entries.end(), static_cast<int>( node ) ) != entries.end();
            mLowNode[node] = !entry && !device && low > 0 && ( rest == 0 || ( rest == 1 && low > 1 ) )
              && mNeedM[node] <= mStandM + SAME_LEVEL_M;
          }
        }

        PipeGraph &mGraph;
        const GrownForest &mGrown;
        const MarkedForest &mMarked;
        const ProposalRules &mRules;
        double mLevelM = 0.0;         //!< what the body needs
        double mStandM = ANY_LEVEL_M; //!< what its low pipe stands
        std::vector<BodyPiece> mPieces;
        std::vector<std::vector<std::size_t>> mAt; //!< pieces at every node
        std::vector<double> mNeedM;
        std::vector<bool> mFed; //!< nodes that pipe which is not low joins with where water comes in
        std::vector<bool> mWet; //!< and water passes it
        std::vector<bool> mLowNode;
    };
  } // namespace

  BodyPieces sortBody(
    PipeGraph &graph, const GrownForest &grown, const MarkedForest &marked, int limb, const ProposalRules &rules )
  {
    return Sorter( graph, grown, marked, rules ).run( limb );
  }

} // namespace stillhead
