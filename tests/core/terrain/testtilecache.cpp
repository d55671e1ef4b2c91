// SPDX-License-Identifier: GPL-2.0-or-later
// The tile cache: shapes, values, what is read how often, budget, failures, threads.
#include "core/terrain/tilecache.h"

#include <QTest>

#include <atomic>
#include <chrono>
#include <cmath>
#include <condition_variable>
#include <functional>
#include <limits>
#include <stdexcept>
#include <thread>

using namespace stillhead;

namespace
{

  //! Every pixel's value is its own number; reads are counted and may be interfered with.
  class CountingSource : public ElevationSource
  {
    public:
      CountingSource( int columns, int rows, int blockColumns, int blockRows )
        : mGrid( columns, rows, { 0.0, 1.0, 0.0, 0.0, 0.0, -1.0 } )
        , mBlockColumns( blockColumns )
        , mBlockRows( blockRows )
      {
      }

      const RasterGrid &grid() const override { return mGrid; }
      int blockColumns() const override { return mBlockColumns; }
      int blockRows() const override { return mBlockRows; }
      void read( int column, int row, int columns, int rows, double *elevationsM ) const override
      {
        ++reads;
        if ( before )
          before( column, row );
        for ( int r = 0; r < rows; ++r )
        {
          for ( int c = 0; c < columns; ++c )
            *elevationsM++ = ( row + r ) * 100000.0 + column + c;
        }
      }

      mutable std::atomic<int> reads { 0 };
      std::function<void( int column, int row )> before;

    private:
      RasterGrid mGrid;
      int mBlockColumns;
      int mBlockRows;
  };

  constexpr std::size_t TILE_BYTES = 256 * 256 * sizeof( double );

} // namespace

//! Four by two feet that fit into 32-bit floats: row × 10 + column + 0.1, none at the first pixel.
class FloatSource : public ElevationSource
{
  public:
    const RasterGrid &grid() const override { return mGrid; }
    double metresPerFloat() const override { return 0.3048; }
    void readFloats( int column, int row, int columns, int rows, float *values ) const override
    {
      for ( int r = row; r < row + rows; ++r )
      {
        for ( int c = column; c < column + columns; ++c )
          *values++ = r + c == 0 ? std::numeric_limits<float>::quiet_NaN() : static_cast<float>( 10 * r + c ) + 0.1f;
      }
    }
    void read( int, int, int, int, double * ) const override { throw std::logic_error( "floats are asked for" ); }

  private:
    RasterGrid mGrid { 4, 2, { 0.0, 1.0, 0.0, 0.0, 0.0, -1.0 } };
};

class TestTileCache : public QObject
{
    Q_OBJECT

  private slots:
    void shape_data();
    void shape();
    void everyPixelIsInItsTile();
    void aTileIsReadOnceByManyThreads();
    void othersReadWhileOneReads();
    void aFailureReachesEverybodyAndIsRetried();
    void theLeastRecentlyUsedIsDropped();
    void aTileInUseOutlivesItsPlace();
    void oneTileLargerThanTheBudget();
    void clearedTilesAreReadAgain();
    void floatsTakeTheirFactor();
};

void TestTileCache::shape_data()
{
  QTest::addColumn<int>( "columns" );
  QTest::addColumn<int>( "blockColumns" );
  QTest::addColumn<int>( "blockRows" );
  QTest::addColumn<int>( "tileColumns" );
  QTest::addColumn<int>( "tileRows" );
  QTest::newRow( "tiles of sensible size as they are" ) << 8000 << 256 << 256 << 256 << 256;
  QTest::newRow( "large tiles as they are" ) << 8000 << 512 << 512 << 512 << 512;
  QTest::newRow( "small blocks joined" ) << 8000 << 128 << 128 << 256 << 256;
  QTest::newRow( "huge tiles split evenly" ) << 8000 << 2048 << 2048 << 512 << 512;
  QTest::newRow( "single-row strips" ) << 8000 << 8000 << 1 << 500 << 256;
  QTest::newRow( "strips of sixteen rows" ) << 4096 << 4096 << 16 << 512 << 256;
  QTest::newRow( "very wide strips: low tiles" ) << 100000 << 100000 << 1 << 500 << 20;
  QTest::newRow( "very wide strips of eight rows" ) << 100000 << 100000 << 8 << 500 << 16;
  QTest::newRow( "one block for the whole of a large raster" ) << 6000 << 6000 << 6000 << 500 << 349;
  QTest::newRow( "a small raster in one strip" ) << 61 << 61 << 33 << 244 << 231;
}

void TestTileCache::shape()
{
  QFETCH( int, columns );
  QFETCH( int, blockColumns );
  QFETCH( int, blockRows );
  const TileShape shape = tileShapeFor( columns, blockColumns, blockRows );
  QTEST( shape.columns, "tileColumns" );
  QTEST( shape.rows, "tileRows" );
}

void TestTileCache::everyPixelIsInItsTile()
{
  const CountingSource source( 700, 300, 256, 256 );
  TileCache cache( source );
  for ( int row = 0; row < 300; ++row )
  {
    for ( int column = 0; column < 700; ++column )
    {
      const std::shared_ptr<const ElevationTile> tile = cache.tileAt( column, row );
      QVERIFY( tile->holds( column, row ) );
      QCOMPARE( tile->at( column, row ), row * 100000.0 + column );
    }
  }
  QCOMPARE( source.reads.load(), 6 );
  QVERIFY( !cache.tileAt( 0, 0 )->holds( 256, 0 ) );
  QCOMPARE( cache.tileAt( 699, 299 )->columns, 700 - 512 );
  QCOMPARE( cache.tileAt( 699, 299 )->rows, 300 - 256 );
}

