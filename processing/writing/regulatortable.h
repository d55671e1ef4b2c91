// SPDX-License-Identifier: GPL-2.0-or-later
// Regulators with all their figures: REGULATORS of a proposal and SCHEDULE of devices that stand, in the same columns.
#pragma once

#include "core/job/proposaljob.h"
#include "core/job/schedule.h"
#include "processing/writing/resulttable.h"

#include <optional>
#include <vector>

namespace stillhead
{

  struct RegulatorRow
  {
      Device device;
      StandingDevice standing; //!< its index names the device
      ScheduleRow figures;
      double placeFromM = NOT_A_FIGURE; //!< along its line: where the same setting works
      double placeToM = NOT_A_FIGURE;
      std::optional<ProposedRegulator> proposed;
      int inlets = 1; //!< regulators proposed for the same looped pipe
  };

  //! All devices that stand. \a result is that of \a job, with StaticJob::schedule.
  std::vector<RegulatorRow> scheduleRows( const StaticJob &job, const StaticResult &result );

  //! The regulators proposed. \a job is that of `result.after`.
  std::vector<RegulatorRow> proposalRows( const StaticJob &job, const ProposalResult &result );

  /**
   * \param output name of the sink
   * \param rows they outlive the table
   */
  ResultTable regulatorTable(
    const ResultContext &context, const QString &output, const std::vector<RegulatorRow> &rows );

} // namespace stillhead
