// SPDX-License-Identifier: GPL-2.0-or-later
// What CRS definitions say: placeholders, units along and up, and the way from one plan to another.
#include "core/geo/crs.h"
#include "core/geo/terraintransform.h"

#include <QTest>

#include <cmath>

using namespace stillhead;

namespace
{
  constexpr double US_FOOT = 1200.0 / 3937.0;

  constexpr const char *UNDEFINED_GEOGRAPHIC =
    R"(GEOGCS["Undefined geographic SRS",DATUM["unknown",SPHEROID["unknown",6378137,298.257223563]],)"
    R"(PRIMEM["Greenwich",0],UNIT["degree",0.0174532925199433]])";
  constexpr const char *LOCAL_FEET =
    R"(ENGCRS["Works grid",EDATUM["Works datum"],CS[Cartesian,2],AXIS["x",east],AXIS["y",north],)"
    R"(LENGTHUNIT["foot",0.3048]])";

} // namespace

class TestCrs : public QObject
{
    Q_OBJECT

  private slots:
    void placeholder_data();
    void placeholder();
    void units_data();
    void units();
    void samePlan_data();
    void samePlan();
    void thereAndBack_data();
    void thereAndBack();
    void knownPlace();
    void theVerticalPartChangesNothing();
    void operationOfTheHost();
    void outsideBecomesNan();
    void clonesGiveTheSameBits();
    void refusals();
};

void TestCrs::placeholder_data()
{
  QTest::addColumn<QString>( "definition" );
  QTest::addColumn<bool>( "isNone" );
  QTest::newRow( "nothing" ) << "" << true;
  QTest::newRow( "blanks" ) << "  \n" << true;
  QTest::newRow( "undefined geographic" ) << UNDEFINED_GEOGRAPHIC << true;
  QTest::newRow( "undefined cartesian" ) << R"(LOCAL_CS["Undefined Cartesian SRS"])" << true;
  QTest::newRow( "undefined cartesian, WKT2" )
    << R"(ENGCRS["Undefined Cartesian SRS with unknown unit",EDATUM["unknown"],CS[Cartesian,2],AXIS["x",east],AXIS["y",north],LENGTHUNIT["unknown",1]])"
    << true;
  QTest::newRow( "unknown engineering" ) << R"(LOCAL_CS["Unknown engineering CRS",UNIT["metre",1]])" << true;
  QTest::newRow( "a local grid with a name" ) << LOCAL_FEET << false;
  QTest::newRow( "projected" ) << "EPSG:32616" << false;
  QTest::newRow( "geographic" ) << "EPSG:4326" << false;
  QTest::newRow( "a definition without a name" ) << "+proj=utm +zone=16 +datum=WGS84 +type=crs" << false;
}

void TestCrs::placeholder()
{
  QFETCH( QString, definition );
  QTEST( isPlaceholderCrs( definition.toStdString() ), "isNone" );
}

void TestCrs::units_data()
{
  // 0 stands for "says nothing".
  QTest::addColumn<QString>( "definition" );
  QTest::addColumn<double>( "along" );
  QTest::addColumn<double>( "up" );
  QTest::newRow( "metres" ) << "EPSG:32616" << 1.0 << 0.0;
  QTest::newRow( "US survey feet" ) << "EPSG:2277" << US_FOOT << 0.0;
  QTest::newRow( "international feet" ) << "EPSG:2222" << 0.3048 << 0.0;
  QTest::newRow( "degrees" ) << "EPSG:4326" << 0.0 << 0.0;
  QTest::newRow( "degrees and ellipsoid height" ) << "EPSG:4979" << 0.0 << 1.0;
  QTest::newRow( "compound, heights in US survey feet" ) << "EPSG:26916+6360" << 1.0 << US_FOOT;
  QTest::newRow( "compound, heights in feet" ) << "EPSG:26916+8228" << 1.0 << 0.3048;
  QTest::newRow( "compound, heights in metres" ) << "EPSG:2277+5703" << US_FOOT << 1.0;
  QTest::newRow( "bound to a datum shift" )
    << "+proj=utm +zone=17 +ellps=intl +towgs84=1,2,3 +units=us-ft +type=crs" << US_FOOT << 0.0;
  QTest::newRow( "bound, with heights" )
    << "+proj=utm +zone=17 +ellps=intl +towgs84=1,2,3 +geoidgrids=none.gtx +vunits=ft +type=crs" << 1.0 << 0.3048;
  QTest::newRow( "local feet" ) << LOCAL_FEET << 0.3048 << 0.0;
  QTest::newRow( "heights only" ) << "EPSG:5703" << 0.0 << 1.0;
  QTest::newRow( "geocentric" ) << "EPSG:4978" << 0.0 << 0.0;
  QTest::newRow( "nonsense" ) << "no such thing" << 0.0 << 0.0;
}

