// SPDX-License-Identifier: GPL-2.0-or-later
// Opens and judges the raster once; further handles for further threads are opened when they are first needed.
#include "core/geo/gdalterrain.h"

#include "core/geo/crs.h"
#include "core/geo/gdalband.h"
#include "core/geo/gdalcachelimit.h"
#include "core/geo/gdalerrors.h"

#include <mutex>
#include <utility>

#include <cpl_conv.h>
#include <ogr_srs_api.h>

namespace stillhead
{

  //! Idle handles; as many are opened as reads ever go on at once.
  class GdalTerrain::Pool
  {
    public:
      Pool( std::string source, std::vector<std::string> openOptions, int band, double metresPerUnit )
        : mSource( std::move( source ) )
        , mOpenOptions( std::move( openOptions ) )
        , mBand( band )
        , mMetresPerUnit( metresPerUnit )
      {
      }

      std::unique_ptr<GdalBand> take()
      {
        {
          const std::lock_guard<std::mutex> lock( mMutex );
          if ( !mIdle.empty() )
          {
            std::unique_ptr<GdalBand> band = std::move( mIdle.back() );
            mIdle.pop_back();
            return band;
          }
        }
        const GdalErrors errors;
        GdalDataset dataset = openGdalRaster( mSource, mOpenOptions );
        if ( !dataset || GDALGetRasterCount( dataset.get() ) < mBand )
          throw std::runtime_error( "The terrain can no longer be opened" + errors.inParentheses()
            + "; check that its files are still there." );
        return std::make_unique<GdalBand>( std::move( dataset ), mBand, mMetresPerUnit );
      }

      void giveBack( std::unique_ptr<GdalBand> band )
      {
        const std::lock_guard<std::mutex> lock( mMutex );
        mIdle.push_back( std::move( band ) );
      }

    private:
      const std::string mSource;
      const std::vector<std::string> mOpenOptions;
      const int mBand;
      const double mMetresPerUnit;
      std::mutex mMutex;
      std::vector<std::unique_ptr<GdalBand>> mIdle;
  };

  namespace
  {
    // Two readers and one to spare keep such a block at hand.
    constexpr std::int64_t BLOCKS_AT_HAND = 3;

    std::string bandsText( int count )
    {
      return count == 1 ? "1 band" : std::to_string( count ) + " bands";
    }

    GdalDataset openOrRefuse( const std::string &source, const std::vector<std::string> &openOptions )
    {
      // A host has registered what it wants; alone, everything is wanted.
      if ( GDALGetDriverCount() == 0 )
        GDALAllRegister();
      const GdalErrors errors;
      GdalDataset dataset = openGdalRaster( source, openOptions );
      if ( !dataset )
        throw TerrainRefused( TerrainProblem::Unreadable,
          "The terrain \"" + source + "\" cannot be opened as a raster" + errors.inParentheses()
            + "; check the file and its path." );
      if ( GDALGetRasterCount( dataset.get() ) == 0 )
        throw TerrainRefused( TerrainProblem::Unreadable,
          "The terrain \"" + source + "\" holds no raster band of its own; choose one of the rasters inside it." );
      return dataset;
    }

    void refuseWrongBand( GDALDatasetH dataset, int band )
    {
      const int count = GDALGetRasterCount( dataset );
      if ( band < 1 || band > count )
        throw TerrainRefused( TerrainProblem::NoSuchBand,
          "The terrain has " + bandsText( count ) + ", so band " + std::to_string( band )
            + " does not exist; choose a band from 1 to " + std::to_string( count ) + "." );
    }

    void refusePicture( GDALDatasetH dataset, int band )
    {
      bool red = false;
      bool green = false;
      bool blue = false;
      for ( int i = 1; i <= GDALGetRasterCount( dataset ); ++i )
      {
        const GDALRasterBandH colour = GDALGetRasterBand( dataset, i );
        const GDALDataType type = GDALGetRasterDataType( colour );
        const GDALColorInterp meaning = GDALGetRasterColorInterpretation( colour );
        const bool mayBeColour = type == GDT_Byte || type == GDT_UInt16;
        red = red || ( mayBeColour && meaning == GCI_RedBand );
        green = green || ( mayBeColour && meaning == GCI_GreenBand );
        blue = blue || ( mayBeColour && meaning == GCI_BlueBand );
      }
      if ( red && green && blue )
        throw TerrainRefused( TerrainProblem::Picture,
          "The terrain is a picture of three colour bands, not elevations; choose a raster whose cells hold ground "
          "elevations." );
      const GDALRasterBandH chosen = GDALGetRasterBand( dataset, band );
      if ( GDALGetRasterColorInterpretation( chosen ) == GCI_PaletteIndex || GDALGetRasterColorTable( chosen ) )
        throw TerrainRefused( TerrainProblem::Picture,
          "The terrain is a picture whose cells are colours of a palette, not elevations; choose a raster whose cells "
          "hold ground elevations." );
    }

