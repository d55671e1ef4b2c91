// SPDX-License-Identifier: GPL-2.0-or-later
// Ground lengths and scales: published geodesics, the short-leg formulas against the full inverse, projections, feet.
#include "core/geo/geodesicmeasure.h"

#include <QTest>

#include <cmath>
#include <random>
#include <stdexcept>

#include <geodesic.h>

using namespace stillhead;

namespace
{
  constexpr double WGS84_A = 6378137.0;
  constexpr double WGS84_F = 1.0 / 298.257223563;

  double lengthM( const PlanMeasure &measure, PlanPoint from, PlanPoint to )
  {
    const PlanPoint vertices[] = { from, to };
    double distances[2] = { -1.0, -1.0 };
    measure.distancesAlongM( vertices, 2, distances );
    return distances[0] == 0.0 ? distances[1] : -1.0;
  }

  bool isNear( double a, double b, double tolerance )
  {
    return std::abs( a - b ) <= tolerance;
  }

} // namespace

class TestGeodesicMeasure : public QObject
{
    Q_OBJECT

  private slots:
    void published_data();
    void published();
    void shortLegsAgreeWithTheFullInverse();
    void aLegHasOneLengthBothWays();
    void projectionsDoNotStretch_data();
    void projectionsDoNotStretch();
    void distancesAddUpFromTheFirstVertex();
    void scale_data();
    void scale();
    void overTheAntimeridian();
    void otherAngles();
    void withoutEllipsoid();
    void sphere();
    void clonesGiveTheSameBits();
    void refusals();
};

void TestGeodesicMeasure::published_data()
{
  QTest::addColumn<QString>( "crs" );
  QTest::addColumn<double>( "fromLatitude" );
  QTest::addColumn<double>( "fromLongitude" );
  QTest::addColumn<double>( "toLatitude" );
  QTest::addColumn<double>( "toLongitude" );
  QTest::addColumn<double>( "lengthM" );
  QTest::addColumn<double>( "toleranceM" );

  // C. Karney, Algorithms for geodesics, Journal of Geodesy 87 (2013) 43-55, Table 3: a short line on WGS 84.
  QTest::newRow( "short line" ) << "EPSG:4326" << -30.12345 << 0.0 << -30.12344 << 0.00005 << 4.944208 << 5e-7;
  // PROJ's manual page geod(1), the inverse example on Clarke 1866: 2587.504 US statute miles of 5280 survey feet.
  QTest::newRow( "Clarke 1866" ) << "+proj=longlat +ellps=clrk66 +type=crs" << 42.25 << -( 71.0 + 7.0 / 60.0 )
                                 << 45.0 + 31.0 / 60.0 << -( 123.0 + 41.0 / 60.0 )
                                 << 2587.504 * 5280.0 * 1200.0 / 3937.0 << 0.5e-3 * 1609.4;
  // GeographicLib's own test cases (geodtest.c, rows 1 to 4), WGS 84.
  QTest::newRow( "long line 1" ) << "EPSG:4326" << 35.60777 << -139.44815 << -11.17491 << -69.95921
                                 << 8935244.5604818305 << 1e-6;
  QTest::newRow( "long line 2" ) << "EPSG:4326" << 55.52454 << 106.05087 << 77.03196 << 197.18234 << 4105086.1713924406
                                 << 1e-6;
  QTest::newRow( "long line 3" ) << "EPSG:4326" << -21.97856 << 142.59065 << 41.84138 << 98.56635 << 8394328.894657671
                                 << 1e-6;
  QTest::newRow( "long line 4" ) << "EPSG:4326" << -66.99028 << 112.2363 << -12.70631 << 285.90344
                                 << 11150344.2312080241 << 1e-6;
}

