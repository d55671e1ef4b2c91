// SPDX-License-Identifier: GPL-2.0-or-later
// What does not occur is not spoken of.
#include "processing/text/summarytext.h"

#include "processing/reading/sourcereader.h"
#include "processing/text/cautions.h"
#include "processing/text/text.h"

#include <cmath>

namespace stillhead
{

  namespace
  {

    double overMainlinesM( const ResultContext &context )
    {
      double lengthM = 0.0;
      for ( const Piece &piece : context.result.pieces )
      {
        if ( piece.over && context.lineOf( piece ).role == Role::Mainline )
          lengthM += piece.toM - piece.fromM;
      }
      return lengthM;
    }

    QString rangeText( double leastPa, double mostPa, const DisplayUnits &units )
    {
      return Text::tr( "%1 to %2" ).arg( plainNumber( units.pressure( leastPa ) ), units.givenPressureText( mostPa ) );
    }

    QString limitsText( const ResultContext &context )
    {
      const Limits &limits = context.limits;
      const QString all = rangeText( limits.leastPa, limits.mostPa, context.units );
      if ( limits.lateralLeastPa == limits.leastPa && limits.lateralMostPa == limits.mostPa )
        return all;
      return Text::tr( "%1 (laterals %2)" )
        .arg( all, rangeText( limits.lateralLeastPa, limits.lateralMostPa, context.units ) );
    }

    QString lengthsSentence( const ResultContext &context )
    {
      const Totals &totals = context.result.totals;
      const DisplayUnits &units = context.units;
      QStringList parts;
      parts
        << Text::tr( "%1 stands within %2 at rest" ).arg( units.lengthText( totals.withinM ), limitsText( context ) );
      if ( totals.overM > 0.0 )
        parts << Text::tr( "%1 is over (%2 of it mainlines)" )
                   .arg( units.lengthText( totals.overM ), units.lengthText( overMainlinesM( context ) ) );
      if ( totals.shortM > 0.0 )
        parts << Text::tr( "%1 is short" ).arg( units.lengthText( totals.shortM ) );
      if ( totals.noSourceM > 0.0 )
        parts << Text::tr( "%1 is joined to no source" ).arg( units.lengthText( totals.noSourceM ) );
      if ( totals.noTerrainM > 0.0 )
        parts << Text::tr( "%1 lies where the terrain has no elevation" ).arg( units.lengthText( totals.noTerrainM ) );
      if ( totals.closeCallM > 0.0 )
        parts << Text::tr( "%1 is too close to call" ).arg( units.lengthText( totals.closeCallM ) );
      return Text::tr( "Of %1 of pipe, %2." )
        .arg( units.lengthText( totals.lengthM ), parts.join( QStringLiteral( ", " ) ) );
    }

    //! The zone's extreme, where there is one.
    const Extreme *zoneExtreme( const ResultContext &context, bool highest )
    {
      const Extreme *worst = nullptr;
      for ( const Extreme &extreme : context.result.extremes )
      {
        if ( extreme.stretch >= 0 || extreme.kind != ( highest ? ExtremeKind::Highest : ExtremeKind::Lowest ) )
          continue;
        if ( !worst || ( highest ? extreme.pressurePa > worst->pressurePa : extreme.pressurePa < worst->pressurePa ) )
          worst = &extreme;
      }
      return worst;
    }

    QString extremesSentence( const ResultContext &context )
    {
      const Extreme *highest = zoneExtreme( context, true );
      const Extreme *lowest = zoneExtreme( context, false );
      if ( !highest || !lowest )
        return QString();
      const DisplayUnits &units = context.units;
      return Text::tr( "The highest pressure is %1 at pipe elevation %2 (high case), the lowest %3 at %4 (low case)." )
        .arg( units.pressureText( highest->pressurePa, 1 ), units.lengthText( highest->elevationM ),
          units.pressureText( lowest->pressurePa, 1 ), units.lengthText( lowest->elevationM ) );
    }

    QString levelSentence( const ResultContext &context, const Source &source )
    {
      const StaticLevels &levels = context.result.sources.front().levels;
      const DisplayUnits &units = context.units;
      return Text::tr( "The static level is at elevation %1 in the high case and %2 in the low case, from %3; %4." )
        .arg( units.lengthText( levels.highM, 1 ), units.lengthText( levels.lowM, 1 ), sourceText( source, units ),
          units.constantText() );
    }

  } // namespace

  QString summaryText( const ResultContext &context, const Source &source )
  {
    QStringList sentences { lengthsSentence( context ), extremesSentence( context ), levelSentence( context, source ) };
    sentences.removeAll( QString() );
    return sentences.join( ' ' ) + QStringLiteral( "\n\n" ) + runningWaterCaution() + QStringLiteral( "\n\n" )
      + safetyCaution();
  }

} // namespace stillhead
