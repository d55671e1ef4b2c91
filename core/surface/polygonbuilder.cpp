// SPDX-License-Identifier: GPL-2.0-or-later
// Which holes lie in an outer ring is asked through its sides sorted by rows, so that one with very many holes costs no
// more than its sides and they together.
#include "core/surface/polygonbuilder.h"

#include <algorithm>
#include <cmath>
#include <set>
#include <utility>

namespace stillhead
{

  namespace
  {

    //! Twice the area, positive for outer rings; from the ring's own first vertex, so that small rings keep their digits.
    double doubleArea( const PixelRing &ring )
    {
      double sum = 0.0;
      for ( std::size_t i = 1; i + 1 < ring.size(); ++i )
      {
        sum += ( ring[i].x - ring[0].x ) * ( ring[i + 1].y - ring[0].y )
          - ( ring[i + 1].x - ring[0].x ) * ( ring[i].y - ring[0].y );
      }
      return sum;
    }

    //! True for the corner of a cell, the only place where rings can touch.
    bool isCellCorner( const TerrainPoint &vertex )
    {
      const double x = vertex.x + 0.5;
      const double y = vertex.y + 0.5;
      return x == std::floor( x ) && y == std::floor( y );
    }

    //! A ring that comes twice through one corner is several rings that touch there.
    void splitAtCorners( PixelRing ring, std::vector<PixelRing> &simple )
    {
      std::map<std::pair<double, double>, std::size_t> seen;
      PixelRing way;
      for ( const TerrainPoint &vertex : ring )
      {
        if ( isCellCorner( vertex ) )
        {
          const auto before = seen.find( { vertex.x, vertex.y } );
          if ( before != seen.end() )
          {
            const auto first = way.begin() + static_cast<std::ptrdiff_t>( before->second );
            simple.emplace_back( first, way.end() );
            for ( auto dropped = first + 1; dropped != way.end(); ++dropped )
            {
              if ( isCellCorner( *dropped ) )
                seen.erase( { dropped->x, dropped->y } );
            }
            way.erase( first + 1, way.end() );
            continue;
          }
          seen.emplace( std::make_pair( vertex.x, vertex.y ), way.size() );
        }
        way.push_back( vertex );
      }
      simple.push_back( std::move( way ) );
    }

    bool isHalfCell( double coordinate )
    {
      return 2.0 * coordinate == std::floor( 2.0 * coordinate );
    }

    //! Along a straight border every half cell left a vertex: those between two others on one line say nothing.
    PixelRing withoutFlatNodes( const PixelRing &ring )
    {
      PixelRing kept;
      for ( std::size_t i = 0; i < ring.size(); ++i )
      {
        const TerrainPoint &before = ring[( i + ring.size() - 1 ) % ring.size()];
        const TerrainPoint &vertex = ring[i];
        const TerrainPoint &after = ring[( i + 1 ) % ring.size()];
        const bool isFlat =
          ( before.x == vertex.x && vertex.x == after.x ) || ( before.y == vertex.y && vertex.y == after.y );
        if ( !isFlat || !isHalfCell( vertex.x ) || !isHalfCell( vertex.y ) )
          kept.push_back( vertex );
      }
      return kept;
    }

    //! A vertex of a hole that no other ring touches: every border has nodes between its corners.
    TerrainPoint freeVertex( const PixelRing &hole )
    {
      const auto found =
        std::find_if( hole.begin(), hole.end(), []( const TerrainPoint &vertex ) { return !isCellCorner( vertex ); } );
      return found == hole.end() ? hole.front() : *found;
    }

    double topOf( const PixelRing &ring )
    {
      return std::min_element(
        ring.begin(), ring.end(), []( const TerrainPoint &a, const TerrainPoint &b ) { return a.y < b.y; } )
        ->y;
    }

    //! Asks whether places lie inside a ring.
    class Inside
    {
      public:
        explicit Inside( const PixelRing &ring )
          : mRing( ring )
          , mTop( std::floor( topOf( ring ) ) )
        {
          for ( std::size_t i = 0; i < ring.size(); ++i )
          {
            const TerrainPoint &a = ring[i];
            const TerrainPoint &b = ring[( i + 1 ) % ring.size()];
            const std::size_t last = stripeOf( std::max( a.y, b.y ) );
            if ( mStripes.size() <= last )
              mStripes.resize( last + 1 );
            for ( std::size_t stripe = stripeOf( std::min( a.y, b.y ) ); stripe <= last; ++stripe )
              mStripes[stripe].push_back( i );
          }
        }

        bool holds( const TerrainPoint &place ) const
        {
          if ( place.y < mTop || stripeOf( place.y ) >= mStripes.size() )
            return false;
          bool inside = false;
          for ( const std::size_t i : mStripes[stripeOf( place.y )] )
          {
            const TerrainPoint &a = mRing[i];
            const TerrainPoint &b = mRing[( i + 1 ) % mRing.size()];
            if ( ( a.y > place.y ) != ( b.y > place.y )
              && place.x < a.x + ( place.y - a.y ) * ( b.x - a.x ) / ( b.y - a.y ) )
              inside = !inside;
          }
          return inside;
        }

      private:
        std::size_t stripeOf( double y ) const { return static_cast<std::size_t>( y - mTop ); }

        const PixelRing &mRing;
        const double mTop;
        std::vector<std::vector<std::size_t>> mStripes; //!< Sides by the rows that they touch
    };

  } // namespace

  void PolygonBuilder::addRings( std::vector<PixelRing> rings, const Take &take )
  {
    std::vector<PixelRing> simple;
    for ( PixelRing &ring : rings )
      splitAtCorners( std::move( ring ), simple );
    std::vector<std::pair<double, PixelRing>> outers;
    for ( const PixelRing &whole : simple )
    {
      PixelRing ring = withoutFlatNodes( whole );
      const double area = doubleArea( ring );
      if ( area > 0.0 )
        outers.emplace_back( area, std::move( ring ) );
      else if ( area < 0.0 )
      {
        const double top = topOf( ring );
        mHoles.emplace( top, Hole { std::move( ring ), freeVertex( whole ) } );
      }
    }
    // The smaller first: an island takes its own holes before the ring around it looks for its.
    std::stable_sort( outers.begin(), outers.end(), []( const auto &a, const auto &b ) { return a.first < b.first; } );
    for ( auto &outer : outers )
    {
      std::vector<PixelRing> polygon = takeHolesOf( outer.second );
      polygon.insert( polygon.begin(), std::move( outer.second ) );
      take( std::move( polygon ) );
    }
  }

  std::vector<PixelRing> PolygonBuilder::takeHolesOf( const PixelRing &outer )
  {
    std::vector<PixelRing> holes;
    auto candidate = mHoles.lower_bound( topOf( outer ) );
    if ( candidate == mHoles.end() )
      return holes;
    const auto [left, right] = std::minmax_element(
      outer.begin(), outer.end(), []( const TerrainPoint &a, const TerrainPoint &b ) { return a.x < b.x; } );
    std::vector<std::multimap<double, Hole>::iterator> near;
    for ( ; candidate != mHoles.end(); ++candidate )
    {
      const double x = candidate->second.vertex.x;
      if ( x >= left->x && x <= right->x )
        near.push_back( candidate );
    }
    if ( near.empty() )
      return holes;
    const Inside inside( outer );
    for ( const auto &hole : near )
    {
      if ( !inside.holds( hole->second.vertex ) )
        continue;
      holes.push_back( std::move( hole->second.ring ) );
      mHoles.erase( hole );
    }
    return holes;
  }

} // namespace stillhead
