// SPDX-License-Identifier: GPL-2.0-or-later
// Follows the lines of equal elevation on the ground, row by row, as exactly as a line of straight steps can: the ground
// is the bilinear surface that pipe is laid on, held in the outer half of the cells at the raster's edge, and where a cell
// that carries weight is missing there is none and no line.
#pragma once

#include "core/surface/fieldtracer.h"
#include "core/terrain/rastergrid.h"

#include <array>
#include <cstdint>
#include <functional>
#include <vector>

namespace stillhead
{

  //! How far the ground under the middle of a step may be off the line's elevation, in metres. Vertices are on it.
  constexpr double GROUND_LINE_TOLERANCE_M = 0.01;

  class GroundTracer
  {
    public:
      //! Takes a step along the elevation of that index; higher ground on the right of a raster whose rows run downwards.
      using TakeStep = std::function<void( int elevation, const TraceVertex &from, const TraceVertex &to )>;

      /**
       * \param columns of the raster
       * \param elevationsM rising; ground at one of them counts as above it
       */
      GroundTracer( int columns, std::vector<double> elevationsM, TakeStep take );

      /**
       * The next row of the raster, from the top.
       * \param groundsM NaN where it has no elevation
       * \param inside cells in which lines are wanted, 0 elsewhere; null: everywhere. The ground is the same either way.
       */
      void addRow( const double *groundsM, const unsigned char *inside );

      //! Call it once after the last row.
      void finish();

    private:
      //! A row of cells with the outer ones repeated: nodes stand at cell centres and at the raster's edges.
      struct Row
      {
          std::vector<double> groundsM;
          std::vector<int> bands; //!< number of elevations that the ground reaches, −1 where there is none
          std::vector<unsigned char> inside;
      };

      //! A place within a square, 0 to 1 from its left and its upper side.
      struct Local
      {
          double u = 0.0;
          double v = 0.0;
      };

      //! Ground between four nodes, from the upper left in turning order.
      struct Square
      {
          int column = 0; //!< of its left nodes
          double left = 0.0;
          double right = 0.0;
          double top = 0.0;
          double bottom = 0.0;
          std::array<double, 4> groundsM {};
          std::array<int, 4> bands {};
          std::array<bool, 4> inside {};

          double twistM() const { return groundsM[0] - groundsM[1] + groundsM[2] - groundsM[3]; }
          TerrainPoint pixelOf( const Local &place ) const
          {
            return { left + place.u * ( right - left ), top + place.v * ( bottom - top ) };
          }
      };

      //! Where a line enters or leaves a square.
      struct Crossing
      {
          Local place;
          TraceVertex vertex;
      };

      double positionOf( int node ) const;
      void traceRow( double top, double bottom );
      void traceSquare( const Square &square );
      Crossing crossingOf( const Square &square, std::size_t side, int elevation ) const;
      void followBranch( const Square &square, int elevation, const Crossing &from, const Crossing &to );
      void refine( const Square &square, double elevationM, const Local &from, const Local &to, int depth );

      const int mColumns;
      const std::vector<double> mElevationsM;
      const TakeStep mTake;
      Row mUpper;
      Row mLower;
      int mRow = 0;               //!< rows taken
      int mNodeRow = 0;           //!< of the upper nodes of the squares at hand
      std::uint64_t mInner = 0;   //!< vertices within squares so far
      std::vector<Local> mPlaces; //!< along the branch at hand
  };

} // namespace stillhead
