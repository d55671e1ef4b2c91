// SPDX-License-Identifier: GPL-2.0-or-later
// The planning GeoPackage: the layers and fields that the other algorithms read, aliases that name the units, lists and
// rules that come back from the file, and a file that is there is left alone.
#include "core/network/drawing.h"
#include "processing/newplan/planlayers.h"
#include "processing/qgiscompat.h"
#include "tests/support/processingrun.h"

#include <qgsattributeeditorcontainer.h>
#include <qgscategorizedsymbolrenderer.h>
#include <qgseditformconfig.h>
#include <qgsexpressioncontextutils.h>
#include <qgsrenderer.h>
#include <qgssnappingconfig.h>
#include <qgsvectorlayerutils.h>

#include <QFile>
#include <QTest>

using namespace stillhead;
using namespace stillhead::test;

class TestNewPlan : public QObject
{
    Q_OBJECT

  private slots:
    void hasTheFields_data();
    void hasTheFields();
    void aliasesNameTheUnits_data();
    void aliasesNameTheUnits();
    void formsComeWithTheFile();
    void rulesJudgeValues_data();
    void rulesJudgeValues();
    void leavesAFileAlone();
    void refuses_data();
    void refuses();
    void entersTheProject();
    void isReadByTheMainJob();

  private:
    QVariantMap parameters( const QString &file, const QVariantMap &changes = {} ) const
    {
      QVariantMap all { { "PLAN", mSlope.path( file ) }, { "CRS", "EPSG:32631" } };
      for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
        all.insert( change.key(), change.value() );
      return all;
    }

    //! A layer as a user opens it, with what the file stores for it.
    static LayerPointer opened( const Outcome &outcome, const QString &output )
    {
      return std::make_unique<QgsVectorLayer>(
        outcome.results.value( output ).toString(), output, QStringLiteral( "ogr" ) );
    }

    Slope mSlope;
};

void TestNewPlan::hasTheFields_data()
{
  QTest::addColumn<QString>( "layer" );
  QTest::addColumn<QString>( "type" );
  QTest::addColumn<QString>( "fields" );
  // Names as the planning layers are agreed, in their order.
  const QString pipe = "fid,name,system,cover,rating,inside_diameter";
  QTest::newRow( "mainlines" ) << "MAINLINES"
                               << "LineString" << pipe;
  QTest::newRow( "laterals" ) << "LATERALS"
                              << "LineString" << pipe;
  QTest::newRow( "sources" ) << "SOURCES"
                             << "Point"
                             << "fid,name,system,kind,value,low,elevation,gauge_height,boost,boost_low,note";
  QTest::newRow( "devices" ) << "DEVICES"
                             << "Point"
                             << "fid,name,system,kind,set,rise,boost,boost_low,elevation,direction";
}

void TestNewPlan::hasTheFields()
{
  QFETCH( QString, layer );
  QFETCH( QString, type );
  QFETCH( QString, fields );
  const Outcome outcome = runAlgorithm( "newplan", parameters( layer + "_fields.gpkg" ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( ' ' ) ) );
  const LayerPointer made = opened( outcome, layer );
  QVERIFY( made->isValid() );
  QCOMPARE( QgsWkbTypes::displayString( made->wkbType() ), type );
  QCOMPARE( made->crs().authid(), QString( "EPSG:32631" ) );
  QStringList names;
  for ( const QgsField &field : made->fields() )
    names << field.name();
  QCOMPARE( names.join( ',' ), fields );
  QCOMPARE( static_cast<int>( made->featureCount() ), 0 );
}

void TestNewPlan::aliasesNameTheUnits_data()
{
  QTest::addColumn<int>( "pressureUnit" );
  QTest::addColumn<int>( "lengthUnit" );
  QTest::addColumn<QString>( "pressure" );
  QTest::addColumn<QString>( "length" );
  QTest::addColumn<QString>( "diameter" );
  QTest::newRow( "psi and feet" ) << 0 << 0 << ", psi"
                                  << ", ft"
                                  << ", in";
  QTest::newRow( "kPa and metres" ) << 1 << 1 << ", kPa"
                                    << ", m"
                                    << ", mm";
  QTest::newRow( "bar and metres" ) << 2 << 1 << ", bar"
                                    << ", m"
                                    << ", mm";
}

