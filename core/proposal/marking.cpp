// SPDX-License-Identifier: GPL-2.0-or-later
// One sweep from the ends of the pipe up to the sources: what a place needs is known once all behind it is.
#include "core/proposal/marking.h"

#include <algorithm>
#include <cmath>
#include <tuple>

namespace stillhead
{

  namespace
  {
    //! With less than this between LEAST and MOST − rise no setting serves sloping pipe: it would take a regulator every few steps.
    constexpr double LEAST_WINDOW_M = 0.01;

    //! Pipe that stands no set pressure at all cannot be mended.
    constexpr double LEAST_STAND_M = 10.0 * LEAST_SET_M;

    class Marker
    {
      public:
        Marker( const Forest &forest, const ProposalRules &rules )
          : mGiven( forest )
          , mRules( rules )
        {
        }

        MarkedForest run()
        {
          order();
          mMarked.children = Children( mMarked.forest.limbs );
          sweep();
          return std::move( mMarked );
        }

      private:
        const ForestPart *firstPartOf( const Limb &limb ) const
        {
          return limb.partCount ? &mGiven.parts[limb.firstPart] : nullptr;
        }

        //! Parents first, siblings by where they begin.
        void order()
        {
          const Children children( mGiven.limbs );
          const auto key = [&]( int limb ) {
            const ForestPart *part = firstPartOf( mGiven.limbs[static_cast<std::size_t>( limb )] );
            return part ? std::make_tuple( part->line, part->fromM, part->toM ) : std::make_tuple( -1, 0.0, 0.0 );
          };
          std::vector<int> &order = mMarked.given;
          order.reserve( mGiven.limbs.size() );
          std::vector<Limb> &limbs = mMarked.forest.limbs;
          limbs.reserve( mGiven.limbs.size() );
          const auto append = [&]( int parent, int newParent ) {
            const Children::Range range = children.of( parent );
            std::vector<int> sorted( range.begin(), range.end() );
            std::sort( sorted.begin(), sorted.end(), [&]( int a, int b ) { return key( a ) < key( b ); } );
            for ( const int limb : sorted )
            {
              order.push_back( limb );
              limbs.push_back( mGiven.limbs[static_cast<std::size_t>( limb )] );
              limbs.back().parent = newParent;
            }
          };
          append( -1, -1 );
          for ( std::size_t i = 0; i < order.size(); ++i )
            append( order[i], static_cast<int>( i ) );
        }

        void sweep()
        {
          std::vector<Limb> &limbs = mMarked.forest.limbs;
          mMarked.forest.zones = mGiven.zones;
          mMarked.forest.parts.reserve( mGiven.parts.size() );
          mMarked.below.assign( limbs.size(), Need() );
          mMarked.above.assign( limbs.size(), Need() );
          mMarked.mustMend.assign( limbs.size(), false );
          for ( std::size_t i = limbs.size(); i-- > 0; )
          {
            mAny = mMarked.mustMend[i];
            mNeed = mMarked.below[i];
            const std::size_t first = mMarked.forest.parts.size();
            const std::size_t firstExcused = mMarked.excused.size();
            mLimb = static_cast<int>( i );
            if ( limbs[i].loop )
              markLoop( limbs[i] );
            else
              markLeg( limbs[i] );
            std::reverse(
              mMarked.forest.parts.begin() + static_cast<std::ptrdiff_t>( first ), mMarked.forest.parts.end() );
            std::reverse(
              mMarked.excused.begin() + static_cast<std::ptrdiff_t>( firstExcused ), mMarked.excused.end() );
            limbs[i].firstPart = first;
            limbs[i].partCount = mMarked.forest.parts.size() - first;
            mMarked.above[i] = needAbove( limbs[i], mNeed );
            mMarked.mustMend[i] = mAny;
            if ( limbs[i].parent >= 0 )
            {
              const std::size_t parent = static_cast<std::size_t>( limbs[i].parent );
              mMarked.below[parent].raise( mMarked.above[i] );
              mMarked.mustMend[parent] = mMarked.mustMend[parent] || mAny;
            }
          }
        }

        void markLeg( const Limb &limb )
        {
          for ( std::size_t i = limb.firstPart + limb.partCount; i-- > limb.firstPart; )
          {
            const ForestPart &part = mGiven.parts[i];
            const Need own = needOf( part, mNeed.any(), mRules );
            // Where the part's highest place is its downstream end, it lies behind all of the part.
            if ( part.elevation.to >= part.elevation.from )
              mNeed.raise( own );
            mark( part, mNeed, own );
            mNeed.raise( own );
          }
        }

