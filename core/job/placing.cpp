// SPDX-License-Identifier: GPL-2.0-or-later
// Nearest pipe, ground and static level of sources; nearest pipe and elevation of devices.
#include "core/job/placing.h"

#include "core/profile/profilebuilder.h"
#include "core/profile/profilesearch.h"
#include "core/terrain/terrainreader.h"
#include "core/units/units.h"

#include <algorithm>
#include <cmath>
#include <tuple>

namespace stillhead
{

  namespace
  {
    //! Readings outside this range are rare enough to be asked about; common practice, no source.
    constexpr double USUAL_LEAST_PA = 15.0 * PASCALS_PER_PSI;
    constexpr double USUAL_MOST_PA = 250.0 * PASCALS_PER_PSI;

    //! A device near a joint stands on the leg it was put on, be it the lateral; only where legs coincide is it the mainline's.
    constexpr double SAME_DISTANCE_M = 1e-6;

    bool needsElevation( const Device &device )
    {
      return device.regulates() || device.kind == DeviceKind::Booster;
    }
  } // namespace

  LevelErrors errorsOf( const Source &source, double readingErrorPa )
  {
    return { !source.groundElevationM && source.kind != SourceKind::WaterLevel, readingErrorPa };
  }

  Placing::Placing( const StaticJob &job, const CanonicalDrawing &drawing, std::vector<Finding> &findings )
    : mJob( job )
    , mDrawing( drawing )
    , mFindings( findings )
  {
  }

  Finding &Placing::addFinding( FindingCode code, const PlanPoint &place )
  {
    Finding finding;
    finding.code = code;
    finding.place = place;
    mFindings.push_back( finding );
    return mFindings.back();
  }

  TerrainPoint Placing::pixelOf( const PlanPoint &place ) const
  {
    TerrainPoint terrain;
    mJob.planToTerrain->transform( &place, &terrain, 1 );
    return mJob.terrain->grid().toPixel( terrain );
  }

  bool Placing::linesMeetTerrain() const
  {
    const RasterGrid &grid = mJob.terrain->grid();
    for ( const CanonicalLine &line : mDrawing.lines )
    {
      TerrainPoint low { HUGE_VAL, HUGE_VAL };
      TerrainPoint high { -HUGE_VAL, -HUGE_VAL };
      for ( std::size_t i = line.first; i < line.first + line.count; ++i )
      {
        const TerrainPoint pixel = pixelOf( mDrawing.vertices[i] );
        low = { std::min( low.x, pixel.x ), std::min( low.y, pixel.y ) };
        high = { std::max( high.x, pixel.x ), std::max( high.y, pixel.y ) };
      }
      if ( low.x <= grid.columns() - 0.5 && high.x >= -0.5 && low.y <= grid.rows() - 0.5 && high.y >= -0.5 )
        return true;
    }
    return false;
  }

  std::vector<SourceReport> Placing::placeSources()
  {
    std::vector<SourceReport> reports;
    for ( std::size_t i = 0; i < mJob.sources.size(); ++i )
      reports.push_back( placeSource( static_cast<int>( i ) ) );
    return reports;
  }

  SourceReport Placing::placeSource( int number )
  {
    const Source &source = mJob.sources[static_cast<std::size_t>( number )];
    const auto pipe = nearestPipe( mDrawing, *mJob.measure, source.place, source.system, mJob.joins.toleranceM );
    if ( !pipe || !( pipe->distanceM <= mJob.sourceReachM ) )
      throw Refusal { Refusal::Reason::SourceTooFar, pipe ? pipe->distanceM : NOT_A_FIGURE, { number }, {}, {} };
    SourceReport report;
    report.on = pipe->on;
    report.distanceM = pipe->distanceM;
    TerrainReader reader( *mJob.terrain );
    report.terrainGroundM = reader.elevationAtM( pixelOf( source.place ) );
    report.usedGroundM = source.groundElevationM.value_or( report.terrainGroundM );
    if ( source.kind != SourceKind::WaterLevel && std::isnan( report.usedGroundM ) )
    {
      const auto reason = linesMeetTerrain() ? Refusal::Reason::SourceNoTerrain : Refusal::Reason::NoOverlap;
      throw Refusal { reason, 0.0, { number }, {}, {} };
    }
    report.levels = staticLevels( source, report.usedGroundM, mJob.specificWeightNPerM3 );
    reportReading( number );
    return report;
  }

  void Placing::reportReading( int number )
  {
    const Source &source = mJob.sources[static_cast<std::size_t>( number )];
    if ( !source.low )
      addFinding( FindingCode::OneReading, source.place ).source = number;
    if ( source.boostPa != 0.0 && !source.boostLowPa )
      addFinding( FindingCode::PumpDutyNotGiven, source.place ).source = number;
    if ( source.kind != SourceKind::PressureReading )
      return;
    for ( const double readingPa : { source.high, source.low.value_or( source.high ) } )
    {
      if ( readingPa >= USUAL_LEAST_PA && readingPa <= USUAL_MOST_PA )
        continue;
      Finding &finding = addFinding( FindingCode::UnusualPressure, source.place );
      finding.source = number;
      finding.figurePa = readingPa;
      return;
    }
  }

  std::vector<DevicePlace> Placing::placeDevices()
  {
    std::vector<DevicePlace> places;
    for ( std::size_t i = 0; i < mJob.devices.size(); ++i )
    {
      const Device &device = mJob.devices[i];
      const auto pipe = nearestPipe( mDrawing, *mJob.measure, device.place, device.system, SAME_DISTANCE_M );
      if ( pipe && pipe->distanceM <= mJob.joins.toleranceM )
      {
        places.push_back( { static_cast<int>( i ), pipe->on, -1 } );
        continue;
      }
      Finding &finding = addFinding( FindingCode::DeviceOffTheLine, device.place );
      finding.device = static_cast<int>( i );
      finding.gapM = pipe ? pipe->distanceM : NOT_A_FIGURE;
      finding.line = pipe ? mDrawing.lines[static_cast<std::size_t>( pipe->on.line )].drawn : -1;
    }
    const auto key = [&]( const DevicePlace &place ) {
      const Device &device = mJob.devices[static_cast<std::size_t>( place.device )];
      return std::make_tuple( place.on.line, place.on.alongM, device.kind, device.setPa.value_or( 0.0 ), place.device );
    };
    std::sort(
      places.begin(), places.end(), [&]( const DevicePlace &a, const DevicePlace &b ) { return key( a ) < key( b ); } );
    return places;
  }

  double Placing::deviceElevationM( const DevicePlace &place ) const
  {
    const Device &device = mJob.devices[static_cast<std::size_t>( place.device )];
    if ( device.elevationM )
      return *device.elevationM;
    ProfileBuilder builder( mDrawing, *mJob.planToTerrain, *mJob.terrain, mJob.useLineZ );
    Profile profile;
    builder.build( mDrawing.lines[static_cast<std::size_t>( place.on.line )], profile );
    const double elevationM = elevationAtM( profile, place.on.alongM );
    if ( std::isnan( elevationM ) && needsElevation( device ) )
      throw Refusal { Refusal::Reason::DeviceNoTerrain, 0.0, {}, { place.device }, {} };
    return elevationM;
  }

} // namespace stillhead
