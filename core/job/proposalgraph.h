// SPDX-License-Identifier: GPL-2.0-or-later
// The graph for a proposal, from what the main job found and the exact profiles.
#pragma once

#include "core/job/staticjob.h"
#include "core/profile/profilebuilder.h"
#include "core/proposal/pipegraph.h"

namespace stillhead
{

  //! A regulator stands no nearer than this to pipe without elevation: read back, it must find its own.
  constexpr double FROM_GAP_M = 0.001;

  /**
   * All fed pipe of \a result, the result of \a job. Runs of the profile stand for the pipe: their ends are exact, between them
   * they are straight, which keeps every elevation and so every count; ProposalPlaces turns places into exact ones.
   */
  PipeGraph proposalGraph( const StaticJob &job, const StaticResult &result, Monitor &monitor );

  //! Exact places on the pipe of a graph made by proposalGraph().
  class ProposalPlaces
  {
    public:
      ProposalPlaces( const StaticJob &job, const StaticResult &result, const PipeGraph &graph );

      //! The place at which the pipe has the elevation that the graph has at \a place.
      double exactM( const PlaceOnLine &place );

    private:
      const StaticResult &mResult;
      const PipeGraph &mGraph;
      ProfileBuilder mBuilder;
      int mLine = -1;
      Profile mProfile;
  };

} // namespace stillhead
