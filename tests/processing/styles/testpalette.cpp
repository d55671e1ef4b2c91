// SPDX-License-Identifier: GPL-2.0-or-later
// The bands must be told apart without hue: by lightness in grey print and in simulated colour vision of three kinds.
// Simulation: Machado, Oliveira, Fernandes, "A Physiologically-based Model for Simulation of Color Vision Deficiency",
// IEEE TVCG 15(6), 2009, doi 10.1109/TVCG.2009.113, the matrices for severity 1.0, on linear sRGB. Distances are CIE 1976
// (L*a*b*, white D65).
#include "processing/styles/palette.h"

#include <QtTest>

#include <algorithm>
#include <array>
#include <cmath>

using namespace stillhead;

namespace
{

  using Triple = std::array<double, 3>;
  using Matrix = std::array<Triple, 3>;

  constexpr Matrix NORMAL = { { { 1, 0, 0 }, { 0, 1, 0 }, { 0, 0, 1 } } };
  constexpr Matrix PROTAN = { { { 0.152286, 1.052583, -0.204868 }, { 0.114503, 0.786281, 0.099216 },
    { -0.003882, -0.048116, 1.051998 } } };
  constexpr Matrix DEUTAN = { { { 0.367322, 0.860646, -0.227968 }, { 0.280085, 0.672501, 0.047413 },
    { -0.011820, 0.042940, 0.968881 } } };
  constexpr Matrix TRITAN = { { { 1.255528, -0.076749, -0.178779 }, { -0.078411, 0.930809, 0.147602 },
    { 0.004733, 0.691367, 0.303900 } } };
  // sRGB to CIE XYZ, white D65 (IEC 61966-2-1).
  constexpr Matrix TO_XYZ = { { { 0.4124564, 0.3575761, 0.1804375 }, { 0.2126729, 0.7151522, 0.0721750 },
    { 0.0193339, 0.1191920, 0.9503041 } } };

  Triple times( const Matrix &matrix, const Triple &vector )
  {
    Triple product {};
    for ( std::size_t row = 0; row < 3; ++row )
      product[row] = matrix[row][0] * vector[0] + matrix[row][1] * vector[1] + matrix[row][2] * vector[2];
    return product;
  }

  double linear( double channel )
  {
    return channel <= 0.04045 ? channel / 12.92 : std::pow( ( channel + 0.055 ) / 1.055, 2.4 );
  }

  double labCurve( double t )
  {
    return t > 216.0 / 24389.0 ? std::cbrt( t ) : ( 24389.0 / 27.0 * t + 16.0 ) / 116.0;
  }

  //! L*, a*, b* of \a color as seen through \a sight.
  Triple labOf( const QColor &color, const Matrix &sight )
  {
    Triple seen = times( sight, { linear( color.redF() ), linear( color.greenF() ), linear( color.blueF() ) } );
    for ( double &channel : seen )
      channel = std::clamp( channel, 0.0, 1.0 );
    const Triple xyz = times( TO_XYZ, seen );
    const double x = labCurve( xyz[0] / 0.95047 );
    const double y = labCurve( xyz[1] );
    const double z = labCurve( xyz[2] / 1.08883 );
    return { 116.0 * y - 16.0, 500.0 * ( x - y ), 200.0 * ( y - z ) };
  }

  double distance( const Triple &a, const Triple &b )
  {
    return std::hypot( a[0] - b[0], a[1] - b[1], a[2] - b[2] );
  }

} // namespace

Q_DECLARE_METATYPE( Matrix )

class TestPalette : public QObject
{
    Q_OBJECT

  private slots:
    void bandsAreToldApart_data();
    void bandsAreToldApart();
    void fewBandsAreTakenFromTheRamp();
    void manyBandsKeepTheOrder();
    void widthsRise();
    void pipeShowsOnEveryCasing();
    void bandsKeepAwayFromMarkingColours();
};

void TestPalette::bandsAreToldApart_data()
{
  QTest::addColumn<Matrix>( "sight" );
  QTest::addColumn<double>( "leastLightnessStep" );
  QTest::addColumn<double>( "leastDistance" );
  // Lightness steps of 10 read as separate greys; the distances are what the ramp reaches, so that it does not get worse.
  QTest::newRow( "normal, and grey print by L*" ) << NORMAL << 10.0 << 15.5;
  QTest::newRow( "protan" ) << PROTAN << 8.5 << 11.9;
  QTest::newRow( "deutan" ) << DEUTAN << 10.0 << 14.0;
  QTest::newRow( "tritan" ) << TRITAN << 10.0 << 12.0;
}

