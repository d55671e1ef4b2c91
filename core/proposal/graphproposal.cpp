// SPDX-License-Identifier: GPL-2.0-or-later
// Bodies are cut until each suits one level; then it is a proposal for a forest.
#include "core/proposal/graphproposal.h"

#include "core/proposal/bodycut.h"
#include "core/proposal/growforest.h"

namespace stillhead
{

  namespace
  {
    constexpr int MOST_ROUNDS = 32; //!< each parts a terrace from the one above it
  }

  Proposal proposeOnGraph( PipeGraph graph, const ProposalRules &rules )
  {
    for ( int round = 0;; ++round )
    {
      const GrownForest grown = growForest( graph );
      const MarkedForest marked = markForest( grown.forest, rules );
      const FewestRegulators fewest = fewestRegulators( marked, rules );
      if ( fewest.tornBodies.empty() )
      {
        Proposal proposal = proposeMarked( marked, fewest, rules );
        // The bound is that of the pipe uncut; what was given up on the way is left aside.
        if ( round > 0 )
          proposal.bound =
            fewestRegulators( markForest( growForest( withoutCuts( graph ) ).forest, rules ), rules ).total;
        proposal.proven = proposal.rulesKept && static_cast<int>( proposal.regulators.size() ) == proposal.bound;
        return proposal;
      }
      if ( round < MOST_ROUNDS )
        cutBodies( graph, grown, marked, fewest.tornBodies, rules );
      else
        giveUpBodies( graph, grown, marked, fewest.tornBodies );
    }
  }

} // namespace stillhead