void TestGeodesicMeasure::published()
{
  QFETCH( QString, crs );
  QFETCH( double, fromLatitude );
  QFETCH( double, fromLongitude );
  QFETCH( double, toLatitude );
  QFETCH( double, toLongitude );
  QFETCH( double, toleranceM );
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( crs.toStdString() );
  const double found = ::lengthM( *measure, { fromLongitude, fromLatitude }, { toLongitude, toLatitude } );
  QFETCH( double, lengthM );
  QVERIFY2( isNear( found, lengthM, toleranceM ), qPrintable( QString::number( found, 'f', 9 ) ) );
}

void TestGeodesicMeasure::shortLegsAgreeWithTheFullInverse()
{
  geod_geodesic wgs84 {};
  geod_init( &wgs84, WGS84_A, WGS84_F );
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( "EPSG:4326" );
  std::mt19937 random( 4711 );
  std::uniform_real_distribution<double> unit( 0.0, 1.0 );
  double worstM = 0.0;
  for ( int i = 0; i < 40000; ++i )
  {
    // Latitudes up to the poles, legs from a millimetre to where the full inverse takes over and beyond.
    const double latitude = -89.8 + 179.6 * unit( random );
    const double step = std::pow( 10.0, -8.0 + 7.5 * unit( random ) );
    const double azimuth = 2.0 * 3.14159265358979323846 * unit( random );
    const PlanPoint from { 10.0 * unit( random ), latitude };
    const PlanPoint to { from.x + step * std::sin( azimuth ), from.y + 0.5 * step * std::cos( azimuth ) };
    if ( std::abs( to.y ) > 90.0 )
      continue;
    double expectedM = 0.0;
    geod_inverse( &wgs84, from.y, from.x, to.y, to.x, &expectedM, nullptr, nullptr );
    worstM = std::max( worstM, std::abs( expectedM - lengthM( *measure, from, to ) ) );
  }
  // The last digit of a coordinate in degrees is 1 to 2 nm.
  QVERIFY2( worstM < 1e-8, qPrintable( QString::number( worstM ) ) );
}

void TestGeodesicMeasure::aLegHasOneLengthBothWays()
{
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( "EPSG:32616" );
  std::mt19937 random( 99 );
  std::uniform_real_distribution<double> metres( -400.0, 400.0 );
  for ( int i = 0; i < 1000; ++i )
  {
    const PlanPoint from { 500000.0 + metres( random ), 4100000.0 + metres( random ) };
    const PlanPoint to { from.x + metres( random ), from.y + metres( random ) };
    QVERIFY( lengthM( *measure, from, to ) == lengthM( *measure, to, from ) );
  }
}

void TestGeodesicMeasure::projectionsDoNotStretch_data()
{
  QTest::addColumn<QString>( "crs" );
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<QString>( "geographic" );
  QTest::newRow( "UTM" ) << "EPSG:32616" << 612000.0 << 4100000.0 << "EPSG:4326";
  QTest::newRow( "US survey feet" ) << "EPSG:2277" << 3100000.0 << 10050000.0 << "EPSG:4269";
  QTest::newRow( "compound" ) << "EPSG:2277+6360" << 3100000.0 << 10050000.0 << "EPSG:4269";
  QTest::newRow( "web map" ) << "EPSG:3857" << -9700000.0 << 6500000.0 << "EPSG:4326";
  QTest::newRow( "northing before easting in the definition" ) << "EPSG:2193" << 1757000.0 << 5917000.0 << "EPSG:4167";
  QTest::newRow( "bound to a datum shift" ) << "+proj=utm +zone=16 +ellps=intl +towgs84=-87,-98,-121 +type=crs"
                                            << 612000.0 << 4100000.0 << "+proj=longlat +ellps=intl +type=crs";
}

