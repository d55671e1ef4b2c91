// SPDX-License-Identifier: GPL-2.0-or-later
// Lines of equal ground elevation: planes and cones whose lines need no paper, real and random ground on which every vertex
// and every step is asked for its elevation by another bilinear surface, and GDAL's contours as a second opinion.
#include "core/surface/groundlines.h"
#include "core/surface/groundtracer.h"
#include "tests/support/bilinear.h"
#include "tests/support/gdalcontours.h"
#include "tests/support/realdata.h"
#include "tests/support/tolerance.h"

#include <QTest>

#include <cmath>
#include <limits>
#include <map>
#include <random>
#include <set>
#include <tuple>

using namespace stillhead;
using stillhead::test::MemoryTerrain;
using stillhead::test::NODATA;

namespace
{
  //! What rounding does to an elevation of some hundred metres on the way to the map and back.
  constexpr double ROUNDING_M = 1e-8;

  struct GroundLine
  {
      std::size_t elevation = 0;
      std::vector<TerrainPoint> places;

      bool isClosed() const { return places.front().x == places.back().x && places.front().y == places.back().y; }

      double length() const
      {
        double sum = 0.0;
        for ( std::size_t i = 1; i < places.size(); ++i )
          sum += std::hypot( places[i].x - places[i - 1].x, places[i].y - places[i - 1].y );
        return sum;
      }

      //! Positive where it runs counter-clockwise.
      double area() const
      {
        double sum = 0.0;
        for ( std::size_t i = 1; i < places.size(); ++i )
          sum += 0.5 * ( places[i - 1].x * places[i].y - places[i].x * places[i - 1].y );
        return sum;
      }
  };

  std::vector<GroundLine> linesOf( const ElevationSource &terrain, const GroundLineRequest &request )
  {
    std::vector<GroundLine> lines;
    Monitor monitor;
    traceGroundLines(
      terrain, request, monitor, 0.0, 1.0, [&lines]( std::size_t elevation, const std::vector<TerrainPoint> &line ) {
        lines.push_back( { elevation, line } );
      } );
    return lines;
  }

  std::vector<GroundLine> linesOf( const ElevationSource &terrain, const std::vector<double> &elevationsM )
  {
    GroundLineRequest request;
    request.elevationsM = elevationsM;
    request.threads = 2;
    return linesOf( terrain, request );
  }

  double lengthOf( const std::vector<GroundLine> &lines )
  {
    double sum = 0.0;
    for ( const GroundLine &line : lines )
      sum += line.length();
    return sum;
  }

  double groundAt( const MemoryTerrain &terrain, const TerrainPoint &map )
  {
    TerrainPoint pixel = terrain.grid().toPixel( map );
    // The way over the map leaves a vertex on a line of cell centres off it by a rounding.
    for ( double *position : { &pixel.x, &pixel.y } )
    {
      const double nearest = 0.5 * std::round( 2.0 * *position );
      if ( std::abs( *position - nearest ) < 1e-7 )
        *position = nearest;
    }
    return test::bilinear( terrain, pixel.x, pixel.y );
  }

  //! Whether every vertex has its elevation, and the middle of every step nearly; blank if so.
  QString complaint(
    const MemoryTerrain &terrain, const std::vector<GroundLine> &lines, const std::vector<double> &elevationsM )
  {
    for ( const GroundLine &line : lines )
    {
      const double expected = elevationsM[line.elevation];
      for ( std::size_t i = 0; i < line.places.size(); ++i )
      {
        const double vertexM = groundAt( terrain, line.places[i] );
        if ( !( std::abs( vertexM - expected ) < ROUNDING_M ) )
          return QString( "a vertex of %1 m lies at %2 m" ).arg( expected ).arg( vertexM, 0, 'g', 17 );
        if ( i == 0 )
          continue;
        const TerrainPoint &a = line.places[i - 1];
        const TerrainPoint &b = line.places[i];
        const double middleM = groundAt( terrain, { 0.5 * ( a.x + b.x ), 0.5 * ( a.y + b.y ) } );
        if ( !( std::abs( middleM - expected ) < GROUND_LINE_TOLERANCE_M + ROUNDING_M ) )
          return QString( "a step of %1 m leads over %2 m" ).arg( expected ).arg( middleM, 0, 'g', 17 );
      }
    }
    return QString();
  }

