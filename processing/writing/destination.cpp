// SPDX-License-Identifier: GPL-2.0-or-later
// Reads the platform's destination strings: a path, "ogr:dbname='file' table=\"name\" (geom)", another provider's
// "key:uri", or memory.
#include "processing/writing/destination.h"

#include "processing/qgiscompat.h"
#include "processing/text/text.h"

#include <qgsdatasourceuri.h>
#include <qgsexception.h>
#include <qgsmaplayer.h>
#include <qgsproperty.h>
#include <qgsproviderregistry.h>

#include <QDir>
#include <QFileInfo>
#include <QSet>

#include <gdal.h>
#include <ogr_api.h>

namespace stillhead
{

  namespace
  {

    QString destinationText( const ParameterValues &values, const QString &name )
    {
      QVariant value = values.values().value( name );
      const QgsProcessingParameterDefinition *definition = values.definition( name );
      if ( !value.isValid() && definition && !( definition->flags() & compat::Parameter::Optional ) )
        value = definition->defaultValue();
      if ( value.canConvert<QgsProcessingOutputLayerDefinition>() )
        value = QVariant::fromValue( value.value<QgsProcessingOutputLayerDefinition>().sink );
      if ( value.canConvert<QgsProperty>() )
        value = value.value<QgsProperty>().value( values.context().expressionContext() );
      return value.toString();
    }

    bool isRemapped( const ParameterValues &values, const QString &name )
    {
      const QVariant value = values.values().value( name );
      return value.canConvert<QgsProcessingOutputLayerDefinition>()
        && value.value<QgsProcessingOutputLayerDefinition>().useRemapping();
    }

    //! True where the file \a path holds the layer \a table already.
    bool holdsTable( const QString &path, const QString &table )
    {
      const GDALDatasetH file =
        GDALOpenEx( path.toUtf8().constData(), GDAL_OF_VECTOR | GDAL_OF_READONLY, nullptr, nullptr, nullptr );
      if ( !file )
        return true;
      const bool holds = GDALDatasetGetLayerByName( file, table.toUtf8().constData() );
      GDALClose( file );
      return holds;
    }

    void removeTable( const QString &path, const QString &table )
    {
      const GDALDatasetH file =
        GDALOpenEx( path.toUtf8().constData(), GDAL_OF_VECTOR | GDAL_OF_UPDATE, nullptr, nullptr, nullptr );
      if ( !file )
        return;
      for ( int i = 0; i < GDALDatasetGetLayerCount( file ); ++i )
      {
        if ( table == QString::fromUtf8( OGR_L_GetName( GDALDatasetGetLayer( file, i ) ) ) )
        {
          GDALDatasetDeleteLayer( file, i );
          break;
        }
      }
      GDALClose( file );
    }

    //! Two spellings of one file, which need not be there yet.
    bool sameFile( const QString &a, const QString &b )
    {
      const QFileInfo first( a );
      const QFileInfo second( b );
      if ( first.exists() && second.exists() )
        return first.canonicalFilePath() == second.canonicalFilePath();
      return QDir::cleanPath( first.absoluteFilePath() ) == QDir::cleanPath( second.absoluteFilePath() );
    }

  } // namespace

  Destination::Destination( const ParameterValues &values, const QString &name )
    : mName( name )
  {
    const QString text = destinationText( values, name );
    mIsAsked = !text.isEmpty();
    mIsRemapped = isRemapped( values, name );
    mIsMemory = text == QgsProcessing::TEMPORARY_OUTPUT || text.startsWith( QLatin1String( "memory:" ) );
    if ( !mIsAsked || mIsMemory )
      return;
    if ( text.startsWith( QLatin1String( "ogr:" ) ) )
    {
      const QgsDataSourceUri uri( text.mid( 4 ) );
      mPath = uri.database();
      mTable = uri.table();
      mFileWasThere = QFileInfo::exists( mPath );
      mReplaces = mFileWasThere && !isOwnGeoPackage() && holdsTable( mPath, mTable );
    }
    else if ( QgsProviderRegistry::instance()->providerMetadata( text.section( ':', 0, 0 ) ) )
    {
      // A database of another kind: what is there is not known.
      mReplaces = true;
    }
    else
    {
      mPath = text;
      mFileWasThere = QFileInfo::exists( mPath );
      mReplaces = mFileWasThere && !isOwnGeoPackage();
    }
  }

