// SPDX-License-Identifier: GPL-2.0-or-later
// NODES: places where pipes end or meet.
#include "processing/parameternames.h"
#include "processing/writing/resulttable.h"

#include <qgspoint.h>

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    QString kindName( NodeKind kind )
    {
      switch ( kind )
      {
      case NodeKind::End:
        return word::NODE_END;
      case NodeKind::Joint:
        return word::NODE_JOINT;
      case NodeKind::Source:
        return word::NODE_SOURCE;
      }
      return QString();
    }

    QgsFields nodeFields()
    {
      QgsFields fields;
      fields.append( QgsField( field::NODE, compat::Field::Int ) );
      fields.append( QgsField( field::KIND, compat::Field::String ) );
      fields.append( QgsField( field::DEGREE, compat::Field::Int ) );
      fields.append( QgsField( field::Z, compat::Field::Double ) );
      fields.append( QgsField( field::P_LOW, compat::Field::Double ) );
      fields.append( QgsField( field::P_HIGH, compat::Field::Double ) );
      fields.append( QgsField( field::STATE, compat::Field::String ) );
      fields.append( QgsField( field::PRESSURE_ZONE, compat::Field::Int ) );
      return fields;
    }

  } // namespace

  QgsGeometry pointZM( const PlanPoint &place, double z, double m )
  {
    return QgsGeometry( std::make_unique<QgsPoint>( compat::WkbType::PointZM, place.x, place.y, z, m ) );
  }

  ResultTable nodeTable( const ResultContext &context )
  {
    ResultTable table;
    table.output = output::NODES;
    table.what = ResultLayer::Nodes;
    table.type = compat::WkbType::PointZM;
    table.fields = nodeFields();
    table.rows = context.result.network.nodes.size();
    table.hasGaps = std::any_of( context.result.nodeFigures.begin(), context.result.nodeFigures.end(),
      []( const NodeFigures &figures ) { return std::isnan( figures.pressureHighPa ); } );
    table.make = [&context]( std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const Node &node = context.result.network.nodes[i];
        const NodeFigures &figures = context.result.nodeFigures[i];
        QgsAttributes attributes;
        attributes << QVariant( static_cast<int>( i ) + 1 ) << kindName( node.kind ) << node.degree
                   << context.units.lengthValue( figures.elevationM )
                   << context.units.pressureValue( figures.pressureLowPa )
                   << context.units.pressureValue( figures.pressureHighPa )
                   << QString::fromLatin1( stateName( figures.state ) ) << oneBased( context.result.zoneMap.ofNode[i] );
        features[i - first].setAttributes( attributes );
        features[i - first].setGeometry(
          pointZM( node.place, context.z( figures.elevationM ), context.pressure( figures.pressureHighPa ) ) );
      }
    };
    return table;
  }

} // namespace stillhead
