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
      double doubtHighPa = 0.0; //!< how far a pressure of the high case may be off, ± at 95 %
      double doubtLowPa = 0.0;  //!< the same of the low case
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
   * Doubt of a pressure, ± at 95 %, from independent errors: √( (1.96·rmse·γ)²·n + reading² ).
   * \param terrainRmseM root mean square error of the terrain
   * \param readingErrorPa of the source's reading, ± at 95 %
   * \param terrainPlaces n: at how many places the terrain enters (the pipe, and what its level rests on)
   */
  double doubtPa( double terrainRmseM, double readingErrorPa, int terrainPlaces, double specificWeightNPerM3 );

} // namespace stillhead
