// SPDX-License-Identifier: GPL-2.0-or-later
// Figures of single places, on pipe and off it, from a result that is there: by the same profile and the same rule as the
// result itself.
#pragma once

#include "core/job/staticjob.h"
#include "core/profile/profilebuilder.h"

#include <optional>

namespace stillhead
{

  //! What is known of a place; figures are NaN where there are none.
  struct PlaceFigures
  {
      double pipeM = 0.0;   //!< elevation of the pipe, or of one that would lie here
      double groundM = 0.0; //!< NaN where the terrain has none
      double lowPa = 0.0;   //!< static pressure, low case; negative above the static level
      double highPa = 0.0;  //!< high case
      StaticLevels levels;
      int piece = -1; //!< pipe: the piece that the place lies on
  };

  //! Answers for one thread. The result, the terrain and the way to it outlive the probe.
  class PlaceProbe
  {
    public:
      /**
       * \param useLineZ whether the result was made with drawn Z
       */
      PlaceProbe( const StaticResult &result, const PlanToTerrain &planToTerrain, TileCache &terrain, bool useLineZ,
        double specificWeightNPerM3 );

      //! Figures of the pipe at \a on.
      PlaceFigures onPipe( const PlaceOnLine &on );

      //! What pipe at \a place, \a coverM deep, would hold if it were joined to the source. Nothing where no pipe is fed.
      std::optional<PlaceFigures> offPipe( const PlanPoint &place, double coverM );

      //! The exact profile of a line, until the next is asked for.
      const Profile &profileOf( int line );

      //! The elevation at which pipe under \a levelM holds \a pressurePa.
      double elevationWhereM( double levelM, double pressurePa ) const
      {
        return levelM - pressurePa / mSpecificWeightNPerM3;
      }

    private:
      double groundAtM( const PlanPoint &place );
      void setPressures( PlaceFigures &figures ) const;

      const StaticResult &mResult;
      std::unique_ptr<PlanToTerrain> mPlanToTerrain;
      TerrainReader mReader;
      ProfileBuilder mBuilder;
      double mSpecificWeightNPerM3;
      int mLine = -1; //!< whose profile is at hand
      Profile mProfile;
  };

  //! How far a place is past its limits; negative: how much room there is. NaN without figures.
  struct PlaceMargins
  {
      double overPa = 0.0;  //!< of the high case above the most acceptable pressure
      double underPa = 0.0; //!< of the low case under the least
  };

  PlaceMargins marginsOf( const PlaceFigures &figures, const Limits &limits, Role role );

  //! The piece of \a result that \a on lies on; of two that meet there the later, at the line's end the last. −1: none.
  int pieceOn( const StaticResult &result, const PlaceOnLine &on );

} // namespace stillhead
