// SPDX-License-Identifier: GPL-2.0-or-later
// Ceiling and floor of the serviceable ground: a full line with fine teeth towards the ground that is too high, a broken
// line with coarse teeth towards the ground that is too low; on a white rim, without colour, labelled along the line.
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/styles/labels.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    //! Which side of a line its teeth are on, as QGIS counts offsets.
    enum Side
    {
      LEFT = -1,
      RIGHT = 1
    };

    //! Teeth of \a lengthMm on one side of the line.
    QgsSymbolLayer *teeth( Side side, double lengthMm, double intervalMm, double widthMm )
    {
      QgsSymbolLayer *strokes = strokesAcross( lineSymbol( { lineLayer( QColor( Qt::black ), widthMm, Pass::Pipe ) } ),
        lengthMm, intervalMm, 0.0, Pass::Pipe );
      static_cast<QgsHashedLineSymbolLayer *>( strokes )->setOffset( 0.5 * side * lengthMm );
      return strokes;
    }

    QgsSymbolLayer *rim( double widthMm )
    {
      return lineLayer( QColor( Qt::white ), widthMm, Pass::Casing );
    }

    std::unique_ptr<QgsLineSymbol> ceilingSymbol()
    {
      return lineSymbol(
        { rim( 1.6 ), teeth( LEFT, 1.2, 1.6, 0.25 ), lineLayer( QColor( Qt::black ), 0.6, Pass::Pipe ) } );
    }

    std::unique_ptr<QgsLineSymbol> floorSymbol()
    {
      QgsSimpleLineSymbolLayer *broken = lineLayer( QColor( Qt::black ), 0.6, Pass::Pipe );
      setDashes( *broken, 3.2, 1.6 );
      return lineSymbol( { rim( 1.6 ), teeth( RIGHT, 1.8, 4.8, 0.6 ), broken } );
    }

  } // namespace

  void styleGroundLimits( QgsVectorLayer &layer, const ResultStyle &style )
  {
    QgsCategoryList categories;
    categories << QgsRendererCategory( word::CEILING, ceilingSymbol().release(),
      Text::tr( "ceiling: higher ground has less than %1 %2 (low case)" )
        .arg( plainNumber( style.least ), style.pressureUnit ) );
    categories << QgsRendererCategory( word::FLOOR, floorSymbol().release(),
      Text::tr( "floor: lower ground has more than %1 %2 (high case)" )
        .arg( plainNumber( style.most ), style.pressureUnit ) );
    auto *renderer = new QgsCategorizedSymbolRenderer( field::WHAT, categories );
    renderer->setUsingSymbolLevels( true );
    layer.setRenderer( renderer );
    labelLines( layer, QStringLiteral( "\"%1\"" ).arg( field::LABEL ) );
  }

} // namespace stillhead
