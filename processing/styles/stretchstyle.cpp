// SPDX-License-Identifier: GPL-2.0-or-later
// Stretches as outlines around their pipe: full where it is over, dashed where it is short. No fill, for the colour
// belongs to the pipe.
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/styles/palette.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgsfillsymbol.h>
#include <qgslinesymbollayer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    //! An outline that stands off the casing, so that both can be read.
    QgsFillSymbol *outline( bool dashed )
    {
      auto *line = new QgsSimpleLineSymbolLayer( edgeColor(), 0.3 );
      line->setOffset( -0.8 );
      if ( dashed )
      {
        line->setUseCustomDashPattern( true );
        line->setCustomDashVector( { 1.6, 1.0 } );
      }
      return new QgsFillSymbol( { line } );
    }

  } // namespace

  void styleStretches( QgsVectorLayer &layer, const ResultStyle &style )
  {
    QgsCategoryList categories;
    categories
      << QgsRendererCategory( word::STRETCH_OVER, outline( false ),
           Text::tr( "stretch over %1 %2 (high case)" ).arg( plainNumber( style.most ), style.pressureUnit ) )
      << QgsRendererCategory( word::STRETCH_SHORT, outline( true ),
           Text::tr( "stretch short of %1 %2 (low case)" ).arg( plainNumber( style.least ), style.pressureUnit ) );
    layer.setRenderer( new QgsCategorizedSymbolRenderer( field::WHAT, categories ) );
  }

} // namespace stillhead
