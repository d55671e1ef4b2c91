// SPDX-License-Identifier: GPL-2.0-or-later
// Turning points and roots of one piece, near the degenerate cases where digits are easily lost.
#include "core/profile/quadratic.h"
#include "tests/support/tolerance.h"

#include <random>

using namespace stillhead;

Q_DECLARE_METATYPE( Quadratic )

class TestQuadratic : public QObject
{
    Q_OBJECT

  private slots:
    void turning_data();
    void turning();
    void roots_data();
    void roots();
    void randomRootsGiveTheirValue();
    void aValueOutsideGivesTheNearerEnd();
};

void TestQuadratic::turning_data()
{
  QTest::addColumn<Quadratic>( "quadratic" );
  QTest::addColumn<bool>( "turns" );
  QTest::addColumn<double>( "share" );
  QTest::addColumn<double>( "value" );
  QTest::newRow( "straight" ) << Quadratic { 1.0, 3.0, 0.0 } << false << 0.0 << 1.0;
  QTest::newRow( "flat" ) << Quadratic { 2.0, 2.0, 0.0 } << false << 0.0 << 2.0;
  QTest::newRow( "a bowl" ) << Quadratic { 2.0, 2.0, 4.0 } << true << 0.5 << 1.0;
  QTest::newRow( "a crown" ) << Quadratic { 2.0, 2.0, -4.0 } << true << 0.5 << 3.0;
  QTest::newRow( "a saddle's diagonal" ) << Quadratic { 100.0, 99.0, 6.0 } << true << 7.0 / 12.0 << 100.0 - 49.0 / 24.0;
  QTest::newRow( "turns just at an end" ) << Quadratic { 1.0, 3.0, 2.0 } << false << 0.0 << 1.0;
  QTest::newRow( "turns just before an end" ) << Quadratic { 1.0, 3.0, 2.5 } << true << 0.1 << 0.975;
}

void TestQuadratic::turning()
{
  QFETCH( Quadratic, quadratic );
  QFETCH( bool, turns );
  QFETCH( double, share );
  QFETCH( double, value );
  QCOMPARE( quadratic.turnsInside(), turns );
  if ( turns )
    STILLHEAD_NEAR( quadratic.turn(), share, 1e-15 );
  STILLHEAD_NEAR( quadratic.at( share ), value, 1e-13 );
  STILLHEAD_SAME( quadratic.at( 0.0 ), quadratic.from );
  STILLHEAD_SAME( quadratic.at( 1.0 ), quadratic.to );
}

void TestQuadratic::roots_data()
{
  QTest::addColumn<Quadratic>( "quadratic" );
  QTest::addColumn<double>( "value" );
  QTest::addColumn<double>( "low" );
  QTest::addColumn<double>( "high" );
  QTest::addColumn<double>( "root" );
  QTest::addColumn<double>( "allowed" );
  QTest::newRow( "straight" ) << Quadratic { 10.0, 20.0, 0.0 } << 12.5 << 0.0 << 1.0 << 0.25 << 0.0;
  QTest::newRow( "nearly straight" ) << Quadratic { 10.0, 20.0, 1e-18 } << 12.5 << 0.0 << 1.0 << 0.25 << 1e-15;
  QTest::newRow( "nearly straight, the other way" )
    << Quadratic { 10.0, 20.0, -1e-18 } << 12.5 << 0.0 << 1.0 << 0.25 << 1e-15;
  QTest::newRow( "nearly straight, falling" ) << Quadratic { 20.0, 10.0, 1e-15 } << 12.5 << 0.0 << 1.0 << 0.75 << 1e-15;
  QTest::newRow( "first branch of a bowl" ) << Quadratic { 2.0, 2.0, 4.0 } << 1.25 << 0.0 << 0.5 << 0.25 << 1e-15;
  QTest::newRow( "second branch of a bowl" ) << Quadratic { 2.0, 2.0, 4.0 } << 1.25 << 0.5 << 1.0 << 0.75 << 1e-15;
  QTest::newRow( "touches its turning point" ) << Quadratic { 2.0, 2.0, 4.0 } << 1.0 << 0.0 << 0.5 << 0.5 << 0.0;
  QTest::newRow( "touches it from the other side" ) << Quadratic { 2.0, 2.0, 4.0 } << 1.0 << 0.5 << 1.0 << 0.5 << 0.0;
  QTest::newRow( "at the first end" ) << Quadratic { 2.0, 5.0, 1.0 } << 2.0 << 0.0 << 1.0 << 0.0 << 0.0;
  QTest::newRow( "at the last end" ) << Quadratic { 2.0, 5.0, 1.0 } << 5.0 << 0.0 << 1.0 << 1.0 << 0.0;
  // τ = 1e-9 exactly solves 1 + τ·(1e-9) + 1·τ·(τ − 1) + τ ≈ 1 + 2e-18: two terms that nearly cancel.
  QTest::newRow( "slope that nearly vanishes" )
    << Quadratic { 0.0, 1.0, 1.0 } << 0x1p-40 << 0.0 << 1.0 << 0x1p-20 << 1e-20;
  QTest::newRow( "flat within the value" ) << Quadratic { 3.0, 3.0, 0.0 } << 3.0 << 0.0 << 1.0 << 0.0 << 0.0;
}

void TestQuadratic::roots()
{
  QFETCH( Quadratic, quadratic );
  QFETCH( double, value );
  QFETCH( double, low );
  QFETCH( double, high );
  QFETCH( double, root );
  QFETCH( double, allowed );
  STILLHEAD_NEAR( quadratic.rootIn( value, low, high ), root, allowed );
}

// Elevations of a few hundred metres, bends from nothing to a cliff: the value at the root is the value, to rounding.
void TestQuadratic::randomRootsGiveTheirValue()
{
  std::mt19937 random( 1 );
  std::uniform_real_distribution<double> share( 0.0, 1.0 );
  std::uniform_real_distribution<double> exponent( -18.0, 2.0 );
  for ( int i = 0; i < 100000; ++i )
  {
    const double from = 300.0 * share( random );
    const double sign = share( random ) < 0.5 ? -1.0 : 1.0;
    const Quadratic quadratic { from, from + sign * std::pow( 10.0, exponent( random ) ),
      ( share( random ) < 0.5 ? -1.0 : 1.0 ) * std::pow( 10.0, exponent( random ) ) };
    double low = 0.0;
    double high = 1.0;
    if ( quadratic.turnsInside() )
      ( share( random ) < 0.5 ? low : high ) = quadratic.turn();
    const double tau = low + share( random ) * ( high - low );
    const double value = quadratic.at( tau );
    const double root = quadratic.rootIn( value, low, high );
    QVERIFY( root >= low && root <= high );
    STILLHEAD_NEAR( quadratic.at( root ), value, 4e-13 );
  }
}

void TestQuadratic::aValueOutsideGivesTheNearerEnd()
{
  const Quadratic rising { 10.0, 20.0, 2.0 };
  STILLHEAD_SAME( rising.rootIn( 9.0, 0.0, 1.0 ), 0.0 );
  STILLHEAD_SAME( rising.rootIn( 21.0, 0.0, 1.0 ), 1.0 );
  const Quadratic bowl { 2.0, 2.0, 4.0 };
  STILLHEAD_NEAR( bowl.rootIn( 0.0, 0.0, 0.5 ), 0.5, 1e-12 );
}

QTEST_APPLESS_MAIN( TestQuadratic )
#include "testquadratic.moc"