  //! Places (in pixels, to a millionth) at which neighbouring cells say that the ground has an elevation.
  std::set<std::pair<long long, long long>> crossingsOf( const MemoryTerrain &terrain, double elevationM )
  {
    std::set<std::pair<long long, long long>> places;
    const int columns = terrain.grid().columns();
    const int rows = terrain.grid().rows();
    const auto at = [&]( int column, int row ) {
      return terrain.at( std::clamp( column, 0, columns - 1 ), std::clamp( row, 0, rows - 1 ) );
    };
    const auto isWhole = [&]( int column, int row ) {
      return !std::isnan(
        at( column, row ) + at( column + 1, row ) + at( column, row + 1 ) + at( column + 1, row + 1 ) );
    };
    const auto position = []( double node, int cells ) { return std::clamp( node, -0.5, cells - 0.5 ); };
    const auto cross = [&]( int column, int row, int right, int down ) {
      const double a = at( column, row );
      const double b = at( column + right, row + down );
      const bool hasGround = isWhole( column, row ) || isWhole( column - down, row - right );
      if ( !hasGround || ( a >= elevationM ) == ( b >= elevationM ) )
        return;
      const double share = ( elevationM - a ) / ( b - a );
      const double x = position( column, columns );
      const double y = position( row, rows );
      places.insert( { std::llround( 1e6 * ( x + share * ( position( column + right, columns ) - x ) ) ),
        std::llround( 1e6 * ( y + share * ( position( row + down, rows ) - y ) ) ) } );
    };
    for ( int row = -1; row <= rows; ++row )
    {
      for ( int column = -1; column <= columns; ++column )
      {
        if ( column < columns )
          cross( column, row, 1, 0 );
        if ( row < rows )
          cross( column, row, 0, 1 );
      }
    }
    return places;
  }

  //! Rough ground of whole cells between 0 and 10 m, with some missing.
  MemoryTerrain roughGround( std::mt19937 &random, int columns, int rows, double missing )
  {
    std::uniform_real_distribution<double> unit( 0.0, 1.0 );
    std::vector<double> grounds;
    for ( int i = 0; i < columns * rows; ++i )
    {
      const double groundM = 10.0 * unit( random );
      grounds.push_back( unit( random ) < missing ? NODATA : groundM );
    }
    MemoryTerrain terrain( columns, rows, std::move( grounds ) );
    terrain.setBlock( 4 );
    return terrain;
  }
} // namespace

class TestGroundLines : public QObject
{
    Q_OBJECT

  private slots:
    void plane();
    void slantingPlane();
    void cone();
    void higherGroundIsLeft();
    void saddle();
    void throughCellCentres();
    void endsWhereGroundIsUnknown();
    void realGround_data();
    void realGround();
    void agreesWithGdal();
    void roughGroundHasEveryCrossing();
    void staysWithinTheArea();
    void threadsGiveTheSameLines();
    void handsOutWhatIsTooLong();
    void cancelled();
};

// Ground rising 2 m a cell to the east: 5 m is met half-way between columns 2 and 3, and nowhere else.
void TestGroundLines::plane()
{
  const MemoryTerrain terrain =
    MemoryTerrain::sampled( 6, 4, test::centresAt( 0.0, 0.0, 1.0 ), []( double x, double ) { return 2.0 * x; } );
  const std::vector<GroundLine> lines = linesOf( terrain, { 50.0, 5.0 } );
  QCOMPARE( lines.size(), std::size_t( 1 ) );
  QCOMPARE( lines[0].elevation, std::size_t( 1 ) );
  // From edge to edge of the raster, southwards: the higher ground, in the east, is on its left.
  STILLHEAD_SAME( lines[0].places.front().y, 0.5 );
  STILLHEAD_SAME( lines[0].places.back().y, -3.5 );
  for ( const TerrainPoint &place : lines[0].places )
    STILLHEAD_SAME( place.x, 2.5 );
}