void TestGeodesicMeasure::projectionsDoNotStretch()
{
  QFETCH( QString, crs );
  QFETCH( double, x );
  QFETCH( double, y );
  QFETCH( QString, geographic );
  // Independent way: cs2cs of the vertices to the CRS's own geographic CRS, and PROJ's inverse geodesic there.
  PJ_CONTEXT *context = proj_context_create();
  PJ *raw = proj_create_crs_to_crs( context, qPrintable( crs ), qPrintable( geographic ), nullptr );
  QVERIFY( raw );
  PJ *toDegrees = proj_normalize_for_visualization( context, raw );
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( crs.toStdString() );
  const std::unique_ptr<PlanMeasure> onDegrees = makePlanMeasure( geographic.toStdString() );
  for ( int i = 1; i < 20; ++i )
  {
    const PlanPoint from { x, y };
    const PlanPoint to { x + 37.0 * i, y - 3.0 * i * i };
    const PJ_COORD a = proj_trans( toDegrees, PJ_FWD, proj_coord( from.x, from.y, 0, 0 ) );
    const PJ_COORD b = proj_trans( toDegrees, PJ_FWD, proj_coord( to.x, to.y, 0, 0 ) );
    const double expectedM = lengthM( *onDegrees, { a.xy.x, a.xy.y }, { b.xy.x, b.xy.y } );
    QVERIFY( isNear( lengthM( *measure, from, to ), expectedM, 1e-8 ) );
  }
  proj_destroy( toDegrees );
  proj_destroy( raw );
  proj_context_destroy( context );
}

void TestGeodesicMeasure::distancesAddUpFromTheFirstVertex()
{
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( "EPSG:32616" );
  const std::vector<PlanPoint> line { { 500000.0, 4000000.0 }, { 500300.0, 4000400.0 }, { 500300.0, 4000400.0 },
    { 500300.0, 3999400.0 } };
  std::vector<double> along( line.size() );
  measure->distancesAlongM( line.data(), line.size(), along.data() );
  QCOMPARE( along[0], 0.0 );
  QCOMPARE( along[1], lengthM( *measure, line[0], line[1] ) );
  QCOMPARE( along[2], along[1] );
  QCOMPARE( along[3], along[2] + lengthM( *measure, line[2], line[3] ) );
  // On the central meridian the scale of UTM is 0.9996 by definition.
  QVERIFY( isNear( along[1] * 0.9996, 500.0, 1e-4 ) );
  measure->distancesAlongM( line.data(), 0, along.data() );
}

void TestGeodesicMeasure::scale_data()
{
  QTest::addColumn<QString>( "crs" );
  QTest::addColumn<double>( "x" );
  QTest::addColumn<double>( "y" );
  QTest::addColumn<double>( "step" );
  QTest::newRow( "UTM" ) << "EPSG:32616" << 712000.0 << 4100000.0 << 1.0;
  QTest::newRow( "US survey feet" ) << "EPSG:2277" << 3100000.0 << 10050000.0 << 3.0;
  QTest::newRow( "degrees" ) << "EPSG:4326" << -88.0 << 37.0 << 1e-5;
  QTest::newRow( "web map" ) << "EPSG:3857" << -9700000.0 << 8500000.0 << 1.0;
}

void TestGeodesicMeasure::scale()
{
  QFETCH( QString, crs );
  QFETCH( double, x );
  QFETCH( double, y );
  QFETCH( double, step );
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( crs.toStdString() );
  const GroundScale scale = measure->scaleAt( { x, y } );
  for ( int i = 0; i < 12; ++i )
  {
    const double dx = 100.0 * step * std::cos( 0.5236 * i );
    const double dy = 100.0 * step * std::sin( 0.5236 * i );
    // Centred on the place, so that the change of scale along the leg drops out.
    const double expectedM = lengthM( *measure, { x - dx, y - dy }, { x + dx, y + dy } );
    const double found = scale.distanceM( 2.0 * dx, 2.0 * dy );
    QVERIFY2( isNear( found, expectedM, 1e-8 * expectedM ), qPrintable( QString::number( found / expectedM - 1.0 ) ) );
  }
}

void TestGeodesicMeasure::overTheAntimeridian()
{
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( "EPSG:4326" );
  QVERIFY( isNear( lengthM( *measure, { 179.9995, 10.0 }, { -179.9995, 10.0 } ),
    lengthM( *measure, { 0.0, 10.0 }, { 0.001, 10.0 } ), 1e-7 ) );
  // UTM zone 1 reaches the antimeridian at its western edge.
  const std::unique_ptr<PlanMeasure> zone = makePlanMeasure( "EPSG:32601" );
  const GroundScale scale = zone->scaleAt( { 166021.4431, 1.0 } );
  QVERIFY( isNear( scale.xx, 1.0 / 1.00098, 2e-4 ) );
}

