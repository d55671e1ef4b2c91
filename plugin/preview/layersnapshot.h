// SPDX-License-Identifier: GPL-2.0-or-later
// A layer as it stands at one moment, edits not yet saved included, that another thread can read while the user goes on
// drawing.
#pragma once

#include "plugin/preview/previewinput.h"
#include "processing/qgiscompat.h"

#include <qgsfeaturesource.h>
#include <qgsvectorlayerfeatureiterator.h>

namespace stillhead
{

  class LayerSnapshot : public QgsFeatureSource
  {
    public:
      //! Made in the main thread, of a valid layer.
      explicit LayerSnapshot( const QgsVectorLayer &layer );

      QgsFeatureIterator getFeatures( const QgsFeatureRequest &request ) const override;
      QString sourceName() const override { return mName; }
      QgsCoordinateReferenceSystem sourceCrs() const override { return mCrs; }
      QgsFields fields() const override { return mSource->fields(); }
      compat::WkbType wkbType() const override { return mType; }
      long long featureCount() const override { return mCount; }

    private:
      QString mName;
      QgsCoordinateReferenceSystem mCrs;
      compat::WkbType mType;
      long long mCount;
      std::unique_ptr<QgsVectorLayerFeatureSource> mSource;
  };

  //! A sketched line as a layer of one feature without fields.
  std::unique_ptr<QgsFeatureSource> sketchSource( const SketchedLine &sketch );

} // namespace stillhead
