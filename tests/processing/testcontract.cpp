// SPDX-License-Identifier: GPL-2.0-or-later
// The public contract as text: ids, parameters with type, default and flags, outputs, fields, states, finding codes.
// A difference from contract.txt is either a mistake or a decision to be written there too; the text that was found
// is left in the build folder.
#include "core/judgement/piece.h"
#include "core/plan/finding.h"
#include "processing/qgiscompat.h"
#include "tests/support/processingrun.h"

#include <qgsprocessingoutputs.h>

#include <QFile>

using namespace stillhead::test;
namespace compat = stillhead::compat;

namespace
{

  QString typeText( const QgsProcessingParameterDefinition &definition )
  {
    if ( const auto *choice = dynamic_cast<const QgsProcessingParameterEnum *>( &definition ) )
      return QString( "enum (%1)" ).arg( choice->options().join( " | " ) );
    if ( const auto *number = dynamic_cast<const QgsProcessingParameterNumber *>( &definition ) )
    {
      // No limits of the platform's own: its refusal would not be a clear sentence.
      const QgsProcessingParameterNumber free( "free", "free", number->dataType() );
      const bool unlimited = number->minimum() == free.minimum() && number->maximum() == free.maximum();
      return QString( "number%1%2" )
        .arg( definition.isDynamic() ? ", data-defined" : "", unlimited ? "" : ", limited" );
    }
    if ( const auto *source = dynamic_cast<const QgsProcessingParameterFeatureSource *>( &definition ) )
      return QString( "source of %1" ).arg( source->dataTypes().first() );
    if ( const auto *sink = dynamic_cast<const QgsProcessingParameterFeatureSink *>( &definition ) )
      return QString( "sink of %1%2" )
        .arg( static_cast<int>( sink->dataType() ) )
        .arg( sink->createByDefault() ? "" : ", off by default" );
    if ( const auto *raster = dynamic_cast<const QgsProcessingParameterRasterDestination *>( &definition ) )
      return QString( "raster output%1" ).arg( raster->createByDefault() ? "" : ", off by default" );
    return definition.type();
  }

  QStringList parametersOf( const QgsProcessingAlgorithm &algorithm )
  {
    QStringList lines;
    for ( const QgsProcessingParameterDefinition *definition : algorithm.parameterDefinitions() )
    {
      const compat::ParameterFlags flags = definition->flags();
      QString line = QString( "  parameter %1: %2" ).arg( definition->name(), typeText( *definition ) );
      if ( definition->defaultValue().isValid() )
        line += QString( ", default %1" ).arg( definition->defaultValue().toString() );
      line += flags & compat::Parameter::Optional ? ", optional" : "";
      line += flags & compat::Parameter::Advanced ? ", advanced" : "";
      lines << line;
    }
    return lines;
  }

  QStringList outputsOf( const QgsProcessingAlgorithm &algorithm )
  {
    QStringList lines;
    for ( const QgsProcessingOutputDefinition *definition : algorithm.outputDefinitions() )
      lines << QString( "  output %1: %2" ).arg( definition->name(), definition->type() );
    return lines;
  }

  QStringList fieldsOf( const Outcome &outcome, const QStringList &layers )
  {
    QStringList lines;
    for ( const QString &name : layers )
    {
      const QgsVectorLayer *layer = outcome.layer( name );
      lines << QString( "  layer %1: %2" )
                 .arg( name, layer ? QgsWkbTypes::displayString( layer->wkbType() ) : QString( "missing" ) );
      if ( !layer )
        continue;
      for ( const QgsField &field : layer->fields() )
        lines << QString( "    %1: %2" ).arg( field.name(), QVariant::typeToName( field.type() ) );
    }
    return lines;
  }

} // namespace

class TestContract : public QObject
{
    Q_OBJECT

  private slots:
    void isAsWritten();
    void everyParameterHasHelp();
    void everyAlgorithmSaysWhatItIs();

  private:
    static QStringList ids() { return { "staticpressure", "pressuresurface", "newplan" }; }
    static std::unique_ptr<QgsProcessingAlgorithm> algorithm( const QString &id )
    {
      return std::unique_ptr<QgsProcessingAlgorithm>(
        QgsApplication::processingRegistry()->createAlgorithmById( "stillhead:" + id ) );
    }

