// SPDX-License-Identifier: GPL-2.0-or-later
// One open handle on a raster band, for one thread at a time, and how its raw values become elevations.
#pragma once

#include "core/geo/gdalerrors.h"

#include <memory>
#include <string>
#include <vector>

#include <gdal.h>

namespace stillhead
{

  struct GdalDatasetDeleter
  {
      void operator()( void *dataset ) const { GDALClose( dataset ); }
  };

  using GdalDataset = std::unique_ptr<void, GdalDatasetDeleter>;

  //! Opens a raster to read; null where it cannot be opened.
  GdalDataset openGdalRaster( const std::string &source, const std::vector<std::string> &openOptions );

  //! A band and its rules of reading.
  class GdalBand
  {
    public:
      //! Pixels, from the upper left one.
      struct Window
      {
          int column = 0;
          int row = 0;
          int columns = 0;
          int rows = 0;
      };

      //! \param metresPerUnit of the band's heights, after scale and offset
      GdalBand( GdalDataset dataset, int band, double metresPerUnit );

      //! As ElevationSource::read().
      void read( const Window &window, double *elevationsM );

      //! True where the band's own values are 32-bit floats, or integers that such floats hold, with neither scale nor offset.
      bool isFloats() const { return mIsFloats; }

      //! As ElevationSource::readFloats(): the band's own values.
      void readFloats( const Window &window, float *values );

    private:
      //! How much of a window the sources of a mosaic, or the blocks of a sparse file, cover.
      enum class Coverage
      {
        Whole,
        Part,
        None
      };

      void readRaw(
        GDALRasterBandH band, const Window &window, void *values, GDALDataType type, const GdalErrors &errors );
      bool isOneBlock( const Window &window ) const;
      void readOneBlock( const Window &window, float *values, const GdalErrors &errors );
      void toElevations( double *values, std::size_t count ) const;
      void toFloats( float *values, std::size_t count ) const;
      Coverage coverageOf( const Window &window ) const;

      //! Reads by \a readValues( errors ) what is covered and not masked; NaN elsewhere.
      template <typename Value, typename ReadValues>
      void readCovered( const Window &window, Value *values, ReadValues readValues );
      template <typename Value> void leaveOutMasked( const Window &window, Value *values, const GdalErrors &errors );
      template <typename Value> void leaveOutUncovered( const Window &window, Value *values, int stride );

      GdalDataset mDataset;
      GDALRasterBandH mBand = nullptr;
      GDALRasterBandH mMask = nullptr; //!< Null where the mask says nothing that nodata does not
      bool mHasNodata = false;
      double mNodata = 0.0; //!< As a value of the band's own type
      double mScale = 1.0;
      double mOffset = 0.0;
      double mMetresPerUnit = 1.0;
      bool mIsSignedByte = false;
      bool mIsPlain = true; //!< Neither scale nor offset
      bool mIsFloats = false;
      int mBlockColumns = 0;
      int mBlockRows = 0;
      std::vector<float> mBlock;  //!< One block as it is stored; kept between reads
      bool mMayHaveHoles = false; //!< Nothing declared says where there is no value: ask what is covered
      std::vector<unsigned char> mMaskValues;
  };

} // namespace stillhead
