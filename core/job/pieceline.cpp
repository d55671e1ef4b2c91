// SPDX-License-Identifier: GPL-2.0-or-later
// Places in the plan for the drawn profile of a piece.
#include "core/job/pieceline.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  void pieceLine(
    const StaticResult &result, const Piece &piece, double specificWeightNPerM3, std::vector<PieceVertex> &vertices )
  {
    vertices.clear();
    const Span &span = result.network.spans[static_cast<std::size_t>( piece.span )];
    const CanonicalLine &line = result.drawing.lines[static_cast<std::size_t>( span.line )];
    const Zone &zone = result.zones[static_cast<std::size_t>( piece.zone )];
    const bool figures = !std::isnan( piece.pressureHighPa );
    for ( unsigned i = piece.firstVertex; i < piece.firstVertex + piece.vertexCount; ++i )
    {
      const ProfileVertex &vertex = result.vertices[i];
      const PlanPoint place = result.drawing.placeAt( line, vertex.alongM );
      const double pressurePa =
        figures ? specificWeightNPerM3 * ( zone.levels.highM - vertex.elevationM ) : NOT_A_FIGURE;
      vertices.push_back( { place.x, place.y, vertex.elevationM, pressurePa } );
    }
    if ( line.reversed )
      std::reverse( vertices.begin(), vertices.end() );
  }

} // namespace stillhead
