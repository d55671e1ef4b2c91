// SPDX-License-Identifier: GPL-2.0-or-later
// The units, in one place for the whole panel.
#pragma once

#include "processing/displayunits.h"

#include <QVariantMap>
#include <QWidget>

class QComboBox;

namespace stillhead
{

  class UnitsBar : public QWidget
  {
      Q_OBJECT

    public:
      explicit UnitsBar( QWidget *parent );

      DisplayUnits units() const;
      void fill( QVariantMap &parameters ) const;
      void showParameters( const QVariantMap &parameters );

    signals:
      //! The user has chosen other units.
      void edited();

    private:
      QComboBox *mPressure;
      QComboBox *mLength;
  };

} // namespace stillhead
