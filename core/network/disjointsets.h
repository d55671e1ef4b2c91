// SPDX-License-Identifier: GPL-2.0-or-later
// Sets of numbered things that are joined pair by pair; the least number stands for its set, so that the result does
// not depend on the order of joining.
#pragma once

#include <cstddef>
#include <numeric>
#include <vector>

namespace stillhead
{

  class DisjointSets
  {
    public:
      explicit DisjointSets( std::size_t count = 0 )
        : mParent( count )
      {
        std::iota( mParent.begin(), mParent.end(), 0 );
      }

      //! Adds one more thing, alone; returns its number.
      int add()
      {
        mParent.push_back( static_cast<int>( mParent.size() ) );
        return mParent.back();
      }

      //! The number that stands for the set of \a thing.
      int find( int thing )
      {
        while ( parent( thing ) != thing )
        {
          parent( thing ) = parent( parent( thing ) );
          thing = parent( thing );
        }
        return thing;
      }

      void join( int a, int b )
      {
        a = find( a );
        b = find( b );
        if ( a < b )
          parent( b ) = a;
        else
          parent( a ) = b;
      }

    private:
      int &parent( int thing ) { return mParent[static_cast<std::size_t>( thing )]; }

      std::vector<int> mParent;
  };

} // namespace stillhead
