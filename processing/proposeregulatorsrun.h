// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the proposal: the fewest regulators, and the drawing with them in place.
#pragma once

#include "processing/networkrun.h"
#include "processing/writing/regulatortable.h"

namespace stillhead
{

  //! Names of the outputs that are layers.
  QStringList proposeRegulatorsLayers();

  class ProposeRegulatorsRun : public NetworkRun
  {
    public:
      //! \throws QgsProcessingException
      ProposeRegulatorsRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback );

    protected:
      void compute( const StaticJob &job, Monitor &monitor ) override;
      std::vector<ResultTable> tables(
        const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const override;
      QString title() const override;
      QString summary( const ResultContext &context ) const override;
      void addNumbers( QVariantMap &results ) const override;

    private:
      void nameRegulators( std::size_t count );
      void logProposal() const;

      double mMostRatio = 0.0;
      double mSettingStepPa = 0.0;
      double mLeastDropPa = 0.0;
      double mRisePa = 0.0;
      ProposalResult mProposal; //!< its `after` is moved to mResult
      std::vector<RegulatorRow> mRows;
  };

} // namespace stillhead
