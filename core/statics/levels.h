// SPDX-License-Identifier: GPL-2.0-or-later
// Static level of every pressure zone at rest, in one case: the largest that reaches it through the devices.
#pragma once

#include "core/feedback/refusal.h"
#include "core/network/device.h"
#include "core/network/network.h"
#include "core/statics/zones.h"

#include <vector>

namespace stillhead
{

  enum class Case
  {
    High,
    Low
  };

  //! Independent errors that a level carries, for the doubt of pressures under it.
  struct LevelErrors
  {
      bool terrain = false;   //!< it rests on the terrain at one place (source or regulator)
      double readingPa = 0.0; //!< ± at 95 %
  };

  //! A level put into a zone by sources.
  struct FedLevel
  {
      int zone = -1;
      int source = -1;
      double levelM = 0.0;
      bool openWater = false; //!< fixed: nothing may raise it
      LevelErrors errors;
  };

  //! A device between two zones.
  struct ZoneLink
  {
      int device = -1;
      int fromZone = -1;
      int toZone = -1;
      double elevationM = 0.0; //!< of the device
  };

  struct ZoneLevel
  {
      bool fed = false;
      double levelM = 0.0;
      LevelErrors errors;
      int source = -1; //!< whose level it is, by way of
      int link = -1;   //!< the device it came through (index into the links); −1: its own source
  };

  struct LevelInput
  {
      int zoneCount = 0;
      std::vector<FedLevel> sources;
      std::vector<ZoneLink> links;
      const std::vector<Device> *devices = nullptr;
      std::vector<bool> failedOpen; //!< devices that pass as if they were not there; empty: none
      double specificWeightNPerM3 = 0.0;
  };

  /**
   * Level of every zone.
   * \throws Refusal where a larger level reaches open water, or a cycle raises its own level
   */
  std::vector<ZoneLevel> zoneLevels( const LevelInput &input, Case which );

  /**
   * What a device makes of the level at its inlet. A regulator passes the lesser of inlet and its own (set + rise in the
   * high case, set in the low); a booster adds its boost where the inlet pressure is not below 0; a closed valve passes nothing.
   * \param passes false if no water passes
   */
  double levelThrough( const Device &device, double elevationM, double inletLevelM, Case which,
    double specificWeightNPerM3, bool &passes );

} // namespace stillhead
