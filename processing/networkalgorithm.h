// SPDX-License-Identifier: GPL-2.0-or-later
// What the algorithms over drawn pipe share: their parameters, opening of layers, and one run from reading to styling.
#pragma once

#include "processing/algorithmbase.h"
#include "processing/reading/terrainreader.h"
#include "processing/styles/resultstyle.h"
#include "processing/writing/resultfinish.h"

#include <memory>
#include <vector>

namespace stillhead
{

  struct DrawnLayer;
  class NetworkRun;

  class NetworkAlgorithm : public AlgorithmBase
  {
    protected:
      //! Names of the outputs that are layers.
      virtual QStringList layers() const = 0;

      virtual std::unique_ptr<NetworkRun> makeRun(
        const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const = 0;

      //! The parameter that holds a layer of sources.
      virtual QString sourcesParameter() const;

      //! All shared parameters.
      void addNetworkParameters();
      void addSink( const QString &name, const QString &description, int sourceType, bool optional );

      bool prepareAlgorithm(
        const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;
      QVariantMap processAlgorithm(
        const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;
      QVariantMap postProcessAlgorithm( QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;

    private:
      DrawnLayer drawnLayer( const QString &name, const QList<int> &keys, const QVariantMap &parameters,
        QgsProcessingContext &context ) const;
      std::unique_ptr<QgsProcessingFeatureSource> pointSource( const ParameterValues &values, const QString &name,
        const QVariantMap &parameters, QgsProcessingContext &context ) const;

      // From the main thread to the work, and from the work back.
      std::unique_ptr<Terrain> mTerrain;
      QList<int> mMainKeys;
      QList<int> mLateralKeys;
      std::vector<WrittenLayer> mWritten;
      ResultStyle mStyle;
  };

} // namespace stillhead
