// SPDX-License-Identifier: GPL-2.0-or-later
// Proposes the fewest regulators that bring pipe within MOST at rest while nothing served today drops below LEAST.
#pragma once

#include "core/proposal/beneath.h"
#include "core/proposal/fewest.h"
#include "core/proposal/forest.h"
#include "core/proposal/marking.h"
#include "core/proposal/planview.h"
#include "core/proposal/rules.h"

#include <vector>

namespace stillhead
{

  //! Why a regulator stands where it stands.
  enum class RegulatorReason
  {
    PipeBelowIsOver,    //!< without it pipe below would be over
    GroundNeedsLevel,   //!< the regulator above must hold more than pipe below stands, because `aboveNeed` needs it
    SplitsTheReduction, //!< it takes a share of a reduction that is too much for one regulator, or too little
    FeedsALoop          //!< one of several inlets of looped pipe
  };

  struct ProposedRegulator
  {
      Planned planned; //!< its limb is a number in the marked forest
      PlaceOnLine at;
      bool againstLine = false; //!< water passes against the direction of the line
      Role role = Role::Mainline;
      int zone = -1;           //!< pressure zone of today
      int feeder = -1;         //!< the proposed regulator that feeds it, −1: none
      int stage = 1;           //!< 1 nearest the source
      int group = -1;          //!< inlets of the same looped pipe share a number; −1: alone
      double placeFromM = 0.0; //!< along the line, nearest the source: where the same setting works
      double placeToM = 0.0;
      double setPa = 0.0;
      double setLeastPa = 0.0; //!< lowest that serves the top; −∞ where nothing is served behind it
      double setMostPa = 0.0;  //!< highest whose lock-up protects the bottom
      double inletHighPa = 0.0;
      double inletLowPa = 0.0;
      double outletHighPa = 0.0; //!< at no flow
      double outletLowPa = 0.0;  //!< while water runs
      double zoneLowestPa = 0.0; //!< lowest pressure of the low case in the zone that it feeds
      double zoneHighestPa = 0.0;
      double failedOpenPa = 0.0; //!< highest pressure below it if it fails open
      double servesUpToM = 0.0;
      double holdsDownToM = 0.0;
      Beneath beneath;
      RegulatorReason reason = RegulatorReason::PipeBelowIsOver;
      Need aboveNeed; //!< for GroundNeedsLevel
  };

  struct Proposal
  {
      std::vector<ProposedRegulator> regulators; //!< those that feed come before those that are fed
      std::vector<Excused> excused;
      int bound = 0;         //!< no plan has fewer
      bool proven = false;   //!< as many as the bound, and all rules kept
      bool rulesKept = true; //!< LEAST_DROP, MOST_RATIO and SETTING_STEP, by all
  };

  //! Figures of every regulator of \a view.
  std::vector<ProposedRegulator> describePlan( PlanView &view );

  //! The proposal for a forest in which every body suits one level.
  Proposal propose( const Forest &forest, const ProposalRules &rules );
  Proposal proposeMarked( const MarkedForest &marked, const FewestRegulators &fewest, const ProposalRules &rules );

} // namespace stillhead
