// SPDX-License-Identifier: GPL-2.0-or-later
// Profile, cuts, judgement and drawn profile of one line.
#include "core/judgement/linejudge.h"

#include "core/profile/profilesearch.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  LineParts::LineParts( const Network &network, std::size_t lines )
    : firstSpan( lines + 1, 0 )
    , firstNode( lines + 1, 0 )
    , nodes( network.nodes.size() )
  {
    for ( const Span &span : network.spans )
      ++firstSpan[static_cast<std::size_t>( span.line ) + 1];
    for ( const Node &node : network.nodes )
      ++firstNode[static_cast<std::size_t>( node.on.line ) + 1];
    for ( std::size_t i = 1; i <= lines; ++i )
    {
      firstSpan[i] += firstSpan[i - 1];
      firstNode[i] += firstNode[i - 1];
    }
    std::vector<std::size_t> next( firstNode.begin(), firstNode.end() - 1 );
    for ( std::size_t i = 0; i < network.nodes.size(); ++i )
      nodes[next[static_cast<std::size_t>( network.nodes[i].on.line )]++] = static_cast<int>( i );
  }

  CutElevations cutElevationsOf( const std::vector<Zone> &zones, const Limits &limits, double specificWeightNPerM3 )
  {
    CutElevations cuts( zones.size() );
    for ( std::size_t i = 0; i < zones.size(); ++i )
    {
      if ( !zones[i].fed )
        continue;
      for ( const Role role : { Role::Mainline, Role::Lateral } )
        cuts[i][role == Role::Lateral ? 1 : 0] = cutElevationsM( zones[i], role, limits, specificWeightNPerM3 );
    }
    return cuts;
  }

  namespace
  {
    //! A piece with figures has an elevation at every vertex: up to a millimetre without one at its ends takes that beside it.
    void fillEnds( std::vector<ProfileVertex> &vertices, std::size_t first )
    {
      for ( std::size_t i = first + 1; i < vertices.size(); ++i )
      {
        if ( std::isnan( vertices[i].elevationM ) )
          vertices[i].elevationM = vertices[i - 1].elevationM;
      }
      for ( std::size_t i = vertices.size() - 1; i > first; --i )
      {
        if ( std::isnan( vertices[i - 1].elevationM ) )
          vertices[i - 1].elevationM = vertices[i].elevationM;
      }
    }
  } // namespace

  LineOutcome LineJudge::judge( std::size_t number, std::vector<double> &nodeElevationsM )
  {
    const CanonicalLine &line = mInput.drawing.lines[number];
    mBuilder.build( line, mProfile );
    LineOutcome outcome;
    for ( std::size_t span = mInput.parts.firstSpan[number]; span < mInput.parts.firstSpan[number + 1]; ++span )
    {
      judgeSpan( line, static_cast<int>( span ), outcome );
      if ( mInput.sagDepthM && line.role == Role::Mainline )
        findTurns( line, static_cast<int>( span ), outcome.turns );
    }
    for ( std::size_t i = mInput.parts.firstNode[number]; i < mInput.parts.firstNode[number + 1]; ++i )
    {
      const std::size_t node = static_cast<std::size_t>( mInput.parts.nodes[i] );
      nodeElevationsM[node] = elevationAtM( mProfile, mInput.network.nodes[node].on.alongM );
    }
    outcome.anyElevation = std::any_of(
      mProfile.elevationM.begin(), mProfile.elevationM.end(), []( double z ) { return !std::isnan( z ); } );
    return outcome;
  }

  void LineJudge::judgeSpan( const CanonicalLine &line, int span, LineOutcome &outcome )
  {
    const Span &pipe = mInput.network.spans[static_cast<std::size_t>( span )];
    const int zoneNumber = mInput.zoneMap.ofSpan[static_cast<std::size_t>( span )];
    const Zone &zone = mInput.zones[static_cast<std::size_t>( zoneNumber )];
    const std::vector<double> &cuts = mCuts[static_cast<std::size_t>( zoneNumber )][line.role == Role::Lateral ? 1 : 0];
    const double *const drawnM = &mInput.drawing.alongM[line.first];
    for ( const CutPiece &cut : mCutter.cut( mProfile, pipe.fromM, pipe.toM, cuts, zone.fed ) )
    {
      Piece piece = judgedPiece( cut, span, zoneNumber, zone, line.role, mInput.limits, mInput.specificWeightNPerM3 );
      piece.firstVertex = static_cast<unsigned>( outcome.vertices.size() );
      const double *const first = std::upper_bound( drawnM, drawnM + line.count, piece.fromM );
      const double *const last = std::lower_bound( first, drawnM + line.count, piece.toM );
      appendDrawnProfile(
        mProfile, piece.fromM, piece.toM, first, static_cast<std::size_t>( last - first ), outcome.vertices );
      if ( !std::isnan( piece.pressureHighPa ) )
        fillEnds( outcome.vertices, piece.firstVertex );
      piece.vertexCount = static_cast<unsigned>( outcome.vertices.size() ) - piece.firstVertex;
      outcome.pieces.push_back( piece );
    }
  }

  void LineJudge::findTurns( const CanonicalLine &line, int span, Turns &turns ) const
  {
    const auto goesBefore = [this, &line]( double alongM, double otherAlongM ) {
      return mInput.drawing.placeAt( line, alongM ) < mInput.drawing.placeAt( line, otherAlongM );
    };
    appendTurns(
      mProfile, span, mInput.network.spans[static_cast<std::size_t>( span )], *mInput.sagDepthM, goesBefore, turns );
  }

} // namespace stillhead
