// SPDX-License-Identifier: GPL-2.0-or-later
// Terrain that GDAL can open: one band of a raster, every value at full resolution (overviews are never read), scale,
// offset, nodata, mask and unit honoured, whatever the file's blocks, type or placement. What is no terrain is refused
// with a sentence that says what to do.
#pragma once

#include "core/geo/elevationunit.h"
#include "core/terrain/elevationsource.h"

#include <memory>
#include <optional>
#include <stdexcept>
#include <string>
#include <vector>

namespace stillhead
{

  //! Why a raster cannot serve as terrain.
  enum class TerrainProblem
  {
    Unreadable, //!< Cannot be opened, or holds no raster
    NoSuchBand,
    Picture,    //!< Colours, not heights
    NotNumbers, //!< A type of values that is no height
    NotPlaced   //!< No affine placement in a plan
  };

  //! A raster refused as terrain; what() is one sentence for the user.
  class TerrainRefused : public std::runtime_error
  {
    public:
      TerrainRefused( TerrainProblem problem, const std::string &sentence )
        : std::runtime_error( sentence )
        , mProblem( problem )
      {
      }

      TerrainProblem problem() const { return mProblem; }

    private:
      TerrainProblem mProblem;
  };

  /**
   * A band of a GDAL raster. read() may be called from any number of threads: each call uses a handle of its own,
   * taken from a pool. It fails with std::runtime_error where a block or a tile of a mosaic cannot be read: what
   * is broken is never taken for nodata. Cells of a mosaic or sparse file that no source covers are nodata, also
   * where the file declares none.
   */
  class GdalTerrain : public ElevationSource
  {
    public:
      /**
       * \param source what GDAL opens: a path, or another data source string
       * \param band number, from 1
       * \param unit the unit that the user chose, if any
       * \param openOptions GDAL open options, NAME=VALUE
       * \throws TerrainRefused
       */
      explicit GdalTerrain( const std::string &source, int band = 1, std::optional<ElevationUnit> unit = std::nullopt,
        const std::vector<std::string> &openOptions = {} );
      ~GdalTerrain() override;

      const RasterGrid &grid() const override { return mGrid; }
      int blockColumns() const override { return mBlockColumns; }
      int blockRows() const override { return mBlockRows; }
      void read( int column, int row, int columns, int rows, double *elevationsM ) const override;
      double metresPerFloat() const override { return mMetresPerFloat; }
      void readFloats( int column, int row, int columns, int rows, float *values ) const override;

      //! The raster's CRS as WKT2, vertical part included; blank where it has none.
      const std::string &crsDefinition() const { return mCrsDefinition; }

      //! False where the raster has no CRS, or only a placeholder for one: the caller refuses it.
      bool hasCrs() const { return mHasCrs; }

      const ElevationUnitDecision &unit() const { return mUnit; }

    private:
      class Pool;

      RasterGrid mGrid;
      int mBlockColumns = 0;
      int mBlockRows = 0;
      std::string mCrsDefinition;
      bool mHasCrs = false;
      ElevationUnitDecision mUnit;
      double mMetresPerFloat = 0.0;
      std::unique_ptr<Pool> mPool;
  };

} // namespace stillhead
