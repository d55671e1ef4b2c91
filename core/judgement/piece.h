// SPDX-License-Identifier: GPL-2.0-or-later
// A piece is a span after all cuts: pipe of one state in one band. It is one row of the SPANS output.
#pragma once

namespace stillhead
{

  //! The eight states, in the order in which they are decided.
  enum class State
  {
    NoSource,
    NoTerrain,
    OverAndUnder,
    OverLimit,
    AboveStaticLevel,
    PastASummit,
    UnderLimit,
    WithinLimits
  };

  //! The text of \a state in the outputs.
  const char *stateName( State state );

  //! Pipe of `span` from `fromM` to `toM` along its line. Figures are NaN in the states no source and no terrain.
  struct Piece
  {
      int span = -1;
      double fromM = 0.0;
      double toM = 0.0;
      double lowestM = 0.0;        //!< lowest pipe elevation on the piece
      double lowestAtM = 0.0;      //!< where, along the line
      double highestM = 0.0;       //!< highest pipe elevation on the piece
      double highestAtM = 0.0;     //!< where, along the line
      double middleM = 0.0;        //!< the elevation between the limits that decides what the piece is
      double pressureLowPa = 0.0;  //!< lowest pressure of the low case (at the highest pipe)
      double pressureHighPa = 0.0; //!< highest pressure of the high case (at the lowest pipe)
      int zone = -1;               //!< pressure zone
      unsigned firstVertex = 0; //!< its drawn profile: vertices [firstVertex, firstVertex + vertexCount) of the result
      unsigned vertexCount = 0;
      int band = -1; //!< by the high case, −1 without figures
      State state = State::NoSource;
      bool over = false;
      bool isShort = false;
      bool closeCall = false;
  };

} // namespace stillhead
