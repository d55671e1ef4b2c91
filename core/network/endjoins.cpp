// SPDX-License-Identifier: GPL-2.0-or-later
// Ends are put into cells so small that all in one cell meet; neighbouring cells are compared until one pair meets.
// So a thousand ends within one tolerance cost no more than a thousand apart.
#include "core/network/endjoins.h"

#include "core/feedback/parallel.h"

#include <algorithm>
#include <cmath>
#include <mutex>
#include <tuple>

namespace stillhead
{

  namespace
  {
    struct CellEnd
    {
        int system = 0;
        long long column = 0;
        long long row = 0;
        int end = -1;

        bool sameCell( const CellEnd &other ) const
        {
          return system == other.system && column == other.column && row == other.row;
        }
        bool operator<( const CellEnd &other ) const
        {
          return std::tie( system, column, row, end ) < std::tie( other.system, other.column, other.row, other.end );
        }
    };

    //! The ends of one cell: [first, last) of the sorted ends.
    struct Cell
    {
        std::size_t first = 0;
        std::size_t last = 0;
    };

    bool meet( const CanonicalDrawing &drawing, const GroundScales &scales, int a, int b, double toleranceM )
    {
      const PlanPoint &p = endPoint( drawing, a );
      const PlanPoint &q = endPoint( drawing, b );
      return scales.atEnd( q < p ? b : a ).distanceM( q.x - p.x, q.y - p.y ) <= toleranceM;
    }

    bool anyMeet( const CanonicalDrawing &drawing, const GroundScales &scales, const std::vector<CellEnd> &ends,
      const Cell &a, const Cell &b, double toleranceM )
    {
      for ( std::size_t i = a.first; i < a.last; ++i )
      {
        for ( std::size_t j = b.first; j < b.last; ++j )
        {
          if ( meet( drawing, scales, ends[i].end, ends[j].end, toleranceM ) )
            return true;
        }
      }
      return false;
    }

    //! A leg of one line within the tolerance, with whether its vertices are.
    struct NearLeg
    {
        Leg leg;
        LegHit hit;
    };

    //! Cuts the sorted hits of one line into passages through the tolerance and keeps the nearest place of each.
    class PassageFinder
    {
      public:
        PassageFinder(
          const CanonicalDrawing &drawing, const GroundScale &scale, const PlanPoint &place, double toleranceM )
          : mDrawing( drawing )
          , mScale( scale )
          , mPlace( place )
          , mToleranceM( toleranceM )
        {
        }

        void find( int end, const std::vector<NearLeg> &near, std::size_t first, std::size_t last,
          std::vector<Meeting> &meetings ) const
        {
          const int lineNumber = near[first].leg.line;
          const CanonicalLine &line = mDrawing.lines[static_cast<std::size_t>( lineNumber )];
          std::size_t i = first;
          while ( i < last )
          {
            bool holdsEnd = near[i].leg.vertex == line.first && isNear( near[i].leg.vertex );
            std::size_t nearest = i;
            std::size_t j = i;
            while (
              j + 1 < last && near[j + 1].leg.vertex == near[j].leg.vertex + 1 && isNear( near[j + 1].leg.vertex ) )
            {
              ++j;
              if ( near[j].hit.distanceM < near[nearest].hit.distanceM )
                nearest = j;
            }
            holdsEnd =
              holdsEnd || ( near[j].leg.vertex + 2 == line.first + line.count && isNear( near[j].leg.vertex + 1 ) );
            if ( !holdsEnd )
              meetings.push_back( { end, lineNumber, near[nearest].hit.alongM, near[nearest].hit.distanceM } );
            i = j + 1;
          }
        }

      private:
        bool isNear( std::size_t vertex ) const
        {
          const PlanPoint &p = mDrawing.vertices[vertex];
          return mScale.distanceM( p.x - mPlace.x, p.y - mPlace.y ) <= mToleranceM;
        }

        const CanonicalDrawing &mDrawing;
        const GroundScale &mScale;
        PlanPoint mPlace;
        double mToleranceM;
    };
  } // namespace

