// SPDX-License-Identifier: GPL-2.0-or-later
// Every run of pipe is widened by itself, in a plane of metres laid at its stretch: exact there, and off by far less than a
// pen's width over any stretch, in degrees and in stretched map projections alike. Neighbours are then united two by two,
// round after round: widening thousands of lines at once costs many times as much, and on one thread only.
#include "processing/writing/stretchoutline.h"

#include "core/feedback/parallel.h"

#include <qgslinestring.h>

#include <QTransform>

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <tuple>

namespace stillhead
{

  namespace
  {

    //! Straight pieces to a quarter circle: round enough for a pen.
    constexpr int SEGMENTS = 5;

    //! Widening takes the first share of the progress.
    constexpr double WIDENED = 0.3;

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

    //! Pipe of one line without a gap, with the nodes that it ends at.
    struct PipeRun
    {
        std::size_t stretch = 0;
        int line = -1;
        double fromM = 0.0;
        double toM = 0.0;
        int fromNode = -1; //!< −1: it ends within a span
        int toNode = -1;
    };

    //! The runs of every stretch, those of one stretch together. Pieces of a stretch rise along their lines.
    std::vector<PipeRun> pipeRuns( const StaticResult &result )
    {
      std::vector<PipeRun> runs;
      for ( std::size_t s = 0; s < result.stretches.size(); ++s )
      {
        for ( const int number : result.stretches[s].pieces )
        {
          const Piece &piece = result.pieces[static_cast<std::size_t>( number )];
          const Span &span = result.network.spans[static_cast<std::size_t>( piece.span )];
          const int toNode = piece.toM >= span.toM ? span.toNode : -1;
          if ( !runs.empty() && runs.back().stretch == s && runs.back().line == span.line
            && runs.back().toM == piece.fromM )
          {
            runs.back().toM = piece.toM;
            runs.back().toNode = toNode;
            continue;
          }
          runs.push_back(
            { s, span.line, piece.fromM, piece.toM, piece.fromM <= span.fromM ? span.fromNode : -1, toNode } );
        }
      }
      return runs;
    }

    //! An outline under way, and where it lies in an order that keeps neighbours together.
    struct Outline
    {
        std::size_t stretch = 0;
        std::uint64_t order = 0;
        QgsGeometry geometry;
    };

    //! Bits of two 32-bit numbers taken in turn: places near in this order are near on the ground.
    std::uint64_t interleaved( std::uint32_t x, std::uint32_t y )
    {
      std::uint64_t result = 0;
      for ( unsigned bit = 0; bit < 32; ++bit )
        result |= static_cast<std::uint64_t>( x >> bit & 1u ) << ( 2 * bit )
          | static_cast<std::uint64_t>( y >> bit & 1u ) << ( 2 * bit + 1 );
      return result;
    }

    class Widener
    {
      public:
        Widener( const StaticResult &result, const std::vector<LocalPlane> &planes, double distanceM )
          : mResult( result )
          , mPlanes( planes )
          , mDistanceM( distanceM )
        {
        }

        Outline widened( const PipeRun &run ) const
        {
          const LocalPlane &plane = mPlanes[run.stretch];
          QVector<double> x;
          QVector<double> y;
          const auto add = [&]( const PlanPoint &place ) {
            x << plane.x( place );
            y << plane.y( place );
          };
          // Ends join within a tolerance but stay where they are: the way to the node keeps the outline in one piece.
          if ( run.fromNode >= 0 )
            add( mResult.network.nodes[static_cast<std::size_t>( run.fromNode )].place );
          addPipe( run, add );
          if ( run.toNode >= 0 )
            add( mResult.network.nodes[static_cast<std::size_t>( run.toNode )].place );

          Outline outline;
          outline.stretch = run.stretch;
          const int middle = x.size() / 2;
          outline.order = interleaved( cell( x[middle] ), cell( y[middle] ) );
          outline.geometry = QgsGeometry( std::make_unique<QgsLineString>( x, y ) ).buffer( mDistanceM, SEGMENTS );
          return outline;
        }

