// SPDX-License-Identifier: GPL-2.0-or-later
// Levels are raised link by link until nothing changes. Without a cycle that raises itself no way is longer than the
// number of zones, so a level still rising after that many rounds proves such a cycle.
#include "core/statics/levels.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    //! A level counts as larger only beyond rounding.
    constexpr double LARGER_M = 1e-9;

    class LevelSolver
    {
      public:
        LevelSolver( const LevelInput &input, Case which )
          : mInput( input )
          , mCase( which )
          , mLevels( static_cast<std::size_t>( input.zoneCount ) )
          , mOpenWater( static_cast<std::size_t>( input.zoneCount ), -1 )
        {
        }

        std::vector<ZoneLevel> solve()
        {
          for ( std::size_t i = 0; i < mInput.sources.size(); ++i )
          {
            const FedLevel &source = mInput.sources[i];
            ZoneLevel &zone = mLevels[static_cast<std::size_t>( source.zone )];
            zone = { true, source.levelM, source.errors, source.source, -1 };
            if ( source.openWater )
              mOpenWater[static_cast<std::size_t>( source.zone )] = source.source;
          }
          for ( int round = 0; raise(); ++round )
          {
            if ( round > mInput.zoneCount )
              refuseCycle();
          }
          return std::move( mLevels );
        }

      private:
        const Device &deviceOf( const ZoneLink &link ) const
        {
          return ( *mInput.devices )[static_cast<std::size_t>( link.device )];
        }

        bool hasFailedOpen( const ZoneLink &link ) const
        {
          return !mInput.failedOpen.empty() && mInput.failedOpen[static_cast<std::size_t>( link.device )];
        }

        //! One round over all links; true if any level rose.
        bool raise()
        {
          bool rose = false;
          for ( std::size_t i = 0; i < mInput.links.size(); ++i )
          {
            const ZoneLink &link = mInput.links[i];
            const ZoneLevel inlet = mLevels[static_cast<std::size_t>( link.fromZone )];
            if ( !inlet.fed )
              continue;
            bool passes = true;
            const double level = hasFailedOpen( link ) ? inlet.levelM
                                                       : levelThrough( deviceOf( link ), link.elevationM, inlet.levelM,
                                                         mCase, mInput.specificWeightNPerM3, passes );
            ZoneLevel &outlet = mLevels[static_cast<std::size_t>( link.toZone )];
            if ( !passes || ( outlet.fed && level <= outlet.levelM + LARGER_M ) )
              continue;
            if ( mOpenWater[static_cast<std::size_t>( link.toZone )] >= 0 )
              refuseOverWater( link, inlet, level );
            outlet = { true, level, inlet.errors, inlet.source, static_cast<int>( i ) };
            if ( level < inlet.levelM )
              outlet.errors = { !deviceOf( link ).elevationM, 0.0 };
            mLast = link.toZone;
            rose = true;
          }
          return rose;
        }

        [[noreturn]] void refuseOverWater( const ZoneLink &link, const ZoneLevel &inlet, double level ) const
        {
          Refusal refusal;
          refusal.reason = Refusal::Reason::LevelOverWater;
          refusal.figureM = level - mLevels[static_cast<std::size_t>( link.toZone )].levelM;
          refusal.sources = { mOpenWater[static_cast<std::size_t>( link.toZone )], inlet.source };
          refusal.devices = { link.device };
          throw refusal;
        }

        [[noreturn]] void refuseCycle() const
        {
          // Far enough back along the links that raised the last zone one is inside the cycle.
          int zone = mLast;
          const auto linkInto = [&]( int z ) -> const ZoneLink & {
            return mInput.links[static_cast<std::size_t>( mLevels[static_cast<std::size_t>( z )].link )];
          };
          for ( int i = 0; i < mInput.zoneCount; ++i )
            zone = linkInto( zone ).fromZone;
          Refusal refusal;
          refusal.reason = Refusal::Reason::LevelRaisesItself;
          const int start = zone;
          do
          {
            refusal.devices.push_back( linkInto( zone ).device );
            zone = linkInto( zone ).fromZone;
          }
          while ( zone != start );
          std::sort( refusal.devices.begin(), refusal.devices.end() );
          throw refusal;
        }

        const LevelInput &mInput;
        Case mCase;
        std::vector<ZoneLevel> mLevels;
        std::vector<int> mOpenWater;
        int mLast = -1;
    };
  } // namespace

  double levelThrough(
    const Device &device, double elevationM, double inletLevelM, Case which, double specificWeightNPerM3, bool &passes )
  {
    passes = device.kind != DeviceKind::ClosedValve;
    if ( device.regulates() )
    {
      const double outletPa = device.setPa.value_or( 0.0 ) + ( which == Case::High ? device.risePa : 0.0 );
      return std::min( inletLevelM, elevationM + outletPa / specificWeightNPerM3 );
    }
    if ( device.kind == DeviceKind::Booster && inletLevelM >= elevationM )
      return inletLevelM
        + ( which == Case::High ? device.boostPa : device.boostLowPa.value_or( device.boostPa ) )
        / specificWeightNPerM3;
    return inletLevelM;
  }

  std::vector<ZoneLevel> zoneLevels( const LevelInput &input, Case which )
  {
    return LevelSolver( input, which ).solve();
  }

} // namespace stillhead
