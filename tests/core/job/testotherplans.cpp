// SPDX-License-Identifier: GPL-2.0-or-later
// The same park in another plan: shifted far away, turned and in feet, in a plan that is bent on its way to the terrain, and
// with a tolerance of nothing or of more than everything.
#include "tests/support/bilinear.h"
#include "tests/support/jobsetup.h"
#include "tests/support/planmeasures.h"
#include "tests/support/randomlayout.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::JobSetup;
using stillhead::test::LayoutOptions;
using stillhead::test::MemoryTerrain;
using stillhead::test::RandomLayout;

namespace
{

  //! A thousandth of a psi.
  constexpr double MILLI_PSI_PA = 6.894757;

  //! place = M · plan + offset, bent by \a bend metres in the square of a thousand.
  struct Bent : public PlanToTerrain
  {
      GroundScale matrix;
      PlanPoint offset;
      double bend = 0.0;

      std::unique_ptr<PlanToTerrain> clone() const override { return std::make_unique<Bent>( *this ); }
      bool isIdentity() const override { return false; }
      void transform( const PlanPoint *plan, TerrainPoint *terrain, std::size_t count ) const override
      {
        for ( std::size_t i = 0; i < count; ++i )
          terrain[i] = at( plan[i] );
      }
      TerrainPoint at( const PlanPoint &p ) const
      {
        const double x = matrix.xx * p.x + matrix.xy * p.y + offset.x;
        const double y = matrix.yx * p.x + matrix.yy * p.y + offset.y;
        return { x - 1e-6 * bend * y * y, y + 1e-6 * bend * x * x };
      }
  };

  LayoutOptions layoutOptions()
  {
    LayoutOptions options;
    options.lines = 14;
    options.gridM = 17.0;
    options.jitterM = 0.04;
    return options;
  }

  //! A job whose ground is smooth, as ground in pixels of 2 m mostly is.
  JobSetup park( unsigned seed )
  {
    RandomLayout random( seed );
    JobSetup setup( random.drawing( layoutOptions() ) );
    setup.terrain =
      std::make_unique<MemoryTerrain>( random.hills( layoutOptions(), 2.0, static_cast<int>( seed % 3 ) ) );
    setup.setLevels( 112.0, 110.0 );
    setup.job.sources.front().place = setup.drawing.vertices.front();
    setup.job.specificWeightNPerM3 = 9797.85;
    setup.setLimits( 40000.0, 120000.0 );
    setup.job.limits.bandsPa = { 40000.0, 80000.0, 120000.0 };
    setup.job.readingErrorPa = 700.0;
    return setup;
  }

  void compare( const StaticResult &actual, const StaticResult &expected )
  {
    QCOMPARE( actual.network.nodes.size(), expected.network.nodes.size() );
    QCOMPARE( actual.network.spans.size(), expected.network.spans.size() );
    QCOMPARE( actual.zoneMap.count, expected.zoneMap.count );
    for ( const auto &lengthM : { &Totals::lengthM, &Totals::withinM, &Totals::overM, &Totals::shortM,
            &Totals::noSourceM, &Totals::noTerrainM, &Totals::closeCallM } )
      STILLHEAD_NEAR( actual.totals.*lengthM, expected.totals.*lengthM, 1e-3 );
    if ( !std::isnan( expected.totals.highestPa ) )
    {
      STILLHEAD_NEAR( actual.totals.highestPa, expected.totals.highestPa, MILLI_PSI_PA );
      STILLHEAD_NEAR( actual.totals.lowestPa, expected.totals.lowestPa, MILLI_PSI_PA );
    }
    QCOMPARE( actual.stretches.size(), expected.stretches.size() );
    for ( std::size_t i = 0; i < actual.stretches.size(); ++i )
      STILLHEAD_NEAR( actual.stretches[i].beyondPa, expected.stretches[i].beyondPa, MILLI_PSI_PA );
    for ( const FindingCode code : { FindingCode::NearMiss, FindingCode::CrossingNotJoined, FindingCode::Summit,
            FindingCode::SummitUnknown, FindingCode::NoSource } )
      QCOMPARE( test::countOf( actual, code ), test::countOf( expected, code ) );
  }

} // namespace

class TestOtherPlans : public QObject
{
    Q_OBJECT

  private slots:
    void farAway();
    void turnedAndInFeet();
    void bentPlanIsFollowed();
    void sameBitsInABentPlan();
    void toleranceOfNothing();
    void toleranceWiderThanThePark();
};

void TestOtherPlans::farAway()
{
  for ( unsigned seed = 0; seed < 20; ++seed )
  {
    JobSetup setup = park( seed );
    const StaticResult expected = setup.solve();
    const PlanPoint shift { 612345.6875, 4567890.3125 };
    for ( PlanPoint &p : setup.drawing.vertices )
      p = { p.x + shift.x, p.y + shift.y };
    setup.job.sources.front().place = setup.drawing.vertices.front();
    std::array<double, 6> placement = setup.terrain->grid().geoTransform();
    placement[0] += shift.x;
    placement[3] += shift.y;
    std::vector<double> elevations;
    for ( int row = 0; row < setup.terrain->grid().rows(); ++row )
    {
      for ( int column = 0; column < setup.terrain->grid().columns(); ++column )
        elevations.push_back( setup.terrain->at( column, row ) );
    }
    setup.terrain = std::make_unique<MemoryTerrain>(
      setup.terrain->grid().columns(), setup.terrain->grid().rows(), elevations, placement );
    compare( setup.solve(), expected );
  }
}

