// SPDX-License-Identifier: GPL-2.0-or-later
// Range checks that need nothing but the value itself.
#include "processing/reading/unitsreader.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

#include <qgsexception.h>

namespace stillhead
{

  DisplayUnits readUnits( const ParameterValues &values )
  {
    const double celsius = values.number( parameter::WATER_TEMPERATURE );
    if ( celsius < 0.0 || celsius > 40.0 )
      throw QgsProcessingException(
        Text::tr( "WATER_TEMPERATURE is %1 °C, out of range; give 0 to 40 °C." ).arg( plainNumber( celsius ) ) );
    return DisplayUnits( static_cast<PressureUnit>( values.choice( parameter::PRESSURE_UNIT ) ),
      static_cast<LengthUnit>( values.choice( parameter::LENGTH_UNIT ) ), celsius );
  }

  std::optional<double> readPressure( const ParameterValues &values, const QString &name, const DisplayUnits &units )
  {
    const std::optional<double> given = values.optionalNumber( name );
    if ( !given )
      return std::nullopt;
    const double pascals = units.pascals( *given );
    if ( pascals < 0.0 || pascals > HIGHEST_PRESSURE_PA )
      throw QgsProcessingException(
        Text::tr( "%1 is %2, out of range; give a pressure from 0 to %3, or choose another unit by PRESSURE_UNIT." )
          .arg( name, units.givenPressureText( pascals ), units.pressureText( HIGHEST_PRESSURE_PA ) ) );
    return pascals;
  }

  std::optional<double> readDistance( const ParameterValues &values, const QString &name, const DisplayUnits &units )
  {
    const std::optional<double> given = values.optionalNumber( name );
    if ( !given )
      return std::nullopt;
    if ( *given < 0.0 )
      throw QgsProcessingException( Text::tr( "%1 is %2 %3, below 0; give a distance of 0 or more." )
                                      .arg( name, plainNumber( *given ), units.lengthName() ) );
    return units.metres( *given );
  }

  double readSagDepthM( const ParameterValues &values, const DisplayUnits &units )
  {
    const double unset = units.lengthUnit() == LengthUnit::Foot ? 2.0 : 0.5;
    return readDistance( values, parameter::SAG_DEPTH, units ).value_or( units.metres( unset ) );
  }

} // namespace stillhead
