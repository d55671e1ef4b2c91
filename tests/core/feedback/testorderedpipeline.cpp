// SPDX-License-Identifier: GPL-2.0-or-later
// The ordered pipeline: order, slots, failures and cancel, for any number of threads.
#include "core/feedback/orderedpipeline.h"

#include <QTest>

#include <atomic>
#include <chrono>
#include <mutex>
#include <stdexcept>
#include <thread>
#include <vector>

using namespace stillhead;

namespace
{

  class RecordingMonitor : public Monitor
  {
    public:
      bool cancelled() const override { return mCancelled; }
      void progress( double fraction ) override
      {
        const std::lock_guard<std::mutex> lock( mMutex );
        mFractions.push_back( fraction );
      }
      void cancel() { mCancelled = true; }
      const std::vector<double> &fractions() const { return mFractions; }

    private:
      std::atomic<bool> mCancelled { false };
      std::mutex mMutex;
      std::vector<double> mFractions;
  };

} // namespace

class TestOrderedPipeline : public QObject
{
    Q_OBJECT

  private slots:
    void takesInOrder_data();
    void takesInOrder();
    void noSlotIsUsedTwiceAtOnce();
    void progressRises();
    void failuresStopIt_data();
    void failuresStopIt();
    void cancelStopsIt();
    void nothingToDo();
};

void TestOrderedPipeline::takesInOrder_data()
{
  QTest::addColumn<int>( "threads" );
  QTest::addColumn<int>( "slotCount" );
  QTest::newRow( "one thread" ) << 1 << 3;
  QTest::newRow( "two threads" ) << 2 << 4;
  QTest::newRow( "many threads" ) << 8 << 10;
  QTest::newRow( "more threads than slots" ) << 8 << 2;
  QTest::newRow( "one slot" ) << 4 << 1;
  QTest::newRow( "no slot counts as one" ) << 2 << 0;
}

void TestOrderedPipeline::takesInOrder()
{
  QFETCH( int, threads );
  QFETCH( int, slotCount );
  OrderedPipeline pipeline;
  pipeline.units = 200;
  pipeline.threads = static_cast<unsigned>( threads );
  pipeline.places = static_cast<std::size_t>( slotCount );
  std::vector<std::size_t> made( static_cast<std::size_t>( std::max( 1, slotCount ) ) );
  std::vector<std::size_t> taken;
  pipeline.make = [&made]( std::size_t unit, std::size_t slot ) {
    if ( unit % 7 == 0 )
      std::this_thread::sleep_for( std::chrono::microseconds( 300 ) );
    made[slot] = unit * unit;
  };
  pipeline.take = [&]( std::size_t, std::size_t slot ) { taken.push_back( made[slot] ); };
  Monitor monitor;
  runOrdered( pipeline, monitor, 0.0, 1.0 );
  QCOMPARE( taken.size(), std::size_t( 200 ) );
  for ( std::size_t i = 0; i < taken.size(); ++i )
    QCOMPARE( taken[i], i * i );
}

void TestOrderedPipeline::noSlotIsUsedTwiceAtOnce()
{
  std::vector<std::atomic<int>> users( 3 );
  std::atomic<int> clashes { 0 };
  OrderedPipeline pipeline;
  pipeline.units = 300;
  pipeline.threads = 6;
  pipeline.places = users.size();
  pipeline.make = [&]( std::size_t, std::size_t slot ) { clashes += users[slot].fetch_add( 1 ); };
  pipeline.take = [&]( std::size_t, std::size_t slot ) { users[slot].fetch_sub( 1 ); };
  Monitor monitor;
  runOrdered( pipeline, monitor, 0.0, 1.0 );
  QCOMPARE( clashes.load(), 0 );
}

void TestOrderedPipeline::progressRises()
{
  OrderedPipeline pipeline;
  pipeline.units = 50;
  pipeline.threads = 3;
  pipeline.places = 5;
  pipeline.make = []( std::size_t, std::size_t ) {};
  pipeline.take = []( std::size_t, std::size_t ) {};
  RecordingMonitor monitor;
  runOrdered( pipeline, monitor, 0.25, 0.75 );
  QVERIFY( std::is_sorted( monitor.fractions().begin(), monitor.fractions().end() ) );
  QVERIFY( monitor.fractions().front() >= 0.25 );
  QCOMPARE( monitor.fractions().back(), 0.75 );
}

void TestOrderedPipeline::failuresStopIt_data()
{
  QTest::addColumn<bool>( "inTake" );
  QTest::newRow( "while making" ) << false;
  QTest::newRow( "while taking" ) << true;
}

void TestOrderedPipeline::failuresStopIt()
{
  QFETCH( bool, inTake );
  std::atomic<std::size_t> made { 0 };
  std::size_t taken = 0;
  OrderedPipeline pipeline;
  pipeline.units = 100000;
  pipeline.threads = 4;
  pipeline.places = 6;
  pipeline.make = [&]( std::size_t unit, std::size_t ) {
    ++made;
    if ( !inTake && unit == 20 )
      throw std::runtime_error( "twenty" );
  };
  pipeline.take = [&]( std::size_t unit, std::size_t ) {
    if ( inTake && unit == 20 )
      throw std::runtime_error( "twenty" );
    ++taken;
  };
  Monitor monitor;
  QVERIFY_EXCEPTION_THROWN( runOrdered( pipeline, monitor, 0.0, 1.0 ), std::runtime_error );
  QVERIFY( taken <= 20 );
  QVERIFY( made <= 20 + 6 + 1 );
}

void TestOrderedPipeline::cancelStopsIt()
{
  RecordingMonitor monitor;
  std::atomic<std::size_t> made { 0 };
  OrderedPipeline pipeline;
  pipeline.units = 100000;
  pipeline.threads = 2;
  pipeline.places = 4;
  pipeline.make = [&]( std::size_t, std::size_t ) {
    if ( ++made == 10 )
      monitor.cancel();
  };
  pipeline.take = []( std::size_t, std::size_t ) {};
  QVERIFY_EXCEPTION_THROWN( runOrdered( pipeline, monitor, 0.0, 1.0 ), Cancelled );
  QVERIFY( made < 20 );
}

void TestOrderedPipeline::nothingToDo()
{
  RecordingMonitor monitor;
  runOrdered( OrderedPipeline(), monitor, 0.0, 0.5 );
  QCOMPARE( monitor.fractions(), std::vector<double> { 0.5 } );
}

QTEST_APPLESS_MAIN( TestOrderedPipeline )
#include "testorderedpipeline.moc"
