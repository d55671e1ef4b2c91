// SPDX-License-Identifier: GPL-2.0-or-later
// Measures of the plan for tests: degrees-like scales that differ along x and y and from place to place.
#pragma once

#include "core/plan/plan.h"

#include <cmath>
#include <memory>

namespace stillhead::test
{

  /**
   * A plan in which one unit of y is \a metresPerY everywhere and one unit of x shrinks with the cosine of y (in degrees), as on
   * a globe. Legs are measured at the scale of their middle.
   */
  class GlobeLikeMeasure : public PlanMeasure
  {
    public:
      explicit GlobeLikeMeasure( double metresPerY = 111000.0 )
        : mMetresPerY( metresPerY )
      {
      }

      std::unique_ptr<PlanMeasure> clone() const override { return std::make_unique<GlobeLikeMeasure>( *this ); }

      void distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const override
      {
        double along = 0.0;
        for ( std::size_t i = 0; i < count; ++i )
        {
          if ( i > 0 )
          {
            const PlanPoint &a = vertices[i - 1];
            const PlanPoint &b = vertices[i];
            along += scaleAt( { 0.0, 0.5 * ( a.y + b.y ) } ).distanceM( b.x - a.x, b.y - a.y );
          }
          distancesM[i] = along;
        }
      }

      GroundScale scaleAt( const PlanPoint &place ) const override
      {
        return { mMetresPerY * std::cos( place.y * 3.14159265358979323846 / 180.0 ), 0.0, 0.0, mMetresPerY };
      }

    private:
      double mMetresPerY;
  };

  //! One scale everywhere, not the same along x and y, turned and sheared if asked for.
  class FixedScaleMeasure : public PlanMeasure
  {
    public:
      explicit FixedScaleMeasure( const GroundScale &scale )
        : mScale( scale )
      {
      }

      std::unique_ptr<PlanMeasure> clone() const override { return std::make_unique<FixedScaleMeasure>( *this ); }

      void distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const override
      {
        double along = 0.0;
        for ( std::size_t i = 0; i < count; ++i )
        {
          if ( i > 0 )
            along += mScale.distanceM( vertices[i].x - vertices[i - 1].x, vertices[i].y - vertices[i - 1].y );
          distancesM[i] = along;
        }
      }

      GroundScale scaleAt( const PlanPoint & ) const override { return mScale; }

    private:
      GroundScale mScale;
  };

} // namespace stillhead::test
