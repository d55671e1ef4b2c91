// SPDX-License-Identifier: GPL-2.0-or-later
// Profiles of whole lines: over the terrain at their cover, from drawn Z, and over a terrain in another CRS.
#include "core/profile/profilebuilder.h"
#include "core/profile/profilesearch.h"
#include "core/terrain/segmentwalk.h"
#include "tests/support/bilinear.h"
#include "tests/support/networksketch.h"
#include "tests/support/tolerance.h"

using namespace stillhead;
using stillhead::test::MemoryTerrain;
using stillhead::test::NODATA;
using stillhead::test::sketched;

namespace
{

  //! A plan that is bent on its way to the terrain.
  class CurvedMap : public PlanToTerrain
  {
    public:
      using Map = TerrainPoint ( * )( const PlanPoint & );

      explicit CurvedMap( Map map )
        : mMap( map )
      {
      }

      std::unique_ptr<PlanToTerrain> clone() const override { return std::make_unique<CurvedMap>( *this ); }
      bool isIdentity() const override { return false; }
      void transform( const PlanPoint *plan, TerrainPoint *terrain, std::size_t count ) const override
      {
        for ( std::size_t i = 0; i < count; ++i )
          terrain[i] = mMap( plan[i] );
      }

    private:
      Map mMap;
  };

  struct Built
  {
      CanonicalDrawing drawing;
      Profile profile;
      CanonicalLine line() const { return drawing.lines.front(); }
  };

  Built built( const std::string &sketch, const MemoryTerrain &terrain, bool useLineZ = false,
    const PlanToTerrain &map = SamePlan() )
  {
    Built result;
    std::vector<Finding> findings;
    Monitor monitor;
    result.drawing = canonicalDrawing( sketched( sketch ), PlanarMeasure(), 1, findings, monitor );
    TileCache cache( terrain );
    ProfileBuilder( result.drawing, map, cache, useLineZ ).build( result.line(), result.profile );
    return result;
  }

  //! Pixel (c, r) stands at (c, −r); the surface is x + 10·y there.
  MemoryTerrain plane( int columns, int rows )
  {
    return MemoryTerrain::sampled(
      columns, rows, test::centresAt( 0.0, 0.0, 1.0 ), []( double x, double y ) { return x + 10.0 * y; } );
  }

} // namespace

using Values = std::vector<double>;
Q_DECLARE_METATYPE( Values )

class TestProfileBuilder : public QObject
{
    Q_OBJECT

  private slots:
    void overTerrain_data();
    void overTerrain();
    void fromSurvey_data();
    void fromSurvey();
    void search();
    void anotherCrs_data();
    void anotherCrs();
    void whereTheTransformFails();
    void aLegWithoutGroundLengthIsSoonFollowed();
    void rotatedAndSouthUpTerrain_data();
    void rotatedAndSouthUpTerrain();
    void memoryIsReused();
};

void TestProfileBuilder::overTerrain_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<Values>( "along" );
  QTest::addColumn<Values>( "elevation" );
  QTest::newRow( "one leg" ) << "main 0.5 0, 2.5 0" << Values { 0, 0.5, 1.5, 2 } << Values { 0.5, 1, 2, 2.5 };
  QTest::newRow( "drawn the other way: one canonical direction" )
    << "main 2.5 0, 0.5 0" << Values { 0, 0.5, 1.5, 2 } << Values { 0.5, 1, 2, 2.5 };
  QTest::newRow( "cover is taken off" ) << "main cover=0.25 0.5 0, 2.5 0" << Values { 0, 0.5, 1.5, 2 }
                                        << Values { 0.25, 0.75, 1.75, 2.25 };
  QTest::newRow( "a vertex between knots" )
    << "main 0.25 0, 0.75 0, 0.75 -0.5" << Values { 0, 0.5, 1.0 } << Values { 0.25, 0.75, -4.25 };
  QTest::newRow( "a vertex on a pixel centre" )
    << "main 0.5 -1, 1 -1, 1 -1.5" << Values { 0, 0.5, 1.0 } << Values { -9.5, -9, -14 };
  QTest::newRow( "a repeated vertex is one" )
    << "main 0.25 0, 0.75 0, 0.75 0" << Values { 0, 0.5 } << Values { 0.25, 0.75 };
  QTest::newRow( "runs off the terrain" )
    << "main 2 0, 4.5 0" << Values { 0, 1, 1.5, 2.5 } << Values { 2, 3, 3, NODATA };
  QTest::newRow( "comes from off the terrain" )
    << "main -1.5 0, 1 0" << Values { 0, 1, 1.5, 2.5 } << Values { NODATA, 0, 0, 1 };
}

