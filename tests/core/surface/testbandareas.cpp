// SPDX-License-Identifier: GPL-2.0-or-later
// Band areas: hand-worked ramps, every cell in the area of its band and no other, valid polygons on the
// worst patterns of missing cells, and GDAL's own contours as a second opinion.
#include "core/surface/bandareas.h"
#include "tests/support/gdalcontours.h"
#include "tests/support/memoryterrain.h"

#include <QTest>

#include <cmath>
#include <map>
#include <memory>
#include <random>
#include <set>

using namespace stillhead;
using stillhead::test::MemoryTerrain;

namespace
{
  constexpr double NONE = std::numeric_limits<double>::quiet_NaN();

  struct Area
  {
      int band = 0;
      std::vector<std::vector<TerrainPoint>> rings;
  };

  //! Water whose pressure is minus the ground: limits then are plain numbers.
  RestingWater plainWater()
  {
    return { 0.0, 0.0, 1.0, 1.0 };
  }

  //! A terrain whose pressures are \a pressures.
  MemoryTerrain pressureTerrain( int columns, int rows, std::vector<double> pressures )
  {
    for ( double &pressure : pressures )
      pressure = -pressure;
    return MemoryTerrain( columns, rows, std::move( pressures ) );
  }

  std::vector<Area> areasOf( const ElevationSource &terrain, const std::vector<double> &limits,
    const AreaMask *area = nullptr, unsigned threads = 2 )
  {
    BandAreaRequest request;
    request.water = plainWater();
    request.limits = limits;
    request.area = area;
    request.threads = threads;
    std::vector<Area> areas;
    Monitor monitor;
    traceBandAreas(
      terrain, request, monitor, 0.0, 1.0, [&areas]( int band, const std::vector<std::vector<TerrainPoint>> &rings ) {
        areas.push_back( { band, rings } );
      } );
    return areas;
  }

  double signedArea( const std::vector<TerrainPoint> &ring )
  {
    double sum = 0.0;
    for ( std::size_t i = 0; i + 1 < ring.size(); ++i )
      sum += 0.5 * ( ring[i].x * ring[i + 1].y - ring[i + 1].x * ring[i].y );
    return sum;
  }

  //! Total area by band; holes count negative.
  std::map<int, double> totals( const std::vector<Area> &areas )
  {
    std::map<int, double> sums;
    for ( const Area &area : areas )
    {
      for ( const std::vector<TerrainPoint> &ring : area.rings )
        sums[area.band] += signedArea( ring );
    }
    return sums;
  }

  bool isInside( const Area &area, const TerrainPoint &place )
  {
    bool inside = false;
    for ( const std::vector<TerrainPoint> &ring : area.rings )
    {
      for ( std::size_t i = 0; i + 1 < ring.size(); ++i )
      {
        const TerrainPoint &a = ring[i];
        const TerrainPoint &b = ring[i + 1];
        if ( ( a.y > place.y ) != ( b.y > place.y )
          && place.x < a.x + ( place.y - a.y ) * ( b.x - a.x ) / ( b.y - a.y ) )
          inside = !inside;
      }
    }
    return inside;
  }

  OGRPolygon toPolygon( const Area &area )
  {
    OGRPolygon polygon;
    for ( const std::vector<TerrainPoint> &ring : area.rings )
    {
      OGRLinearRing line;
      for ( const TerrainPoint &place : ring )
        line.addPoint( place.x, place.y );
      polygon.addRing( &line );
    }
    return polygon;
  }

  int bandOf( double value, const std::vector<double> &limits )
  {
    int band = 0;
    for ( const double limit : limits )
      band += value >= limit ? 1 : 0;
    return band;
  }

