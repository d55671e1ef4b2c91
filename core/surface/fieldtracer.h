// SPDX-License-Identifier: GPL-2.0-or-later
// Follows the lines of equal value over a raster, row by row, and the border of where it has values at all. Values are
// at the cell centres and straight between them; in the outer half of a cell at the border they are held. What comes
// out are short directed steps, to be strung into lines and rings by who takes them.
#pragma once

#include "core/terrain/rastergrid.h"

#include <array>
#include <cstdint>
#include <vector>

namespace stillhead
{

  //! A vertex that neighbouring cells find alike: the same key, the same bits of its place.
  struct TraceVertex
  {
      std::uint64_t key = 0;
      TerrainPoint pixel; //!< in pixel-centre coordinates
  };

  //! Takes the steps. With columns to the right and rows downwards, steps turn positively around what they enclose.
  class TraceSink
  {
    public:
      virtual ~TraceSink() = default;

      //! A step along \a level (its index), values at or above it on the positive side.
      virtual void onLevel( int level, const TraceVertex &from, const TraceVertex &to ) = 0;

      //! A step along the border of the valid cells, in \a band (values at or above \a band levels).
      virtual void onBorder( int band, const TraceVertex &from, const TraceVertex &to ) = 0;
  };

  class FieldTracer
  {
    public:
      /**
       * \param columns of the raster
       * \param levels rising; a value equal to one counts as above it
       * \param sink takes the steps
       */
      FieldTracer( int columns, std::vector<double> levels, TraceSink &sink );

      //! The next row of the raster, from the top; NaN where it has no value.
      void addRow( const double *values );

      //! Call it once after the last row.
      void finish();

    private:
      //! A corner of a square: the centre of a cell, or of a quarter's the middle of a cell's side or a cell's corner.
      struct Corner
      {
          double value = 0.0;
          int band = 0;
          int x = 0; //!< Half cells from the raster's left edge
          int y = 0;
      };
      using Square = std::array<Corner, 4>; //!< In positive turning order

      int bandOf( double value ) const;
      Corner mean( const Corner &a, const Corner &b, int x, int y ) const;
      void traceRow();
      void tracePart( int x, int y );
      void stepsOnLevels( const Square &square );
      void stepsOnBorder( const Corner &from, const Corner &to, bool isLowerCell );
      TraceVertex crossing( Corner a, Corner b, int level ) const;
      TraceVertex nodeVertex( const Corner &node, bool isLowerCell ) const;
      std::uint64_t key( int x, int y, int kind, int level ) const;

      const int mColumns;
      const std::vector<double> mLevels;
      TraceSink &mSink;
      int mRow = 0;            //!< Of mLower
      bool mIsPinched = false; //!< Two cells of the square at hand meet at its middle only
      Square mCells {};        //!< Of the square at hand
      // One cell more on either side, without value.
      std::vector<double> mUpper;
      std::vector<double> mLower;
      std::vector<int> mUpperBands;
      std::vector<int> mLowerBands;
  };

} // namespace stillhead
