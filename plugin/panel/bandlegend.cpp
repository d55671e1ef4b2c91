// SPDX-License-Identifier: GPL-2.0-or-later
// A swatch is as thick as the casing on the map, so that width tells as much as colour.
#include "plugin/panel/bandlegend.h"

#include "processing/styles/palette.h"

#include <QGridLayout>
#include <QLabel>
#include <QPainter>

namespace stillhead
{

  namespace
  {

    QPixmap swatch( const QColor &color, double widthMm, const QWidget &on )
    {
      constexpr double MM_PER_INCH = 25.4;
      const double pixelsPerMm = on.logicalDpiY() / MM_PER_INCH;
      const qreal ratio = on.devicePixelRatioF();
      const QSizeF size( 7.0 * pixelsPerMm, 4.0 * pixelsPerMm );
      QPixmap pixmap( ( size * ratio ).toSize() );
      pixmap.setDevicePixelRatio( ratio );
      pixmap.fill( Qt::transparent );
      QPainter painter( &pixmap );
      painter.setRenderHint( QPainter::Antialiasing );
      const double height = widthMm * pixelsPerMm;
      const QRectF casing( 0.5, ( size.height() - height ) / 2.0, size.width() - 1.0, height );
      painter.setPen( edgeColor() );
      painter.setBrush( color );
      painter.drawRect( casing );
      painter.setPen( QPen( pipeColorOn( color ), 0.5 * pixelsPerMm ) );
      painter.drawLine( QPointF( casing.left(), size.height() / 2.0 ), QPointF( casing.right(), size.height() / 2.0 ) );
      return pixmap;
    }

  } // namespace

  QVector<double> lengthsByBand( const SolvedPlan &plan )
  {
    QVector<double> lengthsM( plan.style.bandCount(), 0.0 );
    for ( const Piece &piece : plan.result.pieces )
    {
      if ( piece.band >= 0 && piece.band < lengthsM.size() )
        lengthsM[piece.band] += piece.toM - piece.fromM;
    }
    return lengthsM;
  }

  BandLegend::BandLegend( QWidget *parent )
    : QWidget( parent )
    , mRows( new QGridLayout( this ) )
  {
    setObjectName( QStringLiteral( "BandLegend" ) );
    mRows->setContentsMargins( 0, 0, 0, 0 );
    mRows->setColumnStretch( 1, 1 );
  }

  void BandLegend::showPlan( const SolvedPlan *plan )
  {
    while ( QLayoutItem *item = mRows->takeAt( 0 ) )
    {
      delete item->widget();
      delete item;
    }
    if ( !plan )
      return;
    const QVector<double> lengthsM = lengthsByBand( *plan );
    // The highest stands on top, as pressures are thought of.
    for ( int band = lengthsM.size() - 1; band >= 0; --band )
      addBand( *plan, band, lengthsM.at( band ) );
  }

  void BandLegend::addBand( const SolvedPlan &plan, int band, double lengthM )
  {
    const int row = mRows->rowCount();
    auto *color = new QLabel( this );
    color->setPixmap( swatch(
      bandColors( plan.style.bandCount() ).at( band ), casingWidths( plan.style.bandCount() ).at( band ), *this ) );
    auto *length = new QLabel( plan.units.lengthText( lengthM ), this );
    length->setAlignment( Qt::AlignRight | Qt::AlignVCenter );
    mRows->addWidget( color, row, 0 );
    mRows->addWidget( new QLabel( bandText( band, plan.style ), this ), row, 1 );
    mRows->addWidget( length, row, 2 );
  }

} // namespace stillhead
