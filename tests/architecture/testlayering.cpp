// SPDX-License-Identifier: GPL-2.0-or-later
// Proves the layering by reading every source file: plugin → processing → core, no Qt or QGIS in core, GDAL
// and PROJ only in core/geo, core's modules only include earlier ones; every source names its licence; the
// top level holds nothing unforeseen. Line comments and strings are not parsed: only #include lines count.
#include <QDir>
#include <QDirIterator>
#include <QFile>
#include <QMap>
#include <QRegularExpression>
#include <QTest>

namespace
{

  struct Include
  {
      QString file; //!< relative to the top level
      QString target;
      bool quoted = false;
  };

  QString topLevel()
  {
    return QStringLiteral( STILLHEAD_SOURCE_DIR );
  }

  QString textOf( const QString &relativePath )
  {
    QFile file( QDir( topLevel() ).filePath( relativePath ) );
    return file.open( QIODevice::ReadOnly ) ? QString::fromUtf8( file.readAll() ) : QString();
  }

  //! Paths below \a folder, relative to the top level, of the files whose name matches one of \a patterns.
  QStringList filesBelow( const QString &folder, const QStringList &patterns )
  {
    QStringList found;
    QDirIterator it( QDir( topLevel() ).filePath( folder ), patterns, QDir::Files, QDirIterator::Subdirectories );
    while ( it.hasNext() )
      found << QDir( topLevel() ).relativeFilePath( it.next() );
    found.sort();
    return found;
  }

  QList<Include> includesBelow( const QString &folder )
  {
    static const QRegularExpression pattern(
      QStringLiteral( R"(^\s*#\s*include\s*([<"])([^>"]+)[>"])" ), QRegularExpression::MultilineOption );
    QList<Include> found;
    for ( const QString &file : filesBelow( folder, { QStringLiteral( "*.h" ), QStringLiteral( "*.cpp" ) } ) )
    {
      QRegularExpressionMatchIterator matches = pattern.globalMatch( textOf( file ) );
      while ( matches.hasNext() )
      {
        const QRegularExpressionMatch match = matches.next();
        found << Include { file, match.captured( 2 ), match.captured( 1 ) == QLatin1String( "\"" ) };
      }
    }
    return found;
  }

  QString firstFolder( const QString &path )
  {
    return path.section( QLatin1Char( '/' ), 0, 0 );
  }

  bool isQtOrQgis( const QString &target )
  {
    static const QRegularExpression pattern( QStringLiteral( "^(Q[A-Z]|Qt|q[a-z]*[.]h$|qgs|qgis|qt|qwt)" ) );
    return pattern.match( target ).hasMatch();
  }

  bool isGdalOrProj( const QString &target )
  {
    static const QRegularExpression pattern(
      QStringLiteral( "^(gdal|ogr|cpl_|proj[.]h|proj/|geodesic[.]h|vrtdataset|rawdataset)" ) );
    return pattern.match( target ).hasMatch();
  }

} // namespace

class TestLayering : public QObject
{
    Q_OBJECT

  private slots:
    void coreKnowsNoQtAndNoQgis();
    void onlyGeoTouchesGdalAndProj();
    void layersPointOneWay();
    void ownHeadersAreNamedByLayer();
    void coreModulesPointOneWay();
    void everySourceNamesItsLicence();
    void topLevelHoldsNothingElse();
    void theReadersSeeABreach();
};

void TestLayering::coreKnowsNoQtAndNoQgis()
{
  const QList<Include> includes = includesBelow( QStringLiteral( "core" ) );
  QVERIFY( !includes.isEmpty() );
  for ( const Include &include : includes )
    QVERIFY2( !isQtOrQgis( include.target ), qPrintable( include.file + " includes " + include.target ) );
}

void TestLayering::onlyGeoTouchesGdalAndProj()
{
  for ( const Include &include : includesBelow( QStringLiteral( "core" ) ) )
    QVERIFY2( include.file.startsWith( QLatin1String( "core/geo/" ) ) || !isGdalOrProj( include.target ),
      qPrintable( include.file + " includes " + include.target ) );
}

void TestLayering::layersPointOneWay()
{
  const QMap<QString, QStringList> mayInclude {
    { QStringLiteral( "core" ), { QStringLiteral( "core" ) } },
    { QStringLiteral( "processing" ), { QStringLiteral( "core" ), QStringLiteral( "processing" ) } },
    { QStringLiteral( "plugin" ),
      { QStringLiteral( "core" ), QStringLiteral( "processing" ), QStringLiteral( "plugin" ) } },
  };
  for ( auto layer = mayInclude.constBegin(); layer != mayInclude.constEnd(); ++layer )
    for ( const Include &include : includesBelow( layer.key() ) )
    {
      const QString folder = firstFolder( include.target );
      if ( mayInclude.contains( folder ) || folder == QLatin1String( "tests" ) )
        QVERIFY2( layer.value().contains( folder ), qPrintable( include.file + " includes " + include.target ) );
    }
}

