// SPDX-License-Identifier: GPL-2.0-or-later
// Propose boost as a Processing algorithm.
#pragma once

#include "processing/networkalgorithm.h"

namespace stillhead
{

  class ProposeBoostAlgorithm : public NetworkAlgorithm
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
      QStringList layers() const override;
      std::unique_ptr<NetworkRun> makeRun(
        const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback ) const override;
  };

} // namespace stillhead