void TestNewPlan::aliasesNameTheUnits()
{
  QFETCH( int, pressureUnit );
  QFETCH( int, lengthUnit );
  QFETCH( QString, pressure );
  QFETCH( QString, length );
  QFETCH( QString, diameter );
  const Outcome outcome = runAlgorithm( "newplan",
    parameters( QString( "units%1%2.gpkg" ).arg( pressureUnit ).arg( lengthUnit ),
      { { "PRESSURE_UNIT", pressureUnit }, { "LENGTH_UNIT", lengthUnit } } ) );
  QVERIFY( outcome.ok );
  const auto alias = [&outcome]( const QString &output, const QString &field ) {
    const LayerPointer layer = opened( outcome, output );
    return layer->attributeAlias( layer->fields().lookupField( field ) );
  };
  QVERIFY2( alias( "MAINLINES", "rating" ).endsWith( pressure ), qPrintable( alias( "MAINLINES", "rating" ) ) );
  QVERIFY2( alias( "MAINLINES", "cover" ).endsWith( length ), qPrintable( alias( "MAINLINES", "cover" ) ) );
  QVERIFY( alias( "LATERALS", "inside_diameter" ).endsWith( diameter ) );
  QVERIFY( alias( "DEVICES", "set" ).endsWith( pressure ) );
  QVERIFY( alias( "SOURCES", "gauge_height" ).endsWith( length ) );
}

void TestNewPlan::formsComeWithTheFile()
{
  const Outcome outcome = runAlgorithm( "newplan", parameters( "forms.gpkg" ) );
  const LayerPointer devices = opened( outcome, "DEVICES" );
  const int kind = devices->fields().lookupField( "kind" );
  QCOMPARE( devices->editorWidgetSetup( kind ).type(), QString( "ValueMap" ) );
  QStringList words;
  for ( const QVariant &pair : devices->editorWidgetSetup( kind ).config().value( "map" ).toList() )
    words << pair.toMap().first().toString();
  QCOMPARE( words, QStringList( { "regulator", "booster", "check valve", "closed valve", "control valve" } ) );
  QVERIFY( devices->fieldConstraints( kind ) & QgsFieldConstraints::ConstraintNotNull );
  QCOMPARE( devices->editFormConfig().layout(), compat::FORM_BY_GROUPS );
  QStringList groups;
  for ( const QgsAttributeEditorElement *element : devices->editFormConfig().tabs() )
    groups << element->name();
  QCOMPARE( groups, QStringList( { "Device", "Regulator", "Booster", "Survey", "One way" } ) );

  // A new device is a regulator that passes away from the source, unless the user says otherwise.
  QgsExpressionContext context( QgsExpressionContextUtils::globalProjectLayerScopes( devices.get() ) );
  const QgsFeature fresh = QgsVectorLayerUtils::createFeature( devices.get(), QgsGeometry(), {}, &context );
  QCOMPARE( fresh.attribute( "kind" ).toString(), QString( "regulator" ) );
  QCOMPARE( fresh.attribute( "direction" ).toString(), QString( "from the source" ) );

  const auto *byKind = dynamic_cast<const QgsCategorizedSymbolRenderer *>( devices->renderer() );
  QVERIFY( byKind );
  QCOMPARE( byKind->categories().size(), words.size() );
  QCOMPARE( opened( outcome, "MAINLINES" )->renderer()->type(), QString( "singleSymbol" ) );
}

void TestNewPlan::rulesJudgeValues_data()
{
  QTest::addColumn<QString>( "output" );
  QTest::addColumn<QVariantMap>( "values" );
  QTest::addColumn<QString>( "field" );
  QTest::addColumn<bool>( "good" );
  const auto row = []( const char *name, const char *output, const QVariantMap &values, const char *field, bool good ) {
    QTest::newRow( name ) << QString( output ) << values << QString( field ) << good;
  };
  row( "blank cover", "MAINLINES", {}, "cover", true );
  row( "cover", "MAINLINES", { { "cover", 1.5 } }, "cover", true );
  row( "cover above ground", "MAINLINES", { { "cover", -1 } }, "cover", false );
  row( "no value", "SOURCES", {}, "value", false );
  row( "value", "SOURCES", { { "value", 71 } }, "value", true );
  row( "low above high", "SOURCES", { { "value", 71 }, { "low", 80 } }, "low", false );
  row( "low as high", "SOURCES", { { "value", 71 }, { "low", 71 } }, "low", true );
  row( "pump running alone", "SOURCES", { { "boost_low", 10 } }, "boost_low", false );
  row( "pump", "SOURCES", { { "boost", 20 }, { "boost_low", 10 } }, "boost_low", true );
  row( "pump more running", "SOURCES", { { "boost", 20 }, { "boost_low", 30 } }, "boost_low", false );
  row( "regulator without set", "DEVICES", { { "kind", "regulator" } }, "set", false );
  row( "regulator", "DEVICES", { { "kind", "regulator" }, { "set", 60 } }, "set", true );
  row( "control valve without set", "DEVICES", { { "kind", "control valve" } }, "set", true );
  row( "no kind", "DEVICES", {}, "kind", false );
}

