// SPDX-License-Identifier: GPL-2.0-or-later
// Random layouts on random hills: every metre of every pipe against brute force, lengths in against lengths out, and the
// properties that no layout may break: same bits from any order, direction and number of threads, splitting a line.
#include "tests/support/bruteforce.h"
#include "tests/support/jobsetup.h"
#include "tests/support/randomlayout.h"
#include "tests/support/tolerance.h"

#include <map>

using namespace stillhead;
using stillhead::test::BruteForce;
using stillhead::test::BruteJob;
using stillhead::test::BruteSample;
using stillhead::test::JobSetup;
using stillhead::test::LayoutOptions;
using stillhead::test::MemoryTerrain;
using stillhead::test::RandomLayout;

namespace
{

  struct RandomJob
  {
      LayoutOptions options;
      JobSetup setup { Drawing() };

      explicit RandomJob( unsigned seed, int lines = 14, bool duplicates = true )
      {
        RandomLayout random( seed );
        options.lines = lines;
        options.duplicates = duplicates;
        options.gridM = 7.3;
        options.jitterM = seed % 3 == 0 ? 0.0 : 0.04;
        options.systems = seed % 4 == 0;
        setup.drawing = random.drawing( options );
        setup.terrain =
          std::make_unique<MemoryTerrain>( random.hills( options, random.between( 0.7, 3.0 ), random.whole( 0, 3 ) ) );
        setup.terrain->setBlock( 8 );
        setup.job.sources.front().place = besideALeg( random );
        const double level = random.between( 98.0, 112.0 );
        // Now and then the cases lie farther apart than the limits: over in the one, under in the other.
        setup.setLevels( level, level - ( seed % 5 == 1 ? random.between( 8.0, 12.0 ) : random.between( 0.0, 3.0 ) ) );
        setup.job.sources.front().kind = SourceKind::WaterLevel;
        setup.job.sourceReachM = 1000.0;
        setup.job.specificWeightNPerM3 = 9797.85;
        setup.setLimits( 20000.0, 90000.0 );
        setup.job.limits.lateralLeastPa = random.between( 5000.0, 40000.0 );
        setup.job.limits.lateralMostPa = random.between( 60000.0, 120000.0 );
        setup.job.limits.bandsPa = { 20000.0, 45000.0, 66000.0, 90000.0 };
        setup.job.readingErrorPa = seed % 2 == 0 ? 0.0 : random.between( 500.0, 5000.0 );
      }

      //! Half way along some leg and a little beside it, so that no other line is as near.
      PlanPoint besideALeg( RandomLayout &random ) const
      {
        std::vector<PlanPoint> vertices;
        do
        {
          const int line = random.whole( 0, static_cast<int>( setup.drawing.lines.size() ) - 1 );
          vertices = test::verticesOf( setup.drawing, setup.drawing.lines[static_cast<std::size_t>( line )] );
        }
        while ( vertices[0] == vertices[1] );
        const double share = random.between( 0.3, 0.6 );
        return { vertices[0].x + share * ( vertices[1].x - vertices[0].x ) + random.between( -0.01, 0.01 ),
          vertices[0].y + share * ( vertices[1].y - vertices[0].y ) + random.between( -0.01, 0.01 ) };
      }

      BruteJob brute() const
      {
        BruteJob job;
        job.drawing = &setup.drawing;
        job.terrain = setup.terrain.get();
        job.source = setup.job.sources.front().place;
        job.levelHighM = setup.job.sources.front().high;
        job.levelLowM = *setup.job.sources.front().low;
        job.limits = setup.job.limits;
        job.specificWeightNPerM3 = setup.job.specificWeightNPerM3;
        job.doubtPa = setup.job.readingErrorPa;
        return job;
      }
  };

  //! True if the pieces of every span lie one after the other from its beginning to its end, span after span.
  bool isGapless( const StaticResult &result )
  {
    std::size_t next = 0;
    for ( int span = 0; span < static_cast<int>( result.network.spans.size() ); ++span )
    {
      const Span &pipe = result.network.spans[static_cast<std::size_t>( span )];
      double alongM = pipe.fromM;
      for ( ; next < result.pieces.size() && result.pieces[next].span == span; ++next )
      {
        if ( result.pieces[next].fromM != alongM )
          return false;
        alongM = result.pieces[next].toM;
      }
      if ( alongM != pipe.toM )
        return false;
    }
    return next == result.pieces.size();
  }

} // namespace

class TestRandomLayouts : public QObject
{
    Q_OBJECT

  private slots:
    void againstBruteForce();
    void sameBitsFromAnyOrderAndDirection();
    void sameBitsFromAnyNumberOfThreadsAndCache();
    void splittingAtAVertexChangesNothing();
    void lengthsInAreLengthsOut();
};

