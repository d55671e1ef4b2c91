// SPDX-License-Identifier: GPL-2.0-or-later
// Names of the findings, as they stand in the FINDINGS output.
#include "core/plan/finding.h"

namespace stillhead
{

  const char *findingName( FindingCode code )
  {
    switch ( code )
    {
    case FindingCode::NearMiss:
      return "near miss";
    case FindingCode::CrossingNotJoined:
      return "crossing not joined";
    case FindingCode::NoSource:
      return "no source";
    case FindingCode::NoTerrain:
      return "no terrain";
    case FindingCode::Summit:
      return "summit";
    case FindingCode::SummitUnknown:
      return "summit unknown";
    case FindingCode::SystemsTouch:
      return "systems touch";
    case FindingCode::Duplicate:
      return "duplicate";
    case FindingCode::NoLength:
      return "no length";
    case FindingCode::NoSurveyZ:
      return "no survey Z";
    case FindingCode::OneReading:
      return "one reading";
    case FindingCode::UnusualPressure:
      return "unusual pressure";
    case FindingCode::PumpDutyNotGiven:
      return "pump duty not given";
    case FindingCode::LevelsDiffer:
      return "levels differ";
    case FindingCode::DeviceOffTheLine:
      return "device off the line";
    case FindingCode::DeviceAtAJoint:
      return "device at a joint";
    case FindingCode::RegulatorWideOpen:
      return "regulator wide open";
    case FindingCode::RegulatorShortOfDifferential:
      return "regulator short of differential";
    case FindingCode::RegulatorBypassed:
      return "regulator bypassed";
    case FindingCode::RegulatorHeldShut:
      return "regulator held shut";
    case FindingCode::PressureMayBeTrapped:
      return "pressure may be trapped";
    case FindingCode::CannotBeMended:
      return "cannot be mended";
    }
    return "";
  }

} // namespace stillhead
