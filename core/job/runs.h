// SPDX-License-Identifier: GPL-2.0-or-later
// Runs of a profile: stretches on which the pipe only rises or only falls.
#pragma once

#include "core/profile/profile.h"

#include <vector>

namespace stillhead
{

  //! The ends of a run; between them the pipe takes every elevation once.
  struct Run
  {
      double fromM = 0.0;
      double toM = 0.0;
      double fromElevationM = 0.0;
      double toElevationM = 0.0;
  };

  /**
   * Runs of \a profile between \a fromM and \a toM, where it has elevations, into \a runs (cleared first). A run also ends at every
   * place of \a cutsM (rising).
   */
  void runsOf(
    const Profile &profile, double fromM, double toM, const std::vector<double> &cutsM, std::vector<Run> &runs );

  //! The place within \a run of \a profile at which the pipe has \a elevationM.
  double alongAtElevation( const Profile &profile, const Run &run, double elevationM );

} // namespace stillhead
