// SPDX-License-Identifier: GPL-2.0-or-later
// Fed pipe as trees that grow from the sources: legs on which a regulator can stand, and bodies of looped pipe, on
// which it would be bypassed. Levels are those of today; a proposal only lowers them.
#pragma once

#include "core/network/drawing.h"
#include "core/network/network.h"
#include "core/profile/quadratic.h"
#include "core/statics/source.h"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>
#include <utility>
#include <vector>

namespace stillhead
{

  constexpr double NO_LEVEL_M = -std::numeric_limits<double>::infinity();
  constexpr double ANY_LEVEL_M = std::numeric_limits<double>::infinity();

  //! Pipe whose elevation only rises or only falls; its upstream end comes first.
  struct ForestPart
  {
      int line = -1;
      double fromM = 0.0; //!< along the line; larger than toM where water runs against the line's direction
      double toM = 0.0;
      Quadratic elevation; //!< from its upstream to its downstream end
      int zone = 0;        //!< index into Forest::zones
      Role role = Role::Mainline;
      bool known = true;      //!< has an elevation
      bool canStand = true;   //!< far enough from pipe without elevation for a regulator
      bool served = false;    //!< today the low case reaches it and is no less than LEAST
      bool leaveOver = false; //!< given up: to mend it would cut off pipe that is served by way of it
      bool over = false;      //!< today the high case is above MOST
      bool mend = false;      //!< over, and not excused: a proposal must bring it within MOST

      double lowestM() const { return std::min( elevation.from, elevation.to ); }
      double highestM() const { return std::max( elevation.from, elevation.to ); }
      double lengthM() const { return std::abs( toM - fromM ); }
      double alongAt( double share ) const { return fromM + share * ( toM - fromM ); }

      //! The part between two of its shares.
      ForestPart between( double from, double to ) const;

      //! The share at which the pipe has \a elevationM, or the nearer end.
      double shareOf( double elevationM ) const { return elevation.rootIn( elevationM, 0.0, 1.0 ); }
  };

  //! A place where a regulator must stand so that a body is fed only through regulators.
  struct Inlet
  {
      PlaceOnLine on;
      double elevationM = 0.0;
      int zone = 0; //!< index into Forest::zones
      Role role = Role::Mainline;
      bool againstLine = false; //!< water passes against the direction of the line
  };

  //! A leg, or a body of looped pipe. A parent comes before its children.
  struct Limb
  {
      int parent = -1;   //!< limb at whose lower end (on a body: anywhere) this one begins; −1: a source
      bool loop = false; //!< looped pipe: its parts are in no order and no regulator can stand on it
      int loopCuts = 2;  //!< fewest regulators that can part a body from what feeds it
      std::size_t firstPart = 0;
      std::size_t partCount = 0;
      double standFromM = 0.0; //!< along its line, upstream end first: where a regulator may be written
      double standToM = 0.0;
      double boostHighM = 0.0; //!< what a given booster at its upstream end adds
      double boostLowM = 0.0;
      double wayM =
        NO_LEVEL_M; //!< level needed at its upstream end if anything in it is to be served (booster's inlet; way through a body)
      std::vector<Inlet> inlets; //!< a body fed only by regulators here
  };

  struct Forest
  {
      std::vector<StaticLevels> zones; //!< today's levels of the pressure zones
      std::vector<ForestPart> parts;
      std::vector<Limb> limbs;
  };

  //! Children of every limb of a forest.
  class Children
  {
    public:
      explicit Children( const std::vector<Limb> &limbs );

      struct Range
      {
          const int *first;
          const int *last;
          const int *begin() const { return first; }
          const int *end() const { return last; }
      };

      //! Children of \a limb; −1: the limbs that begin at a source.
      Range of( int limb ) const
      {
        const std::size_t n = static_cast<std::size_t>( limb + 1 );
        return { mChildren.data() + mFirst[n], mChildren.data() + mFirst[n + 1] };
      }

    private:
      std::vector<std::size_t> mFirst;
      std::vector<int> mChildren;
  };

} // namespace stillhead
