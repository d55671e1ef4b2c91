// SPDX-License-Identifier: GPL-2.0-or-later
// Findings as sentences: what was seen, and what to do where something can be done.
#pragma once

#include "core/plan/finding.h"
#include "processing/displayunits.h"
#include "processing/reading/drawingreader.h"

#include <QString>

namespace stillhead
{

  QString findingText( const Finding &finding, const DrawnInput &drawn, const DisplayUnits &units );

  //! `mainlines` or `laterals`.
  QString drawnLayerName( Role role );

} // namespace stillhead
