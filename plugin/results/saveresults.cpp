// SPDX-License-Identifier: GPL-2.0-or-later
// A run replaces the layers of an earlier one in the file; layers of the project that show them follow by themselves.
#include "plugin/results/saveresults.h"

#include "processing/parameternames.h"

#include <qgsapplication.h>
#include <qgslayertree.h>
#include <qgsprocessingalgrunnertask.h>
#include <qgsprocessingcontext.h>
#include <qgsprocessingfeedback.h>
#include <qgsprocessingregistry.h>
#include <qgsproject.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    //! The layers that are saved, from the top of the map down.
    const QStringList &savedOutputs()
    {
      static const QStringList outputs { output::EXTREMES, output::FINDINGS, output::NODES, output::STRETCHES,
        output::SPANS };
      return outputs;
    }

    const QgsProcessingAlgorithm *mainAlgorithm()
    {
      return QgsApplication::processingRegistry()->algorithmById(
        QStringLiteral( "stillhead:" ) + algorithm::STATIC_PRESSURE );
    }

    //! Lets the layers of \a project that show \a source read it again. \returns false where none shows it
    bool reloadLayers( const QgsProject &project, const QString &source )
    {
      bool isShown = false;
      for ( QgsMapLayer *layer : project.mapLayers() )
      {
        if ( layer->source() != source )
          continue;
        layer->reload();
        layer->triggerRepaint();
        isShown = true;
      }
      return isShown;
    }

  } // namespace

  //! What a run of the algorithm works in.
  class SaveResults::Run
  {
    public:
      //! Keeps the sentence of a failure.
      class Log : public QgsProcessingFeedback
      {
        public:
          Log()
            : QgsProcessingFeedback( false )
          {
          }
          void reportError( const QString &error, bool ) override { problem = error; }
          QString problem;
      };

      QgsProcessingContext context;
      Log log;
  };

  SaveResults::SaveResults( const PreviewInput &input, const QString &path, QgsProject *project, QObject *parent )
    : QObject( parent )
    , mPath( path )
    , mProject( project )
    , mRun( std::make_shared<Run>() )
  {
    mRun->context.setProject( project );
    mRun->context.setFeedback( &mRun->log );
    QVariantMap parameters = input.algorithmParameters();
    for ( const QString &name : savedOutputs() )
      parameters.insert( name, QStringLiteral( "ogr:dbname='%1' table=\"%2\" (geom)" ).arg( path, name.toLower() ) );
    auto *task = new QgsProcessingAlgRunnerTask( mainAlgorithm(), parameters, mRun->context, &mRun->log );
    // The task may outlive this object, and needs context and feedback to its end.
    connect( task, &QObject::destroyed, [run = mRun] { static_cast<void>( run ); } );
    connect( task, &QgsProcessingAlgRunnerTask::executed, this, &SaveResults::finish );
    QgsApplication::taskManager()->addTask( task );
  }

  void SaveResults::finish( bool succeeded, const QVariantMap &results )
  {
    if ( succeeded )
      load( results );
    emit done( mPath, succeeded ? QString() : mRun->log.problem );
    deleteLater();
  }

  void SaveResults::load( const QVariantMap &results )
  {
    QgsLayerTreeGroup *group = nullptr;
    for ( const QString &name : savedOutputs() )
    {
      const QString source = results.value( name ).toString();
      if ( reloadLayers( *mProject, source ) )
        continue;
      const QString title = mainAlgorithm()->parameterDefinition( name )->description();
      auto layer = std::make_unique<QgsVectorLayer>( source, title, QStringLiteral( "ogr" ) );
      if ( !layer->isValid() )
        continue;
      if ( !group )
        group = mProject->layerTreeRoot()->insertGroup( 0, tr( "Pressure at rest" ) );
      group->addLayer( mProject->addMapLayer( layer.release(), false ) );
    }
  }

} // namespace stillhead
