// SPDX-License-Identifier: GPL-2.0-or-later
// A spatial index over the legs (straight segments) of a drawing.
#pragma once

#include "core/network/canonicaldrawing.h"

#include <boost/geometry.hpp>
#include <boost/geometry/index/rtree.hpp>

#include <vector>

namespace stillhead
{

  //! A leg: from vertex `vertex` of the pool to the next, on line `line`.
  struct Leg
  {
      int line = -1;
      std::size_t vertex = 0;
  };

  //! Where a place meets a leg most nearly.
  struct LegHit
  {
      double alongM = 0.0;    //!< along the leg's line
      double distanceM = 0.0; //!< ground distance from the place
  };

  //! The place on \a leg nearest to \a place, measured with \a scale.
  LegHit nearestOnLeg(
    const CanonicalDrawing &drawing, const Leg &leg, const PlanPoint &place, const GroundScale &scale );

  //! Legs of a drawing by place (packed R-tree). The drawing must outlive it.
  class LegIndex
  {
    public:
      explicit LegIndex( const CanonicalDrawing &drawing );

      const std::vector<Leg> &legs() const { return mLegs; }

      //! Calls \a visit( legNumber ) for every leg whose box meets the box (\a low, \a high).
      template <typename Visit> void visitBox( const PlanPoint &low, const PlanPoint &high, Visit visit ) const
      {
        const Box box( BoxPoint( low.x, low.y ), BoxPoint( high.x, high.y ) );
        for ( auto it = mTree.qbegin( boost::geometry::index::intersects( box ) ); it != mTree.qend(); ++it )
          visit( static_cast<int>( it->second ) );
      }

      //! See nearestOnLeg().
      LegHit nearestOn( const Leg &leg, const PlanPoint &place, const GroundScale &scale ) const
      {
        return nearestOnLeg( mDrawing, leg, place, scale );
      }

    private:
      using BoxPoint = boost::geometry::model::point<double, 2, boost::geometry::cs::cartesian>;
      using Box = boost::geometry::model::box<BoxPoint>;
      using Entry = std::pair<Box, unsigned>;

      const CanonicalDrawing &mDrawing;
      std::vector<Leg> mLegs;
      boost::geometry::index::rtree<Entry, boost::geometry::index::linear<16>> mTree;
  };

  //! Half the size of a box in the plan that holds every place within \a radiusM on the ground.
  PlanPoint boxHalfSize( const GroundScale &scale, double radiusM );

} // namespace stillhead
