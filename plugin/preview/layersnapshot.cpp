// SPDX-License-Identifier: GPL-2.0-or-later
// QGIS's own snapshot of a layer, with what a feature source has to say about itself.
#include "plugin/preview/layersnapshot.h"

#include <qgsfeatureiterator.h>

namespace stillhead
{

  namespace
  {

    class SketchSource : public QgsFeatureSource
    {
      public:
        explicit SketchSource( const SketchedLine &sketch )
          : mCrs( sketch.crs )
          , mType( sketch.geometry.wkbType() )
        {
          QgsFeature feature( 0 );
          feature.setGeometry( sketch.geometry );
          feature.setValid( true );
          mFeatures << feature;
        }

        QgsFeatureIterator getFeatures( const QgsFeatureRequest &request ) const override
        {
          return QgsFeatureIterator( new Iterator( mFeatures, request ) );
        }
        QString sourceName() const override { return QStringLiteral( "sketch" ); }
        QgsCoordinateReferenceSystem sourceCrs() const override { return mCrs; }
        QgsFields fields() const override { return QgsFields(); }
        compat::WkbType wkbType() const override { return mType; }
        long long featureCount() const override { return mFeatures.size(); }

      private:
        class Iterator : public QgsAbstractFeatureIterator
        {
          public:
            Iterator( const QgsFeatureList &features, const QgsFeatureRequest &request )
              : QgsAbstractFeatureIterator( request )
              , mFeatures( features )
            {
            }
            bool rewind() override
            {
              mNext = 0;
              return true;
            }
            bool close() override
            {
              mClosed = true;
              return true;
            }

          protected:
            bool fetchFeature( QgsFeature &feature ) override
            {
              if ( mNext >= mFeatures.size() )
                return false;
              feature = mFeatures.at( mNext++ );
              return true;
            }

          private:
            QgsFeatureList mFeatures;
            int mNext = 0;
        };

        QgsCoordinateReferenceSystem mCrs;
        compat::WkbType mType;
        QgsFeatureList mFeatures;
    };

  } // namespace

  LayerSnapshot::LayerSnapshot( const QgsVectorLayer &layer )
    : mName( layer.name() )
    , mCrs( layer.crs() )
    , mType( layer.wkbType() )
    , mCount( layer.featureCount() )
    , mSource( std::make_unique<QgsVectorLayerFeatureSource>( &layer ) )
  {
  }

  QgsFeatureIterator LayerSnapshot::getFeatures( const QgsFeatureRequest &request ) const
  {
    return mSource->getFeatures( request );
  }

  std::unique_ptr<QgsFeatureSource> sketchSource( const SketchedLine &sketch )
  {
    return std::make_unique<SketchSource>( sketch );
  }

} // namespace stillhead
