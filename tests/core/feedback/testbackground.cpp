// SPDX-License-Identifier: GPL-2.0-or-later
// Background work: its result, its failure, its end when nobody wants it any more. And the shares of a progress bar.
#include "core/feedback/background.h"
#include "core/feedback/progressshares.h"

#include <QTest>

#include <atomic>
#include <chrono>
#include <stdexcept>
#include <thread>

using namespace stillhead;

namespace
{

  class SilentMonitor : public Monitor
  {
    public:
      bool cancelled() const override { return isCancelled; }
      void progress( double fraction ) override { last = fraction; }

      bool isCancelled = false;
      double last = 0.0;
  };

  //! Work that goes on until it is told to stop.
  int untilStopped( Monitor &monitor, std::atomic<bool> &ended )
  {
    while ( !monitor.cancelled() )
      std::this_thread::sleep_for( std::chrono::milliseconds( 1 ) );
    ended = true;
    throw Cancelled();
  }

} // namespace

class TestBackground : public QObject
{
    Q_OBJECT

  private slots:
    void givesItsResult();
    void passesFailuresOn();
    void stopsWhenTheOwnerIsCancelled();
    void stopsWhenTheOwnerGoes();
    void sharesFillTheBar();
};

void TestBackground::givesItsResult()
{
  SilentMonitor monitor;
  Background<int> work( []( Monitor &inside ) {
    inside.progress( 0.5 );
    return 7;
  } );
  QCOMPARE( work.take( monitor ), 7 );
  QCOMPARE( monitor.last, 1.0 );
}

void TestBackground::passesFailuresOn()
{
  SilentMonitor monitor;
  Background<int> work( []( Monitor & ) -> int { throw std::runtime_error( "no" ); } );
  QVERIFY_EXCEPTION_THROWN( work.take( monitor ), std::runtime_error );
}

void TestBackground::stopsWhenTheOwnerIsCancelled()
{
  SilentMonitor monitor;
  monitor.isCancelled = true;
  std::atomic<bool> ended { false };
  Background<int> work( [&ended]( Monitor &inside ) { return untilStopped( inside, ended ); } );
  QVERIFY_EXCEPTION_THROWN( work.take( monitor ), Cancelled );
  QVERIFY( ended );
}

void TestBackground::stopsWhenTheOwnerGoes()
{
  std::atomic<bool> ended { false };
  {
    Background<int> work( [&ended]( Monitor &inside ) { return untilStopped( inside, ended ); } );
  }
  QVERIFY( ended );
}

void TestBackground::sharesFillTheBar()
{
  ProgressShares shares( 60.0, 100.0, 4.0 );
  const ProgressShares::Share first = shares.next( 3.0 );
  const ProgressShares::Share second = shares.next( 1.0 );
  QCOMPARE( first.from, 60.0 );
  QCOMPARE( first.to, 90.0 );
  QCOMPARE( second.from, 90.0 );
  QCOMPARE( second.to, 100.0 );
}

QTEST_APPLESS_MAIN( TestBackground )
#include "testbackground.moc"
