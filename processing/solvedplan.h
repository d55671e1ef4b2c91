// SPDX-License-Identifier: GPL-2.0-or-later
// What a run of the main job found, before anything is written: for those who show it rather than store it. It holds
// all that its figures refer to, so it outlives the run and the layers.
#pragma once

#include "core/job/staticjob.h"
#include "processing/displayunits.h"
#include "processing/reading/drawingreader.h"
#include "processing/reading/sourcereader.h"
#include "processing/styles/resultstyle.h"
#include "processing/writing/resulttable.h"

#include <memory>

namespace stillhead
{

  struct SolvedPlan
  {
      DisplayUnits units;
      Limits limits;
      ResultStyle style;
      DrawnInput drawn;
      SourceInput source;
      std::unique_ptr<PlanMeasure> measure;
      StaticResult result;
      double metresPerZ = 1.0;

      //! From the lines' CRS to the terrain's; asked by one thread at a time.
      std::unique_ptr<PlanToTerrain> planToTerrain;

      //! What the tables of the outputs are made from.
      ResultContext context() const { return { result, drawn, *measure, units, limits, style, metresPerZ }; }
  };

} // namespace stillhead
