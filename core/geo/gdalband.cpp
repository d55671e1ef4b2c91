// SPDX-License-Identifier: GPL-2.0-or-later
// Values are read as doubles, which hold every type up to 64-bit floats and 32-bit integers exactly.
#include "core/geo/gdalband.h"

#include <algorithm>
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

    template <typename Value> constexpr Value none()
    {
      return std::numeric_limits<Value>::quiet_NaN();
    }

    std::size_t pixelsOf( const GdalBand::Window &window )
    {
      return static_cast<std::size_t>( window.columns ) * static_cast<std::size_t>( window.rows );
    }

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

    [[noreturn]] void throwUnreadable( const GdalBand::Window &window, const GdalErrors &errors )
    {
      throw std::runtime_error( "The terrain cannot be read at columns " + std::to_string( window.column ) + " to "
        + std::to_string( window.column + window.columns - 1 ) + ", rows " + std::to_string( window.row ) + " to "
        + std::to_string( window.row + window.rows - 1 ) + errors.inParentheses()
        + "; check that its files are complete." );
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
    mIsFloats = mIsPlain && !mIsSignedByte
      && ( type == GDT_Float32 || type == GDT_Int16 || type == GDT_UInt16 || type == GDT_Byte );
    // Other types are converted, which only the cached way does.
    if ( type == GDT_Float32 )
      GDALGetBlockSize( mBand, &mBlockColumns, &mBlockRows );

    const int flags = GDALGetMaskFlags( mBand );
    if ( !( flags & GMF_ALL_VALID ) && flags != GMF_NODATA )
      mMask = GDALGetMaskBand( mBand );
    mMayHaveHoles = !mHasNodata && !mMask;
  }

  void GdalBand::readRaw(
    GDALRasterBandH band, const Window &window, void *values, GDALDataType type, const GdalErrors &errors )
  {
    if ( GDALRasterIOEx( band, GF_Read, window.column, window.row, window.columns, window.rows, values, window.columns,
           window.rows, type, 0, 0, nullptr )
      != CE_None )
      throwUnreadable( window, errors );
  }

  void GdalBand::read( const Window &window, double *elevationsM )
  {
    readCovered( window, elevationsM, [&]( const GdalErrors &errors ) {
      readRaw( mBand, window, elevationsM, GDT_Float64, errors );
      toElevations( elevationsM, pixelsOf( window ) );
    } );
  }

  void GdalBand::readFloats( const Window &window, float *values )
  {
    readCovered( window, values, [&]( const GdalErrors &errors ) {
      if ( isOneBlock( window ) )
        readOneBlock( window, values, errors );
      else
        readRaw( mBand, window, values, GDT_Float32, errors );
      toFloats( values, pixelsOf( window ) );
    } );
  }

  bool GdalBand::isOneBlock( const Window &window ) const
  {
    if ( mBlockColumns == 0 || window.column % mBlockColumns != 0 || window.row % mBlockRows != 0 )
      return false;
    const int columns = std::min( mBlockColumns, GDALGetRasterBandXSize( mBand ) - window.column );
    const int rows = std::min( mBlockRows, GDALGetRasterBandYSize( mBand ) - window.row );
    return window.columns == columns && window.rows == rows;
  }

  //! Past the library's block cache: our own cache keeps the block, a second copy would only cost.
  void GdalBand::readOneBlock( const Window &window, float *values, const GdalErrors &errors )
  {
    mBlock.resize( static_cast<std::size_t>( mBlockColumns ) * static_cast<std::size_t>( mBlockRows ) );
    if ( GDALReadBlock( mBand, window.column / mBlockColumns, window.row / mBlockRows, mBlock.data() ) != CE_None )
      throwUnreadable( window, errors );
    for ( int row = 0; row < window.rows; ++row )
      std::copy_n( mBlock.data() + static_cast<std::ptrdiff_t>( row ) * mBlockColumns, window.columns,
        values + static_cast<std::ptrdiff_t>( row ) * window.columns );
  }

  template <typename Value, typename ReadValues>
  void GdalBand::readCovered( const Window &window, Value *values, ReadValues readValues )
  {
    const GdalErrors errors;
    const UnsharedSources unshared;
    const Coverage coverage = mMayHaveHoles ? coverageOf( window ) : Coverage::Whole;
    // Asking opens the files of a mosaic: one that is missing shows here, and would pass for a gap.
    if ( coverage != Coverage::Whole && !errors.text().empty() )
      throwUnreadable( window, errors );
    if ( coverage == Coverage::None )
    {
      std::fill_n( values, pixelsOf( window ), none<Value>() );
      return;
    }
    readValues( errors );
    if ( mMask )
      leaveOutMasked( window, values, errors );
    if ( coverage == Coverage::Part )
      leaveOutUncovered( window, values, window.columns );
  }

  void GdalBand::toFloats( float *values, std::size_t count ) const
  {
    if ( mHasNodata )
    {
      for ( std::size_t i = 0; i < count; ++i )
        values[i] = static_cast<double>( values[i] ) == mNodata ? none<float>() : values[i];
    }
    for ( std::size_t i = 0; i < count; ++i )
      values[i] = std::abs( values[i] ) <= std::numeric_limits<float>::max() ? values[i] : none<float>();
  }

  void GdalBand::toElevations( double *values, std::size_t count ) const
  {
    if ( mIsSignedByte )
    {
      for ( std::size_t i = 0; i < count; ++i )
        values[i] -= values[i] > 127.0 ? 256.0 : 0.0;
    }
    if ( mHasNodata )
    {
      for ( std::size_t i = 0; i < count; ++i )
        values[i] = values[i] == mNodata ? NO_ELEVATION : values[i];
    }
    if ( mIsPlain )
    {
      for ( std::size_t i = 0; i < count; ++i )
        values[i] *= mMetresPerUnit;
    }
    else
    {
      for ( std::size_t i = 0; i < count; ++i )
        values[i] = ( values[i] * mScale + mOffset ) * mMetresPerUnit;
    }
    // An infinite height is none.
    for ( std::size_t i = 0; i < count; ++i )
      values[i] = std::abs( values[i] ) <= std::numeric_limits<double>::max() ? values[i] : NO_ELEVATION;
  }

  template <typename Value>
  void GdalBand::leaveOutMasked( const Window &window, Value *values, const GdalErrors &errors )
  {
    mMaskValues.resize( static_cast<std::size_t>( window.columns ) * static_cast<std::size_t>( window.rows ) );
    readRaw( mMask, window, mMaskValues.data(), GDT_Byte, errors );
    for ( std::size_t i = 0; i < mMaskValues.size(); ++i )
    {
      if ( mMaskValues[i] == 0 )
        values[i] = none<Value>();
    }
  }

  GdalBand::Coverage GdalBand::coverageOf( const Window &window ) const
  {
    const int status =
      GDALGetDataCoverageStatus( mBand, window.column, window.row, window.columns, window.rows, 0, nullptr );
    if ( ( status & GDAL_DATA_COVERAGE_STATUS_UNIMPLEMENTED ) || !( status & GDAL_DATA_COVERAGE_STATUS_EMPTY ) )
      return Coverage::Whole;
    return status & GDAL_DATA_COVERAGE_STATUS_DATA ? Coverage::Part : Coverage::None;
  }

  template <typename Value> void GdalBand::leaveOutUncovered( const Window &window, Value *values, int stride )
  {
    const Coverage coverage = coverageOf( window );
    if ( coverage == Coverage::Whole )
      return;
    if ( coverage == Coverage::None || ( window.columns == 1 && window.rows == 1 ) )
    {
      for ( int row = 0; row < window.rows; ++row )
        std::fill_n( values + static_cast<std::ptrdiff_t>( row ) * stride, window.columns, none<Value>() );
      return;
    }
    // Covered in part: halve the longer side until the parts are plain.
    Window first = window;
    Window second = window;
    if ( window.columns >= window.rows )
    {
      first.columns = window.columns / 2;
      second.column += first.columns;
      second.columns -= first.columns;
    }
    else
    {
      first.rows = window.rows / 2;
      second.row += first.rows;
      second.rows -= first.rows;
    }
    leaveOutUncovered( first, values, stride );
    leaveOutUncovered( second,
      values + static_cast<std::ptrdiff_t>( second.row - window.row ) * stride + ( second.column - window.column ),
      stride );
  }

} // namespace stillhead
