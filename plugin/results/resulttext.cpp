// SPDX-License-Identifier: GPL-2.0-or-later
// Source: IETF RFC 4180, section 2.
#include "plugin/results/resulttext.h"

#include "plugin/results/resultmodel.h"

#include <QLocale>

namespace stillhead
{

  namespace
  {

    QString csvCell( const QVariant &value )
    {
      QString text;
      if ( value.isValid() && !value.isNull() )
        text = value.type() == QVariant::Double
          ? QString::number( value.toDouble(), 'g', QLocale::FloatingPointShortest )
          : value.toString();
      const bool needsQuotes =
        text.contains( ',' ) || text.contains( '"' ) || text.contains( '\n' ) || text.contains( '\r' );
      return needsQuotes ? '"' + text.replace( '"', QLatin1String( "\"\"" ) ) + '"' : text;
    }

  } // namespace

  QString csvText( const ResultList &list )
  {
    const auto lineOf = []( const QStringList &cells ) { return cells.join( ',' ) + QLatin1String( "\r\n" ); };
    QStringList headings;
    for ( const QString &heading : list.headings )
      headings << csvCell( heading );
    QString text = lineOf( headings );
    for ( const ResultRow &row : list.rows )
    {
      QStringList cells;
      for ( const QVariant &value : row.values )
        cells << csvCell( value );
      text += lineOf( cells );
    }
    return text;
  }

  QString clipboardText( const ResultList &list, const QVector<int> &rows )
  {
    QStringList lines { list.headings.join( '\t' ) };
    for ( const int row : rows )
    {
      QStringList cells;
      for ( const QVariant &value : list.rows.at( row ).values )
        cells << shownValue( value ).simplified();
      lines << cells.join( '\t' );
    }
    return lines.join( '\n' );
  }

} // namespace stillhead
