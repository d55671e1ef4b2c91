// SPDX-License-Identifier: GPL-2.0-or-later
// The user's units: what stands in fields, numbers and sentences, and the way to and from core's SI. NaN stays NaN.
#pragma once

#include "core/units/units.h"

#include <QString>
#include <QVariant>

namespace stillhead
{

  class DisplayUnits
  {
    public:
      DisplayUnits( PressureUnit pressureUnit, LengthUnit lengthUnit, double waterCelsius );

      PressureUnit pressureUnit() const { return mPressureUnit; }
      LengthUnit lengthUnit() const { return mLengthUnit; }
      double waterCelsius() const { return mWaterCelsius; }
      double specificWeightNPerM3() const { return mSpecificWeightNPerM3; }

      double pressure( double pascals ) const { return pascals / mPascalsPerUnit; }
      double pascals( double pressure ) const { return pressure * mPascalsPerUnit; }
      double length( double metres ) const { return metres / mMetresPerUnit; }
      double metres( double length ) const { return length * mMetresPerUnit; }

      //! The same as attributes and outputs: a null value where \a pascals or \a metres is NaN.
      QVariant pressureValue( double pascals ) const;
      QVariant lengthValue( double metres ) const;

      //! Short names: "psi", "m of water"; "ft".
      QString pressureName() const;
      QString lengthName() const;

      //! Whole psi, kPa and feet of water; one decimal of bar and metres of water. "95 psi"
      QString pressureText( double pascals, int moreDecimals = 0 ) const;

      //! Whole feet, tenths of metres. "348 ft"
      QString lengthText( double metres, int moreDecimals = 0 ) const;

      //! A pressure as the user gave it: as many decimals as it needs, up to six, with the unit.
      QString givenPressureText( double pascals ) const;
      QString givenLengthText( double metres ) const;

      //! The specific weight in the chosen units: "0.43314 psi per ft of height, water at 15 °C".
      QString constantText() const;

    private:
      PressureUnit mPressureUnit;
      LengthUnit mLengthUnit;
      double mWaterCelsius;
      double mSpecificWeightNPerM3;
      double mPascalsPerUnit;
      double mMetresPerUnit;
  };

  //! \a number without trailing zeros, at most \a decimals of them, with a point and a real minus sign.
  QString plainNumber( double number, int decimals = 6 );

  //! \a number with exactly \a decimals decimals, a point and a real minus sign; thousands parted by commas.
  QString groupedNumber( double number, int decimals );

} // namespace stillhead
