// SPDX-License-Identifier: GPL-2.0-or-later
// Where to act: stretches (connected pipe that is over, or that is short), the worst places, summits and sags.
#pragma once

#include <vector>

namespace stillhead
{

  //! A connected piece of network that is over, or that is short.
  struct Stretch
  {
      bool over = false;       //!< over MOST in the high case; else short
      std::vector<int> pieces; //!< indices of pieces, rising
      int worstPiece = -1;
      double worstPa = 0.0;  //!< highest pressure of the high case if over, lowest of the low case if short
      double beyondPa = 0.0; //!< past the limit, 0 where pipe is short only because it lies past a summit
      double worstElevationM = 0.0;
      double lengthM = 0.0;
      int mainlines = 0; //!< drawn mainline features in it
      int laterals = 0;
      bool closeCall = false; //!< the worst pressure lies within its doubt of the limit
  };

  //! What a place stands out by.
  enum class ExtremeKind
  {
    Highest, //!< highest pressure, high case
    Lowest,  //!< lowest pressure, low case
    Summit,  //!< high place of a mainline (its pressure: low case)
    Sag      //!< low place of a mainline (its pressure: high case)
  };

  //! A worst place, of a stretch or of a pressure zone, or a summit or sag. Pressure is NaN where no water comes.
  struct Extreme
  {
      ExtremeKind kind = ExtremeKind::Lowest;
      int piece = -1;
      double alongM = 0.0; //!< along the piece's canonical line
      double pressurePa = 0.0;
      double elevationM = 0.0;
      int zone = -1;
      int stretch = -1; //!< −1: of the zone, or a summit or sag
  };

} // namespace stillhead
