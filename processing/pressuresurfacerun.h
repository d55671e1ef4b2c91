// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the pressure surface: from parameters to the raster, the band areas and the grounds that are too high or low,
// as numbers and as lines.
#pragma once

#include "processing/displayunits.h"
#include "processing/reading/sourcereader.h"
#include "processing/reading/terrainreader.h"
#include "processing/surfaceoutput.h"
#include "processing/writing/outputset.h"
#include "processing/writing/resultfinish.h"
#include "processing/writing/resultmetadata.h"

#include <qgsprocessingutils.h>

#include <vector>

namespace stillhead
{

  //! Names of the outputs that are layers.
  QStringList pressureSurfaceLayers();

  class PressureSurfaceRun
  {
    public:
      //! Reads all parameters but AREA. \throws QgsProcessingException
      PressureSurfaceRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback );

      //! Stays within \a area, which may be null. \throws QgsProcessingException
      void readArea( const QgsProcessingFeatureSource *area );

      //! Finds the static level. \throws QgsProcessingException
      void solve();

      //! Writes what was asked for and returns the results. \throws QgsProcessingException, Cancelled
      QVariantMap write();

      const std::vector<WrittenLayer> &written() const { return mWritten; }
      const ResultStyle &style() const { return mStyle; }

    private:
      //! An output whose rows were made beforehand.
      struct RowLayer
      {
          QString output;
          ResultLayer what;
          QgsFields fields;
          compat::WkbType type;
          RowSpool &rows;
      };

      RunFacts facts() const;
      void writeSurface( OutputSet &outputs, double fromPercent, QVariantMap &results );
      void writeRows(
        OutputSet &outputs, const RowLayer &layer, double fromPercent, double toPercent, QVariantMap &results );

      const ParameterValues &mValues;
      Terrain &mTerrain;
      QgsProcessingFeedback &mFeedback;
      DisplayUnits mUnits;
      Limits mLimits;
      ResultStyle mStyle;
      SourceInput mSource;
      SurfaceInput mInput;
      std::vector<WrittenLayer> mWritten;
  };

} // namespace stillhead
