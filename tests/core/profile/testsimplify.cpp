// SPDX-License-Identifier: GPL-2.0-or-later
// The drawn profile: near enough to the exact one everywhere, with every vertex that was drawn, and not denser than needed.
#include "core/profile/profilesearch.h"
#include "core/profile/simplify.h"
#include "tests/support/memoryterrain.h"
#include "tests/support/tolerance.h"

#include <algorithm>
#include <random>

using namespace stillhead;
using stillhead::test::NODATA;

namespace
{

  using Vertices = std::vector<ProfileVertex>;

  Vertices drawn( const Profile &profile, double fromM, double toM, const std::vector<double> &mustHold = {} )
  {
    Vertices vertices;
    appendDrawnProfile( profile, fromM, toM, mustHold.data(), mustHold.size(), vertices );
    return vertices;
  }

  //! Knots with straight pieces between.
  Profile straight( const std::vector<double> &along, const std::vector<double> &elevation )
  {
    Profile profile;
    profile.alongM = along;
    profile.elevationM = elevation;
    profile.bendM.assign( along.size(), 0.0 );
    for ( std::size_t i = 0; i + 1 < along.size(); ++i )
    {
      if ( std::isnan( elevation[i] ) || std::isnan( elevation[i + 1] ) )
        profile.bendM[i] = NODATA;
    }
    return profile;
  }

  //! Greatest distance between the drawn profile and the exact one between two places, where both have an elevation.
  double worstError( const Profile &profile, const Vertices &vertices, double fromM, double toM )
  {
    double worst = 0.0;
    for ( int i = 0; i <= 20000; ++i )
    {
      const double along = fromM + ( toM - fromM ) * i / 20000.0;
      const auto after = std::upper_bound( vertices.begin(), vertices.end(), along,
        []( double place, const ProfileVertex &vertex ) { return place < vertex.alongM; } );
      if ( after == vertices.begin() || after == vertices.end() )
        continue;
      const ProfileVertex &a = *( after - 1 );
      const ProfileVertex &b = *after;
      const double z = a.elevationM + ( b.elevationM - a.elevationM ) * ( along - a.alongM ) / ( b.alongM - a.alongM );
      const double error = std::abs( z - elevationAtM( profile, along ) );
      worst = error > worst ? error : worst;
    }
    return worst;
  }

} // namespace

class TestSimplify : public QObject
{
    Q_OBJECT

  private slots:
    void aPlaneNeedsItsEndsOnly();
    void drawnVerticesStay();
    void aCurveIsFollowed();
    void nothingIsLostBelowTheTolerance();
    void partOfAProfile();
    void unknownRuns_data();
    void unknownRuns();
    void risersStay();
    void randomProfilesStayNear();
    void appendsToWhatIsThere();
};

void TestSimplify::aPlaneNeedsItsEndsOnly()
{
  std::vector<double> along, elevation;
  for ( int i = 0; i <= 100; ++i )
  {
    along.push_back( i );
    elevation.push_back( 50.0 + 0.125 * i );
  }
  const Vertices vertices = drawn( straight( along, elevation ), 0.0, 100.0 );
  QCOMPARE( vertices.size(), std::size_t( 2 ) );
  STILLHEAD_SAME( vertices[0].alongM, 0.0 );
  STILLHEAD_SAME( vertices[0].elevationM, 50.0 );
  STILLHEAD_SAME( vertices[1].alongM, 100.0 );
  STILLHEAD_SAME( vertices[1].elevationM, 62.5 );
}

void TestSimplify::drawnVerticesStay()
{
  const Profile profile = straight( { 0, 10, 20, 30, 40 }, { 1, 2, 3, 4, 5 } );
  const Vertices vertices = drawn( profile, 0.0, 40.0, { 10.0, 30.0 } );
  QCOMPARE( vertices.size(), std::size_t( 4 ) );
  STILLHEAD_SAME( vertices[1].alongM, 10.0 );
  STILLHEAD_SAME( vertices[1].elevationM, 2.0 );
  STILLHEAD_SAME( vertices[2].alongM, 30.0 );
}

