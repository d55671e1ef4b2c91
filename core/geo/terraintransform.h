// SPDX-License-Identifier: GPL-2.0-or-later
// From the lines' CRS to the terrain's, in the plan only. PROJ does the work; coordinates are in map order (x east, y
// north, degrees as degrees) on both sides.
#pragma once

#include "core/geo/projhandles.h"
#include "core/plan/plantoterrain.h"

#include <memory>
#include <string>

namespace stillhead
{

  /**
   * The way from the CRS \a lines to the CRS \a terrain: SamePlan where their horizontal parts are equivalent whatever
   * they are called, else a TerrainTransform. \a operation is the PROJ pipeline that the host chose (map order on both
   * sides); blank: PROJ's best.
   * \throws std::runtime_error with a sentence where there is no way between the two
   */
  std::unique_ptr<PlanToTerrain> makePlanToTerrain(
    const std::string &lines, const std::string &terrain, const std::string &operation = {} );

  //! True where the horizontal parts of both definitions mean the same plan.
  bool isSamePlan( const std::string &first, const std::string &second );

  //! A PROJ transformation.
  class TerrainTransform : public PlanToTerrain
  {
    public:
      //! \throws std::runtime_error as makePlanToTerrain()
      TerrainTransform( const std::string &lines, const std::string &terrain, const std::string &operation = {} );

      std::unique_ptr<PlanToTerrain> clone() const override;
      bool isIdentity() const override { return mIsIdentity; }
      void transform( const PlanPoint *plan, TerrainPoint *terrain, std::size_t count ) const override;

      //! The way back: from the terrain's CRS to the lines'; places that have none become NaN.
      void transformBack( const TerrainPoint *terrain, PlanPoint *plan, std::size_t count ) const;

    private:
      TerrainTransform( const TerrainTransform &other );

      ProjContext mContext;
      ProjObject mOperation;
      bool mIsIdentity = false;
  };

} // namespace stillhead
