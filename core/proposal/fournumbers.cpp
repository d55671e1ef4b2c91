// SPDX-License-Identifier: GPL-2.0-or-later
// One sweep from the ends to the sources.
#include "core/proposal/fournumbers.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {
    class Counter
    {
      public:
        Counter( const MarkedForest &marked, const ProposalRules &rules )
          : mMarked( marked )
          , mRules( rules )
        {
        }

        FewestRegulators run()
        {
          const std::vector<Limb> &limbs = mMarked.forest.limbs;
          mResult.above.resize( limbs.size() );
          for ( std::size_t i = limbs.size(); i-- > 0; )
          {
            mLimb = static_cast<int>( i );
            if ( limbs[i].loop )
            {
              joinBody( limbs[i] );
            }
            else
            {
              mNow = joint( mLimb, NO_LEVEL_M );
              for ( std::size_t part = limbs[i].firstPart + limbs[i].partCount; part-- > limbs[i].firstPart; )
                climb( mMarked.forest.parts[part] );
            }
            passGate( limbs[i] );
            mResult.above[i] = mNow;
          }
          for ( const int limb : mMarked.children.of( -1 ) )
            mResult.total += mResult.above[static_cast<std::size_t>( limb )].unregulated;
          std::reverse( mResult.breaks.begin(), mResult.breaks.end() );
          std::reverse( mResult.tornBodies.begin(), mResult.tornBodies.end() );
          return std::move( mResult );
        }

      private:
        //! What begins at the lower end of \a limb, at one level of at least \a needM.
        FourNumbers joint( int limb, double needM ) const
        {
          FourNumbers all;
          all.needM = needM;
          for ( const int child : mMarked.children.of( limb ) )
            all.needM = std::max( all.needM, mResult.above[static_cast<std::size_t>( child )].needM );
          for ( const int child : mMarked.children.of( limb ) )
          {
            const FourNumbers &own = mResult.above[static_cast<std::size_t>( child )];
            const bool apart = own.topM < all.needM - SAME_LEVEL_M;
            all.count += apart ? own.unregulated : own.count;
            all.unregulated += own.unregulated;
            if ( !apart )
              all.topM = std::min( all.topM, own.topM );
          }
          return all;
        }

        //! A level above topM can only be met by a regulator below: from here on the level makes no difference.
        void breakHere()
        {
          mNow.count = mNow.unregulated;
          mNow.topM = ANY_LEVEL_M;
        }

        void raiseNeed( double needM )
        {
          if ( needM > mNow.topM + SAME_LEVEL_M )
            breakHere();
          mNow.needM = std::max( mNow.needM, needM );
        }

        //! A regulator may stand at \a elevationM, if it can hold a level that suits all below.
        void stand( double elevationM )
        {
          if ( elevationM + LEAST_SET_M <= mNow.topM )
            mNow.unregulated = std::min( mNow.unregulated, 1 + mNow.count );
        }

        void mend( double elevationM, Role role )
        {
          mNow.topM = std::min( mNow.topM, elevationM + mRules.standM( role ) );
          mNow.unregulated = 1 + ( elevationM + LEAST_SET_M <= mNow.topM ? mNow.count : mNow.unregulated );
        }

        void noteBreak( const ForestPart &part, double elevationM )
        {
          const double share = elevationM <= part.lowestM() ? ( part.elevation.from <= part.elevation.to ? 0.0 : 1.0 )
                                                            : part.shareOf( elevationM );
          mResult.breaks.push_back( { mLimb, part.alongAt( share ) } );
        }

        void climb( const ForestPart &part )
        {
          if ( !part.known )
            return;
          const double ownM = part.served ? mRules.leastM( part.role ) : 0.0;
          const bool asks = part.served || mNow.needM > NO_LEVEL_M;
          if ( part.elevation.from <= part.elevation.to )
          {
            stand( part.elevation.to );
            if ( asks )
            {
              if ( part.elevation.to + ownM > mNow.topM + SAME_LEVEL_M )
                mResult.breaks.push_back( { mLimb, part.toM } );
              raiseNeed( part.elevation.to + ownM );
            }
            if ( part.mend )
              mend( part.elevation.from, part.role );
            stand( part.elevation.from );
            return;
          }
          stand( part.elevation.to );
          if ( part.mend )
            mend( part.elevation.to, part.role );
          while ( asks && part.elevation.from + ownM > mNow.topM + SAME_LEVEL_M )
          {
            const double breakM = std::max( mNow.topM - ownM, part.elevation.to );
            noteBreak( part, breakM );
            breakHere();
            if ( part.mend )
              mend( breakM, part.role );
          }
          if ( asks )
            mNow.needM = std::max( mNow.needM, part.elevation.from + ownM );
        }

        void joinBody( const Limb &limb )
        {
          FourNumbers own;
          for ( std::size_t i = limb.firstPart; i < limb.firstPart + limb.partCount; ++i )
          {
            const ForestPart &part = mMarked.forest.parts[i];
            own.needM = std::max( own.needM, needOf( part, false, mRules ).levelM );
            if ( part.mend )
              own.topM = std::min( own.topM, part.lowestM() + mRules.standM( part.role ) );
          }
          const FourNumbers legs = joint( mLimb, own.needM );
          mNow = legs;
          int counts = 0;
          for ( const int child : mMarked.children.of( mLimb ) )
            counts += mResult.above[static_cast<std::size_t>( child )].count;

          const bool fromSource = limb.parent < 0 && limb.inlets.empty();
          const bool torn = own.topM < mNow.needM - SAME_LEVEL_M;
          if ( torn || ( fromSource && own.topM < ANY_LEVEL_M ) )
            mResult.tornBodies.push_back( mLimb );
          // A cut through the body may serve several of its legs at once.
          mNow.count = counts + ( torn ? limb.loopCuts : std::min( limb.loopCuts, legs.count - counts ) );
          mNow.unregulated =
            counts + ( own.topM < ANY_LEVEL_M ? limb.loopCuts : std::min( limb.loopCuts, legs.unregulated - counts ) );
          mNow.topM = torn || legs.count - counts >= limb.loopCuts ? ANY_LEVEL_M : std::min( own.topM, legs.topM );
          if ( !limb.inlets.empty() )
          {
            mNow.count += static_cast<int>( limb.inlets.size() );
            mNow.unregulated = mNow.count;
            mNow.topM = ANY_LEVEL_M;
          }
        }

        void passGate( const Limb &limb )
        {
          if ( mNow.needM == NO_LEVEL_M )
          {
            mNow.topM -= limb.boostHighM;
            return;
          }
          mNow.needM -= limb.boostLowM;
          mNow.topM -= limb.boostHighM;
          raiseNeed( std::max( limb.wayM, mNow.needM ) );
        }

        const MarkedForest &mMarked;
        const ProposalRules &mRules;
        FewestRegulators mResult;
        FourNumbers mNow;
        int mLimb = -1;
    };
  } // namespace

  FewestRegulators fewestRegulators( const MarkedForest &marked, const ProposalRules &rules )
  {
    return Counter( marked, rules ).run();
  }

} // namespace stillhead
