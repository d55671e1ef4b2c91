// SPDX-License-Identifier: GPL-2.0-or-later
// The run in two or three plain sentences with its figures, ready for a memo, and the cautions under them.
#pragma once

#include "processing/writing/resulttable.h"

#include <QString>

namespace stillhead
{

  QString summaryText( const ResultContext &context, const Source &source );

} // namespace stillhead
