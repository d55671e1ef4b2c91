// SPDX-License-Identifier: GPL-2.0-or-later
// Pipe is widened in a plane of metres laid at its stretch: exact there, and off by far less than a pen's width over any
// stretch, in degrees and in stretched map projections alike. The threads share the parts of all stretches.
#include "processing/writing/stretchoutline.h"

#include "core/feedback/parallel.h"
#include "processing/writing/pipearea.h"
#include "processing/writing/piperuns.h"

#include <QTransform>

#include <utility>

namespace stillhead
{

  namespace
  {

    //! Widening takes the first share of the progress.
    constexpr double WIDENED = 0.9;

    //! The plan seen from one place, in metres.
    class LocalPlane
    {
      public:
        LocalPlane( const PlanPoint &origin, const GroundScale &scale )
          : mOrigin( origin )
          , mScale( scale )
        {
        }

        double x( const PlanPoint &place ) const
        {
          return mScale.xx * ( place.x - mOrigin.x ) + mScale.xy * ( place.y - mOrigin.y );
        }
        double y( const PlanPoint &place ) const
        {
          return mScale.yx * ( place.x - mOrigin.x ) + mScale.yy * ( place.y - mOrigin.y );
        }

        //! From metres back to the plan.
        QTransform back() const
        {
          const double determinant = mScale.xx * mScale.yy - mScale.xy * mScale.yx;
          return QTransform( mScale.yy / determinant, -mScale.yx / determinant, -mScale.xy / determinant,
            mScale.xx / determinant, mOrigin.x, mOrigin.y );
        }

      private:
        PlanPoint mOrigin;
        GroundScale mScale;
    };

    std::vector<LocalPlane> planesOf( const ResultContext &context )
    {
      std::vector<LocalPlane> planes;
      planes.reserve( context.result.stretches.size() );
      for ( const Stretch &stretch : context.result.stretches )
      {
        const Piece &worst = context.result.pieces[static_cast<std::size_t>( stretch.worstPiece )];
        const PlanPoint origin = context.result.drawing.placeAt( context.lineOf( worst ), worst.fromM );
        planes.emplace_back( origin, context.measure.scaleAt( origin ) );
      }
      return planes;
    }

    std::vector<PipeArea> workOf( const StaticResult &result, const std::vector<LocalPlane> &planes, double distanceM )
    {
      std::vector<std::vector<Strand>> strands( planes.size() );
      for ( const PipeRun &run : pipeRuns( result ) )
      {
        Strand strand;
        for ( const PlanPoint &place : placesOf( run, result ) )
        {
          strand.x << planes[run.stretch].x( place );
          strand.y << planes[run.stretch].y( place );
        }
        strands[run.stretch].push_back( std::move( strand ) );
      }
      std::vector<PipeArea> work;
      work.reserve( strands.size() );
      for ( std::vector<Strand> &ofStretch : strands )
        work.emplace_back( std::move( ofStretch ), distanceM );
      return work;
    }

  } // namespace

  std::vector<QgsGeometry> stretchOutlines( const ResultContext &context, double distanceM, Monitor &monitor )
  {
    const std::vector<LocalPlane> planes = planesOf( context );
    std::vector<PipeArea> work = workOf( context.result, planes, distanceM );
    std::vector<std::pair<std::size_t, std::size_t>> parts;
    for ( std::size_t i = 0; i < work.size(); ++i )
    {
      for ( std::size_t part = 0; part < work[i].parts(); ++part )
        parts.emplace_back( i, part );
    }
    parallelRanges( parts.size(), 1, 0, monitor, 0.0, WIDENED, [&]( std::size_t first, std::size_t last, unsigned ) {
      for ( std::size_t i = first; i < last; ++i )
        work[parts[i].first].widen( parts[i].second );
    } );

    std::vector<QgsGeometry> polygons( planes.size() );
    parallelRanges( work.size(), 1, 0, monitor, WIDENED, 1.0, [&]( std::size_t first, std::size_t last, unsigned ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        polygons[i] = work[i].whole();
        polygons[i].convertToSingleType();
        polygons[i].transform( planes[i].back() );
      }
    } );
    return polygons;
  }

  double outlineDistanceM( LengthUnit unit )
  {
    return unit == LengthUnit::Foot ? 10.0 * METRES_PER_FOOT : 3.0;
  }

} // namespace stillhead
