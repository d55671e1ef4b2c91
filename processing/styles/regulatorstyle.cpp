// SPDX-License-Identifier: GPL-2.0-or-later
// Devices by shape alone: a regulator is a bow-tie under a bar, an isolating valve a bow-tie (filled where it is closed), a
// check valve an arrow against a bar, a booster a filled triangle in a ring. Black on white: readable on any band.
#include "core/network/device.h"
#include "processing/parameternames.h"
#include "processing/styles/labels.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgsmarkersymbollayer.h>
#include <qgssinglesymbolrenderer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    using Shape = compat::MarkerShape;
    using Layers = QList<QgsSymbolLayer *>;

    const QColor DARK = Qt::black;
    const QColor WHITE = Qt::white;

    //! A triangle that points to where \a angle turns up, moved by \a offset (which turns with it).
    QgsSymbolLayer *triangle( const QColor &fill, double angle, const QPointF &offset )
    {
      QgsSimpleMarkerSymbolLayer *layer = shapeLayer( Shape::EquilateralTriangle, 2.8, fill, DARK, 0.4 );
      layer->setAngle( angle );
      layer->setOffset( offset );
      return layer;
    }

    //! Two triangles that meet with their tips.
    Layers bowTie( const QColor &fill )
    {
      return { triangle( fill, 90.0, { 0.0, 1.3 } ), triangle( fill, -90.0, { 0.0, 1.3 } ) };
    }

    QgsSymbolLayer *bar( double lengthMm, double angle, const QPointF &offset )
    {
      QgsSimpleMarkerSymbolLayer *layer = shapeLayer( Shape::Line, lengthMm, DARK, DARK, 0.7 );
      layer->setAngle( angle );
      layer->setOffset( offset );
      return layer;
    }

    QgsSymbolLayer *ring( double sizeMm )
    {
      return shapeLayer( Shape::Circle, sizeMm, WHITE, DARK, 0.4 );
    }

    Layers layersOf( DeviceKind kind )
    {
      switch ( kind )
      {
      case DeviceKind::Regulator:
        return Layers { ring( 7.0 ) } + bowTie( DARK ) + Layers { bar( 4.0, 90.0, { -2.2, 0.0 } ) };
      case DeviceKind::Booster:
        return { ring( 5.0 ), triangle( DARK, 0.0, { 0.0, 0.0 } ) };
      case DeviceKind::CheckValve:
        return { ring( 6.0 ), triangle( DARK, 90.0, { 0.0, 0.0 } ), bar( 3.6, 0.0, { 1.6, 0.0 } ) };
      case DeviceKind::ClosedValve:
        return Layers { ring( 6.4 ) } + bowTie( DARK );
      case DeviceKind::ControlValve:
        return Layers { ring( 6.4 ) } + bowTie( WHITE );
      }
      return {};
    }

  } // namespace

  void styleBoosters( QgsVectorLayer &layer, const ResultStyle &style )
  {
    layer.setRenderer( new QgsSingleSymbolRenderer( markerSymbol( layersOf( DeviceKind::Booster ) ).release() ) );
    labelPoints( layer,
      QStringLiteral( "\"name\" || ': +' || format_number( \"boost_low\", 0 ) || ' %2 ' || %1 || '+' || "
                      "format_number( \"boost\", 0 ) || ' %2'" )
        .arg( QStringLiteral( "'%1 '" ).arg( Text::tr( "running, at no flow" ) ), style.pressureUnit ) );
  }

  void styleComparison( QgsVectorLayer &layer )
  {
    // A ring with the option's rank beside it.
    layer.setRenderer( new QgsSingleSymbolRenderer( markerSymbol( { ring( 6.0 ) } ).release() ) );
    labelPoints( layer, QStringLiteral( "\"rank\" || '. ' || \"name\"" ) );
  }

  void styleRegulators( QgsVectorLayer &layer, const ResultStyle &style )
  {
    const QSet<QVariant> present = layer.uniqueValues( layer.fields().lookupField( field::KIND ) );
    QgsCategoryList categories;
    for ( const DeviceKind kind : { DeviceKind::Regulator, DeviceKind::Booster, DeviceKind::CheckValve,
            DeviceKind::ClosedValve, DeviceKind::ControlValve } )
    {
      const QString name = QString::fromLatin1( deviceKindName( kind ) );
      std::unique_ptr<QgsMarkerSymbol> symbol = markerSymbol( layersOf( kind ) );
      if ( present.contains( name ) )
        categories << QgsRendererCategory( name, symbol.release(), name );
    }
    layer.setRenderer( new QgsCategorizedSymbolRenderer( field::KIND, categories ) );
    labelPoints( layer,
      QStringLiteral(
        "CASE WHEN \"set\" IS NOT NULL THEN \"name\" || ': ' || %1 || ' ' || format_number( \"set\", 0 ) || "
        "' %3, ' || %2 || ' ' || format_number( \"lockup\", 0 ) || ' %3' ELSE \"name\" END" )
        .arg( QStringLiteral( "'%1'" ).arg( Text::tr( "set" ) ),
          QStringLiteral( "'%1'" ).arg( Text::tr( "at no flow" ) ), style.pressureUnit ) );
  }

} // namespace stillhead
