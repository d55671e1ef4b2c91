// SPDX-License-Identifier: GPL-2.0-or-later
// Presets are typed for each unit, not converted from one another: 550 kPa, not 551.58.
#include "processing/reading/limitsreader.h"

#include "processing/parameternames.h"
#include "processing/reading/bandlimits.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/text.h"

#include <qgsexception.h>

#include <array>

namespace stillhead
{

  namespace
  {

    struct Preset
    {
        double least;
        double most;
        double regulatorMargin; //!< of LOCKUP_RISE and LEAST_DROP
        std::vector<double> bands;
    };

    //! In the order of PressureUnit.
    const Preset &presetFor( PressureUnit unit )
    {
      static const std::array<Preset, 5> presets { {
        { 30, 80, 10, { 30, 45, 60, 80, 100 } },
        { 200, 550, 70, { 200, 300, 400, 550, 700 } },
        { 2, 5.5, 0.7, { 2, 3, 4, 5.5, 7 } },
        { 20, 55, 7, { 20, 30, 40, 55, 70 } },
        { 70, 185, 25, { 70, 105, 140, 185, 230 } },
      } };
      return presets[static_cast<std::size_t>( unit )];
    }

    //! A limit, and whether the user gave it or a default stands in.
    struct Limit
    {
        QString name;
        double pascals = 0.0;
        bool given = false;
    };

    Limit readLimit( const ParameterValues &values, const QString &name, const DisplayUnits &units, double otherwisePa )
    {
      const std::optional<double> given = readPressure( values, name, units );
      return { name, given.value_or( otherwisePa ), given.has_value() };
    }

    QString describe( const Limit &limit, const DisplayUnits &units )
    {
      const QString pressure = units.givenPressureText( limit.pascals );
      return limit.given ? QStringLiteral( "%1 (%2)" ).arg( limit.name, pressure )
                         : Text::tr( "%1 (unset, so %2)" ).arg( limit.name, pressure );
    }

    void checkOrder( const Limit &least, const Limit &most, const DisplayUnits &units )
    {
      if ( least.pascals > most.pascals )
        throw QgsProcessingException( Text::tr( "%1 is above %2; give limits that leave room between them." )
                                        .arg( describe( least, units ), describe( most, units ) ) );
    }

    std::vector<double> toPascals( const std::vector<double> &pressures, const DisplayUnits &units )
    {
      std::vector<double> pascals;
      for ( const double pressure : pressures )
        pascals.push_back( units.pascals( pressure ) );
      return pascals;
    }

    //! LEAST, the two thirds between, MOST, and a quarter more; equal ones once.
    std::vector<double> bandsBetween( double leastPa, double mostPa )
    {
      const double third = ( mostPa - leastPa ) / 3.0;
      std::vector<double> bands;
      for ( const double limit : { leastPa, leastPa + third, mostPa - third, mostPa, 1.25 * mostPa } )
      {
        if ( bands.empty() || limit > bands.back() )
          bands.push_back( limit );
      }
      return bands;
    }

  } // namespace

  Limits readLimits( const ParameterValues &values, const DisplayUnits &units )
  {
    const Preset &preset = presetFor( units.pressureUnit() );
    const Limit least = readLimit( values, parameter::LEAST, units, units.pascals( preset.least ) );
    const Limit most = readLimit( values, parameter::MOST, units, units.pascals( preset.most ) );
    checkOrder( least, most, units );

    Limits limits;
    limits.leastPa = limits.lateralLeastPa = least.pascals;
    limits.mostPa = limits.lateralMostPa = most.pascals;
    if ( values.definition( parameter::LATERAL_LEAST ) )
    {
      const Limit lateralLeast = readLimit( values, parameter::LATERAL_LEAST, units, least.pascals );
      const Limit lateralMost = readLimit( values, parameter::LATERAL_MOST, units, most.pascals );
      checkOrder( lateralLeast, lateralMost, units );
      limits.lateralLeastPa = lateralLeast.pascals;
      limits.lateralMostPa = lateralMost.pascals;
    }

    if ( values.isSet( parameter::BANDS ) )
      limits.bandsPa = toPascals( parseBandLimits( values.text( parameter::BANDS ) ), units );
    else if ( least.given || most.given )
      limits.bandsPa = bandsBetween( least.pascals, most.pascals );
    else
      limits.bandsPa = toPascals( preset.bands, units );
    return limits;
  }

  double usualRegulatorMarginPa( const DisplayUnits &units )
  {
    return units.pascals( presetFor( units.pressureUnit() ).regulatorMargin );
  }

} // namespace stillhead
