// SPDX-License-Identifier: GPL-2.0-or-later
// The figures of every standing device, as a schedule of regulators lists them.
#pragma once

#include "core/job/staticjob.h"

#include <vector>

namespace stillhead
{

  //! What a pressure zone holds; NaN where none of its pipe has figures.
  struct ZoneSpan
  {
      double lowestPa = NOT_A_FIGURE;  //!< low case
      double highestPa = NOT_A_FIGURE; //!< high case
      double lowestM = NOT_A_FIGURE;   //!< elevation of its lowest pipe
      double highestM = NOT_A_FIGURE;  //!< and of its highest
      double lengthM = 0.0;
  };

  //! A standing device; figures are NaN where they do not apply (a set pressure of a check valve, a zone that is not fed).
  struct ScheduleRow
  {
      std::size_t standing = 0; //!< index into StaticResult::devices
      int stage = 0;            //!< regulators on the way from the nearest source, itself included; 0: not fed
      double groundM = NOT_A_FIGURE;
      int zone = -1; //!< that it feeds
      ZoneSpan feeds;
      double setLeastPa = NOT_A_FIGURE; //!< lowest set that serves the top of its zone
      double setMostPa = NOT_A_FIGURE;  //!< highest whose lock-up protects the bottom
      double servesUpToM = NOT_A_FIGURE;
      double holdsDownToM = NOT_A_FIGURE;
      double failedOpenPa = NOT_A_FIGURE; //!< highest pressure below it if it fails open, all others holding
  };

  //! Rows in the order of StaticResult::devices. \a result is that of \a job, with StaticJob::schedule.
  std::vector<ScheduleRow> scheduleOf( const StaticJob &job, const StaticResult &result );

} // namespace stillhead
