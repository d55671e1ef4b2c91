// SPDX-License-Identifier: GPL-2.0-or-later
// What the sources put into the pressure zones they stand in. Several sources of one zone must agree.
#pragma once

#include "core/network/network.h"
#include "core/statics/levels.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  //! A source on the network.
  struct PlacedSource
  {
      int source = -1; //!< index of the source given
      int node = -1;
      StaticLevels levels;
      bool openWater = false;
      LevelErrors errors;
      double doubtPa = 0.0; //!< of its level, ± at 95 %
  };

  //! Two sources of one zone whose levels differ by no more than they may.
  struct SourceDifference
  {
      int source = -1;
      int otherSource = -1;
      double differenceM = 0.0;
  };

  //! Sources of one zone may differ by this, or by their combined doubt if that is more (design: 0.5 psi).
  constexpr double AGREED_DIFFERENCE_PSI = 0.5;

  //! Levels of the zones that have sources, in each case.
  struct Feeding
  {
      std::vector<FedLevel> high; //!< of several sources the higher
      std::vector<FedLevel> low;  //!< of several sources the lower
      std::vector<SourceDifference> differences;
  };

  /**
   * \throws Refusal SourcesDisagree, with the two, the difference and the canonical lines of a way between them
   */
  Feeding feedingOf( const std::vector<PlacedSource> &sources, const Network &network, const ZoneMap &zones,
    double specificWeightNPerM3 );

} // namespace stillhead
