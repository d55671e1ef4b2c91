// SPDX-License-Identifier: GPL-2.0-or-later
// One sentence or two for each code.
#include "processing/text/findingtext.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

#include <cmath>

namespace stillhead
{

  namespace
  {

    QString systemText( int line, const DrawnInput &drawn )
    {
      const DrawnLine &drawnLine = drawn.drawing.lines[static_cast<std::size_t>( line )];
      const std::string &name = drawn.drawing.systems[static_cast<std::size_t>( drawnLine.system )];
      return name.empty() ? Text::tr( "without a system" )
                          : Text::tr( "of system “%1”" ).arg( QString::fromStdString( name ) );
    }

    QString wayText( const std::vector<int> &way, const DrawnInput &drawn )
    {
      QStringList parts;
      for ( const int line : way )
        parts << featureText( line, drawn );
      return parts.isEmpty() ? Text::tr( "at the same joint" ) : parts.join( Text::tr( ", " ) );
    }

    //! True where the source is a row of SOURCES.
    bool inLayer( const Finding &finding, const FeedNames &names )
    {
      return !names.sources.value( finding.source ).isEmpty();
    }

    QString sourceName( const Finding &finding, const FeedNames &names )
    {
      return inLayer( finding, names ) ? Text::tr( "the source “%1”" ).arg( names.sources.value( finding.source ) )
                                       : Text::tr( "the source" );
    }

