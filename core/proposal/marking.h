// SPDX-License-Identifier: GPL-2.0-or-later
// Readies a forest for the search: which pipe is over, which of it can be mended, and what level each place must let
// through for the pipe that is served through it.
#pragma once

#include "core/proposal/forest.h"
#include "core/proposal/rules.h"

#include <vector>

namespace stillhead
{

  //! The level that pipe needs, and the place that needs it.
  struct Need
  {
      double levelM = NO_LEVEL_M;
      double elevationM = NO_LEVEL_M; //!< of the place
      PlaceOnLine at;
      bool summit = false; //!< the place only stands in the way (its plain elevation); else it is to be served

      bool any() const { return levelM > NO_LEVEL_M; }

      //! Takes over \a other if it is larger.
      void raise( const Need &other )
      {
        if ( other.levelM > levelM )
          *this = other;
      }
  };

  //! What \a part itself needs, at its highest place; \a behind: something served lies behind it.
  Need needOf( const ForestPart &part, bool behind, const ProposalRules &rules );

  //! True if no level mends \a part: LEAST and MOST less the rise leave nothing between them.
  bool hasNoWindow( const ForestPart &part, const ProposalRules &rules );

  //! Pipe of \a part below this elevation is over today.
  double overBelowM( const ForestPart &part, const Forest &forest, const ProposalRules &rules );

  //! What a limb needs at its upstream end, given \a within, the largest need of its own pipe and behind it.
  Need needAbove( const Limb &limb, Need within );

  //! Pipe over limit that no regulator can bring within: the level needed through it is more than it stands.
  struct Excused
  {
      int limb = -1;
      int line = -1;
      double fromM = 0.0;
      double toM = 0.0;
      double lowestM = 0.0; //!< elevation of its lowest place
      double lowestAtM = 0.0;
      Role role = Role::Mainline;
      Need need;         //!< the largest that is too large for it
      bool loop = false; //!< it was given up for a loop, not for one place's need
  };

  struct MarkedForest
  {
      Forest forest;
      Children children { {} };
      std::vector<int> given;       //!< of every limb: its number in the forest given
      std::vector<Need> below;      //!< of every limb: needed at its lower end by what begins there
      std::vector<Need> above;      //!< needed at its upstream end
      std::vector<bool> mustMend;   //!< of every limb: it or something behind it has pipe to mend
      std::vector<Excused> excused; //!< along every limb from its upstream end
  };

  /**
   * Cuts the parts of \a forest where they begin to be over and where they cease to be mendable, and marks them. Limbs are
   * put in an order that does not depend on the one given.
   */
  MarkedForest markForest( const Forest &forest, const ProposalRules &rules );

} // namespace stillhead
