// SPDX-License-Identifier: GPL-2.0-or-later
// Pipe is widened in a plane of metres laid at its stretch: exact there, and off by far less than a pen's width over any
// stretch, in degrees and in stretched map projections alike. Groups of neighbours are widened together and then united
// two by two, round after round: widening thousands of lines at once costs many times as much, and on one thread only.
#include "processing/writing/stretchoutline.h"

#include "core/feedback/parallel.h"
#include "processing/writing/piperuns.h"

#include <qgslinestring.h>
#include <qgsmultilinestring.h>

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

    //! Runs widened together: tried with ten thousand lines, far apart and crossing each other twenty times.
    constexpr std::size_t GROUP_RUNS = 256;

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

    //! An outline under way.
    struct Outline
    {
        std::size_t stretch = 0;
        QgsGeometry geometry;
    };

    //! Bits of two numbers taken in turn: places near in this order are near on the ground.
    std::uint64_t interleaved( std::uint32_t x, std::uint32_t y )
    {
      std::uint64_t result = 0;
      for ( unsigned bit = 0; bit < 32; ++bit )
      {
        result |= static_cast<std::uint64_t>( x >> bit & 1u ) << ( 2 * bit );
        result |= static_cast<std::uint64_t>( y >> bit & 1u ) << ( 2 * bit + 1 );
      }
      return result;
    }

    //! Metres in steps of \a step from a place far to the south-west, so that the number is never negative.
    std::uint32_t stepsOf( double metres, double step )
    {
      return static_cast<std::uint32_t>( static_cast<std::int64_t>( std::floor( metres / step ) ) + ( 1LL << 31 ) );
    }

    //! Puts the runs of each stretch in an order that keeps neighbours together.
    void sortByPlace(
      std::vector<PipeRun> &runs, const StaticResult &result, const std::vector<LocalPlane> &planes, double stepM )
    {
      using Key = std::tuple<std::size_t, std::uint64_t, std::size_t>;
      std::vector<Key> keys;
      keys.reserve( runs.size() );
      for ( std::size_t i = 0; i < runs.size(); ++i )
      {
        const PipeRun &run = runs[i];
        const CanonicalLine &line = result.drawing.lines[static_cast<std::size_t>( run.line )];
        const PlanPoint middle = result.drawing.placeAt( line, 0.5 * ( run.fromM + run.toM ) );
        const LocalPlane &plane = planes[run.stretch];
        keys.emplace_back(
          run.stretch, interleaved( stepsOf( plane.x( middle ), stepM ), stepsOf( plane.y( middle ), stepM ) ), i );
      }
      std::sort( keys.begin(), keys.end() );
      std::vector<PipeRun> sorted;
      sorted.reserve( runs.size() );
      for ( const Key &key : keys )
        sorted.push_back( runs[std::get<2>( key )] );
      runs = std::move( sorted );
    }

    //! Firsts of groups of at most GROUP_RUNS runs of one stretch, and the end.
    std::vector<std::size_t> groupsOf( const std::vector<PipeRun> &runs )
    {
      std::vector<std::size_t> firsts;
      for ( std::size_t i = 0; i < runs.size(); ++i )
      {
        if ( firsts.empty() || i - firsts.back() == GROUP_RUNS || runs[i].stretch != runs[i - 1].stretch )
          firsts.push_back( i );
      }
      firsts.push_back( runs.size() );
      return firsts;
    }

    //! The runs [first, last), which belong to one stretch, widened.
    Outline widened( const std::vector<PipeRun> &runs, std::size_t first, std::size_t last, const StaticResult &result,
      const LocalPlane &plane, double distanceM )
    {
      auto lines = std::make_unique<QgsMultiLineString>();
      QVector<double> x;
      QVector<double> y;
      for ( std::size_t i = first; i < last; ++i )
      {
        x.clear();
        y.clear();
        for ( const PlanPoint &place : placesOf( runs[i], result ) )
        {
          x << plane.x( place );
          y << plane.y( place );
        }
        lines->addGeometry( new QgsLineString( x, y ) );
      }
      return { runs[first].stretch, QgsGeometry( std::move( lines ) ).buffer( distanceM, SEGMENTS ) };
    }

    //! Unites neighbours of one stretch two by two, once.
    std::vector<Outline> unitedOnce( std::vector<Outline> outlines, Monitor &monitor, double from, double to )
    {
      const auto hasPartner = [&outlines]( std::size_t i ) {
        return i + 1 < outlines.size() && outlines[i + 1].stretch == outlines[i].stretch;
      };
      std::vector<std::size_t> firsts;
      for ( std::size_t i = 0; i < outlines.size(); i += hasPartner( i ) ? 2 : 1 )
        firsts.push_back( i );
      std::vector<Outline> united( firsts.size() );
      parallelRanges( firsts.size(), 1, 0, monitor, from, to, [&]( std::size_t first, std::size_t last, unsigned ) {
        for ( std::size_t i = first; i < last; ++i )
        {
          const std::size_t own = firsts[i];
          united[i] = outlines[own];
          if ( hasPartner( own ) )
            united[i].geometry = outlines[own].geometry.combine( outlines[own + 1].geometry );
        }
      } );
      return united;
    }

  } // namespace

  std::vector<QgsGeometry> stretchOutlines( const ResultContext &context, double distanceM, Monitor &monitor )
  {
    const std::vector<LocalPlane> planes = planesOf( context );
    std::vector<PipeRun> runs = pipeRuns( context.result );
    sortByPlace( runs, context.result, planes, distanceM );
    const std::vector<std::size_t> groups = groupsOf( runs );
    std::vector<Outline> outlines( groups.size() - 1 );
    parallelRanges( outlines.size(), 1, 0, monitor, 0.0, WIDENED, [&]( std::size_t first, std::size_t last, unsigned ) {
      for ( std::size_t i = first; i < last; ++i )
        outlines[i] =
          widened( runs, groups[i], groups[i + 1], context.result, planes[runs[groups[i]].stretch], distanceM );
    } );

    // Every round costs about the same: half the outlines, twice as large.
    const double rounds = std::ceil( std::log2( static_cast<double>( std::max<std::size_t>( 2, outlines.size() ) ) ) );
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
