// SPDX-License-Identifier: GPL-2.0-or-later
// One run of the main job.
#pragma once

#include "processing/networkrun.h"
#include "processing/writing/regulatortable.h"

namespace stillhead
{

  //! Names of the outputs that are layers.
  QStringList staticPressureLayers();

  class StaticPressureRun : public NetworkRun
  {
    public:
      //! \throws QgsProcessingException
      StaticPressureRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback );

    protected:
      void compute( const StaticJob &job, Monitor &monitor ) override;
      std::vector<ResultTable> tables(
        const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const override;
      QString title() const override;
      QString summary( const ResultContext &context ) const override;
      void addNumbers( QVariantMap &results ) const override;

    private:
      std::vector<RegulatorRow> mSchedule;
  };

} // namespace stillhead
