// SPDX-License-Identifier: GPL-2.0-or-later
// A point parameter in the CRS that the job works in.
#pragma once

#include "core/plan/plan.h"
#include "processing/reading/parametervalues.h"

#include <qgscoordinatereferencesystem.h>

namespace stillhead
{

  /**
   * The point \a name in \a crs. A point given without a CRS is taken to be in \a crs.
   * \throws QgsProcessingException where it is no point or cannot be reprojected
   */
  PlanPoint readPlace( const ParameterValues &values, const QString &name, const QgsCoordinateReferenceSystem &crs );

} // namespace stillhead
