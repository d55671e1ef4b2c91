// SPDX-License-Identifier: GPL-2.0-or-later
// Fills QGIS's symbol layers with our defaults: millimetres, flat ends, upright marks.
#include "processing/styles/symbols.h"

#include <qgsmarkersymbollayer.h>

namespace stillhead
{

  QgsSimpleLineSymbolLayer *lineLayer( const QColor &color, double widthMm, Pass pass )
  {
    auto *layer = new QgsSimpleLineSymbolLayer( color, widthMm );
    layer->setPenCapStyle( Qt::FlatCap );
    layer->setPenJoinStyle( Qt::RoundJoin );
    layer->setRenderingPass( static_cast<int>( pass ) );
    return layer;
  }

  void setDashes( QgsSimpleLineSymbolLayer &layer, double dashMm, double gapMm, double earlyMm )
  {
    layer.setUseCustomDashPattern( true );
    layer.setCustomDashVector( { dashMm + 2.0 * earlyMm, gapMm - 2.0 * earlyMm } );
    layer.setDashPatternOffset( earlyMm );
  }

  QgsSimpleMarkerSymbolLayer *shapeLayer(
    compat::MarkerShape shape, double sizeMm, const QColor &fill, const QColor &stroke, double strokeMm )
  {
    auto *layer = new QgsSimpleMarkerSymbolLayer( shape, sizeMm );
    layer->setColor( fill );
    layer->setStrokeColor( stroke );
    layer->setStrokeWidth( strokeMm );
    return layer;
  }

  std::unique_ptr<QgsMarkerSymbol> markerSymbol( const QList<QgsSymbolLayer *> &layers )
  {
    return std::make_unique<QgsMarkerSymbol>( layers );
  }

  std::unique_ptr<QgsLineSymbol> lineSymbol( const QList<QgsSymbolLayer *> &layers )
  {
    return std::make_unique<QgsLineSymbol>( layers );
  }

  QgsSymbolLayer *markersAlong( std::unique_ptr<QgsMarkerSymbol> marker, const Spacing &spacing )
  {
    auto *layer = new QgsMarkerLineSymbolLayer( spacing.turned, spacing.intervalMm );
    layer->setOffsetAlongLine( spacing.offsetMm );
    layer->setSubSymbol( marker.release() );
    layer->setRenderingPass( static_cast<int>( Pass::Mark ) );
    return layer;
  }

  QgsSymbolLayer *strokesAcross(
    std::unique_ptr<QgsLineSymbol> line, double lengthMm, double intervalMm, double angle, Pass pass )
  {
    auto *layer = new QgsHashedLineSymbolLayer( true, intervalMm );
    layer->setHashLength( lengthMm );
    layer->setHashAngle( angle );
    layer->setOffsetAlongLine( intervalMm / 2.0 );
    layer->setSubSymbol( line.release() );
    layer->setRenderingPass( static_cast<int>( pass ) );
    return layer;
  }

} // namespace stillhead