void TestRandomLayouts::againstBruteForce()
{
  std::map<State, int> compared;
  int skipped = 0;
  for ( unsigned seed = 0; seed < 200; ++seed )
  {
    RandomJob job( seed );
    const StaticResult result = job.setup.solve();
    const BruteForce brute( job.brute() );
    if ( brute.sourceIsAmbiguous() )
    {
      ++skipped;
      continue;
    }
    const QByteArray where = "seed " + QByteArray::number( seed );
    for ( int drawn = 0; drawn < static_cast<int>( job.setup.drawing.lines.size() ); ++drawn )
    {
      double lowest = HUGE_VAL;
      double highest = -HUGE_VAL;
      const std::vector<BruteSample> samples = brute.along( drawn );
      for ( const Piece &piece : result.pieces )
      {
        const CanonicalLine &line = test::lineOf( result, piece );
        if ( line.drawn != drawn )
          continue;
        if ( !std::isnan( piece.lowestM ) )
        {
          lowest = std::min( lowest, piece.lowestM );
          highest = std::max( highest, piece.highestM );
        }
        const double from = line.reversed ? line.lengthM - piece.toM : piece.fromM;
        const double to = line.reversed ? line.lengthM - piece.fromM : piece.toM;
        for ( const BruteSample &sample : samples )
        {
          // Samples stand every 5 cm: what changes there is known no better.
          if ( sample.alongM < from + 0.06 || sample.alongM > to - 0.06 )
            continue;
          ++compared[sample.state];
          const auto fails = [&]( const char *what ) {
            return ( where + ": " + what + ", line " + QByteArray::number( drawn ) + " at "
              + QByteArray::number( sample.alongM ) + ": " + stateName( piece.state ) + ", expected "
              + stateName( sample.state ) + ", elevation " + QByteArray::number( sample.elevationM, 'g', 12 ) );
          };
          if ( piece.state != sample.state )
            QFAIL( fails( "state" ).constData() );
          if ( piece.over != sample.over || piece.isShort != sample.isShort )
            QFAIL( fails( "over or short" ).constData() );
          if ( piece.closeCall != sample.closeCall )
            QFAIL( fails( "close call" ).constData() );
          if ( piece.band != sample.band )
            QFAIL( fails( "band" ).constData() );
          if ( !std::isnan( sample.pressureHighPa )
            && !( sample.pressureHighPa <= piece.pressureHighPa + 1e-4
              && sample.pressureLowPa >= piece.pressureLowPa - 1e-4 ) )
            QFAIL( fails( "a pressure beyond the piece's own" ).constData() );
        }
      }
      // No sample beats the exact extremes, and the samples come near them: in 5 cm a cell of 0.7 m whose corners differ by
      // metres bends by a few millimetres.
      const auto [sampledLow, sampledHigh] = brute.range( drawn );
      if ( std::isnan( sampledLow ) || lowest > highest )
        continue;
      QVERIFY2( sampledLow >= lowest - 1e-9 && sampledHigh <= highest + 1e-9, where.constData() );
      const double allowedM =
        brute.hasGaps( drawn ) ? 0.15 : 5e-3; // at the rim of a gap the last sample is 5 cm of slope away
      STILLHEAD_NEAR( sampledLow, lowest, allowedM );
      STILLHEAD_NEAR( sampledHigh, highest, allowedM );
    }
  }
  QVERIFY( skipped <= 20 );
  for ( int state = 0; state < 8; ++state )
    QVERIFY2( compared[static_cast<State>( state )] > 1000, stateName( static_cast<State>( state ) ) );
}

void TestRandomLayouts::sameBitsFromAnyOrderAndDirection()
{
  for ( unsigned seed = 0; seed < 40; ++seed )
  {
    RandomJob job( seed, 25 );
    JobSetup &setup = job.setup;
    const Drawing drawing = setup.drawing;
    setup.job.joins.joinCrossings = seed % 5 == 0;
    const QStringList expected = test::rowsByPlace( setup.solve(), drawing, setup.job.specificWeightNPerM3 );
    for ( unsigned again = 1; again <= 3; ++again )
    {
      setup.drawing = test::redrawn( drawing, 100 * seed + again );
      setup.job.threads = again;
      const QStringList rows = test::rowsByPlace( setup.solve(), setup.drawing, setup.job.specificWeightNPerM3 );
      QCOMPARE( rows, expected );
    }
  }
}

void TestRandomLayouts::sameBitsFromAnyNumberOfThreadsAndCache()
{
  RandomLayout random( 77 );
  LayoutOptions options;
  options.lines = 600;
  options.places = 40;
  options.stride = 3;
  options.jitterM = 0.04;
  JobSetup setup( random.drawing( options ) );
  setup.terrain = std::make_unique<MemoryTerrain>( random.hills( options, 0.8, 80 ) ); // several tiles
  setup.terrain->setBlock( 16 );
  setup.job.sources.front().place = { 200.0, 200.0 };
  setup.job.sourceReachM = 1000.0;
  setup.setLevels( 110.0, 107.0 );
  setup.setLimits( 2000.0, 9000.0 );
  setup.job.readingErrorPa = 300.0;
  const StaticResult one = setup.solve();
  QVERIFY( isGapless( one ) );
  const QStringList expected = test::rowsByPlace( one, setup.drawing, 1000.0 );
  QVERIFY( expected.size() > 2000 );
  for ( const unsigned threads : { 2u, 4u, 0u } )
  {
    setup.job.threads = threads;
    setup.cacheBytes = threads == 4u ? 1 : TileCache::DEFAULT_BUDGET_BYTES;
    QCOMPARE( test::rowsByPlace( setup.solve(), setup.drawing, 1000.0 ), expected );
  }
}

