// SPDX-License-Identifier: GPL-2.0-or-later
// A new file is made beside its place and renamed into it; in a file that stays, the transaction does the same service.
#include "processing/writing/geopackagefile.h"

#include "core/geo/gdalerrors.h"
#include "processing/reading/layercrs.h"

#include <qgsabstractgeometry.h>
#include <qgsgeometry.h>

#include <QDateTime>
#include <QDir>
#include <QFileInfo>
#include <QJsonDocument>
#include <QTemporaryFile>

#include <filesystem>

#include <ogr_srs_api.h>

namespace stillhead
{

  namespace
  {

    struct DestroyFeature
    {
        void operator()( void *feature ) const { OGR_F_Destroy( static_cast<OGRFeatureH>( feature ) ); }
    };

    struct ReleaseCrs
    {
        void operator()( void *crs ) const { OSRRelease( static_cast<OGRSpatialReferenceH>( crs ) ); }
    };

    OGRFieldType columnType( const QgsField &field )
    {
      switch ( static_cast<int>( field.type() ) )
      {
      case QMetaType::Bool:
      case QMetaType::Int:
        return OFTInteger;
      case QMetaType::UInt:
      case QMetaType::LongLong:
      case QMetaType::ULongLong:
        return OFTInteger64;
      case QMetaType::Double:
        return OFTReal;
      case QMetaType::QDate:
        return OFTDate;
      case QMetaType::QTime:
        return OFTTime;
      case QMetaType::QDateTime:
        return OFTDateTime;
      case QMetaType::QByteArray:
        return OFTBinary;
      default:
        return OFTString;
      }
    }

    //! Lists and maps have no column type of their own: they become JSON.
    QString textOf( const QVariant &value )
    {
      if ( value.canConvert( QMetaType::QString ) )
        return value.toString();
      return QString::fromUtf8( QJsonDocument::fromVariant( value ).toJson( QJsonDocument::Compact ) );
    }

    OGRwkbGeometryType geometryType( compat::WkbType type )
    {
      const auto flat = static_cast<OGRwkbGeometryType>( QgsWkbTypes::flatType( type ) );
      return OGR_GT_SetModifier( flat, QgsWkbTypes::hasZ( type ), QgsWkbTypes::hasM( type ) );
    }

    //! A name for the key that no field bears.
    QByteArray keyName( const QgsFields &fields )
    {
      QString name = QStringLiteral( "fid" );
      for ( int number = 1; fields.lookupField( name ) >= 0; ++number )
        name = QStringLiteral( "fid_%1" ).arg( number );
      return name.toUtf8();
    }

    std::unique_ptr<void, ReleaseCrs> crsHandle( const QgsCoordinateReferenceSystem &crs )
    {
      std::unique_ptr<void, ReleaseCrs> handle;
      if ( !crs.isValid() )
        return handle;
      handle.reset( OSRNewSpatialReference( nullptr ) );
      if ( OSRSetFromUserInput( static_cast<OGRSpatialReferenceH>( handle.get() ), crsDefinition( crs ).c_str() )
        != OGRERR_NONE )
        handle.reset();
      else
        OSRSetAxisMappingStrategy( static_cast<OGRSpatialReferenceH>( handle.get() ), OAMS_TRADITIONAL_GIS_ORDER );
      return handle;
    }

    //! A name in the folder of \a path that nothing bears; blank where no file can be made there.
    QString freeNameBeside( const QString &path )
    {
      QTemporaryFile file( QFileInfo( path ).dir().filePath( QStringLiteral( "XXXXXX.gpkg" ) ) );
      if ( !file.open() )
        return QString();
      return file.fileName();
    }

    //! What SQLite keeps beside a file.
    void removeBeside( const QString &path )
    {
      for ( const char *end : { "-wal", "-shm", "-journal" } )
        QFile::remove( path + QLatin1String( end ) );
    }

