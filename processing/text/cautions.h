// SPDX-License-Identifier: GPL-2.0-or-later
// What every result that can be printed or read says once and plainly.
#pragma once

#include <QString>

namespace stillhead
{

  //! Pressure at rest is not pressure while water runs. Stands under every legend, summary and report.
  QString runningWaterCaution();

  //! Planning figures, codes, and regulators that fail open.
  QString safetyCaution();

} // namespace stillhead
