// SPDX-License-Identifier: GPL-2.0-or-later
// The order of states is that of State.
#include "core/judgement/judge.h"

#include "core/terrain/segmentwalk.h"

#include <cmath>

namespace stillhead
{

  namespace
  {
    bool exceeds( double pressurePa, double limitPa )
    {
      return pressurePa > limitPa + EQUAL_TO_LIMIT * std::abs( limitPa );
    }

    bool fallsShort( double pressurePa, double limitPa )
    {
      return pressurePa < limitPa - EQUAL_TO_LIMIT * std::abs( limitPa );
    }
  } // namespace

  const char *stateName( State state )
  {
    switch ( state )
    {
    case State::NoSource:
      return "no source";
    case State::NoTerrain:
      return "no terrain";
    case State::OverAndUnder:
      return "over and under";
    case State::OverLimit:
      return "over limit";
    case State::AboveStaticLevel:
      return "above static level";
    case State::PastASummit:
      return "past a summit";
    case State::UnderLimit:
      return "under limit";
    case State::WithinLimits:
      return "within limits";
    }
    return "";
  }

  Piece judgedPiece( const CutPiece &cut, int span, int zoneNumber, const Zone &zone, Role role, const Limits &limits,
    double specificWeightNPerM3 )
  {
    Piece piece;
    piece.span = span;
    piece.fromM = cut.fromM;
    piece.toM = cut.toM;
    piece.zone = zoneNumber;
    piece.lowestM = cut.known ? cut.lowestM : NO_ELEVATION;
    piece.highestM = cut.known ? cut.highestM : NO_ELEVATION;
    piece.middleM = cut.known ? cut.middleM : NO_ELEVATION;
    piece.lowestAtM = cut.lowestAtM;
    piece.highestAtM = cut.highestAtM;
    piece.pressureLowPa = NO_ELEVATION;
    piece.pressureHighPa = NO_ELEVATION;
    if ( !zone.fed )
    {
      piece.state = State::NoSource;
      return piece;
    }
    if ( !cut.known )
    {
      piece.state = State::NoTerrain;
      return piece;
    }
    piece.pressureLowPa = specificWeightNPerM3 * ( zone.levels.lowM - cut.highestM );
    piece.pressureHighPa = specificWeightNPerM3 * ( zone.levels.highM - cut.lowestM );

    const double highPa = specificWeightNPerM3 * ( zone.levels.highM - cut.middleM );
    const double lowPa = specificWeightNPerM3 * ( zone.levels.lowM - cut.middleM );
    const double most = limits.mostFor( role );
    const double least = limits.leastFor( role );
    piece.band = bandOf( highPa, limits.bandsPa );
    piece.over = exceeds( highPa, most );
    const bool under = fallsShort( lowPa, least );
    const bool above = cut.middleM - zone.levels.lowM > EQUAL_LEVEL_M;
    piece.isShort = under || above;
    if ( piece.over )
      piece.state = under ? State::OverAndUnder : State::OverLimit;
    else if ( above )
      piece.state = State::AboveStaticLevel;
    else
      piece.state = under ? State::UnderLimit : State::WithinLimits;
    const bool nearMost = zone.doubtHighPa > 0.0 && std::abs( highPa - most ) <= zone.doubtHighPa;
    const bool nearLeast = zone.doubtLowPa > 0.0 && std::abs( lowPa - least ) <= zone.doubtLowPa;
    piece.closeCall = ( nearMost || nearLeast ) && piece.state != State::AboveStaticLevel;
    return piece;
  }

  void markPastASummit( Piece &piece )
  {
    piece.isShort = true;
    if ( piece.state != State::UnderLimit && piece.state != State::WithinLimits )
      return;
    piece.state = State::PastASummit;
    piece.closeCall = false;
  }

} // namespace stillhead