void TestGroundLines::slantingPlane()
{
  const MemoryTerrain terrain = MemoryTerrain::sampled( 40, 30, test::centresAt( 1000.0, 5000.0, 2.0 ),
    []( double x, double y ) { return 100.0 + 0.31 * ( x - 1000.0 ) - 0.17 * ( y - 5000.0 ); } );
  const std::vector<double> elevations { 105.0, 118.3 };
  const std::vector<GroundLine> lines = linesOf( terrain, elevations );
  QCOMPARE( lines.size(), std::size_t( 2 ) );
  for ( const GroundLine &line : lines )
  {
    for ( const TerrainPoint &place : line.places )
    {
      // Beyond the outer cell centres the ground is held.
      const double x = std::clamp( place.x, 1000.0, 1078.0 );
      const double y = std::clamp( place.y, 4942.0, 5000.0 );
      STILLHEAD_NEAR( 100.0 + 0.31 * ( x - 1000.0 ) - 0.17 * ( y - 5000.0 ), elevations[line.elevation], 1e-10 );
    }
  }
}

void TestGroundLines::cone()
{
  // A hill of 1 in 4, its top between cells: the line of every elevation is a circle, as nearly as cells of a metre show one.
  const double topX = 50.3;
  const double topY = -49.8;
  const MemoryTerrain terrain = MemoryTerrain::sampled( 101, 101, test::centresAt( 0.0, 0.0, 1.0 ),
    [=]( double x, double y ) { return 200.0 - 0.25 * std::hypot( x - topX, y - topY ); } );
  const std::vector<double> elevations { 190.0, 195.0 };
  const std::vector<GroundLine> lines = linesOf( terrain, elevations );
  QCOMPARE( lines.size(), std::size_t( 2 ) );
  QCOMPARE( complaint( terrain, lines, elevations ), QString() );
  for ( const GroundLine &line : lines )
  {
    QVERIFY( line.isClosed() );
    const double radius = ( 200.0 - elevations[line.elevation] ) / 0.25;
    // A cell's straight sides lie within 1/8 of a square metre over the radius of a cone.
    for ( const TerrainPoint &place : line.places )
      STILLHEAD_NEAR( std::hypot( place.x - topX, place.y - topY ), radius, 0.25 / radius );
    STILLHEAD_NEAR( line.area(), M_PI * radius * radius, M_PI );
  }
}

void TestGroundLines::higherGroundIsLeft()
{
  // A round hill and a round hollow, on a map as usual and on one whose rows run northwards.
  for ( const double rowStep : { -1.0, 1.0 } )
  {
    const MemoryTerrain terrain =
      MemoryTerrain::sampled( 60, 30, { -0.5, 1.0, 0.0, -15.0 * rowStep, 0.0, rowStep }, []( double x, double y ) {
        return 10.0 * std::exp( -0.03 * ( std::pow( x - 15.0, 2 ) + y * y ) )
          - 10.0 * std::exp( -0.03 * ( std::pow( x - 45.0, 2 ) + y * y ) );
      } );
    const std::vector<GroundLine> lines = linesOf( terrain, { 3.0, -3.0 } );
    QCOMPARE( lines.size(), std::size_t( 2 ) );
    for ( const GroundLine &line : lines )
    {
      QVERIFY( line.isClosed() );
      QVERIFY( line.elevation == 0 ? line.area() > 50.0 : line.area() < -50.0 );
    }
  }
}

// Two highs and two lows crosswise, 80 m apart in a cell: branches bend, and more places on them are solved.
void TestGroundLines::saddle()
{
  const MemoryTerrain terrain( 2, 2, { 0.0, 80.0, 80.0, 0.0 } );
  for ( const double elevation : { 20.0, 39.0, 41.0, 79.0 } )
  {
    const std::vector<GroundLine> lines = linesOf( terrain, { elevation } );
    QCOMPARE( lines.size(), std::size_t( 2 ) );
    QCOMPARE( complaint( terrain, lines, { elevation } ), QString() );
    for ( const GroundLine &line : lines )
    {
      // Below the saddle (40 m) the lines part the lows from the highs, above it the highs from each other.
      double least = HUGE_VAL;
      for ( const TerrainPoint &place : line.places )
        least = std::min( least, std::abs( place.x - 0.5 ) + std::abs( place.y + 0.5 ) );
      QVERIFY( least > 0.1 );
      // The nearer to the saddle the sharper the bend.
      QVERIFY( line.places.size() > ( std::abs( elevation - 40.0 ) < 5.0 ? 20U : 2U ) );
    }
  }
}

