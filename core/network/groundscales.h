// SPDX-License-Identifier: GPL-2.0-or-later
// Ground scale at every line end. Where the scale hardly changes over the drawing (grounds in a projected CRS) one
// scale serves all; in degrees or over great extents each end has its own.
#pragma once

#include "core/feedback/monitor.h"
#include "core/network/canonicaldrawing.h"

#include <vector>

namespace stillhead
{

  class GroundScales
  {
    public:
      GroundScales( const CanonicalDrawing &drawing, const PlanMeasure &measure, unsigned threads, Monitor &monitor );

      //! Scale at an end: 2 × line for its first vertex, 2 × line + 1 for its last.
      const GroundScale &atEnd( int end ) const
      {
        return mOwn.empty() ? mCommon : mOwn[static_cast<std::size_t>( end )];
      }

      //! Most ground metres that one plan unit along x or y can be, anywhere in the drawing.
      PlanPoint largest() const { return mLargest; }

      //! Half the size of a box in the plan that holds all within \a radiusM of a place, anywhere in the drawing.
      PlanPoint largestBoxHalfSize( double radiusM ) const;

    private:
      GroundScale mCommon;
      std::vector<GroundScale> mOwn;
      PlanPoint mLargest;
      PlanPoint mBoxPerMetre;

      void include( const GroundScale &scale );
  };

  //! The point of an end (see GroundScales::atEnd).
  const PlanPoint &endPoint( const CanonicalDrawing &drawing, int end );

} // namespace stillhead
