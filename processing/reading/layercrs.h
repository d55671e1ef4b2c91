// SPDX-License-Identifier: GPL-2.0-or-later
// CRSs of layers as core takes them, and what does not count as one.
#pragma once

#include <qgscoordinatereferencesystem.h>

#include <string>

namespace stillhead
{

  //! The full definition of \a crs for core; blank where it is invalid.
  std::string crsDefinition( const QgsCoordinateReferenceSystem &crs );

  /**
   * Refuses a layer without CRS. Files without one come with placeholders that the platform takes for valid.
   * \throws QgsProcessingException naming \a layer and \a name, the parameter's name
   */
  void requireCrs( const QgsCoordinateReferenceSystem &crs, const QString &name, const QString &layer );

  //! "EPSG:32631, WGS 84 / UTM zone 31N"
  QString crsText( const QgsCoordinateReferenceSystem &crs );

} // namespace stillhead