// Ground of the very elevation counts as above it; a line through cell centres is straight and has each place once.
void TestGroundLines::throughCellCentres()
{
  const MemoryTerrain terrain =
    MemoryTerrain::sampled( 6, 6, test::centresAt( 0.0, 0.0, 1.0 ), []( double x, double y ) { return x - y; } );
  const std::vector<GroundLine> lines = linesOf( terrain, { 5.0 } );
  QCOMPARE( lines.size(), std::size_t( 1 ) );
  for ( std::size_t i = 0; i < lines[0].places.size(); ++i )
  {
    const TerrainPoint &place = lines[0].places[i];
    STILLHEAD_SAME( std::clamp( place.x, 0.0, 5.0 ) - std::clamp( place.y, -5.0, 0.0 ), 5.0 );
    if ( i > 0 )
      QVERIFY( std::hypot( place.x - lines[0].places[i - 1].x, place.y - lines[0].places[i - 1].y ) > 0.4 );
  }
  QVERIFY( linesOf( MemoryTerrain( 3, 3, std::vector<double>( 9, 5.0 ) ), { 5.0 } ).empty() );
  QVERIFY( linesOf( MemoryTerrain( 3, 3, { 4, 4, 4, 4, 5, 4, 4, 4, 4 } ), { 5.0 } ).empty() );
}

void TestGroundLines::endsWhereGroundIsUnknown()
{
  std::vector<double> grounds;
  for ( int row = 0; row < 9; ++row )
  {
    for ( int column = 0; column < 9; ++column )
      grounds.push_back( row == 4 ? NODATA : column );
  }
  const std::vector<GroundLine> lines = linesOf( MemoryTerrain( 9, 9, grounds ), { 3.5 } );
  QCOMPARE( lines.size(), std::size_t( 2 ) );
  // Beside a missing cell there is no ground from the next cell's centre on.
  STILLHEAD_SAME( lines[0].places.back().y, -3.0 );
  STILLHEAD_SAME( lines[1].places.front().y, -5.0 );
}

void TestGroundLines::realGround_data()
{
  QTest::addColumn<QString>( "file" );
  QTest::addColumn<QVector<double>>( "elevations" );
  QTest::newRow( "surveyed hillside" ) << "bei_5m_utm17n.tif" << QVector<double> { 125.37, 140.001, 151.9, 158.0 };
  QTest::newRow( "volcano, whole metres" ) << "volcano_10m_nztm.tif" << QVector<double> { 100.0, 130.5, 172.25 };
  QTest::newRow( "hills to the sea, whole metres" ) << "olinda_90m_utm25s.tif" << QVector<double> { 0.0, 3.3, 45.5 };
}

void TestGroundLines::realGround()
{
  QFETCH( QString, file );
  QFETCH( QVector<double>, elevations );
  const MemoryTerrain terrain = test::realTerrain( file.toStdString() );
  const std::vector<double> wanted( elevations.begin(), elevations.end() );
  const std::vector<GroundLine> lines = linesOf( terrain, wanted );
  QVERIFY( lines.size() > 3 );
  QCOMPARE( complaint( terrain, lines, wanted ), QString() );
}

