// SPDX-License-Identifier: GPL-2.0-or-later
// What a coordinate reference system says about itself: whether it is one at all, its units along and up. A definition
// is anything PROJ reads (WKT2, WKT1, AUTHORITY:CODE). Everything we measure is measured in the plan: a vertical part
// gives the unit of heights and nothing else.
#pragma once

#include "core/geo/projhandles.h"

#include <optional>
#include <string>

namespace stillhead
{

  /**
   * True where \a definition stands for "no CRS": blank, or one of the placeholders that file formats write when they
   * have none ("Undefined geographic SRS", "Undefined Cartesian SRS", "Unknown engineering CRS" and the like,
   * without an authority behind them).
   */
  bool isPlaceholderCrs( const std::string &definition );

  //! Metres in one unit of the horizontal axes; nothing where they are angles or \a definition cannot be read.
  std::optional<double> axisUnitMetres( const std::string &definition );

  //! A unit of height: metres in one of it, and the name it goes by.
  struct VerticalUnit
  {
      double metres = 1.0;
      std::string name;
  };

  //! The unit of heights where \a definition has a vertical part (compound, or a third axis); else nothing.
  std::optional<VerticalUnit> verticalUnit( const std::string &definition );

  //! The definition without its vertical part; \a definition itself where it has none or cannot be read.
  std::string horizontalDefinition( const std::string &definition );

  /**
   * The horizontal CRS in \a definition: the first part of a compound, a third axis dropped.
   * Null where the definition cannot be read.
   */
  ProjObject horizontalCrs( PJ_CONTEXT *context, const std::string &definition );

  //! The CRS proper behind a definition bound to another datum by a fixed shift; other CRSs as they are.
  ProjObject unboundCrs( PJ_CONTEXT *context, ProjObject crs );

} // namespace stillhead
