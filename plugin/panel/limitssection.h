// SPDX-License-Identifier: GPL-2.0-or-later
// Which pressures are acceptable, the bands between, and how much pipe lies in each.
#pragma once

#include "plugin/panel/section.h"

namespace stillhead
{

  class BandLegend;
  struct SolvedPlan;

  class LimitsSection : public Section
  {
      Q_OBJECT

    public:
      LimitsSection( const DisplayUnits &units, QWidget *parent );

      //! Bands are typed as text, so they are converted here.
      void setUnits( const DisplayUnits &units ) override;

      //! Shows the bands of \a plan; null: none.
      void describe( const SolvedPlan *plan );

    private:
      QLineEdit *mBands;
      BandLegend *mLegend;
  };

} // namespace stillhead
