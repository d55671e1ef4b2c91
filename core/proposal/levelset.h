// SPDX-License-Identifier: GPL-2.0-or-later
// Sets of static levels: closed intervals, and the level of a place as a planner sees it.
#pragma once

#include "core/proposal/forest.h"
#include "core/proposal/rules.h"

#include <algorithm>
#include <utility>
#include <vector>

namespace stillhead
{

  //! All levels from `lowM` to `highM`.
  struct LevelRange
  {
      double lowM = NO_LEVEL_M;
      double highM = ANY_LEVEL_M;

      bool isEmpty() const { return lowM > highM + SAME_LEVEL_M; }
  };

  //! Disjoint ranges, rising.
  class LevelSet
  {
    public:
      LevelSet() = default;
      explicit LevelSet( const LevelRange &range )
        : mRanges( 1, range )
      {
      }

      const std::vector<LevelRange> &ranges() const { return mRanges; }
      bool isEmpty() const { return mRanges.empty(); }

      //! True if one range holds all from \a lowM to \a highM.
      bool holds( double lowM, double highM ) const
      {
        return std::any_of( mRanges.begin(), mRanges.end(), [&]( const LevelRange &range ) {
          return range.lowM <= lowM + SAME_LEVEL_M && highM <= range.highM + SAME_LEVEL_M;
        } );
      }

      bool holds( const LevelSet &other ) const
      {
        return std::all_of( other.mRanges.begin(), other.mRanges.end(),
          [this]( const LevelRange &range ) { return holds( range.lowM, range.highM ); } );
      }

      //! Leaves what lies within \a range.
      void clip( const LevelRange &range )
      {
        std::size_t kept = 0;
        for ( LevelRange own : mRanges )
        {
          own.lowM = std::max( own.lowM, range.lowM );
          own.highM = std::min( own.highM, range.highM );
          if ( !own.isEmpty() )
            mRanges[kept++] = own;
        }
        mRanges.resize( kept );
      }

      //! Lowers the lower ends by \a lowM and the upper ends by \a highM.
      void lower( double lowM, double highM )
      {
        std::vector<LevelRange> old;
        old.swap( mRanges );
        for ( const LevelRange &range : old )
        {
          const LevelRange lowered { range.lowM - lowM, range.highM - highM };
          if ( !lowered.isEmpty() )
            unite( lowered );
        }
      }

      void unite( LevelRange range )
      {
        auto first = mRanges.begin();
        while ( first != mRanges.end() && first->highM < range.lowM - SAME_LEVEL_M )
          ++first;
        auto last = first;
        for ( ; last != mRanges.end() && last->lowM <= range.highM + SAME_LEVEL_M; ++last )
        {
          range.lowM = std::min( range.lowM, last->lowM );
          range.highM = std::max( range.highM, last->highM );
        }
        if ( first == last )
        {
          mRanges.insert( first, range );
          return;
        }
        *first = range;
        mRanges.erase( first + 1, last );
      }

      void unite( const LevelSet &other )
      {
        for ( const LevelRange &range : other.mRanges )
          unite( range );
      }

      LevelSet common( const LevelSet &other ) const
      {
        LevelSet both;
        for ( const LevelRange &range : other.mRanges )
        {
          LevelSet own = *this;
          own.clip( range );
          both.unite( own );
        }
        return both;
      }

    private:
      std::vector<LevelRange> mRanges;
  };

} // namespace stillhead
