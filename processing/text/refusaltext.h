// SPDX-License-Identifier: GPL-2.0-or-later
// Core's refusals as one clear sentence each, in the user's units, with what to do.
#pragma once

#include "core/job/staticjob.h"
#include "processing/displayunits.h"

#include <QString>
#include <QStringList>

#include <functional>

namespace stillhead
{

  //! How sources, devices and drawn lines are called in sentences.
  struct RefusalNames
  {
      QStringList sources; //!< blank for the single source
      QStringList devices;
      std::function<QString( int line )> line;
  };

  QString refusalText(
    const Refusal &refusal, const RefusalNames &names, double sourceReachM, const DisplayUnits &units );

} // namespace stillhead
