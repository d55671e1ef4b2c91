// SPDX-License-Identifier: GPL-2.0-or-later
// The drawing in an order of its own: lines run from their lesser end and are sorted by their vertices, so that no
// answer depends on the order or direction in which things were drawn.
#pragma once

#include "core/feedback/monitor.h"
#include "core/network/drawing.h"
#include "core/plan/finding.h"

#include <vector>

namespace stillhead
{

  //! One line part in canonical direction, without repeated vertices.
  struct CanonicalLine
  {
      std::size_t first = 0;
      std::size_t count = 0;
      Role role = Role::Mainline;
      int system = 0;
      double coverM = 0.0;
      int drawn = -1;        //!< index of the line in Drawing::lines
      bool reversed = false; //!< runs against the drawn direction
      double lengthM = 0.0;
  };

  /**
   * Lines of at least two different vertices. `alongM` and `surveyZM` (if any) run parallel to `vertices`;
   * alongM is the ground distance from the line's first vertex.
   */
  struct CanonicalDrawing
  {
      std::vector<PlanPoint> vertices;
      std::vector<double> alongM;
      std::vector<double> surveyZM;
      std::vector<CanonicalLine> lines;

      //! The leg (index of its first vertex, within the line) on which \a alongM lies.
      std::size_t legAt( const CanonicalLine &line, double alongM ) const;

      //! The place \a alongM metres along \a line.
      PlanPoint placeAt( const CanonicalLine &line, double alongM ) const;
  };

  /**
   * Orders \a drawing and measures it on \a threads threads. Lines that are empty, without length or whose coordinates
   * are not numbers are left out with a finding `no length`; lines drawn twice are kept with a finding `duplicate`.
   */
  CanonicalDrawing canonicalDrawing( const Drawing &drawing, const PlanMeasure &measure, unsigned threads,
    std::vector<Finding> &findings, Monitor &monitor );

} // namespace stillhead
