// SPDX-License-Identifier: GPL-2.0-or-later
// From the lines' CRS to the terrain's CRS. core/geo implements it with PROJ; here is the case of one common CRS.
#pragma once

#include "core/plan/plan.h"
#include "core/terrain/rastergrid.h"

#include <cstddef>
#include <memory>

namespace stillhead
{

  //! Takes places of the plan to the terrain's CRS. One object serves one thread: take a clone() for each.
  class PlanToTerrain
  {
    public:
      virtual ~PlanToTerrain() = default;

      virtual std::unique_ptr<PlanToTerrain> clone() const = 0;

      //! True where both CRSs are the same: straight lines stay straight and nothing needs to be followed.
      virtual bool isIdentity() const = 0;

      //! Transforms \a count places; one that cannot be transformed becomes NaN.
      virtual void transform( const PlanPoint *plan, TerrainPoint *terrain, std::size_t count ) const = 0;
  };

  //! Lines and terrain in one CRS.
  class SamePlan : public PlanToTerrain
  {
    public:
      std::unique_ptr<PlanToTerrain> clone() const override { return std::make_unique<SamePlan>(); }
      bool isIdentity() const override { return true; }
      void transform( const PlanPoint *plan, TerrainPoint *terrain, std::size_t count ) const override
      {
        for ( std::size_t i = 0; i < count; ++i )
          terrain[i] = { plan[i].x, plan[i].y };
      }
  };

} // namespace stillhead
