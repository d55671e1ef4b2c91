// SPDX-License-Identifier: GPL-2.0-or-later
// What a legend says, which rules a place gets, which names fields get, and that a style stays with its data. The look
// itself is the control image's matter (teststyledmap.cpp).
#include "processing/parameternames.h"
#include "processing/styles/resultstyler.h"
#include "processing/styles/storedstyle.h"
#include "processing/writing/geopackageextras.h"
#include "tests/support/processingrun.h"
#include "tests/support/stylesample.h"

#include <qgscolorrampshader.h>
#include <qgslegendsymbolitem.h>
#include <qgsrasterlayer.h>
#include <qgsrastershader.h>
#include <qgsrenderer.h>
#include <qgsrulebasedlabeling.h>
#include <qgssinglebandpseudocolorrenderer.h>
#include <qgsvectorfilewriter.h>

using namespace stillhead;
using namespace stillhead::test;

class TestResultStyles : public QObject
{
    Q_OBJECT

  private slots:
    void bandTexts_data();
    void bandTexts();
    void legendNamesEveryBandAndTheStatesThatAreThere();
    void legendEndsWithTheCaution();
    void limitsOfLateralsAreNamedWhereTheyDiffer();
    void findingsInTheLegendAreThoseThatAreThere();
    void summitsAndSagsStandBelowTheWorstPlaces();
    void ceilingAndFloorNameTheirLimits();
    void everyFieldHasAnAliasWithItsUnit();
    void surfaceBandsTakeTheirLowerLimit();
    void styleStaysInAGeoPackage();
    void extrasOfNoFileAreAWarning();
    void layersAreStyledOnLoading();

  private:
    StyleSample mSample;
};

namespace
{

  QStringList legendOf( const QgsVectorLayer &layer )
  {
    QStringList labels;
    const QgsLegendSymbolList items = layer.renderer()->legendSymbolItems();
    for ( const QgsLegendSymbolItem &item : items )
      labels << item.label();
    return labels;
  }

  QString writeGeoPackage( QgsVectorLayer &layer, const QString &path )
  {
    QgsVectorFileWriter::SaveVectorOptions options;
    options.driverName = QStringLiteral( "GPKG" );
    options.layerName = QStringLiteral( "spans" );
    QgsVectorFileWriter::writeAsVectorFormatV3( &layer, path, QgsCoordinateTransformContext(), options );
    return path + QStringLiteral( "|layername=spans" );
  }

} // namespace

void TestResultStyles::bandTexts_data()
{
  QTest::addColumn<QVector<double>>( "limits" );
  QTest::addColumn<int>( "band" );
  QTest::addColumn<QString>( "expected" );
  const QVector<double> five = { 30, 45, 60, 80, 100 };
  QTest::newRow( "lowest" ) << five << 0 << QStringLiteral( "under 30 psi" );
  QTest::newRow( "middle" ) << five << 3 << QStringLiteral( "60 to 80 psi" );
  QTest::newRow( "highest" ) << five << 5 << QStringLiteral( "100 psi and over" );
  QTest::newRow( "broken limits" ) << QVector<double> { 2.5, 46.6666666 } << 1
                                   << QStringLiteral( "2.5 to 46.666667 psi" );
  QTest::newRow( "rounding of a conversion" )
    << QVector<double> { 29.999999999996, 80 } << 0 << QStringLiteral( "under 30 psi" );
  QTest::newRow( "one limit" ) << QVector<double> { 80 } << 1 << QStringLiteral( "80 psi and over" );
  QTest::newRow( "no limit" ) << QVector<double> {} << 0 << QStringLiteral( "any pressure" );
}

void TestResultStyles::bandTexts()
{
  QFETCH( QVector<double>, limits );
  QFETCH( int, band );
  QFETCH( QString, expected );
  ResultStyle style = mSample.style();
  style.bandLimits = limits;
  QCOMPARE( bandText( band, style ), expected );
}

