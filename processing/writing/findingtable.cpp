// SPDX-License-Identifier: GPL-2.0-or-later
// FINDINGS: what the user should look at. One without a place has no geometry.
#include "processing/parameternames.h"
#include "processing/text/findingtext.h"
#include "processing/writing/resulttable.h"

#include <qgspoint.h>

#include <cmath>

namespace stillhead
{

  namespace
  {

    QgsFields findingFields()
    {
      QgsFields fields;
      fields.append( QgsField( field::FINDING, compat::Field::String ) );
      fields.append( QgsField( field::MESSAGE, compat::Field::String ) );
      fields.append( QgsField( field::DRAWN_LAYER, compat::Field::String ) );
      fields.append( QgsField( field::DRAWN_FID, compat::Field::LongLong ) );
      fields.append( QgsField( field::GAP, compat::Field::Double ) );
      return fields;
    }

  } // namespace

  ResultTable findingTable( const ResultContext &context )
  {
    ResultTable table;
    table.output = output::FINDINGS;
    table.what = ResultLayer::Findings;
    table.type = compat::WkbType::Point;
    table.fields = findingFields();
    table.rows = context.result.findings.size();
    table.legend.field = field::FINDING;
    for ( const Finding &finding : context.result.findings )
      table.legend.values << QString::fromLatin1( findingName( finding.code ) );
    table.legend.values.removeDuplicates();
    table.make = [&context]( std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const Finding &finding = context.result.findings[i];
        QVariant layer;
        QVariant fid;
        if ( finding.line >= 0 )
        {
          const int number = context.drawn.drawing.lines[static_cast<std::size_t>( finding.line )].feature;
          const DrawnFeature &feature = context.drawn.features[static_cast<std::size_t>( number )];
          layer = drawnLayerName( feature.role );
          fid = static_cast<qlonglong>( feature.fid );
        }
        QgsAttributes attributes;
        attributes << QString::fromLatin1( findingName( finding.code ) )
                   << findingText( finding, context.drawn, context.names, context.units ) << layer << fid
                   << context.units.lengthValue( finding.gapM );
        features[i - first].setAttributes( attributes );
        if ( std::isfinite( finding.place.x ) && std::isfinite( finding.place.y ) )
          features[i - first].setGeometry(
            QgsGeometry( std::make_unique<QgsPoint>( finding.place.x, finding.place.y ) ) );
      }
    };
    return table;
  }

} // namespace stillhead
