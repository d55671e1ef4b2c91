// SPDX-License-Identifier: GPL-2.0-or-later
// What stands in the pipe, as core takes it.
#pragma once

#include "core/plan/plan.h"

#include <optional>

namespace stillhead
{

  enum class DeviceKind
  {
    Regulator, //!< pressure-reducing valve
    Booster,   //!< pump in the line
    CheckValve,
    ClosedValve,
    ControlValve //!< passes; with a set pressure it regulates too
  };

  //! The text of \a kind in the DEVICES input and the outputs.
  const char *deviceKindName( DeviceKind kind );

  //! Which way a device lets water pass.
  enum class DeviceDirection
  {
    FromTheSource,
    StartToEnd, //!< as the line was drawn
    EndToStart
  };

  struct Device
  {
      PlanPoint place;
      int system = 0; //!< index into Drawing::systems; a blank one stands on any line
      DeviceKind kind = DeviceKind::Regulator;
      std::optional<double> setPa;      //!< outlet pressure while water runs; a control valve without it only passes
      double risePa = 0.0;              //!< lock-up rise: lock-up is set + rise
      double boostPa = 0.0;             //!< added by a booster at no flow
      std::optional<double> boostLowPa; //!< added while running; unset: as boostPa
      std::optional<double> elevationM; //!< surveyed; unset: the pipe there
      DeviceDirection direction = DeviceDirection::FromTheSource;

      bool regulates() const { return kind == DeviceKind::Regulator || ( kind == DeviceKind::ControlValve && setPa ); }

      //! True if the network is parted here into two pressure zones.
      bool parts() const { return kind != DeviceKind::ControlValve || setPa; }
  };

} // namespace stillhead
