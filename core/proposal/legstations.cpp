// SPDX-License-Identifier: GPL-2.0-or-later
// Parts are cut in steps of equal height, then stations are thinned out to the distance that may be written.
#include "core/proposal/legstations.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    constexpr double STEPS_IN_A_WINDOW = 12.0; //!< stations for each height between LEAST and MOST − rise
    constexpr double MOST_STEPS_IN_A_PART = 32.0;
    constexpr double SAME_SHARE = 1e-9;

    class LegCutter
    {
      public:
        LegCutter(
          const Forest &forest, const Limb &limb, const std::vector<double> &breaks, const ProposalRules &rules )
          : mForest( forest )
          , mLimb( limb )
          , mBreaks( breaks )
          , mRules( rules )
        {
        }

        SegmentedLeg run()
        {
          mStartM = mForest.parts[mLimb.firstPart].fromM;
          for ( std::size_t i = mLimb.firstPart; i < mLimb.firstPart + mLimb.partCount; ++i )
            cut( mForest.parts[i] );
          mFromM = distance( mLimb.standFromM );
          mToM = distance( mLimb.standToM );
          mLeg.onePlace = mToM - mFromM < mRules.leastApartM();
          collect();
          thin();
          if ( mLeg.stations.empty() )
            standAnywhere();
          return std::move( mLeg );
        }

      private:
        static bool takesRegulator( const ForestPart &part ) { return part.known && part.canStand; }

        double distance( double alongM ) const { return std::abs( alongM - mStartM ); }

        void cut( const ForestPart &part )
        {
          if ( !part.known )
          {
            mLeg.segments.push_back( part );
            return;
          }
          std::vector<double> shares { 0.0, 1.0 };
          const double heightM = part.highestM() - part.lowestM();
          const double windowM = std::max( 0.1, mRules.standM( part.role ) - mRules.leastM( part.role ) );
          const double steps = std::min( MOST_STEPS_IN_A_PART, std::ceil( heightM / ( windowM / STEPS_IN_A_WINDOW ) ) );
          for ( double step = 1.0; step < steps; ++step )
            shares.push_back(
              part.shareOf( part.elevation.from + ( part.elevation.to - part.elevation.from ) * step / steps ) );
          const auto cutAt = [&]( double alongM ) {
            const double share = part.toM != part.fromM ? ( alongM - part.fromM ) / ( part.toM - part.fromM ) : 0.0;
            if ( share > 0.0 && share < 1.0 )
              shares.push_back( share );
          };
          for ( const double alongM : mBreaks )
            cutAt( alongM );
          cutAt( mLimb.standFromM );
          cutAt( mLimb.standFromM + ( mLimb.standToM < mLimb.standFromM ? -1.0 : 1.0 ) * mRules.leastApartM() );
          cutAt( mLimb.standToM );
          std::sort( shares.begin(), shares.end() );
          shares.erase(
            std::unique( shares.begin(), shares.end(), []( double a, double b ) { return b - a < SAME_SHARE; } ),
            shares.end() );
          shares.back() = 1.0;
          for ( std::size_t i = 0; i + 1 < shares.size(); ++i )
            mLeg.segments.push_back( part.between( shares[i], shares[i + 1] ) );
        }

        bool isBreak( double alongM ) const
        {
          return std::any_of(
            mBreaks.begin(), mBreaks.end(), [&]( double at ) { return std::abs( at - alongM ) < 1e-6; } );
        }

        //! The station at \a alongM, if the pipe has an elevation there.
        void standAt( double alongM, std::size_t boundary, std::vector<Station> &stations ) const
        {
          const double at = distance( alongM );
          for ( const ForestPart &part : mLeg.segments )
          {
            if ( !takesRegulator( part ) || at < distance( part.fromM ) || at > distance( part.toM ) )
              continue;
            const double share = part.toM != part.fromM ? ( alongM - part.fromM ) / ( part.toM - part.fromM ) : 0.0;
            stations.push_back(
              { boundary, alongM, part.elevation.at( std::clamp( share, 0.0, 1.0 ) ), part.zone, part.role } );
            return;
          }
        }

        //! At an inner boundary; where the pipe jumps (a surveyed step) at its lower side.
        void standBetween( std::size_t boundary, std::vector<Station> &stations ) const
        {
          const ForestPart *above = boundary > 0 ? &mLeg.segments[boundary - 1] : nullptr;
          const ForestPart *below = boundary < mLeg.segments.size() ? &mLeg.segments[boundary] : nullptr;
          const bool canAbove = above && takesRegulator( *above );
          const bool canBelow = below && takesRegulator( *below );
          if ( canAbove && !( canBelow && below->elevation.from <= above->elevation.to ) )
            stations.push_back( { boundary, above->toM, above->elevation.to, above->zone, above->role } );
          else if ( canBelow )
            stations.push_back( { boundary, below->fromM, below->elevation.from, below->zone, below->role } );
        }

        //! A regulator within the stub at a joint is written at the stub's end.
        void collect()
        {
          const std::size_t count = mLeg.segments.size();
          std::size_t last = count;
          std::vector<Station> inside;
          for ( std::size_t i = 0; i <= count; ++i )
          {
            const double alongM = i < count ? mLeg.segments[i].fromM : mLeg.segments.back().toM;
            const double at = distance( alongM );
            const bool hint = isBreak( alongM );
            if ( at <= mFromM )
              continue;
            if ( at >= mToM )
              last = hint && last == count ? i : last;
            else
              standBetween( i, inside );
          }
          standAt( mLimb.standFromM, 0, mLeg.stations );
          mLeg.stations.insert( mLeg.stations.end(), inside.begin(), inside.end() );
          standAt( mLimb.standToM, last, mLeg.stations );
        }

        void thin()
        {
          if ( mLeg.onePlace )
            return;
          std::vector<Station> kept;
          for ( std::size_t i = 0; i < mLeg.stations.size(); ++i )
          {
            const Station &station = mLeg.stations[i];
            const bool wanted = isBreak( station.alongM ) || i + 1 == mLeg.stations.size();
            while ( wanted && kept.size() > 1 && tooNear( kept.back(), station ) && !isBreak( kept.back().alongM ) )
              kept.pop_back();
            if ( kept.empty() || !tooNear( kept.back(), station ) )
              kept.push_back( station );
          }
          mLeg.stations = std::move( kept );
        }

        bool tooNear( const Station &a, const Station &b ) const
        {
          return std::abs( a.alongM - b.alongM ) < mRules.leastApartM() * ( 1.0 - 1e-9 );
        }

        //! Pipe whose elevation is known only in its stubs: better there than nowhere.
        void standAnywhere()
        {
          mLeg.onePlace = true;
          const auto known = std::find_if( mLeg.segments.begin(), mLeg.segments.end(), takesRegulator );
          if ( known != mLeg.segments.end() )
            mLeg.stations.push_back( { static_cast<std::size_t>( known - mLeg.segments.begin() ),
              0.5 * ( known->fromM + known->toM ), known->elevation.at( 0.5 ), known->zone, known->role } );
        }

        const Forest &mForest;
        const Limb &mLimb;
        const std::vector<double> &mBreaks;
        const ProposalRules &mRules;
        double mStartM = 0.0;
        double mFromM = 0.0;
        double mToM = 0.0;
        SegmentedLeg mLeg;
    };
  } // namespace

  SegmentedLeg segmentLeg(
    const Forest &forest, const Limb &limb, const std::vector<double> &breaks, const ProposalRules &rules )
  {
    return LegCutter( forest, limb, breaks, rules ).run();
  }

} // namespace stillhead
