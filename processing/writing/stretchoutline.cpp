// SPDX-License-Identifier: GPL-2.0-or-later
// Widens in a plane of metres laid at the stretch's worst place: exact there, and off by far less than a line's width
// over any stretch of pipe, in degrees and in stretched map projections alike.
#include "processing/writing/stretchoutline.h"

#include "core/job/pieceline.h"

#include <qgslinestring.h>
#include <qgsmultilinestring.h>

#include <QTransform>

#include <algorithm>
#include <cmath>
#include <utility>
#include <vector>

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

    class StretchLines
    {
      public:
        explicit StretchLines( const LocalPlane &plane )
          : mPlane( plane )
          , mLines( std::make_unique<QgsMultiLineString>() )
        {
        }

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

        /**
         * Ends join within a tolerance but stay where they are. Where that is wider than the outline, the way to the node
         * keeps it in one piece.
         */
        void addJoint( const PlanPoint &end, const PlanPoint &node, double outlineM )
        {
          if ( std::hypot( mPlane.x( end ) - mPlane.x( node ), mPlane.y( end ) - mPlane.y( node ) ) < outlineM )
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
    std::vector<std::pair<PlanPoint, int>> joints;
    // Neighbouring pieces of a line go in as one: cuts would only be places where the outline has to be noded.
    for ( std::size_t i = 0; i < stretch.pieces.size(); )
    {
      const Piece &piece = result.pieces[static_cast<std::size_t>( stretch.pieces[i] )];
      const CanonicalLine &line = context.lineOf( piece );
      double toM = piece.fromM;
      lines.begin();
      for ( ; i < stretch.pieces.size(); ++i )
      {
        const Piece &next = result.pieces[static_cast<std::size_t>( stretch.pieces[i] )];
        if ( &context.lineOf( next ) != &line || next.fromM != toM )
          break;
        toM = next.toM;
        const Span &span = result.network.spans[static_cast<std::size_t>( next.span )];
        if ( next.fromM <= span.fromM )
          joints.emplace_back( result.drawing.placeAt( line, next.fromM ), span.fromNode );
        if ( next.toM >= span.toM )
          joints.emplace_back( result.drawing.placeAt( line, next.toM ), span.toNode );
      }
      lines.add( result.drawing.placeAt( line, piece.fromM ) );
      const auto first = result.drawing.alongM.begin() + static_cast<std::ptrdiff_t>( line.first );
      const auto last = first + static_cast<std::ptrdiff_t>( line.count );
      for ( auto along = std::upper_bound( first, last, piece.fromM ); along != last && *along < toM; ++along )
        lines.add( result.drawing.vertices[static_cast<std::size_t>( along - result.drawing.alongM.begin() )] );
      lines.add( result.drawing.placeAt( line, toM ) );
      lines.end();
    }
    for ( const auto &[end, node] : joints )
      lines.addJoint( end, result.network.nodes[static_cast<std::size_t>( node )].place, distanceM );
    QgsGeometry outline = lines.take().buffer( distanceM, SEGMENTS );
    outline.convertToSingleType();
    outline.transform( plane.back() );
    return outline;
  }

} // namespace stillhead