    Slope mSlope;
};

void TestContract::isAsWritten()
{
  QStringList lines { "provider stillhead: Stillhead" };
  for ( const QgsProcessingAlgorithm *registered :
    QgsApplication::processingRegistry()->providerById( "stillhead" )->algorithms() )
    QVERIFY2( ids().contains( registered->name() ), qPrintable( registered->name() ) );
  for ( const QString &id : ids() )
  {
    const std::unique_ptr<QgsProcessingAlgorithm> described = algorithm( id );
    QVERIFY2( described, qPrintable( id ) );
    lines << QString() << QString( "algorithm %1: %2" ).arg( described->id(), described->displayName() );
    lines << parametersOf( *described ) << outputsOf( *described );
    if ( id == "staticpressure" )
      lines << fieldsOf(
        runAlgorithm( id, mSlope.parameters() ), { "SPANS", "NODES", "STRETCHES", "EXTREMES", "FINDINGS" } );
    if ( id == "pressuresurface" )
      lines << fieldsOf( runAlgorithm( id, mSlope.surfaceParameters() ), { "BAND_AREAS", "GROUND_LIMITS" } );
    if ( id == "newplan" )
      lines << fieldsOf( runAlgorithm( id, { { "PLAN", mSlope.path( "plan.gpkg" ) }, { "CRS", "EPSG:32631" } } ),
        { "MAINLINES", "LATERALS", "SOURCES", "DEVICES" } );
  }
  lines << QString() << "states";
  for ( int state = 0; state <= static_cast<int>( stillhead::State::WithinLimits ); ++state )
    lines << QString( "  %1" ).arg( stillhead::stateName( static_cast<stillhead::State>( state ) ) );
  lines << QString() << "findings";
  for ( int code = 0; code <= static_cast<int>( stillhead::FindingCode::PumpDutyNotGiven ); ++code )
    lines << QString( "  %1" ).arg( stillhead::findingName( static_cast<stillhead::FindingCode>( code ) ) );

  QFile found( QStringLiteral( STILLHEAD_BINARY_DIR ) + "/contract-found.txt" );
  QVERIFY( found.open( QIODevice::WriteOnly ) );
  found.write( lines.join( '\n' ).toUtf8() + '\n' );
  QFile file( QStringLiteral( STILLHEAD_SOURCE_DIR ) + "/tests/processing/contract.txt" );
  QVERIFY( file.open( QIODevice::ReadOnly ) );
  const QStringList written = QString::fromUtf8( file.readAll() ).trimmed().split( '\n' );
  for ( int i = 0; i < std::min( lines.size(), written.size() ); ++i )
    QCOMPARE( lines.at( i ), written.at( i ) );
  QCOMPARE( lines.size(), written.size() );
}

void TestContract::everyParameterHasHelp()
{
  for ( const QString &id : ids() )
  {
    const std::unique_ptr<QgsProcessingAlgorithm> described = algorithm( id );
    for ( const QgsProcessingParameterDefinition *definition : described->parameterDefinitions() )
    {
      if ( !definition->isDestination() )
        QVERIFY2( definition->help().size() > 20, qPrintable( id + " " + definition->name() ) );
      QVERIFY2( !definition->description().isEmpty(), qPrintable( id + " " + definition->name() ) );
    }
  }
}

void TestContract::everyAlgorithmSaysWhatItIs()
{
  for ( const QString &id : ids() )
  {
    const std::unique_ptr<QgsProcessingAlgorithm> described = algorithm( id );
    QVERIFY( !described->shortDescription().isEmpty() );
    QVERIFY( described->tags().size() > 5 );
    const QString help = described->shortHelpString();
    for ( const char *part : { "Inputs:", "Outputs:", "Units:", "Limits:", "With water running it is lower",
            "not a stamped design", "can fail open" } )
      QVERIFY2( help.contains( part ), part );
    QVERIFY( described->flags() & compat::Algorithm::CanCancel );
    QVERIFY( !( described->flags() & compat::Algorithm::NoThreading ) );
    QVERIFY( !( described->flags() & compat::Algorithm::RequiresProject ) );
  }
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestContract>( argc, argv );
}
#include "testcontract.moc"
