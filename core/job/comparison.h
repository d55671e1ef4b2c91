// SPDX-License-Identifier: GPL-2.0-or-later
// Options for the connection side by side: the main job for each of them alone, and what it would take to mend it.
#pragma once

#include "core/feedback/refusal.h"
#include "core/job/staticjob.h"

#include <optional>
#include <vector>

namespace stillhead
{

  struct ComparisonJob
  {
      StaticJob statics;   //!< its sources are the options
      double risePa = 0.0; //!< lock-up rise of regulators
      double mostRatio = 0.0;
      double settingStepPa = 0.0;
      double boostRisePa = 0.0; //!< how far a booster's pressure at no flow stands above that while water runs
  };

  //! What the options are sorted by; the order is that of the SORT_BY parameter.
  enum class SortBy
  {
    LongestWithin,
    LeastOver,
    LeastShort,
    FewestRegulators,
    LeastBoost
  };

  //! One option.
  struct OptionFigures
  {
      std::optional<Refusal> refusal; //!< why it has no figures
      StaticLevels levels;
      double distanceM = NOT_A_FIGURE; //!< from the point to the pipe
      Totals totals;                   //!< as it is, with the devices given
      int regulators = 0;              //!< fewest that bring it within MOST, beside the devices given
      bool proven = false;             //!< that number is proven to be the least
      double notMendedM = 0.0;         //!< over, and beyond mending
      int boosters = 0;
      double boostPa = 0.0; //!< largest that one of them must add while water runs
  };

  struct Comparison
  {
      std::vector<OptionFigures> options; //!< in the order of the sources
      std::vector<std::size_t> order;     //!< the best first; those without figures last
      StaticResult best;                  //!< the main job for order.front()
  };

  /**
   * \throws Refusal that of the first option where no option has figures; Cancelled; std::runtime_error
   */
  Comparison compareOptions( const ComparisonJob &job, SortBy sortBy, Monitor &monitor );

  //! Indices of \a options, the best first. Options that are equal by \a sortBy: the longer within limits, then as given.
  std::vector<std::size_t> orderOf( const std::vector<OptionFigures> &options, SortBy sortBy );

} // namespace stillhead
