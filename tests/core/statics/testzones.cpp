// SPDX-License-Identifier: GPL-2.0-or-later
// Pressure zones are connected pipe, the source's first; doubt combines independent errors in squares.
#include "core/statics/zones.h"
#include "core/units/units.h"
#include "tests/support/networksketch.h"
#include "tests/support/tolerance.h"

#include <set>

using namespace stillhead;
using stillhead::test::Joined;
using stillhead::test::joined;
using stillhead::test::sketched;

class TestZones : public QObject
{
    Q_OBJECT

  private slots:
    void numbering();
    void withoutSource();
    void doubt_data();
    void doubt();
};

void TestZones::numbering()
{
  const Drawing drawing =
    sketched( "main 0 0, 10 0; lateral 5 0, 5 5; main 0 50, 10 50; main 20 0, 30 0, 30 10, 20 0" );
  const Joined result = joined( drawing, {}, PlanarMeasure(), 1, PlanPoint { 20, 0 } );
  const ZoneMap zones = zonesOf( result.network );
  QCOMPARE( zones.count, 3 );
  QCOMPARE( zones.ofNode.size(), result.network.nodes.size() );
  QCOMPARE( zones.ofSpan.size(), result.network.spans.size() );
  for ( std::size_t i = 0; i < result.network.nodes.size(); ++i )
    QCOMPARE( zones.ofNode[i] == 0, result.network.nodes[i].place.x >= 20.0 );
  std::set<int> first;
  for ( std::size_t i = 0; i < result.network.spans.size(); ++i )
  {
    const Span &span = result.network.spans[i];
    QCOMPARE( zones.ofSpan[i], zones.ofNode[static_cast<std::size_t>( span.fromNode )] );
    QCOMPARE( zones.ofSpan[i], zones.ofNode[static_cast<std::size_t>( span.toNode )] );
    if ( result.drawing.lines[static_cast<std::size_t>( span.line )].drawn < 2 )
      first.insert( zones.ofSpan[i] );
  }
  QCOMPARE( first.size(), std::size_t( 1 ) );
}

void TestZones::withoutSource()
{
  const ZoneMap zones = zonesOf( joined( sketched( "main 0 0, 10 0; main 0 50, 10 50" ) ).network );
  QCOMPARE( zones.count, 2 );
}

void TestZones::doubt_data()
{
  QTest::addColumn<double>( "rmse" );
  QTest::addColumn<double>( "reading" );
  QTest::addColumn<bool>( "onTerrain" );
  QTest::addColumn<double>( "psi" );
  QTest::addColumn<double>( "allowed" );
  // Terrain figures: published RMSEz, pressure computed at 1.42233 psi per metre.
  QTest::newRow( "none" ) << 0.0 << 0.0 << true << 0.0 << 0.0;
  QTest::newRow( "lidar QL2, 95 %, one point (USGS LBS table, from memory)" )
    << 0.10 << 0.0 << false << 0.279 << 0.5e-3;
  QTest::newRow( "dynamic elevation service, 95 %, one point (USGS FAQ)" ) << 0.53 << 0.0 << false << 1.478 << 0.5e-3;
  QTest::newRow( "the same at pipe and source" ) << 0.53 << 0.0 << true << 1.066 * 1.96 << 1e-3;
  QTest::newRow( "a gauge alone" ) << 0.0 << 2.0 * PASCALS_PER_PSI << true << 2.0 << 1e-12;
  QTest::newRow( "in squares" ) << 3.0 / ( 1.96 * 1.422334330 ) << 4.0 * PASCALS_PER_PSI << false << 5.0 << 1e-8;
  QTest::newRow( "in squares, two points" )
    << 3.0 / ( 1.96 * 1.422334330 * std::sqrt( 2.0 ) ) << 4.0 * PASCALS_PER_PSI << true << 5.0 << 1e-8;
}

void TestZones::doubt()
{
  QFETCH( double, rmse );
  QFETCH( double, reading );
  QFETCH( bool, onTerrain );
  QFETCH( double, psi );
  QFETCH( double, allowed );
  STILLHEAD_NEAR( doubtPa( rmse, reading, onTerrain ? 2 : 1, 1000.0 * 9.80665 ) / PASCALS_PER_PSI, psi, allowed );
}

QTEST_APPLESS_MAIN( TestZones )
#include "testzones.moc"
