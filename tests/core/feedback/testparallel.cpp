// SPDX-License-Identifier: GPL-2.0-or-later
// Work on several threads: every item once, progress that never falls, failures and cancel that reach the caller.
#include "core/feedback/parallel.h"

#include <QTest>

#include <atomic>
#include <stdexcept>
#include <vector>

using namespace stillhead;

namespace
{

  struct WatchingMonitor : public Monitor
  {
      bool cancelled() const override { return ++asked > cancelAfter; }
      void progress( double fraction ) override { fractions.push_back( fraction ); }

      mutable std::atomic<int> asked { 0 };
      int cancelAfter = 1 << 30;
      std::vector<double> fractions; //!< told by the calling thread only
  };

} // namespace

class TestParallel : public QObject
{
    Q_OBJECT

  private slots:
    void everyItemOnce_data();
    void everyItemOnce();
    void progressNeverFalls();
    void nothingToDo();
    void failureReachesTheCaller();
    void cancelReachesTheCaller();
    void threadCounts();
};

void TestParallel::everyItemOnce_data()
{
  QTest::addColumn<int>( "items" );
  QTest::addColumn<int>( "chunk" );
  QTest::addColumn<unsigned>( "threads" );
  QTest::newRow( "one thread" ) << 1000 << 7 << 1u;
  QTest::newRow( "four threads" ) << 1000 << 7 << 4u;
  QTest::newRow( "as many as the machine has" ) << 1000 << 7 << 0u;
  QTest::newRow( "more threads than chunks" ) << 5 << 4 << 16u;
  QTest::newRow( "chunk of nothing is a chunk of one" ) << 9 << 0 << 3u;
}

void TestParallel::everyItemOnce()
{
  QFETCH( int, items );
  QFETCH( int, chunk );
  QFETCH( unsigned, threads );
  std::vector<std::atomic<int>> done( static_cast<std::size_t>( items ) );
  std::atomic<unsigned> largestWorker { 0 };
  Monitor monitor;
  parallelRanges( done.size(), static_cast<std::size_t>( chunk ), threads, monitor, 0.0, 1.0,
    [&]( std::size_t first, std::size_t last, unsigned worker ) {
      for ( std::size_t i = first; i < last; ++i )
        ++done[i];
      if ( worker > largestWorker )
        largestWorker = worker;
    } );
  for ( const std::atomic<int> &count : done )
    QCOMPARE( count.load(), 1 );
  QVERIFY( largestWorker < threadCount( threads ) );
}

void TestParallel::progressNeverFalls()
{
  for ( const unsigned threads : { 1u, 4u } )
  {
    WatchingMonitor monitor;
    parallelRanges( 200, 3, threads, monitor, 0.25, 0.5, []( std::size_t, std::size_t, unsigned ) {} );
    QVERIFY( !monitor.fractions.empty() );
    double before = 0.25;
    for ( const double fraction : monitor.fractions )
    {
      QVERIFY( fraction >= before && fraction <= 0.5 );
      before = fraction;
    }
    QCOMPARE( monitor.fractions.back(), 0.5 );
  }
}

void TestParallel::nothingToDo()
{
  Monitor monitor;
  bool called = false;
  parallelRanges( 0, 8, 4, monitor, 0.0, 1.0, [&]( std::size_t, std::size_t, unsigned ) { called = true; } );
  QVERIFY( !called );
}

void TestParallel::failureReachesTheCaller()
{
  for ( const unsigned threads : { 1u, 4u } )
  {
    Monitor monitor;
    std::atomic<int> after { 0 };
    try
    {
      parallelRanges( 100000, 1, threads, monitor, 0.0, 1.0, [&]( std::size_t first, std::size_t, unsigned ) {
        if ( first == 10 )
          throw std::runtime_error( "item ten" );
        after += first > 10 ? 1 : 0;
      } );
      QFAIL( "nothing thrown" );
    }
    catch ( const std::runtime_error &error )
    {
      QCOMPARE( error.what(), "item ten" );
    }
    if ( threads == 1 )
      QCOMPARE( after.load(), 0 );
  }
}

void TestParallel::cancelReachesTheCaller()
{
  for ( const unsigned threads : { 1u, 4u } )
  {
    WatchingMonitor monitor;
    monitor.cancelAfter = 5;
    std::atomic<int> chunks { 0 };
    QVERIFY_EXCEPTION_THROWN(
      parallelRanges( 1000, 10, threads, monitor, 0.0, 1.0, [&]( std::size_t, std::size_t, unsigned ) { ++chunks; } ),
      Cancelled );
    QVERIFY( chunks <= 5 );
  }
}

void TestParallel::threadCounts()
{
  QCOMPARE( threadCount( 3 ), 3u );
  QVERIFY( threadCount( 0 ) >= 1 );
}

QTEST_APPLESS_MAIN( TestParallel )
#include "testparallel.moc"
