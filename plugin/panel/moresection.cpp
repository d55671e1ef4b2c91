// SPDX-License-Identifier: GPL-2.0-or-later
// Folded until somebody asks for it.
#include "plugin/panel/moresection.h"

#include "plugin/panel/parametertexts.h"
#include "processing/parameternames.h"

#include <QCheckBox>

namespace stillhead
{

  MoreSection::MoreSection( const DisplayUnits &units, QWidget *parent )
    : Section( tr( "More" ), units, parent )
    , mJoinCrossings( new QCheckBox( tr( "&Join lines that cross" ), this ) )
  {
    const QuantityEdit::Quantity pressure = QuantityEdit::Quantity::Pressure;
    const QuantityEdit::Quantity length = QuantityEdit::Quantity::Length;
    addQuantity( tr( "Laterals at least" ), parameter::LATERAL_LEAST, pressure );
    addQuantity( tr( "Laterals at most" ), parameter::LATERAL_MOST, pressure );
    addQuantity( tr( "Join within" ), parameter::JOIN_TOLERANCE, length );
    addQuantity( tr( "Source within" ), parameter::SOURCE_REACH, length );
    addQuantity( tr( "Depth of sags" ), parameter::SAG_DEPTH, length );
    addQuantity( tr( "Error of the terrain" ), parameter::TERRAIN_RMSE, length );
    addQuantity( tr( "Error of the reading" ), parameter::READING_ERROR, pressure );
    explain( mJoinCrossings, parameter::JOIN_CROSSINGS );
    addRow( QString(), mJoinCrossings );
    mJoinCrossings->setAccessibleName( tr( "Join lines that cross" ) );
    connect( mJoinCrossings, &QCheckBox::clicked, this, &Section::edited );
    setCollapsed( true );
  }

  void MoreSection::fillMore( QVariantMap &parameters ) const
  {
    if ( mJoinCrossings->isChecked() )
      parameters.insert( parameter::JOIN_CROSSINGS, QStringLiteral( "true" ) );
  }

  void MoreSection::showMore( const QVariantMap &parameters )
  {
    mJoinCrossings->setChecked( parameters.value( parameter::JOIN_CROSSINGS ).toBool() );
  }

} // namespace stillhead
