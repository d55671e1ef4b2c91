// SPDX-License-Identifier: GPL-2.0-or-later
// Carries the style as plain data from the worker thread; symbols are made on the main thread, where the layer is.
#include "processing/styles/resultstyler.h"

#include <qgsmaplayer.h>

namespace stillhead
{

  ResultStyler::ResultStyler( ResultLayer what, const ResultStyle &style )
    : mWhat( what )
    , mStyle( style )
  {
  }

  void ResultStyler::postProcessLayer( QgsMapLayer *layer, QgsProcessingContext &, QgsProcessingFeedback * )
  {
    if ( !layer )
      return;
    styleResult( *layer, mWhat, mStyle );
    layer->triggerRepaint();
  }

  void ResultStyler::attach(
    QgsProcessingContext &context, const QString &destination, ResultLayer what, const ResultStyle &style )
  {
    if ( !context.willLoadLayerOnCompletion( destination ) )
      return;
    context.layerToLoadOnCompletionDetails( destination ).setPostProcessor( new ResultStyler( what, style ) );
  }

} // namespace stillhead
