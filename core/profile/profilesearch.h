// SPDX-License-Identifier: GPL-2.0-or-later
// Finding one's way in a profile.
#pragma once

#include "core/profile/profile.h"
#include "core/profile/quadratic.h"

#include <cstddef>

namespace stillhead
{

  //! The piece on which \a alongM lies; of two that meet there the later, at the line's end the last.
  std::size_t pieceAt( const Profile &profile, double alongM );

  //! The piece as a quadratic; its bend is NaN where there is no elevation.
  Quadratic quadraticOf( const Profile &profile, std::size_t piece );

  //! Share of \a piece at \a alongM, within 0 to 1; \a otherwise for a piece without length.
  double shareAt( const Profile &profile, std::size_t piece, double alongM, double otherwise );

  //! Elevation of \a profile at \a alongM in metres; NaN where there is none.
  double elevationAtM( const Profile &profile, double alongM );

} // namespace stillhead
