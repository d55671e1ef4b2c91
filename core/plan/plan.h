// SPDX-License-Identifier: GPL-2.0-or-later
// Places in the plan (the lines' own CRS) and how they are measured on the ground. core/geo implements the
// measures for real coordinate systems; PlanarMeasure serves plans without an ellipsoid and tests.
#pragma once

#include <cstddef>
#include <memory>

namespace stillhead
{

  //! A place in the lines' CRS, in its units.
  struct PlanPoint
  {
      double x = 0.0;
      double y = 0.0;

      bool operator==( const PlanPoint &other ) const { return x == other.x && y == other.y; }
      bool operator!=( const PlanPoint &other ) const { return !( *this == other ); }

      //! The total order by which everything drawn is sorted: x first, then y.
      bool operator<( const PlanPoint &other ) const { return x < other.x || ( x == other.x && y < other.y ); }
  };

  //! Ground metres for a small step in the plan: east = xx·dx + xy·dy, north = yx·dx + yy·dy.
  struct GroundScale
  {
      double xx = 1.0;
      double xy = 0.0;
      double yx = 0.0;
      double yy = 1.0;

      //! Ground distance in metres of the small step (\a dx, \a dy).
      double distanceM( double dx, double dy ) const;
  };

  //! Measures the plan on the ground. One object serves one thread: take a clone() for each.
  class PlanMeasure
  {
    public:
      virtual ~PlanMeasure() = default;

      virtual std::unique_ptr<PlanMeasure> clone() const = 0;

      /**
       * Ground distance in metres from the first vertex to every vertex, leg by leg, into \a distancesM (\a count values,
       * the first 0). Legs are geodesics on the ellipsoid of the lines' CRS; planar where it has none.
       */
      virtual void distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const = 0;

      //! Ground scale at a place.
      virtual GroundScale scaleAt( const PlanPoint &place ) const = 0;
  };

  //! A flat plan whose unit is \a metresPerUnit metres.
  class PlanarMeasure : public PlanMeasure
  {
    public:
      explicit PlanarMeasure( double metresPerUnit = 1.0 );

      std::unique_ptr<PlanMeasure> clone() const override;
      void distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const override;
      GroundScale scaleAt( const PlanPoint &place ) const override;

    private:
      double mMetresPerUnit;
  };

} // namespace stillhead