// With a bare name a breach of the layering could hide behind an include folder.
void TestLayering::ownHeadersAreNamedByLayer()
{
  for ( const QString &layer :
    { QStringLiteral( "core" ), QStringLiteral( "processing" ), QStringLiteral( "plugin" ) } )
    for ( const Include &include : includesBelow( layer ) )
      if ( include.quoted )
        QVERIFY2( QFile::exists( QDir( topLevel() ).filePath( include.target ) ) || include.target.endsWith( ".moc" ),
          qPrintable( include.file + " includes \"" + include.target + "\", not a path from the top level" ) );
}

void TestLayering::coreModulesPointOneWay()
{
  // Each module may include itself and those before it.
  const QStringList order { QStringLiteral( "units" ), QStringLiteral( "feedback" ), QStringLiteral( "terrain" ),
    QStringLiteral( "plan" ), QStringLiteral( "network" ), QStringLiteral( "profile" ), QStringLiteral( "statics" ),
    QStringLiteral( "judgement" ), QStringLiteral( "proposal" ), QStringLiteral( "surface" ), QStringLiteral( "geo" ),
    QStringLiteral( "job" ) };
  for ( const Include &include : includesBelow( QStringLiteral( "core" ) ) )
  {
    if ( firstFolder( include.target ) != QLatin1String( "core" ) || include.target.count( '/' ) < 2 )
      continue; // of core's own files only version.h stands outside the modules, free to all
    const QString from = include.file.section( '/', 1, 1 );
    const QString to = include.target.section( '/', 1, 1 );
    QVERIFY2( order.contains( from ), qPrintable( "module core/" + from + " has no place in the order" ) );
    QVERIFY2( order.contains( to ), qPrintable( "module core/" + to + " has no place in the order" ) );
    QVERIFY2(
      order.indexOf( to ) <= order.indexOf( from ), qPrintable( include.file + " includes " + include.target ) );
  }
}

void TestLayering::everySourceNamesItsLicence()
{
  const QStringList patterns { QStringLiteral( "*.h" ), QStringLiteral( "*.cpp" ), QStringLiteral( "*.py" ),
    QStringLiteral( "*.py.in" ), QStringLiteral( "*.sh" ), QStringLiteral( "CMakeLists.txt" ),
    QStringLiteral( "*.cmake" ), QStringLiteral( "*.svg" ) };
  QStringList files { QStringLiteral( "CMakeLists.txt" ), QStringLiteral( ".ci/run" ),
    QStringLiteral( ".clang-format" ), QStringLiteral( ".clang-tidy" ) };
  for ( const QString &folder : { QStringLiteral( "core" ), QStringLiteral( "processing" ), QStringLiteral( "plugin" ),
          QStringLiteral( "tests" ), QStringLiteral( "demo_project" ) } )
    files << filesBelow( folder, patterns );
  for ( const QString &file : files )
  {
    if ( file.startsWith( QLatin1String( "demo_project/out/" ) ) )
      continue;
    const QString head = textOf( file ).section( '\n', 0, 2 );
    QVERIFY2( head.contains( QLatin1String( "SPDX-License-Identifier: GPL-2.0-or-later" ) ), qPrintable( file ) );
  }
}

void TestLayering::topLevelHoldsNothingElse()
{
  const QStringList allowed { QStringLiteral( "CMakeLists.txt" ), QStringLiteral( "README.md" ),
    QStringLiteral( "DEVELOPERS.md" ), QStringLiteral( "core" ), QStringLiteral( "processing" ),
    QStringLiteral( "plugin" ), QStringLiteral( "tests" ), QStringLiteral( "demo_project" ) };
  for ( const QString &entry : QDir( topLevel() ).entryList( QDir::AllEntries | QDir::NoDotAndDotDot ) )
    QVERIFY2( allowed.contains( entry ) || entry.startsWith( QLatin1String( "build" ) ), qPrintable( entry ) );
}

// The checks above hold only if the patterns see what they look for.
void TestLayering::theReadersSeeABreach()
{
  for ( const char *target : { "QString", "QtCore/QString", "qglobal.h", "qgsgeometry.h", "qgis.h", "qwt_plot.h" } )
    QVERIFY2( isQtOrQgis( target ), target );
  for ( const char *target : { "vector", "Eigen/Dense", "boost/geometry.hpp", "queue", "core/units/units.h" } )
    QVERIFY2( !isQtOrQgis( target ) && !isGdalOrProj( target ), target );
  for ( const char *target : { "gdal.h", "gdal_priv.h", "ogr_spatialref.h", "cpl_conv.h", "proj.h", "geodesic.h" } )
    QVERIFY2( isGdalOrProj( target ), target );
  bool seesQt = false;
  for ( const Include &include : includesBelow( QStringLiteral( "processing" ) ) )
    seesQt = seesQt || isQtOrQgis( include.target );
  QVERIFY( seesQt );
}

QTEST_GUILESS_MAIN( TestLayering )
#include "testlayering.moc"
