// SPDX-License-Identifier: GPL-2.0-or-later
// What was drawn, as core takes it: line parts in one pool of vertices, in the lines' CRS.
#pragma once

#include "core/plan/plan.h"

#include <cstddef>
#include <string>
#include <vector>

namespace stillhead
{

  //! What a drawn line is.
  enum class Role
  {
    Mainline, //!< always under pressure
    Lateral   //!< below a control valve
  };

  //! One part of a drawn feature. Its vertices are Drawing::vertices[first, first + count).
  struct DrawnLine
  {
      std::size_t first = 0;
      std::size_t count = 0;
      Role role = Role::Mainline;
      int system = 0;      //!< index into Drawing::systems; lines of different systems never join
      double coverM = 0.0; //!< ground surface down to the top of the pipe
      int feature = 0;     //!< the caller's number of the drawn feature
      int part = 0;        //!< part of a multipart feature
  };

  /**
   * Everything drawn. Vertices of a line lie one after the other; `surveyZM` is empty or holds one pipe elevation in
   * metres for every vertex (NaN where none was surveyed).
   */
  struct Drawing
  {
      std::vector<PlanPoint> vertices;
      std::vector<double> surveyZM;
      std::vector<DrawnLine> lines;
      std::vector<std::string> systems { std::string() }; //!< names; the first, blank, is a system of its own
  };

} // namespace stillhead