void TestResultStyles::legendNamesEveryBandAndTheStatesThatAreThere()
{
  const LayerPointer all = mSample.spans();
  styleSpans( *all, mSample.style() );
  QStringList legend = legendOf( *all );
  for ( const char *label :
    { "under 30 psi", "30 to 45 psi", "45 to 60 psi", "60 to 80 psi", "80 to 100 psi", "100 psi and over", "mainline",
      "over limit: more than 80 psi (high case)", "under limit: less than 30 psi (low case)" } )
    QVERIFY2( legend.contains( QString::fromLatin1( label ) ), label );
  for ( const char *state :
    { "above static level", "past a summit", "no terrain", "no source", "too close to call", "lateral" } )
    QVERIFY2( !legend.filter( QRegularExpression( QStringLiteral( "^%1\\b" ).arg( state ) ) ).isEmpty(), state );

  const LayerPointer one = mSample.spansInState( QStringLiteral( "within limits" ) );
  styleSpans( *one, mSample.style() );
  legend = legendOf( *one );
  QVERIFY( legend.contains( QStringLiteral( "100 psi and over" ) ) );
  QVERIFY( legend.filter( QRegularExpression( QStringLiteral( "limit:" ) ) ).isEmpty() );
  QVERIFY( legend.filter( QRegularExpression( QStringLiteral( "^no source" ) ) ).isEmpty() );
}

void TestResultStyles::legendEndsWithTheCaution()
{
  const LayerPointer layer = mSample.spans();
  styleSpans( *layer, mSample.style() );
  QString last = legendOf( *layer ).last();
  QVERIFY( last.contains( '\n' ) );
  last.replace( '\n', ' ' );
  QCOMPARE( last,
    QStringLiteral( "Pressure at rest. With water running it is lower: meter, backflow assembly, valves and "
                    "pipe commonly take 15 to 25 psi and more. Within limits at rest does not mean enough to "
                    "run." ) );
}

void TestResultStyles::limitsOfLateralsAreNamedWhereTheyDiffer()
{
  const LayerPointer layer = mSample.spans();
  ResultStyle style = mSample.style();
  style.lateralMost = 70;
  styleSpans( *layer, style );
  const QStringList legend = legendOf( *layer );
  QVERIFY( legend.contains( QStringLiteral( "over limit: more than 80 psi, laterals 70 (high case)" ) ) );
  QVERIFY( legend.contains( QStringLiteral( "under limit: less than 30 psi (low case)" ) ) );
}

void TestResultStyles::findingsInTheLegendAreThoseThatAreThere()
{
  const LayerPointer layer = mSample.findings();
  styleFindings( *layer, mSample.style() );
  QCOMPARE(
    legendOf( *layer ), ( QStringList { QStringLiteral( "near miss" ), QStringLiteral( "crossing not joined" ) } ) );
}

void TestResultStyles::summitsAndSagsStandBelowTheWorstPlaces()
{
  const LayerPointer layer = mSample.extremes();
  styleExtremes( *layer, mSample.style() );
  const QStringList legend = legendOf( *layer );
  QCOMPARE( legend.size(), 6 );
  QVERIFY( layer->renderer()->usingSymbolLevels() );
  QVERIFY( legend.at( 4 ).startsWith( QStringLiteral( "summit of a mainline" ) ) );
  QVERIFY( legend.at( 5 ).startsWith( QStringLiteral( "sag of a mainline" ) ) );
  const auto *labeling = dynamic_cast<const QgsRuleBasedLabeling *>( layer->labeling() );
  QVERIFY( labeling );
  const QgsRuleBasedLabeling::RuleList rules = labeling->rootRule()->children();
  QCOMPARE( rules.size(), 2 );
  QVERIFY( rules.at( 0 )->settings()->priority > rules.at( 1 )->settings()->priority );
  QCOMPARE( rules.at( 0 )->minimumScale(), 0.0 );
  QVERIFY( rules.at( 1 )->minimumScale() > 0.0 );
}

void TestResultStyles::ceilingAndFloorNameTheirLimits()
{
  const LayerPointer layer = mSample.groundLimits();
  styleResult( *layer, ResultLayer::GroundLimits, mSample.style() );
  QCOMPARE( legendOf( *layer ),
    ( QStringList { QStringLiteral( "ceiling: higher ground has less than 30 psi (low case)" ),
      QStringLiteral( "floor: lower ground has more than 80 psi (high case)" ) } ) );
  QVERIFY( layer->labelsEnabled() );
}

void TestResultStyles::everyFieldHasAnAliasWithItsUnit()
{
  const LayerPointer layer = mSample.spans();
  ResultStyle style = mSample.style();
  style.pressureUnit = QStringLiteral( "kPa" );
  style.lengthUnit = QStringLiteral( "m" );
  styleResult( *layer, ResultLayer::Spans, style );
  for ( int i = 0; i < layer->fields().size(); ++i )
    QVERIFY2( !layer->attributeAlias( i ).isEmpty(), qPrintable( layer->fields().at( i ).name() ) );
  const auto alias = [&layer](
                       const QString &name ) { return layer->attributeAlias( layer->fields().lookupField( name ) ); };
  QVERIFY( alias( field::P_HIGH ).endsWith( QStringLiteral( ", kPa" ) ) );
  QVERIFY( alias( field::LENGTH ).endsWith( QStringLiteral( ", m" ) ) );
  QVERIFY( alias( field::DOUBT ).endsWith( QStringLiteral( "± kPa" ) ) );
}

