// SPDX-License-Identifier: GPL-2.0-or-later
// A decimal comma is read where it is the locale's; a point always is.
#include "plugin/panel/quantityedit.h"

#include <QLocale>

#include <cmath>

namespace stillhead
{

  namespace
  {

    //! Decimals that show a converted figure well enough; the figure itself is not rounded.
    constexpr int SHOWN_DECIMALS = 3;

  } // namespace

  QuantityEdit::QuantityEdit( Quantity quantity, const DisplayUnits &units, QWidget *parent )
    : QLineEdit( parent )
    , mQuantity( quantity )
    , mUnits( units )
    , mTypedUnits( units )
  {
    setMinimumWidth( fontMetrics().horizontalAdvance( QStringLiteral( "0000.000" ) ) );
    connect( this, &QLineEdit::textEdited, this, &QuantityEdit::noteEdit );
    showUnit();
  }

  void QuantityEdit::setQuantity( Quantity quantity )
  {
    if ( quantity == mQuantity )
      return;
    mQuantity = quantity;
    showFigure( std::nullopt );
    mTyped.reset();
    showUnit();
  }

  void QuantityEdit::showUnit()
  {
    setPlaceholderText( mQuantity == Quantity::Pressure ? mUnits.pressureName() : mUnits.lengthName() );
  }

  double QuantityEdit::converted( double figure, const DisplayUnits &from, const DisplayUnits &to ) const
  {
    if ( mQuantity == Quantity::Length )
      return from.lengthUnit() == to.lengthUnit() ? figure : to.length( from.metres( figure ) );
    return from.pressureUnit() == to.pressureUnit() ? figure : to.pressure( from.pascals( figure ) );
  }

  void QuantityEdit::setUnits( const DisplayUnits &units )
  {
    if ( !isReadable() )
    {
      mUnits = units;
      showUnit();
      return;
    }
    mUnits = units;
    showUnit();
    showFigure( mTyped ? std::optional<double>( converted( *mTyped, mTypedUnits, mUnits ) ) : std::nullopt );
  }

  void QuantityEdit::showFigure( const std::optional<double> &figure )
  {
    QString text;
    if ( figure )
    {
      text = QLocale().toString( *figure, 'f', SHOWN_DECIMALS );
      text.remove( QLocale().groupSeparator() );
      while ( text.endsWith( QLocale().zeroDigit() ) )
        text.chop( 1 );
      if ( text.endsWith( QLocale().decimalPoint() ) )
        text.chop( 1 );
    }
    setText( text );
  }

  std::optional<double> QuantityEdit::read() const
  {
    bool isNumber = false;
    double figure = QLocale().toDouble( text().trimmed(), &isNumber );
    if ( !isNumber )
      figure = QLocale::c().toDouble( text().trimmed(), &isNumber );
    return isNumber && std::isfinite( figure ) ? std::optional<double>( figure ) : std::nullopt;
  }

  bool QuantityEdit::isReadable() const
  {
    return text().trimmed().isEmpty() || read();
  }

  void QuantityEdit::noteEdit()
  {
    mTyped = read();
    mTypedUnits = mUnits;
    emit edited();
  }

  QString QuantityEdit::parameterText() const
  {
    if ( text().trimmed().isEmpty() || !mTyped )
      return text().trimmed();
    return QString::number( converted( *mTyped, mTypedUnits, mUnits ), 'g', QLocale::FloatingPointShortest );
  }

  void QuantityEdit::setParameterText( const QString &text )
  {
    bool isNumber = false;
    const double figure = text.toDouble( &isNumber );
    mTyped = isNumber ? std::optional<double>( figure ) : std::nullopt;
    mTypedUnits = mUnits;
    if ( isNumber )
      showFigure( mTyped );
    else
      setText( text );
  }

} // namespace stillhead
