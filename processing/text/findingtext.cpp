// SPDX-License-Identifier: GPL-2.0-or-later
// One sentence or two for each code.
#include "processing/text/findingtext.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

namespace stillhead
{

  namespace
  {

    //! "mainlines feature 12"
    QString featureText( int line, const DrawnInput &drawn )
    {
      if ( line < 0 )
        return QString();
      const DrawnLine &drawnLine = drawn.drawing.lines[static_cast<std::size_t>( line )];
      const DrawnFeature &feature = drawn.features[static_cast<std::size_t>( drawnLine.feature )];
      return Text::tr( "%1 feature %2" ).arg( drawnLayerName( feature.role ) ).arg( feature.fid );
    }

    QString systemText( int line, const DrawnInput &drawn )
    {
      const DrawnLine &drawnLine = drawn.drawing.lines[static_cast<std::size_t>( line )];
      const std::string &name = drawn.drawing.systems[static_cast<std::size_t>( drawnLine.system )];
      return name.empty() ? Text::tr( "without a system" )
                          : Text::tr( "of system “%1”" ).arg( QString::fromStdString( name ) );
    }

    QString sentenceOf( const Finding &finding, const DrawnInput &drawn, const DisplayUnits &units )
    {
      const QString own = featureText( finding.line, drawn );
      const QString other = featureText( finding.otherLine, drawn );
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
        return Text::tr( "Only one value is given for the source, so the low case is the high one. A low value "
                         "(SOURCE_LOW) shows what is served in the summer peak." );
      case FindingCode::UnusualPressure:
        return Text::tr( "The source's pressure of %1 lies outside %2 to %3; check its unit." )
          .arg( units.pressureText( finding.figurePa, 1 ), units.pressureText( 15.0 * PASCALS_PER_PSI ),
            units.pressureText( 250.0 * PASCALS_PER_PSI ) );
      case FindingCode::PumpDutyNotGiven:
        return Text::tr(
          "The pump's pressure while running (BOOST_LOW) is not given; its no-flow pressure is taken for the "
          "low case too, which shows more than it gives." );
      }
      return QString();
    }

  } // namespace

  QString drawnLayerName( Role role )
  {
    return role == Role::Mainline ? word::MAINLINES : word::LATERALS;
  }

  QString findingText( const Finding &finding, const DrawnInput &drawn, const DisplayUnits &units )
  {
    QString text = sentenceOf( finding, drawn, units );
    // Layer names open some sentences.
    if ( !text.isEmpty() )
      text[0] = text[0].toUpper();
    return text;
  }

} // namespace stillhead
