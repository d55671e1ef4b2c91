// SPDX-License-Identifier: GPL-2.0-or-later
// Marching squares with true branches: on the sides of a square the ground is straight, so crossings are exact; between
// them the line is a branch of a hyperbola, of which as many places are solved as the tolerance needs.
#include "core/surface/groundtracer.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

namespace stillhead
{

  namespace
  {
    constexpr int NO_BAND = -1;
    constexpr int DEEPEST = 12;
    constexpr unsigned ELEVATION_BITS = 16;
    constexpr std::uint64_t INNER_KEYS = std::uint64_t( 1 ) << 63; //!< no node has such a key

    //! The bilinear surface of a square at one elevation, solved for one coordinate.
    struct Branch
    {
        const std::array<double, 4> &groundsM;
        double twistM;
        double elevationM;

        //! Place at \a u; \a v where the ground does not say.
        double vAt( double u, double v ) const
        {
          const double slope = groundsM[3] - groundsM[0] + twistM * u;
          return slope != 0.0 ? ( elevationM - groundsM[0] - ( groundsM[1] - groundsM[0] ) * u ) / slope : v;
        }
        double uAt( double v, double u ) const
        {
          const double slope = groundsM[1] - groundsM[0] + twistM * v;
          return slope != 0.0 ? ( elevationM - groundsM[0] - ( groundsM[3] - groundsM[0] ) * v ) / slope : u;
        }
    };

    double between( double value, double a, double b )
    {
      return std::clamp( value, std::min( a, b ), std::max( a, b ) );
    }
  } // namespace

  GroundTracer::GroundTracer( int columns, std::vector<double> elevationsM, TakeStep take )
    : mColumns( columns )
    , mElevationsM( std::move( elevationsM ) )
    , mTake( std::move( take ) )
  {
    for ( Row *row : { &mUpper, &mLower } )
    {
      row->groundsM.resize( static_cast<std::size_t>( columns ) + 2 );
      row->bands.resize( row->groundsM.size() );
      row->inside.assign( row->groundsM.size(), 1 );
    }
  }

  void GroundTracer::addRow( const double *groundsM, const unsigned char *inside )
  {
    std::swap( mUpper, mLower );
    for ( std::size_t node = 0; node < mLower.groundsM.size(); ++node )
    {
      const std::size_t column = std::clamp<std::size_t>( node, 1, static_cast<std::size_t>( mColumns ) ) - 1;
      const double groundM = groundsM[column];
      int band = std::isnan( groundM ) ? NO_BAND : 0;
      for ( const double elevationM : mElevationsM )
        band += groundM >= elevationM ? 1 : 0;
      mLower.groundsM[node] = groundM;
      mLower.bands[node] = band;
      if ( inside )
        mLower.inside[node] = inside[column];
    }
    if ( mRow == 0 )
      mUpper = mLower;
    traceRow( mRow == 0 ? -0.5 : mRow - 1.0, mRow );
    ++mRow;
  }

  void GroundTracer::finish()
  {
    mUpper = mLower;
    traceRow( mRow - 1.0, mRow - 0.5 );
  }

  double GroundTracer::positionOf( int node ) const
  {
    return std::clamp( node - 1.0, -0.5, mColumns - 0.5 );
  }

  void GroundTracer::traceRow( double top, double bottom )
  {
    for ( int column = 0; column <= mColumns; ++column )
    {
      const std::size_t left = static_cast<std::size_t>( column );
      const std::array<int, 4> bands { mUpper.bands[left], mUpper.bands[left + 1], mLower.bands[left + 1],
        mLower.bands[left] };
      const auto [least, most] = std::minmax( { bands[0], bands[1], bands[2], bands[3] } );
      if ( least == most || least == NO_BAND )
        continue;
      Square square;
      square.column = column;
      square.left = positionOf( column );
      square.right = positionOf( column + 1 );
      square.top = top;
      square.bottom = bottom;
      square.groundsM = { mUpper.groundsM[left], mUpper.groundsM[left + 1], mLower.groundsM[left + 1],
        mLower.groundsM[left] };
      square.bands = bands;
      square.inside = { mUpper.inside[left] != 0, mUpper.inside[left + 1] != 0, mLower.inside[left + 1] != 0,
        mLower.inside[left] != 0 };
      traceSquare( square );
    }
    ++mNodeRow;
  }

  void GroundTracer::traceSquare( const Square &square )
  {
    const std::array<int, 4> &bands = square.bands;
    const auto [least, most] = std::minmax( { bands[0], bands[1], bands[2], bands[3] } );
    for ( int elevation = least; elevation < most; ++elevation )
    {
      const auto isAbove = [&]( std::size_t node ) { return bands[node % 4] > elevation; };
      const bool isSaddle = isAbove( 0 ) == isAbove( 2 ) && isAbove( 1 ) == isAbove( 3 );
      // Where both diagonals differ, the ground where it neither rises nor falls says which two corners hang together.
      const std::array<double, 4> &z = square.groundsM;
      const bool highsMeet = isSaddle
        && ( z[0] * z[2] - z[1] * z[3] ) / ( z[0] + z[2] - z[1] - z[3] )
          >= mElevationsM[static_cast<std::size_t>( elevation )];
      for ( std::size_t out = 0; out < 4; ++out )
      {
        if ( !isAbove( out ) || isAbove( out + 1 ) )
          continue;
        // Out over this side; back over the one side where the way leads up, in a saddle over a neighbouring one.
        std::size_t in = out + ( highsMeet ? 1 : 3 );
        for ( std::size_t side = out + 1; !isSaddle && side < out + 4; ++side )
        {
          if ( !isAbove( side ) && isAbove( side + 1 ) )
            in = side;
        }
        followBranch(
          square, elevation, crossingOf( square, out, elevation ), crossingOf( square, in % 4, elevation ) );
      }
    }
  }

