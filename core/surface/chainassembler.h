// SPDX-License-Identifier: GPL-2.0-or-later
// Strings directed steps into rings and lines, in any order of arrival. Each vertex begins at most one step and ends at
// most one.
#pragma once

#include "core/surface/fieldtracer.h"

#include <cstddef>
#include <cstdint>
#include <unordered_map>
#include <vector>

namespace stillhead
{

  class ChainAssembler
  {
    public:
      void add( const TraceVertex &from, const TraceVertex &to );

      //! Rings that have closed since the last call; the first vertex is not repeated.
      std::vector<std::vector<TerrainPoint>> takeRings();

      //! What is left open, from the top; afterwards the assembler is empty.
      std::vector<std::vector<TerrainPoint>> takeLines();

      //! Vertices held in lines and rings that are still open.
      std::size_t openVertices() const { return mOpenVertices; }

    private:
      //! Vertices before the first step that arrived (backwards), and from it on.
      struct Chain
      {
          std::uint64_t firstKey = 0;
          std::uint64_t lastKey = 0;
          std::vector<TerrainPoint> before;
          std::vector<TerrainPoint> after;

          std::size_t size() const { return before.size() + after.size(); }
          std::vector<TerrainPoint> take();
      };

      std::size_t newChain();
      void join( std::size_t first, std::size_t second );
      void release( std::size_t chain );

      std::vector<Chain> mChains;
      std::vector<std::size_t> mFree;
      std::unordered_map<std::uint64_t, std::size_t> mByFirst;
      std::unordered_map<std::uint64_t, std::size_t> mByLast;
      std::vector<std::vector<TerrainPoint>> mRings;
      std::size_t mOpenVertices = 0;
  };

} // namespace stillhead
