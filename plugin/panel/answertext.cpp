// SPDX-License-Identifier: GPL-2.0-or-later
// What does not occur is not spoken of; figures are those of the summary, to the same digit.
#include "plugin/panel/answertext.h"

#include <QCoreApplication>

namespace stillhead
{

  namespace
  {

    class Answer
    {
        Q_DECLARE_TR_FUNCTIONS( stillhead::Answer )
    };

    //! The worst stretch of one sort; null where there is none.
    const Stretch *worstOf( const std::vector<Stretch> &stretches, bool over )
    {
      const Stretch *worst = nullptr;
      for ( const Stretch &stretch : stretches )
      {
        if ( stretch.over == over && ( !worst || stretch.beyondPa > worst->beyondPa ) )
          worst = &stretch;
      }
      return worst;
    }

  } // namespace

  QString answerText( const SolvedPlan &plan )
  {
    const Totals &totals = plan.result.totals;
    const DisplayUnits &units = plan.units;
    QStringList parts { Answer::tr( "%1 within limits at rest" ).arg( units.lengthText( totals.withinM ) ) };
    if ( const Stretch *over = worstOf( plan.result.stretches, true ) )
      parts << Answer::tr( "%1 over (worst %2)" )
                 .arg( units.lengthText( totals.overM ), units.pressureText( over->worstPa, 1 ) );
    if ( const Stretch *shortest = worstOf( plan.result.stretches, false ) )
      parts << Answer::tr( "%1 short (worst %2)" )
                 .arg( units.lengthText( totals.shortM ), units.pressureText( shortest->worstPa, 1 ) );
    if ( totals.noSourceM > 0.0 )
      parts << Answer::tr( "%1 joined to no source" ).arg( units.lengthText( totals.noSourceM ) );
    if ( totals.noTerrainM > 0.0 )
      parts << Answer::tr( "%1 without terrain" ).arg( units.lengthText( totals.noTerrainM ) );
    return Answer::tr( "%1." ).arg( parts.join( QStringLiteral( ", " ) ) );
  }

  QString waterText( const SolvedPlan &plan )
  {
    const StaticLevels &levels = plan.result.zones.front().levels;
    const DisplayUnits &units = plan.units;
    if ( levels.lowM == levels.highM )
      return Answer::tr( "Water stands at elevation %1." ).arg( units.lengthText( levels.highM, 1 ) );
    return Answer::tr( "Water stands at elevation %1 (summer peak) to %2 (night, winter)." )
      .arg( units.lengthText( levels.lowM, 1 ), units.lengthText( levels.highM, 1 ) );
  }

} // namespace stillhead
