// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the comparison: figures of every option, layers of the best.
#pragma once

#include "core/job/comparison.h"
#include "processing/networkrun.h"
#include "processing/writing/comparisontable.h"

namespace stillhead
{

  //! Names of the outputs that are layers.
  QStringList compareSourcesLayers();

  class CompareSourcesRun : public NetworkRun
  {
    public:
      //! \throws QgsProcessingException
      CompareSourcesRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback );

    protected:
      void compute( const StaticJob &job, Monitor &monitor ) override;
      std::vector<ResultTable> tables(
        const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const override;
      QString sourcesParameter() const override;
      QString title() const override;
      QString summary( const ResultContext &context ) const override;
      void addNumbers( QVariantMap &results ) const override;

    private:
      std::vector<OptionRow> mRows; //!< the best first
      int mBest = 0;                //!< index of the best in the order given
  };

} // namespace stillhead
