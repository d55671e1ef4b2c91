// SPDX-License-Identifier: GPL-2.0-or-later
// Two boxes side by side; nothing else is asked.
#include "plugin/panel/unitsbar.h"

#include "plugin/panel/parametertexts.h"
#include "plugin/preview/sourcelook.h"
#include "processing/parameternames.h"

#include <QComboBox>
#include <QHBoxLayout>
#include <QLabel>

namespace stillhead
{

  UnitsBar::UnitsBar( QWidget *parent )
    : QWidget( parent )
    , mPressure( choiceBox( parameter::PRESSURE_UNIT, this ) )
    , mLength( choiceBox( parameter::LENGTH_UNIT, this ) )
  {
    for ( QComboBox *box : { mPressure, mLength } )
      box->setMinimumContentsLength( 4 );
    auto *label = new QLabel( tr( "&Units" ), this );
    label->setBuddy( mPressure );
    mPressure->setAccessibleName( tr( "Pressure unit" ) );
    mLength->setAccessibleName( tr( "Length unit" ) );
    auto *row = new QHBoxLayout( this );
    row->addWidget( label );
    row->addWidget( mPressure, 1 );
    row->addWidget( mLength, 1 );
    connect( mPressure, QOverload<int>::of( &QComboBox::activated ), this, &UnitsBar::edited );
    connect( mLength, QOverload<int>::of( &QComboBox::activated ), this, &UnitsBar::edited );
  }

  DisplayUnits UnitsBar::units() const
  {
    QVariantMap parameters;
    fill( parameters );
    return unitsOf( parameters );
  }

  void UnitsBar::fill( QVariantMap &parameters ) const
  {
    parameters.insert( parameter::PRESSURE_UNIT, QString::number( mPressure->currentIndex() ) );
    parameters.insert( parameter::LENGTH_UNIT, QString::number( mLength->currentIndex() ) );
  }

  void UnitsBar::showParameters( const QVariantMap &parameters )
  {
    mPressure->setCurrentIndex( parameters.value( parameter::PRESSURE_UNIT, 0 ).toInt() );
    mLength->setCurrentIndex( parameters.value( parameter::LENGTH_UNIT, 0 ).toInt() );
  }

} // namespace stillhead
