// SPDX-License-Identifier: GPL-2.0-or-later
// Candidates come from the leg index; a walk along the pipe from the end's node tells which are joined nearby.
#include "core/network/nearmisses.h"

#include "core/feedback/parallel.h"
#include "core/network/adjacency.h"

#include <algorithm>
#include <cmath>
#include <mutex>
#include <queue>
#include <tuple>
#include <unordered_map>

namespace stillhead
{

  namespace
  {
    struct Candidate
    {
        int line = -1;
        LegHit hit;
        PlanPoint place;
    };

    //! The spans that pipe reaches from a node within a given length, and how far away their ends are.
    class Surroundings
    {
      public:
        Surroundings( const Network &network, const Adjacency &adjacency, int node, double reachM )
          : mNetwork( network )
        {
          using Entry = std::pair<double, int>;
          std::priority_queue<Entry, std::vector<Entry>, std::greater<Entry>> open;
          open.push( { 0.0, node } );
          while ( !open.empty() )
          {
            const auto [distance, at] = open.top();
            open.pop();
            if ( !mDistanceM.emplace( at, distance ).second )
              continue;
            for ( const int span : adjacency.spansAt( at ) )
            {
              const Span &pipe = network.spans[static_cast<std::size_t>( span )];
              mSpansOfLine[pipe.line].push_back( span );
              const int next = pipe.fromNode == at ? pipe.toNode : pipe.fromNode;
              const double there = distance + pipe.toM - pipe.fromM;
              if ( there <= reachM && mDistanceM.count( next ) == 0 )
                open.push( { there, next } );
            }
          }
        }

        //! True if pipe leads from the node to \a place within \a reachM.
        bool leadTo( const PlaceOnLine &place, double reachM ) const
        {
          const auto spans = mSpansOfLine.find( place.line );
          if ( spans == mSpansOfLine.end() )
            return false;
          for ( const int span : spans->second )
          {
            const Span &pipe = mNetwork.spans[static_cast<std::size_t>( span )];
            if ( place.alongM < pipe.fromM || place.alongM > pipe.toM )
              continue;
            const auto from = mDistanceM.find( pipe.fromNode );
            if ( from != mDistanceM.end() && from->second + place.alongM - pipe.fromM <= reachM )
              return true;
            const auto to = mDistanceM.find( pipe.toNode );
            if ( to != mDistanceM.end() && to->second + pipe.toM - place.alongM <= reachM )
              return true;
          }
          return false;
        }

      private:
        const Network &mNetwork;
        std::unordered_map<int, double> mDistanceM;
        std::unordered_map<int, std::vector<int>> mSpansOfLine;
    };

    //! Ends that are joined to nothing. They lie farther than the tolerance apart, so not many can crowd one place.
    std::vector<int> freeEnds( const Network &network, const std::vector<int> &nodeOfEnd )
    {
      std::vector<int> ends;
      for ( std::size_t i = 0; i < nodeOfEnd.size(); ++i )
      {
        if ( network.nodes[static_cast<std::size_t>( nodeOfEnd[i] )].degree == 1 )
          ends.push_back( static_cast<int>( i ) );
      }
      return ends;
    }
  } // namespace

  std::vector<Finding> findNearMisses( const CanonicalDrawing &drawing, const Network &network,
    const std::vector<int> &nodeOfEnd, const LegIndex &index, const GroundScales &scales, double toleranceM,
    unsigned threads, Monitor &monitor )
  {
    const double radiusM = NEAR_MISS_TOLERANCES * toleranceM;
    const double joinedWithinM = 2.0 * radiusM;
    const Adjacency adjacency( network );
    const std::vector<int> ends = freeEnds( network, nodeOfEnd );
    std::vector<std::pair<int, Finding>> found;
    std::mutex mutex;
    parallelRanges(
      ends.size(), 128, threads, monitor, 0.1, 0.14, [&]( std::size_t first, std::size_t last, unsigned ) {
        std::vector<Candidate> candidates;
        for ( std::size_t i = first; i < last; ++i )
        {
          stopIfCancelled( monitor );
          const int end = ends[i];
          const int ownLine = end / 2;
          const int node = nodeOfEnd[static_cast<std::size_t>( end )];
          const int system = drawing.lines[static_cast<std::size_t>( ownLine )].system;
          const PlanPoint &place = endPoint( drawing, end );
          const GroundScale &scale = scales.atEnd( end );
          const PlanPoint half = boxHalfSize( scale, radiusM );
          candidates.clear();
          index.visitBox(
            { place.x - half.x, place.y - half.y }, { place.x + half.x, place.y + half.y }, [&]( int number ) {
              const Leg &leg = index.legs()[static_cast<std::size_t>( number )];
              if ( drawing.lines[static_cast<std::size_t>( leg.line )].system != system )
                return;
              const LegHit hit = index.nearestOn( leg, place, scale );
              // The end's own pipe leads to whatever lies near along it: asked first, for it spares most ends the walk.
              const double ownAlongM = end % 2 == 0 ? 0.0 : drawing.lines[static_cast<std::size_t>( ownLine )].lengthM;
              if ( leg.line == ownLine && std::abs( hit.alongM - ownAlongM ) <= joinedWithinM )
                return;
              if ( hit.distanceM > toleranceM && hit.distanceM <= radiusM )
                candidates.push_back( { leg.line, hit, {} } );
            } );
          if ( candidates.empty() )
            continue;
          std::sort( candidates.begin(), candidates.end(), []( const Candidate &a, const Candidate &b ) {
            return std::tie( a.hit.distanceM, a.line, a.hit.alongM )
              < std::tie( b.hit.distanceM, b.line, b.hit.alongM );
          } );
          const Surroundings surroundings( network, adjacency, node, joinedWithinM );
          for ( const Candidate &candidate : candidates )
          {
            if ( surroundings.leadTo( { candidate.line, candidate.hit.alongM }, joinedWithinM ) )
              continue;
            Finding finding;
            finding.code = FindingCode::NearMiss;
            finding.line = ownLine;
            finding.otherLine = candidate.line;
            finding.gapM = candidate.hit.distanceM;
            finding.place =
              drawing.placeAt( drawing.lines[static_cast<std::size_t>( candidate.line )], candidate.hit.alongM );
            const std::lock_guard<std::mutex> lock( mutex );
            found.emplace_back( end, finding );
            break;
          }
        }
      } );
    std::sort( found.begin(), found.end(), []( const auto &a, const auto &b ) { return a.first < b.first; } );
    std::vector<Finding> findings;
    findings.reserve( found.size() );
    for ( const auto &entry : found )
      findings.push_back( entry.second );
    return findings;
  }

} // namespace stillhead
