// SPDX-License-Identifier: GPL-2.0-or-later
// The drawn features' own fields in SPANS: joined by name, nothing lost to a clash, the key left out.
#include "tests/support/processingrun.h"

#include <qgsvectorfilewriter.h>

using namespace stillhead::test;

class TestDrawnFields : public QObject
{
    Q_OBJECT

  private slots:
    void comeFirstAndJoinByName();
    void clashesGetAnotherName();
    void typesThatDifferBecomeText();
    void keyIsNotCopied();
    void fidThatIsNoKeyIsKept();
    void oddTypesSurvive();

  private:
    Slope mSlope;

    static QStringList ownFields()
    {
      return { "span", "role", "drawn_fid", "length", "z_low", "z_high", "p_low", "p_high", "band", "band_text",
        "state", "over", "short", "pressure_zone", "doubt", "close_call", "p_failed_open", "failed_open_cause" };
    }
};

void TestDrawnFields::comeFirstAndJoinByName()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=Name:string(20)&field=rating:double",
    { { line( { { 0, 0 }, { 300, 0 } } ), { "main", 200.0 } } }, "pipe" );
  const LayerPointer laterals = drawLayer( Slope::lines() + "&field=valve:integer&field=name:string(40)",
    { { line( { { 100, 0 }, { 100, 30 } } ), { 7, "north bed" } } }, "heads" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "LATERALS", asParameter( laterals ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.layer( "SPANS" )->fields().names(), QStringList( { "Name", "rating", "valve" } ) + ownFields() );
  int laterallySeen = 0;
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    const bool lateral = span["role"].toString() == "lateral";
    laterallySeen += lateral ? 1 : 0;
    QCOMPARE( span["Name"].toString(), QString( lateral ? "north bed" : "main" ) );
    QCOMPARE( span["rating"].isNull(), lateral );
    QCOMPARE( span["valve"].isNull(), !lateral );
  }
  QVERIFY( laterallySeen > 0 );
}

void TestDrawnFields::clashesGetAnotherName()
{
  const LayerPointer mains =
    drawLayer( Slope::lines() + "&field=Length:double&field=length_drawn:string&field=STATE:string",
      { { line( { { 0, 0 }, { 300, 0 } } ), { 12.5, "kept", "new" } } }, "pipe" );
  const Outcome outcome = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.layer( "SPANS" )->fields().names(),
    QStringList( { "Length_drawn_2", "length_drawn", "STATE_drawn" } ) + ownFields() );
  const std::vector<Row> spans = outcome.features( "SPANS" );
  QCOMPARE( spans[0]["Length_drawn_2"].toDouble(), 12.5 );
  QCOMPARE( spans[0]["length_drawn"].toString(), QString( "kept" ) );
  QCOMPARE( spans[0]["STATE_drawn"].toString(), QString( "new" ) );
  QVERIFY( outcome.said( outcome.infos, "Length → Length_drawn_2" ) );

  // Two drawn fields of one name but for their case: a table can hold only one of them.
  const LayerPointer twins = drawLayer( Slope::lines() + "&field=zone:string&field=Zone:string",
    { { line( { { 0, 0 }, { 300, 0 } } ), { "a", "b" } } }, "pipe" );
  const QString file = mSlope.path( "twins.gpkg" );
  const Outcome stored =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( twins ) }, { "SPANS", file } } ) );
  QVERIFY2( stored.ok, qPrintable( stored.errors.join( '\n' ) ) );
  const std::vector<Row> rows = stored.features( "SPANS" );
  QCOMPARE( rows[0]["zone"].toString(), QString( "a" ) );
  QCOMPARE( rows[0]["Zone_drawn"].toString(), QString( "b" ) );
}

