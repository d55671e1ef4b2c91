// SPDX-License-Identifier: GPL-2.0-or-later
// GeoPackages written by ourselves: every type of field comes back as the platform would have written it, and nothing is
// lost or left behind when a run ends before its time.
#include "processing/writing/geopackagefile.h"

#include <qgsapplication.h>
#include <qgsvectorlayer.h>

#include <QDateTime>
#include <QDir>
#include <QTemporaryDir>
#include <QTest>

#include <cmath>
#include <limits>

using namespace stillhead;

class TestGeoPackageFile : public QObject
{
    Q_OBJECT

  private slots:
    void initTestCase();
    void cleanupTestCase();
    void keepsEveryType();
    void keepsZAndMThatAreNoNumbers();
    void nothingIsThereBeforeCommit();
    void earlierLayersStay();
    void aReplacedFileGoesAsAWhole();
    void rollbackKeepsTheEarlierLayer();
    void saysWhyItFails();
};

namespace
{

  QgsFields sampleFields()
  {
    QgsFields fields;
    fields.append( QgsField( QStringLiteral( "whole" ), compat::Field::Int ) );
    fields.append( QgsField( QStringLiteral( "large" ), compat::Field::LongLong ) );
    fields.append( QgsField( QStringLiteral( "real" ), compat::Field::Double ) );
    fields.append( QgsField( QStringLiteral( "text" ), compat::Field::String ) );
    fields.append( QgsField( QStringLiteral( "yes" ), compat::Field::Bool ) );
    fields.append( QgsField( QStringLiteral( "day" ), static_cast<compat::FieldType>( QMetaType::QDate ) ) );
    fields.append( QgsField( QStringLiteral( "moment" ), static_cast<compat::FieldType>( QMetaType::QDateTime ) ) );
    fields.append( QgsField( QStringLiteral( "bytes" ), static_cast<compat::FieldType>( QMetaType::QByteArray ) ) );
    fields.append( QgsField( QStringLiteral( "list" ), static_cast<compat::FieldType>( QMetaType::QStringList ) ) );
    fields.append( QgsField( QStringLiteral( "fid" ), compat::Field::Int ) );
    return fields;
  }

  QgsFeature sampleRow( const QString &wkt )
  {
    QgsFeature row;
    QgsAttributes values;
    values << 7 << 9007199254740993LL << 0.1 << QStringLiteral( "ä" ) << true << QDate( 2026, 12, 1 )
           << QDateTime( QDate( 2026, 12, 1 ), QTime( 8, 30 ), Qt::UTC ) << QByteArray( "\x00\x01", 2 )
           << QStringList( { QStringLiteral( "a" ), QStringLiteral( "b" ) } ) << QVariant();
    row.setAttributes( values );
    row.setGeometry( QgsGeometry::fromWkt( wkt ) );
    return row;
  }

  QgsCoordinateReferenceSystem crs()
  {
    return QgsCoordinateReferenceSystem( QStringLiteral( "EPSG:32631" ) );
  }

  //! Writes one row as \a layer; commits if \a stays.
  bool writeOne( const QString &path, const QString &layer, bool replacesFile, bool stays )
  {
    GeoPackageFile file( path, replacesFile );
    return file.beginLayer( layer, sampleFields(), compat::WkbType::Point, crs() )
      && file.add( { sampleRow( QStringLiteral( "Point (1 2)" ) ) } ) && ( !stays || file.commit() );
  }

  long long rowsOf( const QString &path, const QString &layer )
  {
    const QgsVectorLayer opened(
      path + QStringLiteral( "|layername=" ) + layer, QStringLiteral( "layer" ), QStringLiteral( "ogr" ) );
    return opened.isValid() ? static_cast<long long>( opened.featureCount() ) : -1;
  }

  QStringList filesIn( const QTemporaryDir &folder )
  {
    return QDir( folder.path() ).entryList( QDir::Files );
  }

} // namespace

void TestGeoPackageFile::initTestCase()
{
  QgsApplication::initQgis();
}

void TestGeoPackageFile::cleanupTestCase()
{
  QgsApplication::exitQgis();
}

void TestGeoPackageFile::keepsEveryType()
{
  const QTemporaryDir folder;
  const QString path = folder.filePath( QStringLiteral( "a.gpkg" ) );
  QVERIFY( writeOne( path, QStringLiteral( "points" ), false, true ) );
  QgsVectorLayer layer( path, QStringLiteral( "layer" ), QStringLiteral( "ogr" ) );
  QVERIFY( layer.isValid() );
  QCOMPARE( layer.crs().authid(), QStringLiteral( "EPSG:32631" ) );
  QgsFeature row;
  QVERIFY( layer.getFeatures().nextFeature( row ) );
  QCOMPARE( row.attribute( QStringLiteral( "whole" ) ).toInt(), 7 );
  QCOMPARE( row.attribute( QStringLiteral( "large" ) ).toLongLong(), 9007199254740993LL );
  QCOMPARE( row.attribute( QStringLiteral( "real" ) ).toDouble(), 0.1 );
  QCOMPARE( row.attribute( QStringLiteral( "text" ) ).toString(), QStringLiteral( "ä" ) );
  QCOMPARE( row.attribute( QStringLiteral( "yes" ) ), QVariant( true ) );
  QCOMPARE( row.attribute( QStringLiteral( "day" ) ), QVariant( QDate( 2026, 12, 1 ) ) );
  QCOMPARE( row.attribute( QStringLiteral( "moment" ) ).toDateTime().toUTC(),
    QDateTime( QDate( 2026, 12, 1 ), QTime( 8, 30 ), Qt::UTC ) );
  QCOMPARE( row.attribute( QStringLiteral( "bytes" ) ).toByteArray(), QByteArray( "\x00\x01", 2 ) );
  QCOMPARE( row.attribute( QStringLiteral( "list" ) ).toString(), QStringLiteral( "[\"a\",\"b\"]" ) );
  // The drawn field keeps its name, the key gives way.
  QVERIFY( row.attribute( QStringLiteral( "fid" ) ).isNull() );
  QCOMPARE( row.attribute( QStringLiteral( "fid_1" ) ).toInt(), 1 );
}

