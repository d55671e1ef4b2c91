// SPDX-License-Identifier: GPL-2.0-or-later
// The text of BANDS as numbers, and nothing that could be read in two ways.
#pragma once

#include <QString>

#include <vector>

namespace stillhead
{

  /**
   * Rising numbers separated by comma, semicolon or space.
   * \throws QgsProcessingException that points at the entry which is no number, does not rise, or has a decimal comma
   */
  std::vector<double> parseBandLimits( const QString &text );

} // namespace stillhead
