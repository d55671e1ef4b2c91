// SPDX-License-Identifier: GPL-2.0-or-later
// One sweep from the ends to the sources; what is behind a limb is let go once its parent has it.
#include "core/proposal/fewest.h"

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
          , mAbove( marked.forest.limbs.size() )
        {
        }

        FewestRegulators run()
        {
          const std::vector<Limb> &limbs = mMarked.forest.limbs;
          for ( std::size_t i = limbs.size(); i-- > 0; )
          {
            mLimb = static_cast<int>( i );
            mNow = Behind();
            for ( const int child : mMarked.children.of( mLimb ) )
              takeOver( mAbove[static_cast<std::size_t>( child )] );
            std::sort( mNow.topsM.begin(), mNow.topsM.end() );
            if ( limbs[i].loop )
            {
              joinBody( limbs[i] );
            }
            else
            {
              raiseNeed( mNow.needM );
              for ( std::size_t part = limbs[i].firstPart + limbs[i].partCount; part-- > limbs[i].firstPart; )
                climb( mMarked.forest.parts[part] );
            }
            passGate( limbs[i] );
            if ( limbs[i].parent < 0 )
              mResult.total += mNow.unregulated();
            mAbove[i] = std::move( mNow );
          }
          std::reverse( mResult.breaks.begin(), mResult.breaks.end() );
          std::reverse( mResult.tornBodies.begin(), mResult.tornBodies.end() );
          return std::move( mResult );
        }

      private:
        void takeOver( Behind &own )
        {
          mNow.needM = std::max( mNow.needM, own.needM );
          mNow.count += own.count;
          mNow.topsM.insert( mNow.topsM.end(), own.topsM.begin(), own.topsM.end() );
          own.topsM = {};
        }

        //! Tops below what is needed count for every level; returns how many there were.
        int raiseNeed( double needM )
        {
          mNow.needM = std::max( mNow.needM, needM );
          const auto first = std::lower_bound( mNow.topsM.begin(), mNow.topsM.end(), mNow.needM - SAME_LEVEL_M );
          const int below = static_cast<int>( first - mNow.topsM.begin() );
          mNow.count += below;
          mNow.topsM.erase( mNow.topsM.begin(), first );
          return below;
        }

        //! The first top that a regulator at \a elevationM can hold a level under.
        std::vector<double>::iterator firstTopAbove( double elevationM )
        {
          return std::lower_bound( mNow.topsM.begin(), mNow.topsM.end(), elevationM + LEAST_SET_M );
        }

        //! A regulator may stand at \a elevationM.
        void stand( double elevationM )
        {
          const auto first = firstTopAbove( elevationM );
          if ( first != mNow.topsM.end() )
            mNow.topsM.erase( first + 1, mNow.topsM.end() );
        }

        void addTop( double topM )
        {
          mNow.topsM.insert( std::upper_bound( mNow.topsM.begin(), mNow.topsM.end(), topM ), topM );
        }

        void noteBreak( const ForestPart &part, double elevationM )
        {
          mResult.breaks.push_back( { mLimb, part.alongAt( part.shareOf( elevationM ) ) } );
        }

        //! The upper end of \a part is taken at \a elevationM, its highest or lowest place so far.
        void take( const ForestPart &part, double elevationM, double ownM, bool asks, double alongM )
        {
          stand( elevationM );
          if ( asks && raiseNeed( elevationM + ownM ) > 0 )
            mResult.breaks.push_back( { mLimb, alongM } );
          if ( part.mend )
            addTop( elevationM + mRules.standM( part.role ) );
          stand( elevationM );
        }

        void climb( const ForestPart &part )
        {
          if ( !part.known )
            return;
          const bool asks = part.served || mNow.needM > NO_LEVEL_M;
          const double ownM = part.served ? mRules.leastM( part.role ) : 0.0;
          take( part, part.elevation.to, ownM, asks, part.toM );
          if ( part.elevation.from <= part.elevation.to )
          {
            take( part, part.elevation.from, ownM, asks, part.fromM );
            return;
          }
          // As the pipe climbs, the next top to come below what it asks, or below what a regulator on it can hold.
          const double highestM = part.elevation.from;
          const double reachM = asks ? ownM : LEAST_SET_M;
          double heightM = part.elevation.to;
          while ( asks || part.mend )
          {
            const auto top = asks ? mNow.topsM.begin() : firstTopAbove( heightM );
            if ( top == mNow.topsM.end() || highestM + reachM <= *top + SAME_LEVEL_M )
              break;
            heightM = std::max( heightM, *top - reachM );
            noteBreak( part, heightM );
            if ( asks )
            {
              ++mNow.count;
              mNow.topsM.erase( top );
            }
            if ( part.mend )
              addTop( heightM + mRules.standM( part.role ) );
            if ( asks )
              stand( heightM );
            else
              heightM += 2.0 * SAME_LEVEL_M;
          }
          if ( asks )
            mNow.needM = std::max( mNow.needM, highestM + ownM );
          stand( highestM );
        }

        void joinBody( const Limb &limb )
        {
          int counts = mNow.count;
          double topM = ANY_LEVEL_M;
          double needM = mNow.needM;
          for ( std::size_t i = limb.firstPart; i < limb.firstPart + limb.partCount; ++i )
          {
            const ForestPart &part = mMarked.forest.parts[i];
            needM = std::max( needM, needOf( part, false, mRules ).levelM );
            if ( part.mend )
              topM = std::min( topM, part.lowestM() + mRules.standM( part.role ) );
          }
          for ( const Inlet &inlet : limb.inlets )
            needM = std::max( needM, inlet.elevationM + LEAST_SET_M );
          // A cut through the body can serve all its legs and all its pipe at once.
          int forced = raiseNeed( needM );
          if ( topM < needM - SAME_LEVEL_M )
            forced = limb.loopCuts;
          else if ( topM < ANY_LEVEL_M )
            mNow.topsM.insert( std::upper_bound( mNow.topsM.begin(), mNow.topsM.end(), topM ),
              static_cast<std::size_t>( limb.loopCuts ), topM );
          const bool fromSource = limb.parent < 0 && limb.inlets.empty();
          if ( topM < needM - SAME_LEVEL_M || ( fromSource && topM < ANY_LEVEL_M ) )
            mResult.tornBodies.push_back( mLimb );
          forced = std::min( forced, limb.loopCuts );
          const std::size_t room = static_cast<std::size_t>( limb.loopCuts - forced );
          if ( mNow.topsM.size() > room )
            mNow.topsM.resize( room );
          mNow.count = counts + forced;
          if ( !limb.inlets.empty() )
          {
            mNow.count += static_cast<int>( limb.inlets.size() );
            mNow.topsM.clear();
          }
        }

        void passGate( const Limb &limb )
        {
          for ( double &topM : mNow.topsM )
            topM -= limb.boostHighM;
          if ( mNow.needM == NO_LEVEL_M )
            return;
          mNow.needM -= limb.boostLowM;
          raiseNeed( limb.wayM );
        }

        const MarkedForest &mMarked;
        const ProposalRules &mRules;
        std::vector<Behind> mAbove;
        FewestRegulators mResult;
        Behind mNow;
        int mLimb = -1;
    };
  } // namespace

  FewestRegulators fewestRegulators( const MarkedForest &marked, const ProposalRules &rules )
  {
    return Counter( marked, rules ).run();
  }

} // namespace stillhead
