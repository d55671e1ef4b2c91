// SPDX-License-Identifier: GPL-2.0-or-later
// Every leg asks the index for later legs that meet its box; the crossing of two legs is solved relative to the first
// vertex, so that large coordinates lose no digits.
#include "core/network/crossings.h"

#include "core/feedback/parallel.h"

#include <algorithm>
#include <cmath>
#include <mutex>
#include <optional>
#include <tuple>

namespace stillhead
{

  namespace
  {
    //! How far past a leg's end, as a share of its length, still counts as on it: a vertex that lies on a line is met for sure.
    constexpr double ON_LEG = 1e-9;

    bool areNeighbours( const CanonicalDrawing &drawing, const Leg &a, const Leg &b )
    {
      if ( a.line != b.line )
        return false;
      if ( a.vertex + 1 == b.vertex )
        return true;
      const CanonicalLine &line = drawing.lines[static_cast<std::size_t>( a.line )];
      const std::size_t lastLeg = line.first + line.count - 2;
      return a.vertex == line.first && b.vertex == lastLeg
        && drawing.vertices[line.first] == drawing.vertices[lastLeg + 1];
    }

    //! For every line the first one with the same vertices: lines drawn twice meet all along, which is no crossing.
    std::vector<int> shapesOf( const CanonicalDrawing &drawing )
    {
      std::vector<int> shapes( drawing.lines.size() );
      for ( std::size_t i = 0; i < shapes.size(); ++i )
      {
        shapes[i] = static_cast<int>( i );
        if ( i == 0 || drawing.lines[i].count != drawing.lines[i - 1].count )
          continue;
        const PlanPoint *const own = &drawing.vertices[drawing.lines[i].first];
        if ( std::equal( own, own + drawing.lines[i].count, &drawing.vertices[drawing.lines[i - 1].first] ) )
          shapes[i] = shapes[i - 1];
      }
      return shapes;
    }

    double alongAt( const CanonicalDrawing &drawing, const Leg &leg, double t )
    {
      const double from = drawing.alongM[leg.vertex];
      const double to = drawing.alongM[leg.vertex + 1];
      return t <= 0.0 ? from : ( t >= 1.0 ? to : from + t * ( to - from ) );
    }

    std::optional<Crossing> crossingOf( const CanonicalDrawing &drawing, const Leg &a, const Leg &b )
    {
      const PlanPoint &p = drawing.vertices[a.vertex];
      const PlanPoint &pEnd = drawing.vertices[a.vertex + 1];
      const PlanPoint &q = drawing.vertices[b.vertex];
      const PlanPoint &qEnd = drawing.vertices[b.vertex + 1];
      const double rx = pEnd.x - p.x, ry = pEnd.y - p.y;
      const double sx = qEnd.x - q.x, sy = qEnd.y - q.y;
      const double cross = rx * sy - ry * sx;
      if ( std::abs( cross ) <= ON_LEG * std::hypot( rx, ry ) * std::hypot( sx, sy ) )
        return std::nullopt;
      const double dx = q.x - p.x, dy = q.y - p.y;
      const double t = ( dx * sy - dy * sx ) / cross;
      const double u = ( dx * ry - dy * rx ) / cross;
      if ( t < -ON_LEG || t > 1.0 + ON_LEG || u < -ON_LEG || u > 1.0 + ON_LEG )
        return std::nullopt;
      Crossing crossing;
      crossing.lineA = a.line;
      crossing.alongA = alongAt( drawing, a, t );
      crossing.lineB = b.line;
      crossing.alongB = alongAt( drawing, b, u );
      crossing.place = { p.x + t * rx, p.y + t * ry };
      return crossing;
    }

    //! A line's own legs meet where it has a riser or a tiny kink: it does not cross itself there.
    bool isOwnBend( const Crossing &crossing, double toleranceM )
    {
      return crossing.lineA == crossing.lineB && std::abs( crossing.alongB - crossing.alongA ) <= toleranceM;
    }

    bool samePlace( const Crossing &a, const Crossing &b, double toleranceM )
    {
      return a.lineA == b.lineA && a.lineB == b.lineB && std::abs( a.alongA - b.alongA ) <= toleranceM
        && std::abs( a.alongB - b.alongB ) <= toleranceM;
    }
  } // namespace

  std::vector<Crossing> findCrossings(
    const CanonicalDrawing &drawing, const LegIndex &index, double toleranceM, unsigned threads, Monitor &monitor )
  {
    std::vector<Crossing> all;
    std::mutex mutex;
    const std::vector<Leg> &legs = index.legs();
    const auto isTiny = [&]( const Leg &leg ) {
      return drawing.lines[static_cast<std::size_t>( leg.line )].lengthM <= toleranceM;
    };
    const std::vector<int> shapes = shapesOf( drawing );
    const auto drawnTwice = [&]( const Leg &leg, const Leg &other ) {
      return leg.line != other.line
        && shapes[static_cast<std::size_t>( leg.line )] == shapes[static_cast<std::size_t>( other.line )];
    };
    parallelRanges(
      legs.size(), 1024, threads, monitor, 0.06, 0.1, [&]( std::size_t first, std::size_t last, unsigned ) {
        std::vector<Crossing> own;
        for ( std::size_t i = first; i < last; ++i )
        {
          if ( isTiny( legs[i] ) )
            continue;
          if ( i % 64 == 0 )
            stopIfCancelled( monitor );
          const PlanPoint &a = drawing.vertices[legs[i].vertex];
          const PlanPoint &b = drawing.vertices[legs[i].vertex + 1];
          index.visitBox( { std::min( a.x, b.x ), std::min( a.y, b.y ) },
            { std::max( a.x, b.x ), std::max( a.y, b.y ) }, [&]( int other ) {
              const std::size_t j = static_cast<std::size_t>( other );
              if ( j <= i || isTiny( legs[j] ) || drawnTwice( legs[i], legs[j] )
                || areNeighbours( drawing, legs[i], legs[j] ) )
                return;
              const auto crossing = crossingOf( drawing, legs[i], legs[j] );
              if ( crossing && !isOwnBend( *crossing, toleranceM ) )
                own.push_back( *crossing );
            } );
        }
        const std::lock_guard<std::mutex> lock( mutex );
        all.insert( all.end(), own.begin(), own.end() );
      } );
    std::sort( all.begin(), all.end(), []( const Crossing &a, const Crossing &b ) {
      return std::tie( a.lineA, a.lineB, a.alongA, a.alongB, a.place )
        < std::tie( b.lineA, b.lineB, b.alongA, b.alongB, b.place );
    } );
    std::vector<Crossing> distinct;
    for ( const Crossing &crossing : all )
    {
      bool known = false;
      for ( auto it = distinct.rbegin(); it != distinct.rend() && !known && it->lineA == crossing.lineA
            && it->lineB == crossing.lineB && crossing.alongA - it->alongA <= toleranceM;
            ++it )
        known = samePlace( *it, crossing, toleranceM );
      if ( !known )
        distinct.push_back( crossing );
    }
    return distinct;
  }

} // namespace stillhead
