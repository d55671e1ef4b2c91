// SPDX-License-Identifier: GPL-2.0-or-later
// The places on a leg where a regulator is tried: close enough that none worth having is missed, never nearer to a joint
// or to each other than may be written.
#pragma once

#include "core/proposal/fewest.h"
#include "core/proposal/marking.h"

#include <vector>

namespace stillhead
{

  //! A place to stand. Pipe from segment `boundary` on counts as below it, whatever the written place.
  struct Station
  {
      std::size_t boundary = 0;
      double alongM = 0.0;
      double elevationM = 0.0;
      int zone = 0;
      Role role = Role::Mainline;
  };

  //! A leg in pieces small enough to search.
  struct SegmentedLeg
  {
      std::vector<ForestPart> segments; //!< from its upstream end
      std::vector<Station> stations;    //!< in that order, at most one at each boundary
      bool onePlace = false;            //!< there is room for one regulator only
  };

  /**
   * \param breaks where the four numbers put a regulator on this leg, from its upstream end: those places are always tried,
   * so that no plan of theirs is out of reach
   */
  SegmentedLeg segmentLeg(
    const Forest &forest, const Limb &limb, const std::vector<double> &breaks, const ProposalRules &rules );

} // namespace stillhead
