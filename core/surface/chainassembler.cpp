// SPDX-License-Identifier: GPL-2.0-or-later
// When two chains meet, the vertices of the shorter move to the longer: n log n moves in all.
#include "core/surface/chainassembler.h"

#include <algorithm>
#include <utility>

namespace stillhead
{

  std::vector<TerrainPoint> ChainAssembler::Chain::take()
  {
    std::vector<TerrainPoint> vertices( before.rbegin(), before.rend() );
    vertices.insert( vertices.end(), after.begin(), after.end() );
    return vertices;
  }

  void ChainAssembler::add( const TraceVertex &from, const TraceVertex &to )
  {
    const auto ending = mByLast.find( from.key );
    const auto beginning = mByFirst.find( to.key );
    const bool isAppended = ending != mByLast.end();
    const bool isPrepended = beginning != mByFirst.end();
    if ( isAppended && isPrepended )
    {
      const std::size_t first = ending->second;
      const std::size_t second = beginning->second;
      mByLast.erase( ending );
      mByFirst.erase( beginning );
      if ( first == second )
      {
        mRings.push_back( mChains[first].take() );
        mOpenVertices -= mRings.back().size();
        release( first );
      }
      else
      {
        join( first, second );
      }
    }
    else if ( isAppended )
    {
      const std::size_t chain = ending->second;
      mByLast.erase( ending );
      mChains[chain].after.push_back( to.pixel );
      ++mOpenVertices;
      mChains[chain].lastKey = to.key;
      mByLast.emplace( to.key, chain );
    }
    else if ( isPrepended )
    {
      const std::size_t chain = beginning->second;
      mByFirst.erase( beginning );
      mChains[chain].before.push_back( from.pixel );
      ++mOpenVertices;
      mChains[chain].firstKey = from.key;
      mByFirst.emplace( from.key, chain );
    }
    else
    {
      const std::size_t chain = newChain();
      mChains[chain].firstKey = from.key;
      mChains[chain].lastKey = to.key;
      mChains[chain].after = { from.pixel, to.pixel };
      mOpenVertices += 2;
      mByFirst.emplace( from.key, chain );
      mByLast.emplace( to.key, chain );
    }
  }

  std::size_t ChainAssembler::newChain()
  {
    if ( mFree.empty() )
    {
      mChains.emplace_back();
      return mChains.size() - 1;
    }
    const std::size_t chain = mFree.back();
    mFree.pop_back();
    return chain;
  }

  void ChainAssembler::release( std::size_t chain )
  {
    mChains[chain] = Chain();
    mFree.push_back( chain );
  }

  void ChainAssembler::join( std::size_t first, std::size_t second )
  {
    Chain &head = mChains[first];
    Chain &tail = mChains[second];
    if ( head.size() >= tail.size() )
    {
      head.after.insert( head.after.end(), tail.before.rbegin(), tail.before.rend() );
      head.after.insert( head.after.end(), tail.after.begin(), tail.after.end() );
      head.lastKey = tail.lastKey;
      mByLast[head.lastKey] = first;
      release( second );
    }
    else
    {
      tail.before.insert( tail.before.end(), head.after.rbegin(), head.after.rend() );
      tail.before.insert( tail.before.end(), head.before.begin(), head.before.end() );
      tail.firstKey = head.firstKey;
      mByFirst[tail.firstKey] = second;
      release( first );
    }
  }

  std::vector<std::vector<TerrainPoint>> ChainAssembler::takeRings()
  {
    return std::exchange( mRings, {} );
  }

  std::vector<std::vector<TerrainPoint>> ChainAssembler::takeLines()
  {
    std::vector<std::pair<std::uint64_t, std::size_t>> open( mByFirst.begin(), mByFirst.end() );
    std::sort( open.begin(), open.end() );
    std::vector<std::vector<TerrainPoint>> lines;
    for ( const auto &entry : open )
      lines.push_back( mChains[entry.second].take() );
    mChains.clear();
    mFree.clear();
    mByFirst.clear();
    mByLast.clear();
    mOpenVertices = 0;
    return lines;
  }

} // namespace stillhead
