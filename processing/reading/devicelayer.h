// SPDX-License-Identifier: GPL-2.0-or-later
// DEVICES: what stands in the pipe.
#pragma once

#include "core/network/device.h"
#include "processing/reading/pointlayer.h"

#include <QStringList>

#include <vector>

namespace stillhead
{

  //! Devices and what core does not need of them.
  struct DeviceInput
  {
      std::vector<Device> devices;
      QStringList names; //!< one for each
  };

  /**
   * Reads the layer. A regulator needs `set`, a booster `boost`; where `rise` is blank \a lockupRisePa counts.
   * \throws QgsProcessingException for an unknown kind or direction or a missing figure
   */
  DeviceInput readDevices( const QgsProcessingFeatureSource &layer, double lockupRisePa, const DisplayUnits &units,
    const QgsCoordinateReferenceSystem &crs, const QgsCoordinateTransformContext &transforms, Drawing &drawing );

  //! The text of \a direction in the layer: `from the source`, `start to end`, `end to start`.
  QString directionText( DeviceDirection direction );

} // namespace stillhead