void TestDrawnFields::typesThatDifferBecomeText()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=size:double&field=count:integer&field=laid:date",
    { { line( { { 0, 0 }, { 300, 0 } } ), { 2.5, 3, QDate( 2024, 5, 17 ) } } }, "pipe" );
  const LayerPointer laterals = drawLayer( Slope::lines() + "&field=size:string&field=count:int8&field=laid:integer",
    { { line( { { 100, 0 }, { 100, 30 } } ), { "1 in", 4000000000LL, 2019 } } }, "heads" );
  const Outcome outcome = runAlgorithm( "staticpressure",
    mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "LATERALS", asParameter( laterals ) } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const QgsFields fields = outcome.layer( "SPANS" )->fields();
  QCOMPARE( fields.field( "size" ).type(), QVariant::String );
  QCOMPARE( fields.field( "count" ).type(), QVariant::LongLong );
  QCOMPARE( fields.field( "laid" ).type(), QVariant::String );
  for ( const Row &span : outcome.features( "SPANS" ) )
  {
    const bool lateral = span["role"].toString() == "lateral";
    QCOMPARE( span["size"].toString(), QString( lateral ? "1 in" : "2.5" ) );
    QCOMPARE( span["count"].toLongLong(), lateral ? 4000000000LL : 3LL );
    QCOMPARE( span["laid"].toString(), QString( lateral ? "2019" : "2024-05-17" ) );
  }
}

void TestDrawnFields::keyIsNotCopied()
{
  // A GeoPackage shows its key as a field; a piece for each of several rows would bear the same key.
  const LayerPointer drawn = drawLayer( Slope::lines() + "&field=name:string",
    { { line( { { 0, 0 }, { 100, 0 } } ), { "a" } }, { line( { { 100, 0 }, { 300, 0 } } ), { "b" } } }, "pipe" );
  const QString plan = mSlope.path( "plan.gpkg" );
  QgsVectorFileWriter::SaveVectorOptions options;
  options.driverName = "GPKG";
  QCOMPARE( QgsVectorFileWriter::writeAsVectorFormatV3( drawn.get(), plan, QgsCoordinateTransformContext(), options ),
    QgsVectorFileWriter::NoError );
  const QString result = mSlope.path( "keyed.gpkg" );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", plan }, { "SPANS", result } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  QCOMPARE( outcome.layer( "SPANS" )->fields().names(), QStringList( { "fid", "name" } ) + ownFields() );
  const std::vector<Row> spans = outcome.features( "SPANS" );
  QCOMPARE( spans.size(), std::size_t( 4 ) );
  for ( const Row &span : spans )
    QCOMPARE( span["drawn_fid"].toLongLong(), span["name"].toString() == "a" ? 1LL : 2LL );

  // In memory nothing makes a key: the drawn one is gone all the same.
  const Outcome memory = runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", plan } } ) );
  QVERIFY( memory.ok );
  QCOMPARE( memory.layer( "SPANS" )->fields().names(), QStringList( { "name" } ) + ownFields() );
}

void TestDrawnFields::fidThatIsNoKeyIsKept()
{
  const LayerPointer mains =
    drawLayer( Slope::lines() + "&field=FID:string", { { line( { { 0, 0 }, { 300, 0 } } ), { "east" } } }, "pipe" );
  const QString file = mSlope.path( "fid.gpkg" );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "SPANS", file } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<Row> spans = outcome.features( "SPANS" );
  QCOMPARE( spans.size(), std::size_t( 3 ) );
  QCOMPARE( spans[0]["FID_drawn"].toString(), QString( "east" ) );
}

void TestDrawnFields::oddTypesSurvive()
{
  const LayerPointer mains = drawLayer( Slope::lines() + "&field=at:time&field=tags:string[]&field=ok:bool",
    { { line( { { 0, 0 }, { 300, 0 } } ), { QTime( 6, 30 ), QStringList( { "a", "b" } ), true } } }, "pipe" );
  const QString file = mSlope.path( "odd.gpkg" );
  const Outcome outcome =
    runAlgorithm( "staticpressure", mSlope.parameters( { { "MAINS", asParameter( mains ) }, { "SPANS", file } } ) );
  QVERIFY2( outcome.ok, qPrintable( outcome.errors.join( '\n' ) ) );
  const std::vector<Row> spans = outcome.features( "SPANS" );
  QCOMPARE( spans[0]["at"].toString().left( 5 ), QString( "06:30" ) );
  QVERIFY( spans[0]["tags"].toString().contains( "a" ) && spans[0]["tags"].toString().contains( "b" ) );
  QCOMPARE( spans[0]["ok"].toBool(), true );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestDrawnFields>( argc, argv );
}
#include "testdrawnfields.moc"
