// SPDX-License-Identifier: GPL-2.0-or-later
// Pressure zones: all pipe joined with no device between, and what is known of the water in them.
#pragma once

#include "core/network/network.h"
#include "core/statics/source.h"

#include <vector>

namespace stillhead
{

  //! A pressure zone.
  struct Zone
  {
      bool fed = false; //!< joined to a source
      StaticLevels levels;
      double doubtPa = 0.0; //!< how far a pressure may be off, ± at 95 %
  };

  //! Zone of every node and span, numbered from 0: the source's first, the others in the order of their nodes.
  struct ZoneMap
  {
      std::vector<int> ofNode;
      std::vector<int> ofSpan;
      int count = 0;
  };

  ZoneMap zonesOf( const Network &network );

  /**
   * Doubt of a pressure, ± at 95 %, from independent errors: √( (1.96·rmse·γ)²·n + reading² ) with n = 2 where the source
   * takes its ground from the terrain too, else 1.
   * \param terrainRmseM root mean square error of the terrain
   * \param readingErrorPa of the source's reading, ± at 95 %
   */
  double doubtPa( double terrainRmseM, double readingErrorPa, bool sourceOnTerrain, double specificWeightNPerM3 );

} // namespace stillhead
