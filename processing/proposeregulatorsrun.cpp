// SPDX-License-Identifier: GPL-2.0-or-later
// Rules about the regulators themselves are read here; the rest is the shared job, solved before and after.
#include "processing/proposeregulatorsrun.h"

#include "processing/parameternames.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/proposaltext.h"
#include "processing/text/text.h"

#include <qgsexception.h>

namespace stillhead
{

  QStringList proposeRegulatorsLayers()
  {
    return { output::REGULATORS, output::SPANS, output::STRETCHES, output::EXTREMES, output::FINDINGS };
  }

  ProposeRegulatorsRun::ProposeRegulatorsRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback )
    : NetworkRun( values, terrain, feedback, proposeRegulatorsLayers() )
    , mMostRatio( values.number( parameter::MOST_RATIO ) )
    , mSettingStepPa( readPressure( values, parameter::SETTING_STEP, mUnits ).value_or( 0.0 ) )
    , mLeastDropPa( regulatorMarginPa( parameter::LEAST_DROP ) )
    , mRisePa( regulatorMarginPa( parameter::LOCKUP_RISE ) )
  {
    if ( mMostRatio != 0.0 && mMostRatio <= 1.0 )
      throw QgsProcessingException(
        Text::tr( "MOST_RATIO (%1) leaves no reduction; give a ratio above 1, or 0 for no limit." )
          .arg( plainNumber( mMostRatio ) ) );
    if ( mRisePa >= mLimits.mostPa )
      throw QgsProcessingException(
        Text::tr( "LOCKUP_RISE (%1) is not below MOST (%2), so no setting could hold pipe "
                  "within the limit at no flow; check both." )
          .arg( mUnits.givenPressureText( mRisePa ), mUnits.givenPressureText( mLimits.mostPa ) ) );
  }

  void ProposeRegulatorsRun::compute( const StaticJob &job, Monitor &monitor )
  {
    ProposalJob own;
    own.statics = job;
    own.statics.leastDropPa = mLeastDropPa;
    own.risePa = mRisePa;
    own.mostRatio = mMostRatio;
    own.settingStepPa = mSettingStepPa;
    mProposal = solveProposal( own, monitor );
    nameRegulators( mProposal.proposal.regulators.size() );
    StaticJob with = own.statics;
    with.devices = mProposal.devices;
    mRows = proposalRows( with, mProposal );
    mResult = std::move( mProposal.after );
    logProposal();
  }

  //! "R1", "R2", …, leaving out names that devices given bear.
  void ProposeRegulatorsRun::nameRegulators( std::size_t count )
  {
    const QStringList given = mNames.devices;
    for ( int number = 1; count > 0; ++number )
    {
      const QString name = QStringLiteral( "R%1" ).arg( number );
      if ( given.contains( name, Qt::CaseInsensitive ) )
        continue;
      mNames.devices << name;
      --count;
    }
  }

  void ProposeRegulatorsRun::logProposal() const
  {
    const Proposal &proposal = mProposal.proposal;
    if ( !mProposal.verified )
      mFeedback.pushWarning(
        Text::tr( "Run again with the regulators in place, some pipe is still over or has become short: legs lie so "
                  "close together that a device cannot stand plainly on one of them. See the findings, and part the "
                  "lines." ) );
    if ( !proposal.rulesKept )
      mFeedback.pushWarning( Text::tr( "No plan was found that keeps LEAST_DROP, MOST_RATIO and SETTING_STEP "
                                       "everywhere; see `differential` and `ratio`." ) );
  }

  std::vector<ResultTable> ProposeRegulatorsRun::tables(
    const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const
  {
    return { regulatorTable( context, output::REGULATORS, mRows ), spanTable( context ),
      stretchTable( context, outlines ), extremeTable( context ), findingTable( context ) };
  }

  QString ProposeRegulatorsRun::title() const
  {
    return Text::tr( "proposal of regulators" );
  }

  QString ProposeRegulatorsRun::summary( const ResultContext &context ) const
  {
    return proposalText( context, mProposal, mSources.front().source );
  }

  void ProposeRegulatorsRun::addNumbers( QVariantMap &results ) const
  {
    results.insert( output::REGULATOR_COUNT, static_cast<qlonglong>( mRows.size() ) );
    results.insert( output::REGULATOR_BOUND, mProposal.proposal.bound );
    results.insert( output::PROVEN, mProposal.proposal.proven && mProposal.verified ? 1 : 0 );
    results.insert( output::LENGTH_OVER, mUnits.lengthValue( mResult.totals.overM ) );
    results.insert( output::LENGTH_SHORT, mUnits.lengthValue( mResult.totals.shortM ) );
    results.insert( output::LENGTH_NOT_MENDED, mUnits.lengthValue( mProposal.notMendedM ) );
  }

} // namespace stillhead
