// SPDX-License-Identifier: GPL-2.0-or-later
// A proposal in plain sentences: how many regulators, what they mend, what is proven, what none can mend.
#pragma once

#include "core/job/proposaljob.h"
#include "processing/writing/resulttable.h"

#include <QString>

namespace stillhead
{

  /**
   * \param context of the drawing with the proposal in place
   * \param source the first, for the sentence on the static level
   */
  QString proposalText( const ResultContext &context, const ProposalResult &result, const Source &source );

} // namespace stillhead
