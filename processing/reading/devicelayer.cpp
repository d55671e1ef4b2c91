// SPDX-License-Identifier: GPL-2.0-or-later
// Kinds and directions are compared without regard to case.
#include "processing/reading/devicelayer.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

#include <array>

namespace stillhead
{

  namespace
  {

    constexpr std::array KINDS { DeviceKind::Regulator, DeviceKind::Booster, DeviceKind::CheckValve,
      DeviceKind::ClosedValve, DeviceKind::ControlValve };
    constexpr std::array DIRECTIONS { DeviceDirection::FromTheSource, DeviceDirection::StartToEnd,
      DeviceDirection::EndToStart };

    QString kindText( DeviceKind kind )
    {
      return QString::fromLatin1( deviceKindName( kind ) );
    }

    DeviceKind kindOf( const PointRow &row )
    {
      const QString given = row.text( field::KIND );
      QStringList known;
      for ( const DeviceKind kind : KINDS )
      {
        if ( given.compare( kindText( kind ), Qt::CaseInsensitive ) == 0 )
          return kind;
        known << kindText( kind );
      }
      row.refuse( Text::tr( "`kind` is “%1”; write one of: %2." ).arg( given, known.join( QStringLiteral( ", " ) ) ) );
    }

    DeviceDirection directionOf( const PointRow &row )
    {
      const QString given = row.text( field::DIRECTION );
      if ( given.isEmpty() )
        return DeviceDirection::FromTheSource;
      QStringList known;
      for ( const DeviceDirection direction : DIRECTIONS )
      {
        if ( given.compare( directionText( direction ), Qt::CaseInsensitive ) == 0 )
          return direction;
        known << directionText( direction );
      }
      row.refuse(
        Text::tr( "`direction` is “%1”; write one of: %2." ).arg( given, known.join( QStringLiteral( ", " ) ) ) );
    }

    Device deviceOf( const PointRow &row, double lockupRisePa )
    {
      Device device;
      device.kind = kindOf( row );
      device.direction = directionOf( row );
      device.setPa = row.pressurePa( field::SET );
      device.risePa = row.pressurePa( field::RISE ).value_or( lockupRisePa );
      device.elevationM = row.lengthM( field::ELEVATION );
      if ( device.kind == DeviceKind::Regulator && !device.setPa )
        row.refuse( Text::tr( "the regulator has no `set`; give its outlet pressure while water runs." ) );
      const std::optional<double> boost = row.pressurePa( field::BOOST );
      device.boostLowPa = row.pressurePa( field::BOOST_LOW );
      if ( device.kind == DeviceKind::Booster && !boost )
        row.refuse( Text::tr( "the booster has no `boost`; give the pressure that it adds at no flow." ) );
      device.boostPa = boost.value_or( 0.0 );
      if ( device.boostLowPa.value_or( 0.0 ) > device.boostPa )
        row.refuse( Text::tr( "`boost_low` is above `boost`; a pump adds most at no flow: swap them." ) );
      return device;
    }

  } // namespace

  QString directionText( DeviceDirection direction )
  {
    switch ( direction )
    {
    case DeviceDirection::FromTheSource:
      return word::FROM_THE_SOURCE;
    case DeviceDirection::StartToEnd:
      return word::START_TO_END;
    case DeviceDirection::EndToStart:
      return word::END_TO_START;
    }
    return QString();
  }

  DeviceInput readDevices( const QgsProcessingFeatureSource &layer, double lockupRisePa, const DisplayUnits &units,
    const QgsCoordinateReferenceSystem &crs, const QgsCoordinateTransformContext &transforms, Drawing &drawing )
  {
    DeviceInput input;
    readPoints( layer, parameter::DEVICES, units, crs, transforms, drawing,
      [&]( const PointRow &row, const PlanPoint &place, int system ) {
        Device device = deviceOf( row, lockupRisePa );
        device.place = place;
        device.system = system;
        input.devices.push_back( device );
        input.names << row.name();
      } );
    return input;
  }

} // namespace stillhead
