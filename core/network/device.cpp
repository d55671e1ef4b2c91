// SPDX-License-Identifier: GPL-2.0-or-later
// Names of the devices.
#include "core/network/device.h"

namespace stillhead
{

  const char *deviceKindName( DeviceKind kind )
  {
    switch ( kind )
    {
    case DeviceKind::Regulator:
      return "regulator";
    case DeviceKind::Booster:
      return "booster";
    case DeviceKind::CheckValve:
      return "check valve";
    case DeviceKind::ClosedValve:
      return "closed valve";
    case DeviceKind::ControlValve:
      return "control valve";
    }
    return "";
  }

} // namespace stillhead
