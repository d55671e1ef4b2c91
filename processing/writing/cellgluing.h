// SPDX-License-Identifier: GPL-2.0-or-later
// Puts an area together that was made cell by cell. Uniting the parts would take every vertex into account again and
// again; here the lines between cells are simply left out.
#pragma once

#include "processing/writing/cellgrid.h"

#include <qgsgeometry.h>

#include <optional>
#include <vector>

namespace stillhead
{

  /**
   * The one polygon of which \a parts are what lies in each cell of \a grid. Where outlines cross a line between cells the parts on
   * both sides must agree to a tenth of a millimetre. \returns nothing where they do not, or where the parts hang together as
   * more than one polygon
   */
  std::optional<QgsGeometry> gluedCells( const std::vector<QgsGeometry> &parts, const CellGrid &grid );

} // namespace stillhead
