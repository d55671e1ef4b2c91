// SPDX-License-Identifier: GPL-2.0-or-later
// Values are read as doubles, which hold every type up to 64-bit floats and 32-bit integers exactly.
#include "core/geo/gdalband.h"

#include <cmath>
#include <cstring>
#include <limits>
#include <stdexcept>

#include <cpl_conv.h>

namespace stillhead
{

  namespace
  {
    constexpr double NO_ELEVATION = std::numeric_limits<double>::quiet_NaN();

    // Handles of one mosaic opened in one thread share the handles of its tiles, unless told not to; ours wander
    // between threads.
    class UnsharedSources
    {
      public:
        UnsharedSources()
        {
          if ( const char *before = CPLGetThreadLocalConfigOption( OPTION, nullptr ) )
          {
            mBefore = before;
            mWasSet = true;
          }
          CPLSetThreadLocalConfigOption( OPTION, "NO" );
        }
        ~UnsharedSources() { CPLSetThreadLocalConfigOption( OPTION, mWasSet ? mBefore.c_str() : nullptr ); }
        UnsharedSources( const UnsharedSources & ) = delete;
        UnsharedSources &operator=( const UnsharedSources & ) = delete;

      private:
        static constexpr const char *OPTION = "VRT_SHARED_SOURCE";
        std::string mBefore;
        bool mWasSet = false;
    };

    //! Files keep nodata as text or double; compared is the value of the band's own type.
    double asBandValue( double nodata, GDALDataType type )
    {
      if ( type != GDT_Float32 || !std::isfinite( nodata ) )
        return nodata;
      // The decimal text of the largest float often lies a little beyond it.
      constexpr double largest = std::numeric_limits<float>::max();
      if ( std::abs( nodata ) > largest )
        return std::abs( nodata ) < largest * ( 1.0 + 1e-7 ) ? std::copysign( largest, nodata ) : nodata;
      return static_cast<double>( static_cast<float>( nodata ) );
    }

    double nodataOf( GDALRasterBandH band, bool &has )
    {
      int found = 0;
      double nodata = 0.0;
#if GDAL_VERSION_NUM >= 3050000
      const GDALDataType type = GDALGetRasterDataType( band );
      if ( type == GDT_Int64 )
        nodata = static_cast<double>( GDALGetRasterNoDataValueAsInt64( band, &found ) );
      else if ( type == GDT_UInt64 )
        nodata = static_cast<double>( GDALGetRasterNoDataValueAsUInt64( band, &found ) );
      else
#endif
        nodata = GDALGetRasterNoDataValue( band, &found );
      has = found != 0;
      return nodata;
    }
  } // namespace

  GdalDataset openGdalRaster( const std::string &source, const std::vector<std::string> &openOptions )
  {
    const UnsharedSources unshared;
    std::vector<const char *> options;
    for ( const std::string &option : openOptions )
      options.push_back( option.c_str() );
    options.push_back( nullptr );
    return GdalDataset( GDALOpenEx(
      source.c_str(), GDAL_OF_RASTER | GDAL_OF_READONLY | GDAL_OF_VERBOSE_ERROR, nullptr, options.data(), nullptr ) );
  }

  GdalBand::GdalBand( GdalDataset dataset, int band, double metresPerUnit )
    : mDataset( std::move( dataset ) )
    , mBand( GDALGetRasterBand( mDataset.get(), band ) )
    , mMetresPerUnit( metresPerUnit )
  {
    const GDALDataType type = GDALGetRasterDataType( mBand );
    mNodata = asBandValue( nodataOf( mBand, mHasNodata ), type );
    mScale = GDALGetRasterScale( mBand, nullptr );
    mOffset = GDALGetRasterOffset( mBand, nullptr );
    mIsPlain = mScale == 1.0 && mOffset == 0.0;
    const char *pixelType = GDALGetMetadataItem( mBand, "PIXELTYPE", "IMAGE_STRUCTURE" );
    mIsSignedByte = type == GDT_Byte && pixelType && std::strcmp( pixelType, "SIGNEDBYTE" ) == 0;

    const int flags = GDALGetMaskFlags( mBand );
    if ( !( flags & GMF_ALL_VALID ) && flags != GMF_NODATA )
      mMask = GDALGetMaskBand( mBand );
    mMayHaveHoles = !mHasNodata && !mMask;
  }

