// SPDX-License-Identifier: GPL-2.0-or-later
// Density and specific weight of water against the published formula's table and independent measurements.
#include "core/units/units.h"
#include "core/units/water.h"
#include "tests/support/tolerance.h"

using namespace stillhead;

class TestWater : public QObject
{
    Q_OBJECT

  private slots:
    void cipmTable_data();
    void cipmTable();
    void published_data();
    void published();
    void isDensestNearFourDegrees();
};

// CIPM 2001 formula, Metrologia 38 (2001) 301-309, p. 305; figures computed from it apart from this code.
void TestWater::cipmTable_data()
{
  QTest::addColumn<double>( "celsius" );
  QTest::addColumn<double>( "density" );
  QTest::addColumn<double>( "kPaPerMetre" );
  QTest::addColumn<double>( "psiPerFoot" );
  QTest::newRow( "0" ) << 0.0 << 999.8428 << 9.80511 << 0.433459;
  QTest::newRow( "4" ) << 4.0 << 999.9749 << 9.80640 << 0.433517;
  QTest::newRow( "10" ) << 10.0 << 999.7027 << 9.80373 << 0.433399;
  QTest::newRow( "15, the default" ) << 15.0 << 999.1026 << 9.79785 << 0.433138;
  QTest::newRow( "60 F" ) << 140.0 / 9.0 << 999.0170 << 9.79701 << 0.433101;
  QTest::newRow( "20" ) << 20.0 << 998.2067 << 9.78906 << 0.432750;
  QTest::newRow( "25" ) << 25.0 << 997.0470 << 9.77769 << 0.432247;
  QTest::newRow( "30" ) << 30.0 << 995.6488 << 9.76398 << 0.431641;
  QTest::newRow( "40" ) << 40.0 << 992.2152 << 9.73031 << 0.430153;
}

void TestWater::cipmTable()
{
  QFETCH( double, celsius );
  QFETCH( double, density );
  QFETCH( double, kPaPerMetre );
  QFETCH( double, psiPerFoot );
  // Half a unit of the last printed digit, and a hair for figures that lie on the half.
  STILLHEAD_NEAR( waterDensityKgPerM3( celsius ), density, 0.51e-4 );
  const double specificWeight = waterSpecificWeightNPerM3( celsius );
  STILLHEAD_NEAR( specificWeight / 1000.0, kPaPerMetre, 0.51e-5 );
  STILLHEAD_NEAR( pascalsPer( PressureUnit::FootOfWater, specificWeight ) / pascalsPer( PressureUnit::Psi, 0.0 ),
    psiPerFoot, 0.51e-6 );
}

void TestWater::published_data()
{
  QTest::addColumn<double>( "celsius" );
  QTest::addColumn<double>( "density" );
  QTest::addColumn<double>( "allowed" );
  QTest::newRow( "25: public constants file" ) << 25.0 << 997.0479 << 1e-3;
  QTest::newRow( "25: IAPWS R6-95 (from memory)" ) << 25.0 << 997.047 << 0.5e-3;
  QTest::newRow( "16: absolute density paper, abstract" ) << 16.0 << 998.9468 << 1.2e-3;
  QTest::newRow( "greatest: absolute density paper, abstract" ) << 3.983035 << 999.9756 << 0.8e-3;
  QTest::newRow( "20: 1975 formula, J. Res. NIST 97 (1992) 335, corrected" ) << 20.0 << 998.2041 << 3e-3;
}

void TestWater::published()
{
  QFETCH( double, celsius );
  QFETCH( double, density );
  QFETCH( double, allowed );
  STILLHEAD_NEAR( waterDensityKgPerM3( celsius ), density, allowed );
}

void TestWater::isDensestNearFourDegrees()
{
  const double greatest = waterDensityKgPerM3( 3.983035 );
  for ( int tenth = 0; tenth <= 400; ++tenth )
  {
    const double celsius = 0.1 * tenth;
    QVERIFY( waterDensityKgPerM3( celsius ) <= greatest );
    if ( celsius > 4.0 )
      QVERIFY( waterDensityKgPerM3( celsius + 0.1 ) < waterDensityKgPerM3( celsius ) );
  }
}

QTEST_APPLESS_MAIN( TestWater )
#include "testwater.moc"