void TestProfileBuilder::overTerrain()
{
  QFETCH( QString, sketch );
  QFETCH( Values, along );
  QFETCH( Values, elevation );
  const Profile profile = built( sketch.toStdString(), plane( 4, 3 ) ).profile;
  QCOMPARE( profile.knots(), along.size() );
  QCOMPARE( profile.elevationM.size(), along.size() );
  QCOMPARE( profile.bendM.size(), along.size() );
  for ( std::size_t i = 0; i < along.size(); ++i )
  {
    STILLHEAD_SAME( profile.alongM[i], along[i] );
    STILLHEAD_SAME( profile.elevationM[i], elevation[i] );
  }
  for ( std::size_t i = 0; i + 1 < along.size(); ++i )
    QCOMPARE( std::isnan( profile.bendM[i] ), std::isnan( elevation[i] ) || std::isnan( elevation[i + 1] ) );
}

void TestProfileBuilder::fromSurvey_data()
{
  QTest::addColumn<QString>( "sketch" );
  QTest::addColumn<bool>( "survey" );
  QTest::addColumn<Values>( "along" );
  QTest::addColumn<Values>( "elevation" );
  QTest::newRow( "straight between vertices, no cover" )
    << "main cover=2 0 0 50, 2 0 40, 3 0 45" << true << Values { 0, 2, 3 } << Values { 50, 40, 45 };
  QTest::newRow( "a vertex without Z leaves its legs unknown" )
    << "main 0 0 50, 1 0 nan, 2 0 40, 3 0 41" << true << Values { 0, 1, 2, 3 } << Values { NODATA, NODATA, 40, 41 };
  QTest::newRow( "some zeros are a survey" )
    << "main 0 0 0, 1 0 -2, 2 0 0" << true << Values { 0, 1, 2 } << Values { 0, -2, 0 };
  QTest::newRow( "a riser stays" ) << "main 0 0 5, 1 0 5, 1 0 8, 2 0 8" << true << Values { 0, 1, 1, 2 }
                                   << Values { 5, 5, 8, 8 };
  QTest::newRow( "zero throughout: terrain" )
    << "main 0 0 0, 2 0 0" << false << Values { 0, 1, 2 } << Values { 0, 1, 2 };
  QTest::newRow( "nothing but gaps and zeros: terrain" )
    << "main cover=1 0 0 nan, 2 0 0" << false << Values { 0, 1, 2 } << Values { -1, 0, 1 };
  QTest::newRow( "missing throughout: terrain" )
    << "main 0 0, 2 0; main 0 9 7, 1 9 7" << false << Values { 0, 1, 2 } << Values { 0, 1, 2 };
}

void TestProfileBuilder::fromSurvey()
{
  QFETCH( QString, sketch );
  QFETCH( bool, survey );
  QFETCH( Values, along );
  QFETCH( Values, elevation );
  const Built result = built( sketch.toStdString(), plane( 4, 3 ), true );
  QCOMPARE( hasSurvey( result.drawing, result.line() ), survey );
  QCOMPARE( result.profile.knots(), along.size() );
  for ( std::size_t i = 0; i < along.size(); ++i )
  {
    STILLHEAD_SAME( result.profile.alongM[i], along[i] );
    STILLHEAD_SAME( result.profile.elevationM[i], elevation[i] );
  }
}

