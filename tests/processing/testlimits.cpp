// SPDX-License-Identifier: GPL-2.0-or-later
// Limits as users give them: presets for each unit, the text of BANDS, and numbers as they are written in sentences.
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/reading/bandlimits.h"
#include "processing/reading/limitsreader.h"
#include "tests/support/processingrun.h"
#include "tests/support/tolerance.h"

#include <qgsexception.h>

using namespace stillhead;
using namespace stillhead::test;

class TestLimits : public QObject
{
    Q_OBJECT

  private slots:
    void presets_data();
    void presets();
    void bandsBetweenGivenLimits();
    void bandTexts_data();
    void bandTexts();
    void numbers_data();
    void numbers();
};

void TestLimits::presets_data()
{
  QTest::addColumn<int>( "unit" );
  QTest::addColumn<double>( "least" );
  QTest::addColumn<double>( "most" );
  QTest::addColumn<QVector<double>>( "bands" );
  QTest::newRow( "psi" ) << 0 << 30.0 << 80.0 << QVector<double> { 30, 45, 60, 80, 100 };
  QTest::newRow( "kPa" ) << 1 << 200.0 << 550.0 << QVector<double> { 200, 300, 400, 550, 700 };
  QTest::newRow( "bar" ) << 2 << 2.0 << 5.5 << QVector<double> { 2, 3, 4, 5.5, 7 };
  QTest::newRow( "metres" ) << 3 << 20.0 << 55.0 << QVector<double> { 20, 30, 40, 55, 70 };
  QTest::newRow( "feet" ) << 4 << 70.0 << 185.0 << QVector<double> { 70, 105, 140, 185, 230 };
}

void TestLimits::presets()
{
  QFETCH( int, unit );
  QFETCH( double, least );
  QFETCH( double, most );
  QFETCH( QVector<double>, bands );
  const std::unique_ptr<QgsProcessingAlgorithm> algorithm(
    QgsApplication::processingRegistry()->createAlgorithmById( "stillhead:staticpressure" ) );
  QgsProcessingContext context;
  const QVariantMap none;
  const DisplayUnits units( static_cast<PressureUnit>( unit ), LengthUnit::Foot, 15.0 );
  const Limits limits = readLimits( ParameterValues( algorithm->parameterDefinitions(), none, context ), units );
  STILLHEAD_NEAR_RELATIVE( units.pressure( limits.leastPa ), least, 1e-15 );
  STILLHEAD_NEAR_RELATIVE( units.pressure( limits.mostPa ), most, 1e-15 );
  STILLHEAD_SAME( limits.lateralLeastPa, limits.leastPa );
  STILLHEAD_SAME( limits.lateralMostPa, limits.mostPa );
  QCOMPARE( static_cast<int>( limits.bandsPa.size() ), bands.size() );
  for ( int i = 0; i < bands.size(); ++i )
    STILLHEAD_NEAR_RELATIVE( units.pressure( limits.bandsPa[static_cast<std::size_t>( i )] ), bands[i], 1e-15 );
  // The limit to stay below is a band limit too, to the bit: no sliver of a band lies between them.
  QVERIFY( std::find( limits.bandsPa.begin(), limits.bandsPa.end(), limits.mostPa ) != limits.bandsPa.end() );
}

void TestLimits::bandsBetweenGivenLimits()
{
  const std::unique_ptr<QgsProcessingAlgorithm> algorithm(
    QgsApplication::processingRegistry()->createAlgorithmById( "stillhead:staticpressure" ) );
  QgsProcessingContext context;
  const DisplayUnits units( PressureUnit::Kilopascal, LengthUnit::Metre, 15.0 );
  const QVariantMap given { { parameter::LEAST, 250 } };
  const Limits limits = readLimits( ParameterValues( algorithm->parameterDefinitions(), given, context ), units );
  const double expected[] = { 250, 350, 450, 550, 687.5 };
  QCOMPARE( limits.bandsPa.size(), std::size_t( 5 ) );
  for ( std::size_t i = 0; i < 5; ++i )
    STILLHEAD_NEAR_RELATIVE( units.pressure( limits.bandsPa[i] ), expected[i], 1e-15 );

  const QVariantMap equal { { parameter::LEAST, 400 }, { parameter::MOST, 400 } };
  const Limits one = readLimits( ParameterValues( algorithm->parameterDefinitions(), equal, context ), units );
  QCOMPARE( one.bandsPa.size(), std::size_t( 2 ) );
}

