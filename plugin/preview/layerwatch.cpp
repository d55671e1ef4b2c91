// SPDX-License-Identifier: GPL-2.0-or-later
// The edit buffer's signals speak for drawing, undo and redo alike.
#include "plugin/preview/layerwatch.h"

namespace stillhead
{

  void LayerWatch::watchAny( QgsMapLayer *layer )
  {
    connect( layer, &QgsMapLayer::crsChanged, this, &LayerWatch::changed );
    connect( layer, &QgsMapLayer::dataSourceChanged, this, &LayerWatch::changed );
    connect( layer, &QgsMapLayer::dataChanged, this, &LayerWatch::changed );
    connect( layer, &QObject::destroyed, this, &LayerWatch::changed );
    mLayers << layer;
  }

  void LayerWatch::watch( const QVector<QgsVectorLayer *> &drawn, QgsRasterLayer *terrain )
  {
    for ( const QPointer<QgsMapLayer> &layer : std::as_const( mLayers ) )
    {
      if ( layer )
        layer->disconnect( this );
    }
    mLayers.clear();
    if ( terrain )
      watchAny( terrain );
    for ( QgsVectorLayer *layer : drawn )
    {
      if ( !layer )
        continue;
      watchAny( layer );
      connect( layer, &QgsVectorLayer::featureAdded, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::featuresDeleted, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::geometryChanged, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::attributeValueChanged, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::updatedFields, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::subsetStringChanged, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::afterCommitChanges, this, &LayerWatch::changed );
      connect( layer, &QgsVectorLayer::afterRollBack, this, &LayerWatch::changed );
    }
  }

} // namespace stillhead
