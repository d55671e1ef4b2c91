// SPDX-License-Identifier: GPL-2.0-or-later
// Where a profile is cut, and where it is not: at the limit, touching it, lying on it, within a millimetre of an end, at
// gaps in the terrain.
#include "core/judgement/cutting.h"
#include "core/network/noding.h"
#include "core/profile/profilesearch.h"
#include "tests/support/memoryterrain.h"
#include "tests/support/tolerance.h"

#include <limits>
#include <random>

using namespace stillhead;
using stillhead::test::NODATA;

namespace
{

  using Values = std::vector<double>;

  Profile profileOf( const Values &along, const Values &elevation, const Values &bend = {} )
  {
    Profile profile;
    profile.alongM = along;
    profile.elevationM = elevation;
    profile.bendM.assign( along.size(), 0.0 );
    for ( std::size_t i = 0; i + 1 < along.size(); ++i )
    {
      if ( i < bend.size() )
        profile.bendM[i] = bend[i];
      if ( std::isnan( elevation[i] ) || std::isnan( elevation[i + 1] ) )
        profile.bendM[i] = NODATA;
    }
    return profile;
  }

  std::vector<CutPiece> cut( const Profile &profile, const Values &cuts, bool splitUnknown = true )
  {
    Cutter cutter;
    return cutter.cut( profile, profile.alongM.front(), profile.alongM.back(), cuts, splitUnknown );
  }

  //! Where the pieces begin, but for the first.
  Values cutPlaces( const std::vector<CutPiece> &pieces )
  {
    Values places;
    for ( std::size_t i = 1; i < pieces.size(); ++i )
      places.push_back( pieces[i].fromM );
    return places;
  }

} // namespace

Q_DECLARE_METATYPE( Values )

class TestCutting : public QObject
{
    Q_OBJECT

  private slots:
    void elevations();
    void elevationsWithDoubt();
    void elevationsThatCoincideAreOne();
    void places_data();
    void places();
    void valuesAtTheCut();
    void roundingMakesNoCuts();
    void lyingOnALimitIsAPieceOfItsOwn_data();
    void lyingOnALimitIsAPieceOfItsOwn();
    void slopesWithinAMillimetreDecideNothing_data();
    void slopesWithinAMillimetreDecideNothing();
    void gaps_data();
    void gaps();
    void partOfAProfile();
    void randomProfiles();
};

void TestCutting::elevations()
{
  Zone zone;
  zone.fed = true;
  zone.levels = { 150.0, 140.0 };
  Limits limits;
  limits.leastPa = 20000.0;
  limits.mostPa = 50000.0;
  limits.lateralLeastPa = 25000.0;
  limits.lateralMostPa = 45000.0;
  limits.bandsPa = { 20000.0, 40000.0, 50000.0 };
  // γ = 1000: one metre is 1000 Pa. High 150: bands at 130, 110, 100 (MOST too); low 140: LEAST at 120; levels 140, 150.
  QVERIFY( cutElevationsM( zone, Role::Mainline, limits, 1000.0 ) == ( Values { 100, 110, 120, 130, 140, 150 } ) );
  QVERIFY( cutElevationsM( zone, Role::Lateral, limits, 1000.0 ) == ( Values { 100, 105, 110, 115, 130, 140, 150 } ) );
}

void TestCutting::elevationsWithDoubt()
{
  Zone zone;
  zone.fed = true;
  zone.levels = { 150.0, 140.0 };
  zone.doubtHighPa = zone.doubtLowPa = 1000.0;
  Limits limits;
  limits.leastPa = 20000.0;
  limits.mostPa = 50000.0;
  QVERIFY(
    cutElevationsM( zone, Role::Mainline, limits, 1000.0 ) == ( Values { 99, 100, 101, 119, 120, 121, 140, 150 } ) );
}

void TestCutting::elevationsThatCoincideAreOne()
{
  Zone zone;
  zone.fed = true;
  zone.levels = { 150.0, 150.0 };
  Limits limits;
  limits.leastPa = 50000.0;
  limits.mostPa = 50000.0;
  limits.bandsPa = { 50000.0 + 1e-7 };
  QCOMPARE( cutElevationsM( zone, Role::Mainline, limits, 1000.0 ).size(), std::size_t( 2 ) );
}

