// SPDX-License-Identifier: GPL-2.0-or-later
// Where the pressure comes from: the place, what is known there, and a pump.
#pragma once

#include "plugin/panel/section.h"

class QPushButton;

namespace stillhead
{

  class WaterSection : public Section
  {
      Q_OBJECT

    public:
      WaterSection( const DisplayUnits &units, QWidget *parent );

      //! The source as a point parameter; blank before one is picked.
      const QString &place() const { return mPlace; }
      void setPlace( const QString &place );

      //! Shows whether the map is waiting for the place to be picked.
      void showPicking( bool picking );

      //! Says what is known at the source; blank: nothing.
      void describe( const QString &text );

    signals:
      //! The user wants to pick the source on the map, or no longer.
      void pickWanted( bool wanted );

    protected:
      void fillMore( QVariantMap &parameters ) const override;
      void showMore( const QVariantMap &parameters ) override;

    private:
      void fitToKind();
      void showPickText();

      QPushButton *mPick;
      QComboBox *mKind;
      QuantityEdit *mHigh;
      QuantityEdit *mLow;
      QuantityEdit *mGauge;
      QLabel *mNote;
      QString mPlace;
  };

} // namespace stillhead