void TestCrs::units()
{
  QFETCH( QString, definition );
  QFETCH( double, along );
  QFETCH( double, up );
  const double foundAlong = axisUnitMetres( definition.toStdString() ).value_or( 0.0 );
  const double foundUp = verticalUnit( definition.toStdString() ).value_or( VerticalUnit { 0.0, {} } ).metres;
  // The two feet differ by 2e-6 of each other.
  QVERIFY2( std::abs( foundAlong - along ) < 1e-12, qPrintable( QString::number( foundAlong, 'g', 17 ) ) );
  QVERIFY2( std::abs( foundUp - up ) < 1e-12, qPrintable( QString::number( foundUp, 'g', 17 ) ) );
}

void TestCrs::samePlan_data()
{
  QTest::addColumn<QString>( "first" );
  QTest::addColumn<QString>( "second" );
  QTest::addColumn<bool>( "isSame" );
  QTest::newRow( "itself" ) << "EPSG:32616"
                            << "EPSG:32616" << true;
  QTest::newRow( "compound and its horizontal part" ) << "EPSG:26916+5703"
                                                      << "EPSG:26916" << true;
  QTest::newRow( "two and three axes" ) << "EPSG:4979"
                                        << "EPSG:4326" << true;
  QTest::newRow( "latitude first or second" ) << "OGC:CRS84"
                                              << "EPSG:4326" << true;
  QTest::newRow( "without its name" ) << "+proj=utm +zone=16 +datum=WGS84 +type=crs"
                                      << "EPSG:32616" << true;
  QTest::newRow( "another zone" ) << "EPSG:32616"
                                  << "EPSG:32617" << false;
  QTest::newRow( "another unit" ) << "EPSG:2277"
                                  << "EPSG:32139" << false;
  QTest::newRow( "another datum" ) << "EPSG:26716"
                                   << "EPSG:26916" << false;
  QTest::newRow( "one local grid" ) << LOCAL_FEET << LOCAL_FEET << true;
}

void TestCrs::samePlan()
{
  QFETCH( QString, first );
  QFETCH( QString, second );
  QFETCH( bool, isSame );
  QCOMPARE( isSamePlan( first.toStdString(), second.toStdString() ), isSame );
  QCOMPARE( makePlanToTerrain( first.toStdString(), second.toStdString() )->isIdentity(), isSame );
}

void TestCrs::thereAndBack_data()
{
  QTest::addColumn<QString>( "lines" );
  QTest::addColumn<QString>( "terrain" );
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<double>( "tolerance" ); // a tenth of a micrometre, in units of the lines
  QTest::newRow( "zone to degrees" ) << "EPSG:32616"
                                     << "EPSG:4326" << 500123.25 << 4123456.75 << 1e-7;
  QTest::newRow( "degrees to zone" ) << "EPSG:4326"
                                     << "EPSG:32616" << -86.9876 << 37.123 << 1e-12;
  QTest::newRow( "zone to zone" ) << "EPSG:26916"
                                  << "EPSG:26917" << 712345.0 << 4321000.5 << 1e-7;
  QTest::newRow( "US survey feet to metres" ) << "EPSG:2277"
                                              << "EPSG:26914" << 3100000.0 << 10050000.0 << 1e-6;
  QTest::newRow( "web map to zone" ) << "EPSG:3857"
                                     << "EPSG:32616" << -9700000.0 << 4500000.0 << 1e-7;
}

void TestCrs::thereAndBack()
{
  QFETCH( QString, lines );
  QFETCH( QString, terrain );
  QFETCH( double, x );
  QFETCH( double, y );
  QFETCH( double, tolerance );
  const TerrainTransform transform( lines.toStdString(), terrain.toStdString() );
  std::vector<PlanPoint> plan;
  for ( int i = 0; i < 50; ++i )
    plan.push_back( { x * ( 1.0 + 1e-6 * i ), y * ( 1.0 - 1e-6 * i ) } );
  std::vector<TerrainPoint> there( plan.size() );
  std::vector<PlanPoint> back( plan.size() );
  transform.transform( plan.data(), there.data(), plan.size() );
  transform.transformBack( there.data(), back.data(), plan.size() );
  for ( std::size_t i = 0; i < plan.size(); ++i )
  {
    QVERIFY( std::abs( there[i].x - plan[i].x ) > 1.0 );
    QVERIFY2( std::abs( back[i].x - plan[i].x ) < tolerance, qPrintable( QString::number( back[i].x - plan[i].x ) ) );
    QVERIFY2( std::abs( back[i].y - plan[i].y ) < tolerance, qPrintable( QString::number( back[i].y - plan[i].y ) ) );
  }
}