void TestProfileBuilder::search()
{
  Profile profile;
  profile.alongM = { 0, 10, 20, 20, 30, 40 };
  profile.elevationM = { 5, 7, 6, 9, 9, 3 };
  profile.bendM = { 4, 0, 0, NODATA, 0, 0 };
  QCOMPARE( pieceAt( profile, -1.0 ), std::size_t( 0 ) );
  QCOMPARE( pieceAt( profile, 0.0 ), std::size_t( 0 ) );
  QCOMPARE( pieceAt( profile, 10.0 ), std::size_t( 1 ) );
  QCOMPARE( pieceAt( profile, 20.0 ), std::size_t( 3 ) );
  QCOMPARE( pieceAt( profile, 40.0 ), std::size_t( 4 ) );
  STILLHEAD_SAME( elevationAtM( profile, 5.0 ), 5.0 );
  STILLHEAD_SAME( elevationAtM( profile, 15.0 ), 6.5 );
  STILLHEAD_SAME( elevationAtM( profile, 20.0 ), 9.0 );
  STILLHEAD_SAME( elevationAtM( profile, 25.0 ), NODATA );
  STILLHEAD_SAME( elevationAtM( profile, 30.0 ), 9.0 );
  STILLHEAD_SAME( elevationAtM( profile, 40.0 ), 3.0 );
}

// The surface is a plane, which the bilinear surface is exactly: what is off is the way that was followed.
void TestProfileBuilder::anotherCrs_data()
{
  QTest::addColumn<int>( "map" );
  QTest::addColumn<double>( "pixel" );
  QTest::newRow( "an arc, pixels of 1 m" ) << 0 << 1.0;
  QTest::newRow( "an arc, pixels of 90 m" ) << 0 << 90.0;
  QTest::newRow( "there and back: on its chord in the middle" ) << 1 << 1.0;
  QTest::newRow( "unevenly stretched along a straight line" ) << 2 << 5.0;
}

void TestProfileBuilder::anotherCrs()
{
  QFETCH( int, map );
  QFETCH( double, pixel );
  const CurvedMap::Map maps[] {
    []( const PlanPoint &p ) -> TerrainPoint {
      return { p.x - 1e-5 * p.y * p.y, p.y + 1e-5 * p.x * p.x };
    },
    []( const PlanPoint &p ) -> TerrainPoint {
      return { p.x, p.y + 5.0 * std::sin( 2.0 * 3.14159265358979 * p.x / 1600.0 ) };
    },
    []( const PlanPoint &p ) -> TerrainPoint {
      return { p.x + 1e-5 * p.x * p.x, p.y };
    },
  };
  const CurvedMap curved( maps[map] );
  const int columns = static_cast<int>( 2000.0 / pixel );
  const int rows = static_cast<int>( 700.0 / pixel );
  for ( const bool alongX : { true, false } )
  {
    const MemoryTerrain terrain = MemoryTerrain::sampled( columns, rows, test::centresAt( -100.0, 600.0, pixel ),
      [alongX]( double x, double y ) { return alongX ? x : y; } );
    const Built result = built( "main 0 100, 1600 100, 1600 300", terrain, false, curved );
    double worst = 0.0;
    for ( int i = 0; i <= 18000; ++i )
    {
      const double along = 0.1 * i;
      const TerrainPoint there = maps[map]( result.drawing.placeAt( result.line(), along ) );
      worst = std::max( worst, std::abs( elevationAtM( result.profile, along ) - ( alongX ? there.x : there.y ) ) );
    }
    QVERIFY2( worst <= std::min( 0.1 * pixel, 0.001 ), qPrintable( QString::number( worst ) ) );
    // Not finer than needed: knots of the terrain, and chords of an arc of 50 km radius at half a millimetre.
    QVERIFY( result.profile.knots() < static_cast<std::size_t>( 2 * columns + 800 ) );
  }
}

void TestProfileBuilder::whereTheTransformFails()
{
  const CurvedMap failing( []( const PlanPoint &p ) -> TerrainPoint {
    return p.x > 10.0 ? TerrainPoint { NODATA, NODATA } : TerrainPoint { p.x, p.y };
  } );
  const MemoryTerrain terrain = plane( 40, 3 );
  const Built result = built( "main 0 0, 20 0, 30 0", terrain, false, failing );
  STILLHEAD_SAME( result.profile.alongM.back(), 30.0 );
  STILLHEAD_NEAR( elevationAtM( result.profile, 9.9 ), 9.9, 1e-9 );
  QVERIFY( std::isnan( elevationAtM( result.profile, 10.1 ) ) );
  QVERIFY( std::isnan( elevationAtM( result.profile, 25.0 ) ) );
  // A line that cannot be placed at all is one without elevation, soon told.
  const CurvedMap lost( []( const PlanPoint & ) -> TerrainPoint { return { NODATA, NODATA }; } );
  const Built nowhere = built( "main 0 0, 20 0", terrain, false, lost );
  QVERIFY( nowhere.profile.knots() < 2000 );
  for ( std::size_t i = 0; i + 1 < nowhere.profile.knots(); ++i )
    QVERIFY( std::isnan( nowhere.profile.bendM[i] ) );
}