  //! Everything that must hold for any raster; blank if it does.
  QString complaint( int columns, int rows, const std::vector<double> &pressures, const std::vector<double> &limits )
  {
    const std::vector<Area> areas = areasOf( pressureTerrain( columns, rows, pressures ), limits );
    double total = 0.0;
    for ( const Area &area : areas )
    {
      if ( signedArea( area.rings[0] ) <= 0.0 )
        return QStringLiteral( "an outer ring turns the wrong way" );
      for ( std::size_t i = 0; i < area.rings.size(); ++i )
      {
        total += signedArea( area.rings[i] );
        if ( i > 0 && signedArea( area.rings[i] ) >= 0.0 )
          return QStringLiteral( "a hole turns the wrong way" );
      }
      if ( !toPolygon( area ).IsValid() )
      {
        char *wkt = nullptr;
        toPolygon( area ).exportToWkt( &wkt );
        const QString text = QStringLiteral( "not valid: %1" ).arg( wkt );
        CPLFree( wkt );
        return text;
      }
    }
    int valid = 0;
    for ( int row = 0; row < rows; ++row )
    {
      for ( int column = 0; column < columns; ++column )
      {
        const double pressure = pressures[static_cast<std::size_t>( row * columns + column )];
        valid += std::isnan( pressure ) ? 0 : 1;
        std::multiset<int> found;
        for ( const Area &area : areas )
        {
          if ( isInside( area, { static_cast<double>( column ), static_cast<double>( -row ) } ) )
            found.insert( area.band );
        }
        const std::multiset<int> expected =
          std::isnan( pressure ) ? std::multiset<int>() : std::multiset<int> { bandOf( pressure, limits ) };
        if ( found != expected )
          return QStringLiteral( "column %1, row %2 lies in %3 areas, or the wrong one" )
            .arg( column )
            .arg( row )
            .arg( found.size() );
      }
    }
    return std::abs( total - valid ) < 1e-9 * ( valid + 1 )
      ? QString()
      : QStringLiteral( "%1 of area for %2 cells" ).arg( total ).arg( valid );
  }
} // namespace

class TestBandAreas : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase() { test::registerGdal(); }

    void rampByHand();
    void flat_data();
    void flat();
    void equalToALimitIsAbove();
    void missingCellsAreLeftOut();
    void cellsThatMeetAtACorner();
    void aRingAroundARing();
    void bordersHaveFewVertices();
    void anyRaster_data();
    void anyRaster();
    void agreesWithGdal();
    void insideAnArea();
    void aMapThatIsNotMirrored();
    void threadsGiveTheSameBits();
    void cancelled();
};

void TestBandAreas::rampByHand()
{
  // Pressures 5 to 45, one more in each column: 10 is met at the centre of column 5, 5.5 cells from the edge.
  std::vector<double> pressures;
  for ( int row = 0; row < 20; ++row )
  {
    for ( int column = 0; column < 41; ++column )
      pressures.push_back( 5.0 + column );
  }
  const std::vector<Area> areas = areasOf( pressureTerrain( 41, 20, pressures ), { 10, 20, 30 } );
  QCOMPARE( areas.size(), std::size_t( 4 ) );
  const std::map<int, double> sums = totals( areas );
  const std::map<int, double> expected { { 0, 5.5 * 20 }, { 1, 10.0 * 20 }, { 2, 10.0 * 20 }, { 3, 15.5 * 20 } };
  for ( const auto &[band, area] : expected )
    QVERIFY( std::abs( sums.at( band ) - area ) < 1e-4 ); // lines keep a millionth of a cell off the centres
}

void TestBandAreas::flat_data()
{
  QTest::addColumn<double>( "pressure" );
  QTest::addColumn<int>( "band" );
  QTest::newRow( "below all" ) << -7.0 << 0;
  QTest::newRow( "between" ) << 15.0 << 1;
  QTest::newRow( "at a limit" ) << 20.0 << 2;
  QTest::newRow( "above all" ) << 99.0 << 3;
}

