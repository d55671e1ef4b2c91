// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the proposal of boosters, and the drawing with them in place.
#pragma once

#include "core/job/boostjob.h"
#include "processing/networkrun.h"

namespace stillhead
{

  //! Names of the outputs that are layers.
  QStringList proposeBoostLayers();

  class ProposeBoostRun : public NetworkRun
  {
    public:
      //! \throws QgsProcessingException
      ProposeBoostRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback );

    protected:
      void compute( const StaticJob &job, Monitor &monitor ) override;
      std::vector<ResultTable> tables(
        const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const override;
      QString title() const override;
      QString summary( const ResultContext &context ) const override;
      void addNumbers( QVariantMap &results ) const override;

    private:
      double mRisePa = 0.0;
      BoostResult mBoost; //!< its `after` is moved to mResult
  };

} // namespace stillhead
