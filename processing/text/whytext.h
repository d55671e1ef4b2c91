// SPDX-License-Identifier: GPL-2.0-or-later
// Why a device stands where it stands, in one sentence.
#pragma once

#include "processing/writing/regulatortable.h"

#include <QString>

namespace stillhead
{

  QString whyText( const RegulatorRow &row, const Limits &limits, const DisplayUnits &units );

} // namespace stillhead
