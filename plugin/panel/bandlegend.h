// SPDX-License-Identifier: GPL-2.0-or-later
// The bands with their colours and how much pipe lies in each: a legend that follows the drawing.
#pragma once

#include "processing/solvedplan.h"

#include <QVector>
#include <QWidget>

class QGridLayout;

namespace stillhead
{

  //! Metres of pipe in every band, the lowest first.
  QVector<double> lengthsByBand( const SolvedPlan &plan );

  class BandLegend : public QWidget
  {
      Q_OBJECT

    public:
      explicit BandLegend( QWidget *parent );

      //! Shows the bands of \a plan; null: none.
      void showPlan( const SolvedPlan *plan );

    private:
      void addBand( const SolvedPlan &plan, int band, double lengthM );

      QGridLayout *mRows;
  };

} // namespace stillhead
