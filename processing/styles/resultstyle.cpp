// SPDX-License-Identifier: GPL-2.0-or-later
// The texts that styles share, and the choice of style by output.
#include "processing/styles/resultstyle.h"

#include "core/judgement/limits.h"
#include "processing/displayunits.h"
#include "processing/parameternames.h"
#include "processing/styles/fieldaliases.h"
#include "processing/text/cautions.h"
#include "processing/text/text.h"

#include <qgsrasterlayer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  ResultStyle resultStyle( const Limits &limits, const DisplayUnits &units )
  {
    ResultStyle style;
    for ( double limitPa : limits.bandsPa )
      style.bandLimits << units.pressure( limitPa );
    style.least = units.pressure( limits.leastPa );
    style.most = units.pressure( limits.mostPa );
    style.lateralLeast = units.pressure( limits.lateralLeastPa );
    style.lateralMost = units.pressure( limits.lateralMostPa );
    style.pressureUnit = units.pressureName();
    style.lengthUnit = units.lengthName();
    return style;
  }

  QString bandText( int band, const ResultStyle &style )
  {
    const QString unit = style.pressureUnit;
    const QVector<double> &limits = style.bandLimits;
    if ( limits.isEmpty() )
      return Text::tr( "any pressure" );
    if ( band <= 0 )
      return Text::tr( "under %1 %2" ).arg( plainNumber( limits.first() ), unit );
    if ( band >= limits.size() )
      return Text::tr( "%1 %2 and over" ).arg( plainNumber( limits.last() ), unit );
    return Text::tr( "%1 to %2 %3" )
      .arg( plainNumber( limits.at( band - 1 ) ), plainNumber( limits.at( band ) ), unit );
  }

  QString legendCaution()
  {
    constexpr int LINE_LENGTH = 48;
    QStringList lines;
    const QStringList words = runningWaterCaution().split( ' ' );
    for ( const QString &word : words )
    {
      if ( !lines.isEmpty() && lines.last().size() + 1 + word.size() <= LINE_LENGTH )
        lines.last() += ' ' + word;
      else
        lines << word;
    }
    return lines.join( '\n' );
  }

  void styleResult( QgsMapLayer &layer, ResultLayer what, const ResultStyle &style )
  {
    if ( auto *raster = qobject_cast<QgsRasterLayer *>( &layer ) )
    {
      if ( what == ResultLayer::Surface )
        styleSurface( *raster, style );
      return;
    }
    auto *vector = qobject_cast<QgsVectorLayer *>( &layer );
    if ( !vector )
      return;
    switch ( what )
    {
    case ResultLayer::Spans:
      styleSpans( *vector, style );
      break;
    case ResultLayer::Nodes:
      styleNodes( *vector, style );
      break;
    case ResultLayer::Stretches:
      styleStretches( *vector, style );
      break;
    case ResultLayer::Extremes:
      styleExtremes( *vector, style );
      break;
    case ResultLayer::Findings:
      styleFindings( *vector, style );
      break;
    case ResultLayer::BandAreas:
      styleBandAreas( *vector, style );
      break;
    case ResultLayer::Regulators:
      styleRegulators( *vector, style );
      break;
    case ResultLayer::Boosters:
      styleBoosters( *vector, style );
      break;
    case ResultLayer::Comparison:
      styleComparison( *vector );
      break;
    case ResultLayer::GroundLimits:
      styleGroundLimits( *vector, style );
      break;
    case ResultLayer::Surface:
      return;
    }
    setFieldAliases( *vector, what, style );
  }

} // namespace stillhead
