// SPDX-License-Identifier: GPL-2.0-or-later
// The program's version as text, for result metadata and reports. CMake is the one place that states it.
#pragma once

namespace stillhead
{

  //! Version such as "0.1.0".
  const char *versionText();

} // namespace stillhead