void TestSimplify::aCurveIsFollowed()
{
  Profile profile = straight( { 0, 100 }, { 10, 10 } );
  profile.bendM[0] = 40.0; // 10 m deep in the middle
  const Vertices vertices = drawn( profile, 0.0, 100.0 );
  QVERIFY( worstError( profile, vertices, 0.0, 100.0 ) <= DRAWN_PROFILE_TOLERANCE_M );
  // A parabola 10 m deep needs 15 chords at 0.05 m; a one-pass cone over parts of 0.01 m may need twice that.
  QVERIFY( vertices.size() >= 15 && vertices.size() <= 32 );
}

void TestSimplify::nothingIsLostBelowTheTolerance()
{
  const Profile flat = straight( { 0, 10, 20 }, { 5, 5.03, 5 } );
  QCOMPARE( drawn( flat, 0.0, 20.0 ).size(), std::size_t( 2 ) );
  const Profile bumpy = straight( { 0, 10, 20 }, { 5, 5.06, 5 } );
  QCOMPARE( drawn( bumpy, 0.0, 20.0 ).size(), std::size_t( 3 ) );
}

void TestSimplify::partOfAProfile()
{
  const Profile profile = straight( { 0, 10, 20, 30 }, { 0, 10, 0, 10 } );
  const Vertices vertices = drawn( profile, 5.0, 25.0, { 10.0 } );
  QCOMPARE( vertices.size(), std::size_t( 4 ) );
  const double along[] { 5, 10, 20, 25 };
  const double elevation[] { 5, 10, 0, 5 };
  for ( std::size_t i = 0; i < 4; ++i )
  {
    STILLHEAD_SAME( vertices[i].alongM, along[i] );
    STILLHEAD_SAME( vertices[i].elevationM, elevation[i] );
  }
  // From knot to knot, and within one piece.
  QCOMPARE( drawn( profile, 10.0, 20.0 ).size(), std::size_t( 2 ) );
  STILLHEAD_SAME( drawn( profile, 10.0, 20.0 )[0].elevationM, 10.0 );
  STILLHEAD_SAME( drawn( profile, 12.0, 14.0 )[0].elevationM, 8.0 );
  STILLHEAD_SAME( drawn( profile, 12.0, 14.0 )[1].elevationM, 6.0 );
}

using Values = std::vector<double>;
Q_DECLARE_METATYPE( Values )

void TestSimplify::unknownRuns_data()
{
  QTest::addColumn<Values>( "elevation" ); // at 0, 10, 20, …
  QTest::addColumn<Values>( "along" );
  QTest::addColumn<Values>( "drawnElevation" );
  QTest::newRow( "in the middle" ) << Values { 1, 2, NODATA, 2, 1 } << Values { 0, 10, 30, 40 }
                                   << Values { 1, 2, 2, 1 };
  QTest::newRow( "two pieces of it" ) << Values { 1, 2, NODATA, NODATA, 2, 1 } << Values { 0, 10, 40, 50 }
                                      << Values { 1, 2, 2, 1 };
  QTest::newRow( "at the start" ) << Values { NODATA, 2, 2 } << Values { 0, 10, 20 } << Values { NODATA, 2, 2 };
  QTest::newRow( "at the end" ) << Values { 1, 1, NODATA } << Values { 0, 10, 20 } << Values { 1, 1, NODATA };
  QTest::newRow( "throughout" ) << Values { NODATA, NODATA, NODATA } << Values { 0, 20 } << Values { NODATA, NODATA };
}