    QString sentenceOf(
      const Finding &finding, const DrawnInput &drawn, const FeedNames &names, const DisplayUnits &units )
    {
      const QString own = featureText( finding.line, drawn );
      const QString other = featureText( finding.otherLine, drawn );
      const QString device = names.devices.value( finding.device );
      switch ( finding.code )
      {
      case FindingCode::NearMiss:
        return Text::tr(
          "An end of %1 stops %2 short of %3 and is not joined to it. If water passes there, move the end "
          "onto the line." )
          .arg( own, units.lengthText( finding.gapM, 2 ), other );
      case FindingCode::CrossingNotJoined:
        return finding.joinedByEnd
          ? Text::tr( "An end lies where %1 and %2 cross, and joins both." ).arg( own, other )
          : Text::tr( "%1 and %2 cross without a joint. If water passes there, end a line at the crossing, or set "
                      "JOIN_CROSSINGS." )
              .arg( own, other );
      case FindingCode::NoSource:
        return Text::tr( "%1 of pipe is joined to no source." ).arg( units.lengthText( finding.lengthM ) );
      case FindingCode::NoTerrain:
        return Text::tr( "%1 of pipe lies where the terrain has no elevation; its pressure is not known." )
          .arg( units.lengthText( finding.lengthM ) );
      case FindingCode::Summit:
        return Text::tr( "The pipe rises %1 above the static level of the low case here; %2 of pipe beyond lies past a "
                         "summit and is not served." )
          .arg( units.lengthText( finding.figureM, 1 ), units.lengthText( finding.lengthM ) );
      case FindingCode::SummitUnknown:
        return Text::tr(
          "Every way to %1 of pipe leads through pipe without elevation, so a summit on the way cannot be "
          "ruled out." )
          .arg( units.lengthText( finding.lengthM ) );
      case FindingCode::SystemsTouch:
        return Text::tr( "%1 (%2) meets %3 (%4); lines of different systems are not joined." )
          .arg( own, systemText( finding.line, drawn ), other, systemText( finding.otherLine, drawn ) );
      case FindingCode::Duplicate:
        return Text::tr( "%1 is drawn on top of %2, vertex by vertex; both are computed." ).arg( own, other );
      case FindingCode::NoLength:
        return Text::tr( "%1 has no geometry or no length, and is left out." ).arg( own );
      case FindingCode::NoSurveyZ:
        return Text::tr( "%1 has no surveyed Z (missing, or zero throughout); the terrain is used for it." ).arg( own );
      case FindingCode::OneReading:
        return Text::tr( "Only one value is given for %1, so the low case is the high one. A low value (%2) shows what "
                         "is served in the summer peak." )
          .arg( sourceName( finding, names ),
            inLayer( finding, names ) ? QStringLiteral( "`low`" ) : parameter::SOURCE_LOW );
      case FindingCode::UnusualPressure:
        return Text::tr( "The pressure of %1, %2, lies outside %3 to %4; check its unit." )
          .arg( sourceName( finding, names ), units.pressureText( finding.figurePa, 1 ),
            units.pressureText( 15.0 * PASCALS_PER_PSI ), units.pressureText( 250.0 * PASCALS_PER_PSI ) );
      case FindingCode::PumpDutyNotGiven:
        if ( finding.device >= 0 )
          return Text::tr( "The booster “%1” has no `boost_low` (its pressure while running); its no-flow pressure is "
                           "taken for the low case too, which shows more than it gives." )
            .arg( device );
        return Text::tr(
          "The pressure while running of the pump at %1 (%2) is not given; its no-flow pressure is taken "
          "for the low case too, which shows more than it gives." )
          .arg( sourceName( finding, names ),
            inLayer( finding, names ) ? QStringLiteral( "`boost_low`" ) : parameter::BOOST_LOW );
      case FindingCode::LevelsDiffer:
        return Text::tr(
          "The levels of the sources “%1” and “%2” differ by %3; the higher counts in the high case, the lower "
          "in the low case." )
          .arg( names.sources.value( finding.source ), names.sources.value( finding.otherSource ),
            units.pressureText( finding.figurePa, 1 ) );
      case FindingCode::DeviceOffTheLine:
        return std::isnan( finding.gapM )
          ? Text::tr( "The device “%1” belongs to a system that no drawn line has, and is left out." ).arg( device )
          : Text::tr( "The device “%1” stands %2 from the nearest pipe (%3) and is left out; move it onto the line." )
              .arg( device, units.lengthText( finding.gapM, 2 ), own );
      case FindingCode::DeviceAtAJoint:
        return Text::tr(
          "The device “%1” stands where it is not clear which leg it belongs to, and is left out; move it a "
          "little along its leg, farther than the join tolerance." )
          .arg( device );
      case FindingCode::RegulatorWideOpen:
        return Text::tr( "The regulator “%1” is wide open in the low case: only %2 reaches it, less than its setting." )
          .arg( device, units.pressureText( finding.figurePa, 1 ) );
      case FindingCode::RegulatorShortOfDifferential:
        return Text::tr(
          "The regulator “%1” has only %2 more at its inlet than its setting in the low case, which may be too "
          "little to hold it; lower the setting, or see its maker's sheet." )
          .arg( device, units.pressureText( finding.figurePa, 1 ) );
      case FindingCode::RegulatorBypassed:
        return Text::tr(
          "Water has a way round the regulator “%1” (%2), so it does not hold; part the way with a closed valve "
          "or a second regulator." )
          .arg( device, wayText( finding.way, drawn ) );
      case FindingCode::RegulatorHeldShut:
        return Text::tr( "The regulator “%1” is held shut: its outlet side is fed to a larger level." ).arg( device );
      case FindingCode::PressureMayBeTrapped:
        return Text::tr( "Below the check valve “%1” pressure may stay trapped above the figures shown." )
          .arg( device );
      case FindingCode::CannotBeMended:
        if ( std::isnan( finding.figureM ) )
          return Text::tr(
            "No plan was found that brings %1 of pipe here within limits and keeps all that is served "
            "(looped pipe, or legs that lie on each other); part the loop with closed valves, or prove the "
            "pipe for the pressure shown." )
            .arg( units.lengthText( finding.lengthM ) );
        return Text::tr(
          "No regulator can bring %1 of pipe here within limits while pipe at %2 behind it is served; prove the "
          "pipe for the pressure shown, or route round." )
          .arg( units.lengthText( finding.lengthM ), units.lengthText( finding.figureM, 1 ) );
      }
      return QString();
    }

  } // namespace

  QString featureText( int line, const DrawnInput &drawn )
  {
    if ( line < 0 )
      return QString();
    const DrawnLine &drawnLine = drawn.drawing.lines[static_cast<std::size_t>( line )];
    const DrawnFeature &feature = drawn.features[static_cast<std::size_t>( drawnLine.feature )];
    return Text::tr( "%1 feature %2" ).arg( drawnLayerName( feature.role ) ).arg( feature.fid );
  }

  QString drawnLayerName( Role role )
  {
    return role == Role::Mainline ? word::MAINLINES : word::LATERALS;
  }

  QString findingText(
    const Finding &finding, const DrawnInput &drawn, const FeedNames &names, const DisplayUnits &units )
  {
    QString text = sentenceOf( finding, drawn, names, units );
    // Layer names open some sentences.
    if ( !text.isEmpty() )
      text[0] = text[0].toUpper();
    return text;
  }

} // namespace stillhead
