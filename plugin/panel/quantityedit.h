// SPDX-License-Identifier: GPL-2.0-or-later
// A field for a pressure or a length in the chosen unit, which may stay blank. Another unit converts what is shown; the
// figure that was typed is kept, so that switching back gives it unrounded.
#pragma once

#include "processing/displayunits.h"

#include <QLineEdit>

#include <optional>

namespace stillhead
{

  class QuantityEdit : public QLineEdit
  {
      Q_OBJECT

    public:
      enum class Quantity
      {
        Pressure,
        Length
      };

      QuantityEdit( Quantity quantity, const DisplayUnits &units, QWidget *parent = nullptr );

      //! Another quantity leaves nothing of a figure that was typed for the first.
      void setQuantity( Quantity quantity );

      //! Shows the same quantity in \a units.
      void setUnits( const DisplayUnits &units );

      //! What is shown, as a parameter of the algorithms: a number with a point, as typed; blank, or text that is no number.
      QString parameterText() const;

      //! Shows a parameter's value, given in the units set last.
      void setParameterText( const QString &text );

      //! True for a number and for nothing at all.
      bool isReadable() const;

      const DisplayUnits &units() const { return mUnits; }

    signals:
      //! The user has changed the figure.
      void edited();

    private:
      void noteEdit();
      void showFigure( const std::optional<double> &figure );
      void showUnit();
      std::optional<double> read() const;
      double converted( double figure, const DisplayUnits &from, const DisplayUnits &to ) const;

      Quantity mQuantity;
      DisplayUnits mUnits;
      std::optional<double> mTyped; //!< in mTypedUnits
      DisplayUnits mTypedUnits;
  };

} // namespace stillhead
