// SPDX-License-Identifier: GPL-2.0-or-later
// Each kind of source has its own unit; high and low are compared as given.
#include "processing/reading/sourcereader.h"

#include "processing/parameternames.h"
#include "processing/reading/placereader.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/text.h"

#include <qgsexception.h>

namespace stillhead
{

  namespace
  {

    bool isReading( SourceKind kind )
    {
      return kind == SourceKind::PressureReading;
    }

    QString valueText( SourceKind kind, double value, const DisplayUnits &units )
    {
      return isReading( kind ) ? units.givenPressureText( value ) : units.givenLengthText( value );
    }

    //! In pascals for a reading, in metres for a level.
    std::optional<double> readValue(
      const ParameterValues &values, const QString &name, SourceKind kind, const DisplayUnits &units )
    {
      if ( isReading( kind ) )
        return readPressure( values, name, units );
      const std::optional<double> given = values.optionalNumber( name );
      return given ? std::optional<double>( units.metres( *given ) ) : std::nullopt;
    }

    void readValues( Source &source, const ParameterValues &values, const DisplayUnits &units )
    {
      const std::optional<double> high = readValue( values, parameter::SOURCE_VALUE, source.kind, units );
      if ( !high )
        throw QgsProcessingException( isReading( source.kind )
            ? Text::tr( "SOURCE_VALUE is not given; give the pressure read at rest, in %1." )
                .arg( units.pressureName() )
            : Text::tr( "SOURCE_VALUE is not given; give the water level, in %1." ).arg( units.lengthName() ) );
      source.high = *high;
      source.low = readValue( values, parameter::SOURCE_LOW, source.kind, units );
      if ( source.low && *source.low > source.high )
        throw QgsProcessingException(
          Text::tr(
            "SOURCE_LOW (%1) is above SOURCE_VALUE (%2); the low case must not exceed the high one: swap them." )
            .arg( valueText( source.kind, *source.low, units ), valueText( source.kind, source.high, units ) ) );
    }

    void readPump( Source &source, const ParameterValues &values, const DisplayUnits &units )
    {
      const std::optional<double> boost = readPressure( values, parameter::BOOST, units );
      source.boostLowPa = readPressure( values, parameter::BOOST_LOW, units );
      if ( source.boostLowPa && !boost )
        throw QgsProcessingException(
          Text::tr( "BOOST_LOW is given without BOOST; give what the pump adds at no flow as well." ) );
      source.boostPa = boost.value_or( 0.0 );
      if ( source.boostLowPa && *source.boostLowPa > source.boostPa )
        throw QgsProcessingException(
          Text::tr( "BOOST_LOW (%1) is above BOOST (%2); a pump adds most at no flow: swap them." )
            .arg( units.givenPressureText( *source.boostLowPa ), units.givenPressureText( source.boostPa ) ) );
    }

    void readHeights(
      Source &source, const ParameterValues &values, const DisplayUnits &units, QgsProcessingFeedback &feedback )
    {
      if ( const std::optional<double> ground = values.optionalNumber( parameter::SOURCE_ELEVATION ) )
        source.groundElevationM = units.metres( *ground );
      const double gaugeHeight = values.number( parameter::GAUGE_HEIGHT );
      if ( isReading( source.kind ) )
        source.gaugeHeightM = units.metres( gaugeHeight );
      else if ( gaugeHeight != 0.0 )
        feedback.pushWarning( Text::tr( "GAUGE_HEIGHT counts only for a pressure read on a gauge and is left out." ) );
    }

  } // namespace

  SourceInput readSource( const ParameterValues &values, const DisplayUnits &units,
    const QgsCoordinateReferenceSystem &crs, QgsProcessingFeedback &feedback )
  {
    if ( !values.isSet( parameter::SOURCE ) )
      throw QgsProcessingException(
        Text::tr( "SOURCE is not given; choose the point where the pressure comes from." ) );
    SourceInput input;
    input.source.kind = static_cast<SourceKind>( values.choice( parameter::SOURCE_KIND ) );
    readValues( input.source, values, units );
    readPump( input.source, values, units );
    readHeights( input.source, values, units, feedback );
    if ( values.definition( parameter::SOURCE_REACH ) )
      input.reachM = readDistance( values, parameter::SOURCE_REACH, units ).value_or( input.reachM );
    input.note = values.text( parameter::SOURCE_NOTE );
    input.source.place = readPlace( values, parameter::SOURCE, crs );
    return input;
  }

  QString sourceText( const Source &source, const DisplayUnits &units )
  {
    QString text = valueText( source.kind, source.high, units );
    if ( source.low )
      text += Text::tr( " (low case %1)" ).arg( valueText( source.kind, *source.low, units ) );
    switch ( source.kind )
    {
    case SourceKind::PressureReading:
      text =
        Text::tr( "a pressure of %1 read %2 above ground" ).arg( text, units.givenLengthText( source.gaugeHeightM ) );
      break;
    case SourceKind::WaterLevel:
      text = Text::tr( "a water level at %1" ).arg( text );
      break;
    case SourceKind::LevelAboveGround:
      text = Text::tr( "a water level of %1 above ground" ).arg( text );
      break;
    }
    if ( source.boostPa > 0.0 )
      text += source.boostLowPa
        ? Text::tr( " and a pump that adds %1 at no flow, %2 running" )
            .arg( units.givenPressureText( source.boostPa ), units.givenPressureText( *source.boostLowPa ) )
        : Text::tr( " and a pump that adds %1" ).arg( units.givenPressureText( source.boostPa ) );
    return text;
  }

} // namespace stillhead