void TestGeoPackageFile::keepsZAndMThatAreNoNumbers()
{
  const QTemporaryDir folder;
  const QString path = folder.filePath( QStringLiteral( "a.gpkg" ) );
  const double none = std::numeric_limits<double>::quiet_NaN();
  QgsFeature row;
  row.setGeometry( QgsGeometry( new QgsPoint( 1.0, 2.0, none, none, compat::WkbType::PointZM ) ) );
  GeoPackageFile file( path, false );
  QVERIFY( file.beginLayer( QStringLiteral( "points" ), QgsFields(), compat::WkbType::PointZM, crs() ) );
  QVERIFY( file.add( { row } ) );
  QVERIFY( file.commit() );
  QgsVectorLayer layer( path, QStringLiteral( "layer" ), QStringLiteral( "ogr" ) );
  QCOMPARE( layer.wkbType(), compat::WkbType::PointZM );
  QgsFeature read;
  QVERIFY( layer.getFeatures().nextFeature( read ) );
  const auto *point = qgsgeometry_cast<const QgsPoint *>( read.geometry().constGet() );
  QCOMPARE( point->x(), 1.0 );
  QVERIFY( std::isnan( point->z() ) );
  QVERIFY( std::isnan( point->m() ) );
}

void TestGeoPackageFile::nothingIsThereBeforeCommit()
{
  const QTemporaryDir folder;
  QVERIFY( writeOne( folder.filePath( QStringLiteral( "a.gpkg" ) ), QStringLiteral( "points" ), false, false ) );
  QCOMPARE( filesIn( folder ), QStringList() );
}

void TestGeoPackageFile::earlierLayersStay()
{
  const QTemporaryDir folder;
  const QString path = folder.filePath( QStringLiteral( "a.gpkg" ) );
  QVERIFY( writeOne( path, QStringLiteral( "first" ), false, true ) );
  QVERIFY( writeOne( path, QStringLiteral( "second" ), false, true ) );
  QCOMPARE( rowsOf( path, QStringLiteral( "first" ) ), 1LL );
  QCOMPARE( rowsOf( path, QStringLiteral( "second" ) ), 1LL );
  // Once more: the layer is replaced, not doubled.
  QVERIFY( writeOne( path, QStringLiteral( "second" ), false, true ) );
  QCOMPARE( rowsOf( path, QStringLiteral( "second" ) ), 1LL );
}

void TestGeoPackageFile::aReplacedFileGoesAsAWhole()
{
  const QTemporaryDir folder;
  const QString path = folder.filePath( QStringLiteral( "a.gpkg" ) );
  QVERIFY( writeOne( path, QStringLiteral( "first" ), false, true ) );
  QVERIFY( writeOne( path, QStringLiteral( "second" ), true, true ) );
  QCOMPARE( rowsOf( path, QStringLiteral( "first" ) ), -1LL );
  QCOMPARE( rowsOf( path, QStringLiteral( "second" ) ), 1LL );
  QCOMPARE( filesIn( folder ), QStringList( QStringLiteral( "a.gpkg" ) ) );
}

void TestGeoPackageFile::rollbackKeepsTheEarlierLayer()
{
  const QTemporaryDir folder;
  const QString path = folder.filePath( QStringLiteral( "a.gpkg" ) );
  QVERIFY( writeOne( path, QStringLiteral( "points" ), false, true ) );
  for ( const bool replacesFile : { false, true } )
  {
    GeoPackageFile file( path, replacesFile );
    QVERIFY( file.beginLayer( QStringLiteral( "points" ), QgsFields(), compat::WkbType::Point, crs() ) );
  }
  QCOMPARE( rowsOf( path, QStringLiteral( "points" ) ), 1LL );
  QgsVectorLayer layer(
    path + QStringLiteral( "|layername=points" ), QStringLiteral( "layer" ), QStringLiteral( "ogr" ) );
  QVERIFY( layer.fields().lookupField( QStringLiteral( "whole" ) ) >= 0 );
}

void TestGeoPackageFile::saysWhyItFails()
{
  const QTemporaryDir folder;
  const QString path = folder.filePath( QStringLiteral( "no.gpkg" ) );
  QFile file( path );
  QVERIFY( file.open( QIODevice::WriteOnly ) );
  file.write( "not a database" );
  file.close();
  GeoPackageFile written( path, false );
  QVERIFY( !written.beginLayer( QStringLiteral( "points" ), sampleFields(), compat::WkbType::Point, crs() ) );
  QVERIFY( !written.reason().isEmpty() );
}

int main( int argc, char *argv[] )
{
  QgsApplication application( argc, argv, false );
  TestGeoPackageFile test;
  return QTest::qExec( &test, argc, argv );
}

#include "testgeopackagefile.moc"
