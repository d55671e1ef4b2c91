// SPDX-License-Identifier: GPL-2.0-or-later
// What the user set on the layer (its CRS, values to be taken for no data) goes before what the file says.
#include "processing/reading/terrainreader.h"

#include "core/geo/gdalterrain.h"
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/providerterrain.h"
#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsproviderregistry.h>
#include <qgsrasterdataprovider.h>
#include <qgsrasterlayer.h>

#include <cmath>
#include <limits>

namespace stillhead
{

  namespace
  {

    //! Values that the user of a GDAL layer takes for no data, beyond what the file declares.
    class UserNoData : public ElevationSource
    {
      public:
        UserNoData( std::unique_ptr<ElevationSource> source, QgsRasterRangeList ranges, double metresPerUnit )
          : mSource( std::move( source ) )
          , mRanges( std::move( ranges ) )
          , mMetresPerUnit( metresPerUnit )
        {
        }

        const RasterGrid &grid() const override { return mSource->grid(); }
        int blockColumns() const override { return mSource->blockColumns(); }
        int blockRows() const override { return mSource->blockRows(); }
        void read( int column, int row, int columns, int rows, double *elevationsM ) const override
        {
          mSource->read( column, row, columns, rows, elevationsM );
          const std::size_t count = static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows );
          for ( std::size_t i = 0; i < count; ++i )
          {
            if ( QgsRasterRange::contains( elevationsM[i] / mMetresPerUnit, mRanges ) )
              elevationsM[i] = std::numeric_limits<double>::quiet_NaN();
          }
        }

      private:
        std::unique_ptr<ElevationSource> mSource;
        QgsRasterRangeList mRanges;
        double mMetresPerUnit;
    };

    QgsRasterLayer *layerOrRefuse( const ParameterValues &values )
    {
      QgsRasterLayer *layer = QgsProcessingParameters::parameterAsRasterLayer(
        values.definition( parameter::TERRAIN ), values.values(), values.context() );
      if ( layer && layer->isValid() && layer->dataProvider() )
        return layer;
      const QString given = values.values().value( parameter::TERRAIN ).toString();
      throw QgsProcessingException( given.isEmpty()
          ? Text::tr( "TERRAIN is not given; choose a raster of ground elevations." )
          : Text::tr( "TERRAIN (“%1”) cannot be opened as a raster; check the file and its path." ).arg( given ) );
    }

    int bandOrRefuse( const ParameterValues &values, const QgsRasterDataProvider &provider )
    {
      const std::optional<double> given = values.optionalNumber( parameter::TERRAIN_BAND );
      const double band = given.value_or( 1.0 );
      if ( band != std::floor( band ) || band < 1 || band > provider.bandCount() )
        throw QgsProcessingException( Text::tr( "TERRAIN_BAND is %1, but the terrain's bands are numbered 1 to %2; "
                                                "choose the one that holds elevations." )
                                        .arg( plainNumber( band ) )
                                        .arg( provider.bandCount() ) );
      return static_cast<int>( band );
    }

    //! Three or more bands of bytes are a picture, also where the file does not call them red, green and blue.
    void refusePicture( const QgsRasterDataProvider &provider, const QString &name )
    {
      const Qgis::DataType first = provider.sourceDataType( 1 );
      bool picture = first == Qgis::DataType::ARGB32 || first == Qgis::DataType::ARGB32_Premultiplied;
      if ( provider.bandCount() >= 3 )
      {
        picture = true;
        for ( int band = 1; band <= provider.bandCount() && picture; ++band )
          picture = provider.sourceDataType( band ) == Qgis::DataType::Byte;
      }
      if ( picture )
        throw QgsProcessingException( Text::tr( "TERRAIN (“%1”) is a picture in colours, not elevations; choose a "
                                                "raster whose cells hold ground elevations." )
                                        .arg( name ) );
    }

    std::optional<ElevationUnit> givenUnit( const ParameterValues &values )
    {
      const int choice = values.choice( parameter::TERRAIN_UNIT );
      return choice == 0 ? std::nullopt : std::optional<ElevationUnit>( static_cast<ElevationUnit>( choice - 1 ) );
    }

    //! Fills in what GDAL gives; false where GDAL cannot open it.
    bool openThroughGdal( Terrain &terrain, const QgsRasterDataProvider &provider, std::optional<ElevationUnit> unit )
    {
      const QString uri = provider.dataSourceUri( true );
      const QVariantMap parts = QgsProviderRegistry::instance()->decodeUri( QStringLiteral( "gdal" ), uri );
      std::vector<std::string> options;
      for ( const QString &option : parts.value( QStringLiteral( "openOptions" ) ).toStringList() )
        options.push_back( option.toStdString() );
      const QString opened = uri.section( QStringLiteral( "|option:" ), 0, 0 );
      try
      {
        auto gdal = std::make_unique<GdalTerrain>( opened.toStdString(), terrain.band, unit, options );
        terrain.unit = gdal->unit();
        terrain.source = std::move( gdal );
      }
      catch ( const TerrainRefused &refused )
      {
        if ( refused.problem() == TerrainProblem::Unreadable )
          return false;
        throw QgsProcessingException( QString::fromStdString( refused.what() ) );
      }
      const QgsRasterRangeList noData = provider.userNoDataValues( terrain.band );
      if ( !noData.isEmpty() )
        terrain.source =
          std::make_unique<UserNoData>( std::move( terrain.source ), noData, terrain.unit.metresPerUnit );
      return true;
    }