// Vertices that differ by less than the measure can tell: the leg has no length to be followed by, and rounding must not
// send the builder down all its halvings (2²⁴ places).
void TestProfileBuilder::aLegWithoutGroundLengthIsSoonFollowed()
{
  static int asked;
  asked = 0;
  const CurvedMap counting( []( const PlanPoint &p ) -> TerrainPoint {
    ++asked;
    return { p.x / 3.0 + 1e-5 * p.y * p.y, p.y * 0.7 };
  } );
  CanonicalDrawing drawing;
  const double x = 10.1;
  drawing.vertices = { { x, -1.3 }, { std::nextafter( x, 11.0 ), -1.3 }, { 20.0, -1.3 } };
  drawing.alongM = { 0.0, 0.0, 9.9 };
  CanonicalLine line;
  line.count = 3;
  line.lengthM = 9.9;
  drawing.lines = { line };
  const MemoryTerrain terrain = plane( 40, 3 );
  TileCache cache( terrain );
  Profile profile;
  ProfileBuilder( drawing, counting, cache, false ).build( drawing.lines[0], profile );
  STILLHEAD_SAME( profile.alongM.back(), 9.9 );
  QVERIFY( asked < 200 );
}

using GeoTransform = std::array<double, 6>;
Q_DECLARE_METATYPE( GeoTransform )

void TestProfileBuilder::rotatedAndSouthUpTerrain_data()
{
  QTest::addColumn<GeoTransform>( "geoTransform" );
  QTest::newRow( "south up" ) << GeoTransform { -5.0, 0.5, 0.0, -5.0, 0.0, 0.5 };
  QTest::newRow( "a quarter turn" ) << GeoTransform { -5.0, 0.0, 0.5, -5.0, 0.5, 0.0 };
  QTest::newRow( "a third of a right angle" )
    << GeoTransform { -8.25, 0.5 * std::sqrt( 0.75 ), 0.25, -0.75, -0.25, 0.5 * std::sqrt( 0.75 ) };
  QTest::newRow( "sheared, columns run west" ) << GeoTransform { 12.0, -0.5, 0.125, -5.0, 0.0, 0.5 };
}

void TestProfileBuilder::rotatedAndSouthUpTerrain()
{
  QFETCH( GeoTransform, geoTransform );
  const MemoryTerrain terrain = MemoryTerrain::sampled( 30, 30, geoTransform,
    []( double x, double y ) { return 100.0 + 0.5 * x - 0.25 * y + std::sin( 3.0 * x ) * std::cos( 2.0 * y ); } );
  const Built result = built( "main 0 0, 3 1, 4 3.5, 2 2", terrain );
  for ( int i = 0; i <= 1000; ++i )
  {
    const double along = result.line().lengthM * i / 1000.0;
    const PlanPoint place = result.drawing.placeAt( result.line(), along );
    const TerrainPoint pixel = terrain.grid().toPixel( { place.x, place.y } );
    STILLHEAD_NEAR( elevationAtM( result.profile, along ), test::bilinear( terrain, pixel.x, pixel.y ), 1e-9 );
  }
}

void TestProfileBuilder::memoryIsReused()
{
  const MemoryTerrain terrain = plane( 40, 3 );
  Built result = built( "main 0 0, 30 0; main 0 -1, 2 -1", terrain );
  TileCache cache( terrain );
  ProfileBuilder builder( result.drawing, SamePlan(), cache, false );
  Profile reused;
  for ( const CanonicalLine &line : { result.drawing.lines[1], result.drawing.lines[0], result.drawing.lines[1] } )
    builder.build( line, reused );
  Profile fresh;
  builder.build( result.drawing.lines[1], fresh );
  QVERIFY( reused.alongM == fresh.alongM && reused.elevationM == fresh.elevationM && reused.bendM == fresh.bendM );
}

QTEST_APPLESS_MAIN( TestProfileBuilder )
#include "testprofilebuilder.moc"
