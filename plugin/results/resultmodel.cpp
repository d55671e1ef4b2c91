// SPDX-License-Identifier: GPL-2.0-or-later
// Lists are replaced as a whole; there is nothing to edit.
#include "plugin/results/resultmodel.h"

#include <QLocale>

namespace stillhead
{

  QString shownValue( const QVariant &value )
  {
    if ( !value.isValid() || value.isNull() )
      return QString();
    switch ( static_cast<QMetaType::Type>( value.type() ) )
    {
    case QMetaType::Double:
      return QLocale().toString( value.toDouble(), 'f', 1 );
    case QMetaType::Bool:
      return value.toBool() ? ResultModel::tr( "yes" ) : ResultModel::tr( "no" );
    default:
      return value.toString();
    }
  }

  void ResultModel::setList( const ResultList &list )
  {
    beginResetModel();
    mList = list;
    endResetModel();
  }

  int ResultModel::rowCount( const QModelIndex &parent ) const
  {
    return parent.isValid() ? 0 : mList.rows.size();
  }

  int ResultModel::columnCount( const QModelIndex &parent ) const
  {
    return parent.isValid() ? 0 : mList.headings.size();
  }

  QVariant ResultModel::data( const QModelIndex &index, int role ) const
  {
    if ( !index.isValid() || index.row() >= mList.rows.size() )
      return QVariant();
    const QVariant value = mList.rows.at( index.row() ).values.value( index.column() );
    if ( role == SORT_ROLE )
      return value;
    if ( role == Qt::DisplayRole || role == Qt::ToolTipRole )
      return shownValue( value );
    const bool isNumber = value.canConvert<double>() && value.type() != QVariant::String;
    if ( role == Qt::TextAlignmentRole && isNumber )
      return static_cast<int>( Qt::AlignRight | Qt::AlignVCenter );
    return QVariant();
  }

  QVariant ResultModel::headerData( int section, Qt::Orientation orientation, int role ) const
  {
    if ( orientation == Qt::Horizontal && ( role == Qt::DisplayRole || role == Qt::ToolTipRole ) )
      return mList.headings.value( section );
    return QAbstractTableModel::headerData( section, orientation, role );
  }

} // namespace stillhead
