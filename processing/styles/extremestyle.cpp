// SPDX-License-Identifier: GPL-2.0-or-later
// Worst places: triangles that point up where pressure is highest, down where it is lowest; full and labelled for a
// stretch, hollow and small for a pressure zone, whose extremes are often the same places.
#include "processing/parameternames.h"
#include "processing/styles/labels.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgsrulebasedrenderer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    using Rule = QgsRuleBasedRenderer::Rule;

    Rule *place( const QString &what, bool ofStretch, const QString &label )
    {
      QgsSimpleMarkerSymbolLayer *triangle = shapeLayer( compat::MarkerShape::EquilateralTriangle,
        ofStretch ? 4.2 : 2.6, ofStretch ? QColor( Qt::black ) : QColor( Qt::white ),
        ofStretch ? QColor( Qt::white ) : QColor( Qt::black ), 0.4 );
      triangle->setAngle( what == word::HIGHEST ? 0.0 : 180.0 );
      const QString filter = QStringLiteral( "\"what\" = '%1' AND \"stretch\" IS %2NULL" )
                               .arg( what, ofStretch ? QStringLiteral( "NOT " ) : QString() );
      return new Rule( markerSymbol( { triangle } ).release(), 0, 0, filter, label );
    }

  } // namespace

  void styleExtremes( QgsVectorLayer &layer, const ResultStyle & )
  {
    auto *root = new Rule( nullptr );
    root->appendChild( place( word::HIGHEST, false, Text::tr( "highest pressure of a pressure zone" ) ) );
    root->appendChild( place( word::LOWEST, false, Text::tr( "lowest pressure of a pressure zone" ) ) );
    root->appendChild( place( word::HIGHEST, true, Text::tr( "highest pressure of a stretch" ) ) );
    root->appendChild( place( word::LOWEST, true, Text::tr( "lowest pressure of a stretch" ) ) );
    layer.setRenderer( new QgsRuleBasedRenderer( root ) );
    labelPoints( layer, QStringLiteral( "CASE WHEN \"stretch\" IS NOT NULL THEN \"label\" END" ) );
  }

} // namespace stillhead
