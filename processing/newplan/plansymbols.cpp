// SPDX-License-Identifier: GPL-2.0-or-later
// Drawn pipe is plain and dark, so that the colours of pressure bands stand out beside it; devices tell apart by shape.
#include "processing/newplan/planform.h"
#include "processing/styles/symbols.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgssinglesymbolrenderer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    const QColor PIPE( 0x30, 0x30, 0x30 );
    constexpr double MAINLINE_MM = 0.6;
    constexpr double LATERAL_MM = 0.3;

    std::unique_ptr<QgsLineSymbol> pipeSymbol( PlanLayerKind kind )
    {
      const bool isMainline = kind == PlanLayerKind::Mainlines;
      QgsSimpleLineSymbolLayer *line = lineLayer( PIPE, isMainline ? MAINLINE_MM : LATERAL_MM, Pass::Pipe );
      if ( !isMainline )
        setDashes( *line, 2.4, 0.8 );
      return lineSymbol( { line } );
    }

    //! As the source node of results: a circle with a cross.
    std::unique_ptr<QgsMarkerSymbol> sourceSymbol()
    {
      return markerSymbol( { shapeLayer( compat::MarkerShape::Circle, 4.6, Qt::white, Qt::black, 0.5 ),
        shapeLayer( compat::MarkerShape::Cross, 4.6, Qt::white, Qt::black, 0.5 ) } );
    }

    compat::MarkerShape shapeOf( const QString &kind )
    {
      if ( kind == QLatin1String( "regulator" ) )
        return compat::MarkerShape::Diamond;
      if ( kind == QLatin1String( "booster" ) )
        return compat::MarkerShape::Triangle;
      if ( kind == QLatin1String( "check valve" ) )
        return compat::MarkerShape::SemiCircle;
      if ( kind == QLatin1String( "closed valve" ) )
        return compat::MarkerShape::Cross2;
      return compat::MarkerShape::Square;
    }

    QgsCategoryList deviceCategories( const PlanField &kind )
    {
      QgsCategoryList categories;
      for ( const PlanChoice &choice : kind.choices )
      {
        QgsSimpleMarkerSymbolLayer *shape = shapeLayer( shapeOf( choice.word ), 3.4, Qt::white, Qt::black, 0.5 );
        categories << QgsRendererCategory( choice.word, markerSymbol( { shape } ).release(), choice.label );
      }
      return categories;
    }

    QgsFeatureRenderer *deviceRenderer( const PlanLayer &plan )
    {
      QgsCategoryList categories;
      for ( const PlanField &field : plan.fields )
      {
        if ( field.name == QLatin1String( "kind" ) )
          categories = deviceCategories( field );
      }
      return new QgsCategorizedSymbolRenderer( QStringLiteral( "kind" ), categories );
    }

  } // namespace

  void setPlanSymbols( QgsVectorLayer &layer, const PlanLayer &plan )
  {
    switch ( plan.kind )
    {
    case PlanLayerKind::Mainlines:
    case PlanLayerKind::Laterals:
      layer.setRenderer( new QgsSingleSymbolRenderer( pipeSymbol( plan.kind ).release() ) );
      break;
    case PlanLayerKind::Sources:
      layer.setRenderer( new QgsSingleSymbolRenderer( sourceSymbol().release() ) );
      break;
    case PlanLayerKind::Devices:
      layer.setRenderer( deviceRenderer( plan ) );
      break;
    }
  }

} // namespace stillhead