    void openThroughProvider(
      Terrain &terrain, const QgsRasterDataProvider &provider, std::optional<ElevationUnit> unit )
    {
      std::unique_ptr<QgsRasterInterface> clone( provider.clone() );
      auto *own = dynamic_cast<QgsRasterDataProvider *>( clone.get() );
      if ( !own )
        throw QgsProcessingException(
          Text::tr( "TERRAIN (“%1”) cannot be read; save it as a GeoTIFF and use that." ).arg( terrain.name ) );
      clone.release();
      terrain.unit = decideElevationUnit( unit, std::string(), crsDefinition( terrain.crs ) );
      terrain.source = std::make_unique<ProviderTerrain>(
        std::unique_ptr<QgsRasterDataProvider>( own ), terrain.band, terrain.unit.metresPerUnit );
      // Providers may need the event loop of the thread that runs the job.
      terrain.threads = 1;
    }

    QString unitText( const ElevationUnitDecision &unit )
    {
      const QString name = QString::fromStdString( unit.unitName );
      switch ( unit.origin )
      {
      case ElevationUnitOrigin::Given:
        return Text::tr( "unit %1 (chosen by TERRAIN_UNIT)" ).arg( name );
      case ElevationUnitOrigin::Band:
        return Text::tr( "unit %1 (the band says so)" ).arg( name );
      case ElevationUnitOrigin::Crs:
        return Text::tr( "unit %1 (the vertical part of its CRS says so)" ).arg( name );
      case ElevationUnitOrigin::Assumed:
        return Text::tr( "unit %1 (assumed: neither band nor CRS says)" ).arg( name );
      }
      return name;
    }

    void warnOfUnit( const Terrain &terrain, QgsProcessingFeedback &feedback )
    {
      if ( terrain.unit.origin != ElevationUnitOrigin::Assumed )
        return;
      if ( terrain.unit.bandText.empty() )
        feedback.pushWarning(
          Text::tr( "The terrain does not say in which unit its elevations are; metres are assumed. "
                    "Choose the unit by TERRAIN_UNIT if that is wrong." ) );
      else
        feedback.pushWarning( Text::tr( "The terrain calls its unit “%1”, which is not known here; metres are assumed. "
                                        "Choose the unit by TERRAIN_UNIT if that is wrong." )
                                .arg( QString::fromStdString( terrain.unit.bandText ) ) );
    }

    void warnOfBytes( const QgsRasterDataProvider &provider, int band, QgsProcessingFeedback &feedback )
    {
      const bool bytes = provider.sourceDataType( band ) == Qgis::DataType::Byte;
      if ( bytes && provider.bandScale( band ) == 1.0 && provider.bandOffset( band ) == 0.0 )
        feedback.pushWarning(
          Text::tr( "The terrain holds whole numbers from 0 to 255 only; make sure that it is not a "
                    "hillshade or another picture." ) );
    }

  } // namespace

  QString Terrain::description() const
  {
    const RasterGrid &grid = source->grid();
    const std::array<double, 6> &g = grid.geoTransform();
    const QString mapUnit = QgsUnitTypes::toAbbreviatedString( crs.mapUnits() );
    return Text::tr( "terrain “%1”, band %2: %3 × %4 cells of %5 × %6 %7, %8, %9" )
      .arg( name )
      .arg( band )
      .arg( grid.columns() )
      .arg( grid.rows() )
      .arg( plainNumber( std::hypot( g[1], g[4] ), 9 ), plainNumber( std::hypot( g[2], g[5] ), 9 ), mapUnit,
        unitText( unit ), crsText( crs ) );
  }

  std::unique_ptr<Terrain> readTerrain( const ParameterValues &values, QgsProcessingFeedback &feedback )
  {
    const QgsRasterLayer *layer = layerOrRefuse( values );
    const QgsRasterDataProvider *provider = layer->dataProvider();
    auto terrain = std::make_unique<Terrain>();
    terrain->name = layer->name();
    terrain->location = layer->publicSource();
    terrain->crs = layer->crs();
    terrain->band = bandOrRefuse( values, *provider );
    refusePicture( *provider, terrain->name );
    const std::optional<ElevationUnit> unit = givenUnit( values );
    if ( layer->providerType() != QLatin1String( "gdal" ) || !openThroughGdal( *terrain, *provider, unit ) )
      openThroughProvider( *terrain, *provider, unit );
    requireCrs( terrain->crs, parameter::TERRAIN, terrain->name );
    terrain->cache = std::make_unique<TileCache>( *terrain->source );
    feedback.pushInfo( Text::tr( "Using %1." ).arg( terrain->description() ) );
    warnOfUnit( *terrain, feedback );
    warnOfBytes( *provider, terrain->band, feedback );
    return terrain;
  }

} // namespace stillhead
