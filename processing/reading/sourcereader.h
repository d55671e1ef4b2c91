// SPDX-License-Identifier: GPL-2.0-or-later
// The source of pressure from its parameters, checked as far as it can be without pipe and terrain.
#pragma once

#include "core/statics/source.h"
#include "processing/displayunits.h"
#include "processing/reading/parametervalues.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsprocessingfeedback.h>

namespace stillhead
{

  //! A source and what belongs to it but not to core.
  struct SourceInput
  {
      Source source;
      double reachM = 10.0;
      QString note;
  };

  /**
   * Reads the source; its place is given in \a crs.
   * \throws QgsProcessingException where something is missing or contradicts itself
   */
  SourceInput readSource( const ParameterValues &values, const DisplayUnits &units,
    const QgsCoordinateReferenceSystem &crs, QgsProcessingFeedback &feedback );

  //! What the user gave, in a few words: "a pressure of 71 psi (low case 62 psi) read 2.5 ft above ground".
  QString sourceText( const Source &source, const DisplayUnits &units );

} // namespace stillhead
