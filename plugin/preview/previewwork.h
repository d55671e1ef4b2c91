// SPDX-License-Identifier: GPL-2.0-or-later
// One computation of the preview: made in the main thread from what stands there at that moment, done in another. It
// is the main algorithm's own run up to the point where that one begins to write.
#pragma once

#include "plugin/preview/previewinput.h"
#include "processing/reading/drawingreader.h"
#include "processing/reading/terrainreader.h"
#include "processing/solvedplan.h"

#include <qgsprocessingalgorithm.h>
#include <qgsprocessingcontext.h>
#include <qgsprocessingfeedback.h>

#include <QStringList>

#include <memory>
#include <vector>

namespace stillhead
{

  //! A solved plan and the ground it stands on, for those who ask about single places.
  struct PreviewResult
  {
      SolvedPlan plan;
      std::shared_ptr<Terrain> terrain;
      QString summary = {};
      QStringList warnings = {};
      double coverM = 0.0; //!< depth of cover where no pipe is drawn
      bool useLineZ = false;
      bool sketched = false; //!< a line that is still being drawn is among the pipe
  };

  using PreviewResultPointer = std::shared_ptr<const PreviewResult>;

  //! Opens terrains and keeps the last one, for opening and reading it anew would be most of the work.
  class TerrainKeeper
  {
    public:
      /**
       * The terrain that \a values name; main thread.
       * \throws QgsProcessingException
       */
      std::shared_ptr<Terrain> terrainFor(
        const QgsRasterLayer &layer, const ParameterValues &values, QgsProcessingFeedback &feedback );

      void forget() { mTerrain.reset(); }

    private:
      QString mKey;
      std::shared_ptr<Terrain> mTerrain;
  };

  class PreviewWork
  {
    public:
      /**
       * Takes a snapshot of \a input, of which nothing may be missing; main thread.
       * \throws QgsProcessingException for values or terrain that cannot be used
       */
      PreviewWork(
        const PreviewInput &input, const QgsCoordinateTransformContext &transforms, TerrainKeeper &terrains );
      ~PreviewWork();

      //! Computes; any thread, once. \throws QgsProcessingException with a sentence for the user
      PreviewResultPointer run();

      //! Stops run() soon, from any thread; it throws then.
      void cancel() { mFeedback.cancel(); }

    private:
      void addLayer( const QString &name, Role role, std::unique_ptr<QgsFeatureSource> source, const QList<int> &keys );

      //! Keeps warnings for the panel.
      class Log : public QgsProcessingFeedback
      {
        public:
          Log()
            : QgsProcessingFeedback( false )
          {
          }
          void pushWarning( const QString &warning ) override { warnings << warning; }
          void pushInfo( const QString & ) override {}
          void reportError( const QString &, bool ) override {}
          QStringList warnings = {};
      };

      std::unique_ptr<QgsProcessingAlgorithm> mAlgorithm;
      QgsProcessingContext mContext;
      Log mFeedback;
      QVariantMap mParameters;
      std::unique_ptr<ParameterValues> mValues;
      std::shared_ptr<Terrain> mTerrain;
      std::vector<DrawnLayer> mLayers;
      bool mSketched;
  };

} // namespace stillhead
