// SPDX-License-Identifier: GPL-2.0-or-later
// The help of the algorithms: what each does, from what, what comes out, in which units, where its limits lie.
#pragma once

#include <QString>

namespace stillhead
{

  QString staticPressureHelp();
  QString pressureSurfaceHelp();
  QString proposeRegulatorsHelp();
  QString proposeBoostHelp();
  QString compareSourcesHelp();

} // namespace stillhead
