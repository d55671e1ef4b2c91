// SPDX-License-Identifier: GPL-2.0-or-later
// The shared job, solved before and after.
#include "processing/proposeboostrun.h"

#include "processing/parameternames.h"
#include "processing/text/boosttext.h"
#include "processing/text/text.h"
#include "processing/writing/boostertable.h"

#include <algorithm>

namespace stillhead
{

  QStringList proposeBoostLayers()
  {
    return { output::BOOSTERS, output::SPANS, output::STRETCHES, output::EXTREMES, output::FINDINGS };
  }

  ProposeBoostRun::ProposeBoostRun( const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback )
    : NetworkRun( values, terrain, feedback, proposeBoostLayers() )
    , mRisePa( regulatorMarginPa( parameter::BOOST_RISE ) )
  {
  }

  void ProposeBoostRun::compute( const StaticJob &job, Monitor &monitor )
  {
    mBoost = solveBoost( { job, mRisePa }, monitor );
    const QStringList given = mNames.devices;
    const auto count = static_cast<qsizetype>( mBoost.devices.size() );
    for ( int number = 1; mNames.devices.size() < count; ++number )
    {
      const QString name = QStringLiteral( "B%1" ).arg( number );
      if ( !given.contains( name, Qt::CaseInsensitive ) )
        mNames.devices << name;
    }
    mResult = std::move( mBoost.after );
    if ( mBoost.newlyOverM > 0.0 )
      mFeedback.pushWarning(
        Text::tr( "With the boosters %1 of pipe would be over at no flow; run Propose regulators with BOOSTERS as "
                  "DEVICES to find where a regulator must follow." )
          .arg( mUnits.lengthText( mBoost.newlyOverM ) ) );
  }

  std::vector<ResultTable> ProposeBoostRun::tables(
    const ResultContext &context, const std::vector<QgsGeometry> &outlines ) const
  {
    return { boosterTable( context, mBoost ), spanTable( context ), stretchTable( context, outlines ),
      extremeTable( context ), findingTable( context ) };
  }

  QString ProposeBoostRun::title() const
  {
    return Text::tr( "proposal of boosters" );
  }

  QString ProposeBoostRun::summary( const ResultContext &context ) const
  {
    return boostText( context, mBoost, mSources.front().source );
  }

  void ProposeBoostRun::addNumbers( QVariantMap &results ) const
  {
    double most = 0.0;
    for ( const ProposedBooster &booster : mBoost.boosters )
      most = std::max( most, booster.boostLowPa );
    results.insert( output::BOOSTER_COUNT, static_cast<qlonglong>( mBoost.boosters.size() ) );
    results.insert( output::BOOST_MOST, mUnits.pressureValue( most ) );
    results.insert( output::LENGTH_SHORT, mUnits.lengthValue( mResult.totals.shortM ) );
    results.insert( output::LENGTH_OVER, mUnits.lengthValue( mResult.totals.overM ) );
    results.insert( output::LENGTH_NEWLY_OVER, mUnits.lengthValue( mBoost.newlyOverM ) );
  }

} // namespace stillhead
