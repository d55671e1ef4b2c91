// SPDX-License-Identifier: GPL-2.0-or-later
// Mark, count, plan, settle, describe.
#include "core/proposal/proposal.h"

#include "core/proposal/placement.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    class Describer
    {
      public:
        explicit Describer( PlanView &view )
          : mView( view )
          , mRules( view.rules() )
          , mRegulators( view.plan().size() )
        {
        }

        std::vector<ProposedRegulator> run()
        {
          mView.visit( [this]( const LegReach &reach ) { describeOnLeg( reach ); },
            [this](
              std::size_t first, std::size_t last, const Beneath &below ) { describeInlets( first, last, below ); } );
          for ( std::size_t i = 0; i < mRegulators.size(); ++i )
            tellWhy( i );
          return std::move( mRegulators );
        }

      private:
        void describeOnLeg( const LegReach &reach )
        {
          ProposedRegulator &own = mRegulators[reach.regulator];
          const ForestPart &part = reach.leg.segments[std::min( reach.boundary, reach.leg.segments.size() - 1 )];
          own.planned = mView.at( reach.regulator );
          own.at = { part.line, own.planned.alongM };
          own.againstLine = reach.leg.segments.back().toM < reach.leg.segments.front().fromM;
          own.role = part.role;
          own.zone = part.zone;
          const PlaceRange range = placeRange( mView, reach );
          own.placeFromM = range.fromM;
          own.placeToM = range.toM;
          describe( reach.regulator, reach.beneath[reach.boundary] );
        }

        void describeInlets( std::size_t first, std::size_t last, const Beneath &below )
        {
          for ( std::size_t i = first; i < last; ++i )
          {
            ProposedRegulator &own = mRegulators[i];
            own.planned = mView.at( i );
            const Limb &limb = mView.marked().forest.limbs[static_cast<std::size_t>( own.planned.limb )];
            const Inlet &inlet = limb.inlets[static_cast<std::size_t>( own.planned.inlet )];
            own.at = inlet.on;
            own.againstLine = inlet.againstLine;
            own.role = inlet.role;
            own.zone = inlet.zone;
            own.group = own.planned.limb;
            own.placeFromM = own.placeToM = inlet.on.alongM;
            own.reason = RegulatorReason::FeedsALoop;
            describe( i, below );
          }
        }

        void describe( std::size_t number, const Beneath &below )
        {
          ProposedRegulator &own = mRegulators[number];
          const double e = own.planned.elevationM;
          const StaticLevels inlet = mView.inletOf( number, own.zone );
          const StaticLevels outlet { std::min( inlet.highM, own.planned.levelM + mRules.riseM() ),
            std::min( inlet.lowM, own.planned.levelM ) };
          own.beneath = below;
          own.feeder = mView.feederOf( number );
          own.setPa = mRules.pressurePa( own.planned.levelM - e );
          own.setLeastPa = mRules.pressurePa( below.need.levelM - e );
          own.setMostPa = mRules.pressurePa( below.standM - e );
          own.inletHighPa = mRules.pressurePa( inlet.highM - e );
          own.inletLowPa = mRules.pressurePa( inlet.lowM - e );
          own.outletHighPa = mRules.pressurePa( outlet.highM - e );
          own.outletLowPa = mRules.pressurePa( outlet.lowM - e );
          own.zoneLowestPa = mRules.pressurePa( outlet.lowM - below.highest.elevationM );
          own.zoneHighestPa = mRules.pressurePa( outlet.highM - below.lowest.elevationM );
          own.failedOpenPa = mRules.pressurePa( below.highestPressureM( inlet.highM ) );
          own.servesUpToM = outlet.lowM - mRules.leastM( own.role );
          own.holdsDownToM = outlet.highM - mRules.mostM( own.role );
        }

        void tellWhy( std::size_t number )
        {
          ProposedRegulator &own = mRegulators[number];
          // A feeder comes first: it stands higher in the forest.
          own.stage = own.feeder >= 0 ? mRegulators[static_cast<std::size_t>( own.feeder )].stage + 1 : 1;
          if ( own.reason == RegulatorReason::FeedsALoop )
            return;
          if ( own.beneath.standM == ANY_LEVEL_M )
          {
            own.reason = RegulatorReason::SplitsTheReduction;
            return;
          }
          if ( own.feeder < 0 )
            return;
          const ProposedRegulator &feeder = mRegulators[static_cast<std::size_t>( own.feeder )];
          const bool needed = feeder.beneath.need.levelM > own.beneath.standM;
          own.reason = needed ? RegulatorReason::GroundNeedsLevel : RegulatorReason::SplitsTheReduction;
          own.aboveNeed = feeder.beneath.need;
        }

        PlanView &mView;
        const ProposalRules &mRules;
        std::vector<ProposedRegulator> mRegulators;
    };

    std::vector<ProposedRegulator> settled(
      const MarkedForest &marked, std::vector<Planned> plan, const ProposalRules &rules )
    {
      PlanView view( marked, rules, std::move( plan ) );
      improvePlan( view );
      return describePlan( view );
    }

    /**
     * Where regulators that may not stand near joints are not enough (very steep pipe beside a joint, legs of a few
     * centimetres) they stand where they must.
     */
    std::vector<ProposedRegulator> proposeAnywhere(
      MarkedForest marked, const FewestRegulators &fewest, ProposalRules rules )
    {
      rules.toleranceM = 0.0;
      for ( Limb &limb : marked.forest.limbs )
      {
        if ( limb.loop || limb.partCount == 0 )
          continue;
        limb.standFromM = marked.forest.parts[limb.firstPart].fromM;
        limb.standToM = marked.forest.parts[limb.firstPart + limb.partCount - 1].toM;
      }
      bool complete = false;
      return settled( marked, planRegulators( marked, fewest, rules, complete ), rules );
    }

    //! True if a regulator that the planner marked as breaking a rule keeps all of them where it ended up.
    bool keepsAll( const ProposedRegulator &regulator, const ProposalRules &rules )
    {
      const double slackPa = rules.pressurePa( 2.0 * SAME_LEVEL_M );
      if ( regulator.inletLowPa - regulator.setPa < rules.leastDropPa - slackPa )
        return false;
      if ( rules.mostRatio > 0.0 && regulator.inletHighPa > rules.mostRatio * ( regulator.setPa + slackPa ) )
        return false;
      if ( rules.settingStepPa <= 0.0 )
        return true;
      const double steps = regulator.setPa / rules.settingStepPa;
      return std::abs( steps - std::round( steps ) ) * rules.settingStepPa <= slackPa;
    }
  } // namespace

  std::vector<ProposedRegulator> describePlan( PlanView &view )
  {
    return Describer( view ).run();
  }

  Proposal propose( const Forest &forest, const ProposalRules &rules )
  {
    const MarkedForest marked = markForest( forest, rules );
    return proposeMarked( marked, fewestRegulators( marked, rules ), rules );
  }

  Proposal proposeMarked( const MarkedForest &marked, const FewestRegulators &fewest, const ProposalRules &rules )
  {
    Proposal proposal;
    proposal.bound = fewest.total;
    proposal.excused = marked.excused;
    bool complete = false;
    std::vector<Planned> plan = planRegulators( marked, fewest, rules, complete );
    if ( complete )
      proposal.regulators = settled( marked, std::move( plan ), rules );
    else
      proposal.regulators = proposeAnywhere( marked, fewest, rules );
    proposal.rulesKept = std::all_of( proposal.regulators.begin(), proposal.regulators.end(),
      [&]( const ProposedRegulator &regulator ) { return keepsAll( regulator, rules ); } );
    proposal.proven = proposal.rulesKept && static_cast<int>( proposal.regulators.size() ) == proposal.bound;
    return proposal;
  }

} // namespace stillhead
