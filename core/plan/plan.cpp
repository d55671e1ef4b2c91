// SPDX-License-Identifier: GPL-2.0-or-later
// Flat measure of the plan.
#include "core/plan/plan.h"

#include <cmath>

namespace stillhead
{

  double GroundScale::distanceM( double dx, double dy ) const
  {
    return std::hypot( xx * dx + xy * dy, yx * dx + yy * dy );
  }

  PlanarMeasure::PlanarMeasure( double metresPerUnit )
    : mMetresPerUnit( metresPerUnit )
  {
  }

  std::unique_ptr<PlanMeasure> PlanarMeasure::clone() const
  {
    return std::make_unique<PlanarMeasure>( *this );
  }

  void PlanarMeasure::distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const
  {
    double along = 0.0;
    for ( std::size_t i = 0; i < count; ++i )
    {
      if ( i > 0 )
        along += mMetresPerUnit * std::hypot( vertices[i].x - vertices[i - 1].x, vertices[i].y - vertices[i - 1].y );
      distancesM[i] = along;
    }
  }

  GroundScale PlanarMeasure::scaleAt( const PlanPoint & ) const
  {
    return { mMetresPerUnit, 0.0, 0.0, mMetresPerUnit };
  }

} // namespace stillhead
