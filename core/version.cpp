// SPDX-License-Identifier: GPL-2.0-or-later
// Hands out the version that the build passed in; only this file is rebuilt when it changes.
#include "core/version.h"

namespace stillhead
{

  const char *versionText()
  {
    return STILLHEAD_VERSION;
  }

} // namespace stillhead