void TestPalette::bandsAreToldApart()
{
  QFETCH( Matrix, sight );
  QFETCH( double, leastLightnessStep );
  QFETCH( double, leastDistance );
  const QVector<QColor> colors = bandColors( 6 );
  for ( int a = 0; a < colors.size(); ++a )
  {
    const Triple here = labOf( colors.at( a ), sight );
    for ( int b = a + 1; b < colors.size(); ++b )
    {
      const Triple there = labOf( colors.at( b ), sight );
      QVERIFY2( here[0] - there[0] >= leastLightnessStep,
        qPrintable(
          QStringLiteral( "L* of bands %1 and %2: %3, %4" ).arg( a ).arg( b ).arg( here[0] ).arg( there[0] ) ) );
      QVERIFY2( distance( here, there ) >= leastDistance,
        qPrintable( QStringLiteral( "bands %1 and %2: %3" ).arg( a ).arg( b ).arg( distance( here, there ) ) ) );
    }
  }
}

void TestPalette::fewBandsAreTakenFromTheRamp()
{
  const QVector<QColor> six = bandColors( 6 );
  QCOMPARE( six.first().name(), QStringLiteral( "#e8cf7e" ) );
  QCOMPARE( six.last().name(), QStringLiteral( "#17305e" ) );
  for ( int bands = 2; bands < 6; ++bands )
  {
    const QVector<QColor> colors = bandColors( bands );
    QCOMPARE( colors.size(), bands );
    QCOMPARE( colors.first(), six.first() );
    QCOMPARE( colors.last(), six.last() );
    for ( const QColor &color : colors )
      QVERIFY( six.contains( color ) );
    for ( int i = 1; i < bands; ++i )
      QVERIFY( lightness( colors.at( i ) ) < lightness( colors.at( i - 1 ) ) );
  }
  QCOMPARE( bandColors( 1 ).size(), 1 );
}

void TestPalette::manyBandsKeepTheOrder()
{
  const QVector<QColor> colors = bandColors( 11 );
  QCOMPARE( colors.size(), 11 );
  for ( int i = 1; i < colors.size(); ++i )
    QVERIFY( lightness( colors.at( i ) ) < lightness( colors.at( i - 1 ) ) );
  QCOMPARE( colors.at( 10 ), bandColors( 6 ).at( 5 ) );
  QCOMPARE( colors.at( 2 ), bandColors( 6 ).at( 1 ) );
}

void TestPalette::widthsRise()
{
  const QVector<double> widths = casingWidths( 6 );
  QCOMPARE( widths.first(), 1.2 );
  QCOMPARE( widths.last(), 2.6 );
  for ( int i = 1; i < widths.size(); ++i )
    QVERIFY( qAbs( widths.at( i ) - widths.at( i - 1 ) - 0.28 ) < 1e-12 );
}

void TestPalette::pipeShowsOnEveryCasing()
{
  for ( const QColor &color : bandColors( 11 ) )
    QVERIFY( qAbs( lightness( pipeColorOn( color ) ) - lightness( color ) ) >= 45.0 );
}

// Colours painted on the ground have fixed meanings (blue potable, purple reclaimed, green sewer, red electric, orange
// communication, yellow gas, pink survey, white excavation; common practice, no source): no band comes near one.
void TestPalette::bandsKeepAwayFromMarkingColours()
{
  const QList<QColor> markings = { Qt::blue, QColor( 128, 0, 128 ), QColor( 0, 255, 0 ), Qt::red, QColor( 255, 165, 0 ),
    Qt::yellow, QColor( 255, 105, 180 ), Qt::white };
  for ( const QColor &color : bandColors( 6 ) )
  {
    for ( const QColor &marking : markings )
      QVERIFY( distance( labOf( color, NORMAL ), labOf( marking, NORMAL ) ) >= 30.0 );
  }
}

QTEST_GUILESS_MAIN( TestPalette )
#include "testpalette.moc"
