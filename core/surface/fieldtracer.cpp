// SPDX-License-Identifier: GPL-2.0-or-later
// Marching squares over the squares between four cell centres. A square whose cells all lie in one band costs one
// comparison. Where a cell is missing, the quarters of the square that belong to the others are traced by themselves.
#include "core/surface/fieldtracer.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

namespace stillhead
{

  namespace
  {
    constexpr int NO_BAND = -1;

    // A line never runs through a cell centre itself, so that no ring touches another or itself: it keeps off by this
    // part of the way to the next centre. A cell equal to a level then still lies within what is above it.
    constexpr double KEPT_OFF = 1e-6;

    constexpr unsigned LEVEL_BITS = 16;
    constexpr unsigned KIND_BITS = 2;

    //! What a key stands for beside its node: the way to the next node, or the node itself.
    enum Kind
    {
      TO_RIGHT,
      DOWN,
      NODE,
      NODE_OF_LOWER_CELL
    };

    double toPixel( int halfCells )
    {
      return 0.5 * ( halfCells - 1 );
    }

    //! Value of the bilinear surface where it neither rises nor falls; for squares that have such a place inside.
    double saddleValue( double a, double b, double c, double d )
    {
      return ( a * c - b * d ) / ( a + c - b - d );
    }

    bool isCell( int x, int y )
    {
      return x % 2 != 0 && y % 2 != 0;
    }
  } // namespace

  FieldTracer::FieldTracer( int columns, std::vector<double> levels, TraceSink &sink )
    : mColumns( columns )
    , mLevels( std::move( levels ) )
    , mSink( sink )
    , mUpper( static_cast<std::size_t>( columns ) + 2, std::numeric_limits<double>::quiet_NaN() )
    , mLower( mUpper )
    , mUpperBands( mUpper.size(), NO_BAND )
    , mLowerBands( mUpperBands )
  {
  }

  int FieldTracer::bandOf( double value ) const
  {
    if ( std::isnan( value ) )
      return NO_BAND;
    int band = 0;
    for ( const double level : mLevels )
      band += value >= level ? 1 : 0;
    return band;
  }

  void FieldTracer::addRow( const double *values )
  {
    mUpper.swap( mLower );
    mUpperBands.swap( mLowerBands );
    for ( std::size_t i = 0; i < static_cast<std::size_t>( mColumns ); ++i )
    {
      mLower[i + 1] = values[i];
      mLowerBands[i + 1] = bandOf( values[i] );
    }
    traceRow();
    ++mRow;
  }

  void FieldTracer::finish()
  {
    mUpper.swap( mLower );
    mUpperBands.swap( mLowerBands );
    std::fill( mLower.begin(), mLower.end(), std::numeric_limits<double>::quiet_NaN() );
    std::fill( mLowerBands.begin(), mLowerBands.end(), NO_BAND );
    traceRow();
  }

  void FieldTracer::traceRow()
  {
    const int y = 2 * mRow;
    for ( std::size_t i = 0; i + 1 < mUpper.size(); ++i )
    {
      const int band = mUpperBands[i];
      if ( band == mUpperBands[i + 1] && band == mLowerBands[i] && band == mLowerBands[i + 1] )
        continue;
      const int x = 2 * static_cast<int>( i );
      mCells = { Corner { mUpper[i], band, x - 1, y - 1 }, Corner { mUpper[i + 1], mUpperBands[i + 1], x + 1, y - 1 },
        Corner { mLower[i + 1], mLowerBands[i + 1], x + 1, y + 1 },
        Corner { mLower[i], mLowerBands[i], x - 1, y + 1 } };
      const bool isWhole =
        std::none_of( mCells.begin(), mCells.end(), []( const Corner &cell ) { return cell.band == NO_BAND; } );
      if ( isWhole )
        stepsOnLevels( mCells );
      else
        tracePart( x, y );
    }
  }

  FieldTracer::Corner FieldTracer::mean( const Corner &a, const Corner &b, int x, int y ) const
  {
    if ( a.band == NO_BAND || b.band == NO_BAND )
    {
      const Corner &only = a.band == NO_BAND ? b : a;
      return { only.value, only.band, x, y };
    }
    const double value = 0.5 * ( a.value + b.value );
    return { value, bandOf( value ), x, y };
  }

  void FieldTracer::tracePart( int x, int y )
  {
    const std::array<Corner, 4> sides { mean( mCells[0], mCells[1], x, y - 1 ), mean( mCells[1], mCells[2], x + 1, y ),
      mean( mCells[2], mCells[3], x, y + 1 ), mean( mCells[3], mCells[0], x - 1, y ) };
    double sum = 0.0;
    int count = 0;
    for ( const Corner &cell : mCells )
    {
      sum += cell.band == NO_BAND ? 0.0 : cell.value;
      count += cell.band == NO_BAND ? 0 : 1;
    }
    const Corner middle { sum / count, bandOf( sum / count ), x, y };
    mIsPinched = count == 2 && ( mCells[0].band == NO_BAND ) == ( mCells[2].band == NO_BAND );
    for ( std::size_t i = 0; i < 4; ++i )
    {
      if ( mCells[i].band == NO_BAND )
        continue;
      const Corner &after = sides[i];
      const Corner &before = sides[( i + 3 ) % 4];
      stepsOnLevels( { mCells[i], after, middle, before } );
      const bool isLower = i >= 2;
      if ( mCells[( i + 1 ) % 4].band == NO_BAND )
        stepsOnBorder( after, middle, isLower );
      if ( mCells[( i + 3 ) % 4].band == NO_BAND )
        stepsOnBorder( middle, before, isLower );
    }
  }

