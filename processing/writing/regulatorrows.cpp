// SPDX-License-Identifier: GPL-2.0-or-later
// Figures come from the run with the devices in place; a proposal adds what only it knows: windows, places and reasons.
#include "processing/writing/regulatortable.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    //! A bound that nothing sets is no figure.
    double figureOf( double bound )
    {
      return std::isfinite( bound ) ? bound : NOT_A_FIGURE;
    }

    //! What is known of a regulator that did not find its place when the plan was tried.
    RegulatorRow withoutPlace( const ProposedRegulator &proposed, int device )
    {
      RegulatorRow row;
      row.standing.device = device;
      row.standing.on = proposed.at;
      row.standing.elevationM = proposed.planned.elevationM;
      row.standing.inletHighPa = proposed.inletHighPa;
      row.standing.inletLowPa = proposed.inletLowPa;
      row.standing.outletHighPa = proposed.outletHighPa;
      row.standing.outletLowPa = proposed.outletLowPa;
      row.figures.stage = proposed.stage;
      row.figures.servesUpToM = proposed.servesUpToM;
      row.figures.holdsDownToM = proposed.holdsDownToM;
      row.figures.failedOpenPa = proposed.failedOpenPa;
      return row;
    }

  } // namespace

  std::vector<RegulatorRow> scheduleRows( const StaticJob &job, const StaticResult &result )
  {
    std::vector<RegulatorRow> rows;
    for ( const ScheduleRow &figures : scheduleOf( job, result ) )
    {
      RegulatorRow row;
      row.figures = figures;
      row.standing = result.devices[figures.standing];
      row.device = job.devices[static_cast<std::size_t>( row.standing.device )];
      rows.push_back( row );
    }
    return rows;
  }

  std::vector<RegulatorRow> proposalRows( const StaticJob &job, const ProposalResult &result )
  {
    const std::vector<RegulatorRow> standing = scheduleRows( job, result.after );
    const std::vector<ProposedRegulator> &regulators = result.proposal.regulators;
    const std::size_t given = result.devices.size() - regulators.size();
    std::vector<RegulatorRow> rows;
    for ( std::size_t i = 0; i < regulators.size(); ++i )
    {
      const ProposedRegulator &proposed = regulators[i];
      const int device = static_cast<int>( given + i );
      const auto found = std::find_if( standing.begin(), standing.end(),
        [device]( const RegulatorRow &row ) { return row.standing.device == device; } );
      RegulatorRow row = found == standing.end() ? withoutPlace( proposed, device ) : *found;
      row.device = result.devices[static_cast<std::size_t>( device )];
      row.placeFromM = proposed.placeFromM;
      row.placeToM = proposed.placeToM;
      row.figures.setLeastPa = figureOf( proposed.setLeastPa );
      row.figures.setMostPa = figureOf( proposed.setMostPa );
      row.proposed = proposed;
      row.inlets = static_cast<int>( std::count_if( regulators.begin(), regulators.end(),
        [&]( const ProposedRegulator &own ) { return own.group == proposed.group; } ) );
      rows.push_back( row );
    }
    return rows;
  }

} // namespace stillhead
