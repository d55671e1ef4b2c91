// SPDX-License-Identifier: GPL-2.0-or-later
// Why a job was refused. Core gives reason and figures; the sentence is made at the edge.
#pragma once

#include <vector>

namespace stillhead
{

  //! Thrown for input that cannot be answered; nothing has been written then.
  struct Refusal
  {
      enum class Reason
      {
        NoLines,         //!< nothing left to compute
        SourceTooFar,    //!< sources: which; figureM: distance to the nearest pipe it may join, NaN if there is none
        SourceNoTerrain, //!< sources: which; no elevation there and none given
        NoOverlap,       //!< no line lies on the terrain
        SourcesDisagree, //!< sources: the two; figureM: how much their levels differ; lines: a way between them
        LevelOverWater, //!< sources: the open water, then the one (if any) whose larger level reaches it; devices: by which; figureM: by how much
        LevelRaisesItself, //!< devices: the cycle
        DeviceNoTerrain    //!< devices: which; no elevation there and none given
      };
      Reason reason = Reason::NoLines;
      double figureM = 0.0;
      std::vector<int> sources; //!< indices of the sources given
      std::vector<int> devices; //!< indices of the devices given
      std::vector<int> lines;   //!< drawn lines, in the order of the way
  };

} // namespace stillhead
