// SPDX-License-Identifier: GPL-2.0-or-later
// What a source at some place would mean, before it is accepted: the ground found there and the static level it gives.
#pragma once

#include "core/statics/source.h"
#include "plugin/preview/previewwork.h"
#include "processing/displayunits.h"

#include <qgspointxy.h>

#include <optional>

namespace stillhead
{

  struct SourceLook
  {
      double groundM = NOT_A_FIGURE;      //!< by the terrain
      std::optional<StaticLevels> levels; //!< none where a value is missing or there is no ground to start from
  };

  /**
   * Looks at the source of \a input as if it stood at \a place, in the CRS of the mainlines. Mainlines and terrain must be there.
   * \throws QgsProcessingException, std::runtime_error for terrain or values that cannot be used
   */
  SourceLook lookAtSource( const PreviewInput &input, const QgsPointXY &place,
    const QgsCoordinateTransformContext &transforms, TerrainKeeper &terrains );

  //! The look in a sentence or two: "Ground 478.2 ft. Water would stand at …".
  QString sourceLookText( const SourceLook &look, const DisplayUnits &units );

  //! A place as a point parameter that says its CRS.
  QString pointParameter( const QgsPointXY &place, const QgsCoordinateReferenceSystem &crs );

  //! The units that \a parameters name, psi and feet where they name none.
  DisplayUnits unitsOf( const QVariantMap &parameters );

} // namespace stillhead
