// SPDX-License-Identifier: GPL-2.0-or-later
// BOOSTERS of a proposal, with the columns of DEVICES first, so that the layer can be given back unchanged.
#pragma once

#include "core/job/boostjob.h"
#include "processing/writing/resulttable.h"

namespace stillhead
{

  /**
   * The boosters of \a result that stand on pipe. \a result outlives the table; its `after` may have been moved to the context.
   * \param names of all devices, those proposed last
   */
  ResultTable boosterTable( const ResultContext &context, const BoostResult &result );

} // namespace stillhead
