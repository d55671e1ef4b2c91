// SPDX-License-Identifier: GPL-2.0-or-later
// Makes the GeoPackage that a plan is drawn in: four empty layers with their forms and symbols. It never writes over a
// file that is there, since that file may hold a plan.
#pragma once

#include "processing/algorithmbase.h"

namespace stillhead
{

  class NewPlanAlgorithm : public AlgorithmBase
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
      QVariantMap processAlgorithm(
        const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;
      QVariantMap postProcessAlgorithm( QgsProcessingContext &context, QgsProcessingFeedback *feedback ) override;

    private:
      bool mAddsToProject = false; //!< from the work to the main thread
  };

} // namespace stillhead
