// SPDX-License-Identifier: GPL-2.0-or-later
// Widens in a plane of metres laid at the stretch's worst place: exact there, and off by far less than a line's width
// over any stretch of pipe, in degrees and in stretched map projections alike.
#include "processing/writing/stretchoutline.h"

#include "core/job/pieceline.h"

#include <qgslinestring.h>
#include <qgsmultilinestring.h>

#include <QTransform>

#include <algorithm>

namespace stillhead
{

  namespace
  {

    //! Straight pieces to a quarter circle: round enough for a pen.
    constexpr int SEGMENTS = 5;

    //! The plan seen from one place, in metres.
    class LocalPlane
    {
      public:
        LocalPlane( const PlanPoint &origin, const GroundScale &scale )
          : mOrigin( origin )
          , mScale( scale )
        {}

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

    class StretchLines
    {
      public:
        explicit StretchLines( const LocalPlane &plane )
          : mPlane( plane )
          , mLines( std::make_unique<QgsMultiLineString>() )
        {}

        void begin()
        {
          mX.clear();
          mY.clear();
        }
        void add( const PlanPoint &place )
        {
          mX << mPlane.x( place );
          mY << mPlane.y( place );
        }
        void end() { mLines->addGeometry( new QgsLineString( mX, mY ) ); }

        //! Ends join within a tolerance but stay where they are: the way to the node keeps the outline in one piece.
        void addJoint( const PlanPoint &end, const PlanPoint &node )
        {
          if ( end == node )
            return;
          begin();
          add( end );
          add( node );
          this->end();
        }

        QgsGeometry take() { return QgsGeometry( std::move( mLines ) ); }

      private:
        const LocalPlane &mPlane;
        std::unique_ptr<QgsMultiLineString> mLines;
        QVector<double> mX;
        QVector<double> mY;
    };

  } // namespace

  QgsGeometry stretchOutline(
    const ResultContext &context, const Stretch &stretch, double distanceM, const PlanMeasure &measure )
  {
    const StaticResult &result = context.result;
    const Piece &worst = result.pieces[static_cast<std::size_t>( stretch.worstPiece )];
    const PlanPoint origin = result.drawing.placeAt( context.lineOf( worst ), worst.fromM );
    const LocalPlane plane( origin, measure.scaleAt( origin ) );
    StretchLines lines( plane );
    for ( const int number : stretch.pieces )
    {
      const Piece &piece = result.pieces[static_cast<std::size_t>( number )];
      const CanonicalLine &line = context.lineOf( piece );
      const Span &span = result.network.spans[static_cast<std::size_t>( piece.span )];
      const PlanPoint from = result.drawing.placeAt( line, piece.fromM );
      const PlanPoint to = result.drawing.placeAt( line, piece.toM );
      lines.begin();
      lines.add( from );
      const auto first = result.drawing.alongM.begin() + static_cast<std::ptrdiff_t>( line.first );
      const auto last = first + static_cast<std::ptrdiff_t>( line.count );
      for ( auto along = std::upper_bound( first, last, piece.fromM ); along != last && *along < piece.toM; ++along )
        lines.add( result.drawing.vertices[static_cast<std::size_t>( along - result.drawing.alongM.begin() )] );
      lines.add( to );
      lines.end();
      if ( piece.fromM <= span.fromM )
        lines.addJoint( from, result.network.nodes[static_cast<std::size_t>( span.fromNode )].place );
      if ( piece.toM >= span.toM )
        lines.addJoint( to, result.network.nodes[static_cast<std::size_t>( span.toNode )].place );
    }
    QgsGeometry outline = lines.take().buffer( distanceM, SEGMENTS );
    outline.convertToSingleType();
    outline.transform( plane.back() );
    return outline;
  }

} // namespace stillhead
