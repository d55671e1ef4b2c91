// SPDX-License-Identifier: GPL-2.0-or-later
// Inside a model, where layers and numbers of one step feed the next, and in a background task, as the desktop runs it:
// prepared in the main thread, computed in another, its layers then loaded and styled in the main thread.
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgsprocessingalgrunnertask.h>
#include <qgsprocessingmodelalgorithm.h>
#include <qgsprocessingmodelchildalgorithm.h>
#include <qgsprocessingmodelchildparametersource.h>
#include <qgsprocessingmodeloutput.h>
#include <qgsrenderer.h>
#include <qgstaskmanager.h>

using namespace stillhead::test;

namespace
{

  using Child = QgsProcessingModelChildAlgorithm;
  using From = QgsProcessingModelChildParameterSource;

  void give( Child &child, const QString &parameter, const From &source )
  {
    child.addParameterSources( parameter, { source } );
  }

  void keep( Child &child, const QString &output, const QString &name )
  {
    QgsProcessingModelOutput kept( name );
    kept.setChildId( child.childId() );
    kept.setChildOutputName( output );
    child.setModelOutputs( { { name, kept } } );
  }

} // namespace

class TestModel : public QObject
{
    Q_OBJECT

  private slots:
    void stepsFeedEachOther();
    void inABackgroundTask();

  private:
    Slope mSlope;
};

void TestModel::stepsFeedEachOther()
{
  // The highest pressure of a first run, in metres of water, is the level above ground of a second one.
  Child first( "stillhead:staticpressure" );
  first.setChildId( "first" );
  const QVariantMap parameters = mSlope.parameters();
  for ( auto parameter = parameters.constBegin(); parameter != parameters.constEnd(); ++parameter )
  {
    if ( parameter.value() != Slope::temporary() && parameter.key() != "MAINS" )
      give( first, parameter.key(), From::fromStaticValue( parameter.value() ) );
  }
  give( first, "MAINS", From::fromModelParameter( "pipe" ) );

  Child second = first;
  second.setChildId( "second" );
  give( second, "MAINS", From::fromChildOutput( "first", "SPANS" ) );
  give( second, "SOURCE_KIND", From::fromStaticValue( 2 ) );
  give( second, "SOURCE_VALUE", From::fromChildOutput( "first", "P_HIGHEST" ) );
  give( second, "SOURCE_LOW", From::fromExpression( "@first_P_HIGHEST - 10" ) );
  keep( second, "SPANS", "spans" );

  QgsProcessingModelAlgorithm model( "twice", "test" );
  model.addModelParameter(
    new QgsProcessingParameterFeatureSource( "pipe", "Pipe" ), QgsProcessingModelParameter( "pipe" ) );
  model.addChildAlgorithm( first );
  model.addChildAlgorithm( second );
  QString problem;
  QVERIFY2( model.canExecute( &problem ), qPrintable( problem ) );

  const LayerPointer mains = drawLayer( Slope::lines(), { { line( { { 0, 0 }, { 300, 0 } } ) } }, "pipe" );
  QgsProcessingContext context;
  context.setProject( QgsProject::instance() );
  Listener listener;
  context.setFeedback( &listener );
  bool ok = false;
  const QVariantMap results =
    model.run( { { "pipe", asParameter( mains ) }, { "second:spans", Slope::temporary() } }, context, &listener, &ok );
  QVERIFY2( ok, qPrintable( listener.errors.join( '\n' ) ) );

  const QVariantMap inner = results.value( "CHILD_RESULTS" ).toMap().value( "second" ).toMap();
  STILLHEAD_NEAR( inner.value( "STATIC_LEVEL_HIGH" ).toDouble(), 180.0, 1e-6 );
  STILLHEAD_NEAR( inner.value( "STATIC_LEVEL_LOW" ).toDouble(), 170.0, 1e-6 );
  // The fields of the first run's spans are drawn fields to the second, and give way.
  auto *spans = qobject_cast<QgsVectorLayer *>(
    QgsProcessingUtils::mapLayerFromString( results.value( "second:spans" ).toString(), context ) );
  QVERIFY( spans );
  QVERIFY( spans->fields().names().contains( "p_high_drawn" ) );
  QVERIFY( spans->featureCount() >= 3 );
}

void TestModel::inABackgroundTask()
{
  const std::unique_ptr<QgsProcessingAlgorithm> algorithm(
    QgsApplication::processingRegistry()->createAlgorithmById( "stillhead:staticpressure" ) );
  QgsProcessingContext context;
  context.setProject( QgsProject::instance() );
  Listener listener;
  const QString file = mSlope.path( "background.gpkg" );
  const QgsProcessingOutputLayerDefinition spans( file, QgsProject::instance() );
  const QVariantMap parameters = mSlope.parameters( { { "SPANS", QVariant::fromValue( spans ) } } );
  auto *task = new QgsProcessingAlgRunnerTask( algorithm.get(), parameters, context, &listener );
  bool finished = false;
  bool ok = false;
  QObject::connect( task, &QgsProcessingAlgRunnerTask::executed, task, [&]( bool successful, const QVariantMap & ) {
    finished = true;
    ok = successful;
  } );
  QgsApplication::taskManager()->addTask( task );
  QTRY_VERIFY_WITH_TIMEOUT( finished, 60000 );
  QVERIFY2( ok, qPrintable( listener.errors.join( '\n' ) ) );

  // What the desktop does with the result.
  const QString id = context.layersToLoadOnCompletion().firstKey();
  QVERIFY( id.contains( "background.gpkg" ) );
  QgsProcessingLayerPostProcessorInterface *finisher = context.layerToLoadOnCompletionDetails( id ).postProcessor();
  QVERIFY( finisher );
  QgsVectorLayer layer( id, "spans", "ogr", QgsVectorLayer::LayerOptions( false ) );
  QCOMPARE( layer.renderer()->type(), QString( "singleSymbol" ) );
  finisher->postProcessLayer( &layer, context, &listener );
  QCOMPARE( layer.renderer()->type(), QString( "RuleRenderer" ) );
  QVERIFY( layer.metadata().history().join( ' ' ).contains( "Made by Stillhead" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestModel>( argc, argv );
}
#include "testmodel.moc"
