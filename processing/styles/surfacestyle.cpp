// SPDX-License-Identifier: GPL-2.0-or-later
// The pressure surface and its areas in the colours of the bands; ground above the static level stays white, as water
// at rest does not stand there.
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/styles/palette.h"
#include "processing/styles/resultstyle.h"
#include "processing/text/text.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgscolorrampshader.h>
#include <qgsfillsymbol.h>
#include <qgsfillsymbollayer.h>
#include <qgsrasterlayer.h>
#include <qgsrastershader.h>
#include <qgssinglebandpseudocolorrenderer.h>
#include <qgsvectorlayer.h>

#include <cmath>
#include <limits>

namespace stillhead
{

  namespace
  {

    //! Half of it lets contours and paths below show through.
    constexpr double SURFACE_OPACITY = 0.6;

  } // namespace

  void styleSurface( QgsRasterLayer &layer, const ResultStyle &style )
  {
    const QVector<QColor> colors = bandColors( style.bandCount() );
    // A discrete class takes the values up to and with its own; a limit itself belongs to the band above.
    const auto upTo = []( double limit ) { return std::nextafter( limit, -std::numeric_limits<double>::infinity() ); };
    QList<QgsColorRampShader::ColorRampItem> items;
    items << QgsColorRampShader::ColorRampItem(
      upTo( 0.0 ), QColor( Qt::white ), Text::tr( "above static level: water at rest does not stand here" ) );
    for ( int band = 0; band < style.bandCount(); ++band )
    {
      const double top =
        band < style.bandLimits.size() ? upTo( style.bandLimits.at( band ) ) : std::numeric_limits<double>::infinity();
      if ( top > 0.0 )
        items << QgsColorRampShader::ColorRampItem( top, colors.at( band ), bandText( band, style ) );
    }

    auto *function = new QgsColorRampShader();
    function->setColorRampType( compat::Shader::Discrete );
    function->setColorRampItemList( items );
    auto *shader = new QgsRasterShader();
    shader->setRasterShaderFunction( function );
    auto *renderer = new QgsSingleBandPseudoColorRenderer( layer.dataProvider(), 1, shader );
    renderer->setOpacity( SURFACE_OPACITY );
    layer.setRenderer( renderer );
  }

  void styleBandAreas( QgsVectorLayer &layer, const ResultStyle &style )
  {
    const QVector<QColor> colors = bandColors( style.bandCount() );
    QgsCategoryList categories;
    for ( int band = 0; band < style.bandCount(); ++band )
    {
      auto *fill = new QgsSimpleFillSymbolLayer( colors.at( band ) );
      fill->setStrokeColor( edgeColor() );
      fill->setStrokeWidth( 0.15 );
      categories << QgsRendererCategory( band, new QgsFillSymbol( { fill } ), bandText( band, style ) );
    }
    layer.setRenderer( new QgsCategorizedSymbolRenderer( field::BAND, categories ) );
    layer.setOpacity( SURFACE_OPACITY );
  }

} // namespace stillhead
