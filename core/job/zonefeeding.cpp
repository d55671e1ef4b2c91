// SPDX-License-Identifier: GPL-2.0-or-later
// Both cases are solved apart; failures are the high case solved again with regulators that only pass.
#include "core/job/zonefeeding.h"

#include "core/job/placing.h"
#include "core/network/way.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    class ZoneFeeder
    {
      public:
        ZoneFeeder( const StaticJob &job, const std::vector<DevicePlace> &places,
          const std::vector<double> &elevationsM, StaticResult &result )
          : mJob( job )
          , mPlaces( places )
          , mElevationsM( elevationsM )
          , mResult( result )
        {
        }

        void run()
        {
          const Feeding feeding =
            feedingOf( placedSources(), mResult.network, mResult.zoneMap, mJob.specificWeightNPerM3 );
          placeStanding();
          mHigh.sources = feeding.high;
          mLow.sources = feeding.low;
          for ( LevelInput *input : { &mHigh, &mLow } )
          {
            input->zoneCount = mResult.zoneMap.count;
            input->links = zoneLinks();
            input->devices = &mJob.devices;
            input->specificWeightNPerM3 = mJob.specificWeightNPerM3;
          }
          mHighLevels = zoneLevels( mHigh, Case::High );
          setZones( mHighLevels, zoneLevels( mLow, Case::Low ) );
          for ( StandingDevice &standing : mResult.devices )
            setFigures( standing, mJob.devices[static_cast<std::size_t>( standing.device )], mResult.zoneMap,
              mResult.zones, mJob.leastDropPa, mJob.specificWeightNPerM3 );
          findFailures();
          findAboutDevices( mJob, feeding.differences, mResult );
        }

      private:
        std::vector<PlacedSource> placedSources() const
        {
          std::vector<PlacedSource> placed;
          for ( std::size_t i = 0; i < mResult.sources.size(); ++i )
          {
            const SourceReport &report = mResult.sources[i];
            const Source &source = mJob.sources[i];
            PlacedSource own;
            own.source = static_cast<int>( i );
            own.node = report.node;
            own.levels = report.levels;
            own.openWater = source.kind != SourceKind::PressureReading;
            own.errors = errorsOf( source, mJob.readingErrorPa );
            own.doubtPa =
              doubtPa( mJob.terrainRmseM, own.errors.readingPa, own.errors.terrain ? 1 : 0, mJob.specificWeightNPerM3 );
            placed.push_back( own );
          }
          return placed;
        }

        void placeStanding()
        {
          for ( std::size_t i = 0; i < mPlaces.size(); ++i )
          {
            const DevicePlace &place = mPlaces[i];
            StandingDevice standing;
            standing.device = place.device;
            standing.on = place.on;
            standing.inletNode = standing.outletNode = place.node;
            standing.elevationM = mElevationsM[i];
            for ( const DeviceLink &link : mResult.network.links )
            {
              if ( link.device != place.device )
                continue;
              standing.inletNode = link.fromNode;
              standing.outletNode = link.toNode;
            }
            mResult.devices.push_back( standing );
          }
          std::sort( mResult.devices.begin(), mResult.devices.end(),
            []( const StandingDevice &a, const StandingDevice &b ) { return a.device < b.device; } );
        }

        std::vector<ZoneLink> zoneLinks() const
        {
          std::vector<ZoneLink> links;
          const auto zone = [&]( int node ) { return mResult.zoneMap.ofNode[static_cast<std::size_t>( node )]; };
          for ( const StandingDevice &standing : mResult.devices )
          {
            if ( standing.inletNode != standing.outletNode )
              links.push_back(
                { standing.device, zone( standing.inletNode ), zone( standing.outletNode ), standing.elevationM } );
          }
          return links;
        }

        double doubtOf( const ZoneLevel &level ) const
        {
          return doubtPa(
            mJob.terrainRmseM, level.errors.readingPa, level.errors.terrain ? 2 : 1, mJob.specificWeightNPerM3 );
        }

        void setZones( const std::vector<ZoneLevel> &high, const std::vector<ZoneLevel> &low )
        {
          mResult.zones.resize( high.size() );
          for ( std::size_t i = 0; i < high.size(); ++i )
          {
            if ( high[i].fed )
              mResult.zones[i] = { true, { high[i].levelM, low[i].levelM }, doubtOf( high[i] ), doubtOf( low[i] ) };
          }
        }

        void findFailures()
        {
          const bool eachInTurn = mJob.failedOpen == FailedOpen::EachInTurn || mJob.schedule;
          if ( mJob.failedOpen == FailedOpen::NotAsked && !eachInTurn )
            return;
          if ( mJob.failedOpen != FailedOpen::NotAsked )
          {
            for ( const ZoneLevel &level : mHighLevels )
              mResult.failures.push_back( { level.levelM, -1 } );
          }
          std::vector<int> regulators;
          for ( const StandingDevice &standing : mResult.devices )
          {
            if ( mJob.devices[static_cast<std::size_t>( standing.device )].regulates() )
              regulators.push_back( standing.device );
          }
          // A failure is looked at, not refused: water that would be pushed into an open tank shows as the level it has.
          for ( FedLevel &source : mHigh.sources )
            source.openWater = false;
          if ( mJob.failedOpen == FailedOpen::All )
            noteRaised( raisedBy( regulators ), -1 );
          if ( !eachInTurn )
            return;
          for ( const int device : regulators )
          {
            const std::vector<ZoneLevel> failed = raisedBy( { device } );
            if ( mJob.failedOpen == FailedOpen::EachInTurn )
              noteRaised( failed, device );
            if ( mJob.schedule )
              noteSchedule( failed, device );
          }
        }

        //! Levels of the high case with \a regulators failed open; those of today where they would raise themselves without end.
        std::vector<ZoneLevel> raisedBy( const std::vector<int> &regulators )
        {
          mHigh.failedOpen.assign( mJob.devices.size(), false );
          for ( const int device : regulators )
            mHigh.failedOpen[static_cast<std::size_t>( device )] = true;
          try
          {
            return zoneLevels( mHigh, Case::High );
          }
          catch ( const Refusal & )
          {
            return mHighLevels;
          }
        }

        static bool isAbove( const ZoneLevel &level, double otherM )
        {
          constexpr double LARGER_M = 1e-9;
          return level.fed && level.levelM > otherM + LARGER_M;
        }

        //! \a device is the cause; −1: the nearest failed one upstream.
        void noteRaised( const std::vector<ZoneLevel> &failed, int device )
        {
          for ( std::size_t i = 0; i < failed.size(); ++i )
          {
            if ( isAbove( failed[i], mResult.failures[i].levelM ) )
              mResult.failures[i] = { failed[i].levelM,
                device >= 0 ? device : nearestFailed( failed, static_cast<int>( i ) ) };
          }
        }

        void noteSchedule( const std::vector<ZoneLevel> &failed, int device )
        {
          DeviceFailure failure;
          failure.device = device;
          for ( std::size_t i = 0; i < failed.size(); ++i )
          {
            if ( isAbove( failed[i], mHighLevels[i].levelM ) )
              failure.raised.push_back( { static_cast<int>( i ), failed[i].levelM } );
          }
          mResult.deviceFailures.push_back( std::move( failure ) );
        }

        int nearestFailed( const std::vector<ZoneLevel> &levels, int zone ) const
        {
          for ( int i = 0; i < mHigh.zoneCount && levels[static_cast<std::size_t>( zone )].link >= 0; ++i )
          {
            const ZoneLink &link =
              mHigh.links[static_cast<std::size_t>( levels[static_cast<std::size_t>( zone )].link )];
            if ( mHigh.failedOpen[static_cast<std::size_t>( link.device )] )
              return link.device;
            zone = link.fromZone;
          }
          return -1;
        }

        const StaticJob &mJob;
        const std::vector<DevicePlace> &mPlaces;
        const std::vector<double> &mElevationsM;
        StaticResult &mResult;
        LevelInput mHigh;
        LevelInput mLow;
        std::vector<ZoneLevel> mHighLevels;
    };

    class DeviceFinder
    {
      public:
        DeviceFinder( const StaticJob &job, StaticResult &result )
          : mJob( job )
          , mResult( result )
        {
        }

        void tell( const StandingDevice &standing )
        {
          const Device &device = deviceOf( standing.device );
          if ( device.regulates() && !std::isnan( standing.inletHighPa ) )
          {
            tellStatus( standing );
            tellBypass( standing );
          }
          if ( device.kind == DeviceKind::Booster && !device.boostLowPa )
            add( FindingCode::PumpDutyNotGiven, standing );
          if ( device.kind == DeviceKind::CheckValve && !std::isnan( standing.inletHighPa ) )
            add( FindingCode::PressureMayBeTrapped, standing );
        }

      private:
        const Device &deviceOf( int device ) const { return mJob.devices[static_cast<std::size_t>( device )]; }

        Finding &add( FindingCode code, const StandingDevice &standing )
        {
          Finding finding;
          finding.code = code;
          finding.place = mResult.network.nodes[static_cast<std::size_t>( standing.inletNode )].place;
          finding.line = mResult.drawing.lines[static_cast<std::size_t>( standing.on.line )].drawn;
          finding.device = standing.device;
          mResult.findings.push_back( finding );
          return mResult.findings.back();
        }

        void tellStatus( const StandingDevice &standing )
        {
          const double setPa = deviceOf( standing.device ).setPa.value_or( 0.0 );
          if ( standing.status == RegulatorStatus::HeldShut )
            add( FindingCode::RegulatorHeldShut, standing ).figurePa = standing.outletLowPa - setPa;
          else if ( standing.status == RegulatorStatus::WideOpen )
            add( FindingCode::RegulatorWideOpen, standing ).figurePa = standing.inletLowPa;
          else if ( standing.status == RegulatorStatus::ShortOfDifferential )
            add( FindingCode::RegulatorShortOfDifferential, standing ).figurePa = standing.inletLowPa - setPa;
        }

        void tellBypass( const StandingDevice &standing )
        {
          const auto mayPass = [&]( std::size_t link ) {
            const DeviceLink &own = mResult.network.links[link];
            return own.passes && !deviceOf( own.device ).regulates();
          };
          bool reached = false;
          const std::vector<int> way =
            linesOfWay( mResult.network, standing.inletNode, standing.outletNode, mayPass, reached );
          if ( !reached )
            return;
          Finding &finding = add( FindingCode::RegulatorBypassed, standing );
          for ( const int line : way )
            finding.way.push_back( mResult.drawing.lines[static_cast<std::size_t>( line )].drawn );
        }

        const StaticJob &mJob;
        StaticResult &mResult;
    };
  } // namespace

  void feedZones( const StaticJob &job, const std::vector<DevicePlace> &places, const std::vector<double> &elevationsM,
    StaticResult &result )
  {
    try
    {
      ZoneFeeder( job, places, elevationsM, result ).run();
    }
    catch ( Refusal &refusal )
    {
      for ( int &line : refusal.lines )
        line = result.drawing.lines[static_cast<std::size_t>( line )].drawn;
      throw;
    }
  }

  void findAboutDevices( const StaticJob &job, const std::vector<SourceDifference> &differences, StaticResult &result )
  {
    for ( const SourceDifference &difference : differences )
    {
      Finding finding;
      finding.code = FindingCode::LevelsDiffer;
      finding.source = difference.source;
      finding.otherSource = difference.otherSource;
      finding.place = job.sources[static_cast<std::size_t>( difference.otherSource )].place;
      finding.figurePa = difference.differenceM * job.specificWeightNPerM3;
      result.findings.push_back( finding );
    }
    DeviceFinder finder( job, result );
    for ( const StandingDevice &standing : result.devices )
      finder.tell( standing );
  }

} // namespace stillhead
