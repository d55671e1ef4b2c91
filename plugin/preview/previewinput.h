// SPDX-License-Identifier: GPL-2.0-or-later
// What a preview is computed from: layers of the project, and everything else by the names and values of the main
// algorithm's parameters, so that preview and algorithm cannot mean different things.
#pragma once

#include "core/network/drawing.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsgeometry.h>
#include <qgsrasterlayer.h>
#include <qgsvectorlayer.h>

#include <QPointer>
#include <QVariantMap>

#include <optional>

namespace stillhead
{

  //! A line that is being drawn and is in no layer yet.
  struct SketchedLine
  {
      QgsGeometry geometry;
      QgsCoordinateReferenceSystem crs;
      Role role = Role::Mainline;
  };

  struct PreviewInput
  {
      QPointer<QgsVectorLayer> mains;
      QPointer<QgsVectorLayer> laterals; //!< may be null
      QPointer<QgsRasterLayer> terrain;
      QVariantMap parameters; //!< of the main algorithm, all but layers and outputs
      std::optional<SketchedLine> sketch;

      //! What the user has to do before anything can be computed, as a sentence; blank when all is there.
      QString missing() const;

      //! The parameters with the layers among them, as the algorithm takes them.
      QVariantMap algorithmParameters() const;
  };

} // namespace stillhead
