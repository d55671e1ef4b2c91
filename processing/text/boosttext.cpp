// SPDX-License-Identifier: GPL-2.0-or-later
// What does not occur is not spoken of; the sentences on the drawing follow those on the plan.
#include "processing/text/boosttext.h"

#include "processing/text/summarytext.h"
#include "processing/text/text.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {

    QString plural( std::size_t count )
    {
      return count == 1 ? Text::tr( "One booster" ) : Text::tr( "%1 boosters" ).arg( count );
    }

    QString planSentence( const ResultContext &context, const BoostResult &result )
    {
      const DisplayUnits &units = context.units;
      const QString least = units.givenPressureText( context.limits.leastPa );
      const double shortM = result.before.totals.shortM;
      if ( shortM <= 0.0 )
        return Text::tr( "Nothing is short of %1 at rest, so no booster is needed." ).arg( least );
      if ( result.boosters.empty() )
        return Text::tr( "%1 of pipe is short of %2 at rest, and no booster can change that." )
          .arg( units.lengthText( shortM ), least );
      return Text::tr( "%1 would bring %2 of the %3 of pipe that is short to %4." )
        .arg( plural( result.boosters.size() ), units.lengthText( shortM - result.stillShortM ),
          units.lengthText( shortM ), least );
    }

    QString sourceSentence( const ResultContext &context, const BoostResult &result )
    {
      const auto pump = std::find_if( result.boosters.begin(), result.boosters.end(),
        []( const ProposedBooster &booster ) { return booster.atSource; } );
      if ( pump == result.boosters.end() )
        return QString();
      return Text::tr(
        "The pipe is looped from the source on, so a pump at the source would have to add %1 while water "
        "runs (BOOST_LOW) and would add %2 at no flow (BOOST)." )
        .arg( context.units.pressureText( pump->boostLowPa ), context.units.pressureText( pump->boostPa ) );
    }

    QString overSentence( const ResultContext &context, const BoostResult &result )
    {
      if ( result.newlyOverM <= 0.0 )
        return QString();
      return Text::tr( "%1 of pipe would then be over %2 at no flow and needs a regulator." )
        .arg( context.units.lengthText( result.newlyOverM ), context.units.givenPressureText( context.limits.mostPa ) );
    }

  } // namespace

  double servedWithoutM( const ResultContext &context, const ProposedBooster &booster, const BoostResult &result )
  {
    const Zone &zone = result.before.zones[static_cast<std::size_t>( booster.zone )];
    return zone.levels.lowM - context.limits.leastFor( booster.role ) / context.units.specificWeightNPerM3();
  }

  QString boosterWhyText( const ResultContext &context, const ProposedBooster &booster, const BoostResult &result )
  {
    const DisplayUnits &units = context.units;
    const QString need =
      Text::tr( "Pipe beyond it lies at up to %1, and without it only pipe up to %2 is served" )
        .arg( units.lengthText( booster.neededByM ), units.lengthText( servedWithoutM( context, booster, result ) ) );
    if ( booster.regulatorFollows )
      return Text::tr( "%1; pipe beyond it at %2 would then be over at no flow, so a regulator must follow." )
        .arg( need, units.lengthText( booster.lowestM ) );
    return Text::tr( "%1; this is the place nearest the source from which it lifts nothing above the highest "
                     "acceptable pressure." )
      .arg( need );
  }

  QString boostText( const ResultContext &context, const BoostResult &result, const Source &source )
  {
    QStringList sentences { planSentence( context, result ), sourceSentence( context, result ),
      overSentence( context, result ) };
    sentences.removeAll( QString() );
    const QString rest = summaryText( context, source );
    return sentences.join( ' ' ) + QStringLiteral( "\n\n" )
      + ( result.boosters.empty() ? rest : Text::tr( "With them in place: %1" ).arg( rest ) );
  }

} // namespace stillhead
