// SPDX-License-Identifier: GPL-2.0-or-later
// Result lists as text for other programs.
#pragma once

#include "plugin/results/resultlist.h"

namespace stillhead
{

  //! Comma-separated values by RFC 4180: a heading line, quotes where needed, bare numbers with a point, lines ended by CRLF.
  QString csvText( const ResultList &list );

  //! Rows parted by tabs, as spreadsheets take them from the clipboard; \a rows in the order in which they are shown.
  QString clipboardText( const ResultList &list, const QVector<int> &rows );

} // namespace stillhead
