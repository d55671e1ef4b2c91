// SPDX-License-Identifier: GPL-2.0-or-later
// Parts cut in two stay the same quadratic; children are gathered by counting.
#include "core/proposal/forest.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  ForestPart ForestPart::between( double from, double to ) const
  {
    ForestPart part = *this;
    const double share = to - from;
    part.fromM = from <= 0.0 ? fromM : alongAt( from );
    part.toM = to >= 1.0 ? toM : alongAt( to );
    part.elevation.from = from <= 0.0 ? elevation.from : elevation.at( from );
    part.elevation.to = to >= 1.0 ? elevation.to : elevation.at( to );
    part.elevation.bend = elevation.bend * share * share;
    return part;
  }

  Children::Children( const std::vector<Limb> &limbs )
    : mFirst( limbs.size() + 2, 0 )
    , mChildren( limbs.size() )
  {
    for ( const Limb &limb : limbs )
      ++mFirst[static_cast<std::size_t>( limb.parent + 2 )];
    for ( std::size_t i = 1; i < mFirst.size(); ++i )
      mFirst[i] += mFirst[i - 1];
    std::vector<std::size_t> next( mFirst.begin(), mFirst.end() - 1 );
    for ( std::size_t i = 0; i < limbs.size(); ++i )
      mChildren[next[static_cast<std::size_t>( limbs[i].parent + 1 )]++] = static_cast<int>( i );
  }

} // namespace stillhead