  GroundTracer::Crossing GroundTracer::crossingOf( const Square &square, std::size_t side, int elevation ) const
  {
    // From the lesser node to the greater, so that both squares beside the side find the same bits.
    const bool isDown = side % 2 == 1;
    const std::size_t from = side == 0 || side == 3 ? 0 : ( side == 1 ? 1 : 3 );
    const std::size_t to = side == 0 ? 1 : ( side == 3 ? 3 : 2 );
    const double fromM = square.groundsM[from];
    const double part = std::clamp(
      ( mElevationsM[static_cast<std::size_t>( elevation )] - fromM ) / ( square.groundsM[to] - fromM ), 0.0, 1.0 );
    Crossing crossing;
    crossing.place = isDown ? Local { side == 1 ? 1.0 : 0.0, part } : Local { part, side == 2 ? 1.0 : 0.0 };
    crossing.vertex.pixel = square.pixelOf( crossing.place );
    // The very bits of the side, not of a sum.
    if ( isDown )
      crossing.vertex.pixel.x = side == 1 ? square.right : square.left;
    else
      crossing.vertex.pixel.y = side == 2 ? square.bottom : square.top;
    const std::uint64_t column = static_cast<std::uint64_t>( square.column + ( side == 1 ? 1 : 0 ) );
    const std::uint64_t row = static_cast<std::uint64_t>( mNodeRow + ( side == 2 ? 1 : 0 ) );
    const std::uint64_t node = row * ( static_cast<std::uint64_t>( mColumns ) + 2 ) + column;
    crossing.vertex.key =
      ( ( 2 * node + ( isDown ? 1 : 0 ) ) << ELEVATION_BITS ) | static_cast<std::uint64_t>( elevation );
    return crossing;
  }

  void GroundTracer::refine( const Square &square, double elevationM, const Local &from, const Local &to, int depth )
  {
    const double du = std::abs( to.u - from.u );
    const double dv = std::abs( to.v - from.v );
    // Along a chord the ground is a parabola, farthest off in its middle.
    if ( 0.25 * std::abs( square.twistM() ) * du * dv > GROUND_LINE_TOLERANCE_M && depth < DEEPEST )
    {
      const Branch branch { square.groundsM, square.twistM(), elevationM };
      Local middle { 0.5 * ( from.u + to.u ), 0.5 * ( from.v + to.v ) };
      if ( du >= dv )
        middle.v = between( branch.vAt( middle.u, middle.v ), from.v, to.v );
      else
        middle.u = between( branch.uAt( middle.v, middle.u ), from.u, to.u );
      refine( square, elevationM, from, middle, depth + 1 );
      refine( square, elevationM, middle, to, depth + 1 );
      return;
    }
    mPlaces.push_back( to );
  }

  void GroundTracer::followBranch( const Square &square, int elevation, const Crossing &from, const Crossing &to )
  {
    const auto isIn = [&square]( bool isRight, bool isLower ) {
      return square.inside[isLower ? ( isRight ? 2U : 3U ) : ( isRight ? 1U : 0U )];
    };
    const bool any = isIn( false, false ) || isIn( true, false ) || isIn( false, true ) || isIn( true, true );
    const bool all = isIn( false, false ) && isIn( true, false ) && isIn( false, true ) && isIn( true, true );
    if ( !any )
      return;
    const double elevationM = mElevationsM[static_cast<std::size_t>( elevation )];
    const Local a = from.place;
    const Local b = to.place;
    std::vector<Local> stops { a };
    if ( !all )
    {
      // Cells meet half-way between their centres: the line is cut there, to leave out what lies in other cells.
      const Branch branch { square.groundsM, square.twistM(), elevationM };
      if ( ( a.u - 0.5 ) * ( b.u - 0.5 ) < 0.0 )
        stops.push_back( { 0.5, between( branch.vAt( 0.5, 0.5 * ( a.v + b.v ) ), a.v, b.v ) } );
      if ( ( a.v - 0.5 ) * ( b.v - 0.5 ) < 0.0 )
        stops.push_back( { between( branch.uAt( 0.5, 0.5 * ( a.u + b.u ) ), a.u, b.u ), 0.5 } );
      const auto way = [&a]( const Local &place ) { return std::abs( place.u - a.u ) + std::abs( place.v - a.v ); };
      if ( stops.size() == 3 && way( stops[2] ) < way( stops[1] ) )
        std::swap( stops[1], stops[2] );
    }
    stops.push_back( b );
    mPlaces.assign( 1, a );
    for ( std::size_t i = 1; i < stops.size(); ++i )
      refine( square, elevationM, stops[i - 1], stops[i], 0 );

    TraceVertex last = from.vertex;
    for ( std::size_t i = 1; i < mPlaces.size(); ++i )
    {
      const Local &place = mPlaces[i];
      const bool isLast = i + 1 == mPlaces.size();
      const TraceVertex next = isLast ? to.vertex : TraceVertex { INNER_KEYS | mInner++, square.pixelOf( place ) };
      const bool isRight = 0.5 * ( mPlaces[i - 1].u + place.u ) > 0.5;
      const bool isLower = 0.5 * ( mPlaces[i - 1].v + place.v ) > 0.5;
      if ( isIn( isRight, isLower ) )
        mTake( elevation, last, next );
      last = next;
    }
  }

} // namespace stillhead
