// SPDX-License-Identifier: GPL-2.0-or-later
// Figures of zones are gathered from the judged pieces; stages by a search over zones in which passing a regulator costs one.
#include "core/job/schedule.h"

#include "core/terrain/terrainreader.h"

#include <algorithm>
#include <cmath>
#include <deque>
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

    //! NaN counts as nothing yet.
    void raise( double &value, double other )
    {
      value = std::isnan( value ) ? other : std::fmax( value, other );
    }

    void lower( double &value, double other )
    {
      value = std::isnan( value ) ? other : std::fmin( value, other );
    }

    //! What pipe of a zone asks of whoever feeds it.
    struct ZoneWindow
    {
        double needM = NOT_A_FIGURE;  //!< level that serves all of its pipe
        double standM = NOT_A_FIGURE; //!< level that all of its pipe stands
    };

    class Scheduler
    {
      public:
        Scheduler( const StaticJob &job, const StaticResult &result )
          : mJob( job )
          , mResult( result )
          , mSpans( result.zones.size() )
          , mWindows( result.zones.size() )
          , mReader( *job.terrain )
        {
        }

        std::vector<ScheduleRow> run()
        {
          gatherZones();
          findStages();
          std::vector<ScheduleRow> rows;
          for ( std::size_t i = 0; i < mResult.devices.size(); ++i )
            rows.push_back( rowOf( i ) );
          return rows;
        }

      private:
        double heightM( double pressurePa ) const { return pressurePa / mJob.specificWeightNPerM3; }
        double pressurePa( double heightM ) const { return heightM * mJob.specificWeightNPerM3; }
        int zoneOf( int node ) const { return mResult.zoneMap.ofNode[index( node )]; }
        Role roleOf( int line ) const { return mResult.drawing.lines[index( line )].role; }

        void gatherZones()
        {
          for ( const Piece &piece : mResult.pieces )
          {
            ZoneSpan &span = mSpans[index( piece.zone )];
            span.lengthM += piece.toM - piece.fromM;
            if ( std::isnan( piece.lowestM ) )
              continue;
            lower( span.lowestM, piece.lowestM );
            raise( span.highestM, piece.highestM );
            if ( !std::isnan( piece.pressureLowPa ) )
              lower( span.lowestPa, piece.pressureLowPa );
            if ( !std::isnan( piece.pressureHighPa ) )
              raise( span.highestPa, piece.pressureHighPa );
            const Role role = roleOf( mResult.network.spans[index( piece.span )].line );
            ZoneWindow &window = mWindows[index( piece.zone )];
            raise( window.needM, piece.highestM + heightM( mJob.limits.leastFor( role ) ) );
            lower( window.standM, piece.lowestM + heightM( mJob.limits.mostFor( role ) ) );
          }
        }

        void findStages()
        {
          mStages.assign( mResult.zones.size(), std::numeric_limits<int>::max() );
          std::vector<std::vector<std::pair<int, int>>> beyond( mResult.zones.size() );
          for ( const DeviceLink &link : mResult.network.links )
          {
            if ( link.passes )
              beyond[index( zoneOf( link.fromNode ) )].push_back(
                { zoneOf( link.toNode ), mJob.devices[index( link.device )].regulates() ? 1 : 0 } );
          }
          std::deque<int> open;
          const auto reach = [&]( int zone, int stage, bool first ) {
            if ( stage >= mStages[index( zone )] )
              return;
            mStages[index( zone )] = stage;
            first ? open.push_front( zone ) : open.push_back( zone );
          };
          for ( const SourceReport &source : mResult.sources )
            reach( zoneOf( source.node ), 0, true );
          while ( !open.empty() )
          {
            const int zone = open.front();
            open.pop_front();
            const int stage = mStages[index( zone )];
            for ( const auto &[next, cost] : beyond[index( zone )] )
              reach( next, stage + cost, cost == 0 );
          }
        }

        ScheduleRow rowOf( std::size_t standing )
        {
          const StandingDevice &own = mResult.devices[standing];
          const Device &device = mJob.devices[index( own.device )];
          const int inletZone = zoneOf( own.inletNode );
          ScheduleRow row;
          row.standing = standing;
          row.groundM = groundAt( own.inletNode );
          row.zone = zoneOf( own.outletNode );
          row.feeds = mSpans[index( row.zone )];
          if ( mStages[index( inletZone )] < std::numeric_limits<int>::max() )
            row.stage = mStages[index( inletZone )] + ( device.regulates() ? 1 : 0 );
          const Zone &zone = mResult.zones[index( row.zone )];
          const Role role = roleOf( own.on.line );
          if ( zone.fed )
          {
            row.servesUpToM = zone.levels.lowM - heightM( mJob.limits.leastFor( role ) );
            row.holdsDownToM = zone.levels.highM - heightM( mJob.limits.mostFor( role ) );
          }
          if ( !device.regulates() )
            return row;
          const ZoneWindow &window = mWindows[index( row.zone )];
          row.setLeastPa = pressurePa( window.needM - own.elevationM );
          row.setMostPa = pressurePa( window.standM - own.elevationM ) - device.risePa;
          row.failedOpenPa = failedOpenPa( own.device, row.feeds.highestPa );
          return row;
        }

        double groundAt( int node )
        {
          TerrainPoint terrain;
          mJob.planToTerrain->transform( &mResult.network.nodes[index( node )].place, &terrain, 1 );
          return mReader.elevationAtM( mJob.terrain->grid().toPixel( terrain ) );
        }

        double failedOpenPa( int device, double highestPa ) const
        {
          const auto failure = std::find_if( mResult.deviceFailures.begin(), mResult.deviceFailures.end(),
            [device]( const DeviceFailure &own ) { return own.device == device; } );
          if ( failure == mResult.deviceFailures.end() )
            return highestPa;
          for ( const DeviceFailure::RaisedZone &raised : failure->raised )
          {
            const double lowestM = mSpans[index( raised.zone )].lowestM;
            if ( !std::isnan( lowestM ) )
              raise( highestPa, pressurePa( raised.levelM - lowestM ) );
          }
          return highestPa;
        }

        const StaticJob &mJob;
        const StaticResult &mResult;
        std::vector<ZoneSpan> mSpans;
        std::vector<ZoneWindow> mWindows;
        std::vector<int> mStages; //!< regulators passed on the way to every zone
        TerrainReader mReader;
    };
  } // namespace

  std::vector<ScheduleRow> scheduleOf( const StaticJob &job, const StaticResult &result )
  {
    return Scheduler( job, result ).run();
  }

} // namespace stillhead
