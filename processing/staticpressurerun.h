// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the main job: from parameters to core's job, and from core's result to outputs.
#pragma once

#include "core/feedback/progressshares.h"
#include "core/job/staticjob.h"
#include "processing/displayunits.h"
#include "processing/reading/drawingreader.h"
#include "processing/reading/sourcereader.h"
#include "processing/reading/terrainreader.h"
#include "processing/solvedplan.h"
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

      //! Reads the drawing and the source. \throws QgsProcessingException, Cancelled
      void read( const std::vector<DrawnLayer> &layers );

      //! Computes. \throws QgsProcessingException, Cancelled
      void solve();

      //! Writes what was asked for and returns the results. \throws QgsProcessingException, Cancelled
      QVariantMap write();

      //! Hands out what solve() found, in place of writing it; nothing is left in the run.
      SolvedPlan takeSolved();

      const std::vector<WrittenLayer> &written() const { return mWritten; }
      const ResultStyle &style() const { return mStyle; }

    private:
      void writeSurface( OutputSet &outputs, const RunFacts &facts, QVariantMap &results );
      void writeTable( OutputSet &outputs, const ResultTable &table, const RunFacts &facts,
        const ProgressShares::Share &share, QVariantMap &results );
      void logSource() const;
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
      SourceInput mSource;
      std::unique_ptr<PlanMeasure> mMeasure;
      StaticResult mResult;
      std::vector<WrittenLayer> mWritten;
  };

} // namespace stillhead
