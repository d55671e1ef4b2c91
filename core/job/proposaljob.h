// SPDX-License-Identifier: GPL-2.0-or-later
// Proposes regulators for a drawing: what is over today, the fewest that mend it, and the main job again with them in place.
#pragma once

#include "core/job/staticjob.h"
#include "core/proposal/proposal.h"

#include <vector>

namespace stillhead
{

  //! Inputs of a proposal. Devices of the main job stay as they are; its leastDropPa is a rule for the proposed ones too.
  struct ProposalJob
  {
      StaticJob statics;
      double risePa = 0.0;        //!< lock-up rise of the regulators proposed
      double mostRatio = 0.0;     //!< largest high inlet to set; 0: no limit
      double settingStepPa = 0.0; //!< settings are multiples of it; 0: any
  };

  struct ProposalResult
  {
      StaticResult before;
      Proposal proposal;           //!< places are exact; those that feed come before those that are fed
      std::vector<Device> devices; //!< of `after`: those given, then one for each regulator proposed
      StaticResult after;          //!< with all of them in place, and findings `cannot be mended`
      double notMendedM = 0.0;     //!< length of pipe that is excused and still over
      bool verified = false;       //!< after it nothing else is over, and nothing served before is short
  };

  /**
   * \throws Refusal, Cancelled, std::runtime_error as solveStatics()
   */
  ProposalResult solveProposal( const ProposalJob &job, Monitor &monitor );

} // namespace stillhead
