// SPDX-License-Identifier: GPL-2.0-or-later
// Compare sources as a Processing algorithm.
#pragma once

#include "processing/networkalgorithm.h"

namespace stillhead
{

  class CompareSourcesAlgorithm : public NetworkAlgorithm
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
      QString sourcesParameter() const override;
      QStringList layers() const override;
      std::unique_ptr<NetworkRun> makeRun(
        const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const override;
  };

} // namespace stillhead
