// SPDX-License-Identifier: GPL-2.0-or-later
// Cleans, orients, sorts and measures the drawn lines.
#include "core/network/canonicaldrawing.h"

#include "core/feedback/parallel.h"

#include <algorithm>
#include <cmath>
#include <memory>

namespace stillhead
{

  namespace
  {
    //! A drawn line without repeated vertices, before sorting.
    struct CleanLine
    {
        std::vector<PlanPoint> vertices;
        std::vector<double> surveyZM;
        int drawn = -1;
        bool reversed = false;
    };

    bool isNumber( const PlanPoint &p )
    {
      return std::isfinite( p.x ) && std::isfinite( p.y );
    }

    //! NaN equals NaN here: an order of values, not of heights.
    int compareZ( double a, double b )
    {
      if ( std::isnan( a ) || std::isnan( b ) )
        return static_cast<int>( std::isnan( a ) ) - static_cast<int>( std::isnan( b ) );
      return a < b ? -1 : ( b < a ? 1 : 0 );
    }

    //! Drops vertices that repeat the one before (with drawn Z: in Z too, so that a riser is kept).
    CleanLine cleaned( const Drawing &drawing, std::size_t index )
    {
      const DrawnLine &line = drawing.lines[index];
      CleanLine clean;
      clean.drawn = static_cast<int>( index );
      for ( std::size_t i = line.first; i < line.first + line.count; ++i )
      {
        const PlanPoint &p = drawing.vertices[i];
        if ( !isNumber( p ) )
        {
          clean.vertices.clear();
          return clean;
        }
        const bool repeats = !clean.vertices.empty() && clean.vertices.back() == p;
        if ( repeats && ( drawing.surveyZM.empty() || compareZ( clean.surveyZM.back(), drawing.surveyZM[i] ) == 0 ) )
          continue;
        clean.vertices.push_back( p );
        if ( !drawing.surveyZM.empty() )
          clean.surveyZM.push_back( drawing.surveyZM[i] );
      }
      return clean;
    }

    bool hasLength( const CleanLine &line )
    {
      return std::any_of(
        line.vertices.begin(), line.vertices.end(), [&]( const PlanPoint &p ) { return p != line.vertices.front(); } );
    }

    //! Compares a line's vertices, read forward, with those of another, read forward or backward.
    int compareVertices( const CleanLine &a, const CleanLine &b, bool backward )
    {
      const std::size_t common = std::min( a.vertices.size(), b.vertices.size() );
      for ( std::size_t i = 0; i < common; ++i )
      {
        const PlanPoint &other = b.vertices[backward ? common - 1 - i : i];
        if ( a.vertices[i] != other )
          return a.vertices[i] < other ? -1 : 1;
      }
      return a.vertices.size() < b.vertices.size() ? -1 : ( a.vertices.size() > b.vertices.size() ? 1 : 0 );
    }

    //! The same for drawn Z, where two lines have the same vertices.
    int compareSurvey( const CleanLine &a, const CleanLine &b, bool backward )
    {
      const std::size_t count = a.surveyZM.size();
      for ( std::size_t i = 0; i < count; ++i )
      {
        const int order = compareZ( a.surveyZM[i], b.surveyZM[backward ? count - 1 - i : i] );
        if ( order != 0 )
          return order;
      }
      return 0;
    }

    int compareLines( const CleanLine &a, const CleanLine &b, bool backward )
    {
      const int order = compareVertices( a, b, backward );
      return order != 0 ? order : compareSurvey( a, b, backward );
    }

    void orient( CleanLine &line )
    {
      if ( compareLines( line, line, true ) <= 0 )
        return;
      std::reverse( line.vertices.begin(), line.vertices.end() );
      std::reverse( line.surveyZM.begin(), line.surveyZM.end() );
      line.reversed = true;
    }

    bool precedes( const Drawing &drawing, const CleanLine &a, const CleanLine &b )
    {
      const int order = compareLines( a, b, false );
      if ( order != 0 )
        return order < 0;
      const DrawnLine &drawnA = drawing.lines[static_cast<std::size_t>( a.drawn )];
      const DrawnLine &drawnB = drawing.lines[static_cast<std::size_t>( b.drawn )];
      if ( drawnA.role != drawnB.role )
        return drawnA.role < drawnB.role;
      if ( drawnA.system != drawnB.system )
        return drawing.systems[static_cast<std::size_t>( drawnA.system )]
          < drawing.systems[static_cast<std::size_t>( drawnB.system )];
      if ( drawnA.coverM != drawnB.coverM )
        return drawnA.coverM < drawnB.coverM;
      return a.drawn < b.drawn;
    }

