// SPDX-License-Identifier: GPL-2.0-or-later
// Pieces of a stretch rise along their lines, so neighbours follow each other.
#include "processing/writing/piperuns.h"

#include <algorithm>

namespace stillhead
{

  std::vector<PipeRun> pipeRuns( const StaticResult &result )
  {
    std::vector<PipeRun> runs;
    for ( std::size_t s = 0; s < result.stretches.size(); ++s )
    {
      for ( const int number : result.stretches[s].pieces )
      {
        const Piece &piece = result.pieces[static_cast<std::size_t>( number )];
        const Span &span = result.network.spans[static_cast<std::size_t>( piece.span )];
        const int toNode = piece.toM >= span.toM ? span.toNode : -1;
        const bool goesOn =
          !runs.empty() && runs.back().stretch == s && runs.back().line == span.line && runs.back().toM == piece.fromM;
        if ( goesOn )
        {
          runs.back().toM = piece.toM;
          runs.back().toNode = toNode;
        }
        else
        {
          const int fromNode = piece.fromM <= span.fromM ? span.fromNode : -1;
          runs.push_back( { s, span.line, piece.fromM, piece.toM, fromNode, toNode } );
        }
      }
    }
    return runs;
  }

  std::vector<PlanPoint> placesOf( const PipeRun &run, const StaticResult &result )
  {
    const CanonicalDrawing &drawing = result.drawing;
    const CanonicalLine &line = drawing.lines[static_cast<std::size_t>( run.line )];
    std::vector<PlanPoint> places;
    if ( run.fromNode >= 0 )
      places.push_back( result.network.nodes[static_cast<std::size_t>( run.fromNode )].place );
    places.push_back( drawing.placeAt( line, run.fromM ) );
    const auto first = drawing.alongM.begin() + static_cast<std::ptrdiff_t>( line.first );
    const auto last = first + static_cast<std::ptrdiff_t>( line.count );
    for ( auto along = std::upper_bound( first, last, run.fromM ); along != last && *along < run.toM; ++along )
      places.push_back( drawing.vertices[static_cast<std::size_t>( along - drawing.alongM.begin() )] );
    places.push_back( drawing.placeAt( line, run.toM ) );
    if ( run.toNode >= 0 )
      places.push_back( result.network.nodes[static_cast<std::size_t>( run.toNode )].place );
    places.erase( std::unique( places.begin(), places.end() ), places.end() );
    return places;
  }

} // namespace stillhead
