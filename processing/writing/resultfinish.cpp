// SPDX-License-Identifier: GPL-2.0-or-later
// What cannot be stored is a warning: the figures are written already.
#include "processing/writing/resultfinish.h"

#include "processing/styles/resultstyler.h"
#include "processing/styles/storedstyle.h"
#include "processing/writing/geopackageextras.h"

#include <qgsmaplayer.h>
#include <qgsprocessingutils.h>
#include <qgsproviderregistry.h>
#include <qgsrasterlayer.h>

#include <QDir>
#include <QFileInfo>

#include <map>

namespace stillhead
{

  namespace
  {

    class Finisher : public ResultStyler
    {
      public:
        explicit Finisher( const WrittenLayer &written, const ResultStyle &style )
          : ResultStyler( written.what, style )
          , mMetadata( written.metadata )
        {
        }

        void postProcessLayer(
          QgsMapLayer *layer, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override
        {
          ResultStyler::postProcessLayer( layer, context, feedback );
          if ( layer )
            layer->setMetadata( mMetadata );
        }

      private:
        QgsLayerMetadata mMetadata;
    };

    //! A raster keeps style and metadata in files beside it, which the application reads by itself.
    void storeBeside( const WrittenLayer &written, const ResultStyle &style )
    {
      QgsRasterLayer layer( written.id );
      if ( !layer.isValid() )
        return;
      styleResult( layer, written.what, style );
      layer.setMetadata( written.metadata );
      const QFileInfo file( written.id );
      const QString base = file.dir().filePath( file.completeBaseName() );
      bool stored = false;
      layer.saveNamedStyle( base + QStringLiteral( ".qml" ), stored );
      layer.saveNamedMetadata( base + QStringLiteral( ".qmd" ), stored );
    }

  } // namespace

  QString layerNameOf( const QString &id )
  {
    const QVariantMap parts = QgsProviderRegistry::instance()->decodeUri( QStringLiteral( "ogr" ), id );
    const QString name = parts.value( QStringLiteral( "layerName" ) ).toString();
    return name.isEmpty() ? QFileInfo( id ).completeBaseName() : name;
  }

  void finishOnLoading( const WrittenLayer &layer, const ResultStyle &style, QgsProcessingContext &context )
  {
    if ( context.willLoadLayerOnCompletion( layer.id ) )
      context.layerToLoadOnCompletionDetails( layer.id ).setPostProcessor( new Finisher( layer, style ) );
  }

  void finishNow( const std::vector<WrittenLayer> &layers, const ResultStyle &style, QgsProcessingContext &context,
    QgsProcessingFeedback &feedback )
  {
    std::map<QString, std::vector<LayerExtras>> extras;
    for ( const WrittenLayer &written : layers )
    {
      if ( !written.geoPackage.isEmpty() )
        extras[written.geoPackage].push_back( { layerNameOf( written.id ),
          styleText( written.what, written.fields, written.type, written.legend, style ), written.metadata } );
    }
    for ( const auto &[path, ofLayers] : extras )
    {
      const QString error = storeExtras( path, ofLayers );
      if ( !error.isEmpty() )
        feedback.pushWarning( error );
    }
    for ( const WrittenLayer &written : layers )
    {
      if ( written.what == ResultLayer::Surface )
        storeBeside( written, style );
      if ( QgsMapLayer *layer = QgsProcessingUtils::mapLayerFromString( written.id, context, false ) )
        Finisher( written, style ).postProcessLayer( layer, context, &feedback );
    }
  }

} // namespace stillhead
