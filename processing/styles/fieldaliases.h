// SPDX-License-Identifier: GPL-2.0-or-later
// The names under which people see the fields of the outputs, with their units.
#pragma once

#include "processing/styles/resultstyle.h"

namespace stillhead
{

  //! Sets an alias for every field of the output; drawn fields keep the name that they were given.
  void setFieldAliases( QgsVectorLayer &layer, ResultLayer what, const ResultStyle &style );

} // namespace stillhead
