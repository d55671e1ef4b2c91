// SPDX-License-Identifier: GPL-2.0-or-later
// Walks a straight segment over the bilinear surface. The segment is cut where it crosses the lines through pixel
// centres; between cuts the elevation is a quadratic, given exactly by both end values and a bend. The cost is a small
// constant for each cell crossed, nothing is allocated.
#pragma once

#include "core/terrain/terrainreader.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace stillhead
{

  constexpr double NO_ELEVATION = std::numeric_limits<double>::quiet_NaN();

  //! The two columns (or rows) of pixels between which a place lies; both are the same where only one carries weight.
  struct GridCell
  {
      int low = 0;
      int high = 0;

      //! Share of the way from low to high at \a position, exactly 0 or 1 on a line through pixel centres.
      double share( double position ) const { return low == high ? 0.0 : position - low; }
  };

  /**
   * One axis of a walk. Interval i lies between grid lines i and i + 1; line k stands at pixel centre k, line −1 and line n
   * at the raster's outer edges, half a pixel farther out, where the edge values are held.
   */
  class GridAxis
  {
    public:
      GridAxis( double start, double delta, int pixels )
        : mStart( start )
        , mDelta( delta )
        , mPixels( pixels )
        , mInterval( firstInterval() )
      {
        mOnLine = delta == 0.0 && start >= 0.0 && start <= pixels - 1 && start == std::floor( start );
      }

      bool outside() const { return mInterval < -1 || mInterval >= mPixels; }

      GridCell cell() const
      {
        if ( mOnLine )
          return { static_cast<int>( mStart ), static_cast<int>( mStart ) };
        return { std::max( mInterval, 0 ), std::min( mInterval + 1, mPixels - 1 ) };
      }

      //! Share of the segment (0 to 1) at the next grid line; infinite where there is none ahead.
      double nextCrossing() const
      {
        if ( mDelta == 0.0 || ( mDelta > 0.0 ? mInterval >= mPixels : mInterval < -1 ) )
          return std::numeric_limits<double>::infinity();
        return ( nextLine() - mStart ) / mDelta;
      }

      //! Position of the next grid line.
      double nextLine() const { return lineAt( mDelta > 0.0 ? mInterval + 1 : mInterval ); }

      void advance() { mInterval += mDelta > 0.0 ? 1 : -1; }

      //! Position at share \a t of the segment, kept within the present interval.
      double positionAt( double t ) const
      {
        const double position = mStart + t * mDelta;
        return outside() ? position : std::clamp( position, lineAt( mInterval ), lineAt( mInterval + 1 ) );
      }

    private:
      double mStart;
      double mDelta;
      int mPixels;
      int mInterval;
      bool mOnLine = false;

      double lineAt( int line ) const { return std::clamp( static_cast<double>( line ), -0.5, mPixels - 0.5 ); }

      int firstInterval() const
      {
        const double edge = mPixels - 0.5;
        if ( mDelta < 0.0 )
        {
          if ( !( mStart > -0.5 ) )
            return -2;
          return mStart > edge ? mPixels : std::min( static_cast<int>( std::ceil( mStart ) ) - 1, mPixels - 1 );
        }
        if ( !( mStart >= -0.5 ) )
          return -2;
        if ( mStart > edge || ( mDelta > 0.0 && mStart == edge ) )
          return mPixels;
        return std::min( static_cast<int>( std::floor( mStart ) ), mPixels - 1 );
      }
  };

  //! The four pixels around a place, in metres.
  struct CellCorners
  {
      double lowLow;
      double highLow;
      double lowHigh;
      double highHigh;

      CellCorners( TerrainReader &reader, const GridCell &columns, const GridCell &rows )
        : lowLow( reader.at( columns.low, rows.low ) )
        , highLow( reader.at( columns.high, rows.low ) )
        , lowHigh( reader.at( columns.low, rows.high ) )
        , highHigh( reader.at( columns.high, rows.high ) )
      {
      }

      //! The bilinear surface at shares \a x and \a y of the cell. With shares of exactly 0 and 1 it is the pixel itself, so
      //! neighbouring cells agree to the bit.
      double at( double x, double y ) const
      {
        const double low = ( 1.0 - y ) * lowLow + y * lowHigh;
        const double high = ( 1.0 - y ) * highLow + y * highHigh;
        return ( 1.0 - x ) * low + x * high;
      }

      //! Coefficient of x·y; NaN if any pixel has no elevation.
      double twist() const { return lowLow - highLow - lowHigh + highHigh; }
  };

  /**
   * Calls \a emit( tFrom, tTo, fromM, toM, bendM ) for every piece of the segment from \a from to \a to (pixel-centre
   * coordinates), in order and without gaps from t = 0 to 1. bendM is NaN for a piece without elevation; else the
   * elevation at share τ of the piece is (1 − τ)·fromM + τ·toM + bendM·τ·(τ − 1).
   */
  template <typename Emit>
  void walkSegment( TerrainReader &reader, const TerrainPoint &from, const TerrainPoint &to, Emit emit )
  {
    const double dx = to.x - from.x;
    const double dy = to.y - from.y;
    GridAxis columns( from.x, dx, reader.columns() );
    GridAxis rows( from.y, dy, reader.rows() );
    // Crossings nearer than a billionth of a pixel are one: the segment passes through a pixel centre.
    const double together = 1e-9 / std::max( std::hypot( dx, dy ), 1e-9 );

    double t = 0.0;
    double x = from.x;
    double y = from.y;
    while ( t < 1.0 )
    {
      const double tColumn = columns.nextCrossing();
      const double tRow = rows.nextCrossing();
      double tNext = std::min( tColumn, tRow );
      const bool last = !( tNext < 1.0 - together );
      const bool crossColumn = !last && tColumn <= tNext + together;
      const bool crossRow = !last && tRow <= tNext + together;
      tNext = last ? 1.0 : std::max( tNext, t );
      const double xNext = crossColumn ? columns.nextLine() : ( last ? to.x : columns.positionAt( tNext ) );
      const double yNext = crossRow ? rows.nextLine() : ( last ? to.y : rows.positionAt( tNext ) );

      if ( tNext > t )
      {
        if ( columns.outside() || rows.outside() )
        {
          emit( t, tNext, NO_ELEVATION, NO_ELEVATION, NO_ELEVATION );
        }
        else
        {
          const GridCell column = columns.cell();
          const GridCell row = rows.cell();
          const CellCorners corners( reader, column, row );
          emit( t, tNext, corners.at( column.share( x ), row.share( y ) ),
            corners.at( column.share( xNext ), row.share( yNext ) ), corners.twist() * ( xNext - x ) * ( yNext - y ) );
        }
      }
      t = tNext;
      x = xNext;
      y = yNext;
      if ( crossColumn )
        columns.advance();
      if ( crossRow )
        rows.advance();
    }
  }

} // namespace stillhead
