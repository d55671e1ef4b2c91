// SPDX-License-Identifier: GPL-2.0-or-later
// A proposed regulator by the reason that core gives, a given device by what it does at rest.
#include "processing/text/whytext.h"

#include "processing/text/text.h"

namespace stillhead
{

  namespace
  {

    QString pipeBelowText(
      const RegulatorRow &row, const ProposedRegulator &own, const Limits &limits, const DisplayUnits &units )
    {
      return Text::tr(
        "Without it pipe below would see up to %1 at rest, over %2; locked up at %3 it holds pipe down to "
        "%4 within limits, and set at %5 it serves pipe up to %6." )
        .arg( units.pressureText( own.failedOpenPa, 1 ), units.givenPressureText( limits.mostFor( own.role ) ),
          units.pressureText( own.setPa + row.device.risePa, 1 ), units.lengthText( row.figures.holdsDownToM ),
          units.pressureText( own.setPa, 1 ), units.lengthText( row.figures.servesUpToM ) );
    }

    QString proposedText(
      const RegulatorRow &row, const ProposedRegulator &own, const Limits &limits, const DisplayUnits &units )
    {
      switch ( own.reason )
      {
      case RegulatorReason::PipeBelowIsOver:
        return pipeBelowText( row, own, limits, units );
      case RegulatorReason::GroundNeedsLevel:
        return Text::tr(
          "Pipe at %1 needs more level from the regulator above than pipe down to %2 stands, so a further "
          "stage lowers it here." )
          .arg( units.lengthText( own.aboveNeed.elevationM ), units.lengthText( own.beneath.lowest.elevationM ) );
      case RegulatorReason::SplitsTheReduction:
        return Text::tr(
          "It takes its share of a reduction that one regulator alone could not make with the drop and the "
          "ratio asked for." );
      case RegulatorReason::FeedsALoop:
        return Text::tr( "One of %1 inlets of looped pipe that is held as one pressure zone: were one left open, water "
                         "would go round the others." )
          .arg( row.inlets );
      }
      return QString();
    }

    QString statusText( const RegulatorRow &row, const DisplayUnits &units )
    {
      const double setPa = row.device.setPa.value_or( 0.0 );
      switch ( row.standing.status )
      {
      case RegulatorStatus::None:
        return Text::tr( "Given; no water reaches it." );
      case RegulatorStatus::HeldShut:
        return Text::tr( "Given; it is held shut, for its outlet side is fed to a larger level." );
      case RegulatorStatus::WideOpen:
        return Text::tr( "Given; it is wide open in the low case, when only %1 reaches it." )
          .arg( units.pressureText( row.standing.inletLowPa, 1 ) );
      case RegulatorStatus::ShortOfDifferential:
        return Text::tr(
          "Given; in the low case its inlet is only %1 above its setting, which may be too little to hold." )
          .arg( units.pressureText( row.standing.inletLowPa - setPa, 1 ) );
      case RegulatorStatus::Holding:
        return Text::tr( "Given; it holds %1 while water runs and %2 at no flow." )
          .arg( units.pressureText( setPa, 1 ), units.pressureText( setPa + row.device.risePa, 1 ) );
      }
      return QString();
    }

    QString givenText( const RegulatorRow &row, const DisplayUnits &units )
    {
      if ( row.device.regulates() )
        return statusText( row, units );
      switch ( row.device.kind )
      {
      case DeviceKind::Booster:
        return Text::tr( "Given; it adds %1 at no flow and %2 while running." )
          .arg( units.pressureText( row.device.boostPa, 1 ),
            units.pressureText( row.device.boostLowPa.value_or( row.device.boostPa ), 1 ) );
      case DeviceKind::CheckValve:
        return Text::tr( "Given; water passes it one way only." );
      case DeviceKind::ClosedValve:
        return Text::tr( "Given; it parts two pressure zones." );
      default:
        return Text::tr( "Given; laterals begin here." );
      }
    }

  } // namespace

  QString whyText( const RegulatorRow &row, const Limits &limits, const DisplayUnits &units )
  {
    return row.proposed ? proposedText( row, *row.proposed, limits, units ) : givenText( row, units );
  }

} // namespace stillhead
