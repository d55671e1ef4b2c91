// SPDX-License-Identifier: GPL-2.0-or-later
// Cuts a profile exactly where the pipe passes given elevations and where its elevation becomes known or unknown.
// Within one pressure zone every limit of pressure is an elevation of the pipe, so this is all the cutting there is.
#pragma once

#include "core/judgement/limits.h"
#include "core/network/drawing.h"
#include "core/profile/profile.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  /**
   * The elevations at which pipe of \a role in a fed zone is cut, rising: where the high case equals a band limit or MOST,
   * where the low case equals LEAST, the static level of either case, and MOST (high) and LEAST (low) ± the doubt.
   */
  std::vector<double> cutElevationsM( const Zone &zone, Role role, const Limits &limits, double specificWeightNPerM3 );

  /**
   * Pipe between two cuts: all of it lies between two neighbouring cut elevations, or has no elevation. Only where a cut
   * would lie within a millimetre of another it is not made, and that millimetre counts for the extremes alone.
   */
  struct CutPiece
  {
      double fromM = 0.0;
      double toM = 0.0;
      double lowestM = 0.0;
      double lowestAtM = 0.0;
      double highestM = 0.0;
      double highestAtM = 0.0;
      double middleM = 0.0; //!< an elevation between the cut elevations: the one that decides what the piece is
      bool known = false;
  };

  //! Cuts profiles; keeps its memory from one span to the next.
  class Cutter
  {
    public:
      /**
       * Cuts the part of \a profile between \a fromM and \a toM at \a elevationsM (rising). A cut nearer than 1 mm to the end of
       * a piece is not made. Pipe that lies on a cut elevation is a piece of its own. With \a splitUnknown false pipe with and without elevation stays together.
       */
      const std::vector<CutPiece> &cut(
        const Profile &profile, double fromM, double toM, const std::vector<double> &elevationsM, bool splitUnknown );

    private:
      struct Walk;
      std::vector<CutPiece> mPieces;
  };

} // namespace stillhead