void TestCutting::places_data()
{
  QTest::addColumn<Values>( "along" );
  QTest::addColumn<Values>( "elevation" );
  QTest::addColumn<Values>( "bend" );
  QTest::addColumn<Values>( "cuts" );
  QTest::addColumn<Values>( "places" );
  const auto row = []( const char *name, const Values &along, const Values &elevation, const Values &bend,
                     const Values &cuts,
                     const Values &places ) { QTest::newRow( name ) << along << elevation << bend << cuts << places; };
  row( "rising", { 0, 80 }, { 0, 10 }, {}, { 2.5, 5 }, { 20, 40 } );
  row( "falling", { 0, 80 }, { 10, 0 }, {}, { 2.5, 5 }, { 40, 60 } );
  row( "up and down", { 0, 40, 80 }, { 0, 10, 0 }, {}, { 5 }, { 20, 60 } );
  row( "beyond both ends", { 0, 80 }, { 2, 8 }, {}, { 1, 9 }, {} );
  row( "an arc", { 0, 16 }, { 0, 0 }, { -16 }, { 3 }, { 4, 12 } );
  row( "a turn touches from below", { 0, 16 }, { 0, 0 }, { -16 }, { 4 }, {} );
  row( "a turn touches from above", { 0, 16 }, { 4, 4 }, { 16 }, { 0 }, {} );
  row( "a tip touches from below", { 0, 10, 20 }, { 0, 5, 0 }, {}, { 5 }, {} );
  row( "a tip touches from above", { 0, 10, 20 }, { 5, 0, 5 }, {}, { 0 }, {} );
  row( "begins on the limit, rising", { 0, 10 }, { 5, 15 }, {}, { 5 }, {} );
  row( "begins on the limit, falling", { 0, 10 }, { 5, 0 }, {}, { 5 }, {} );
  row( "ends on the limit", { 0, 10 }, { 0, 5 }, {}, { 5 }, {} );
  row( "at a knot", { 0, 10, 20 }, { 0, 5, 10 }, {}, { 5 }, { 10 } );
  row( "through a knot, down", { 0, 10, 20 }, { 10, 5, 0 }, {}, { 5 }, { 10 } );
  row( "several limits in one piece and back", { 0, 16 }, { 0, 0 }, { -16 }, { 1.75, 3 }, { 2, 4, 12, 14 } );
  // A cut nearer than a millimetre to an end is not made.
  row( "half a millimetre after the start", { 0, 80 }, { 0, 80 }, {}, { 0.0005 }, {} );
  row( "two millimetres after the start", { 0, 80 }, { 0, 80 }, {}, { 0.002 }, { 0.002 } );
  row( "half a millimetre before the end", { 0, 80 }, { 0, 80 }, {}, { 79.9995 }, {} );
  row( "two millimetres before the end", { 0, 80 }, { 0, 80 }, {}, { 79.998 }, { 79.998 } );
  row( "two limits half a millimetre apart: the first", { 0, 80 }, { 0, 80 }, {}, { 40, 40.0005 }, { 40 } );
  row( "over and back within a millimetre", { 0, 40, 80 }, { 0, 40, 0 }, {}, { 39.9996 }, {} );
  row( "over and back within three", { 0, 40, 80 }, { 0, 40, 0 }, {}, { 39.998 }, { 39.998, 40.002 } );
}

void TestCutting::places()
{
  QFETCH( Values, along );
  QFETCH( Values, elevation );
  QFETCH( Values, bend );
  QFETCH( Values, cuts );
  QFETCH( Values, places );
  const std::vector<CutPiece> pieces = cut( profileOf( along, elevation, bend ), cuts );
  const Values actual = cutPlaces( pieces );
  QCOMPARE( actual.size(), places.size() );
  for ( std::size_t i = 0; i < places.size(); ++i )
    STILLHEAD_NEAR( actual[i], places[i], 1e-12 );
  STILLHEAD_SAME( pieces.front().fromM, along.front() );
  STILLHEAD_SAME( pieces.back().toM, along.back() );
}

// Both pieces have the limit itself as an extreme, not a value near it.
void TestCutting::valuesAtTheCut()
{
  const double limit = 4.3;
  const std::vector<CutPiece> pieces = cut( profileOf( { 0, 7, 19 }, { 1, 3, 9 }, { 0.5, -1 } ), { limit } );
  QCOMPARE( pieces.size(), std::size_t( 2 ) );
  STILLHEAD_SAME( pieces[0].highestM, limit );
  STILLHEAD_SAME( pieces[0].highestAtM, pieces[0].toM );
  STILLHEAD_SAME( pieces[1].lowestM, limit );
  STILLHEAD_SAME( pieces[1].lowestAtM, pieces[1].fromM );
  STILLHEAD_SAME( pieces[0].lowestM, 1.0 );
  STILLHEAD_SAME( pieces[1].highestM, 9.0 );
  STILLHEAD_SAME( pieces[1].highestAtM, 19.0 );
}

