// SPDX-License-Identifier: GPL-2.0-or-later
// Pipe by pressure: a casing coloured and widened by band under the pipe line, states by pattern. Rules are drawn in
// passes (edges, casings, hatch, pipe lines, marks), so no casing ever covers a pipe line. The legend has every band,
// and of the states those that the layer holds.
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/styles/labels.h"
#include "processing/styles/palette.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgsmarkersymbollayer.h>
#include <qgsproperty.h>
#include <qgsrulebasedrenderer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    using Rule = QgsRuleBasedRenderer::Rule;

    constexpr double EDGE_MM = 0.15;
    constexpr double MAINLINE_MM = 0.6;
    constexpr double LATERAL_MM = 0.25;
    constexpr double STATE_CASING_MM = 2.0; //!< of the states that wear no band
    constexpr double DASH_MM = 2.6;
    constexpr double GAP_MM = 1.3;
    constexpr double TRIANGLE_MM = 2.6;

    //! An expression that picks from \a values by the band of the piece.
    QString byBand( const QStringList &values )
    {
      return QStringLiteral( "array_get( array( %1 ), coalesce( \"band\", 0 ) )" )
        .arg( values.join( QLatin1String( ", " ) ) );
    }

    QString colorByBand( const QVector<QColor> &colors )
    {
      QStringList names;
      for ( const QColor &color : colors )
        names << QStringLiteral( "'%1'" ).arg( color.name() );
      return byBand( names );
    }

    QString pipeColorByBand( const QVector<QColor> &colors )
    {
      QVector<QColor> onCasing;
      for ( const QColor &color : colors )
        onCasing << pipeColorOn( color );
      return colorByBand( onCasing );
    }

    QString widthByBand( const QVector<double> &widths, double extra )
    {
      QStringList numbers;
      for ( double width : widths )
        numbers << QString::number( width + extra );
      return byBand( numbers );
    }

    QString roleWidth()
    {
      return QStringLiteral( "CASE WHEN \"role\" = 'mainline' THEN %1 ELSE %2 END" )
        .arg( MAINLINE_MM )
        .arg( LATERAL_MM );
    }

    void setExpression( QgsSymbolLayer &layer, compat::SymbolProperty property, const QString &expression )
    {
      layer.setDataDefinedProperty( property, QgsProperty::fromExpression( expression ) );
    }

    //! A casing and its edge as two symbol layers.
    QList<QgsSymbolLayer *> casing( const QColor &color, double widthMm )
    {
      return { lineLayer( edgeColor(), widthMm + 2.0 * EDGE_MM, Pass::Edge ),
        lineLayer( color, widthMm, Pass::Casing ) };
    }

    Rule *rule( std::unique_ptr<QgsSymbol> symbol, const QString &filter, const QString &label )
    {
      return new Rule( symbol.release(), 0, 0, filter, label );
    }

    Rule *group( const QString &label )
    {
      return new Rule( nullptr, 0, 0, QString(), label );
    }

    Rule *bandRules( const ResultStyle &style )
    {
      const QVector<QColor> colors = bandColors( style.bandCount() );
      const QVector<double> widths = casingWidths( style.bandCount() );
      Rule *bands = group( Text::tr( "Pressure at rest, high case" ) );
      for ( int band = 0; band < style.bandCount(); ++band )
      {
        const QString filter = QStringLiteral( "\"band\" = %1 AND \"state\" IN "
                                               "( 'within limits', 'over limit', 'over and under' )" )
                                 .arg( band );
        bands->appendChild(
          rule( lineSymbol( casing( colors.at( band ), widths.at( band ) ) ), filter, bandText( band, style ) ) );
      }
      return bands;
    }

    Rule *pipeRule( const ResultStyle &style, const QString &role, double widthMm, const QString &label )
    {
      QgsSimpleLineSymbolLayer *pipe = lineLayer( Qt::black, widthMm, Pass::Pipe );
      setExpression( *pipe, compat::Symbol::StrokeColor,
        QStringLiteral( "CASE WHEN \"state\" IN ( 'above static level', 'past a summit' ) THEN '#000000' ELSE %1 END" )
          .arg( pipeColorByBand( bandColors( style.bandCount() ) ) ) );
      return rule( lineSymbol( { pipe } ),
        QStringLiteral( "\"role\" = '%1' AND \"state\" NOT IN ( 'no source', 'no terrain' )" ).arg( role ), label );
    }

    QgsSymbolLayer *triangles( bool up, double offsetMm )
    {
      QgsSimpleMarkerSymbolLayer *triangle =
        shapeLayer( compat::MarkerShape::EquilateralTriangle, TRIANGLE_MM, Qt::white, Qt::black, 0.3 );
      triangle->setAngle( up ? 0.0 : 180.0 );
      Spacing spacing;
      spacing.offsetMm = offsetMm;
      return markersAlong( markerSymbol( { triangle } ), spacing );
    }

    std::unique_ptr<QgsSymbol> underLimitSymbol( const ResultStyle &style )
    {
      const QVector<QColor> colors = bandColors( style.bandCount() );
      const QVector<double> widths = casingWidths( style.bandCount() );
      QgsSimpleLineSymbolLayer *edge = lineLayer( edgeColor(), widths.first() + 2.0 * EDGE_MM, Pass::Edge );
      setDashes( *edge, DASH_MM, GAP_MM, EDGE_MM );
      setExpression( *edge, compat::Symbol::StrokeWidth, widthByBand( widths, 2.0 * EDGE_MM ) );
      QgsSimpleLineSymbolLayer *dash = lineLayer( colors.first(), widths.first(), Pass::Casing );
      setDashes( *dash, DASH_MM, GAP_MM );
      setExpression( *dash, compat::Symbol::StrokeColor, colorByBand( colors ) );
      setExpression( *dash, compat::Symbol::StrokeWidth, widthByBand( widths, 0.0 ) );
      return lineSymbol( { edge, dash, triangles( false, 4.0 ) } );
    }

    std::unique_ptr<QgsSymbol> aboveStaticLevelSymbol()
    {
      QList<QgsSymbolLayer *> layers = casing( Qt::black, STATE_CASING_MM );
      layers << strokesAcross(
        lineSymbol( { lineLayer( Qt::white, 1.0, Pass::Hatch ) } ), STATE_CASING_MM, 2.4, 0.0, Pass::Hatch );
      return lineSymbol( layers );
    }

    std::unique_ptr<QgsSymbol> pastASummitSymbol()
    {
      Spacing spacing;
      spacing.intervalMm = 3.2;
      spacing.offsetMm = 1.6;
      spacing.turned = true;
      QgsSimpleMarkerSymbolLayer *tie = shapeLayer( compat::MarkerShape::Square, 1.6, Qt::white, Qt::black, 0.25 );
      return lineSymbol( { markersAlong( markerSymbol( { tie } ), spacing ) } );
    }

    std::unique_ptr<QgsSymbol> noTerrainSymbol()
    {
      QgsSimpleLineSymbolLayer *dots = lineLayer( QColor( 0x60, 0x60, 0x60 ), MAINLINE_MM, Pass::Pipe );
      dots->setUseCustomDashPattern( true );
      dots->setCustomDashVector( { 0.5, 0.9 } );
      setExpression( *dots, compat::Symbol::StrokeWidth, roleWidth() );
      auto *question = new QgsFontMarkerSymbolLayer(
        QStringLiteral( "DejaVu Sans" ), QStringLiteral( "?" ), 3.2, QColor( 0x40, 0x40, 0x40 ) );
      question->setStrokeColor( Qt::white );
      QgsSimpleMarkerSymbolLayer *ground = shapeLayer( compat::MarkerShape::Circle, 3.6, Qt::white, Qt::transparent );
      return lineSymbol( { dots, markersAlong( markerSymbol( { ground, question } ), Spacing() ) } );
    }

    std::unique_ptr<QgsSymbol> noSourceSymbol()
    {
      QgsSimpleLineSymbolLayer *line = lineLayer( QColor( 0x60, 0x60, 0x60 ), MAINLINE_MM, Pass::Pipe );
      line->setUseCustomDashPattern( true );
      line->setCustomDashVector( { 3.0, 0.9, 0.7, 0.9 } );
      setExpression( *line, compat::Symbol::StrokeWidth, roleWidth() + QStringLiteral( " + 0.3" ) );
      return lineSymbol( { line } );
    }

    std::unique_ptr<QgsSymbol> closeCallSymbol( const ResultStyle &style )
    {
      QgsSimpleLineSymbolLayer *stroke = lineLayer( Qt::black, 0.25, Pass::Hatch );
      setExpression( *stroke, compat::Symbol::StrokeColor, pipeColorByBand( bandColors( style.bandCount() ) ) );
      return lineSymbol( { strokesAcross(
        lineSymbol( { stroke } ), 1.4 * casingWidths( style.bandCount() ).last(), 1.6, 45.0, Pass::Hatch ) } );
    }

    QString limitsText( double limit, double lateralLimit, const ResultStyle &style )
    {
      const QString both = QStringLiteral( "%1 %2" ).arg( plainNumber( limit ), style.pressureUnit );
      if ( limit == lateralLimit )
        return both;
      return Text::tr( "%1, laterals %2" ).arg( both, plainNumber( lateralLimit ) );
    }

    //! The rules of the states that \a present names.
    Rule *stateRules( const ResultStyle &style, const QStringList &present )
    {
      Rule *states = group( Text::tr( "Look here" ) );
      const auto add = [states, &present](
                         const QString &state, std::unique_ptr<QgsSymbol> symbol, const QString &label ) {
        if ( present.contains( state ) )
          states->appendChild( rule( std::move( symbol ), QStringLiteral( "\"state\" = '%1'" ).arg( state ), label ) );
      };
      add( QStringLiteral( "over limit" ), lineSymbol( { triangles( true, 4.0 ) } ),
        Text::tr( "over limit: more than %1 (high case)" ).arg( limitsText( style.most, style.lateralMost, style ) ) );
      add( QStringLiteral( "over and under" ), lineSymbol( { triangles( true, 3.0 ), triangles( false, 6.0 ) } ),
        Text::tr( "over limit in the high case and under it in the low case" ) );
      add( QStringLiteral( "under limit" ), underLimitSymbol( style ),
        Text::tr( "under limit: less than %1 (low case)" )
          .arg( limitsText( style.least, style.lateralLeast, style ) ) );
      add( QStringLiteral( "above static level" ), aboveStaticLevelSymbol(),
        Text::tr( "above static level: no water at rest (low case)" ) );
      add( QStringLiteral( "past a summit" ), pastASummitSymbol(),
        Text::tr( "past a summit: no water at rest (low case)" ) );
      add( QStringLiteral( "no terrain" ), noTerrainSymbol(), Text::tr( "no terrain: no figure" ) );
      add( QStringLiteral( "no source" ), noSourceSymbol(), Text::tr( "no source: joined to none" ) );
      return states;
    }

    QStringList statesIn( const QgsVectorLayer &layer )
    {
      QStringList states;
      const QSet<QVariant> values = layer.uniqueValues( layer.fields().lookupField( field::STATE ) );
      for ( const QVariant &value : values )
        states << value.toString();
      return states;
    }

  } // namespace

  void styleSpans( QgsVectorLayer &layer, const ResultStyle &style )
  {
    auto *root = new Rule( nullptr );
    root->appendChild( bandRules( style ) );
    Rule *pipes = group( Text::tr( "Pipe" ) );
    pipes->appendChild( pipeRule( style, QStringLiteral( "mainline" ), MAINLINE_MM, Text::tr( "mainline" ) ) );
    pipes->appendChild(
      pipeRule( style, QStringLiteral( "lateral" ), LATERAL_MM, Text::tr( "lateral (valve open, nothing running)" ) ) );
    root->appendChild( pipes );
    Rule *states = stateRules( style, statesIn( layer ) );
    states->appendChild( rule( closeCallSymbol( style ), QStringLiteral( "\"close_call\" = true" ),
      Text::tr( "too close to call: the limit lies within the doubt" ) ) );
    root->appendChild( states );
    root->appendChild( group( legendCaution() ) );

    auto *renderer = new QgsRuleBasedRenderer( root );
    renderer->setUsingSymbolLevels( true );
    layer.setRenderer( renderer );
    keepLabelsOff( layer );
  }

} // namespace stillhead