    void removeDatabase( const QString &path )
    {
      removeBeside( path );
      QFile::remove( path );
    }

  } // namespace

  GeoPackageFile::GeoPackageFile( const QString &path, bool replacesFile )
    : mPath( path )
  {
    const bool stays = QFileInfo::exists( path ) && !replacesFile;
    if ( stays )
      mWorkingPath = path;
  }

  GeoPackageFile::~GeoPackageFile()
  {
    if ( !mDataset )
      return;
    GDALDatasetRollbackTransaction( mDataset.get() );
    mDataset.reset();
    if ( mWorkingPath != mPath )
      removeDatabase( mWorkingPath );
  }

  bool GeoPackageFile::open()
  {
    if ( mDataset )
      return true;
    if ( !mWorkingPath.isEmpty() )
    {
      mDataset.reset( GDALOpenEx( mWorkingPath.toUtf8().constData(),
        GDAL_OF_VECTOR | GDAL_OF_UPDATE | GDAL_OF_VERBOSE_ERROR, nullptr, nullptr, nullptr ) );
    }
    else
    {
      QDir().mkpath( QFileInfo( mPath ).absolutePath() );
      mWorkingPath = freeNameBeside( mPath );
      if ( !mWorkingPath.isEmpty() )
        mDataset.reset( GDALCreate(
          GDALGetDriverByName( "GPKG" ), mWorkingPath.toUtf8().constData(), 0, 0, 0, GDT_Unknown, nullptr ) );
    }
    return mDataset && GDALDatasetStartTransaction( mDataset.get(), FALSE ) == OGRERR_NONE;
  }

  bool GeoPackageFile::beginLayer(
    const QString &name, const QgsFields &fields, compat::WkbType type, const QgsCoordinateReferenceSystem &crs )
  {
    const GdalErrors errors;
    const QByteArray layerName = name.toUtf8();
    bool made = open();
    for ( int i = made ? GDALDatasetGetLayerCount( mDataset.get() ) - 1 : -1; i >= 0; --i )
    {
      if ( layerName == OGR_L_GetName( GDALDatasetGetLayer( mDataset.get(), i ) ) )
        made = GDALDatasetDeleteLayer( mDataset.get(), i ) == OGRERR_NONE;
    }
    mLayer = nullptr;
    if ( made )
    {
      const QByteArray key = "FID=" + keyName( fields );
      const char *options[] = { key.constData(), "GEOMETRY_NAME=geom", nullptr };
      const auto crsOrNull = crsHandle( crs );
      mLayer = GDALDatasetCreateLayer( mDataset.get(), layerName.constData(),
        static_cast<OGRSpatialReferenceH>( crsOrNull.get() ), geometryType( type ), const_cast<char **>( options ) );
    }
    made = mLayer != nullptr;
    mTypes.clear();
    for ( int i = 0; made && i < fields.count(); ++i )
    {
      const QgsField field = fields.at( i );
      mTypes.push_back( columnType( field ) );
      const OGRFieldDefnH column = OGR_Fld_Create( field.name().toUtf8().constData(), mTypes.back() );
      if ( static_cast<int>( field.type() ) == QMetaType::Bool )
        OGR_Fld_SetSubType( column, OFSTBoolean );
      if ( mTypes.back() == OFTString && field.length() > 0 )
        OGR_Fld_SetWidth( column, field.length() );
      made = OGR_L_CreateField( mLayer, column, FALSE ) == OGRERR_NONE;
      OGR_Fld_Destroy( column );
    }
    mReason = QString::fromStdString( errors.text() );
    return made;
  }

