// SPDX-License-Identifier: GPL-2.0-or-later
// Finds the pipe on which sources and devices stand, and what is known at those places before levels can be.
#pragma once

#include "core/job/staticjob.h"
#include "core/network/parting.h"

#include <vector>

namespace stillhead
{

  //! Places sources and devices; a device that stands on no pipe is left out with a finding.
  class Placing
  {
    public:
      Placing( const StaticJob &job, const CanonicalDrawing &drawing, std::vector<Finding> &findings );

      /**
       * Pipe and static levels of every source, with their findings.
       * \throws Refusal SourceTooFar, SourceNoTerrain, NoOverlap
       */
      std::vector<SourceReport> placeSources();

      //! Devices on their pipe, sorted by place.
      std::vector<DevicePlace> placeDevices();

      /**
       * Elevation of \a place: the device's own, else the pipe's.
       * \throws Refusal DeviceNoTerrain for a device that needs one where there is none
       */
      double deviceElevationM( const DevicePlace &place ) const;

      //! True if the box around some line meets the terrain.
      bool linesMeetTerrain() const;

    private:
      SourceReport placeSource( int number );
      void reportReading( int number );
      Finding &addFinding( FindingCode code, const PlanPoint &place );
      TerrainPoint pixelOf( const PlanPoint &place ) const;

      const StaticJob &mJob;
      const CanonicalDrawing &mDrawing;
      std::vector<Finding> &mFindings;
  };

  //! Errors that the level of \a source carries.
  LevelErrors errorsOf( const Source &source, double readingErrorPa );

} // namespace stillhead
