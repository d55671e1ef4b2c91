// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the main job: from parameters to core's job, and from core's result to outputs.
#pragma once

#include "core/feedback/progressshares.h"
#include "core/job/staticjob.h"
#include "processing/displayunits.h"
#include "processing/reading/devicelayer.h"
#include "processing/reading/drawingreader.h"
#include "processing/reading/sourcereader.h"
#include "processing/reading/terrainreader.h"
#include "processing/text/findingtext.h"
#include "processing/text/refusaltext.h"
#include "processing/writing/outputset.h"
#include "processing/writing/resultfinish.h"
#include "processing/writing/resultmetadata.h"

#include <memory>
#include <vector>

namespace stillhead
{

  //! Names of the outputs that are layers.
  QStringList staticPressureLayers();

  class StaticPressureRun
  {
    public:
      //! Reads all that needs no layer. \throws QgsProcessingException
      StaticPressureRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback );

      /**
       * Reads the drawing, the sources (from \a sources if given) and the devices (from \a devices if given).
       * \throws QgsProcessingException, Cancelled
       */
      void read( const std::vector<DrawnLayer> &layers, const QgsProcessingFeatureSource *sources,
        const QgsProcessingFeatureSource *devices );

      //! Computes. \throws QgsProcessingException, Cancelled
      void solve();

      //! Writes what was asked for and returns the results. \throws QgsProcessingException, Cancelled
      QVariantMap write();

      const std::vector<WrittenLayer> &written() const { return mWritten; }
      const ResultStyle &style() const { return mStyle; }

    private:
      void writeSurface( OutputSet &outputs, const RunFacts &facts, QVariantMap &results );
      void writeTable( OutputSet &outputs, const ResultTable &table, const RunFacts &facts,
        const ProgressShares::Share &share, QVariantMap &results );
      void readFeeds( const QgsProcessingFeatureSource *sources, const QgsProcessingFeatureSource *devices );
      StaticJob job( const PlanToTerrain &planToTerrain ) const;
      RefusalNames refusalNames() const;
      void logSources() const;
      void logSource( std::size_t number ) const;
      void logFindings() const;
      void warnOfElevations() const;
      RunFacts facts( const QString &summary ) const;
      void addNumbers( QVariantMap &results ) const;

      const ParameterValues &mValues;
      Terrain &mTerrain;
      QgsProcessingFeedback &mFeedback;
      DisplayUnits mUnits;
      Limits mLimits;
      ResultStyle mStyle;
      DrawnInput mDrawn;
      std::vector<SourceInput> mSources;
      DeviceInput mDevices;
      FeedNames mNames;
      std::unique_ptr<PlanMeasure> mMeasure;
      StaticResult mResult;
      std::vector<WrittenLayer> mWritten;
  };

} // namespace stillhead