void TestNewPlan::rulesJudgeValues()
{
  QFETCH( QString, output );
  QFETCH( QVariantMap, values );
  QFETCH( QString, field );
  QFETCH( bool, good );
  const Outcome outcome = runAlgorithm( "newplan", parameters( QString( QTest::currentDataTag() ) + ".gpkg" ) );
  const LayerPointer layer = opened( outcome, output );
  QgsFeature feature( layer->fields() );
  feature.setValid( true );
  for ( auto value = values.constBegin(); value != values.constEnd(); ++value )
    QVERIFY( feature.setAttribute( value.key(), value.value() ) );
  QStringList problems;
  const int index = layer->fields().lookupField( field );
  QCOMPARE( QgsVectorLayerUtils::validateAttribute( layer.get(), feature, index, problems ), good );
}

void TestNewPlan::leavesAFileAlone()
{
  QVERIFY( runAlgorithm( "newplan", parameters( "twice.gpkg" ) ).ok );
  QFile file( mSlope.path( "twice.gpkg" ) );
  QVERIFY( file.open( QIODevice::ReadOnly ) );
  const QByteArray before = file.readAll();
  file.close();
  const Outcome again = runAlgorithm( "newplan", parameters( "twice.gpkg" ) );
  QVERIFY( !again.ok );
  QVERIFY( again.said( again.errors, "is there already and is left as it is" ) );
  QVERIFY( file.open( QIODevice::ReadOnly ) );
  QCOMPARE( file.readAll(), before );
}

void TestNewPlan::refuses_data()
{
  QTest::addColumn<QString>( "file" );
  QTest::addColumn<QString>( "crs" );
  QTest::addColumn<QString>( "says" );
  QTest::newRow( "other format" ) << "plan.shp"
                                  << "EPSG:32631"
                                  << "ends in .gpkg";
  QTest::newRow( "no folder" ) << "nowhere/plan.gpkg"
                               << "EPSG:32631"
                               << "does not exist";
  QTest::newRow( "no CRS" ) << "nocrs.gpkg"
                            << ""
                            << "choose the CRS";
}

void TestNewPlan::refuses()
{
  QFETCH( QString, file );
  QFETCH( QString, crs );
  QFETCH( QString, says );
  const Outcome outcome = runAlgorithm( "newplan", parameters( file, { { "CRS", crs } } ) );
  QVERIFY( !outcome.ok );
  QVERIFY2( outcome.said( outcome.errors, says ), qPrintable( outcome.errors.join( ' ' ) ) );
  QVERIFY( !QFile::exists( mSlope.path( file ) ) );
}

void TestNewPlan::entersTheProject()
{
  QgsProject::instance()->clear();
  const Outcome left = runAlgorithm( "newplan", parameters( "left.gpkg", { { "ADD_TO_PROJECT", false } } ) );
  QVERIFY( left.context->layersToLoadOnCompletion().isEmpty() );
  QVERIFY( !QgsProject::instance()->snappingConfig().enabled() );

  const Outcome added = runAlgorithm( "newplan", parameters( "added.gpkg" ) );
  QCOMPARE( added.context->layersToLoadOnCompletion().size(), 4 );
  const auto details = added.context->layersToLoadOnCompletion().value( added.results.value( "MAINLINES" ).toString() );
  QCOMPARE( details.name, QString( "Mainlines" ) );
  QVERIFY( QgsProject::instance()->snappingConfig().enabled() );
  QgsProject::instance()->clear();
}

void TestNewPlan::isReadByTheMainJob()
{
  const Outcome plan = runAlgorithm( "newplan", parameters( "drawn.gpkg" ) );
  const LayerPointer mains = opened( plan, "MAINLINES" );
  QVERIFY( mains->startEditing() );
  QgsFeature pipe( mains->fields() );
  pipe.setGeometry( QgsGeometry::fromWkt( line( { { 0, 0 }, { 300, 0 } } ) ) );
  pipe.setAttribute( "cover", 2.0 );
  QVERIFY( mains->addFeature( pipe ) );
  QVERIFY( mains->commitChanges() );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", plan.results.value( "MAINLINES" ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( ' ' ) ) );
  // Water at 150 m over ground that falls from 100 to 70 m, 2 m above the pipe.
  QCOMPARE( outcome.number( "P_LOWEST" ), 52.0 );
  QCOMPARE( outcome.number( "P_HIGHEST" ), 82.0 );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestNewPlan>( argc, argv );
}
#include "testnewplan.moc"
