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

  /**
   * The network of \a drawing. Lines of different systems never join. Findings: near misses, crossings without a joint,
   * systems that touch.
   * \param places where sources and devices stand: each becomes a node (one within the tolerance takes it over)
   * \param nodeOfPlace receives the node of every place
   */
  Network joinLines( const CanonicalDrawing &drawing, const PlanMeasure &measure, const JoinOptions &options,
    const std::vector<PlaceOnLine> &places, std::vector<int> &nodeOfPlace, unsigned threads,
    std::vector<Finding> &findings, Monitor &monitor );

  //! The pipe nearest to a place.
  struct NearestPipe
  {
      PlaceOnLine on;
      double distanceM = 0.0;
  };

  /**
   * The pipe nearest to \a place on the ground; a mainline before a lateral where both lie equally near within
   * \a toleranceM.
   * Only lines of \a system, if it is not 0 (blank). Nothing where the drawing has no such line.
   */
  std::optional<NearestPipe> nearestPipe( const CanonicalDrawing &drawing, const PlanMeasure &measure,
    const PlanPoint &place, int system, double toleranceM );

} // namespace stillhead
