// SPDX-License-Identifier: GPL-2.0-or-later
// Static level from what was read or is known at the source.
#include "core/statics/source.h"
#include "core/units/units.h"
#include "tests/support/memoryterrain.h"
#include "tests/support/tolerance.h"

using namespace stillhead;

namespace
{
  //! A weight that makes 1 Pa per millimetre: figures stay exact.
  constexpr double WEIGHT = 1000.0;
} // namespace

Q_DECLARE_METATYPE( Source )

class TestSource : public QObject
{
    Q_OBJECT

  private slots:
    void levels_data();
    void levels();
    void gaugeHeightBelongsToTheReading();
};

void TestSource::levels_data()
{
  QTest::addColumn<Source>( "source" );
  QTest::addColumn<double>( "ground" );
  QTest::addColumn<double>( "high" );
  QTest::addColumn<double>( "low" );
  Source reading;
  reading.kind = SourceKind::PressureReading;
  reading.high = 40000.0;
  QTest::newRow( "one reading serves both cases" ) << reading << 100.0 << 140.0 << 140.0;
  reading.low = 30000.0;
  QTest::newRow( "a reading for each case" ) << reading << 100.0 << 140.0 << 130.0;
  reading.gaugeHeightM = 1.5;
  QTest::newRow( "gauge above ground" ) << reading << 100.0 << 141.5 << 131.5;
  reading.gaugeHeightM = -0.5;
  QTest::newRow( "gauge in a pit" ) << reading << 100.0 << 139.5 << 129.5;
  reading.gaugeHeightM = 0.0;
  reading.boostPa = 20000.0;
  QTest::newRow( "a pump that gives one figure" ) << reading << 100.0 << 160.0 << 150.0;
  reading.boostLowPa = 12000.0;
  QTest::newRow( "no-flow boost high, running boost low" ) << reading << 100.0 << 160.0 << 142.0;
  reading.boostLowPa = 0.0;
  QTest::newRow( "a pump that stands in the low case" ) << reading << 100.0 << 160.0 << 130.0;

  Source level;
  level.kind = SourceKind::WaterLevel;
  level.high = 250.0;
  QTest::newRow( "open water gives itself" ) << level << 100.0 << 250.0 << 250.0;
  QTest::newRow( "open water needs no ground" ) << level << test::NODATA << 250.0 << 250.0;
  level.low = 245.0;
  level.boostPa = 10000.0;
  QTest::newRow( "a pump on open water" ) << level << test::NODATA << 260.0 << 255.0;
  level.gaugeHeightM = 3.0;
  QTest::newRow( "a gauge height means nothing there" ) << level << 100.0 << 260.0 << 255.0;

  Source above;
  above.kind = SourceKind::LevelAboveGround;
  above.high = 12.0;
  above.low = 4.0;
  QTest::newRow( "level above ground" ) << above << 100.0 << 112.0 << 104.0;
  QTest::newRow( "ground below datum" ) << above << -20.0 << -8.0 << -16.0;
  above.boostPa = 5000.0;
  above.boostLowPa = 3000.0;
  QTest::newRow( "a pump on it" ) << above << 100.0 << 117.0 << 107.0;
}

void TestSource::levels()
{
  QFETCH( Source, source );
  QFETCH( double, ground );
  QFETCH( double, high );
  QFETCH( double, low );
  const StaticLevels levels = staticLevels( source, ground, WEIGHT );
  STILLHEAD_SAME( levels.highM, high );
  STILLHEAD_SAME( levels.lowM, low );
}

// 620 kPa read 0.9 m above ground 58.0 m: 122.122 m; without the gauge height 121.222 m, 8.83 kPa or 1.28 psi too low
// (own worked case, 1000 kg/m3 × 9.80665 m/s2).
void TestSource::gaugeHeightBelongsToTheReading()
{
  constexpr double weight = 1000.0 * 9.80665;
  Source source;
  source.high = 690000.0;
  source.low = 620000.0;
  source.gaugeHeightM = 0.9;
  const StaticLevels levels = staticLevels( source, 58.0, weight );
  STILLHEAD_NEAR( levels.lowM, 122.122, 0.5e-3 );
  STILLHEAD_NEAR( levels.highM, 129.260, 0.5e-3 );
  source.gaugeHeightM = 0.0;
  const double without = staticLevels( source, 58.0, weight ).lowM;
  STILLHEAD_NEAR( without, 121.222, 0.5e-3 );
  STILLHEAD_NEAR( weight * ( levels.lowM - without ) / 1000.0, 8.83, 0.5e-2 );
  STILLHEAD_NEAR( weight * ( levels.lowM - without ) / PASCALS_PER_PSI, 1.28, 0.5e-2 );
}

QTEST_APPLESS_MAIN( TestSource )
#include "testsource.moc"
