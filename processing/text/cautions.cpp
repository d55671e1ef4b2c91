// SPDX-License-Identifier: GPL-2.0-or-later
// The two cautions. The 15 to 25 psi of losses are common practice, no source.
#include "processing/text/cautions.h"

#include "processing/text/text.h"

namespace stillhead
{

  QString runningWaterCaution()
  {
    return Text::tr(
      "Pressure at rest. With water running it is lower: meter, backflow assembly, valves and pipe commonly take "
      "15 to 25 psi and more. Within limits at rest does not mean enough to run." );
  }

  QString safetyCaution()
  {
    return Text::tr(
      "Planning figures, not a stamped design: measure pressures on site, and follow local plumbing codes, backflow "
      "rules and a licensed professional. A regulator can fail open, so pipe and fittings downstream must stand the "
      "unregulated pressure or be relieved." );
  }

} // namespace stillhead
