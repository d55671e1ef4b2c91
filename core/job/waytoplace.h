// SPDX-License-Identifier: GPL-2.0-or-later
// The shortest way along joined pipe from the source to a place, as it is walked in a profile.
#pragma once

#include "core/job/staticjob.h"

#include <vector>

namespace stillhead
{

  //! A leg of a way: pipe of one line from one place along it to another, in either direction.
  struct WayLeg
  {
      int line = -1;
      double fromM = 0.0;
      double toM = 0.0;

      double lengthM() const { return fromM < toM ? toM - fromM : fromM - toM; }
  };

  //! The way from the source to \a on; empty where no joined pipe leads there.
  std::vector<WayLeg> wayToPlace( const StaticResult &result, const PlaceOnLine &on );

} // namespace stillhead
