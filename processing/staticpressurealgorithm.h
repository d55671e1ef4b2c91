// SPDX-License-Identifier: GPL-2.0-or-later
// Static pressure along pipes: the main job as a Processing algorithm.
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

  class StaticPressureAlgorithm : public AlgorithmBase
  {
    public:
      QString name() const override;
      QString displayName() const override;
      QString shortDescription() const override;
      QString shortHelpString() const override;
      QStringList tags() const override;
      void initAlgorithm( const QVariantMap &configuration = QVariantMap() ) override;
      QgsProcessingAlgorithm *createInstance() const override;

    protected:
      bool prepareAlgorithm(
        const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;
      QVariantMap processAlgorithm(
        const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;
      QVariantMap postProcessAlgorithm( QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;

    private:
      void addSink( const QString &name, const QString &description, int sourceType, bool optional );
      DrawnLayer drawnLayer( const QString &name, const QList<int> &keys, const QVariantMap &parameters,
        QgsProcessingContext &context ) const;

      // From the main thread to the work, and from the work back.
      std::unique_ptr<Terrain> mTerrain;
      QList<int> mMainKeys;
      QList<int> mLateralKeys;
      std::vector<WrittenLayer> mWritten;
      ResultStyle mStyle;
  };

} // namespace stillhead