  DisjointSets joinEnds(
    const CanonicalDrawing &drawing, const GroundScales &scales, double toleranceM, Monitor &monitor )
  {
    const int count = static_cast<int>( drawing.lines.size() * 2 );
    DisjointSets sets( static_cast<std::size_t>( count ) );
    if ( count == 0 )
      return sets;

    // Half the tolerance each way, less a hair: the cell's diagonal stays within the tolerance.
    const double safe = 0.499 * std::max( toleranceM, 1e-12 );
    const PlanPoint cellSize { safe / scales.largest().x, safe / scales.largest().y };
    const PlanPoint reach = scales.largestBoxHalfSize( toleranceM );
    const long long columns = static_cast<long long>( std::ceil( reach.x / cellSize.x ) );
    const long long rows = static_cast<long long>( std::ceil( reach.y / cellSize.y ) );
    const PlanPoint origin = drawing.vertices.front();

    std::vector<CellEnd> ends( static_cast<std::size_t>( count ) );
    for ( int end = 0; end < count; ++end )
    {
      const PlanPoint &p = endPoint( drawing, end );
      ends[static_cast<std::size_t>( end )] = { drawing.lines[static_cast<std::size_t>( end / 2 )].system,
        static_cast<long long>( std::floor( ( p.x - origin.x ) / cellSize.x ) ),
        static_cast<long long>( std::floor( ( p.y - origin.y ) / cellSize.y ) ), end };
    }
    std::sort( ends.begin(), ends.end() );

    std::vector<Cell> cells;
    for ( std::size_t i = 0; i < ends.size(); ++i )
    {
      if ( i > 0 && ends[i].sameCell( ends[i - 1] ) )
      {
        sets.join( ends[i].end, ends[i - 1].end );
        cells.back().last = i + 1;
      }
      else
      {
        cells.push_back( { i, i + 1 } );
      }
    }

    for ( std::size_t c = 0; c < cells.size(); ++c )
    {
      if ( c % 1024 == 0 )
        stopIfCancelled( monitor );
      const CellEnd &here = ends[cells[c].first];
      // Later cells of the same column first, then each of the next columns: every pair is looked at once.
      for ( long long column = here.column; column <= here.column + columns; ++column )
      {
        CellEnd from = here;
        from.column = column;
        from.row = column == here.column ? here.row + 1 : here.row - rows;
        from.end = -1;
        auto other = std::lower_bound( cells.begin(), cells.end(), from,
          [&]( const Cell &cell, const CellEnd &key ) { return ends[cell.first] < key; } );
        for ( ; other != cells.end(); ++other )
        {
          const CellEnd &there = ends[other->first];
          if ( there.system != here.system || there.column != column || there.row > here.row + rows )
            break;
          if ( sets.find( here.end ) != sets.find( there.end )
            && anyMeet( drawing, scales, ends, cells[c], *other, toleranceM ) )
            sets.join( here.end, there.end );
        }
      }
    }
    return sets;
  }

  std::vector<Meeting> meetInteriors( const CanonicalDrawing &drawing, const LegIndex &index,
    const GroundScales &scales, double toleranceM, unsigned threads, std::vector<SystemTouch> &touches,
    Monitor &monitor )
  {
    std::vector<Meeting> meetings;
    std::mutex mutex;
    parallelRanges( drawing.lines.size() * 2, 256, threads, monitor, 0.03, 0.06,
      [&]( std::size_t first, std::size_t last, unsigned ) {
        std::vector<Meeting> ownMeetings;
        std::vector<SystemTouch> ownTouches;
        std::vector<NearLeg> near;
        for ( std::size_t e = first; e < last; ++e )
        {
          const int end = static_cast<int>( e );
          const int system = drawing.lines[e / 2].system;
          const PlanPoint &place = endPoint( drawing, end );
          const GroundScale &scale = scales.atEnd( end );
          const PlanPoint half = boxHalfSize( scale, toleranceM );
          near.clear();
          index.visitBox(
            { place.x - half.x, place.y - half.y }, { place.x + half.x, place.y + half.y }, [&]( int number ) {
              const Leg &leg = index.legs()[static_cast<std::size_t>( number )];
              const LegHit hit = index.nearestOn( leg, place, scale );
              if ( hit.distanceM <= toleranceM )
                near.push_back( { leg, hit } );
            } );
          std::sort( near.begin(), near.end(),
            []( const NearLeg &a, const NearLeg &b ) { return a.leg.vertex < b.leg.vertex; } );
          const PassageFinder passages( drawing, scale, place, toleranceM );
          for ( std::size_t i = 0; i < near.size(); )
          {
            std::size_t j = i;
            while ( j < near.size() && near[j].leg.line == near[i].leg.line )
              ++j;
            if ( drawing.lines[static_cast<std::size_t>( near[i].leg.line )].system != system )
              ownTouches.push_back( { end, near[i].leg.line } );
            else
              passages.find( end, near, i, j, ownMeetings );
            i = j;
          }
        }
        const std::lock_guard<std::mutex> lock( mutex );
        meetings.insert( meetings.end(), ownMeetings.begin(), ownMeetings.end() );
        touches.insert( touches.end(), ownTouches.begin(), ownTouches.end() );
      } );
    std::sort( meetings.begin(), meetings.end(), []( const Meeting &a, const Meeting &b ) {
      return std::tie( a.end, a.line, a.alongM ) < std::tie( b.end, b.line, b.alongM );
    } );
    std::sort( touches.begin(), touches.end(), []( const SystemTouch &a, const SystemTouch &b ) {
      return std::tie( a.end, a.line ) < std::tie( b.end, b.line );
    } );
    return meetings;
  }

} // namespace stillhead
