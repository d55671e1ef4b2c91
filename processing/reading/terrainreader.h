// SPDX-License-Identifier: GPL-2.0-or-later
// The terrain from its parameters: through GDAL where GDAL can open it, else through the platform's provider; its
// unit settled once, here, and told to the user with how it was decided.
#pragma once

#include "core/geo/elevationunit.h"
#include "core/terrain/tilecache.h"
#include "processing/reading/parametervalues.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsprocessingfeedback.h>

#include <memory>
#include <vector>

class QgsRasterLayer;

namespace stillhead
{

  //! A terrain ready to be read by any number of threads.
  struct Terrain
  {
      QString name;
      QString location; //!< what it was opened from, without secrets
      int band = 1;
      QgsCoordinateReferenceSystem crs;
      ElevationUnitDecision unit;
      std::unique_ptr<ElevationSource> source;
      std::unique_ptr<TileCache> cache;
      unsigned threads = 0; //!< 0: any number

      //! One line for log and metadata: name, size, cell size, unit and who said so.
      QString description() const;
  };

  /**
   * Opens TERRAIN. Call it in the main thread, before the work.
   * \throws QgsProcessingException for what is no terrain, with what to do
   */
  std::unique_ptr<Terrain> readTerrain( const ParameterValues &values, QgsProcessingFeedback &feedback );

} // namespace stillhead
