// SPDX-License-Identifier: GPL-2.0-or-later
// Findings as sentences: what was seen, and what to do where something can be done.
#pragma once

#include "core/plan/finding.h"
#include "processing/displayunits.h"
#include "processing/reading/drawingreader.h"

#include <QString>
#include <QStringList>

namespace stillhead
{

  //! How sources and devices are called in sentences.
  struct FeedNames
  {
      QStringList sources; //!< one blank name for the single source
      QStringList devices;
  };

  QString findingText(
    const Finding &finding, const DrawnInput &drawn, const FeedNames &names, const DisplayUnits &units );

  //! "mainlines feature 12" for a drawn line; blank for −1.
  QString featureText( int line, const DrawnInput &drawn );

  //! `mainlines` or `laterals`.
  QString drawnLayerName( Role role );

} // namespace stillhead
