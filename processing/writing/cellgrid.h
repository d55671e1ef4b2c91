// SPDX-License-Identifier: GPL-2.0-or-later
// Square cells over a plane in metres.
#pragma once

#include <cmath>
#include <cstdint>
#include <utility>

namespace stillhead
{

  //! Column and row of a cell.
  using CellIndex = std::pair<std::int64_t, std::int64_t>;

  struct CellGrid
  {
      double sideM = 1.0;

      //! The line below cell \a index, the same number to the bit for the cells on both sides.
      double lineAtM( std::int64_t index ) const { return static_cast<double>( index ) * sideM; }

      //! The cell that holds a place, along one axis.
      std::int64_t indexOf( double placeM ) const { return static_cast<std::int64_t>( std::floor( placeM / sideM ) ); }

      bool isOnLine( double placeM ) const
      {
        return placeM == lineAtM( static_cast<std::int64_t>( std::llround( placeM / sideM ) ) );
      }
  };

} // namespace stillhead
