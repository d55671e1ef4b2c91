// SPDX-License-Identifier: GPL-2.0-or-later
// Core's refusals as one clear sentence each, in the user's units, with what to do.
#pragma once

#include "core/job/staticjob.h"
#include "processing/displayunits.h"

#include <QString>

namespace stillhead
{

  QString refusalText( const Refusal &refusal, double sourceReachM, const DisplayUnits &units );

} // namespace stillhead
