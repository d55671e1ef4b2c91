// SPDX-License-Identifier: GPL-2.0-or-later
// A leg that is walked against its line takes the knots backwards.
#include "core/job/wayprofile.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    //! Where on its line the points of \a leg stand, in the order of the way.
    std::vector<double> placesOf( const WayLeg &leg, const Profile &profile )
    {
      const double low = std::min( leg.fromM, leg.toM );
      const double high = std::max( leg.fromM, leg.toM );
      std::vector<double> places { low };
      for ( const double alongM : profile.alongM )
      {
        if ( alongM > places.back() && alongM < high )
          places.push_back( alongM );
      }
      places.push_back( high );
      if ( leg.fromM > leg.toM )
        std::reverse( places.begin(), places.end() );
      return places;
    }

  } // namespace

  std::vector<WayPoint> wayProfile(
    const StaticResult &result, const std::vector<WayLeg> &way, const Limits &limits, PlaceProbe &probe )
  {
    std::vector<WayPoint> points;
    double startM = 0.0;
    for ( const WayLeg &leg : way )
    {
      const Role role = result.drawing.lines[static_cast<std::size_t>( leg.line )].role;
      for ( const double alongM : placesOf( leg, probe.profileOf( leg.line ) ) )
      {
        WayPoint point;
        point.distanceM = startM + std::abs( alongM - leg.fromM );
        point.on = { leg.line, alongM };
        point.figures = probe.onPipe( point.on );
        point.mostElevationM = probe.elevationWhereM( point.figures.levels.highM, limits.mostFor( role ) );
        point.leastElevationM = probe.elevationWhereM( point.figures.levels.lowM, limits.leastFor( role ) );
        points.push_back( point );
      }
      startM += leg.lengthM();
    }
    return points;
  }

} // namespace stillhead