  void GdalBand::readRaw( GDALRasterBandH band, int column, int row, int columns, int rows, void *values,
    GDALDataType type, const GdalErrors &errors )
  {
    if ( GDALRasterIOEx( band, GF_Read, column, row, columns, rows, values, columns, rows, type, 0, 0, nullptr )
      != CE_None )
    {
      throw std::runtime_error( "The terrain cannot be read at columns " + std::to_string( column ) + " to "
        + std::to_string( column + columns - 1 ) + ", rows " + std::to_string( row ) + " to "
        + std::to_string( row + rows - 1 ) + errors.inParentheses() + "; check that its files are complete." );
    }
  }

  void GdalBand::read( int column, int row, int columns, int rows, double *elevationsM )
  {
    const GdalErrors errors;
    const UnsharedSources unshared;
    const std::size_t count = static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows );
    bool everywhere = false;
    const bool holes = mMayHaveHoles && isUncoveredSomewhere( column, row, columns, rows, everywhere );
    if ( everywhere )
    {
      for ( std::size_t i = 0; i < count; ++i )
        elevationsM[i] = NO_ELEVATION;
      return;
    }
    readRaw( mBand, column, row, columns, rows, elevationsM, GDT_Float64, errors );
    if ( mIsSignedByte )
    {
      for ( std::size_t i = 0; i < count; ++i )
        elevationsM[i] -= elevationsM[i] > 127.0 ? 256.0 : 0.0;
    }
    if ( mHasNodata )
    {
      for ( std::size_t i = 0; i < count; ++i )
        elevationsM[i] = elevationsM[i] == mNodata ? NO_ELEVATION : elevationsM[i];
    }
    if ( mIsPlain )
    {
      for ( std::size_t i = 0; i < count; ++i )
        elevationsM[i] *= mMetresPerUnit;
    }
    else
    {
      for ( std::size_t i = 0; i < count; ++i )
        elevationsM[i] = ( elevationsM[i] * mScale + mOffset ) * mMetresPerUnit;
    }
    // An infinite height is none.
    for ( std::size_t i = 0; i < count; ++i )
      elevationsM[i] = std::abs( elevationsM[i] ) <= std::numeric_limits<double>::max() ? elevationsM[i] : NO_ELEVATION;
    if ( mMask )
      leaveOutMasked( column, row, columns, rows, elevationsM, errors );
    if ( holes )
      leaveOutUncovered( column, row, columns, rows, elevationsM, columns );
  }

  void GdalBand::leaveOutMasked(
    int column, int row, int columns, int rows, double *elevationsM, const GdalErrors &errors )
  {
    mMaskValues.resize( static_cast<std::size_t>( columns ) * static_cast<std::size_t>( rows ) );
    readRaw( mMask, column, row, columns, rows, mMaskValues.data(), GDT_Byte, errors );
    for ( std::size_t i = 0; i < mMaskValues.size(); ++i )
    {
      if ( mMaskValues[i] == 0 )
        elevationsM[i] = NO_ELEVATION;
    }
  }

  bool GdalBand::isUncoveredSomewhere( int column, int row, int columns, int rows, bool &everywhere ) const
  {
    const int status = GDALGetDataCoverageStatus( mBand, column, row, columns, rows, 0, nullptr );
    const bool uncovered =
      !( status & GDAL_DATA_COVERAGE_STATUS_UNIMPLEMENTED ) && ( status & GDAL_DATA_COVERAGE_STATUS_EMPTY );
    everywhere = uncovered && !( status & GDAL_DATA_COVERAGE_STATUS_DATA );
    return uncovered;
  }

  void GdalBand::leaveOutUncovered( int column, int row, int columns, int rows, double *elevationsM, int stride )
  {
    bool everywhere = false;
    if ( !isUncoveredSomewhere( column, row, columns, rows, everywhere ) )
      return;
    if ( everywhere || ( columns == 1 && rows == 1 ) )
    {
      for ( int r = 0; r < rows; ++r )
      {
        for ( int c = 0; c < columns; ++c )
          elevationsM[static_cast<std::size_t>( r ) * static_cast<std::size_t>( stride )
            + static_cast<std::size_t>( c )] = NO_ELEVATION;
      }
      return;
    }
    // Covered in part: halve the longer side until the parts are plain.
    if ( columns >= rows )
    {
      const int half = columns / 2;
      leaveOutUncovered( column, row, half, rows, elevationsM, stride );
      leaveOutUncovered( column + half, row, columns - half, rows, elevationsM + half, stride );
    }
    else
    {
      const int half = rows / 2;
      leaveOutUncovered( column, row, columns, half, elevationsM, stride );
      leaveOutUncovered(
        column, row + half, columns, rows - half, elevationsM + static_cast<std::ptrdiff_t>( half ) * stride, stride );
    }
  }

} // namespace stillhead
