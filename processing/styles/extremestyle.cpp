// SPDX-License-Identifier: GPL-2.0-or-later
// Worst places: triangles that point up where pressure is highest, down where it is lowest; full and labelled for a
// stretch, hollow and small for a pressure zone, whose extremes are often the same places. Summits and sags: a dome that
// stands on the pipe, a bowl that hangs from it, small and below all others, with labels on large maps where there is room.
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

    //! Smaller maps show a summit or sag without its label.
    constexpr double LABELS_FROM_SCALE = 1500.0;

    using Rule = QgsRuleBasedRenderer::Rule;

    //! What lies over what, lowest first.
    enum Level
    {
      HALF_DISC,
      OF_ZONE,
      OF_STRETCH
    };

    Rule *place( const QString &what, bool ofStretch, const QString &label )
    {
      QgsSimpleMarkerSymbolLayer *triangle = shapeLayer( compat::MarkerShape::EquilateralTriangle,
        ofStretch ? 4.2 : 2.6, ofStretch ? QColor( Qt::black ) : QColor( Qt::white ),
        ofStretch ? QColor( Qt::white ) : QColor( Qt::black ), 0.4 );
      triangle->setRenderingPass( ofStretch ? OF_STRETCH : OF_ZONE );
      triangle->setAngle( what == word::HIGHEST ? 0.0 : 180.0 );
      const QString filter = QStringLiteral( "\"what\" = '%1' AND \"stretch\" IS %2NULL" )
                               .arg( what, ofStretch ? QStringLiteral( "NOT " ) : QString() );
      return new Rule( markerSymbol( { triangle } ).release(), 0, 0, filter, label );
    }

    //! A half disc beside its place: the round side up for a summit, down for a sag, which is filled as it holds water.
    Rule *halfDisc( const QString &what, const QString &label )
    {
      const bool isSummit = what == word::SUMMIT;
      QgsSimpleMarkerSymbolLayer *disc = shapeLayer( compat::MarkerShape::SemiCircle, 3.0,
        isSummit ? QColor( Qt::white ) : QColor( 0x60, 0x60, 0x60 ), QColor( Qt::black ), 0.3 );
      disc->setRenderingPass( HALF_DISC );
      disc->setAngle( isSummit ? 0.0 : 180.0 );
      // Offsets turn with the symbol: both move off the pipe, each to its own side.
      disc->setOffset( QPointF( 0.0, -1.0 ) );
      const QString filter = QStringLiteral( "\"what\" = '%1'" ).arg( what );
      return new Rule( markerSymbol( { disc } ).release(), 0, 0, filter, label );
    }

  } // namespace

  void styleExtremes( QgsVectorLayer &layer, const ResultStyle & )
  {
    auto *root = new Rule( nullptr );
    root->appendChild( place( word::HIGHEST, true, Text::tr( "highest pressure of a stretch" ) ) );
    root->appendChild( place( word::LOWEST, true, Text::tr( "lowest pressure of a stretch" ) ) );
    root->appendChild( place( word::HIGHEST, false, Text::tr( "highest pressure of a pressure zone" ) ) );
    root->appendChild( place( word::LOWEST, false, Text::tr( "lowest pressure of a pressure zone" ) ) );
    root->appendChild( halfDisc( word::SUMMIT, Text::tr( "summit of a mainline: place for an air valve" ) ) );
    root->appendChild( halfDisc( word::SAG, Text::tr( "sag of a mainline: place for a drain or blow-out" ) ) );
    auto *renderer = new QgsRuleBasedRenderer( root );
    renderer->setUsingSymbolLevels( true );
    layer.setRenderer( renderer );
    labelPoints( layer, { QStringLiteral( "\"stretch\" IS NOT NULL" ), QStringLiteral( "\"label\"" ) },
      { QStringLiteral( "\"what\" IN ( '%1', '%2' )" ).arg( word::SUMMIT, word::SAG ), QStringLiteral( "\"label\"" ) },
      LABELS_FROM_SCALE );
  }

} // namespace stillhead