void TestBandAreas::flat()
{
  QFETCH( double, pressure );
  for ( const auto &[columns, rows] : { std::pair( 1, 1 ), std::pair( 4, 1 ), std::pair( 1, 5 ), std::pair( 6, 7 ) } )
  {
    const std::vector<Area> areas = areasOf(
      pressureTerrain( columns, rows, std::vector<double>( static_cast<std::size_t>( columns * rows ), pressure ) ),
      { 10, 20, 30 } );
    QCOMPARE( areas.size(), std::size_t( 1 ) );
    QTEST( areas[0].band, "band" );
    QCOMPARE( areas[0].rings.size(), std::size_t( 1 ) );
    QCOMPARE( areas[0].rings[0].size(), std::size_t( 5 ) );
    QCOMPARE( signedArea( areas[0].rings[0] ), static_cast<double>( columns * rows ) );
  }
}

void TestBandAreas::equalToALimitIsAbove()
{
  // A single cell at the limit, a pit and a peak; and a plateau of them.
  const std::vector<double> limits { 20 };
  std::vector<double> pressures( 25, 15.0 );
  pressures[12] = 20.0;
  QCOMPARE( complaint( 5, 5, pressures, limits ), QString() );
  pressures = std::vector<double>( 25, 25.0 );
  pressures[12] = 20.0;
  QCOMPARE( areasOf( pressureTerrain( 5, 5, pressures ), limits ).size(), std::size_t( 1 ) );
  pressures = std::vector<double>( 25, 15.0 );
  for ( const std::size_t i : { 6u, 7u, 8u, 11u, 12u, 13u } )
    pressures[i] = 20.0;
  QCOMPARE( complaint( 5, 5, pressures, limits ), QString() );
  QVERIFY( std::abs( totals( areasOf( pressureTerrain( 5, 5, pressures ), limits ) ).at( 1 ) - 2.0 ) < 1e-4 );
}

void TestBandAreas::missingCellsAreLeftOut()
{
  std::vector<double> pressures( 36, 15.0 );
  for ( const std::size_t i : { 14u, 15u, 20u, 21u } )
    pressures[i] = NONE;
  const std::vector<Area> areas = areasOf( pressureTerrain( 6, 6, pressures ), { 10 } );
  QCOMPARE( areas.size(), std::size_t( 1 ) );
  QCOMPARE( areas[0].rings.size(), std::size_t( 2 ) );
  QCOMPARE( signedArea( areas[0].rings[1] ), -4.0 );
  QVERIFY( areasOf( pressureTerrain( 2, 2, { NONE, NONE, NONE, NONE } ), { 10 } ).empty() );
}

void TestBandAreas::cellsThatMeetAtACorner()
{
  // Two cells that meet at a corner are two areas; a loop of cells that meets itself there has a hole that touches it.
  QCOMPARE( areasOf( pressureTerrain( 2, 2, { 1, NONE, NONE, 1 } ), { 10 } ).size(), std::size_t( 2 ) );
  QCOMPARE( areasOf( pressureTerrain( 2, 2, { NONE, 1, 1, NONE } ), { 10 } ).size(), std::size_t( 2 ) );
  const std::vector<double> loop { 1, 1, 1, //
    1, NONE, 1,                             //
    1, 1, NONE };
  const std::vector<Area> areas = areasOf( pressureTerrain( 3, 3, loop ), { 10 } );
  QCOMPARE( areas.size(), std::size_t( 1 ) );
  QCOMPARE( areas[0].rings.size(), std::size_t( 2 ) );
  QCOMPARE( complaint( 3, 3, loop, { 10 } ), QString() );
}

void TestBandAreas::aRingAroundARing()
{
  // High, low, high, low, high around a middle: each hole belongs to the ring next around it.
  std::vector<double> pressures;
  for ( int row = 0; row < 21; ++row )
  {
    for ( int column = 0; column < 21; ++column )
      pressures.push_back( std::max( std::abs( row - 10 ), std::abs( column - 10 ) ) / 2 % 2 == 0 ? 5.0 : 15.0 );
  }
  const std::vector<Area> areas = areasOf( pressureTerrain( 21, 21, pressures ), { 10 } );
  QCOMPARE( areas.size(), std::size_t( 6 ) );
  QCOMPARE( std::count_if( areas.begin(), areas.end(), []( const Area &area ) { return area.rings.size() == 2; } ), 5 );
  QCOMPARE( complaint( 21, 21, pressures, { 10 } ), QString() );
}

