// SPDX-License-Identifier: GPL-2.0-or-later
// The planning GeoPackage as a file: made in one piece, or not at all.
#pragma once

#include "processing/displayunits.h"

#include <qgscoordinatereferencesystem.h>

#include <QString>

namespace stillhead
{

  /**
   * Makes the GeoPackage \a path with the empty planning layers in \a crs, their default styles, and metadata that names
   * the units of \a units.
   * \throws QgsProcessingException where something is there already, or the file cannot be made; nothing is left behind then
   */
  void makePlanFile( const QString &path, const QgsCoordinateReferenceSystem &crs, const DisplayUnits &units );

} // namespace stillhead
