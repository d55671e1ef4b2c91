// SPDX-License-Identifier: GPL-2.0-or-later
// COMPARISON: one row for each option, the best first.
#pragma once

#include "core/job/comparison.h"
#include "processing/writing/resulttable.h"

#include <QString>

#include <vector>

namespace stillhead
{

  struct OptionRow
  {
      int number = 0; //!< in the order of the layer, from 0
      QString name;
      QString note; //!< of the option, or why it has no figures
      Source source;
      OptionFigures figures;
  };

  //! \param rows the best first; they outlive the table
  ResultTable comparisonTable( const ResultContext &context, const std::vector<OptionRow> &rows );

} // namespace stillhead
