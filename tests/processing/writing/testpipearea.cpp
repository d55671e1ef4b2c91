// SPDX-License-Identifier: GPL-2.0-or-later
// The area made cell by cell and glued is the one that the geometry library makes of all lines at once.
#include "processing/writing/cellgluing.h"
#include "processing/writing/pipearea.h"

#include <qgslinestring.h>
#include <qgsmultilinestring.h>
#include <qgspolygon.h>
#include <qgsrectangle.h>

#include <QTest>

#include <random>

using namespace stillhead;

Q_DECLARE_METATYPE( stillhead::Strand )

class TestPipeArea : public QObject
{
    Q_OBJECT

  private slots:
    void sameAsAllAtOnce_data();
    void sameAsAllAtOnce();
    void glueLeavesOutTheLineBetween();
    void glueKeepsAHoleAcrossCells();
    void glueRefusesWhatDoesNotMeet_data();
    void glueRefusesWhatDoesNotMeet();
};

namespace
{

  constexpr double DISTANCE_M = 3.0;

  //! A mainline with many bends and laterals that hang on it; some cross each other.
  std::vector<Strand> comb( int laterals, double gapM, double lengthM, double bendM )
  {
    std::mt19937 random( 5 );
    std::uniform_real_distribution<double> bend( -bendM, bendM );
    Strand mainline;
    std::vector<Strand> strands;
    for ( int i = 0; i <= laterals; ++i )
    {
      mainline.x << i * gapM;
      mainline.y << bend( random );
    }
    for ( int i = 0; i < laterals; ++i )
    {
      const double way = i % 2 == 0 ? 1.0 : -1.0;
      Strand lateral;
      for ( int step = 0; step <= 8; ++step )
      {
        lateral.x << mainline.x.at( i ) + ( step == 0 ? 0.0 : bend( random ) );
        lateral.y << mainline.y.at( i ) + way * step * lengthM / 8;
      }
      strands.push_back( lateral );
    }
    strands.push_back( mainline );
    return strands;
  }

  QgsGeometry atOnce( const std::vector<Strand> &strands )
  {
    auto lines = std::make_unique<QgsMultiLineString>();
    for ( const Strand &strand : strands )
      lines->addGeometry( new QgsLineString( strand.x, strand.y ) );
    return QgsGeometry( std::move( lines ) ).buffer( DISTANCE_M, 4 );
  }

  QgsGeometry box( double left, double low, double right, double high )
  {
    return QgsGeometry::fromRect( QgsRectangle( left, low, right, high ) );
  }

} // namespace

void TestPipeArea::sameAsAllAtOnce_data()
{
  QTest::addColumn<std::vector<Strand>>( "strands" );
  QTest::newRow( "few lines" ) << comb( 20, 10.0, 50.0, 1.0 );
  QTest::newRow( "many lines" ) << comb( 700, 9.0, 90.0, 1.5 );
  QTest::newRow( "many lines that cross" ) << comb( 500, 4.0, 300.0, 12.0 );
  // The mainline lies on the line between two rows of cells, its outline along none.
  QTest::newRow( "straight lines" ) << comb( 300, 20.0, 160.0, 0.0 );
  // One line over many cells.
  std::vector<Strand> withLong = comb( 300, 20.0, 160.0, 2.0 );
  withLong.push_back( { { 0.0, 9000.0 }, { 0.0, 4000.0 } } );
  QTest::newRow( "a long line" ) << withLong;
}

void TestPipeArea::sameAsAllAtOnce()
{
  QFETCH( const std::vector<Strand>, strands );
  PipeArea area( strands, DISTANCE_M );
  for ( std::size_t part = 0; part < area.parts(); ++part )
    area.widen( part );
  const QgsGeometry whole = area.whole();
  const QgsGeometry expected = atOnce( strands );
  QVERIFY( whole.isGeosValid() );
  QCOMPARE( whole.wkbType(), expected.wkbType() );
  // Rounded bends are made of straight pieces, which begin elsewhere where a long line is cut.
  const double differenceM2 = whole.symDifference( expected ).area();
  QVERIFY2( differenceM2 < 1e-5 * expected.area(), qPrintable( QString::number( differenceM2 ) ) );
  const bool inParts = area.parts() > 1;
  QCOMPARE( inParts, strands.size() > 96 );
}

void TestPipeArea::glueLeavesOutTheLineBetween()
{
  const std::optional<QgsGeometry> glued =
    gluedCells( { box( 2.0, 2.0, 10.0, 8.0 ), box( 10.0, 2.0, 15.0, 8.0 ) }, { 10.0 } );
  QVERIFY( glued );
  QCOMPARE( glued->area(), 13.0 * 6.0 );
  QVERIFY( glued->isGeosValid() );
  QCOMPARE( glued->constGet()->partCount(), 1 );
}

void TestPipeArea::glueKeepsAHoleAcrossCells()
{
  // A frame around the corner of four cells.
  QgsGeometry frame = box( 4.0, 4.0, 16.0, 16.0 ).difference( box( 8.0, 8.0, 12.0, 12.0 ) );
  std::vector<QgsGeometry> parts;
  for ( const double x : { 0.0, 10.0 } )
  {
    for ( const double y : { 0.0, 10.0 } )
      parts.push_back( frame.clipped( QgsRectangle( x, y, x + 10.0, y + 10.0 ) ) );
  }
  const std::optional<QgsGeometry> glued = gluedCells( parts, { 10.0 } );
  QVERIFY( glued );
  QCOMPARE( glued->area(), 144.0 - 16.0 );
  QCOMPARE( qgsgeometry_cast<const QgsPolygon *>( glued->constGet() )->numInteriorRings(), 1 );
}

void TestPipeArea::glueRefusesWhatDoesNotMeet_data()
{
  QTest::addColumn<QgsGeometry>( "first" );
  QTest::addColumn<QgsGeometry>( "second" );
  QTest::newRow( "the other side is missing" ) << box( 2.0, 2.0, 10.0, 8.0 ) << box( 12.0, 2.0, 15.0, 8.0 );
  QTest::newRow( "the sides differ" ) << box( 2.0, 2.0, 10.0, 8.0 ) << box( 10.0, 2.0, 15.0, 8.001 );
  QTest::newRow( "two polygons" ) << box( 2.0, 2.0, 8.0, 8.0 ) << box( 12.0, 2.0, 15.0, 8.0 );
}

void TestPipeArea::glueRefusesWhatDoesNotMeet()
{
  QFETCH( const QgsGeometry, first );
  QFETCH( const QgsGeometry, second );
  QVERIFY( !gluedCells( { first, second }, { 10.0 } ) );
}

QTEST_GUILESS_MAIN( TestPipeArea )
#include "testpipearea.moc"
