// SPDX-License-Identifier: GPL-2.0-or-later
// The styles' second column, for Styled Layer Descriptors, stays blank: that format has none of the patterns that tell states
// apart. Rows are written by statement: opening every layer through the platform to style it costs more than a usual run.
// Source of the metadata tables: OGC GeoPackage Encoding Standard 1.2.1 (OGC 12-128r15), annex F.8 (Metadata).
#include "processing/writing/geopackageextras.h"

#include "core/geo/gdalerrors.h"
#include "processing/text/text.h"

#include <QDomDocument>
#include <QStringList>

#include <memory>
#include <utility>

#include <gdal.h>
#include <ogr_api.h>

namespace stillhead
{

  namespace
  {

    struct CloseDataset
    {
        void operator()( void *dataset ) const { GDALClose( dataset ); }
    };

    QString quoted( QString text )
    {
      return '\'' + text.replace( '\'', QLatin1String( "''" ) ) + '\'';
    }

    QString metadataXml( const QgsLayerMetadata &metadata )
    {
      // The platform looks for its own document type.
      QDomImplementation implementation;
      QDomDocument document( implementation.createDocumentType(
        QStringLiteral( "qgis" ), QStringLiteral( "http://mrcc.com/qgis.dtd" ), QStringLiteral( "SYSTEM" ) ) );
      QDomElement root = document.createElement( QStringLiteral( "qgis" ) );
      document.appendChild( root );
      metadata.writeMetadataXml( root, document );
      return document.toString();
    }

    QStringList tableStatements()
    {
      return {
        QStringLiteral( "CREATE TABLE IF NOT EXISTS gpkg_extensions (table_name TEXT, column_name TEXT, "
                        "extension_name TEXT NOT NULL, definition TEXT NOT NULL, scope TEXT NOT NULL, "
                        "CONSTRAINT ge_tce UNIQUE (table_name, column_name, extension_name))" ),
        QStringLiteral(
          "CREATE TABLE IF NOT EXISTS gpkg_metadata (id INTEGER CONSTRAINT m_pk PRIMARY KEY ASC NOT NULL, "
          "md_scope TEXT NOT NULL DEFAULT 'dataset', md_standard_uri TEXT NOT NULL, "
          "mime_type TEXT NOT NULL DEFAULT 'text/xml', metadata TEXT NOT NULL DEFAULT '')" ),
        QStringLiteral( "CREATE TABLE IF NOT EXISTS gpkg_metadata_reference (reference_scope TEXT NOT NULL, "
                        "table_name TEXT, column_name TEXT, row_id_value INTEGER, "
                        "timestamp DATETIME NOT NULL DEFAULT (strftime('%Y-%m-%dT%H:%M:%fZ','now')), "
                        "md_file_id INTEGER NOT NULL, md_parent_id INTEGER, "
                        "CONSTRAINT crmr_mfi_fk FOREIGN KEY (md_file_id) REFERENCES gpkg_metadata(id), "
                        "CONSTRAINT crmr_mpi_fk FOREIGN KEY (md_parent_id) REFERENCES gpkg_metadata(id))" ),
        QStringLiteral( "INSERT INTO gpkg_extensions SELECT name, NULL, 'gpkg_metadata', "
                        "'http://www.geopackage.org/spec120/#extension_metadata', 'read-write' FROM sqlite_master "
                        "WHERE name IN ('gpkg_metadata', 'gpkg_metadata_reference') AND name NOT IN "
                        "(SELECT table_name FROM gpkg_extensions WHERE extension_name = 'gpkg_metadata')" ),
        QStringLiteral( "CREATE TABLE IF NOT EXISTS layer_styles (id INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL, "
                        "f_table_catalog TEXT(256), f_table_schema TEXT(256), f_table_name TEXT(256), "
                        "f_geometry_column TEXT(256), styleName TEXT(30), styleQML TEXT, styleSLD TEXT, "
                        "useAsDefault BOOLEAN, description TEXT, owner TEXT(30), ui TEXT(30), "
                        "update_time DATETIME DEFAULT (strftime('%Y-%m-%dT%H:%M:%fZ','now')))" ),
        QStringLiteral( "INSERT OR IGNORE INTO gpkg_contents (table_name, identifier, data_type) "
                        "VALUES ('layer_styles', 'layer_styles', 'attributes')" ),
      };
    }

