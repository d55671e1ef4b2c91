// SPDX-License-Identifier: GPL-2.0-or-later
// Styles a result when the application loads it after a run.
#pragma once

#include "processing/styles/resultstyle.h"

#include <qgsprocessingcontext.h>

namespace stillhead
{

  class ResultStyler : public QgsProcessingLayerPostProcessorInterface
  {
    public:
      ResultStyler( ResultLayer what, const ResultStyle &style );

      void postProcessLayer(
        QgsMapLayer *layer, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;

      /**
       * Has the layer \a destination (the id or source that a sink gave back) styled when it is loaded, if it is to be loaded at all.
       */
      static void attach(
        QgsProcessingContext &context, const QString &destination, ResultLayer what, const ResultStyle &style );

    private:
      ResultLayer mWhat;
      ResultStyle mStyle;
  };

} // namespace stillhead