void TestGeodesicMeasure::otherAngles()
{
  // The same ellipsoid in degrees and in grads (400 to the circle).
  const std::unique_ptr<PlanMeasure> degrees = makePlanMeasure( "+proj=longlat +a=6378249.2 +b=6356515 +type=crs" );
  const std::unique_ptr<PlanMeasure> grads = makePlanMeasure( "EPSG:4807" );
  const double a = lengthM( *degrees, { 1.8, 45.0 }, { 1.81, 45.02 } );
  const double b = lengthM( *grads, { 2.0, 50.0 }, { 2.0 + 0.01 / 0.9, 50.0 + 0.02 / 0.9 } );
  QVERIFY( isNear( a, b, 1e-6 ) );
}

void TestGeodesicMeasure::withoutEllipsoid()
{
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure(
    R"(ENGCRS["Works grid",EDATUM["Works datum"],CS[Cartesian,2],AXIS["x",east],AXIS["y",north],LENGTHUNIT["foot",0.3048]])" );
  QCOMPARE( lengthM( *measure, { 100.0, 200.0 }, { 103.0, 204.0 } ), 5.0 * 0.3048 );
  QCOMPARE( measure->scaleAt( { 0.0, 0.0 } ).distanceM( 3.0, 4.0 ), 5.0 * 0.3048 );
  QVERIFY_EXCEPTION_THROWN( GeodesicMeasure( R"(LOCAL_CS["Works grid",UNIT["metre",1]])" ), std::runtime_error );
}

void TestGeodesicMeasure::sphere()
{
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( "+proj=longlat +R=6371000 +type=crs" );
  const double degreeM = 6371000.0 * 3.14159265358979323846 / 180.0;
  QVERIFY( isNear( lengthM( *measure, { 5.0, 0.0 }, { 5.0, 0.01 } ), 0.01 * degreeM, 1e-8 ) );
  QVERIFY( isNear( lengthM( *measure, { 5.0, 0.0 }, { 15.0, 0.0 } ), 10.0 * degreeM, 1e-6 ) );
}

void TestGeodesicMeasure::clonesGiveTheSameBits()
{
  const std::unique_ptr<PlanMeasure> original = makePlanMeasure( "EPSG:2277" );
  const std::unique_ptr<PlanMeasure> copy = original->clone()->clone();
  for ( int i = 0; i < 100; ++i )
  {
    const PlanPoint from { 3100000.0 + 7.25 * i, 10050000.0 };
    const PlanPoint to { 3100100.0, 10050000.0 - 11.5 * i };
    QVERIFY( lengthM( *original, from, to ) == lengthM( *copy, from, to ) );
    QVERIFY( original->scaleAt( from ).xy == copy->scaleAt( from ).xy );
  }
}

void TestGeodesicMeasure::refusals()
{
  QVERIFY_EXCEPTION_THROWN( makePlanMeasure( "no such thing" ), std::runtime_error );
  QVERIFY_EXCEPTION_THROWN( makePlanMeasure( "EPSG:5703" ), std::runtime_error );
  const std::unique_ptr<PlanMeasure> measure = makePlanMeasure( "EPSG:4326" );
  try
  {
    lengthM( *measure, { 0.0, 0.0 }, { 500000.0, 4000000.0 } );
    QFAIL( "a latitude of four million degrees was measured" );
  }
  catch ( const std::runtime_error &error )
  {
    QVERIFY2( QString::fromUtf8( error.what() ).contains( "(500000.000000, 4000000.000000)" ), error.what() );
  }
}

QTEST_APPLESS_MAIN( TestGeodesicMeasure )
#include "testgeodesicmeasure.moc"