  bool Destination::isGeoPackage() const
  {
    return mPath.endsWith( QLatin1String( ".gpkg" ), Qt::CaseInsensitive );
  }

  bool Destination::holdsGaps() const
  {
    // Tried with each driver: shapefiles refuse such features, GeoJSON drops their geometry, GML writes 0 for what is no
    // number, KML a word that few programs read. Formats that keep no Z and M at all lose nothing by it.
    static const QSet<QString> cannot { QStringLiteral( "shp" ), QStringLiteral( "dbf" ), QStringLiteral( "geojson" ),
      QStringLiteral( "json" ), QStringLiteral( "geojsonl" ), QStringLiteral( "geojsons" ), QStringLiteral( "gml" ),
      QStringLiteral( "kml" ), QStringLiteral( "kmz" ) };
    return !cannot.contains( QFileInfo( mPath ).suffix().toLower() );
  }

  void Destination::refuseInput( const QgsMapLayer *layer, const QString &inputName ) const
  {
    if ( !layer || mPath.isEmpty() || !layer->dataProvider() )
      return;
    const QVariantMap parts = QgsProviderRegistry::instance()->decodeUri(
      layer->dataProvider()->name(), layer->dataProvider()->dataSourceUri() );
    const QString inputPath = parts.value( QStringLiteral( "path" ) ).toString();
    if ( inputPath.isEmpty() || !sameFile( mPath, inputPath ) )
      return;
    const QString inputTable = parts.value( QStringLiteral( "layerName" ) ).toString();
    // A file given as such is replaced as a whole.
    const bool otherTable =
      !mTable.isEmpty() && !inputTable.isEmpty() && mTable.compare( inputTable, Qt::CaseInsensitive ) != 0;
    if ( !otherTable )
      throw QgsProcessingException(
        Text::tr( "%1 would replace the input %2 (“%3”); choose another file or layer name for the result." )
          .arg( mName, inputName, layer->name() ) );
  }

  void Destination::refuseUnwritable() const
  {
    if ( mPath.isEmpty() )
      return;
    if ( mFileWasThere && !QFileInfo( mPath ).isWritable() )
      throw QgsProcessingException(
        Text::tr( "%1 cannot be written: the file %2 is read-only; choose another file." ).arg( mName, mPath ) );
    // A folder that is not there yet will be made in the nearest one that is.
    QFileInfo folder( QFileInfo( mPath ).absolutePath() );
    while ( !folder.exists() && folder.absoluteFilePath() != folder.absolutePath() )
      folder.setFile( folder.absolutePath() );
    if ( !folder.isDir() || !folder.isWritable() )
      throw QgsProcessingException(
        Text::tr( "%1 cannot be written: no file can be made in the folder %2; choose another folder." )
          .arg( mName, folder.absoluteFilePath() ) );
  }

  void Destination::refuseSamePlace( const Destination &other ) const
  {
    const bool samePath = !mPath.isEmpty() && !other.mPath.isEmpty() && sameFile( mPath, other.mPath );
    const bool sameTable = mTable.compare( other.mTable, Qt::CaseInsensitive ) == 0;
    if ( samePath && ( sameTable || mTable.isEmpty() || other.mTable.isEmpty() ) )
      throw QgsProcessingException( Text::tr(
        "%1 and %2 would both be written to %3, one over the other; give each a file or a layer name of its own." )
                                      .arg( mName, other.mName, mPath ) );
  }

  void Destination::remove() const
  {
    if ( mPath.isEmpty() || mReplaces )
      return;
    if ( mFileWasThere )
    {
      removeTable( mPath, mTable );
      return;
    }
    // The file and what its format keeps beside it (name.dbf, name.gpkg-wal).
    const QFileInfo file( mPath );
    QDir folder = file.absoluteDir();
    for ( const QString &name : folder.entryList( QDir::Files ) )
    {
      const bool beside = name.startsWith( file.fileName() + '-' ) || name.startsWith( file.fileName() + '.' )
        || ( file.suffix().toLower() == QLatin1String( "shp" ) && name.startsWith( file.completeBaseName() + '.' ) );
      if ( name == file.fileName() || beside )
        folder.remove( name );
    }
  }

} // namespace stillhead