void TestCutting::roundingMakesNoCuts()
{
  const double limit = 123.4;
  std::mt19937 random( 5 );
  Values along, elevation, bend;
  for ( int i = 0; i <= 1000; ++i )
  {
    along.push_back( i );
    const int ulps = std::uniform_int_distribution<int>( -1, 1 )( random );
    elevation.push_back( ulps == 0 ? limit : std::nextafter( limit, ulps * HUGE_VAL ) );
    bend.push_back( ulps * 1e-14 );
  }
  const std::vector<CutPiece> pieces = cut( profileOf( along, elevation, bend ), { 100, limit, 150 } );
  QCOMPARE( pieces.size(), std::size_t( 1 ) );
  STILLHEAD_NEAR( pieces[0].middleM, limit, 1e-12 );
}

// Pipe that lies on a limit belongs to it (at MOST it is within, whatever its neighbours are): it is cut out.
void TestCutting::lyingOnALimitIsAPieceOfItsOwn_data()
{
  QTest::addColumn<Values>( "elevation" ); // at 0, 10, 20, …
  QTest::addColumn<Values>( "places" );
  QTest::newRow( "then rising" ) << Values { 5, 5, 9 } << Values { 10 };
  QTest::newRow( "then falling" ) << Values { 5, 5, 1 } << Values { 10 };
  QTest::newRow( "risen to" ) << Values { 1, 5, 5 } << Values { 10 };
  QTest::newRow( "fallen to" ) << Values { 9, 5, 5 } << Values { 10 };
  QTest::newRow( "a step up" ) << Values { 1, 5, 5, 5, 9 } << Values { 10, 30 };
  QTest::newRow( "a step down" ) << Values { 9, 5, 5, 1 } << Values { 10, 20 };
  QTest::newRow( "a table" ) << Values { 1, 5, 5, 1 } << Values { 10, 20 };
  QTest::newRow( "a trough" ) << Values { 9, 5, 5, 9 } << Values { 10, 20 };
  QTest::newRow( "with rounding" ) << Values { 9, 5, std::nextafter( 5.0, 6.0 ), std::nextafter( 5.0, 4.0 ), 1 }
                                   << Values { 10, 30 };
  QTest::newRow( "throughout" ) << Values { 5, 5, 5 } << Values {};
  QTest::newRow( "beside another limit" ) << Values { 7, 7, 7 } << Values {};
}

void TestCutting::lyingOnALimitIsAPieceOfItsOwn()
{
  QFETCH( Values, elevation );
  QFETCH( Values, places );
  Values along;
  for ( std::size_t i = 0; i < elevation.size(); ++i )
    along.push_back( 10.0 * static_cast<double>( i ) );
  for ( const bool reversed : { false, true } )
  {
    if ( reversed )
    {
      std::reverse( elevation.begin(), elevation.end() );
      std::reverse( places.begin(), places.end() );
      for ( double &place : places )
        place = along.back() - place;
    }
    const std::vector<CutPiece> pieces = cut( profileOf( along, elevation ), { 0, 5, 20 } );
    QVERIFY( cutPlaces( pieces ) == places );
  }
}

// What lies within a millimetre of a cut that is not made counts for the extremes, but does not decide what the piece is.
void TestCutting::slopesWithinAMillimetreDecideNothing_data()
{
  QTest::addColumn<Values>( "along" );
  QTest::addColumn<Values>( "elevation" );
  QTest::addColumn<Values>( "cuts" );
  QTest::addColumn<Values>( "places" );
  QTest::addColumn<Values>( "intervals" ); // number of cut elevations below each piece
  QTest::newRow( "a riser over two limits" )
    << Values { 0, 50, 50, 100 } << Values { 0, 0, 3, 3 } << Values { 1, 2 } << Values { 50 } << Values { 0, 2 };
  QTest::newRow( "a riser over three limits, ending low in the last" )
    << Values { 0, 50, 50, 100 } << Values { 0, 0, 30.5, 30.5 } << Values { 10, 20, 30 } << Values { 50 }
    << Values { 0, 3 };
  QTest::newRow( "down a riser" ) << Values { 0, 50, 50, 100 } << Values { 3, 3, 0.9, 0.9 } << Values { 1, 2 }
                                  << Values { 50 } << Values { 2, 0 };
  QTest::newRow( "a riser at the start" )
    << Values { 0, 0, 100 } << Values { 0, 30, 30 } << Values { 10, 20, 29 } << Values {} << Values { 3 };
  QTest::newRow( "a riser at the end" ) << Values { 0, 100, 100 } << Values { 0, 0, 30 } << Values { 1, 20, 29 }
                                        << Values {} << Values { 0 };
  QTest::newRow( "a wall half a millimetre wide" )
    << Values { 0, 50, 50.0005, 100 } << Values { 0, 0, 3, 3 } << Values { 1, 2 }
    << Values { 50.0005 / 3 * 0 + 50 + 0.0005 / 3 } << Values { 0, 2 };
  QTest::newRow( "a spike of no width over two limits" )
    << Values { 0, 50, 50, 50, 100 } << Values { 0, 0, 30, 0, 0 } << Values { 1, 2 } << Values {} << Values { 0 };
}