void TestTileCache::aTileIsReadOnceByManyThreads()
{
  CountingSource source( 256, 256, 256, 256 );
  source.before = []( int, int ) { std::this_thread::sleep_for( std::chrono::milliseconds( 20 ) ); };
  TileCache cache( source );
  std::vector<const ElevationTile *> seen( 8, nullptr );
  std::vector<std::thread> threads;
  for ( std::size_t i = 0; i < seen.size(); ++i )
    threads.emplace_back( [&cache, &seen, i] { seen[i] = cache.tileAt( 10, 10 ).get(); } );
  for ( std::thread &thread : threads )
    thread.join();
  QCOMPARE( source.reads.load(), 1 );
  for ( const ElevationTile *tile : seen )
    QCOMPARE( tile, seen[0] );
}

void TestTileCache::othersReadWhileOneReads()
{
  CountingSource source( 512, 256, 256, 256 );
  std::mutex mutex;
  std::condition_variable otherWasRead;
  bool done = false;
  bool waitedInVain = false;
  // The left tile can be read only once the right one has been: a lock held while reading would stop both.
  source.before = [&]( int column, int ) {
    std::unique_lock<std::mutex> lock( mutex );
    if ( column == 0 )
    {
      waitedInVain = !otherWasRead.wait_for( lock, std::chrono::seconds( 20 ), [&done] { return done; } );
      return;
    }
    done = true;
    otherWasRead.notify_all();
  };
  TileCache cache( source );
  std::thread left( [&cache] { cache.tileAt( 0, 0 ); } );
  std::thread right( [&cache] { cache.tileAt( 300, 0 ); } );
  left.join();
  right.join();
  QVERIFY( !waitedInVain );
}

void TestTileCache::aFailureReachesEverybodyAndIsRetried()
{
  CountingSource source( 256, 256, 256, 256 );
  std::atomic<bool> broken { true };
  source.before = [&broken]( int, int ) {
    std::this_thread::sleep_for( std::chrono::milliseconds( 20 ) );
    if ( broken )
      throw std::runtime_error( "broken block" );
  };
  TileCache cache( source );
  std::atomic<int> failures { 0 };
  std::vector<std::thread> threads;
  for ( int i = 0; i < 4; ++i )
  {
    threads.emplace_back( [&cache, &failures] {
      try
      {
        cache.tileAt( 1, 1 );
      }
      catch ( const std::runtime_error &error )
      {
        if ( std::string( error.what() ) == "broken block" )
          ++failures;
      }
    } );
  }
  for ( std::thread &thread : threads )
    thread.join();
  QCOMPARE( failures.load(), 4 );

  broken = false;
  QCOMPARE( cache.tileAt( 1, 1 )->at( 1, 1 ), 100001.0 );
}

void TestTileCache::theLeastRecentlyUsedIsDropped()
{
  const CountingSource source( 1024, 256, 256, 256 );
  TileCache cache( source, 2 * TILE_BYTES );
  cache.tileAt( 0, 0 );
  cache.tileAt( 256, 0 );
  cache.tileAt( 0, 0 );
  cache.tileAt( 512, 0 );
  QCOMPARE( source.reads.load(), 3 );
  cache.tileAt( 0, 0 );
  QCOMPARE( source.reads.load(), 3 );
  cache.tileAt( 256, 0 );
  QCOMPARE( source.reads.load(), 4 );
}

void TestTileCache::aTileInUseOutlivesItsPlace()
{
  const CountingSource source( 1024, 256, 256, 256 );
  TileCache cache( source, TILE_BYTES );
  const std::shared_ptr<const ElevationTile> held = cache.tileAt( 5, 7 );
  cache.tileAt( 256, 0 );
  cache.tileAt( 512, 0 );
  QCOMPARE( held->at( 5, 7 ), 700005.0 );
  QCOMPARE( held.use_count(), 1L );
}

void TestTileCache::oneTileLargerThanTheBudget()
{
  const CountingSource source( 512, 256, 256, 256 );
  TileCache cache( source, 1 );
  cache.tileAt( 0, 0 );
  cache.tileAt( 1, 1 );
  QCOMPARE( source.reads.load(), 1 );
  cache.tileAt( 256, 0 );
  cache.tileAt( 0, 0 );
  QCOMPARE( source.reads.load(), 3 );
}

void TestTileCache::clearedTilesAreReadAgain()
{
  const CountingSource source( 200, 200, 256, 256 );
  TileCache cache( source );
  const std::shared_ptr<const ElevationTile> held = cache.tileAt( 1, 1 );
  cache.clear();
  QCOMPARE( cache.tileAt( 1, 1 )->at( 1, 1 ), held->at( 1, 1 ) );
  QCOMPARE( source.reads.load(), 2 );
}

void TestTileCache::floatsTakeTheirFactor()
{
  const FloatSource source;
  TileCache cache( source );
  const std::shared_ptr<const ElevationTile> tile = cache.tileAt( 0, 0 );
  QCOMPARE( tile->at( 2, 1 ), 0.3048 * static_cast<double>( 12.1f ) );
  QVERIFY( std::isnan( tile->at( 0, 0 ) ) );
  QCOMPARE( tile->bytes(), 4u * 2u * sizeof( float ) );
}

QTEST_APPLESS_MAIN( TestTileCache )
#include "testtilecache.moc"