void TestSimplify::unknownRuns()
{
  QFETCH( Values, elevation );
  QFETCH( Values, along );
  QFETCH( Values, drawnElevation );
  std::vector<double> knots;
  for ( std::size_t i = 0; i < elevation.size(); ++i )
    knots.push_back( 10.0 * static_cast<double>( i ) );
  const Vertices vertices = drawn( straight( knots, elevation ), 0.0, knots.back() );
  QCOMPARE( vertices.size(), along.size() );
  for ( std::size_t i = 0; i < along.size(); ++i )
  {
    STILLHEAD_SAME( vertices[i].alongM, along[i] );
    STILLHEAD_SAME( vertices[i].elevationM, drawnElevation[i] );
  }
}

void TestSimplify::risersStay()
{
  const Profile profile = straight( { 0, 10, 10, 20, 20 }, { 5, 5, 8, 8, 2 } );
  const Vertices vertices = drawn( profile, 0.0, 20.0, { 10.0, 10.0 } );
  QCOMPARE( vertices.size(), std::size_t( 5 ) );
  const double elevation[] { 5, 5, 8, 8, 2 };
  for ( std::size_t i = 0; i < 5; ++i )
    STILLHEAD_SAME( vertices[i].elevationM, elevation[i] );
}

void TestSimplify::randomProfilesStayNear()
{
  std::mt19937 random( 7 );
  std::uniform_real_distribution<double> share( 0.0, 1.0 );
  for ( int round = 0; round < 60; ++round )
  {
    // From a lawn to a wall.
    const double roughness = std::pow( 10.0, -3.0 + 4.0 * share( random ) );
    Profile profile = straight( { 0.0 }, { 100.0 } );
    std::vector<double> mustHold;
    while ( profile.knots() < 200 )
    {
      profile.alongM.push_back( profile.alongM.back() + 0.01 + share( random ) );
      profile.elevationM.push_back( profile.elevationM.back() + roughness * ( share( random ) - 0.5 ) );
      profile.bendM.back() = 2.0 * roughness * ( share( random ) - 0.5 );
      profile.bendM.push_back( 0.0 );
      if ( share( random ) < 0.05 )
        mustHold.push_back( profile.alongM.back() );
    }
    const double fromM = share( random );
    const double toM = profile.alongM.back() - share( random );
    mustHold.erase( std::remove_if( mustHold.begin(), mustHold.end(),
                      [&]( double along ) { return along <= fromM || along >= toM; } ),
      mustHold.end() );
    const Vertices vertices = drawn( profile, fromM, toM, mustHold );
    const double worst = worstError( profile, vertices, fromM, toM );
    QVERIFY2( worst <= DRAWN_PROFILE_TOLERANCE_M + 1e-12, qPrintable( QString::number( worst ) ) );
    STILLHEAD_SAME( vertices.front().alongM, fromM );
    STILLHEAD_SAME( vertices.back().alongM, toM );
    for ( std::size_t i = 0; i < vertices.size(); ++i )
    {
      // Every vertex lies on the exact profile.
      STILLHEAD_NEAR( vertices[i].elevationM, elevationAtM( profile, vertices[i].alongM ), 1e-9 );
      QVERIFY( i == 0 || vertices[i].alongM > vertices[i - 1].alongM );
    }
    for ( const double along : mustHold )
      QVERIFY( std::any_of(
        vertices.begin(), vertices.end(), [along]( const ProfileVertex &vertex ) { return vertex.alongM == along; } ) );
  }
}

void TestSimplify::appendsToWhatIsThere()
{
  const Profile profile = straight( { 0, 10, 20 }, { 5, 9, 5 } );
  Vertices vertices = drawn( profile, 0.0, 10.0 );
  appendDrawnProfile( profile, 10.0, 20.0, nullptr, 0, vertices );
  QCOMPARE( vertices.size(), std::size_t( 4 ) );
  STILLHEAD_SAME( vertices[1].elevationM, vertices[2].elevationM );
  STILLHEAD_SAME( vertices[3].alongM, 20.0 );
}

QTEST_APPLESS_MAIN( TestSimplify )
#include "testsimplify.moc"
