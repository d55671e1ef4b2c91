// SPDX-License-Identifier: GPL-2.0-or-later
// What the user should look at in the drawing or the data. Core gives code, place and figures; the sentence is made
// at the edge, in the user's units and language.
#pragma once

#include "core/plan/plan.h"

#include <limits>
#include <vector>

namespace stillhead
{

  enum class FindingCode
  {
    NearMiss,          //!< an end stops short of a line; figure: none, gapM
    CrossingNotJoined, //!< two lines cross without a joint (joinedByEnd: an end that lies there joins both)
    NoSource,          //!< connected pipe that no source feeds; figureM: its length
    NoTerrain,         //!< pipe where the terrain has no elevation; figureM: its length
    Summit,            //!< the way climbs above the static level; figureM: by how much, lengthM: pipe past it
    SummitUnknown,     //!< every way to the pipe beyond leads through no terrain; lengthM: that pipe
    SystemsTouch,      //!< lines of different systems meet and were not joined
    Duplicate,         //!< drawn more than once
    NoLength,          //!< empty, without length or with coordinates that are not numbers: left out
    NoSurveyZ,         //!< asked to use drawn Z, but this line has none
    OneReading,        //!< only one value given for the source
    UnusualPressure,   //!< source pressure outside 15 to 250 psi; figurePa
    PumpDutyNotGiven,  //!< boost given without its value while running
    LevelsDiffer,      //!< sources of one zone agree only nearly; figurePa: the difference
    DeviceOffTheLine,  //!< a device that stands on no pipe; gapM to the nearest. It is left out
    DeviceAtAJoint,    //!< a device where it is not clear which leg it stands on. It is left out
    RegulatorWideOpen, //!< inlet below set in the low case; figurePa: the inlet
    RegulatorShortOfDifferential, //!< low inlet less than the least drop above set; figurePa: inlet less set
    RegulatorBypassed,            //!< water has a way round it; way: the lines
    RegulatorHeldShut,            //!< its outlet side is fed to a larger level
    PressureMayBeTrapped,         //!< below a check valve
    CannotBeMended                //!< over limit, but no regulator can help; figureM: the ground that needs the level
  };

  //! The text of \a code in the FINDINGS output.
  const char *findingName( FindingCode code );

  constexpr double NOT_A_FIGURE = std::numeric_limits<double>::quiet_NaN();

  //! One finding. `line` and `otherLine` index Drawing::lines, −1 where there is none.
  struct Finding
  {
      FindingCode code = FindingCode::NearMiss;
      PlanPoint place;
      int line = -1;
      int otherLine = -1;
      double gapM = NOT_A_FIGURE;    //!< the gap of a near miss
      double figureM = NOT_A_FIGURE; //!< height that the code speaks of
      double lengthM = NOT_A_FIGURE; //!< length of pipe that the code speaks of
      double figurePa = NOT_A_FIGURE;
      bool joinedByEnd = false;
      int device = -1; //!< index into the devices given
      int source = -1; //!< index into the sources given
      int otherSource = -1;
      std::vector<int> way; //!< drawn lines of a way, in its order
  };

} // namespace stillhead
