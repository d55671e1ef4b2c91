// SPDX-License-Identifier: GPL-2.0-or-later
// Joins drawn lines into a network: ends that meet, ends that meet a line's interior, crossings only on request.
#pragma once

#include "core/feedback/monitor.h"
#include "core/network/canonicaldrawing.h"
#include "core/network/network.h"

#include <optional>
#include <vector>

namespace stillhead
{

  struct JoinOptions
  {
      double toleranceM = 0.1;    //!< ground distance within which ends join
      bool joinCrossings = false; //!< lines that merely cross are joined too
  };

  //! A place that must become a node although nothing ends there (a source).
  struct SourcePlace
  {
      PlaceOnLine on;
  };

  /**
   * The network of \a drawing. Lines of different systems never join. Findings: near misses, crossings without a joint,
   * systems that touch.
   * \param source where the source stands; its node gets the kind Source (a node within the tolerance takes it over)
   */
  Network joinLines( const CanonicalDrawing &drawing, const PlanMeasure &measure, const JoinOptions &options,
    const std::optional<SourcePlace> &source, unsigned threads, std::vector<Finding> &findings, Monitor &monitor );

  //! The pipe nearest to a place.
  struct NearestPipe
  {
      PlaceOnLine on;
      double distanceM = 0.0;
  };

  /**
   * The pipe nearest to \a place on the ground; a mainline before a lateral where both lie equally near within \a toleranceM.
   * Nothing where the drawing has no line.
   */
  std::optional<NearestPipe> nearestPipe(
    const CanonicalDrawing &drawing, const PlanMeasure &measure, const PlanPoint &place, double toleranceM );

} // namespace stillhead