  void FieldTracer::stepsOnLevels( const Square &square )
  {
    const auto [least, most] = std::minmax( { square[0].band, square[1].band, square[2].band, square[3].band } );
    for ( int level = least; level < most; ++level )
    {
      std::array<bool, 4> isAbove {};
      int changes = 0;
      for ( std::size_t i = 0; i < 4; ++i )
        isAbove[i] = square[i].band > level;
      for ( std::size_t i = 0; i < 4; ++i )
        changes += isAbove[i] != isAbove[( i + 1 ) % 4] ? 1 : 0;
      const bool highsMeet = changes == 4
        && saddleValue( square[0].value, square[1].value, square[2].value, square[3].value )
          >= mLevels[static_cast<std::size_t>( level )];
      for ( std::size_t out = 0; out < 4; ++out )
      {
        if ( !isAbove[out] || isAbove[( out + 1 ) % 4] )
          continue;
        // Out over this side; back over the one side where the way leads up, in a saddle over a neighbouring one.
        std::size_t in = ( out + ( highsMeet ? 1 : 3 ) ) % 4;
        for ( std::size_t i = 0; changes == 2 && i < 4; ++i )
        {
          if ( !isAbove[i] && isAbove[( i + 1 ) % 4] )
            in = i;
        }
        mSink.onLevel( level, crossing( square[out], square[( out + 1 ) % 4], level ),
          crossing( square[in], square[( in + 1 ) % 4], level ) );
      }
    }
  }

  void FieldTracer::stepsOnBorder( const Corner &from, const Corner &to, bool isLowerCell )
  {
    TraceVertex last = nodeVertex( from, isLowerCell );
    const int step = to.band > from.band ? 1 : -1;
    for ( int band = from.band; band != to.band; band += step )
    {
      const TraceVertex next = crossing( from, to, step > 0 ? band : band - 1 );
      mSink.onBorder( band, last, next );
      last = next;
    }
    mSink.onBorder( to.band, last, nodeVertex( to, isLowerCell ) );
  }

  std::uint64_t FieldTracer::key( int x, int y, int kind, int level ) const
  {
    const std::uint64_t across = 2 * static_cast<std::uint64_t>( mColumns ) + 2;
    const std::uint64_t node = static_cast<std::uint64_t>( y + 1 ) * across + static_cast<std::uint64_t>( x + 1 );
    return ( node << ( KIND_BITS + LEVEL_BITS ) ) | ( static_cast<std::uint64_t>( kind ) << LEVEL_BITS )
      | static_cast<std::uint64_t>( level );
  }

  TraceVertex FieldTracer::nodeVertex( const Corner &node, bool isLowerCell ) const
  {
    const bool isMiddle = node.x % 2 == 0 && node.y % 2 == 0;
    const Kind kind = mIsPinched && isMiddle && isLowerCell ? NODE_OF_LOWER_CELL : NODE;
    return { key( node.x, node.y, kind, 0 ), { toPixel( node.x ), toPixel( node.y ) } };
  }

  TraceVertex FieldTracer::crossing( Corner a, Corner b, int level ) const
  {
    // Half of the way between two cells: both squares beside it must find the same place, and one of them may know the
    // whole way only.
    for ( const auto &[cell, other] : { std::make_pair( &a, &b ), std::make_pair( &b, &a ) } )
    {
      if ( !isCell( cell->x, cell->y ) || isCell( other->x, other->y ) )
        continue;
      const int x = 2 * other->x - cell->x;
      const int y = 2 * other->y - cell->y;
      *other =
        *std::find_if( mCells.begin(), mCells.end(), [x, y]( const Corner &far ) { return far.x == x && far.y == y; } );
      break;
    }
    if ( b.y < a.y || b.x < a.x )
      std::swap( a, b );
    const double part = ( mLevels[static_cast<std::size_t>( level )] - a.value ) / ( b.value - a.value );
    const double halves = ( isCell( a.x, a.y ) ? 1.0 : 0.5 ) * std::clamp( part, KEPT_OFF, 1.0 - KEPT_OFF );
    const bool isDown = a.x == b.x;
    return { key( a.x, a.y, isDown ? DOWN : TO_RIGHT, level ),
      { toPixel( a.x ) + ( isDown ? 0.0 : halves ), toPixel( a.y ) + ( isDown ? halves : 0.0 ) } };
  }

} // namespace stillhead
