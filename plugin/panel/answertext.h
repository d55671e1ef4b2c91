// SPDX-License-Identifier: GPL-2.0-or-later
// The result in one sentence, short enough for the head of the panel.
#pragma once

#include "processing/solvedplan.h"

#include <QString>

namespace stillhead
{

  //! "1,840 m within limits at rest, 212 m over (worst 96 psi), 40 m short."
  QString answerText( const SolvedPlan &plan );

  //! "62 to 71 psi: water stands at 546.1 to 566.9 ft" for the source.
  QString waterText( const SolvedPlan &plan );

} // namespace stillhead
