// SPDX-License-Identifier: GPL-2.0-or-later
// Conversion factors against published values; the source stands beside each row.
#include "core/units/units.h"
#include "tests/support/tolerance.h"

using namespace stillhead;

namespace
{
  //! "Conventional water" of NIST SP 811: 1000 kg/m3 at standard gravity.
  constexpr double CONVENTIONAL_N_PER_M3 = 1000.0 * 9.80665;
} // namespace

class TestUnits : public QObject
{
    Q_OBJECT

  private slots:
    void pressure_data();
    void pressure();
    void length_data();
    void length();
    void roundedFieldFactors_data();
    void roundedFieldFactors();
    void surveyFootOverInternationalFoot();
    void parameterOrder();
};

void TestUnits::pressure_data()
{
  QTest::addColumn<int>( "unit" );
  QTest::addColumn<double>( "specificWeight" );
  QTest::addColumn<double>( "pascals" );
  QTest::addColumn<double>( "relative" );
  const int psi = static_cast<int>( PressureUnit::Psi );
  const int metre = static_cast<int>( PressureUnit::MetreOfWater );
  const int foot = static_cast<int>( PressureUnit::FootOfWater );
  QTest::newRow( "psi, NIST SP 811 app. B" ) << psi << 9800.0 << 6894.757293168 << 1e-12;
  QTest::newRow( "kPa, SI brochure" ) << static_cast<int>( PressureUnit::Kilopascal ) << 9800.0 << 1000.0 << 0.0;
  QTest::newRow( "bar, SI brochure" ) << static_cast<int>( PressureUnit::Bar ) << 9800.0 << 100000.0 << 0.0;
  QTest::newRow( "metre of conventional water, NIST SP 811" ) << metre << CONVENTIONAL_N_PER_M3 << 9806.65 << 1e-12;
  QTest::newRow( "foot of conventional water, NIST SP 811 B.8 (digits computed)" )
    << foot << CONVENTIONAL_N_PER_M3 << 2989.06692 << 1e-12;
  QTest::newRow( "foot of conventional water as printed, NIST SP 811 B.8 (from memory)" )
    << foot << CONVENTIONAL_N_PER_M3 << 2989.067 << 0.5e-3 / 2989.067;
  QTest::newRow( "foot of water at 39.2 F, NIST SP 811 B.8 (from memory)" )
    << foot << 999.972 * 9.80665 << 2988.98 << 0.5e-2 / 2988.98;
  QTest::newRow( "foot of water at 60 F as coded by unit libraries" )
    << foot << 999.001 * 9.80665 << 2986.0808 << 0.5e-4 / 2986.0808;
}

void TestUnits::pressure()
{
  QFETCH( int, unit );
  QFETCH( double, specificWeight );
  QFETCH( double, pascals );
  QFETCH( double, relative );
  STILLHEAD_NEAR_RELATIVE( pascalsPer( static_cast<PressureUnit>( unit ), specificWeight ), pascals, relative );
}

void TestUnits::length_data()
{
  QTest::addColumn<double>( "factor" );
  QTest::addColumn<double>( "metres" );
  QTest::addColumn<double>( "relative" );
  QTest::newRow( "international foot, NIST SP 811 B.6" ) << metresPer( LengthUnit::Foot ) << 0.3048 << 0.0;
  QTest::newRow( "metre" ) << metresPer( LengthUnit::Metre ) << 1.0 << 0.0;
  QTest::newRow( "terrain in metres" ) << metresPer( ElevationUnit::Metre ) << 1.0 << 0.0;
  QTest::newRow( "terrain in feet" ) << metresPer( ElevationUnit::Foot ) << 0.3048 << 0.0;
  QTest::newRow( "US survey foot, Federal Register 85 FR 62698: 1200/3937 m" )
    << metresPer( ElevationUnit::UsSurveyFoot ) << 0.3048006096012 << 1e-12;
}

void TestUnits::length()
{
  QFETCH( double, factor );
  QFETCH( double, metres );
  QFETCH( double, relative );
  STILLHEAD_NEAR_RELATIVE( factor, metres, relative );
}

