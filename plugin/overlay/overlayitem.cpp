// SPDX-License-Identifier: GPL-2.0-or-later
// The same colours, widths and marks as the styled results, drawn by hand because they change with every edit. Casings
// come first over all pipe, then pipe, then marks, so that none covers what matters more.
#include "plugin/overlay/overlayitem.h"

#include "processing/styles/palette.h"

#include <qgsmapcanvas.h>

#include <QPainter>
#include <QPainterPath>

#include <cmath>

namespace stillhead
{

  namespace
  {

    constexpr double MM_PER_INCH = 25.4;
    constexpr double EDGE_MM = 0.15;
    constexpr double MAINLINE_MM = 0.6;
    constexpr double LATERAL_MM = 0.25;
    constexpr double STATE_CASING_MM = 2.0;
    constexpr double TRIANGLE_MM = 2.6;
    constexpr double MARK_SPACING_MM = 15.0;
    constexpr double MARK_OFFSET_MM = 4.0;
    constexpr double STALE_OPACITY = 0.55;
    const QColor NO_FIGURE( 0x60, 0x60, 0x60 );

    bool hasBand( const OverlayPipe &pipe )
    {
      return pipe.band >= 0 && pipe.state != State::AboveStaticLevel && pipe.state != State::PastASummit;
    }

    bool isUp( State state )
    {
      return state == State::OverLimit || state == State::OverAndUnder;
    }

    bool isDown( State state )
    {
      return state == State::UnderLimit || state == State::OverAndUnder;
    }

    QPen flatPen( const QColor &color, double width )
    {
      return QPen( color, width, Qt::SolidLine, Qt::FlatCap, Qt::RoundJoin );
    }

    //! Dashes in millimetres; Qt counts them in pen widths.
    void setDashes( QPen &pen, const QVector<qreal> &mm, double pixelsPerMm )
    {
      QVector<qreal> pattern;
      for ( const qreal length : mm )
        pattern << length * pixelsPerMm / pen.widthF();
      pen.setDashPattern( pattern );
    }

  } // namespace

  OverlayItem::OverlayItem( QgsMapCanvas *canvas )
    : QgsMapCanvasItem( canvas )
  {
    setZValue( 5 );
    updatePosition();
  }

  void OverlayItem::show( const OverlayPicture &picture, bool isStale )
  {
    mPicture = picture;
    mIsStale = isStale;
    update();
  }

  void OverlayItem::updatePosition()
  {
    // It covers the whole map and asks for places as it paints.
    setRect( mMapCanvas->extent() );
  }

  double OverlayItem::pixelsPerMm() const
  {
    return mMapCanvas->logicalDpiX() / MM_PER_INCH;
  }

  QPolygonF OverlayItem::toPixels( const QPolygonF &line ) const
  {
    QPolygonF pixels;
    pixels.reserve( line.size() );
    for ( const QPointF &point : line )
      pixels << toCanvasCoordinates( QgsPointXY( point ) ) - pos();
    return pixels;
  }

  void OverlayItem::paint( QPainter *painter )
  {
    painter->save();
    painter->setRenderHint( QPainter::Antialiasing );
    painter->setOpacity( mIsStale ? STALE_OPACITY : 1.0 );
    const QgsRectangle seen = mMapCanvas->extent().buffered( 10.0 * pixelsPerMm() * mMapCanvas->mapUnitsPerPixel() );
    QVector<const OverlayPipe *> pipes;
    for ( const OverlayPipe &pipe : std::as_const( mPicture.pipes ) )
    {
      if ( pipe.box.intersects( seen ) )
        pipes << &pipe;
    }
    for ( const OverlayPipe *pipe : std::as_const( pipes ) )
      paintCasing( *painter, *pipe );
    for ( const OverlayPipe *pipe : std::as_const( pipes ) )
      paintPipe( *painter, *pipe );
    for ( const OverlayPipe *pipe : std::as_const( pipes ) )
      paintMarks( *painter, *pipe );
    for ( const OverlayMark &mark : std::as_const( mPicture.marks ) )
      paintWorst( *painter, mark );
    paintSource( *painter );
    painter->restore();
  }

  void OverlayItem::paintCasing( QPainter &painter, const OverlayPipe &pipe ) const
  {
    const double mm = pixelsPerMm();
    const QPolygonF pixels = toPixels( pipe.line );
    if ( hasBand( pipe ) )
    {
      const double width = casingWidths( mPicture.bands ).at( pipe.band );
      QPen edge = flatPen( edgeColor(), ( width + 2.0 * EDGE_MM ) * mm );
      QPen casing = flatPen( bandColors( mPicture.bands ).at( pipe.band ), width * mm );
      if ( pipe.state == State::UnderLimit )
      {
        setDashes( edge, { 2.6, 1.3 }, mm );
        setDashes( casing, { 2.6, 1.3 }, mm );
      }
      painter.setPen( edge );
      painter.drawPolyline( pixels );
      painter.setPen( casing );
      painter.drawPolyline( pixels );
    }
    else if ( pipe.state == State::AboveStaticLevel )
    {
      painter.setPen( flatPen( Qt::black, STATE_CASING_MM * mm ) );
      painter.drawPolyline( pixels );
      QPen strokes = flatPen( Qt::white, 0.8 * STATE_CASING_MM * mm );
      setDashes( strokes, { 1.0, 1.4 }, mm );
      painter.setPen( strokes );
      painter.drawPolyline( pixels );
    }
  }

