// SPDX-License-Identifier: GPL-2.0-or-later
// Lines and words are those that the algorithm would write.
#include "plugin/overlay/overlaypath.h"

#include "core/job/pieceline.h"
#include "processing/writing/resulttable.h"

#include <qgsexception.h>

namespace stillhead
{

  namespace
  {

    bool takeToMap( QPolygonF &line, const QgsCoordinateTransform &toMap )
    {
      try
      {
        toMap.transformPolygon( line );
        return true;
      }
      catch ( const QgsCsException & )
      {
        return false;
      }
    }

    void addPipes( OverlayPicture &picture, const SolvedPlan &plan, const QgsCoordinateTransform &toMap )
    {
      const ResultContext context = plan.context();
      std::vector<PieceVertex> vertices;
      picture.pipes.reserve( static_cast<int>( plan.result.pieces.size() ) );
      for ( const Piece &piece : plan.result.pieces )
      {
        pieceLine( plan.result, piece, plan.units.specificWeightNPerM3(), vertices );
        OverlayPipe pipe;
        for ( const PieceVertex &vertex : vertices )
          pipe.line << QPointF( vertex.x, vertex.y );
        if ( !takeToMap( pipe.line, toMap ) )
          continue;
        pipe.box = QgsRectangle( pipe.line.boundingRect() );
        pipe.band = piece.band;
        pipe.state = piece.state;
        pipe.role = context.lineOf( piece ).role;
        picture.pipes << pipe;
      }
    }

    //! The worst place of every stretch.
    void addMarks( OverlayPicture &picture, const SolvedPlan &plan, const QgsCoordinateTransform &toMap )
    {
      const ResultContext context = plan.context();
      for ( const Extreme &extreme : plan.result.extremes )
      {
        if ( extreme.stretch < 0 )
          continue;
        const Piece &piece = plan.result.pieces[static_cast<std::size_t>( extreme.piece )];
        const CanonicalLine &line = context.lineOf( piece );
        const PlanPoint place = plan.result.drawing.placeAt( line, extreme.alongM );
        QPolygonF point;
        point << QPointF( place.x, place.y );
        if ( !takeToMap( point, toMap ) )
          continue;
        OverlayMark mark;
        mark.place = point.first();
        mark.high = extreme.kind == ExtremeKind::Highest;
        mark.text = placeLabel( extreme.pressurePa, extreme.elevationM, plan.units, plan.limits.leastFor( line.role ),
          plan.limits.mostFor( line.role ) );
        picture.marks << mark;
      }
    }

  } // namespace

  OverlayPicture overlayPicture( const PreviewResult &result, const QgsCoordinateTransform &toMap )
  {
    OverlayPicture picture;
    picture.bands = result.plan.style.bandCount();
    addPipes( picture, result.plan, toMap );
    addMarks( picture, result.plan, toMap );
    QPolygonF source;
    source << QPointF( result.plan.source.source.place.x, result.plan.source.source.place.y );
    takeToMap( source, toMap );
    picture.source = source.first();
    return picture;
  }

} // namespace stillhead