    QStringList layerStatements( const LayerExtras &layer )
    {
      const QString table = quoted( layer.table );
      const QString ownMetadata =
        QStringLiteral( "SELECT md_file_id FROM gpkg_metadata_reference WHERE lower(table_name) = lower(%1)" )
          .arg( table );
      return {
        QStringLiteral( "DELETE FROM layer_styles WHERE lower(f_table_name) = lower(%1) AND styleName = 'Stillhead'" )
          .arg( table ),
        QStringLiteral( "INSERT INTO layer_styles (f_table_catalog, f_table_schema, f_table_name, f_geometry_column, "
                        "styleName, styleQML, styleSLD, useAsDefault, description, owner) VALUES ('', '', " )
          + table + QStringLiteral( ", 'geom', 'Stillhead', " ) + quoted( layer.styleQml )
          + QStringLiteral( ", '', 1, " ) + quoted( Text::tr( "Made by the run that wrote the layer" ) )
          + QStringLiteral( ", '')" ),
        QStringLiteral( "DELETE FROM gpkg_metadata WHERE id IN (%1)" ).arg( ownMetadata ),
        QStringLiteral( "DELETE FROM gpkg_metadata_reference WHERE lower(table_name) = lower(%1)" ).arg( table ),
        QStringLiteral( "INSERT INTO gpkg_metadata (md_scope, md_standard_uri, mime_type, metadata) VALUES "
                        "('dataset', 'http://mrcc.com/qgis.dtd', 'text/xml', " )
          + quoted( metadataXml( layer.metadata ) ) + ')',
        QStringLiteral( "INSERT INTO gpkg_metadata_reference (reference_scope, table_name, md_file_id) VALUES "
                        "('table', " )
          + table + QStringLiteral( ", (SELECT max(id) FROM gpkg_metadata))" ),
        QStringLiteral( "UPDATE gpkg_contents SET description = " ) + quoted( layer.metadata.abstract() )
          + QStringLiteral( " WHERE lower(table_name) = lower(" ) + table + ')',
      };
    }

  } // namespace

  QString storeExtras( const QString &path, const std::vector<LayerExtras> &extras )
  {
    const GdalErrors errors;
    QStringList statements = tableStatements();
    for ( const LayerExtras &layer : extras )
      statements << layerStatements( layer );

    const std::unique_ptr<void, CloseDataset> dataset(
      GDALOpenEx( path.toUtf8().constData(), GDAL_OF_VECTOR | GDAL_OF_UPDATE, nullptr, nullptr, nullptr ) );
    bool stored = dataset && GDALDatasetStartTransaction( dataset.get(), FALSE ) == OGRERR_NONE;
    for ( const QString &statement : std::as_const( statements ) )
    {
      if ( !stored )
        break;
      if ( const OGRLayerH rows =
             GDALDatasetExecuteSQL( dataset.get(), statement.toUtf8().constData(), nullptr, nullptr ) )
        GDALDatasetReleaseResultSet( dataset.get(), rows );
      stored = errors.text().empty();
    }
    if ( stored )
      stored = GDALDatasetCommitTransaction( dataset.get() ) == OGRERR_NONE;
    else if ( dataset )
      GDALDatasetRollbackTransaction( dataset.get() );
    if ( stored )
      return QString();
    return Text::tr( "Style and metadata could not be stored in %1%2; the figures are there." )
      .arg( path, QString::fromStdString( errors.inParentheses() ) );
  }

} // namespace stillhead