void TestGroundLines::agreesWithGdal()
{
  // A surveyed hillside, every 2 m; off the cells' own values, where the two differ in taste.
  const std::string path = test::dataPath( "bei_5m_utm17n.tif" );
  const MemoryTerrain terrain = test::realTerrain( "bei_5m_utm17n.tif" );
  std::vector<double> elevations;
  for ( double elevation = 120.0; elevation < 160.0; elevation += 2.0 )
    elevations.push_back( elevation + 0.001 );
  const test::DatasetPointer dataset( GDALDataset::Open( path.c_str() ) );
  const test::DatasetPointer contours = test::gdalContours( dataset->GetRasterBand( 1 ), elevations, false );
  QVERIFY( contours );
  std::map<long, double> found;
  std::set<std::tuple<long, long long, long long>> vertices; // to a millimetre
  for ( const GroundLine &line : linesOf( terrain, elevations ) )
  {
    const long elevation = std::lround( elevations[line.elevation] );
    found[elevation] += line.length();
    for ( const TerrainPoint &place : line.places )
      vertices.insert( { elevation, std::llround( 1e3 * place.x ), std::llround( 1e3 * place.y ) } );
  }
  std::map<long, double> expected;
  int count = 0;
  for ( const OGRFeatureUniquePtr &feature : *contours->GetLayer( 0 ) )
  {
    const long elevation = std::lround( feature->GetFieldAsDouble( 0 ) );
    const OGRLineString &line = *feature->GetGeometryRef()->toLineString();
    expected[elevation] += line.get_Length();
    for ( const OGRPoint &point : line )
    {
      bool isOurs = false;
      for ( int i = 0; i < 9; ++i )
        isOurs = isOurs
          || vertices.count( { elevation, std::llround( 1e3 * point.getX() ) + i % 3 - 1,
            std::llround( 1e3 * point.getY() ) + i / 3 - 1 } );
      QVERIFY2( isOurs, qPrintable( QString( "%1 %2" ).arg( point.getX() ).arg( point.getY() ) ) );
      ++count;
    }
  }
  QVERIFY( count > 5000 );
  QCOMPARE( found.size(), expected.size() );
  // Its chords run straight from side to side of a square, ours bend where that is off by more than a centimetre. Where two
  // highs and two lows meet crosswise the two decide differently too (ours by the saddle of the surface): a cell's width or two.
  for ( const auto &[elevation, length] : expected )
    STILLHEAD_NEAR( found.at( elevation ), length, 10.0 + 0.003 * length );
}

void TestGroundLines::roughGroundHasEveryCrossing()
{
  std::mt19937 random( 7 );
  for ( int round = 0; round < 60; ++round )
  {
    const int columns = 1 + round % 13;
    const int rows = 1 + round % 11;
    const MemoryTerrain terrain = roughGround( random, columns, rows, round % 3 == 0 ? 0.0 : 0.15 );
    const std::vector<double> elevations { 6.5, 2.5, 5.0 };
    const std::vector<GroundLine> lines = linesOf( terrain, elevations );
    QCOMPARE( complaint( terrain, lines, elevations ), QString() );
    for ( std::size_t i = 0; i < elevations.size(); ++i )
    {
      const std::set<std::pair<long long, long long>> expected = crossingsOf( terrain, elevations[i] );
      std::set<std::pair<long long, long long>> found;
      std::size_t count = 0;
      for ( const GroundLine &line : lines )
      {
        for ( std::size_t v = 0; line.elevation == i && v + ( line.isClosed() ? 1 : 0 ) < line.places.size(); ++v )
        {
          const std::pair<long long, long long> pixel { std::llround( 1e6 * line.places[v].x ),
            std::llround( -1e6 * line.places[v].y ) };
          if ( !expected.count( pixel ) )
            continue; // within a square
          found.insert( pixel );
          ++count;
        }
      }
      QVERIFY( found == expected );
      QCOMPARE( count, expected.size() );
    }
  }
}

