// SPDX-License-Identifier: GPL-2.0-or-later
// Conversion and the writing of numbers; independent of the session's language, so that reports compare.
#include "processing/displayunits.h"

#include "core/units/water.h"
#include "processing/text/text.h"

#include <QLocale>

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    QString withMinusSign( QString number )
    {
      // "−0" would claim a sign that rounding took away.
      static const QString digits = QStringLiteral( "123456789" );
      const bool isZero =
        std::none_of( number.cbegin(), number.cend(), []( QChar c ) { return digits.contains( c ); } );
      if ( number.startsWith( '-' ) )
        number.replace( 0, 1, isZero ? QString() : QString( QChar( 0x2212 ) ) );
      return number;
    }

    bool isFine( PressureUnit unit )
    {
      return unit == PressureUnit::Bar || unit == PressureUnit::MetreOfWater;
    }

    QVariant valueOrNull( double value )
    {
      return std::isnan( value ) ? QVariant() : QVariant( value );
    }

  } // namespace

  DisplayUnits::DisplayUnits( PressureUnit pressureUnit, LengthUnit lengthUnit, double waterCelsius )
    : mPressureUnit( pressureUnit )
    , mLengthUnit( lengthUnit )
    , mWaterCelsius( waterCelsius )
    , mSpecificWeightNPerM3( waterSpecificWeightNPerM3( waterCelsius ) )
    , mPascalsPerUnit( pascalsPer( pressureUnit, mSpecificWeightNPerM3 ) )
    , mMetresPerUnit( metresPer( lengthUnit ) )
  {
  }

  QVariant DisplayUnits::pressureValue( double pascals ) const
  {
    return valueOrNull( pressure( pascals ) );
  }

  QVariant DisplayUnits::lengthValue( double metres ) const
  {
    return valueOrNull( length( metres ) );
  }

  QString DisplayUnits::pressureName() const
  {
    switch ( mPressureUnit )
    {
    case PressureUnit::Psi:
      return QStringLiteral( "psi" );
    case PressureUnit::Kilopascal:
      return QStringLiteral( "kPa" );
    case PressureUnit::Bar:
      return QStringLiteral( "bar" );
    case PressureUnit::MetreOfWater:
      return Text::tr( "m of water" );
    case PressureUnit::FootOfWater:
      return Text::tr( "ft of water" );
    }
    return QString();
  }

  QString DisplayUnits::lengthName() const
  {
    return mLengthUnit == LengthUnit::Foot ? QStringLiteral( "ft" ) : QStringLiteral( "m" );
  }

  QString DisplayUnits::pressureText( double pascals, int moreDecimals ) const
  {
    const int decimals = ( isFine( mPressureUnit ) ? 1 : 0 ) + moreDecimals;
    return QStringLiteral( "%1 %2" ).arg( groupedNumber( pressure( pascals ), decimals ), pressureName() );
  }

  QString DisplayUnits::lengthText( double metres, int moreDecimals ) const
  {
    const int decimals = ( mLengthUnit == LengthUnit::Metre ? 1 : 0 ) + moreDecimals;
    return QStringLiteral( "%1 %2" ).arg( groupedNumber( length( metres ), decimals ), lengthName() );
  }

  QString DisplayUnits::givenPressureText( double pascals ) const
  {
    return QStringLiteral( "%1 %2" ).arg( plainNumber( pressure( pascals ) ), pressureName() );
  }

  QString DisplayUnits::givenLengthText( double metres ) const
  {
    return QStringLiteral( "%1 %2" ).arg( plainNumber( length( metres ) ), lengthName() );
  }

  QString DisplayUnits::constantText() const
  {
    // A height of water per height would say nothing.
    PressureUnit unit = mPressureUnit;
    if ( unit == PressureUnit::MetreOfWater )
      unit = PressureUnit::Kilopascal;
    else if ( unit == PressureUnit::FootOfWater )
      unit = PressureUnit::Psi;
    const DisplayUnits shown( unit, mLengthUnit, mWaterCelsius );
    return Text::tr( "%1 %2 per %3 of height, water at %4 °C" )
      .arg( groupedNumber( shown.pressure( mSpecificWeightNPerM3 * mMetresPerUnit ), 5 ), shown.pressureName(),
        lengthName(), plainNumber( mWaterCelsius ) );
  }

  QString plainNumber( double number, int decimals )
  {
    QString text = QString::number( number, 'f', decimals );
    if ( text.contains( '.' ) )
    {
      while ( text.endsWith( '0' ) )
        text.chop( 1 );
      if ( text.endsWith( '.' ) )
        text.chop( 1 );
    }
    return withMinusSign( text );
  }

  QString groupedNumber( double number, int decimals )
  {
    return withMinusSign( QLocale( QLocale::English, QLocale::UnitedStates ).toString( number, 'f', decimals ) );
  }

} // namespace stillhead
