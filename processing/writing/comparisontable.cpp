// SPDX-License-Identifier: GPL-2.0-or-later
// An option that was refused keeps its row, with the reason in place of figures.
#include "processing/writing/comparisontable.h"

#include "processing/parameternames.h"
#include "processing/reading/sourcereader.h"

#include <qgspointxy.h>

namespace stillhead
{

  namespace
  {

    QgsFields comparisonFields()
    {
      QgsFields fields;
      const auto append = [&]( compat::FieldType type, std::initializer_list<QString> names ) {
        for ( const QString &name : names )
          fields.append( QgsField( name, type ) );
      };
      append( compat::Field::Int, { field::RANK } );
      append( compat::Field::String, { field::NAME, field::SOURCE } );
      append( compat::Field::Double,
        { field::LEVEL_HIGH, field::LEVEL_LOW, field::LENGTH_WITHIN, field::LENGTH_OVER, field::LENGTH_SHORT,
          field::P_LOW, field::P_HIGH } );
      append( compat::Field::Int, { field::REGULATORS } );
      append( compat::Field::Bool, { field::PROVEN } );
      append( compat::Field::Double, { field::LENGTH_NOT_MENDED } );
      append( compat::Field::Int, { field::BOOSTERS } );
      append( compat::Field::Double, { field::BOOST } );
      append( compat::Field::String, { field::NOTE } );
      return fields;
    }

    QgsAttributes attributesOf( const OptionRow &row, std::size_t rank, const DisplayUnits &units )
    {
      const OptionFigures &own = row.figures;
      const Totals &totals = own.totals;
      QgsAttributes values;
      values << static_cast<int>( rank ) + 1 << row.name << sourceText( row.source, units );
      if ( own.refusal )
      {
        for ( int i = 0; i < 12; ++i )
          values << QVariant();
      }
      else
      {
        values << units.lengthValue( own.levels.highM ) << units.lengthValue( own.levels.lowM )
               << units.lengthValue( totals.withinM ) << units.lengthValue( totals.overM )
               << units.lengthValue( totals.shortM ) << units.pressureValue( totals.lowestPa )
               << units.pressureValue( totals.highestPa ) << own.regulators << own.proven
               << units.lengthValue( own.notMendedM ) << own.boosters << units.pressureValue( own.boostPa );
      }
      values << row.note;
      return values;
    }

  } // namespace

  ResultTable comparisonTable( const ResultContext &context, const std::vector<OptionRow> &rows )
  {
    ResultTable table;
    table.output = output::COMPARISON;
    table.what = ResultLayer::Comparison;
    table.type = compat::WkbType::Point;
    table.fields = comparisonFields();
    table.rows = rows.size();
    table.make = [&context, &rows]( std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const PlanPoint &place = rows[i].source.place;
        features[i - first].setAttributes( attributesOf( rows[i], i, context.units ) );
        features[i - first].setGeometry( QgsGeometry::fromPointXY( QgsPointXY( place.x, place.y ) ) );
      }
    };
    return table;
  }

} // namespace stillhead