        //! Water has a second way to anything in a body and behind it, so only the place's own need excuses it.
        void markLoop( const Limb &limb )
        {
          bool behind = mNeed.any();
          Need all = mNeed;
          for ( std::size_t i = limb.firstPart + limb.partCount; i-- > limb.firstPart; )
          {
            const Need own = needOf( mGiven.parts[i], false, mRules );
            mark( mGiven.parts[i], Need(), own );
            all.raise( own );
            behind = behind || own.any();
          }
          mNeed = all;
        }

        void mark( const ForestPart &part, const Need &behind, const Need &own )
        {
          if ( !part.known )
          {
            mMarked.forest.parts.push_back( part );
            return;
          }
          const double overBelow = overBelowM( part, mGiven, mRules );
          const bool ownFault = part.leaveOver || hasNoWindow( part, mRules );
          const double mendFromM = behind.levelM - mRules.standM( part.role );

          double shares[4] = { 0.0, 1.0, 1.0, 1.0 };
          int count = 1;
          for ( const double cutM : { overBelow, mendFromM } )
          {
            if ( cutM > part.lowestM() + SAME_LEVEL_M && cutM < part.highestM() - SAME_LEVEL_M )
              shares[count++] = part.shareOf( cutM );
          }
          if ( count == 3 && shares[2] < shares[1] )
            std::swap( shares[1], shares[2] );
          shares[count] = 1.0;
          for ( int i = count; i-- > 0; )
          {
            if ( count > 1 && shares[i + 1] <= shares[i] )
              continue;
            ForestPart piece = count == 1 ? part : part.between( shares[i], shares[i + 1] );
            const double middleM = 0.5 * ( piece.elevation.from + piece.elevation.to );
            piece.over = middleM < overBelow - SAME_LEVEL_M;
            // What no regulator can stand above (a millimetre beside pipe without elevation) is not judged.
            piece.mend = piece.over && piece.canStand && !ownFault && middleM >= mendFromM - SAME_LEVEL_M;
            mAny = mAny || piece.mend;
            if ( piece.over && !piece.mend && piece.canStand )
              excuse( piece, part.leaveOver ? Need() : ( ownFault ? own : behind ) );
            mMarked.forest.parts.push_back( piece );
          }
        }

        void excuse( const ForestPart &piece, const Need &need )
        {
          std::vector<Excused> &all = mMarked.excused;
          const double lowestAtM = piece.elevation.from <= piece.elevation.to ? piece.fromM : piece.toM;
          if ( !all.empty() && all.back().limb == mLimb && all.back().loop == piece.leaveOver
            && all.back().line == piece.line && all.back().fromM == piece.toM )
          {
            Excused &last = all.back();
            last.fromM = piece.fromM;
            last.need.raise( need );
            if ( piece.lowestM() < last.lowestM )
            {
              last.lowestM = piece.lowestM();
              last.lowestAtM = lowestAtM;
            }
            return;
          }
          all.push_back( { mLimb, piece.line, piece.fromM, piece.toM, piece.lowestM(), lowestAtM, piece.role, need,
            piece.leaveOver } );
        }

        const Forest &mGiven;
        const ProposalRules &mRules;
        MarkedForest mMarked;
        int mLimb = -1;
        Need mNeed;
        bool mAny = false;
    };
  } // namespace

  Need needOf( const ForestPart &part, bool behind, const ProposalRules &rules )
  {
    Need need;
    if ( !part.known || !( part.served || behind ) )
      return need;
    need.elevationM = part.highestM();
    need.levelM = need.elevationM + ( part.served ? rules.leastM( part.role ) : 0.0 );
    need.at = { part.line, part.elevation.from >= part.elevation.to ? part.fromM : part.toM };
    need.summit = !part.served;
    return need;
  }

  bool hasNoWindow( const ForestPart &part, const ProposalRules &rules )
  {
    const double standM = rules.standM( part.role );
    if ( standM < LEAST_STAND_M )
      return true;
    const double windowM = standM - rules.leastM( part.role );
    return part.served && windowM < std::min( LEAST_WINDOW_M, part.highestM() - part.lowestM() ) - SAME_LEVEL_M;
  }

  double overBelowM( const ForestPart &part, const Forest &forest, const ProposalRules &rules )
  {
    return forest.zones[static_cast<std::size_t>( part.zone )].highM - rules.mostM( part.role );
  }

  Need needAbove( const Limb &limb, Need within )
  {
    if ( !within.any() )
      return within;
    within.levelM -= limb.boostLowM;
    if ( limb.wayM > within.levelM )
    {
      within.levelM = within.elevationM = limb.wayM;
      within.summit = true;
    }
    return within;
  }

  MarkedForest markForest( const Forest &forest, const ProposalRules &rules )
  {
    return Marker( forest, rules ).run();
  }

} // namespace stillhead
