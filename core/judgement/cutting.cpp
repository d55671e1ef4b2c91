// SPDX-License-Identifier: GPL-2.0-or-later
// One walk along the profile. It keeps the interval between cut elevations in which the pipe lies; leaving it by more
// than rounding cuts the span at the root, solved on a stretch where the quadratic is monotone.
#include "core/judgement/cutting.h"

#include "core/network/noding.h"
#include "core/profile/profilesearch.h"
#include "core/terrain/segmentwalk.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    //! The pipe has left an interval once it is this far beyond its end: far above rounding, far below what a gauge reads.
    constexpr double BEYOND_ROUNDING_M = 1e-9;
  } // namespace

  std::vector<double> cutElevationsM( const Zone &zone, Role role, const Limits &limits, double specificWeightNPerM3 )
  {
    const auto highAt = [&]( double pressurePa ) { return zone.levels.highM - pressurePa / specificWeightNPerM3; };
    const auto lowAt = [&]( double pressurePa ) { return zone.levels.lowM - pressurePa / specificWeightNPerM3; };
    const double most = limits.mostFor( role );
    const double least = limits.leastFor( role );
    std::vector<double> elevations { zone.levels.highM, zone.levels.lowM, highAt( most ), lowAt( least ) };
    for ( const double band : limits.bandsPa )
      elevations.push_back( highAt( band ) );
    if ( zone.doubtHighPa > 0.0 )
      elevations.insert( elevations.end(), { highAt( most - zone.doubtHighPa ), highAt( most + zone.doubtHighPa ) } );
    if ( zone.doubtLowPa > 0.0 )
      elevations.insert( elevations.end(), { lowAt( least - zone.doubtLowPa ), lowAt( least + zone.doubtLowPa ) } );
    std::sort( elevations.begin(), elevations.end() );
    const auto same = []( double a, double b ) { return b - a <= BEYOND_ROUNDING_M; };
    elevations.erase( std::unique( elevations.begin(), elevations.end(), same ), elevations.end() );
    return elevations;
  }

  //! The state of one walk along a span.
  struct Cutter::Walk
  {
      //! A piece in the making. What is passed within a millimetre of its start is kept apart, for it decides nothing.
      struct Open
      {
          CutPiece piece {};
          CutPiece start {};
          bool decided = false;
      };

      std::vector<CutPiece> &pieces;
      const std::vector<double> &cutsM;
      double endM;
      Open current {};
      Open closed {};           //!< the last piece, before it was closed
      std::size_t interval = 0; //!< number of cut elevations below the pipe
      std::size_t flatOn = NOT_FLAT;
      double lastCutElevationM = NO_ELEVATION;

      static constexpr std::size_t NOT_FLAT = static_cast<std::size_t>( -1 );

      static void forget( CutPiece &piece ) { piece.lowestM = piece.highestM = NO_ELEVATION; }

      static void include( CutPiece &piece, double alongM, double elevationM )
      {
        if ( !( piece.lowestM <= elevationM ) )
        {
          piece.lowestM = elevationM;
          piece.lowestAtM = alongM;
        }
        if ( !( piece.highestM >= elevationM ) )
        {
          piece.highestM = elevationM;
          piece.highestAtM = alongM;
        }
      }

      static void include( CutPiece &piece, const CutPiece &part )
      {
        if ( std::isnan( part.lowestM ) )
          return;
        include( piece, part.lowestAtM, part.lowestM );
        include( piece, part.highestAtM, part.highestM );
      }

      void include( double alongM, double elevationM ) { include( current.piece, alongM, elevationM ); }

      void open( double alongM, bool known )
      {
        current = {};
        current.piece.fromM = alongM;
        current.piece.known = known;
        current.piece.lowestAtM = current.piece.highestAtM = alongM;
        forget( current.piece );
        forget( current.start );
      }

      void decide()
      {
        if ( !current.decided )
          current.piece.middleM = 0.5 * ( current.piece.lowestM + current.piece.highestM );
        current.decided = true;
      }

      void close( double alongM )
      {
        closed = current;
        decide();
        include( current.piece, current.start );
        current.piece.toM = alongM;
        pieces.push_back( current.piece );
      }

      void cutAt( double alongM, double elevationM )
      {
        include( alongM, elevationM );
        if ( alongM - current.piece.fromM < LEAST_SPAN_M )
        {
          include( current.start, current.piece );
          // Out of an interval and back within a millimetre: the first of the two cuts is taken back.
          if ( lastCutElevationM == elevationM && !pieces.empty() && pieces.back().known )
          {
            include( closed.start, current.start );
            current = closed;
            pieces.pop_back();
            lastCutElevationM = NO_ELEVATION;
            return;
          }
          forget( current.piece );
          include( alongM, elevationM );
          return;
        }
        if ( endM - alongM < LEAST_SPAN_M )
        {
          decide();
          return;
        }
        close( alongM );
        open( alongM, true );
        include( alongM, elevationM );
        lastCutElevationM = elevationM;
      }

      void enter( double elevationM )
      {
        interval =
          static_cast<std::size_t>( std::lower_bound( cutsM.begin(), cutsM.end(), elevationM ) - cutsM.begin() );
      }

      //! The pipe becomes known or unknown at \a alongM.
      void change( double alongM, bool known )
      {
        lastCutElevationM = NO_ELEVATION;
        if ( endM - alongM < LEAST_SPAN_M )
          return;
        if ( alongM - current.piece.fromM >= LEAST_SPAN_M )
          close( alongM );
        else
          alongM = current.piece.fromM;
        open( alongM, known );
      }

      //! The cut elevation on which \a piece lies for at least a millimetre, NOT_FLAT if there is none.
      std::size_t liesOn( const Quadratic &piece, double lengthM ) const
      {
        const auto far = []( double differenceM ) { return std::abs( differenceM ) > BEYOND_ROUNDING_M; };
        if ( far( piece.to - piece.from ) || far( 0.25 * piece.bend ) || lengthM < LEAST_SPAN_M )
          return NOT_FLAT;
        const auto first = std::lower_bound( cutsM.begin(), cutsM.end(), piece.from - BEYOND_ROUNDING_M );
        const bool on = first != cutsM.end() && !far( piece.from - *first ) && !far( piece.to - *first );
        return on ? static_cast<std::size_t>( first - cutsM.begin() ) : NOT_FLAT;
      }

      //! Pipe begins (\a cut) or ends (NOT_FLAT) to lie on a cut elevation; it goes on toward \a towardM.
      void changeFlat( std::size_t cut, double alongM, double towardM )
      {
        const std::size_t edge = cut == NOT_FLAT ? flatOn : cut;
        cutAt( alongM, cutsM[edge] );
        flatOn = cut;
        interval = towardM > cutsM[edge] ? edge + 1 : edge;
      }

      //! Follows \a piece, monotone from share \a low to \a high.
      template <typename Along>
      void follow( const Quadratic &piece, double low, double high, double toElevationM, Along alongAt )
      {
        while ( interval < cutsM.size() && toElevationM > cutsM[interval] + BEYOND_ROUNDING_M )
        {
          cutAt( alongAt( piece.rootIn( cutsM[interval], low, high ) ), cutsM[interval] );
          ++interval;
        }
        while ( interval > 0 && toElevationM < cutsM[interval - 1] - BEYOND_ROUNDING_M )
        {
          cutAt( alongAt( piece.rootIn( cutsM[interval - 1], low, high ) ), cutsM[interval - 1] );
          --interval;
        }
        include( alongAt( high ), toElevationM );
      }
  };

  const std::vector<CutPiece> &Cutter::cut(
    const Profile &profile, double fromM, double toM, const std::vector<double> &elevationsM, bool splitUnknown )
  {
    mPieces.clear();
    Walk walk { mPieces, elevationsM, toM };
    const bool toLast = toM >= profile.alongM.back();
    bool started = false;
    bool known = false;
    for ( std::size_t i = pieceAt( profile, fromM );
          i + 1 < profile.knots() && ( toLast || profile.alongM[i] < toM || !started ); ++i )
    {
      const bool pieceKnown = !std::isnan( profile.bendM[i] );
      const double low = shareAt( profile, i, fromM, 0.0 );
      const double high = shareAt( profile, i, toM, 1.0 );
      const auto alongAt = [&]( double share ) {
        if ( share <= low )
          return std::max( fromM, profile.alongM[i] );
        return share >= high ? std::min( toM, profile.alongM[i + 1] )
                             : profile.alongM[i] + share * ( profile.alongM[i + 1] - profile.alongM[i] );
      };
      if ( !started )
        walk.open( fromM, pieceKnown );
      else if ( splitUnknown && pieceKnown != known )
        walk.change( alongAt( low ), pieceKnown );

      if ( pieceKnown )
      {
        const Quadratic quadratic = quadraticOf( profile, i );
        const double fromElevationM = low <= 0.0 ? quadratic.from : quadratic.at( low );
        const double toElevationM = high >= 1.0 ? quadratic.to : quadratic.at( high );
        const double turn = quadratic.turnsInside() ? quadratic.turn() : low;
        const std::size_t flatOn = walk.liesOn( quadratic, alongAt( high ) - alongAt( low ) );
        if ( !known )
        {
          walk.current.piece.known = walk.current.piece.known || !splitUnknown;
          walk.enter( fromElevationM );
          walk.include( alongAt( low ), fromElevationM );
          walk.flatOn = flatOn;
        }
        else if ( flatOn != walk.flatOn )
        {
          walk.changeFlat( flatOn, alongAt( low ), turn > low ? quadratic.at( turn ) : toElevationM );
        }
        if ( flatOn != Walk::NOT_FLAT )
        {
          walk.include( alongAt( high ), toElevationM );
        }
        else if ( turn > low && turn < high )
        {
          walk.follow( quadratic, low, turn, quadratic.at( turn ), alongAt );
          walk.follow( quadratic, turn, high, toElevationM, alongAt );
        }
        else
        {
          walk.follow( quadratic, low, high, toElevationM, alongAt );
        }
      }
      known = pieceKnown;
      started = true;
    }
    walk.close( toM );
    return mPieces;
  }

} // namespace stillhead
