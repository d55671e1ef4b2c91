// SPDX-License-Identifier: GPL-2.0-or-later
// From the closed rings of one band to polygons: outer rings with the holes that lie in them, handed on as soon as they
// are whole, so that only what is still growing is kept.
#pragma once

#include "core/terrain/rastergrid.h"

#include <functional>
#include <map>
#include <vector>

namespace stillhead
{

  using PixelRing = std::vector<TerrainPoint>;

  class PolygonBuilder
  {
    public:
      //! The outer ring first, turning positively (columns to the right, rows downwards), then its holes, turning the other
      //! way; the first vertex of a ring is not repeated.
      using Take = std::function<void( std::vector<PixelRing> rings )>;

      /**
       * Takes the rings that closed while one row was traced. Rows come from the top, and a hole closes no later than the ring
       * around it, so an outer ring finds all its holes there.
       */
      void addRings( std::vector<PixelRing> rings, const Take &take );

    private:
      struct Hole
      {
          PixelRing ring;
          TerrainPoint vertex; //!< On it, and on no other ring
      };

      std::vector<PixelRing> takeHolesOf( const PixelRing &outer );

      std::multimap<double, Hole> mHoles; //!< Not yet placed, by their top
  };

} // namespace stillhead
