// SPDX-License-Identifier: GPL-2.0-or-later
// The pipe of stretches in as few lines as possible: pieces that follow each other along a line are one run.
#pragma once

#include "core/job/staticjob.h"

#include <cstddef>
#include <vector>

namespace stillhead
{

  //! Pipe of one line without a gap, with the nodes that it ends at.
  struct PipeRun
  {
      std::size_t stretch = 0;
      int line = -1;
      double fromM = 0.0;
      double toM = 0.0;
      int fromNode = -1; //!< −1: it ends within a span
      int toNode = -1;
  };

  //! The runs of every stretch, those of one stretch together.
  std::vector<PipeRun> pipeRuns( const StaticResult &result );

  /**
   * The places of \a run: its ends, the vertices between, and the nodes. Ends join within a tolerance but stay where they are;
   * with the way to its nodes all pipe of a stretch hangs together.
   */
  std::vector<PlanPoint> placesOf( const PipeRun &run, const StaticResult &result );

} // namespace stillhead
