// SPDX-License-Identifier: GPL-2.0-or-later
// What the runs of all algorithms over drawn pipe share: from parameters to core's job, and from core's result to outputs.
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

  class NetworkRun
  {
    public:
      /**
       * Reads all that needs no layer.
       * \param layers names of the outputs that are layers
       * \throws QgsProcessingException
       */
      NetworkRun(
        const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback, const QStringList &layers );
      virtual ~NetworkRun();
      NetworkRun( const NetworkRun & ) = delete;
      NetworkRun &operator=( const NetworkRun & ) = delete;

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

    protected:
      //! Works on \a job and sets mResult. \throws Refusal, Cancelled
      virtual void compute( const StaticJob &job, Monitor &monitor ) = 0;

      //! Every table that the algorithm has, in the order in which they are written; \a outlines belong to STRETCHES.
      virtual std::vector<ResultTable> tables(
        const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const = 0;

      //! The parameter that holds a layer of sources.
      virtual QString sourcesParameter() const;

      //! What was done, as metadata says it: "static pressure along pipes".
      virtual QString title() const = 0;

      virtual QString summary( const ResultContext &context ) const = 0;
      virtual void addNumbers( QVariantMap &results ) const = 0;

      //! True if \a output is a layer of the algorithm and the user wants it.
      bool isAsked( const QString &output ) const;

      //! LOCKUP_RISE or LEAST_DROP: as given, else the usual margin in the chosen unit.
      double regulatorMarginPa( const QString &name ) const;

      const ParameterValues &mValues;
      Terrain &mTerrain;
      QgsProcessingFeedback &mFeedback;
      QStringList mLayers;
      DisplayUnits mUnits;
      Limits mLimits;
      ResultStyle mStyle;
      DrawnInput mDrawn;
      std::vector<SourceInput> mSources;
      DeviceInput mDevices;
      FeedNames mNames;
      std::unique_ptr<PlanMeasure> mMeasure;
      StaticResult mResult;

      //! Names for a sentence of refusal, of \a sources.
      RefusalNames refusalNames( const QStringList &sources ) const;

    private:
      void writeSurface( OutputSet &outputs, const RunFacts &facts, QVariantMap &results );
      void writeTable( OutputSet &outputs, const ResultTable &table, const RunFacts &facts,
        const ProgressShares::Share &share, QVariantMap &results );
      void readFeeds( const QgsProcessingFeatureSource *sources, const QgsProcessingFeatureSource *devices );
      StaticJob job( const PlanToTerrain &planToTerrain ) const;
      void logSources() const;
      void logSource( std::size_t number ) const;
      void logFindings() const;
      void warnOfElevations() const;
      RunFacts facts( const QString &summary ) const;

      std::vector<WrittenLayer> mWritten;
  };

} // namespace stillhead
