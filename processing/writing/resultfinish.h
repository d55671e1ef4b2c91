// SPDX-License-Identifier: GPL-2.0-or-later
// Gives written layers their style and metadata: in the file where a GeoPackage can keep them, in the layer where it is in
// memory, and in whatever layer the application loads at the end.
#pragma once

#include "processing/qgiscompat.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/storedstyle.h"

#include <qgsfields.h>
#include <qgslayermetadata.h>
#include <qgsprocessingcontext.h>
#include <qgsprocessingfeedback.h>

#include <vector>

namespace stillhead
{

  //! A layer that was written.
  struct WrittenLayer
  {
      QString id; //!< as results name it
      ResultLayer what = ResultLayer::Spans;
      QgsLayerMetadata metadata;
      QString geoPackage; //!< the file, which keeps style and metadata; blank where the layer is elsewhere
      QgsFields fields;
      LegendValues legend;
      compat::WkbType type = compat::WkbType::NoGeometry;
  };

  //! The name by which a file knows the layer \a id; a GeoPackage wants its layers' identifiers to differ.
  QString layerNameOf( const QString &id );

  //! Sees to it that the application styles \a layer when it loads it. Call it while the work is done.
  void finishOnLoading( const WrittenLayer &layer, const ResultStyle &style, QgsProcessingContext &context );

  //! Styles layers that are there already and stores style and metadata in GeoPackages. Call it in the main thread.
  void finishNow( const std::vector<WrittenLayer> &layers, const ResultStyle &style, QgsProcessingContext &context,
    QgsProcessingFeedback &feedback );

} // namespace stillhead
