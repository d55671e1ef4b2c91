// SPDX-License-Identifier: GPL-2.0-or-later
// A result list as Qt's views take it; the sort role gives bare values, the display role numbers as people read them.
#pragma once

#include "plugin/results/resultlist.h"

#include <QAbstractTableModel>

namespace stillhead
{

  class ResultModel : public QAbstractTableModel
  {
      Q_OBJECT

    public:
      static constexpr int SORT_ROLE = Qt::UserRole;

      using QAbstractTableModel::QAbstractTableModel;

      void setList( const ResultList &list );
      const ResultList &list() const { return mList; }

      int rowCount( const QModelIndex &parent = QModelIndex() ) const override;
      int columnCount( const QModelIndex &parent = QModelIndex() ) const override;
      QVariant data( const QModelIndex &index, int role ) const override;
      QVariant headerData( int section, Qt::Orientation orientation, int role ) const override;

    private:
      ResultList mList;
  };

  //! A value as people read it in the locale: one decimal, "yes" and "no", nothing for null.
  QString shownValue( const QVariant &value );

} // namespace stillhead