void TestLimits::bandTexts_data()
{
  QTest::addColumn<QString>( "text" );
  QTest::addColumn<QVector<double>>( "limits" );
  const QVector<double> three { 30, 45, 60 };
  QTest::newRow( "commas" ) << "30,45,60" << three;
  QTest::newRow( "commas and spaces" ) << " 30, 45 ,60 " << three;
  QTest::newRow( "semicolons" ) << "30;45; 60" << three;
  QTest::newRow( "spaces" ) << "30 45\t60" << three;
  QTest::newRow( "mixed" ) << "30, 45; 60" << three;
  QTest::newRow( "points" ) << "2.5;3.5 5" << QVector<double> { 2.5, 3.5, 5 };
  QTest::newRow( "below the level" ) << "-5 0 5" << QVector<double> { -5, 0, 5 };
  QTest::newRow( "one" ) << "80" << QVector<double> { 80 };
}

void TestLimits::bandTexts()
{
  QFETCH( QString, text );
  QFETCH( QVector<double>, limits );
  try
  {
    const std::vector<double> parsed = parseBandLimits( text );
    QCOMPARE( QVector<double>( parsed.begin(), parsed.end() ), limits );
  }
  catch ( const QgsException &e )
  {
    QFAIL( qPrintable( e.what() ) );
  }
}

void TestLimits::numbers_data()
{
  QTest::addColumn<QString>( "found" );
  QTest::addColumn<QString>( "expected" );
  const DisplayUnits psi( PressureUnit::Psi, LengthUnit::Foot, 15.0 );
  const DisplayUnits bar( PressureUnit::Bar, LengthUnit::Metre, 15.0 );
  const DisplayUnits metres( PressureUnit::MetreOfWater, LengthUnit::Metre, 20.0 );
  QTest::newRow( "whole psi" ) << psi.pressureText( 94.61 * PASCALS_PER_PSI ) << "95 psi";
  QTest::newRow( "tenths of bar" ) << bar.pressureText( 650000 ) << "6.5 bar";
  QTest::newRow( "whole feet, grouped" ) << psi.lengthText( 14675 * 0.3048 ) << "14,675 ft";
  QTest::newRow( "tenths of metres" ) << bar.lengthText( 106.07 ) << "106.1 m";
  QTest::newRow( "real minus" ) << psi.pressureText( -4.07 * PASCALS_PER_PSI, 1 ) << "−4.1 psi";
  QTest::newRow( "no minus before zero" ) << psi.pressureText( -0.3 * PASCALS_PER_PSI ) << "0 psi";
  QTest::newRow( "as given" ) << bar.givenPressureText( 550000 ) << "5.5 bar";
  QTest::newRow( "as given, whole" ) << psi.givenPressureText( 30 * PASCALS_PER_PSI ) << "30 psi";
  QTest::newRow( "constant" ) << psi.constantText() << "0.43314 psi per ft of height, water at 15 °C";
  // A height of water per height of water would be 1 by definition.
  QTest::newRow( "constant of heights" ) << metres.constantText() << "9.78906 kPa per m of height, water at 20 °C";
}

void TestLimits::numbers()
{
  QFETCH( QString, found );
  QFETCH( QString, expected );
  QCOMPARE( found, expected );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestLimits>( argc, argv );
}
#include "testlimits.moc"
