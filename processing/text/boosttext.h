// SPDX-License-Identifier: GPL-2.0-or-later
// A proposal of boosters in words.
#pragma once

#include "core/job/boostjob.h"
#include "processing/writing/resulttable.h"

#include <QString>

namespace stillhead
{

  //! Elevation of the highest pipe in the booster's zone that the low case serves without it.
  double servedWithoutM( const ResultContext &context, const ProposedBooster &booster, const BoostResult &result );

  //! Why a booster stands where it stands, in one sentence.
  QString boosterWhyText( const ResultContext &context, const ProposedBooster &booster, const BoostResult &result );

  //! The proposal in a few sentences, then those on the drawing with the boosters in place.
  QString boostText( const ResultContext &context, const BoostResult &result, const Source &source );

} // namespace stillhead
