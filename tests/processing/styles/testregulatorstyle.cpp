// SPDX-License-Identifier: GPL-2.0-or-later
// Devices on the map: a shape for each kind that the layer holds, and labels that tell the setting from the gauge at no flow.
#include "processing/parameternames.h"
#include "processing/styles/resultstyle.h"
#include "tests/support/processingrun.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgsexpression.h>
#include <qgsexpressioncontextutils.h>
#include <qgsmarkersymbol.h>
#include <qgspallabeling.h>
#include <qgsvectorlayerlabeling.h>

using namespace stillhead;
using namespace stillhead::test;

class TestRegulatorStyle : public QObject
{
    Q_OBJECT

  private slots:
    void init();
    void kindsThatAreThere();
    void everyKindHasItsOwnShape();
    void labels_data();
    void labels();
    void aliasesNameTheUnit();

  private:
    ResultStyle style() const
    {
      ResultStyle own;
      own.pressureUnit = QStringLiteral( "psi" );
      own.lengthUnit = QStringLiteral( "ft" );
      return own;
    }

    LayerPointer mLayer;
};

void TestRegulatorStyle::init()
{
  mLayer = drawLayer( QStringLiteral( "PointZ?crs=EPSG:32631&field=name:string&field=kind:string&field=set:double"
                                      "&field=lockup:double" ),
    { { "POINT(" + at( 0, 0 ) + ")", { "R1", "regulator", 35.2, 45.2 } },
      { "POINT(" + at( 10, 0 ) + ")", { "Flap", "check valve" } } },
    QStringLiteral( "regulators" ) );
  styleResult( *mLayer, ResultLayer::Regulators, style() );
}

void TestRegulatorStyle::kindsThatAreThere()
{
  const auto *renderer = dynamic_cast<const QgsCategorizedSymbolRenderer *>( mLayer->renderer() );
  QVERIFY( renderer );
  QStringList kinds;
  for ( const QgsRendererCategory &category : renderer->categories() )
    kinds << category.value().toString();
  QCOMPARE( kinds, ( QStringList { "regulator", "check valve" } ) );
}

void TestRegulatorStyle::everyKindHasItsOwnShape()
{
  const QStringList kinds { "regulator", "booster", "check valve", "closed valve", "control valve" };
  QSet<QByteArray> pictures;
  for ( const QString &kind : kinds )
  {
    const LayerPointer layer = drawLayer( QStringLiteral( "PointZ?crs=EPSG:32631&field=name:string&field=kind:string" ),
      { { "POINT(" + at( 0, 0 ) + ")", { "x", kind } } }, kind );
    styleResult( *layer, ResultLayer::Regulators, style() );
    const auto *renderer = dynamic_cast<const QgsCategorizedSymbolRenderer *>( layer->renderer() );
    QCOMPARE( renderer->categories().size(), 1 );
    const QImage picture = renderer->categories().first().symbol()->asImage( QSize( 48, 48 ) );
    QVERIFY( !picture.isNull() );
    pictures.insert(
      QByteArray( reinterpret_cast<const char *>( picture.constBits() ), static_cast<int>( picture.sizeInBytes() ) ) );
  }
  QCOMPARE( pictures.size(), kinds.size() );
}

void TestRegulatorStyle::labels_data()
{
  QTest::addColumn<QString>( "name" );
  QTest::addColumn<QString>( "text" );
  QTest::newRow( "regulator" ) << "R1"
                               << "R1: set 35 psi, at no flow 45 psi";
  QTest::newRow( "without a setting" ) << "Flap"
                                       << "Flap";
}

void TestRegulatorStyle::labels()
{
  QFETCH( QString, name );
  QFETCH( QString, text );
  QgsExpression expression( mLayer->labeling()->settings().fieldName );
  QgsExpressionContext context( QgsExpressionContextUtils::globalProjectLayerScopes( mLayer.get() ) );
  QgsFeature feature;
  QgsFeatureIterator features = mLayer->getFeatures();
  while ( features.nextFeature( feature ) )
  {
    if ( feature.attribute( field::NAME ).toString() != name )
      continue;
    context.setFeature( feature );
    QCOMPARE( expression.evaluate( &context ).toString(), text );
    return;
  }
  QFAIL( "no such device" );
}

void TestRegulatorStyle::aliasesNameTheUnit()
{
  QCOMPARE(
    mLayer->attributeAlias( mLayer->fields().lookupField( field::SET ) ), QStringLiteral( "Set, water running, psi" ) );
  QCOMPARE( mLayer->attributeAlias( mLayer->fields().lookupField( field::LOCKUP ) ),
    QStringLiteral( "Gauge at no flow (lock-up), psi" ) );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestRegulatorStyle>( argc, argv );
}

#include "testregulatorstyle.moc"
