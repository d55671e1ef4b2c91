// SPDX-License-Identifier: GPL-2.0-or-later
// The provider in the registry: added once however often it is asked for, with its names and icon, and added
// anew after it was removed.
#include "processing/entrypoint.h"

#include "core/version.h"

#include <qgsapplication.h>
#include <qgsprocessingprovider.h>
#include <qgsprocessingregistry.h>

#include <QIcon>
#include <QTest>

class TestProvider : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase()
    {
      QgsApplication::init();
      QgsApplication::initQgis();
    }
    void cleanupTestCase() { QgsApplication::exitQgis(); }

    void isAddedOnce();
    void saysWhatItIs();
    void canBeAddedAgain();
};

void TestProvider::isAddedOnce()
{
  QVERIFY( stillhead_register_provider() );
  QVERIFY( !stillhead_register_provider() );
  int count = 0;
  for ( const QgsProcessingProvider *provider : QgsApplication::processingRegistry()->providers() )
    count += provider->id() == QLatin1String( "stillhead" );
  QCOMPARE( count, 1 );
}

void TestProvider::saysWhatItIs()
{
  const QgsProcessingProvider *provider =
    QgsApplication::processingRegistry()->providerById( QStringLiteral( "stillhead" ) );
  QVERIFY( provider );
  QCOMPARE( provider->name(), QStringLiteral( "Stillhead" ) );
  QCOMPARE( provider->versionInfo(), QString::fromLatin1( stillhead::versionText() ) );
  QVERIFY( QFile::exists( provider->svgIconPath() ) );
  QVERIFY( !provider->icon().pixmap( 24, 24 ).isNull() );
}

void TestProvider::canBeAddedAgain()
{
  QVERIFY( QgsApplication::processingRegistry()->removeProvider( QStringLiteral( "stillhead" ) ) );
  QVERIFY( !QgsApplication::processingRegistry()->providerById( QStringLiteral( "stillhead" ) ) );
  QVERIFY( stillhead_register_provider() );
}

int main( int argc, char *argv[] )
{
  QgsApplication application( argc, argv, true );
  TestProvider test;
  return QTest::qExec( &test, argc, argv );
}
#include "testprovider.moc"
