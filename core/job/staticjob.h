// SPDX-License-Identifier: GPL-2.0-or-later
// The main job as one straight pipeline: drawing and terrain and source in, every figure of the result out.
#pragma once

#include "core/feedback/monitor.h"
#include "core/feedback/refusal.h"
#include "core/judgement/limits.h"
#include "core/judgement/piece.h"
#include "core/judgement/stretch.h"
#include "core/network/canonicaldrawing.h"
#include "core/network/device.h"
#include "core/network/joining.h"
#include "core/network/network.h"
#include "core/plan/finding.h"
#include "core/plan/plantoterrain.h"
#include "core/profile/simplify.h"
#include "core/statics/source.h"
#include "core/statics/standingdevice.h"
#include "core/statics/zones.h"
#include "core/terrain/tilecache.h"

#include <optional>
#include <string>
#include <vector>

namespace stillhead
{

  //! Whether it is asked what regulators that fail open would do; the order is that of the FAILED_OPEN parameter.
  enum class FailedOpen
  {
    NotAsked,
    EachInTurn,
    All
  };

  //! Inputs of the main job; all in SI.
  struct StaticJob
  {
      const Drawing *drawing = nullptr;
      const PlanMeasure *measure = nullptr;
      const PlanToTerrain *planToTerrain = nullptr;
      TileCache *terrain = nullptr;
      std::vector<Source> sources; //!< at least one
      std::vector<Device> devices;
      double sourceReachM = 10.0;
      bool useLineZ = false; //!< drawn Z (Drawing::surveyZM) is the pipe and replaces terrain and cover
      JoinOptions joins;
      Limits limits;
      double terrainRmseM = 0.0;
      double readingErrorPa = 0.0; //!< ± at 95 %
      double leastDropPa = 0.0;    //!< below this difference of low inlet over set a regulator is short of differential
      FailedOpen failedOpen = FailedOpen::NotAsked;
      bool schedule = false; //!< whether StaticResult::deviceFailures is asked for, as scheduleOf() needs it
      std::optional<double>
        sagDepthM; //!< summits and sags of mainlines are wanted, with so much fall or rise on both sides
      double specificWeightNPerM3 = 0.0;
      unsigned threads = 0; //!< 0: as many as the machine has cores; results do not depend on it
  };

  //! What was used at a source.
  struct SourceReport
  {
      PlaceOnLine on; //!< where it joins the pipe
      int node = -1;
      double distanceM = 0.0;      //!< from the given point to that place
      double terrainGroundM = 0.0; //!< NaN where the terrain has none
      double usedGroundM = 0.0;    //!< NaN where the kind needs none
      StaticLevels levels;
  };

  //! Sums over pieces, in metres of ground length and pascals; pressures are NaN where no pipe has figures.
  struct Totals
  {
      double lengthM = 0.0;
      double withinM = 0.0;
      double overM = 0.0;
      double shortM = 0.0;
      double noSourceM = 0.0;
      double noTerrainM = 0.0;
      double closeCallM = 0.0;
      double lowestPa = 0.0;
      double highestPa = 0.0;
  };

  Totals totalsOf( const std::vector<Piece> &pieces );

  //! What is known of a node; NaN where there is no figure.
  struct NodeFigures
  {
      double elevationM = 0.0;
      double pressureLowPa = 0.0;
      double pressureHighPa = 0.0;
      State state = State::NoSource;
  };

  //! The largest level of the high case that a zone would see if regulators fail open, and the device that causes it.
  struct ZoneFailure
  {
      double levelM = 0.0;
      int device = -1; //!< −1: no failure raises it
  };

  //! What one regulator that fails open would do, all others holding.
  struct DeviceFailure
  {
      struct RaisedZone
      {
          int zone = -1;
          double levelM = 0.0; //!< of the high case
      };

      int device = -1;
      std::vector<RaisedZone> raised;
  };

  //! Everything the main job found. Indices of lines refer to `drawing.lines` (canonical order) unless said otherwise.
  struct StaticResult
  {
      CanonicalDrawing drawing;
      Network network;
      ZoneMap zoneMap;
      std::vector<Zone> zones;
      std::vector<Piece> pieces;            //!< sorted by span and along it
      std::vector<ProfileVertex> vertices;  //!< the drawn profile of all pieces, in their order
      std::vector<NodeFigures> nodeFigures; //!< one for each node
      std::vector<Stretch> stretches;
      std::vector<Extreme> extremes;
      std::vector<Finding> findings;             //!< Finding::line indexes Drawing::lines as drawn
      std::vector<SourceReport> sources;         //!< one for each source given
      std::vector<StandingDevice> devices;       //!< those that found their place, in the order given
      std::vector<ZoneFailure> failures;         //!< one for each zone if it was asked for, else empty
      std::vector<DeviceFailure> deviceFailures; //!< one for each standing regulator if a schedule was asked for
      Totals totals;
  };

  /**
   * Runs the main job.
   * \throws Refusal for input that cannot be answered, Cancelled, std::runtime_error if the terrain cannot be read
   */
  StaticResult solveStatics( const StaticJob &job, Monitor &monitor );

} // namespace stillhead