void TestCutting::slopesWithinAMillimetreDecideNothing()
{
  QFETCH( Values, along );
  QFETCH( Values, elevation );
  QFETCH( Values, cuts );
  QFETCH( Values, places );
  QFETCH( Values, intervals );
  const std::vector<CutPiece> pieces = cut( profileOf( along, elevation ), cuts );
  const Values actual = cutPlaces( pieces );
  QCOMPARE( actual.size(), places.size() );
  double lowest = HUGE_VAL;
  double highest = -HUGE_VAL;
  for ( std::size_t i = 0; i < pieces.size(); ++i )
  {
    if ( i > 0 )
      STILLHEAD_NEAR( actual[i - 1], places[i - 1], 1e-9 );
    const auto below = std::lower_bound( cuts.begin(), cuts.end(), pieces[i].middleM ) - cuts.begin();
    QCOMPARE( static_cast<double>( below ), intervals[i] );
    lowest = std::min( lowest, pieces[i].lowestM );
    highest = std::max( highest, pieces[i].highestM );
  }
  STILLHEAD_SAME( lowest, *std::min_element( elevation.begin(), elevation.end() ) );
  STILLHEAD_SAME( highest, *std::max_element( elevation.begin(), elevation.end() ) );
}

void TestCutting::gaps_data()
{
  QTest::addColumn<Values>( "along" );
  QTest::addColumn<Values>( "elevation" );
  QTest::addColumn<Values>( "places" );
  QTest::addColumn<QString>( "known" ); // k or u for each piece
  QTest::newRow( "in the middle" ) << Values { 0, 10, 20, 30 } << Values { 1, NODATA, NODATA, 1 } << Values {} << "u";
  QTest::newRow( "between two" ) << Values { 0, 10, 20, 30, 40 } << Values { 1, 1, NODATA, 1, 1 } << Values { 10, 30 }
                                 << "kuk";
  QTest::newRow( "at the start" ) << Values { 0, 10, 20 } << Values { NODATA, 1, 1 } << Values { 10 } << "uk";
  QTest::newRow( "at the end" ) << Values { 0, 10, 20 } << Values { 1, 1, NODATA } << Values { 10 } << "ku";
  QTest::newRow( "throughout" ) << Values { 0, 10 } << Values { NODATA, NODATA } << Values {} << "u";
  QTest::newRow( "within a millimetre of the end" )
    << Values { 0, 10, 10.0005 } << Values { 1, 1, NODATA } << Values {} << "k";
  QTest::newRow( "within a millimetre of the start" )
    << Values { 0, 0.0005, 10 } << Values { NODATA, 1, 1 } << Values {} << "k";
  QTest::newRow( "limits on both sides of it" )
    << Values { 0, 10, 20, 30, 40 } << Values { 0, 8, NODATA, 0, 8 } << Values { 5, 10, 30, 35 } << "kkukk";
}

void TestCutting::gaps()
{
  QFETCH( Values, along );
  QFETCH( Values, elevation );
  QFETCH( Values, places );
  QFETCH( QString, known );
  const Profile profile = profileOf( along, elevation );
  const std::vector<CutPiece> pieces = cut( profile, { 4 } );
  QVERIFY( cutPlaces( pieces ) == places );
  QCOMPARE( static_cast<int>( pieces.size() ), known.size() );
  for ( std::size_t i = 0; i < pieces.size(); ++i )
    QCOMPARE( pieces[i].known, known[static_cast<int>( i )] == QChar( 'k' ) );
  // Pipe that nothing feeds is not cut at all.
  QCOMPARE( cut( profile, {}, false ).size(), std::size_t( 1 ) );
  QCOMPARE( cut( profile, {}, false )[0].known, known.contains( QChar( 'k' ) ) );
}