// Factors the trade rounds: ours must round to the same digits.
void TestUnits::roundedFieldFactors_data()
{
  QTest::addColumn<double>( "factor" );
  QTest::addColumn<double>( "printed" );
  QTest::addColumn<double>( "halfUnit" );
  const double psi = pascalsPer( PressureUnit::Psi, CONVENTIONAL_N_PER_M3 );
  const double foot = pascalsPer( PressureUnit::FootOfWater, CONVENTIONAL_N_PER_M3 );
  const double metre = pascalsPer( PressureUnit::MetreOfWater, CONVENTIONAL_N_PER_M3 );
  QTest::newRow( "psi in a metre, NIST SP 811" ) << metre / psi << 1.42233433 << 0.5e-8;
  QTest::newRow( "psi in a foot, computed from the exact definitions" ) << foot / psi << 0.433527504 << 0.5e-9;
  QTest::newRow( "feet in a psi, computed from the exact definitions" ) << psi / foot << 2.306658726 << 0.5e-9;
  QTest::newRow( "0.433 psi/ft, OSU Extension Bulletin 912" ) << foot / psi << 0.433 << 1e-3;
  QTest::newRow( "2.31 ft/psi, OSU Extension Bulletin 912" ) << psi / foot << 2.31 << 0.5e-2;
  QTest::newRow( "2.308 ft/psi, Utah State University BIE 5110" ) << psi / foot << 2.308 << 2e-3;
  QTest::newRow( "9.81 kPa/m, Utah State University BIE 5110" ) << metre / 1000.0 << 9.81 << 0.5e-2;
  QTest::newRow( "6.89 kPa/psi, Utah State University BIE 5110" ) << psi / 1000.0 << 6.89 << 0.5e-2;
  QTest::newRow( "62.4 lb/ft3, Utah State University BIE 5110" ) << foot / psi * 144.0 << 62.4 << 0.5e-1;
  QTest::newRow( "80 psi in kPa, plumbing codes print 552" ) << 80.0 * psi / 1000.0 << 552.0 << 0.5;
  QTest::newRow( "80 psi in kPa, computed" ) << 80.0 * psi / 1000.0 << 551.58 << 0.5e-2;
  QTest::newRow( "90 psi in kPa, computed" ) << 90.0 * psi / 1000.0 << 620.53 << 0.5e-2;
  QTest::newRow( "100 psi in kPa, computed" ) << 100.0 * psi / 1000.0 << 689.48 << 0.5e-2;
  QTest::newRow( "1 kgf/cm2 is 10 m of conventional water, NIST SP 811" ) << 10.0 * metre << 98066.5 << 1e-9;
}

void TestUnits::roundedFieldFactors()
{
  QFETCH( double, factor );
  QFETCH( double, printed );
  QFETCH( double, halfUnit );
  STILLHEAD_NEAR( factor, printed, halfUnit );
}

// NIST SP 811 B.6 (ratio from memory): 2 parts in a million, no more.
void TestUnits::surveyFootOverInternationalFoot()
{
  STILLHEAD_NEAR(
    metresPer( ElevationUnit::UsSurveyFoot ) / metresPer( ElevationUnit::Foot ), 1.000002000004, 0.5e-12 );
}

// The numbers are those of the parameters PRESSURE_UNIT, LENGTH_UNIT and TERRAIN_UNIT (less one).
void TestUnits::parameterOrder()
{
  QCOMPARE( static_cast<int>( PressureUnit::Psi ), 0 );
  QCOMPARE( static_cast<int>( PressureUnit::Kilopascal ), 1 );
  QCOMPARE( static_cast<int>( PressureUnit::Bar ), 2 );
  QCOMPARE( static_cast<int>( PressureUnit::MetreOfWater ), 3 );
  QCOMPARE( static_cast<int>( PressureUnit::FootOfWater ), 4 );
  QCOMPARE( static_cast<int>( LengthUnit::Foot ), 0 );
  QCOMPARE( static_cast<int>( LengthUnit::Metre ), 1 );
  QCOMPARE( static_cast<int>( ElevationUnit::Metre ), 0 );
  QCOMPARE( static_cast<int>( ElevationUnit::Foot ), 1 );
  QCOMPARE( static_cast<int>( ElevationUnit::UsSurveyFoot ), 2 );
}

QTEST_APPLESS_MAIN( TestUnits )
#include "testunits.moc"
