// SPDX-License-Identifier: GPL-2.0-or-later
// Pieces are sorted by span and spans by line, so the piece is found by bisection.
#include "core/job/placeprobe.h"

#include "core/profile/profilesearch.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  int pieceOn( const StaticResult &result, const PlaceOnLine &on )
  {
    const auto beginsAfter = [&result]( const PlaceOnLine &place, const Piece &piece ) {
      const int line = result.network.spans[static_cast<std::size_t>( piece.span )].line;
      return place.line < line || ( place.line == line && place.alongM < piece.fromM );
    };
    const auto after = std::upper_bound( result.pieces.begin(), result.pieces.end(), on, beginsAfter );
    if ( after == result.pieces.begin() )
      return -1;
    const Piece &piece = *( after - 1 );
    const bool isHere = result.network.spans[static_cast<std::size_t>( piece.span )].line == on.line;
    return isHere ? static_cast<int>( after - result.pieces.begin() ) - 1 : -1;
  }

  PlaceMargins marginsOf( const PlaceFigures &figures, const Limits &limits, Role role )
  {
    return { figures.highPa - limits.mostFor( role ), limits.leastFor( role ) - figures.lowPa };
  }

  PlaceProbe::PlaceProbe( const StaticResult &result, const PlanToTerrain &planToTerrain, TileCache &terrain,
    bool useLineZ, double specificWeightNPerM3 )
    : mResult( result )
    , mPlanToTerrain( planToTerrain.clone() )
    , mReader( terrain )
    , mBuilder( result.drawing, planToTerrain, terrain, useLineZ )
    , mSpecificWeightNPerM3( specificWeightNPerM3 )
  {
  }

  double PlaceProbe::groundAtM( const PlanPoint &place )
  {
    TerrainPoint onTerrain;
    mPlanToTerrain->transform( &place, &onTerrain, 1 );
    return mReader.elevationAtM( mReader.grid().toPixel( onTerrain ) );
  }

  void PlaceProbe::setPressures( PlaceFigures &figures ) const
  {
    figures.lowPa = mSpecificWeightNPerM3 * ( figures.levels.lowM - figures.pipeM );
    figures.highPa = mSpecificWeightNPerM3 * ( figures.levels.highM - figures.pipeM );
  }

  const Profile &PlaceProbe::profileOf( int line )
  {
    if ( line != mLine )
    {
      mBuilder.build( mResult.drawing.lines[static_cast<std::size_t>( line )], mProfile );
      mLine = line;
    }
    return mProfile;
  }

  PlaceFigures PlaceProbe::onPipe( const PlaceOnLine &on )
  {
    const CanonicalLine &line = mResult.drawing.lines[static_cast<std::size_t>( on.line )];
    PlaceFigures figures;
    figures.piece = pieceOn( mResult, on );
    figures.pipeM = elevationAtM( profileOf( on.line ), on.alongM );
    figures.groundM = groundAtM( mResult.drawing.placeAt( line, on.alongM ) );
    figures.lowPa = figures.highPa = NOT_A_FIGURE;
    figures.levels = { NOT_A_FIGURE, NOT_A_FIGURE };
    if ( figures.piece < 0 )
      return figures;
    const Piece &piece = mResult.pieces[static_cast<std::size_t>( figures.piece )];
    const Zone &zone = mResult.zones[static_cast<std::size_t>( piece.zone )];
    if ( !zone.fed || piece.state == State::NoSource )
      return figures;
    figures.levels = zone.levels;
    setPressures( figures );
    return figures;
  }

  std::optional<PlaceFigures> PlaceProbe::offPipe( const PlanPoint &place, double coverM )
  {
    if ( mResult.zones.empty() || !mResult.zones.front().fed )
      return std::nullopt;
    PlaceFigures figures;
    figures.groundM = groundAtM( place );
    figures.pipeM = figures.groundM - coverM;
    figures.levels = mResult.zones.front().levels;
    setPressures( figures );
    return figures;
  }

} // namespace stillhead