void TestCutting::partOfAProfile()
{
  const Profile profile = profileOf( { 0, 10, 20, 30 }, { 0, 10, 0, 10 } );
  Cutter cutter;
  std::vector<CutPiece> pieces = cutter.cut( profile, 2.5, 12.5, { 5, 9 }, true );
  QVERIFY( cutPlaces( pieces ) == ( Values { 5, 9, 11 } ) );
  STILLHEAD_SAME( pieces.front().lowestM, 2.5 );
  STILLHEAD_SAME( pieces.back().lowestM, 7.5 );
  pieces = cutter.cut( profile, 10.0, 20.0, { 5 }, true );
  QVERIFY( cutPlaces( pieces ) == ( Values { 15 } ) );
  pieces = cutter.cut( profile, 20.0, 30.0, { 50 }, true );
  QCOMPARE( pieces.size(), std::size_t( 1 ) );
  STILLHEAD_SAME( pieces[0].lowestM, 0.0 );
  STILLHEAD_SAME( pieces[0].highestM, 10.0 );
}

// Pieces leave no gap; every piece lies between two neighbouring limits, but for what a millimetre holds; every crossing is cut.
void TestCutting::randomProfiles()
{
  std::mt19937 random( 9 );
  std::uniform_real_distribution<double> share( 0.0, 1.0 );
  std::size_t cutsMade = 0;
  for ( int round = 0; round < 400; ++round )
  {
    Values along { 0.0 }, elevation { 50.0 }, bend;
    while ( along.size() < 60 )
    {
      along.push_back( along.back() + 0.05 + 2.0 * share( random ) );
      elevation.push_back( elevation.back() + 4.0 * ( share( random ) - 0.5 ) );
      bend.push_back( 3.0 * ( share( random ) - 0.5 ) );
    }
    for ( int hole = 0; hole < round % 4; ++hole )
      elevation[static_cast<std::size_t>( 58.0 * share( random ) ) + 1] = NODATA;
    const Profile profile = profileOf( along, elevation, bend );
    Values cuts;
    for ( int i = 0; i < 12; ++i )
      cuts.push_back( 44.0 + 12.0 * share( random ) );
    std::sort( cuts.begin(), cuts.end() );
    const std::vector<CutPiece> pieces = cut( profile, cuts );
    cutsMade += pieces.size() - 1;
    STILLHEAD_SAME( pieces.front().fromM, 0.0 );
    STILLHEAD_SAME( pieces.back().toM, along.back() );
    for ( std::size_t i = 0; i < pieces.size(); ++i )
    {
      const CutPiece &piece = pieces[i];
      QVERIFY( piece.toM - piece.fromM >= LEAST_SPAN_M );
      if ( i > 0 )
        STILLHEAD_SAME( piece.fromM, pieces[i - 1].toM );
      if ( !piece.known )
      {
        QVERIFY( std::isnan( elevationAtM( profile, 0.5 * ( piece.fromM + piece.toM ) ) ) );
        continue;
      }
      const auto above = std::upper_bound( cuts.begin(), cuts.end(), piece.middleM );
      const double low = above == cuts.begin() ? -HUGE_VAL : *( above - 1 );
      const double high = above == cuts.end() ? HUGE_VAL : *above;
      for ( int k = 0; k <= 50; ++k )
      {
        const double at = std::min( piece.toM, piece.fromM + ( piece.toM - piece.fromM ) * k / 50.0 );
        const double z = elevationAtM( profile, at );
        QVERIFY( z >= piece.lowestM - 1e-9 && z <= piece.highestM + 1e-9 );
        const bool sliver = at - piece.fromM < LEAST_SPAN_M || piece.toM - at < LEAST_SPAN_M;
        const auto inside = [&]( double place ) {
          const double there = elevationAtM( profile, place );
          return there >= low - 1e-8 && there <= high + 1e-8;
        };
        const bool brief = inside( at - LEAST_SPAN_M ) && inside( at + LEAST_SPAN_M );
        QVERIFY( sliver || brief || inside( at ) );
      }
      STILLHEAD_NEAR( elevationAtM( profile, piece.lowestAtM ), piece.lowestM, 1e-9 );
      STILLHEAD_NEAR( elevationAtM( profile, piece.highestAtM ), piece.highestM, 1e-9 );
    }
  }
  QVERIFY( cutsMade > 10000 );
}

QTEST_APPLESS_MAIN( TestCutting )
#include "testcutting.moc"
