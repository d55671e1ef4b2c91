// SPDX-License-Identifier: GPL-2.0-or-later
// One list with what can be done with it: sort, go to the place, copy, save as CSV.
#pragma once

#include "plugin/results/resultmodel.h"

#include <QWidget>

class QSortFilterProxyModel;
class QTableView;

namespace stillhead
{

  class ResultTab : public QWidget
  {
      Q_OBJECT

    public:
      explicit ResultTab( QWidget *parent );

      void setList( const ResultList &list );
      const ResultModel &model() const { return *mModel; }
      QTableView *view() const { return mView; }

      //! Puts the selected rows, or all if none is selected, on the clipboard.
      void copy() const;

      //! Writes the list to \a path. \returns an error text, blank when all is well
      QString saveCsv( const QString &path ) const;

    signals:
      //! The user wants to see this place, in the CRS of the mainlines.
      void placeChosen( const QgsGeometry &place );

      //! Something is to be said to the user; \a isProblem tells how.
      void said( const QString &text, bool isProblem );

    private:
      void goTo( const QModelIndex &shown );
      void askForCsv();

      ResultModel *mModel;
      QSortFilterProxyModel *mSorted;
      QTableView *mView;
  };

} // namespace stillhead
