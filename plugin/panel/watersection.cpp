// SPDX-License-Identifier: GPL-2.0-or-later
// The values are asked for by season; their quantity follows the kind.
#include "plugin/panel/watersection.h"

#include "core/statics/source.h"
#include "plugin/panel/parametertexts.h"
#include "processing/parameternames.h"

#include <QComboBox>
#include <QLabel>
#include <QPushButton>

namespace stillhead
{

  WaterSection::WaterSection( const DisplayUnits &units, QWidget *parent )
    : Section( tr( "Water" ), units, parent )
    , mPick( new QPushButton( this ) )
  {
    mPick->setCheckable( true );
    showPickText();
    explain( mPick, parameter::SOURCE );
    addRow( tr( "Source" ), mPick );
    mKind = addChoice( tr( "&Known" ), parameter::SOURCE_KIND );
    const QuantityEdit::Quantity pressure = QuantityEdit::Quantity::Pressure;
    const QuantityEdit::Quantity length = QuantityEdit::Quantity::Length;
    mHigh = addQuantity( tr( "&Night, winter" ), parameter::SOURCE_VALUE, pressure );
    mLow = addQuantity( tr( "&Summer peak" ), parameter::SOURCE_LOW, pressure );
    mGauge = addQuantity( tr( "&Gauge above ground" ), parameter::GAUGE_HEIGHT, length );
    addQuantity( tr( "Surveyed gr&ound" ), parameter::SOURCE_ELEVATION, length );
    addQuantity( tr( "Pump at no &flow" ), parameter::BOOST, pressure );
    addQuantity( tr( "Pump &running" ), parameter::BOOST_LOW, pressure );
    addText( tr( "Not&e" ), parameter::SOURCE_NOTE );
    mNote = addNote();
    mNote->setObjectName( QStringLiteral( "SourceNote" ) );
    connect( mKind, QOverload<int>::of( &QComboBox::currentIndexChanged ), this, &WaterSection::fitToKind );
    connect( mPick, &QPushButton::toggled, this, &WaterSection::pickWanted );
  }

  void WaterSection::fitToKind()
  {
    const bool isReading = static_cast<SourceKind>( mKind->currentIndex() ) == SourceKind::PressureReading;
    const auto quantity = isReading ? QuantityEdit::Quantity::Pressure : QuantityEdit::Quantity::Length;
    mHigh->setQuantity( quantity );
    mLow->setQuantity( quantity );
    mGauge->setEnabled( isReading );
  }

  void WaterSection::showPickText()
  {
    mPick->setText( mPlace.isEmpty() ? tr( "&Pick on the map" ) : tr( "&Pick another place" ) );
  }

  void WaterSection::setPlace( const QString &place )
  {
    mPlace = place;
    showPickText();
    emit edited();
  }

  void WaterSection::showPicking( bool picking )
  {
    mPick->setChecked( picking );
  }

  void WaterSection::describe( const QString &text )
  {
    mNote->setVisible( !text.isEmpty() );
    mNote->setText( text );
    setSummary( text );
  }

  void WaterSection::fillMore( QVariantMap &parameters ) const
  {
    if ( !mPlace.isEmpty() )
      parameters.insert( parameter::SOURCE, mPlace );
  }

  void WaterSection::showMore( const QVariantMap &parameters )
  {
    mPlace = parameters.value( parameter::SOURCE ).toString();
    showPickText();
  }

} // namespace stillhead
