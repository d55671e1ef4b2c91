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
      //! \param metresPerUnit of the band's heights, after scale and offset
      GdalBand( GdalDataset dataset, int band, double metresPerUnit );

      //! As ElevationSource::read().
      void read( int column, int row, int columns, int rows, double *elevationsM );

    private:
      void readRaw( GDALRasterBandH band, int column, int row, int columns, int rows, void *values, GDALDataType type,
        const GdalErrors &errors );
      void leaveOutMasked( int column, int row, int columns, int rows, double *elevationsM, const GdalErrors &errors );
      void leaveOutUncovered( int column, int row, int columns, int rows, double *elevationsM, int stride );
      bool isUncoveredSomewhere( int column, int row, int columns, int rows, bool &everywhere ) const;

      GdalDataset mDataset;
      GDALRasterBandH mBand = nullptr;
      GDALRasterBandH mMask = nullptr; //!< Null where the mask says nothing that nodata does not
      bool mHasNodata = false;
      double mNodata = 0.0; //!< As a value of the band's own type
      double mScale = 1.0;
      double mOffset = 0.0;
      double mMetresPerUnit = 1.0;
      bool mIsSignedByte = false;
      bool mIsPlain = true;       //!< Neither scale nor offset
      bool mMayHaveHoles = false; //!< Nothing declared says where there is no value: ask what is covered
      std::vector<unsigned char> mMaskValues;
  };

} // namespace stillhead