    void findDuplicates( const std::vector<CleanLine> &sorted, std::vector<Finding> &findings )
    {
      std::size_t firstOfKind = 0;
      for ( std::size_t i = 1; i < sorted.size(); ++i )
      {
        if ( sorted[i].vertices != sorted[firstOfKind].vertices )
        {
          firstOfKind = i;
          continue;
        }
        Finding finding;
        finding.code = FindingCode::Duplicate;
        finding.place = sorted[i].vertices.front();
        finding.line = sorted[i].drawn;
        finding.otherLine = sorted[firstOfKind].drawn;
        findings.push_back( finding );
      }
    }

    void findWithoutLength( const Drawing &drawing, int drawn, std::vector<Finding> &findings )
    {
      const DrawnLine &line = drawing.lines[static_cast<std::size_t>( drawn )];
      Finding finding;
      finding.code = FindingCode::NoLength;
      finding.line = drawn;
      finding.place = { NOT_A_FIGURE, NOT_A_FIGURE };
      for ( std::size_t i = line.first; i < line.first + line.count && !isNumber( finding.place ); ++i )
        finding.place = drawing.vertices[i];
      findings.push_back( finding );
    }
  } // namespace

  std::size_t CanonicalDrawing::legAt( const CanonicalLine &line, double along ) const
  {
    const auto first = alongM.begin() + static_cast<std::ptrdiff_t>( line.first );
    const auto last = first + static_cast<std::ptrdiff_t>( line.count );
    const auto after = std::upper_bound( first, last, along );
    const auto leg = std::clamp<std::ptrdiff_t>( after - first - 1, 0, static_cast<std::ptrdiff_t>( line.count ) - 2 );
    return static_cast<std::size_t>( leg );
  }

  PlanPoint CanonicalDrawing::placeAt( const CanonicalLine &line, double along ) const
  {
    const std::size_t leg = line.first + legAt( line, along );
    const double length = alongM[leg + 1] - alongM[leg];
    const double t = length > 0.0 ? ( along - alongM[leg] ) / length : 0.0;
    const PlanPoint &a = vertices[leg];
    const PlanPoint &b = vertices[leg + 1];
    if ( t <= 0.0 )
      return a;
    if ( t >= 1.0 )
      return b;
    return { a.x + t * ( b.x - a.x ), a.y + t * ( b.y - a.y ) };
  }

  CanonicalDrawing canonicalDrawing( const Drawing &drawing, const PlanMeasure &measure, unsigned threads,
    std::vector<Finding> &findings, Monitor &monitor )
  {
    std::vector<CleanLine> clean;
    clean.reserve( drawing.lines.size() );
    std::size_t vertexCount = 0;
    for ( std::size_t i = 0; i < drawing.lines.size(); ++i )
    {
      if ( i % 4096 == 0 )
        stopIfCancelled( monitor );
      CleanLine line = cleaned( drawing, i );
      if ( !hasLength( line ) )
      {
        findWithoutLength( drawing, static_cast<int>( i ), findings );
        continue;
      }
      orient( line );
      vertexCount += line.vertices.size();
      clean.push_back( std::move( line ) );
    }
    std::sort(
      clean.begin(), clean.end(), [&]( const CleanLine &a, const CleanLine &b ) { return precedes( drawing, a, b ); } );
    findDuplicates( clean, findings );

    CanonicalDrawing result;
    result.vertices.reserve( vertexCount );
    result.lines.reserve( clean.size() );
    if ( !drawing.surveyZM.empty() )
      result.surveyZM.reserve( vertexCount );
    for ( const CleanLine &line : clean )
    {
      const DrawnLine &drawn = drawing.lines[static_cast<std::size_t>( line.drawn )];
      CanonicalLine canonical;
      canonical.first = result.vertices.size();
      canonical.count = line.vertices.size();
      canonical.role = drawn.role;
      canonical.system = drawn.system;
      canonical.coverM = drawn.coverM;
      canonical.drawn = line.drawn;
      canonical.reversed = line.reversed;
      result.lines.push_back( canonical );
      result.vertices.insert( result.vertices.end(), line.vertices.begin(), line.vertices.end() );
      result.surveyZM.insert( result.surveyZM.end(), line.surveyZM.begin(), line.surveyZM.end() );
    }

    result.alongM.resize( vertexCount );
    std::vector<std::unique_ptr<PlanMeasure>> measures( threadCount( threads ) );
    for ( auto &own : measures )
      own = measure.clone();
    parallelRanges( result.lines.size(), 64, threads, monitor, 0.0, 0.02,
      [&]( std::size_t first, std::size_t last, unsigned worker ) {
        for ( std::size_t i = first; i < last; ++i )
        {
          CanonicalLine &line = result.lines[i];
          measures[worker]->distancesAlongM( &result.vertices[line.first], line.count, &result.alongM[line.first] );
          line.lengthM = result.alongM[line.first + line.count - 1];
        }
      } );
    return result;
  }

} // namespace stillhead