void TestBandAreas::bordersHaveFewVertices()
{
  std::vector<double> pressures;
  for ( int row = 0; row < 50; ++row )
  {
    for ( int column = 0; column < 60; ++column )
      pressures.push_back( column < 30 ? 5.0 : 15.0 );
  }
  for ( const Area &area : areasOf( pressureTerrain( 60, 50, pressures ), { 8 } ) )
    QCOMPARE( area.rings[0].size(), std::size_t( 1 + 4 + 50 ) ); // four corners, and the limit crossed in each row
}

void TestBandAreas::anyRaster_data()
{
  QTest::addColumn<int>( "columns" );
  QTest::addColumn<int>( "rows" );
  QTest::addColumn<double>( "missing" );
  QTest::addColumn<bool>( "whole" );
  QTest::newRow( "smooth numbers, nothing missing" ) << 24 << 18 << 0.0 << false;
  QTest::newRow( "smooth numbers, a few missing" ) << 24 << 18 << 0.1 << false;
  QTest::newRow( "smooth numbers, half missing" ) << 24 << 18 << 0.5 << false;
  QTest::newRow( "smooth numbers, most missing" ) << 24 << 18 << 0.8 << false;
  QTest::newRow( "numbers that meet the limits, nothing missing" ) << 24 << 18 << 0.0 << true;
  QTest::newRow( "numbers that meet the limits, a third missing" ) << 24 << 18 << 0.35 << true;
  QTest::newRow( "one row" ) << 40 << 1 << 0.2 << true;
  QTest::newRow( "one column" ) << 1 << 40 << 0.2 << true;
}

void TestBandAreas::anyRaster()
{
  QFETCH( int, columns );
  QFETCH( int, rows );
  QFETCH( double, missing );
  QFETCH( bool, whole );
  std::mt19937 random( 7 );
  std::uniform_real_distribution<double> unit( 0.0, 1.0 );
  for ( int run = 0; run < 4; ++run )
  {
    std::vector<double> pressures;
    for ( int i = 0; i < columns * rows; ++i )
    {
      const double pressure = whole ? std::floor( 8.0 * unit( random ) ) : 8.0 * unit( random );
      pressures.push_back( unit( random ) < missing ? NONE : pressure );
    }
    QCOMPARE( complaint( columns, rows, pressures, { 2, 3, 6 } ), QString() );
  }
}

void TestBandAreas::agreesWithGdal()
{
  // A hilly raster without holes, where both take values straight between centres and hold them at the border.
  test::SmallRaster raster;
  raster.driver = "MEM";
  raster.type = GDT_Float64;
  raster.columns = 90;
  raster.rows = 70;
  raster.geoTransform = test::centresAt( 0.0, 0.0, 1.0 );
  raster.bands = { {} };
  for ( int row = 0; row < raster.rows; ++row )
  {
    for ( int column = 0; column < raster.columns; ++column )
    {
      const double wave = 20.0 * std::sin( 0.11 * column ) * std::cos( 0.13 * row ) + 0.2 * row;
      raster.bands[0].push_back( static_cast<float>( 50.0 + wave ) );
    }
  }
  const test::DatasetPointer dataset = test::create( "", raster );
  const std::vector<double> limits { 37.5, 45.1, 52.3, 60.7 };
  const test::DatasetPointer contours = test::gdalContours( dataset->GetRasterBand( 1 ), limits, true );
  QVERIFY( contours );
  std::map<int, double> expected;
  for ( const OGRFeatureUniquePtr &feature : *contours->GetLayer( 0 ) )
  {
    // The upper bound names the band; the highest has none of its own.
    const double most = feature->GetFieldAsDouble( 1 );
    expected[bandOf( most, limits ) - ( most > 100.0 ? 0 : 1 )] +=
      feature->GetGeometryRef()->toMultiPolygon()->get_Area();
  }
  const std::map<int, double> sums = totals( areasOf( pressureTerrain( 90, 70, raster.bands[0] ), limits ) );
  QCOMPARE( sums.size(), expected.size() );
  for ( const auto &[band, area] : expected )
    QVERIFY2( std::abs( sums.at( band ) - area ) < 1e-3, qPrintable( QString::number( sums.at( band ) - area ) ) );
}

