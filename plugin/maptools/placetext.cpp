// SPDX-License-Identifier: GPL-2.0-or-later
// Figures with one decimal more than in labels, since one place is asked for, not a map read.
#include "plugin/maptools/placetext.h"

#include "processing/text/findingtext.h"

#include <QCoreApplication>

#include <cmath>

namespace stillhead
{

  namespace
  {

    class Place
    {
        Q_DECLARE_TR_FUNCTIONS( stillhead::Place )
    };

    QString pressuresText( const PlaceFigures &figures, const DisplayUnits &units )
    {
      const QString high = units.pressureText( figures.highPa, 1 );
      if ( figures.lowPa == figures.highPa )
        return high;
      return Place::tr( "%1 (summer peak) to %2 (night, winter)" ).arg( units.pressureText( figures.lowPa, 1 ), high );
    }

    QString heightsText( const PlaceFigures &figures, const DisplayUnits &units )
    {
      if ( std::isnan( figures.groundM ) )
        return std::isnan( figures.pipeM ) ? Place::tr( "no terrain here" )
                                           : Place::tr( "pipe at %1" ).arg( units.lengthText( figures.pipeM, 1 ) );
      return Place::tr( "ground %1, pipe %2" )
        .arg( units.lengthText( figures.groundM, 1 ), units.lengthText( figures.pipeM, 1 ) );
    }

    //! How far it is from the limits.
    QString limitsText( const PlaceMargins &margins, const DisplayUnits &units )
    {
      QStringList parts;
      if ( margins.overPa > 0.0 )
        parts << Place::tr( "%1 over" ).arg( units.pressureText( margins.overPa, 1 ) );
      if ( margins.underPa > 0.0 )
        parts << Place::tr( "%1 under" ).arg( units.pressureText( margins.underPa, 1 ) );
      return parts.isEmpty() ? Place::tr( "within limits" ) : parts.join( QStringLiteral( ", " ) );
    }

    //! What the state means here, where pressure does not say it all.
    QString stateText( const PlaceFigures &figures, State state, const SolvedPlan &plan, Role role )
    {
      const DisplayUnits &units = plan.units;
      switch ( state )
      {
      case State::NoSource:
        return Place::tr( "joined to no source" );
      case State::NoTerrain:
        return Place::tr( "no figure: the terrain has no elevation here" );
      case State::AboveStaticLevel:
        return Place::tr( "no water at rest: the pipe lies %1 above the static level" )
          .arg( units.lengthText( figures.pipeM - figures.levels.lowM, 1 ) );
      case State::PastASummit:
        return Place::tr( "no water at rest: the way here leads over higher pipe" );
      case State::OverAndUnder:
      case State::OverLimit:
      case State::UnderLimit:
      case State::WithinLimits:
        break;
      }
      return limitsText( marginsOf( figures, plan.limits, role ), units );
    }

    QString featureText( const PlaceFigures &figures, const SolvedPlan &plan )
    {
      const ResultContext context = plan.context();
      const Piece &piece = plan.result.pieces[static_cast<std::size_t>( figures.piece )];
      const DrawnFeature &feature = context.featureOf( context.lineOf( piece ) );
      return Place::tr( "%1 feature %2" ).arg( drawnLayerName( feature.role ) ).arg( feature.fid );
    }

  } // namespace

  QString pipePlaceText( const PlaceFigures &figures, const SolvedPlan &plan )
  {
    QStringList lines;
    if ( !std::isnan( figures.highPa ) )
      lines << pressuresText( figures, plan.units );
    if ( figures.piece >= 0 )
    {
      const Piece &piece = plan.result.pieces[static_cast<std::size_t>( figures.piece )];
      lines << stateText( figures, piece.state, plan, plan.context().lineOf( piece ).role );
    }
    lines << heightsText( figures, plan.units );
    if ( figures.piece >= 0 )
      lines << featureText( figures, plan );
    return lines.join( '\n' );
  }

  QString groundPlaceText( const PlaceFigures &figures, const SolvedPlan &plan )
  {
    if ( std::isnan( figures.highPa ) )
      return Place::tr( "no terrain here" );
    QStringList lines { Place::tr( "Pipe here would hold %1" ).arg( pressuresText( figures, plan.units ) ) };
    const double standsM = figures.levels.lowM - figures.groundM;
    if ( standsM < 0.0 )
      lines << Place::tr( "ground lies %1 above the static level" ).arg( plan.units.lengthText( -standsM, 1 ) );
    else
      lines << limitsText( marginsOf( figures, plan.limits, Role::Mainline ), plan.units );
    lines << Place::tr( "ground %1" ).arg( plan.units.lengthText( figures.groundM, 1 ) );
    return lines.join( '\n' );
  }

} // namespace stillhead