void TestResultStyles::surfaceBandsTakeTheirLowerLimit()
{
  const Slope slope;
  QgsRasterLayer layer( slope.path( QStringLiteral( "slope.tif" ) ) );
  QVERIFY( layer.isValid() );
  styleResult( layer, ResultLayer::Surface, mSample.style() );
  const auto *renderer = dynamic_cast<const QgsSingleBandPseudoColorRenderer *>( layer.renderer() );
  QVERIFY( renderer );
  const auto colorOf = [renderer]( double value ) {
    int red = 0;
    int green = 0;
    int blue = 0;
    int alpha = 0;
    renderer->shader()->rasterShaderFunction()->shade( value, &red, &green, &blue, &alpha );
    return QColor( red, green, blue );
  };
  const QVector<QColor> colors = mSample.colors();
  QCOMPARE( colorOf( -0.01 ), QColor( Qt::white ) );
  QCOMPARE( colorOf( 0.0 ), colors.at( 0 ) );
  QCOMPARE( colorOf( 29.99 ), colors.at( 0 ) );
  QCOMPARE( colorOf( 30.0 ), colors.at( 1 ) );
  QCOMPARE( colorOf( 79.99 ), colors.at( 3 ) );
  QCOMPARE( colorOf( 80.0 ), colors.at( 4 ) );
  QCOMPARE( colorOf( 100.0 ), colors.at( 5 ) );
  QCOMPARE( colorOf( 500.0 ), colors.at( 5 ) );
}

void TestResultStyles::styleStaysInAGeoPackage()
{
  QTemporaryDir folder;
  const LayerPointer layer = mSample.spans();
  const QString source = writeGeoPackage( *layer, folder.filePath( QStringLiteral( "result.gpkg" ) ) );
  QgsLayerMetadata metadata;
  metadata.setAbstract( QStringLiteral( "It's a sample" ) );
  const QString qml = styleText(
    ResultLayer::Spans, layer->fields(), layer->wkbType(), { field::STATE, { "over limit" } }, mSample.style() );
  // A second run over the same file replaces style and metadata without asking.
  for ( int run = 0; run < 2; ++run )
    QCOMPARE(
      storeExtras( folder.filePath( QStringLiteral( "result.gpkg" ) ), { { "spans", qml, metadata } } ), QString() );

  QgsVectorLayer opened( source, QStringLiteral( "anything" ), QStringLiteral( "ogr" ) );
  QVERIFY( opened.isValid() );
  QCOMPARE( opened.renderer()->type(), QStringLiteral( "RuleRenderer" ) );
  QVERIFY( opened.renderer()->usingSymbolLevels() );
  QVERIFY( legendOf( opened ).contains( QStringLiteral( "60 to 80 psi" ) ) );
  // What the layer holds stands in the stored legend too.
  QVERIFY( legendOf( opened ).contains( QStringLiteral( "over limit: more than 80 psi (high case)" ) ) );
  QVERIFY( !legendOf( opened ).contains( QStringLiteral( "no source: joined to none" ) ) );
  QStringList ids;
  QStringList names;
  QStringList descriptions;
  QString error;
  QCOMPARE( opened.listStylesInDatabase( ids, names, descriptions, error ), 1 );
  QCOMPARE( opened.metadata().abstract(), QStringLiteral( "It's a sample" ) );
  QCOMPARE( opened.attributeAlias( opened.fields().lookupField( field::P_LOW ) ),
    QStringLiteral( "Lowest pressure at rest, low case, psi" ) );
}

void TestResultStyles::extrasOfNoFileAreAWarning()
{
  QTemporaryDir folder;
  const QString error = storeExtras( folder.filePath( QStringLiteral( "no.gpkg" ) ), { { "spans", "", {} } } );
  QVERIFY2( error.contains( QLatin1String( "the figures are there" ) ), qPrintable( error ) );
}

void TestResultStyles::layersAreStyledOnLoading()
{
  const LayerPointer layer = mSample.spans();
  QgsProcessingContext context;
  ResultStyler styler( ResultLayer::Spans, mSample.style() );
  styler.postProcessLayer( layer.get(), context, nullptr );
  QCOMPARE( layer->renderer()->type(), QStringLiteral( "RuleRenderer" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestResultStyles>( argc, argv );
}

#include "testresultstyles.moc"
