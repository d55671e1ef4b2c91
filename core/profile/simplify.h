// SPDX-License-Identifier: GPL-2.0-or-later
// The profile as it is drawn: drawn vertices and only as many more as keep it near the exact one.
#pragma once

#include "core/profile/profile.h"

#include <vector>

namespace stillhead
{

  //! How far the drawn profile may be off the exact one, in metres.
  constexpr double DRAWN_PROFILE_TOLERANCE_M = 0.05;

  //! A vertex of a drawn profile.
  struct ProfileVertex
  {
      double alongM = 0.0;
      double elevationM = 0.0; //!< NaN where there is none
  };

  /**
   * Appends to \a vertices the drawn profile between \a fromM and \a toM: both ends, every one of the \a count places
   * \a mustHoldM (rising) between them, and further knots as needed.
   */
  void appendDrawnProfile( const Profile &profile, double fromM, double toM, const double *mustHoldM, std::size_t count,
    std::vector<ProfileVertex> &vertices );

} // namespace stillhead