      private:
        //! Counted in widths from a place far to the south-west, so that it is never negative.
        std::uint32_t cell( double metres ) const
        {
          return static_cast<std::uint32_t>(
            static_cast<std::int64_t>( std::floor( metres / mDistanceM ) ) + ( 1LL << 31 ) );
        }

        template <class Add> void addPipe( const PipeRun &run, const Add &add ) const
        {
          const CanonicalDrawing &drawing = mResult.drawing;
          const CanonicalLine &line = drawing.lines[static_cast<std::size_t>( run.line )];
          add( drawing.placeAt( line, run.fromM ) );
          const auto first = drawing.alongM.begin() + static_cast<std::ptrdiff_t>( line.first );
          const auto last = first + static_cast<std::ptrdiff_t>( line.count );
          for ( auto along = std::upper_bound( first, last, run.fromM ); along != last && *along < run.toM; ++along )
            add( drawing.vertices[static_cast<std::size_t>( along - drawing.alongM.begin() )] );
          add( drawing.placeAt( line, run.toM ) );
        }

        const StaticResult &mResult;
        const std::vector<LocalPlane> &mPlanes;
        double mDistanceM;
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

    //! Unites neighbours of one stretch two by two, once.
    std::vector<Outline> unitedOnce( std::vector<Outline> outlines, Monitor &monitor, double from, double to )
    {
      std::vector<std::size_t> firsts;
      for ( std::size_t i = 0; i < outlines.size(); ++i )
      {
        firsts.push_back( i );
        if ( i + 1 < outlines.size() && outlines[i + 1].stretch == outlines[i].stretch )
          ++i;
      }
      std::vector<Outline> united( firsts.size() );
      parallelRanges( firsts.size(), 1, 0, monitor, from, to, [&]( std::size_t first, std::size_t last, unsigned ) {
        for ( std::size_t i = first; i < last; ++i )
        {
          Outline &own = outlines[firsts[i]];
          const std::size_t next = firsts[i] + 1;
          if ( next < outlines.size() && outlines[next].stretch == own.stretch )
          {
            own.geometry = own.geometry.combine( outlines[next].geometry );
            outlines[next].geometry = QgsGeometry();
          }
          united[i] = std::move( own );
        }
      } );
      return united;
    }

  } // namespace

  std::vector<QgsGeometry> stretchOutlines( const ResultContext &context, double distanceM, Monitor &monitor )
  {
    const std::vector<LocalPlane> planes = planesOf( context );
    const std::vector<PipeRun> runs = pipeRuns( context.result );
    const Widener widener( context.result, planes, distanceM );
    std::vector<Outline> outlines( runs.size() );
    parallelRanges( runs.size(), 32, 0, monitor, 0.0, WIDENED, [&]( std::size_t first, std::size_t last, unsigned ) {
      for ( std::size_t i = first; i < last; ++i )
        outlines[i] = widener.widened( runs[i] );
    } );
    std::sort( outlines.begin(), outlines.end(), []( const Outline &a, const Outline &b ) {
      return std::tie( a.stretch, a.order ) < std::tie( b.stretch, b.order );
    } );

    // Every round costs about the same: half the outlines, twice as large.
    const double rounds = std::ceil( std::log2( static_cast<double>( std::max<std::size_t>( 2, runs.size() ) ) ) );
    double from = WIDENED;
    while ( outlines.size() > planes.size() )
    {
      const double to = std::min( 1.0, from + ( 1.0 - WIDENED ) / rounds );
      outlines = unitedOnce( std::move( outlines ), monitor, from, to );
      from = to;
    }

    std::vector<QgsGeometry> polygons( planes.size() );
    for ( Outline &outline : outlines )
    {
      outline.geometry.convertToSingleType();
      outline.geometry.transform( planes[outline.stretch].back() );
      polygons[outline.stretch] = outline.geometry;
    }
    return polygons;
  }

  double outlineDistanceM( LengthUnit unit )
  {
    return unit == LengthUnit::Foot ? 10.0 * METRES_PER_FOOT : 3.0;
  }

} // namespace stillhead