    void refuseComplex( GDALDatasetH dataset, int band )
    {
      const GDALDataType type = GDALGetRasterDataType( GDALGetRasterBand( dataset, band ) );
      if ( GDALDataTypeIsComplex( type ) )
        throw TerrainRefused( TerrainProblem::NotNumbers,
          "The terrain's band holds complex numbers (" + std::string( GDALGetDataTypeName( type ) )
            + "), not elevations; choose another raster." );
    }

    RasterGrid gridOrRefuse( GDALDatasetH dataset )
    {
      std::array<double, 6> placement {};
      if ( GDALGetGeoTransform( dataset, placement.data() ) == CE_None )
      {
        try
        {
          return RasterGrid( GDALGetRasterXSize( dataset ), GDALGetRasterYSize( dataset ), placement );
        }
        catch ( const std::invalid_argument & )
        {
          throw TerrainRefused( TerrainProblem::NotPlaced,
            "The terrain's cells have no size, so it has no place on the map; georeference it first." );
        }
      }
      if ( GDALGetGCPCount( dataset ) > 0 )
        throw TerrainRefused( TerrainProblem::NotPlaced,
          "The terrain is placed by ground control points only; warp it to a map grid first." );
      char **rpc = GDALGetMetadata( dataset, "RPC" );
      if ( rpc && rpc[0] )
        throw TerrainRefused( TerrainProblem::NotPlaced,
          "The terrain is placed by a camera model only; orthorectify it to a map grid first." );
      throw TerrainRefused(
        TerrainProblem::NotPlaced, "The terrain has no place on the map (no georeference); georeference it first." );
    }

    std::string crsOf( GDALDatasetH dataset )
    {
      const OGRSpatialReferenceH crs = GDALGetSpatialRef( dataset );
      if ( !crs )
        return {};
      const GdalErrors errors;
      const char *options[] = { "FORMAT=WKT2_2019", nullptr };
      char *wkt = nullptr;
      std::string result;
      if ( OSRExportToWktEx( crs, &wkt, options ) == OGRERR_NONE && wkt )
        result = wkt;
      CPLFree( wkt );
      return result;
    }
  } // namespace

  GdalTerrain::GdalTerrain( const std::string &source, int band, std::optional<ElevationUnit> unit,
    const std::vector<std::string> &openOptions )
  {
    GdalDataset dataset = openOrRefuse( source, openOptions );
    refuseWrongBand( dataset.get(), band );
    refusePicture( dataset.get(), band );
    refuseComplex( dataset.get(), band );
    mGrid = gridOrRefuse( dataset.get() );
    const GDALRasterBandH handle = GDALGetRasterBand( dataset.get(), band );
    GDALGetBlockSize( handle, &mBlockColumns, &mBlockRows );
    GdalCacheLimit::neverBelow(
      BLOCKS_AT_HAND * mBlockColumns * mBlockRows * GDALGetDataTypeSizeBytes( GDALGetRasterDataType( handle ) ) );
    mCrsDefinition = crsOf( dataset.get() );
    mHasCrs = !isPlaceholderCrs( mCrsDefinition );
    const char *unitText = GDALGetRasterUnitType( handle );
    mUnit = decideElevationUnit( unit, unitText ? unitText : "", mCrsDefinition );
    mPool = std::make_unique<Pool>( source, openOptions, band, mUnit.metresPerUnit );
    auto first = std::make_unique<GdalBand>( std::move( dataset ), band, mUnit.metresPerUnit );
    mMetresPerFloat = first->isFloats() ? mUnit.metresPerUnit : 0.0;
    mPool->giveBack( std::move( first ) );
  }

  GdalTerrain::~GdalTerrain() = default;

  void GdalTerrain::read( int column, int row, int columns, int rows, double *elevationsM ) const
  {
    // A handle whose read failed is not given back: the next read starts afresh.
    std::unique_ptr<GdalBand> band = mPool->take();
    band->read( { column, row, columns, rows }, elevationsM );
    mPool->giveBack( std::move( band ) );
  }

  void GdalTerrain::readFloats( int column, int row, int columns, int rows, float *values ) const
  {
    std::unique_ptr<GdalBand> band = mPool->take();
    band->readFloats( { column, row, columns, rows }, values );
    mPool->giveBack( std::move( band ) );
  }

} // namespace stillhead
