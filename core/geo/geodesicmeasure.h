// SPDX-License-Identifier: GPL-2.0-or-later
// Ground lengths of what is drawn: geodesics on the ellipsoid of the lines' own CRS. Vertices go to latitude and
// longitude by the projection's own inverse, with no change of datum, so that nothing but the CRS decides.
#pragma once

#include "core/geo/projhandles.h"
#include "core/plan/plan.h"

#include <memory>
#include <string>
#include <vector>

#include <geodesic.h>

namespace stillhead
{

  /**
   * The measure for lines in the CRS of \a definition: geodesic, or planar in the CRS's own unit where it has no
   * ellipsoid (local site grids).
   * \throws std::runtime_error with a sentence where the definition cannot be read or is not one of the plan
   */
  std::unique_ptr<PlanMeasure> makePlanMeasure( const std::string &definition );

  //! Geodesic measure on the ellipsoid of a CRS.
  class GeodesicMeasure : public PlanMeasure
  {
    public:
      /**
       * \param definition a CRS that has an ellipsoid
       * \throws std::runtime_error as makePlanMeasure(), also where there is no ellipsoid
       */
      explicit GeodesicMeasure( const std::string &definition );

      std::unique_ptr<PlanMeasure> clone() const override;

      //! \throws std::runtime_error where a vertex lies outside the area in which the CRS can be used
      void distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const override;

      //! \throws std::runtime_error as distancesAlongM()
      GroundScale scaleAt( const PlanPoint &place ) const override;

    private:
      //! Longitude and latitude in radians.
      struct Place
      {
          double longitude = 0.0;
          double latitude = 0.0;
      };

      GeodesicMeasure( const GeodesicMeasure &other );
      const Place *toPlaces( const PlanPoint *vertices, std::size_t count ) const;
      double legM( const Place &from, const Place &to ) const;

      ProjContext mContext;
      ProjObject mToGeographic;     //!< Null where the plan is geographic itself
      double mRadiansPerUnit = 1.0; //!< Of what mToGeographic gives, or of the plan
      double mPlanUnitM = 1.0;      //!< Rough size of a plan unit, for the step of derivatives
      double mSemiMajorM = 0.0;
      double mFlattening = 0.0;
      geod_geodesic mGeodesic {};
      mutable std::vector<Place> mPlaces; //!< Scratch, kept to spare allocations
  };

} // namespace stillhead
