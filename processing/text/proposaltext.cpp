// SPDX-License-Identifier: GPL-2.0-or-later
// What does not occur is not spoken of; the sentences on the drawing follow those on the plan.
#include "processing/text/proposaltext.h"

#include "processing/text/summarytext.h"
#include "processing/text/text.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {

    QString countText( std::size_t count )
    {
      return count == 1 ? Text::tr( "One regulator" ) : Text::tr( "%1 regulators" ).arg( count );
    }

    QString planSentence( const ResultContext &context, const ProposalResult &result )
    {
      const DisplayUnits &units = context.units;
      const QString most = units.givenPressureText( context.limits.mostPa );
      const std::size_t count = result.proposal.regulators.size();
      const double overM = result.before.totals.overM;
      if ( overM <= 0.0 )
        return Text::tr( "Nothing is over %1 at rest, so no regulator is needed." ).arg( most );
      if ( count == 0 )
        return Text::tr(
          "No regulator can bring any of the %1 that is over within %2 while all that is served stays so." )
          .arg( units.lengthText( overM ), most );
      return Text::tr( "%1 would bring %2 of the %3 of pipe that is over within %4 at rest, and nothing that is served "
                       "today would drop below %5." )
        .arg( countText( count ), units.lengthText( overM - context.result.totals.overM ), units.lengthText( overM ),
          most, units.givenPressureText( context.limits.leastPa ) );
    }

    QString boundSentence( const ProposalResult &result )
    {
      const Proposal &proposal = result.proposal;
      if ( proposal.regulators.empty() && proposal.bound == 0 )
        return QString();
      if ( proposal.proven && result.verified )
        return Text::tr( "No plan can have fewer." );
      return Text::tr( "No plan can have fewer than %1; whether one with fewer than this exists is not proven." )
        .arg( proposal.bound );
    }

    //! Excused pipe, with the highest place that asks too much for it.
    QString notMendedSentence( const ResultContext &context, const ProposalResult &result )
    {
      if ( result.notMendedM <= 0.0 )
        return QString();
      const DisplayUnits &units = context.units;
      double needM = NO_LEVEL_M;
      for ( const Excused &own : result.proposal.excused )
        needM = std::max( needM, own.need.elevationM );
      const QString length = units.lengthText( result.notMendedM );
      return needM > NO_LEVEL_M
        ? Text::tr( "%1 cannot be mended by regulators while pipe at up to %2 behind it is served." )
            .arg( length, units.lengthText( needM ) )
        : Text::tr( "%1 cannot be mended by regulators." ).arg( length );
    }

  } // namespace

  QString proposalText( const ResultContext &context, const ProposalResult &result, const Source &source )
  {
    QStringList sentences { planSentence( context, result ), boundSentence( result ),
      notMendedSentence( context, result ) };
    sentences.removeAll( QString() );
    const QString rest = summaryText( context, source );
    return sentences.join( ' ' ) + QStringLiteral( "\n\n" )
      + ( result.proposal.regulators.empty() ? rest : Text::tr( "With them in place: %1" ).arg( rest ) );
  }

} // namespace stillhead
