// SPDX-License-Identifier: GPL-2.0-or-later
// The parameters that several algorithms share, declared once so that they mean the same everywhere. None carries a
// minimum or maximum: what is out of range is refused by us with a sentence that says what to do.
#pragma once

#include <qgsprocessingparameters.h>

#include <memory>
#include <vector>

namespace stillhead
{

  using ParameterPointer = std::unique_ptr<QgsProcessingParameterDefinition>;
  using ParameterList = std::vector<ParameterPointer>;

  //! MAINS and LATERALS.
  ParameterList drawingParameters();

  //! TERRAIN, TERRAIN_BAND and TERRAIN_UNIT.
  ParameterList terrainParameters();

  //! SOURCE and what is known about it. Without \a network there is no pipe to reach and no SOURCE_REACH.
  ParameterList sourceParameters( bool network );

  //! SOURCES and DEVICES, layers of points.
  ParameterList feedLayerParameters();

  //! LOCKUP_RISE.
  ParameterList lockupParameter();

  //! LEAST_DROP, MOST_RATIO and SETTING_STEP.
  ParameterList proposalParameters();

  //! How far a booster's pressure at no flow stands above that while water runs.
  ParameterList boostRiseParameter();

  //! Options for the connection, in place of a source.
  ParameterList optionParameters();

  //! FAILED_OPEN.
  ParameterList failedOpenParameter();

  //! COVER, one depth for all.
  ParameterList coverParameter();

  //! COVER, which may come from the drawn features, and the parameters of drawn Z and of joining.
  ParameterList pipeParameters();

  //! LEAST, MOST and BANDS.
  ParameterList limitParameters();

  //! LATERAL_LEAST, LATERAL_MOST, TERRAIN_RMSE and READING_ERROR.
  ParameterList judgementParameters();

  //! SAG_DEPTH.
  ParameterList sagParameter();

  //! AREA to stay within.
  ParameterList areaParameter();

  //! PRESSURE_UNIT, LENGTH_UNIT and WATER_TEMPERATURE.
  ParameterList unitParameters();

} // namespace stillhead
