// SPDX-License-Identifier: GPL-2.0-or-later
// Cancel at every place where the job asks, with one thread and with several; progress that moves from nothing to all.
#include "tests/support/jobsetup.h"
#include "tests/support/randomlayout.h"

#include <QTest>

#include <atomic>
#include <mutex>

using namespace stillhead;
using stillhead::test::JobSetup;
using stillhead::test::LayoutOptions;
using stillhead::test::MemoryTerrain;
using stillhead::test::RandomLayout;

namespace
{

  //! Says stop from the n-th time on that it is asked.
  class CancellingMonitor : public Monitor
  {
    public:
      explicit CancellingMonitor( int at )
        : mAt( at )
      {
      }

      bool cancelled() const override { return ++mAsked >= mAt; }

      void progress( double fraction ) override
      {
        const std::lock_guard<std::mutex> lock( mMutex );
        mFractions.push_back( fraction );
      }

      int asked() const { return mAsked; }
      const std::vector<double> &fractions() const { return mFractions; }

    private:
      int mAt;
      mutable std::atomic<int> mAsked { 0 };
      std::mutex mMutex;
      std::vector<double> mFractions;
  };

  constexpr int NEVER = 1 << 30;

  JobSetup manyLines()
  {
    RandomLayout random( 5 );
    LayoutOptions options;
    options.lines = 300;
    options.places = 30;
    options.stride = 2;
    options.jitterM = 0.2;
    JobSetup setup( random.drawing( options ) );
    setup.terrain = std::make_unique<MemoryTerrain>( random.hills( options, 3.0, 3 ) );
    setup.job.sourceReachM = 1000.0;
    return setup;
  }

} // namespace

class TestCancel : public QObject
{
    Q_OBJECT

  private slots:
    void atEveryAsk_data();
    void atEveryAsk();
    void askedOften();
    void progressMoves_data();
    void progressMoves();
    void jobCanBeRunAgain();
};

void TestCancel::atEveryAsk_data()
{
  QTest::addColumn<unsigned>( "threads" );
  QTest::newRow( "one thread" ) << 1u;
  QTest::newRow( "four threads" ) << 4u;
}

void TestCancel::atEveryAsk()
{
  QFETCH( unsigned, threads );
  JobSetup setup = manyLines();
  setup.job.threads = threads;
  CancellingMonitor patient( NEVER );
  setup.solve( patient );
  const int asks = patient.asked();
  QVERIFY( asks > 50 );
  for ( int at = 1; at <= asks; ++at )
  {
    CancellingMonitor monitor( at );
    bool cancelled = false;
    try
    {
      setup.solve( monitor );
    }
    catch ( const Cancelled & )
    {
      cancelled = true;
    }
    // With several threads the number of asks may differ by a few from run to run.
    QVERIFY2( cancelled || threads > 1, qPrintable( QString::number( at ) ) );
    QVERIFY( cancelled || at > asks - 16 );
    // Once told, each thread stops at its own next ask.
    QVERIFY( monitor.asked() < at + static_cast<int>( 2 * threads ) );
  }
}

// Between two asks lies the work of a few lines, never a whole stage.
void TestCancel::askedOften()
{
  JobSetup setup = manyLines();
  CancellingMonitor monitor( NEVER );
  const StaticResult result = setup.solve( monitor );
  QVERIFY( monitor.asked() >= static_cast<int>( result.drawing.lines.size() / 8 ) );
}

void TestCancel::progressMoves_data()
{
  atEveryAsk_data();
}

void TestCancel::progressMoves()
{
  QFETCH( unsigned, threads );
  JobSetup setup = manyLines();
  setup.job.threads = threads;
  CancellingMonitor monitor( NEVER );
  setup.solve( monitor );
  double before = 0.0;
  double largestStep = 0.0;
  for ( const double fraction : monitor.fractions() )
  {
    QVERIFY( fraction >= before );
    QVERIFY( fraction <= 1.0 );
    largestStep = std::max( largestStep, fraction - before );
    before = fraction;
  }
  QCOMPARE( before, 1.0 );
  if ( threads == 1 )
    QVERIFY( largestStep < 0.1 );
}

void TestCancel::jobCanBeRunAgain()
{
  JobSetup setup = manyLines();
  const QStringList expected = test::rowsByPlace( setup.solve(), setup.drawing, 1000.0 );
  CancellingMonitor monitor( 40 );
  QVERIFY_EXCEPTION_THROWN( setup.solve( monitor ), Cancelled );
  QCOMPARE( test::rowsByPlace( setup.solve(), setup.drawing, 1000.0 ), expected );
}

QTEST_APPLESS_MAIN( TestCancel )
#include "testcancel.moc"
