// SPDX-License-Identifier: GPL-2.0-or-later
// All pieces of one line: its profile is made, cut, judged, drawn and let go, so that memory holds results only.
#pragma once

#include "core/judgement/cutting.h"
#include "core/judgement/judge.h"
#include "core/network/network.h"
#include "core/profile/profilebuilder.h"
#include "core/profile/simplify.h"
#include "core/profile/turns.h"

#include <array>
#include <optional>
#include <utility>
#include <vector>

namespace stillhead
{

  //! Which spans and nodes lie on which line.
  struct LineParts
  {
      std::vector<std::size_t> firstSpan; //!< of every line; one more entry closes the last
      std::vector<std::size_t> firstNode; //!< into nodes, likewise
      std::vector<int> nodes;             //!< nodes that take their elevation from the line

      LineParts( const Network &network, std::size_t lines );
  };

  //! What the judging of lines needs; shared by all threads.
  struct LineJudgeInput
  {
      const CanonicalDrawing &drawing;
      const Network &network;
      const LineParts &parts;
      const ZoneMap &zoneMap;
      const std::vector<Zone> &zones;
      const Limits &limits;
      double specificWeightNPerM3;
      std::optional<double> sagDepthM; //!< turns of mainlines are wanted, rises and falls below it left out
  };

  //! Results of one line.
  struct LineOutcome
  {
      std::vector<Piece> pieces; //!< firstVertex counts from the line's own first vertex
      std::vector<ProfileVertex> vertices;
      Turns turns;
      bool anyElevation = false;
  };

  //! Cut elevations of every zone and role.
  using CutElevations = std::vector<std::array<std::vector<double>, 2>>;

  CutElevations cutElevationsOf( const std::vector<Zone> &zones, const Limits &limits, double specificWeightNPerM3 );

  //! Judges lines; one object serves one thread.
  class LineJudge
  {
    public:
      LineJudge( const LineJudgeInput &input, const CutElevations &cuts, ProfileBuilder builder )
        : mInput( input )
        , mCuts( cuts )
        , mBuilder( std::move( builder ) )
      {
      }

      //! Judges line \a number; writes the elevations of its nodes into \a nodeElevationsM.
      LineOutcome judge( std::size_t number, std::vector<double> &nodeElevationsM );

    private:
      LineJudgeInput mInput;
      const CutElevations &mCuts;
      ProfileBuilder mBuilder;
      Profile mProfile;
      Cutter mCutter;

      void judgeSpan( const CanonicalLine &line, int span, LineOutcome &outcome );
      void findTurns( const CanonicalLine &line, int span, Turns &turns ) const;
  };

} // namespace stillhead
