// SPDX-License-Identifier: GPL-2.0-or-later
// Unset limits show what stands in for them.
#include "plugin/panel/limitssection.h"

#include "plugin/panel/bandlegend.h"
#include "processing/parameternames.h"
#include "processing/reading/bandlimits.h"
#include "processing/solvedplan.h"

#include <qgsexception.h>

#include <QLabel>

namespace stillhead
{

  LimitsSection::LimitsSection( const DisplayUnits &units, QWidget *parent )
    : Section( tr( "Limits" ), units, parent )
  {
    addQuantity( tr( "&At least" ), parameter::LEAST, QuantityEdit::Quantity::Pressure );
    addQuantity( tr( "At mos&t" ), parameter::MOST, QuantityEdit::Quantity::Pressure );
    mBands = addText( tr( "&Bands at" ), parameter::BANDS );
    mLegend = new BandLegend( this );
    addRow( QString(), mLegend );
  }

  void LimitsSection::setUnits( const DisplayUnits &units )
  {
    const DisplayUnits before = this->units();
    Section::setUnits( units );
    if ( mBands->text().trimmed().isEmpty() || units.pressureUnit() == before.pressureUnit() )
      return;
    try
    {
      QStringList converted;
      for ( const double limit : parseBandLimits( mBands->text() ) )
        converted << plainNumber( units.pressure( before.pascals( limit ) ), 3 );
      mBands->setText( converted.join( QStringLiteral( ", " ) ) );
    }
    catch ( const QgsException & )
    {
      // What cannot be read stays as it was typed; the answer says what is wrong with it.
    }
  }

  void LimitsSection::describe( const SolvedPlan *plan )
  {
    mLegend->showPlan( plan );
    if ( !plan )
    {
      setSummary( QString() );
      return;
    }
    QStringList limits;
    for ( const double limit : plan->style.bandLimits )
      limits << plainNumber( limit, 3 );
    mBands->setPlaceholderText( limits.join( QStringLiteral( ", " ) ) );
    setSummary(
      tr( "%1 to %2 %3, %n bands", nullptr, plan->style.bandCount() )
        .arg( plainNumber( plan->style.least, 3 ), plainNumber( plan->style.most, 3 ), plan->style.pressureUnit ) );
  }

} // namespace stillhead