  void OverlayItem::paintPipe( QPainter &painter, const OverlayPipe &pipe ) const
  {
    const double mm = pixelsPerMm();
    const double width = ( pipe.role == Role::Mainline ? MAINLINE_MM : LATERAL_MM ) * mm;
    QPen pen = flatPen( Qt::black, width );
    if ( hasBand( pipe ) )
      pen.setColor( pipeColorOn( bandColors( mPicture.bands ).at( pipe.band ) ) );
    else if ( pipe.state == State::NoSource || pipe.state == State::NoTerrain )
    {
      pen = flatPen( NO_FIGURE, width + 0.3 * mm );
      setDashes(
        pen, pipe.state == State::NoSource ? QVector<qreal> { 3.0, 0.9, 0.7, 0.9 } : QVector<qreal> { 0.5, 0.9 }, mm );
    }
    painter.setPen( pen );
    painter.drawPolyline( toPixels( pipe.line ) );
  }

  void OverlayItem::paintMarks( QPainter &painter, const OverlayPipe &pipe ) const
  {
    const bool isDry = pipe.state == State::PastASummit;
    if ( !isUp( pipe.state ) && !isDown( pipe.state ) && !isDry )
      return;
    QPainterPath path;
    path.addPolygon( toPixels( pipe.line ) );
    const double mm = pixelsPerMm();
    const double spacing = ( isDry ? 3.2 : MARK_SPACING_MM ) * mm;
    const double length = path.length();
    const double first = std::min( ( isDry ? 1.6 : MARK_OFFSET_MM ) * mm, length / 2.0 );
    for ( double at = first; at <= length; at += spacing )
    {
      const QPointF pixel = path.pointAtPercent( length > 0.0 ? path.percentAtLength( at ) : 0.0 );
      if ( isDry )
      {
        painter.setPen( QPen( Qt::black, 0.25 * mm ) );
        painter.setBrush( Qt::white );
        painter.drawRect( QRectF( pixel.x() - 0.8 * mm, pixel.y() - 0.8 * mm, 1.6 * mm, 1.6 * mm ) );
        continue;
      }
      if ( isUp( pipe.state ) )
        paintTriangle( painter, pixel, true, false );
      if ( isDown( pipe.state ) )
        paintTriangle( painter, pixel + QPointF( isUp( pipe.state ) ? 3.0 * mm : 0.0, 0.0 ), false, false );
    }
  }

  void OverlayItem::paintTriangle( QPainter &painter, const QPointF &pixel, bool up, bool isBlack ) const
  {
    const double radius = ( isBlack ? 4.2 : TRIANGLE_MM ) * pixelsPerMm() / std::sqrt( 3.0 );
    const double sign = up ? -1.0 : 1.0;
    const QPolygonF triangle { { pixel + QPointF( 0.0, sign * radius ),
      pixel + QPointF( 0.866 * radius, -sign * radius / 2.0 ),
      pixel + QPointF( -0.866 * radius, -sign * radius / 2.0 ) } };
    painter.setPen( QPen( isBlack ? Qt::white : Qt::black, 0.3 * pixelsPerMm() ) );
    painter.setBrush( isBlack ? Qt::black : Qt::white );
    painter.drawPolygon( triangle );
  }

  void OverlayItem::paintWorst( QPainter &painter, const OverlayMark &mark ) const
  {
    const QPointF pixel = toCanvasCoordinates( QgsPointXY( mark.place ) ) - pos();
    paintTriangle( painter, pixel, mark.high, true );
    QFont font = painter.font();
    font.setBold( true );
    QPainterPath words;
    words.addText( pixel + QPointF( 3.0, -3.0 ) * pixelsPerMm(), font, mark.text );
    painter.strokePath( words, QPen( Qt::white, 0.9 * pixelsPerMm(), Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin ) );
    painter.fillPath( words, Qt::black );
  }

  void OverlayItem::paintSource( QPainter &painter ) const
  {
    if ( mPicture.pipes.isEmpty() )
      return;
    const QPointF pixel = toCanvasCoordinates( QgsPointXY( mPicture.source ) ) - pos();
    const double radius = 2.6 * pixelsPerMm();
    painter.setPen( QPen( Qt::black, 0.6 * pixelsPerMm() ) );
    painter.setBrush( Qt::white );
    painter.drawEllipse( pixel, radius, radius );
    painter.drawLine( pixel - QPointF( radius, 0.0 ), pixel + QPointF( radius, 0.0 ) );
    painter.drawLine( pixel - QPointF( 0.0, radius ), pixel + QPointF( 0.0, radius ) );
  }

} // namespace stillhead