void TestCrs::knownPlace()
{
  // On the central meridian of a transverse Mercator zone the easting is the false easting, on the equator the
  // northing is the false northing: EPSG Guidance Note 7-2, UTM parameters (500 000 m, 0 m; zone 16: 87 degrees west).
  const TerrainTransform transform( "EPSG:4326", "EPSG:32616" );
  const PlanPoint plan { -87.0, 0.0 };
  TerrainPoint terrain;
  transform.transform( &plan, &terrain, 1 );
  QVERIFY( std::abs( terrain.x - 500000.0 ) < 1e-6 );
  QVERIFY( std::abs( terrain.y ) < 1e-6 );
}

void TestCrs::theVerticalPartChangesNothing()
{
  const PlanPoint plan { -97.7, 30.3 };
  TerrainPoint flat;
  makePlanToTerrain( "EPSG:4269", "EPSG:2277" )->transform( &plan, &flat, 1 );
  for ( const char *lines : { "EPSG:4269", "EPSG:4269+6360" } )
  {
    for ( const char *terrain : { "EPSG:2277+6360", "EPSG:2277+5703" } )
    {
      TerrainPoint compound;
      makePlanToTerrain( lines, terrain )->transform( &plan, &compound, 1 );
      QCOMPARE( compound.x, flat.x );
      QCOMPARE( compound.y, flat.y );
    }
  }
}

void TestCrs::operationOfTheHost()
{
  const TerrainTransform transform( "EPSG:32616", "EPSG:32617", "+proj=affine +xoff=10 +yoff=-20" );
  QVERIFY( !transform.isIdentity() );
  const PlanPoint plan { 1.0, 2.0 };
  TerrainPoint terrain;
  transform.transform( &plan, &terrain, 1 );
  QCOMPARE( terrain.x, 11.0 );
  QCOMPARE( terrain.y, -18.0 );
}

void TestCrs::outsideBecomesNan()
{
  const TerrainTransform transform( "EPSG:4326", "EPSG:32616" );
  const std::vector<PlanPoint> plan { { -87.0, 40.0 }, { -87.0, 95.0 }, { -86.0, 40.0 } };
  std::vector<TerrainPoint> terrain( plan.size() );
  transform.transform( plan.data(), terrain.data(), plan.size() );
  QVERIFY( std::isfinite( terrain[0].x ) && std::isfinite( terrain[0].y ) );
  QVERIFY( std::isnan( terrain[1].x ) && std::isnan( terrain[1].y ) );
  QVERIFY( std::isfinite( terrain[2].x ) && std::isfinite( terrain[2].y ) );
  transform.transform( plan.data(), terrain.data(), 0 );
}

void TestCrs::clonesGiveTheSameBits()
{
  const std::unique_ptr<PlanToTerrain> original = makePlanToTerrain( "EPSG:26716", "EPSG:26916" );
  std::unique_ptr<PlanToTerrain> copy = original->clone()->clone();
  for ( int i = 0; i < 100; ++i )
  {
    const PlanPoint plan { 450000.0 + 1000.5 * i, 4200000.0 + 333.25 * i };
    TerrainPoint a;
    TerrainPoint b;
    original->transform( &plan, &a, 1 );
    copy->transform( &plan, &b, 1 );
    QVERIFY( a.x == b.x && a.y == b.y );
  }
}

void TestCrs::refusals()
{
  QVERIFY_EXCEPTION_THROWN( makePlanToTerrain( "no such thing", "EPSG:32616" ), std::runtime_error );
  QVERIFY_EXCEPTION_THROWN( makePlanToTerrain( "EPSG:32616", "EPSG:5703" ), std::runtime_error );
  QVERIFY_EXCEPTION_THROWN( makePlanToTerrain( LOCAL_FEET, "EPSG:32616" ), std::runtime_error );
  QVERIFY_EXCEPTION_THROWN( makePlanToTerrain( "EPSG:32616", "EPSG:32617", "+proj=nonsense" ), std::runtime_error );
}

QTEST_APPLESS_MAIN( TestCrs )
#include "testcrs.moc"
