// SPDX-License-Identifier: GPL-2.0-or-later
// Makes the exact profile of a line: over the terrain at its depth of cover, or from drawn Z.
#pragma once

#include "core/network/canonicaldrawing.h"
#include "core/plan/plantoterrain.h"
#include "core/profile/profile.h"
#include "core/terrain/terrainreader.h"

#include <memory>

namespace stillhead
{

  //! True if drawn Z is a survey: not missing, not a number or zero throughout.
  bool hasSurvey( const CanonicalDrawing &drawing, const CanonicalLine &line );

  //! Builds profiles; one object serves one thread.
  class ProfileBuilder
  {
    public:
      ProfileBuilder(
        const CanonicalDrawing &drawing, const PlanToTerrain &planToTerrain, TileCache &terrain, bool useLineZ );

      /**
       * The profile of \a line into \a profile (cleared first, its memory is reused). Lines whose CRS differs from the terrain's
       * are followed to within a twentieth of a pixel and half a millimetre of ground.
       */
      void build( const CanonicalLine &line, Profile &profile );

    private:
      void buildFromSurvey( const CanonicalLine &line, Profile &profile ) const;
      void walkLeg( std::size_t vertex, const CanonicalLine &line, Profile &profile );
      void walkStraight(
        const TerrainPoint &from, const TerrainPoint &to, double fromM, double toM, double coverM, Profile &profile );
      void follow( const PlanPoint &a, const PlanPoint &b, const TerrainPoint &from, const TerrainPoint &to,
        double fromM, double toM, double coverM, double allowedPixels, int depth, Profile &profile );
      TerrainPoint pixelOf( const PlanPoint &place ) const;

      const CanonicalDrawing &mDrawing;
      std::unique_ptr<PlanToTerrain> mPlanToTerrain;
      TerrainReader mReader;
      bool mUseLineZ;
  };

} // namespace stillhead