void TestGroundLines::staysWithinTheArea()
{
  std::mt19937 random( 11 );
  const MemoryTerrain terrain = roughGround( random, 30, 20, 0.05 );
  const PixelPolygon polygon { { { 4.2, 3.1 }, { 21.7, 1.4 }, { 26.3, 14.8 }, { 9.6, 17.2 } } };
  const PixelPolygon rest { { { -9.0, -9.0 }, { 99.0, -9.0 }, { 99.0, 99.0 }, { -9.0, 99.0 } }, polygon[0] };
  const AreaMask inner( { polygon }, 20 );
  const AreaMask outer( { rest }, 20 );
  GroundLineRequest request;
  request.elevationsM = { 5.0, 3.0 };
  const std::vector<GroundLine> all = linesOf( terrain, request );
  request.area = &inner;
  const std::vector<GroundLine> within = linesOf( terrain, request );
  request.area = &outer;
  const std::vector<GroundLine> without = linesOf( terrain, request );
  // The ground itself is that of the whole terrain: nothing bends at the border, and the parts make the whole.
  QCOMPARE( complaint( terrain, within, request.elevationsM ), QString() );
  QVERIFY( lengthOf( within ) > 50.0 && lengthOf( without ) > 50.0 );
  STILLHEAD_NEAR( lengthOf( within ) + lengthOf( without ), lengthOf( all ), 1e-3 * lengthOf( all ) );
  std::vector<unsigned char> inside( 30 );
  for ( const GroundLine &line : within )
  {
    for ( std::size_t i = 1; i < line.places.size(); ++i )
    {
      const double x = 0.5 * ( line.places[i - 1].x + line.places[i].x );
      const double y = -0.5 * ( line.places[i - 1].y + line.places[i].y );
      inner.markRow( static_cast<int>( std::lround( y ) ), 0, 30, inside.data() );
      QVERIFY( inside[static_cast<std::size_t>( std::lround( x ) )] );
    }
  }
}

void TestGroundLines::threadsGiveTheSameLines()
{
  std::mt19937 random( 3 );
  const MemoryTerrain terrain = roughGround( random, 61, 47, 0.1 );
  GroundLineRequest request;
  request.elevationsM = { 2.0, 5.0, 8.0 };
  std::vector<std::vector<GroundLine>> results;
  for ( const unsigned threads : { 1U, 3U } )
  {
    request.threads = threads;
    results.push_back( linesOf( terrain, request ) );
  }
  QCOMPARE( results[0].size(), results[1].size() );
  for ( std::size_t i = 0; i < results[0].size(); ++i )
  {
    QCOMPARE( results[0][i].elevation, results[1][i].elevation );
    QCOMPARE( results[0][i].places.size(), results[1][i].places.size() );
    for ( std::size_t v = 0; v < results[0][i].places.size(); ++v )
    {
      STILLHEAD_SAME( results[0][i].places[v].x, results[1][i].places[v].x );
      STILLHEAD_SAME( results[0][i].places[v].y, results[1][i].places[v].y );
    }
  }
}

// Where more is open than may be held, lines come in parts: no longer, no shorter, and end to end.
void TestGroundLines::handsOutWhatIsTooLong()
{
  const MemoryTerrain terrain = MemoryTerrain::sampled(
    20, 200, test::centresAt( 0.0, 0.0, 1.0 ), []( double x, double y ) { return x + 3.0 * std::sin( 0.2 * y ); } );
  GroundLineRequest request;
  request.elevationsM = { 10.25 };
  const std::vector<GroundLine> whole = linesOf( terrain, request );
  QCOMPARE( whole.size(), std::size_t( 1 ) );
  request.mostOpenVertices = 50;
  const std::vector<GroundLine> parts = linesOf( terrain, request );
  QVERIFY( parts.size() > 4 );
  STILLHEAD_NEAR( lengthOf( parts ), whole[0].length(), 1e-9 );
  for ( std::size_t i = 0; i < parts.size(); ++i )
  {
    QVERIFY( parts[i].places.size() < 100 );
    if ( i == 0 )
      continue;
    // Southwards, as the higher ground lies in the east.
    STILLHEAD_SAME( parts[i].places.front().x, parts[i - 1].places.back().x );
    STILLHEAD_SAME( parts[i].places.front().y, parts[i - 1].places.back().y );
  }
}

void TestGroundLines::cancelled()
{
  class CancelledMonitor : public Monitor
  {
    public:
      bool cancelled() const override { return true; }
  };
  CancelledMonitor monitor;
  QVERIFY_EXCEPTION_THROWN( traceGroundLines( MemoryTerrain( 2, 2, { 1, 2, 3, 4 } ), { { 2.5 } }, monitor, 0.0, 1.0,
                              []( std::size_t, const std::vector<TerrainPoint> & ) {} ),
    Cancelled );
}

QTEST_APPLESS_MAIN( TestGroundLines )
#include "testgroundlines.moc"
