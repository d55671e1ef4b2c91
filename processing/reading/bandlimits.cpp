// SPDX-License-Identifier: GPL-2.0-or-later
// A comma between two digits is a decimal comma wherever another separator does the separating; where only commas stand
// it separates, and a list that then does not rise gets the same advice.
#include "processing/reading/bandlimits.h"

#include "processing/text/text.h"

#include <qgsexception.h>

#include <QRegularExpression>

#include <cmath>

namespace stillhead
{

  namespace
  {

    QString decimalMarkAdvice()
    {
      return Text::tr( "a point is the decimal mark, as in 2.5" );
    }

    void refuseDecimalComma( const QString &text )
    {
      static const QRegularExpression tightComma( QStringLiteral( "[0-9]+,[0-9]+" ) );
      static const QRegularExpression otherSeparator( QStringLiteral( "[0-9]\\s*;|[0-9]\\s+[-+.0-9]" ) );
      const QRegularExpressionMatch comma = tightComma.match( text );
      if ( comma.hasMatch() && text.contains( otherSeparator ) )
        throw QgsProcessingException(
          Text::tr( "BANDS: “%1” has a decimal comma, but %2; write the limits like 2.5; 3.5." )
            .arg( comma.captured(), decimalMarkAdvice() ) );
    }

  } // namespace

  std::vector<double> parseBandLimits( const QString &text )
  {
    static const QRegularExpression separators( QStringLiteral( "\\s*[,;]\\s*|\\s+" ) );
    refuseDecimalComma( text );
    std::vector<double> limits;
    const QStringList entries = text.trimmed().split( separators );
    for ( const QString &entry : entries )
    {
      const int number = static_cast<int>( limits.size() ) + 1;
      bool isNumber = false;
      const double limit = entry.toDouble( &isNumber );
      if ( entry.isEmpty() )
        throw QgsProcessingException(
          Text::tr( "BANDS: entry %1 is empty; write rising numbers with one separator between two of them." )
            .arg( number ) );
      if ( !isNumber || !std::isfinite( limit ) )
        throw QgsProcessingException( Text::tr(
          "BANDS: entry %1, “%2”, is not a number; write rising numbers separated by comma, semicolon or space." )
                                        .arg( number )
                                        .arg( entry ) );
      if ( !limits.empty() && limit <= limits.back() )
      {
        const QString before = entries.at( number - 2 );
        throw QgsProcessingException( Text::tr(
          "BANDS: entry %1, “%2”, is not above the entry before it, “%3”; write the limits in rising order (%4)." )
                                        .arg( number )
                                        .arg( entry, before, decimalMarkAdvice() ) );
      }
      limits.push_back( limit );
    }
    return limits;
  }

} // namespace stillhead
