// SPDX-License-Identifier: GPL-2.0-or-later
// STRETCHES: where to act.
#include "processing/parameternames.h"
#include "processing/writing/resulttable.h"

namespace stillhead
{

  namespace
  {

    QgsFields stretchFields()
    {
      QgsFields fields;
      fields.append( QgsField( field::STRETCH, compat::Field::Int ) );
      fields.append( QgsField( field::WHAT, compat::Field::String ) );
      fields.append( QgsField( field::P_WORST, compat::Field::Double ) );
      fields.append( QgsField( field::BEYOND, compat::Field::Double ) );
      fields.append( QgsField( field::Z_WORST, compat::Field::Double ) );
      fields.append( QgsField( field::LENGTH, compat::Field::Double ) );
      fields.append( QgsField( field::MAINLINES, compat::Field::Int ) );
      fields.append( QgsField( field::LATERALS, compat::Field::Int ) );
      fields.append( QgsField( field::CLOSE_CALL, compat::Field::Bool ) );
      fields.append( QgsField( field::LABEL, compat::Field::String ) );
      return fields;
    }

  } // namespace

  ResultTable stretchTable( const ResultContext &context, const std::vector<QgsGeometry> &outlines )
  {
    ResultTable table;
    table.output = output::STRETCHES;
    table.what = ResultLayer::Stretches;
    table.type = compat::WkbType::Polygon;
    table.fields = stretchFields();
    table.rows = context.result.stretches.size();
    table.make = [&context, &outlines]( std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const Stretch &stretch = context.result.stretches[i];
        const Piece &worst = context.result.pieces[static_cast<std::size_t>( stretch.worstPiece )];
        const Role role = context.lineOf( worst ).role;
        QgsAttributes attributes;
        attributes << static_cast<int>( i ) + 1 << ( stretch.over ? word::STRETCH_OVER : word::STRETCH_SHORT )
                   << context.units.pressureValue( stretch.worstPa ) << context.units.pressureValue( stretch.beyondPa )
                   << context.units.lengthValue( stretch.worstElevationM )
                   << context.units.lengthValue( stretch.lengthM ) << stretch.mainlines << stretch.laterals
                   << stretch.closeCall
                   << placeLabel( stretch.worstPa, stretch.worstElevationM, context.units,
                        context.limits.leastFor( role ), context.limits.mostFor( role ) );
        features[i - first].setAttributes( attributes );
        features[i - first].setGeometry( outlines[i] );
      }
    };
    return table;
  }

} // namespace stillhead