// Splitting a line at one of its vertices: the same lengths, extremes and stretches to 1e-9. Only where a cut lies within
// a millimetre of the new node is it not made, and that millimetre changes sides.
void TestRandomLayouts::splittingAtAVertexChangesNothing()
{
  int split = 0;
  int same = 0;
  int moved = 0;
  for ( unsigned seed = 0; seed < 300; seed += 3 )
  {
    RandomJob job( seed, 10, false );
    JobSetup &setup = job.setup;
    QVERIFY( job.options.jitterM == 0.0 );
    // No line is drawn twice, vertices meet exactly or not at all and crossings are joined, so that the new ends join nothing that was apart.
    setup.job.joins.joinCrossings = true;
    const StaticResult whole = setup.solve();
    RandomLayout random( seed );
    Drawing parts;
    parts.systems = setup.drawing.systems;
    for ( const DrawnLine &line : setup.drawing.lines )
    {
      const std::vector<PlanPoint> vertices = test::verticesOf( setup.drawing, line );
      const std::size_t at = vertices.size() > 2
        ? static_cast<std::size_t>( random.whole( 1, static_cast<int>( vertices.size() ) - 2 ) )
        : 0;
      if ( at == 0 || vertices[at] == vertices.front() || vertices[at] == vertices.back()
        || vertices[at - 1] == vertices[at] || vertices[at] == vertices[at + 1] )
      {
        test::addLine( parts, vertices, line );
        continue;
      }
      test::addLine( parts, { vertices.begin(), vertices.begin() + static_cast<std::ptrdiff_t>( at ) + 1 }, line );
      test::addLine( parts, { vertices.begin() + static_cast<std::ptrdiff_t>( at ), vertices.end() }, line );
      ++split;
    }
    setup.drawing = parts;
    const StaticResult cut = setup.solve();
    STILLHEAD_NEAR( cut.totals.lengthM, whole.totals.lengthM, 1e-9 * whole.totals.lengthM );
    for ( const auto &lengthM : { &Totals::withinM, &Totals::overM, &Totals::shortM, &Totals::noSourceM,
            &Totals::noTerrainM, &Totals::closeCallM } )
    {
      const double off = std::abs( cut.totals.*lengthM - whole.totals.*lengthM );
      ++( off <= 1e-9 * whole.totals.lengthM ? same : moved );
      QVERIFY( off <= 0.002 );
    }
    if ( !std::isnan( whole.totals.highestPa ) )
    {
      STILLHEAD_NEAR_RELATIVE( cut.totals.highestPa, whole.totals.highestPa, 1e-9 );
      STILLHEAD_NEAR_RELATIVE( cut.totals.lowestPa, whole.totals.lowestPa, 1e-9 );
    }
    QCOMPARE( cut.stretches.size(), whole.stretches.size() );
    for ( std::size_t i = 0; i < whole.stretches.size(); ++i )
    {
      STILLHEAD_NEAR( cut.stretches[i].beyondPa, whole.stretches[i].beyondPa, 1e-4 );
      QCOMPARE( cut.stretches[i].over, whole.stretches[i].over );
    }
  }
  QVERIFY( split > 300 );
  QVERIFY( moved <= same / 50 );
}

void TestRandomLayouts::lengthsInAreLengthsOut()
{
  for ( unsigned seed = 0; seed < 200; ++seed )
  {
    RandomJob job( seed );
    const StaticResult result = job.setup.solve();
    double drawnM = 0.0;
    for ( const DrawnLine &line : job.setup.drawing.lines )
    {
      const std::vector<PlanPoint> vertices = test::verticesOf( job.setup.drawing, line );
      for ( std::size_t i = 1; i < vertices.size(); ++i )
        drawnM += std::hypot( vertices[i].x - vertices[i - 1].x, vertices[i].y - vertices[i - 1].y );
    }
    QVERIFY( isGapless( result ) );
    STILLHEAD_NEAR( result.totals.lengthM, drawnM, 1e-9 * drawnM );
    double byStateM = 0.0;
    double noLengthM = 0.0;
    for ( const Piece &piece : result.pieces )
    {
      byStateM += piece.toM - piece.fromM;
      noLengthM += piece.toM > piece.fromM ? 0.0 : 1.0;
    }
    STILLHEAD_NEAR( byStateM, drawnM, 1e-9 * drawnM );
    STILLHEAD_SAME( noLengthM, 0.0 );
  }
}

QTEST_APPLESS_MAIN( TestRandomLayouts )
#include "testrandomlayouts.moc"
