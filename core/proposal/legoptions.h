// SPDX-License-Identifier: GPL-2.0-or-later
// What a leg costs, boundary by boundary of its segments.
#pragma once

#include "core/proposal/legstations.h"
#include "core/proposal/options.h"

#include <vector>

namespace stillhead
{

  struct LegOptions
  {
      SegmentedLeg leg;
      std::vector<Options> below; //!< at every boundary, without a regulator there
      std::vector<Options> bare;  //!< with none farther down the leg either; only where there is room for one
      std::vector<Options> at;    //!< with one allowed there
      std::vector<int> stationAt; //!< number of the station at every boundary, −1: none

      //! What a regulator at \a station would feed.
      const Options &beneath( const Station &station ) const
      {
        return leg.onePlace ? bare[station.boundary] : below[station.boundary];
      }
  };

  StandPlace placeOf( const Station &station, const Forest &forest );

  /**
   * \param joint what begins at the lower end of the leg \param needM the level that needs
   * \param keepAll fills in all boundaries, else only the first
   */
  LegOptions optionsOfLeg( const Forest &forest, const Limb &limb, const std::vector<double> &breaks,
    const Options &joint, double needM, bool keepAll, const ProposalRules &rules );

} // namespace stillhead
