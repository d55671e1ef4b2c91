// SPDX-License-Identifier: GPL-2.0-or-later
// One common scale, or one for each end.
#include "core/network/groundscales.h"

#include "core/feedback/parallel.h"
#include "core/network/legindex.h"

#include <algorithm>
#include <cmath>
#include <memory>

namespace stillhead
{

  namespace
  {
    //! Relative change of scale over the drawing below which one scale serves all: a tolerance of 0.1 m is then off by 0.1 mm at most.
    constexpr double SAME_SCALE = 1e-3;

    double difference( const GroundScale &a, const GroundScale &b )
    {
      const double size = std::max( std::hypot( a.xx, a.yx ), std::hypot( a.xy, a.yy ) );
      const double largest = std::max(
        { std::abs( a.xx - b.xx ), std::abs( a.xy - b.xy ), std::abs( a.yx - b.yx ), std::abs( a.yy - b.yy ) } );
      return largest / size;
    }
  } // namespace

  const PlanPoint &endPoint( const CanonicalDrawing &drawing, int end )
  {
    const CanonicalLine &line = drawing.lines[static_cast<std::size_t>( end / 2 )];
    return drawing.vertices[end % 2 == 0 ? line.first : line.first + line.count - 1];
  }

  GroundScales::GroundScales(
    const CanonicalDrawing &drawing, const PlanMeasure &measure, unsigned threads, Monitor &monitor )
  {
    if ( drawing.vertices.empty() )
      return;
    PlanPoint low = drawing.vertices.front();
    PlanPoint high = low;
    for ( const PlanPoint &p : drawing.vertices )
    {
      low = { std::min( low.x, p.x ), std::min( low.y, p.y ) };
      high = { std::max( high.x, p.x ), std::max( high.y, p.y ) };
    }
    mCommon = measure.scaleAt( { 0.5 * ( low.x + high.x ), 0.5 * ( low.y + high.y ) } );
    include( mCommon );
    bool same = true;
    for ( const PlanPoint &corner : { low, high, PlanPoint { low.x, high.y }, PlanPoint { high.x, low.y } } )
    {
      const GroundScale scale = measure.scaleAt( corner );
      same = same && difference( mCommon, scale ) < SAME_SCALE;
      include( scale );
    }
    if ( same )
      return;

    const std::size_t ends = drawing.lines.size() * 2;
    mOwn.resize( ends );
    std::vector<std::unique_ptr<PlanMeasure>> measures( threadCount( threads ) );
    for ( auto &own : measures )
      own = measure.clone();
    parallelRanges(
      ends, 512, threads, monitor, 0.02, 0.03, [&]( std::size_t first, std::size_t last, unsigned worker ) {
        for ( std::size_t i = first; i < last; ++i )
          mOwn[i] = measures[worker]->scaleAt( endPoint( drawing, static_cast<int>( i ) ) );
      } );
    for ( const GroundScale &scale : mOwn )
      include( scale );
  }

  void GroundScales::include( const GroundScale &scale )
  {
    mLargest.x = std::max( mLargest.x, std::hypot( scale.xx, scale.yx ) );
    mLargest.y = std::max( mLargest.y, std::hypot( scale.xy, scale.yy ) );
    const PlanPoint half = boxHalfSize( scale, 1.0 );
    mBoxPerMetre.x = std::max( mBoxPerMetre.x, half.x );
    mBoxPerMetre.y = std::max( mBoxPerMetre.y, half.y );
  }

  PlanPoint GroundScales::largestBoxHalfSize( double radiusM ) const
  {
    return { radiusM * mBoxPerMetre.x, radiusM * mBoxPerMetre.y };
  }

} // namespace stillhead
