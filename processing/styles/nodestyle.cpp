// SPDX-License-Identifier: GPL-2.0-or-later
// Nodes by shape: the source as a circle with a cross, joints as dots, ends as rings; small, for the pipe is the map.
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  void styleNodes( QgsVectorLayer &layer, const ResultStyle & )
  {
    const QColor dark = Qt::black;
    const QColor white = Qt::white;
    std::unique_ptr<QgsMarkerSymbol> source =
      markerSymbol( { shapeLayer( compat::MarkerShape::Circle, 5.2, white, dark, 0.6 ),
        shapeLayer( compat::MarkerShape::Cross, 5.2, white, dark, 0.6 ) } );
    std::unique_ptr<QgsMarkerSymbol> joint =
      markerSymbol( { shapeLayer( compat::MarkerShape::Circle, 1.1, dark, white, 0.15 ) } );
    std::unique_ptr<QgsMarkerSymbol> end =
      markerSymbol( { shapeLayer( compat::MarkerShape::Circle, 1.2, white, dark, 0.2 ) } );
    std::unique_ptr<QgsMarkerSymbol> device =
      markerSymbol( { shapeLayer( compat::MarkerShape::Square, 2.2, white, dark, 0.4 ) } );

    QgsCategoryList categories;
    categories << QgsRendererCategory( word::NODE_SOURCE, source.release(), Text::tr( "source" ) )
               << QgsRendererCategory( word::NODE_JOINT, joint.release(), Text::tr( "joint" ) )
               << QgsRendererCategory( word::NODE_DEVICE, device.release(), Text::tr( "device" ) )
               << QgsRendererCategory( word::NODE_END, end.release(), Text::tr( "end of a pipe" ) );
    layer.setRenderer( new QgsCategorizedSymbolRenderer( field::KIND, categories ) );
  }

} // namespace stillhead
