// SPDX-License-Identifier: GPL-2.0-or-later
// Random drawings as a hurried planner makes them: most ends snap to a grid of places, some stop short or run past, lines
// cross, double, close on themselves and come in several systems.
#pragma once

#include "tests/support/memoryterrain.h"
#include "tests/support/networksketch.h"

#include <cmath>
#include <random>

namespace stillhead::test
{

  struct LayoutOptions
  {
      int lines = 20;
      double gridM = 10.0;  //!< distance of the places to which ends snap
      int places = 6;       //!< places along each axis
      int stride = 6;       //!< a leg leads no farther than this many places along each axis
      double jitterM = 0.0; //!< ends miss their place by up to this, each way
      bool systems = false;
      bool duplicates = true; //!< now and then a line is drawn twice
  };

  class RandomLayout
  {
    public:
      explicit RandomLayout( unsigned seed )
        : mRandom( seed )
      {
      }

      int whole( int low, int high ) { return std::uniform_int_distribution<int>( low, high )( mRandom ); }
      double between( double low, double high )
      {
        return std::uniform_real_distribution<double>( low, high )( mRandom );
      }
      bool chance( double share ) { return between( 0.0, 1.0 ) < share; }

      PlanPoint place( const LayoutOptions &options )
      {
        mColumn = whole( 0, options.places - 1 );
        mRow = whole( 0, options.places - 1 );
        return jittered( options );
      }

      //! A place within the stride of the last one.
      PlanPoint nextPlace( const LayoutOptions &options )
      {
        const auto step = [&]( int from ) {
          return whole( std::max( 0, from - options.stride ), std::min( options.places - 1, from + options.stride ) );
        };
        mColumn = step( mColumn );
        mRow = step( mRow );
        return jittered( options );
      }

      Drawing drawing( const LayoutOptions &options )
      {
        Drawing drawing;
        if ( options.systems )
          drawing.systems = { "", "north", "south" };
        for ( int i = 0; i < options.lines; ++i )
        {
          DrawnLine line;
          line.role = chance( 0.4 ) ? Role::Lateral : Role::Mainline;
          line.system = options.systems ? whole( 0, 2 ) : 0;
          line.coverM = 0.25 * whole( 0, 3 );
          line.feature = i;
          std::vector<PlanPoint> vertices { place( options ) };
          const int legs = whole( 1, 3 );
          for ( int leg = 0; leg < legs; ++leg )
            vertices.push_back( nextPlace( options ) );
          if ( legs > 1 && chance( 0.15 ) )
            vertices.push_back( vertices.front() );
          addLine( drawing, vertices, line );
          if ( options.duplicates && chance( 0.05 ) )
            addLine( drawing, vertices, line );
        }
        return drawing;
      }

      /**
       * Hills of a few metres around 100 m over the whole layout and some metres beyond, in pixels of \a pixelM with a roughness
       * of their own and \a holes groups of pixels without elevation.
       */
      MemoryTerrain hills( const LayoutOptions &options, double pixelM, int holes )
      {
        const double extent = options.gridM * ( options.places - 1 ) + 10.0;
        const int side = static_cast<int>( extent / pixelM ) + 2;
        const double waves[] { between( 0.05, 0.2 ), between( 0.05, 0.2 ), between( 0.0, 6.0 ), between( 0.0, 6.0 ) };
        const double height = between( 2.0, 15.0 );
        const double roughness = between( 0.0, 1.0 );
        MemoryTerrain terrain =
          MemoryTerrain::sampled( side, side, centresAt( -5.0, extent - 5.0, pixelM ), [&]( double x, double y ) {
            return 100.0 + height * std::sin( waves[0] * x + waves[2] ) * std::cos( waves[1] * y + waves[3] )
              + between( -roughness, roughness );
          } );
        for ( int i = 0; i < holes; ++i )
        {
          const int column = whole( 0, side - 3 );
          const int row = whole( 0, side - 3 );
          for ( int k = 0; k < 4; ++k )
            terrain.set( column + k % 2, row + k / 2, NODATA );
        }
        return terrain;
      }

    private:
      std::mt19937 mRandom;
      int mColumn = 0;
      int mRow = 0;

      PlanPoint jittered( const LayoutOptions &options )
      {
        return { options.gridM * mColumn + between( -options.jitterM, options.jitterM ),
          options.gridM * mRow + between( -options.jitterM, options.jitterM ) };
      }
  };

} // namespace stillhead::test
