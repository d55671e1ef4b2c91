// SPDX-License-Identifier: GPL-2.0-or-later
// One sentence for each reason.
#include "processing/text/refusaltext.h"

#include "processing/text/text.h"

namespace stillhead
{

  QString refusalText( const Refusal &refusal, double sourceReachM, const DisplayUnits &units )
  {
    switch ( refusal.reason )
    {
    case Refusal::Reason::NoLines:
      return Text::tr(
        "None of the drawn lines has any length, so there is no pipe to compute; draw the mainlines first." );
    case Refusal::Reason::SourceTooFar:
      return Text::tr(
        "The source lies %1 from the nearest pipe, farther than SOURCE_REACH (%2); move it onto the pipe, "
        "or raise SOURCE_REACH." )
        .arg( units.lengthText( refusal.figureM, 2 ), units.givenLengthText( sourceReachM ) );
    case Refusal::Reason::SourceNoTerrain:
      return Text::tr( "The terrain has no elevation at the source; give SOURCE_ELEVATION, or a terrain that reaches "
                       "there." );
    case Refusal::Reason::NoOverlap:
      return Text::tr(
        "No drawn line lies on the terrain; check that lines and terrain cover the same ground and carry "
        "the right CRS." );
    }
    return QString();
  }

} // namespace stillhead
