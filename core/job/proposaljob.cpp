// SPDX-License-Identifier: GPL-2.0-or-later
// The main job, the proposal, the main job again: the second run proves the plan. Where it does not (looped pipe whose legs
// lie so close that a device's leg is not plain), the pipe at fault is left as it is and reported.
#include "core/job/proposaljob.h"

#include "core/feedback/stagemonitor.h"
#include "core/job/proposalcheck.h"
#include "core/job/proposalgraph.h"
#include "core/proposal/graphproposal.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    ProposalRules rulesOf( const ProposalJob &job )
    {
      ProposalRules rules;
      rules.limits = job.statics.limits;
      rules.specificWeightNPerM3 = job.statics.specificWeightNPerM3;
      rules.risePa = job.risePa;
      rules.leastDropPa = job.statics.leastDropPa;
      rules.mostRatio = job.mostRatio;
      rules.settingStepPa = job.settingStepPa;
      rules.toleranceM = job.statics.joins.toleranceM;
      return rules;
    }

    void makeExact( Proposal &proposal, ProposalPlaces &places )
    {
      for ( ProposedRegulator &own : proposal.regulators )
      {
        own.placeFromM = places.exactM( { own.at.line, own.placeFromM } );
        own.placeToM = places.exactM( { own.at.line, own.placeToM } );
        own.at.alongM = own.planned.alongM = places.exactM( own.at );
        for ( PlaceOnLine *place :
          { &own.beneath.lowest.at, &own.beneath.highest.at, &own.beneath.need.at, &own.aboveNeed.at } )
          place->alongM = place->line < 0 ? 0.0 : places.exactM( *place );
      }
      for ( Excused &own : proposal.excused )
      {
        own.fromM = places.exactM( { own.line, own.fromM } );
        own.toM = places.exactM( { own.line, own.toM } );
        own.lowestAtM = places.exactM( { own.line, own.lowestAtM } );
        if ( own.need.at.line >= 0 )
          own.need.at.alongM = places.exactM( own.need.at );
      }
    }

    //! Settings come from levels; what is a multiple of the step but for rounding becomes one to the bit.
    void toSteps( Proposal &proposal, double stepPa )
    {
      constexpr double ROUNDING = 1e-6; // of a step
      for ( ProposedRegulator &own : proposal.regulators )
      {
        const double steps = stepPa > 0.0 ? own.setPa / stepPa : 0.0;
        if ( stepPa > 0.0 && std::abs( steps - std::round( steps ) ) < ROUNDING )
          own.setPa = std::round( steps ) * stepPa;
      }
    }

    Device deviceOf( const ProposedRegulator &regulator, const CanonicalDrawing &drawing, double risePa )
    {
      const CanonicalLine &line = drawing.lines[index( regulator.at.line )];
      Device device;
      device.kind = DeviceKind::Regulator;
      device.place = drawing.placeAt( line, regulator.at.alongM );
      device.setPa = regulator.setPa;
      device.risePa = risePa;
      device.direction =
        regulator.againstLine != line.reversed ? DeviceDirection::EndToStart : DeviceDirection::StartToEnd;
      return device;
    }

    void tellExcused( ProposalResult &result )
    {
      for ( const Excused &own : result.proposal.excused )
      {
        const CanonicalLine &line = result.after.drawing.lines[index( own.line )];
        Finding finding;
        finding.code = FindingCode::CannotBeMended;
        finding.line = line.drawn;
        finding.place = result.after.drawing.placeAt( line, own.lowestAtM );
        finding.lengthM = std::abs( own.toM - own.fromM );
        if ( own.need.any() )
          finding.figureM = own.need.elevationM;
        result.after.findings.push_back( finding );
      }
    }
  } // namespace

  ProposalResult solveProposal( const ProposalJob &job, Monitor &monitor )
  {
    ProposalResult result;
    StageMonitor first( monitor, 0.0, 0.4 );
    result.before = solveStatics( job.statics, first );
    StageMonitor second( monitor, 0.4, 0.6 );
    PipeGraph graph = proposalGraph( job.statics, result.before, second );
    ProposalPlaces places( job.statics, result.before, graph );
    for ( ;; )
    {
      stopIfCancelled( monitor );
      result.proposal = proposeOnGraph( graph, rulesOf( job ) );
      makeExact( result.proposal, places );
      toSteps( result.proposal, job.settingStepPa );
      StaticJob with = job.statics;
      with.schedule = true;
      for ( const ProposedRegulator &regulator : result.proposal.regulators )
        with.devices.push_back( deviceOf( regulator, result.before.drawing, job.risePa ) );
      result.devices = with.devices;
      stopIfCancelled( monitor );
      StageMonitor third( monitor, 0.6, 1.0 );
      std::vector<PlaceOnLine> failures;
      try
      {
        result.after = solveStatics( with, third );
        failures = checkProposal( result, 2.0 * job.statics.joins.toleranceM );
      }
      catch ( const Refusal & )
      {
        // Looped pipe only: a tree with regulators set below their inlets is never refused.
        if ( !giveWay( graph, {} ) )
          throw;
        continue;
      }
      if ( failures.empty() || !giveWay( graph, failures ) )
        break;
    }
    tellExcused( result );
    return result;
  }

} // namespace stillhead
