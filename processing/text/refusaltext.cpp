// SPDX-License-Identifier: GPL-2.0-or-later
// One sentence for each reason.
#include "processing/text/refusaltext.h"

#include "processing/text/text.h"

#include <cmath>

namespace stillhead
{

  namespace
  {

    class RefusalSentence
    {
      public:
        RefusalSentence( const Refusal &refusal, const RefusalNames &names, const DisplayUnits &units )
          : mRefusal( refusal )
          , mNames( names )
          , mUnits( units )
        {
        }

        //! "The source", or "The source “Lamp Row meter”" where there are several.
        QString source() const
        {
          const QString name = mNames.sources.value( mRefusal.sources.empty() ? 0 : mRefusal.sources.front() );
          return name.isEmpty() ? Text::tr( "The source" ) : Text::tr( "The source “%1”" ).arg( name );
        }

        QString named( int number ) const
        {
          return QStringLiteral( "“%1”" ).arg(
            mNames.sources.value( mRefusal.sources.at( static_cast<std::size_t>( number ) ) ) );
        }

        QString devices() const
        {
          QStringList parts;
          for ( const int device : mRefusal.devices )
            parts << QStringLiteral( "“%1”" ).arg( mNames.devices.value( device ) );
          return parts.join( Text::tr( ", " ) );
        }

        QString way() const
        {
          QStringList parts;
          for ( const int line : mRefusal.lines )
            parts << mNames.line( line );
          return parts.isEmpty() ? Text::tr( "at the same joint" )
                                 : Text::tr( "by way of %1" ).arg( parts.join( Text::tr( ", " ) ) );
        }

        QString difference() const { return mUnits.lengthText( mRefusal.figureM, 1 ); }

      private:
        const Refusal &mRefusal;
        const RefusalNames &mNames;
        const DisplayUnits &mUnits;
    };

  } // namespace

  QString refusalText(
    const Refusal &refusal, const RefusalNames &names, double sourceReachM, const DisplayUnits &units )
  {
    const RefusalSentence sentence( refusal, names, units );
    switch ( refusal.reason )
    {
    case Refusal::Reason::NoLines:
      return Text::tr(
        "None of the drawn lines has any length, so there is no pipe to compute; draw the mainlines first." );
    case Refusal::Reason::SourceTooFar:
      if ( std::isnan( refusal.figureM ) )
        return Text::tr( "%1 belongs to a system that no drawn line has; give both the same `system`." )
          .arg( sentence.source() );
      return Text::tr( "%1 lies %2 from the nearest pipe, farther than SOURCE_REACH (%3); move it onto the pipe, "
                       "or raise SOURCE_REACH." )
        .arg( sentence.source(), units.lengthText( refusal.figureM, 2 ), units.givenLengthText( sourceReachM ) );
    case Refusal::Reason::SourceNoTerrain:
      return Text::tr(
        "The terrain has no elevation at the source; give SOURCE_ELEVATION (in a layer: `elevation`), or a "
        "terrain that reaches there." );
    case Refusal::Reason::NoOverlap:
      return Text::tr(
        "No drawn line lies on the terrain; check that lines and terrain cover the same ground and carry "
        "the right CRS." );
    case Refusal::Reason::SourcesDisagree:
      return Text::tr( "The sources %1 and %2 stand on one connected system %3, but their static levels differ by %4; "
                       "check the readings, or part the system with a closed valve, regulator or check valve." )
        .arg( sentence.named( 0 ), sentence.named( 1 ), sentence.way(), sentence.difference() );
    case Refusal::Reason::LevelOverWater:
      return Text::tr(
        "The open water of %1 cannot hold the level that %2 brings through %3: it is %4 higher and would "
        "overflow; put a regulator or closed valve between, or check the levels." )
        .arg( sentence.named( 0 ), sentence.named( 1 ), sentence.devices(), sentence.difference() );
    case Refusal::Reason::LevelRaisesItself:
      return Text::tr(
        "Water that passes %1 comes back to where it started with more pressure each time round; check their "
        "directions, or part the loop with a closed valve." )
        .arg( sentence.devices() );
    case Refusal::Reason::DeviceNoTerrain:
      return Text::tr( "The terrain has no elevation at the device %1; give its `elevation`." )
        .arg( sentence.devices() );
    }
    return QString();
  }

} // namespace stillhead
