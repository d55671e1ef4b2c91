// SPDX-License-Identifier: GPL-2.0-or-later
// Mark, count, plan, settle, describe.
#include "core/proposal/proposal.h"

#include "core/proposal/placement.h"
#include "core/proposal/planview.h"

#include <algorithm>
#include <numeric>

namespace stillhead
{

  namespace
  {
    class Describer
    {
      public:
        Describer( PlanView &view, Proposal &proposal )
          : mView( view )
          , mRules( view.rules() )
          , mProposal( proposal )
        {
        }

        void run()
        {
          mProposal.regulators.resize( mView.plan().size() );
          mView.visit( [this]( const LegReach &reach ) { describeOnLeg( reach ); },
            [this](
              std::size_t first, std::size_t last, const Beneath &below ) { describeInlets( first, last, below ); } );
          for ( std::size_t i = 0; i < mProposal.regulators.size(); ++i )
            tellWhy( i );
        }

      private:
        const ProposalRules &rules() const { return mRules; }

        void describeOnLeg( const LegReach &reach )
        {
          ProposedRegulator &own = mProposal.regulators[reach.regulator];
          const ForestPart &part = reach.leg.segments[std::min( reach.boundary, reach.leg.segments.size() - 1 )];
          own.planned = mView.at( reach.regulator );
          own.at = { part.line, own.planned.alongM };
          own.againstLine = part.toM < part.fromM;
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
            ProposedRegulator &own = mProposal.regulators[i];
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
          ProposedRegulator &own = mProposal.regulators[number];
          const double e = own.planned.elevationM;
          const StaticLevels inlet = mView.inletOf( number, own.zone );
          const StaticLevels outlet { std::min( inlet.highM, own.planned.levelM + rules().riseM() ),
            std::min( inlet.lowM, own.planned.levelM ) };
          own.beneath = below;
          own.feeder = mView.feederOf( number );
          own.setPa = rules().pressurePa( own.planned.levelM - e );
          own.setLeastPa = rules().pressurePa( below.need.levelM - e );
          own.setMostPa = rules().pressurePa( below.standM - e );
          own.inletHighPa = rules().pressurePa( inlet.highM - e );
          own.inletLowPa = rules().pressurePa( inlet.lowM - e );
          own.outletHighPa = rules().pressurePa( outlet.highM - e );
          own.outletLowPa = rules().pressurePa( outlet.lowM - e );
          own.zoneLowestPa = rules().pressurePa( outlet.lowM - below.highest.elevationM );
          own.zoneHighestPa = rules().pressurePa( outlet.highM - below.lowest.elevationM );
          own.failedOpenPa = rules().pressurePa( below.highestPressureM( inlet.highM ) );
          own.servesUpToM = outlet.lowM - rules().leastM( own.role );
          own.holdsDownToM = outlet.highM - rules().mostM( own.role );
        }

        void tellWhy( std::size_t number )
        {
          ProposedRegulator &own = mProposal.regulators[number];
          // A feeder comes first: it stands higher in the forest.
          own.stage = own.feeder >= 0 ? mProposal.regulators[static_cast<std::size_t>( own.feeder )].stage + 1 : 1;
          if ( own.reason == RegulatorReason::FeedsALoop )
            return;
          if ( own.beneath.standM == ANY_LEVEL_M )
          {
            own.reason = RegulatorReason::SplitsTheReduction;
            return;
          }
          if ( own.feeder < 0 )
            return;
          const ProposedRegulator &feeder = mProposal.regulators[static_cast<std::size_t>( own.feeder )];
          const bool needed = feeder.beneath.need.levelM > own.beneath.standM;
          own.reason = needed ? RegulatorReason::GroundNeedsLevel : RegulatorReason::SplitsTheReduction;
          own.aboveNeed = feeder.beneath.need;
        }

        PlanView &mView;
        const ProposalRules &mRules;
        Proposal &mProposal;
    };

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

  Proposal propose( const Forest &forest, const ProposalRules &rules )
  {
    Proposal proposal;
    const MarkedForest marked = markForest( forest, rules );
    const FewestRegulators fewest = fewestRegulators( marked, rules );
    proposal.bound = fewest.total;
    proposal.excused = marked.excused;
    proposal.tornBodies = fewest.tornBodies;
    PlanView view( marked, rules, planRegulators( marked, fewest, rules ) );
    improvePlan( view );
    Describer( view, proposal ).run();
    proposal.rulesKept = std::all_of( proposal.regulators.begin(), proposal.regulators.end(),
      [&]( const ProposedRegulator &regulator ) { return keepsAll( regulator, rules ); } );
    proposal.proven = proposal.rulesKept && proposal.tornBodies.empty()
      && static_cast<int>( proposal.regulators.size() ) == proposal.bound;
    return proposal;
  }

} // namespace stillhead
