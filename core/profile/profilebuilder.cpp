// SPDX-License-Identifier: GPL-2.0-or-later
// Legs become walks over the terrain; a leg that is curved in the terrain's CRS is halved until its chords are near enough.
#include "core/profile/profilebuilder.h"

#include "core/terrain/segmentwalk.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    //! How far a chord may lie off the true line: a share of a pixel, and metres of ground.
    constexpr double ALLOWED_PIXELS = 0.05;
    constexpr double ALLOWED_GROUND_M = 0.0005;
    constexpr int DEEPEST_HALVING = 24;
    constexpr int DEEPEST_LOST = 8; //!< where the transform gives no place at all

    //! Begins a profile, or gives the last knot its elevation if the piece before it had none.
    void beginPiece( Profile &profile, double alongM, double elevationM )
    {
      if ( profile.alongM.empty() )
      {
        profile.alongM.push_back( alongM );
        profile.elevationM.push_back( elevationM );
      }
      else if ( std::isnan( profile.elevationM.back() ) )
      {
        profile.elevationM.back() = elevationM;
      }
    }

    void endPiece( Profile &profile, double alongM, double elevationM, double bendM )
    {
      profile.bendM.push_back( bendM );
      profile.alongM.push_back( alongM );
      profile.elevationM.push_back( elevationM );
    }
  } // namespace

  bool hasSurvey( const CanonicalDrawing &drawing, const CanonicalLine &line )
  {
    if ( drawing.surveyZM.empty() )
      return false;
    const auto first = drawing.surveyZM.begin() + static_cast<std::ptrdiff_t>( line.first );
    return std::any_of( first, first + static_cast<std::ptrdiff_t>( line.count ),
      []( double z ) { return std::isfinite( z ) && z != 0.0; } );
  }

  ProfileBuilder::ProfileBuilder(
    const CanonicalDrawing &drawing, const PlanToTerrain &planToTerrain, TileCache &terrain, bool useLineZ )
    : mDrawing( drawing )
    , mPlanToTerrain( planToTerrain.clone() )
    , mReader( terrain )
    , mUseLineZ( useLineZ )
  {
  }

  void ProfileBuilder::build( const CanonicalLine &line, Profile &profile )
  {
    profile.alongM.clear();
    profile.elevationM.clear();
    profile.bendM.clear();
    if ( mUseLineZ && hasSurvey( mDrawing, line ) )
    {
      buildFromSurvey( line, profile );
    }
    else
    {
      for ( std::size_t vertex = line.first; vertex + 1 < line.first + line.count; ++vertex )
        walkLeg( vertex, line, profile );
    }
    profile.bendM.push_back( 0.0 );
  }

  void ProfileBuilder::buildFromSurvey( const CanonicalLine &line, Profile &profile ) const
  {
    for ( std::size_t vertex = line.first; vertex + 1 < line.first + line.count; ++vertex )
    {
      const double from = mDrawing.surveyZM[vertex];
      const double to = mDrawing.surveyZM[vertex + 1];
      const bool known = std::isfinite( from ) && std::isfinite( to );
      beginPiece( profile, mDrawing.alongM[vertex], known ? from : NO_ELEVATION );
      endPiece( profile, mDrawing.alongM[vertex + 1], known ? to : NO_ELEVATION, known ? 0.0 : NO_ELEVATION );
    }
  }

  TerrainPoint ProfileBuilder::pixelOf( const PlanPoint &place ) const
  {
    TerrainPoint terrain;
    mPlanToTerrain->transform( &place, &terrain, 1 );
    return mReader.grid().toPixel( terrain );
  }

  void ProfileBuilder::walkLeg( std::size_t vertex, const CanonicalLine &line, Profile &profile )
  {
    const PlanPoint &a = mDrawing.vertices[vertex];
    const PlanPoint &b = mDrawing.vertices[vertex + 1];
    const double fromM = mDrawing.alongM[vertex];
    const double toM = mDrawing.alongM[vertex + 1];
    const TerrainPoint from = pixelOf( a );
    const TerrainPoint to = pixelOf( b );
    if ( mPlanToTerrain->isIdentity() )
    {
      walkStraight( from, to, fromM, toM, line.coverM, profile );
      return;
    }
    const double pixels = std::hypot( to.x - from.x, to.y - from.y );
    // A leg too short to have a ground length has no scale of its own; nothing on it lies off by more than rounding.
    const double allowedPixels =
      toM > fromM ? std::min( ALLOWED_PIXELS, ALLOWED_GROUND_M * pixels / ( toM - fromM ) ) : ALLOWED_PIXELS;
    follow( a, b, from, to, fromM, toM, line.coverM, allowedPixels, 0, profile );
  }

  void ProfileBuilder::walkStraight(
    const TerrainPoint &from, const TerrainPoint &to, double fromM, double toM, double coverM, Profile &profile )
  {
    const bool known =
      std::isfinite( from.x ) && std::isfinite( from.y ) && std::isfinite( to.x ) && std::isfinite( to.y );
    if ( !known )
    {
      beginPiece( profile, fromM, NO_ELEVATION );
      endPiece( profile, toM, NO_ELEVATION, NO_ELEVATION );
      return;
    }
    walkSegment( mReader, from, to, [&]( double tFrom, double tTo, double groundFrom, double groundTo, double bend ) {
      const bool hasElevation = !std::isnan( bend );
      beginPiece( profile, tFrom > 0.0 ? fromM + tFrom * ( toM - fromM ) : fromM,
        hasElevation ? groundFrom - coverM : NO_ELEVATION );
      endPiece( profile, tTo < 1.0 ? fromM + tTo * ( toM - fromM ) : toM,
        hasElevation ? groundTo - coverM : NO_ELEVATION, bend );
    } );
  }

  void ProfileBuilder::follow( const PlanPoint &a, const PlanPoint &b, const TerrainPoint &from, const TerrainPoint &to,
    double fromM, double toM, double coverM, double allowedPixels, int depth, Profile &profile )
  {
    const PlanPoint middle { 0.5 * ( a.x + b.x ), 0.5 * ( a.y + b.y ) };
    const PlanPoint quarter { 0.75 * a.x + 0.25 * b.x, 0.75 * a.y + 0.25 * b.y };
    const TerrainPoint there = pixelOf( middle );
    const TerrainPoint atQuarter = pixelOf( quarter );
    const double offMiddle = std::hypot( there.x - 0.5 * ( from.x + to.x ), there.y - 0.5 * ( from.y + to.y ) );
    // The quarter is looked at too: a line that bends one way and then the other meets its chord in the middle.
    const double offQuarter =
      std::hypot( atQuarter.x - 0.75 * from.x - 0.25 * to.x, atQuarter.y - 0.75 * from.y - 0.25 * to.y );
    const bool near = offMiddle <= allowedPixels && offQuarter <= allowedPixels;
    const bool lost = !std::isfinite( offMiddle + offQuarter ) && depth > DEEPEST_LOST;
    if ( near || lost || depth >= DEEPEST_HALVING )
    {
      walkStraight( from, to, fromM, toM, coverM, profile );
      return;
    }
    const double middleM = 0.5 * ( fromM + toM );
    follow( a, middle, from, there, fromM, middleM, coverM, allowedPixels, depth + 1, profile );
    follow( middle, b, there, to, middleM, toM, coverM, allowedPixels, depth + 1, profile );
  }

} // namespace stillhead