void TestOtherPlans::turnedAndInFeet()
{
  for ( unsigned seed = 0; seed < 20; ++seed )
  {
    JobSetup setup = park( seed );
    const StaticResult expected = setup.solve();
    Bent map;
    map.matrix = { 0.3048 * std::sqrt( 0.75 ), -0.3048 * 0.5, 0.3048 * 0.5, 0.3048 * std::sqrt( 0.75 ) };
    map.offset = { 1000.0, -2000.0 };
    const double determinant = map.matrix.xx * map.matrix.yy - map.matrix.xy * map.matrix.yx;
    for ( PlanPoint &p : setup.drawing.vertices )
    {
      const double x = p.x - map.offset.x;
      const double y = p.y - map.offset.y;
      p = { ( map.matrix.yy * x - map.matrix.xy * y ) / determinant,
        ( map.matrix.xx * y - map.matrix.yx * x ) / determinant };
    }
    setup.job.sources.front().place = setup.drawing.vertices.front();
    const test::FixedScaleMeasure measure( map.matrix );
    setup.job.measure = &measure;
    setup.job.planToTerrain = &map;
    compare( setup.solve(), expected );
  }
}

// Every line's extremes against its own places, taken to the terrain one by one. The chords lie within half a millimetre of
// the line; on ground that rises a metre in a metre and between samples 2 mm are allowed.
void TestOtherPlans::bentPlanIsFollowed()
{
  for ( unsigned seed = 0; seed < 20; ++seed )
  {
    JobSetup setup = park( seed );
    Bent map;
    map.bend = 500.0; // up to 4 m off over the park
    setup.job.planToTerrain = &map;
    const StaticResult result = setup.solve();
    for ( int drawn = 0; drawn < static_cast<int>( setup.drawing.lines.size() ); ++drawn )
    {
      double low = HUGE_VAL, high = -HUGE_VAL;
      for ( const Piece &piece : result.pieces )
      {
        if ( test::lineOf( result, piece ).drawn != drawn || std::isnan( piece.lowestM ) )
          continue;
        low = std::min( low, piece.lowestM );
        high = std::max( high, piece.highestM );
      }
      const DrawnLine &line = setup.drawing.lines[static_cast<std::size_t>( drawn )];
      const std::vector<PlanPoint> vertices = test::verticesOf( setup.drawing, line );
      double sampledLow = HUGE_VAL, sampledHigh = -HUGE_VAL;
      bool gaps = false;
      for ( std::size_t leg = 0; leg + 1 < vertices.size(); ++leg )
      {
        for ( int i = 0; i <= 20000; ++i )
        {
          const double share = i / 20000.0;
          const TerrainPoint there = map.at( { vertices[leg].x + share * ( vertices[leg + 1].x - vertices[leg].x ),
            vertices[leg].y + share * ( vertices[leg + 1].y - vertices[leg].y ) } );
          const TerrainPoint pixel = setup.terrain->grid().toPixel( there );
          const double z = test::bilinear( *setup.terrain, pixel.x, pixel.y ) - line.coverM;
          gaps = gaps || std::isnan( z );
          sampledLow = z < sampledLow ? z : sampledLow;
          sampledHigh = z > sampledHigh ? z : sampledHigh;
        }
      }
      if ( gaps || low > high )
        continue;
      STILLHEAD_NEAR( low, sampledLow, 2e-3 );
      STILLHEAD_NEAR( high, sampledHigh, 2e-3 );
    }
  }
}

void TestOtherPlans::sameBitsInABentPlan()
{
  for ( unsigned seed = 0; seed < 5; ++seed )
  {
    JobSetup setup = park( seed );
    Bent map;
    map.bend = 500.0;
    const test::GlobeLikeMeasure measure( 1.0 );
    setup.job.planToTerrain = &map;
    setup.job.measure = &measure;
    const QStringList expected = test::rowsByPlace( setup.solve(), setup.drawing, setup.job.specificWeightNPerM3 );
    for ( unsigned again = 1; again <= 3; ++again )
    {
      setup.drawing = test::redrawn( setup.drawing, again );
      setup.job.threads = again;
      QCOMPARE( test::rowsByPlace( setup.solve(), setup.drawing, setup.job.specificWeightNPerM3 ), expected );
    }
  }
}

void TestOtherPlans::toleranceOfNothing()
{
  JobSetup setup( std::string(
    "main 0 0 50, 10 0 50; lateral 10 0 50, 20 0 50; lateral 5 0 50, 5 5 50; main 20.001 0 50, 30 0 50" ) );
  setup.job.joins.toleranceM = 0.0;
  const StaticResult result = setup.solve();
  STILLHEAD_NEAR( result.totals.noSourceM, 9.999, 1e-9 );
  STILLHEAD_NEAR( result.totals.withinM, 25.0, 1e-9 );
  QCOMPARE( test::countOf( result, FindingCode::NearMiss ), std::size_t( 0 ) );
}

void TestOtherPlans::toleranceWiderThanThePark()
{
  JobSetup setup = park( 3 );
  setup.job.joins.toleranceM = 500.0;
  double drawnM = 0.0;
  for ( const DrawnLine &line : setup.drawing.lines )
  {
    std::vector<double> along( line.count );
    PlanarMeasure().distancesAlongM( &setup.drawing.vertices[line.first], line.count, along.data() );
    drawnM += along.back();
  }
  const StaticResult result = setup.solve();
  QCOMPARE( result.network.nodes.size(), std::size_t( 1 ) );
  STILLHEAD_NEAR( result.totals.lengthM, drawnM, 1e-9 * drawnM );
  STILLHEAD_SAME( result.totals.noSourceM, 0.0 );
}

QTEST_APPLESS_MAIN( TestOtherPlans )
#include "testotherplans.moc"