void TestBandAreas::insideAnArea()
{
  const AreaMask mask( { { { { 0.5, 0.5 }, { 3.5, 0.5 }, { 3.5, 2.5 }, { 0.5, 2.5 } } } }, 6 );
  const std::vector<Area> areas = areasOf( pressureTerrain( 6, 6, std::vector<double>( 36, 1.0 ) ), { 10 }, &mask );
  QCOMPARE( areas.size(), std::size_t( 1 ) );
  QCOMPARE( signedArea( areas[0].rings[0] ), 6.0 );
}

void TestBandAreas::aMapThatIsNotMirrored()
{
  // Rows that run northwards: outer rings still turn counter-clockwise.
  std::vector<double> grounds( 25, -1.0 );
  grounds[12] = NONE;
  const MemoryTerrain terrain( 5, 5, grounds, { 100.0, 2.0, 0.0, 200.0, 0.0, 3.0 } );
  const std::vector<Area> areas = areasOf( terrain, { 10 } );
  QCOMPARE( areas.size(), std::size_t( 1 ) );
  QCOMPARE( signedArea( areas[0].rings[0] ), 10.0 * 15.0 );
  QCOMPARE( signedArea( areas[0].rings[1] ), -6.0 );
  QCOMPARE( areas[0].rings[0].front().x, areas[0].rings[0].back().x );
}

void TestBandAreas::threadsGiveTheSameBits()
{
  std::mt19937 random( 3 );
  std::uniform_real_distribution<double> unit( 0.0, 8.0 );
  std::vector<double> pressures( 300 * 900 );
  std::generate( pressures.begin(), pressures.end(), [&] { return unit( random ); } );
  MemoryTerrain terrain = pressureTerrain( 300, 900, pressures );
  std::vector<Area> first;
  for ( const int block : { 16, 256 } )
  {
    terrain.setBlock( block );
    for ( const unsigned threads : { 1u, 2u, 4u } )
    {
      const std::vector<Area> areas = areasOf( terrain, { 2, 4, 6 }, nullptr, threads );
      if ( first.empty() )
        first = areas;
      QCOMPARE( areas.size(), first.size() );
      for ( std::size_t i = 0; i < areas.size(); ++i )
      {
        QCOMPARE( areas[i].band, first[i].band );
        QCOMPARE( areas[i].rings.size(), first[i].rings.size() );
        for ( std::size_t ring = 0; ring < areas[i].rings.size(); ++ring )
        {
          const std::vector<TerrainPoint> &a = areas[i].rings[ring];
          const std::vector<TerrainPoint> &b = first[i].rings[ring];
          QVERIFY( std::equal( a.begin(), a.end(), b.begin(), b.end(),
            []( const TerrainPoint &p, const TerrainPoint &q ) { return p.x == q.x && p.y == q.y; } ) );
        }
      }
    }
  }
}

void TestBandAreas::cancelled()
{
  class CancelledMonitor : public Monitor
  {
    public:
      bool cancelled() const override { return true; }
  };
  CancelledMonitor monitor;
  BandAreaRequest request;
  request.water = plainWater();
  const MemoryTerrain terrain = pressureTerrain( 2, 2, { 1, 2, 3, 4 } );
  QVERIFY_EXCEPTION_THROWN(
    traceBandAreas( terrain, request, monitor, 0.0, 1.0, []( int, const std::vector<std::vector<TerrainPoint>> & ) {} ),
    Cancelled );
}

QTEST_APPLESS_MAIN( TestBandAreas )
#include "testbandareas.moc"