  void GeoPackageFile::setField( OGRFeatureH row, int index, const QVariant &value ) const
  {
    switch ( mTypes[static_cast<std::size_t>( index )] )
    {
    case OFTInteger:
      OGR_F_SetFieldInteger( row, index, value.toInt() );
      return;
    case OFTInteger64:
      OGR_F_SetFieldInteger64( row, index, value.toLongLong() );
      return;
    case OFTReal:
      OGR_F_SetFieldDouble( row, index, value.toDouble() );
      return;
    case OFTDate:
    case OFTTime:
    case OFTDateTime:
    {
      const QDateTime moment = value.toDateTime();
      const QDate date = moment.isValid() ? moment.date() : value.toDate();
      const QTime time = moment.isValid() ? moment.time() : value.toTime();
      const float seconds = static_cast<float>( time.second() ) + static_cast<float>( time.msec() ) / 1000.0f;
      constexpr int UNKNOWN_ZONE = 0;
      constexpr int UTC_ZONE = 100;
      const int zone = moment.isValid() && moment.timeSpec() == Qt::UTC ? UTC_ZONE : UNKNOWN_ZONE;
      OGR_F_SetFieldDateTimeEx( row, index, date.isValid() ? date.year() : 0, date.isValid() ? date.month() : 0,
        date.isValid() ? date.day() : 0, time.hour(), time.minute(), seconds, zone );
      return;
    }
    case OFTBinary:
    {
      const QByteArray bytes = value.toByteArray();
      OGR_F_SetFieldBinary( row, index, bytes.size(), bytes.constData() );
      return;
    }
    default:
      OGR_F_SetFieldString( row, index, textOf( value ).toUtf8().constData() );
      return;
    }
  }

  bool GeoPackageFile::add( const QgsFeatureList &rows )
  {
    const GdalErrors errors;
    const OGRFeatureDefnH definition = OGR_L_GetLayerDefn( mLayer );
    for ( const QgsFeature &row : rows )
    {
      const std::unique_ptr<void, DestroyFeature> written( OGR_F_Create( definition ) );
      const auto handle = static_cast<OGRFeatureH>( written.get() );
      const QgsAttributes attributes = row.attributes();
      for ( int i = 0; i < attributes.size() && i < static_cast<int>( mTypes.size() ); ++i )
      {
        if ( attributes.at( i ).isNull() )
          OGR_F_SetFieldNull( handle, i );
        else
          setField( handle, i, attributes.at( i ) );
      }
      if ( row.hasGeometry() )
      {
        const QByteArray wkb = row.geometry().asWkb();
        OGRGeometryH geometry = nullptr;
        if ( OGR_G_CreateFromWkb( wkb.constData(), nullptr, &geometry, wkb.size() ) == OGRERR_NONE )
          OGR_F_SetGeometryDirectly( handle, geometry );
      }
      if ( OGR_L_CreateFeature( mLayer, handle ) != OGRERR_NONE )
      {
        mReason = QString::fromStdString( errors.text() );
        return false;
      }
    }
    return true;
  }

  bool GeoPackageFile::endLayer()
  {
    const GdalErrors errors;
    const bool done = OGR_L_SyncToDisk( mLayer ) == OGRERR_NONE;
    mReason = QString::fromStdString( errors.text() );
    return done;
  }

  bool GeoPackageFile::commit()
  {
    const GdalErrors errors;
    bool done = mDataset && GDALDatasetCommitTransaction( mDataset.get() ) == OGRERR_NONE;
    GDALFlushCache( mDataset.get() );
    // What fails on closing is said to the error handler alone.
    mDataset.reset();
    done = done && errors.text().empty();
    if ( mWorkingPath != mPath )
    {
      // What an earlier file left beside it would be taken for the new one's.
      if ( done )
        removeBeside( mPath );
      std::error_code error;
      if ( done )
        std::filesystem::rename(
          QFile::encodeName( mWorkingPath ).toStdString(), QFile::encodeName( mPath ).toStdString(), error );
      done = done && !error;
      if ( !done )
        removeDatabase( mWorkingPath );
    }
    mReason = QString::fromStdString( errors.text() );
    return done;
  }

} // namespace stillhead
