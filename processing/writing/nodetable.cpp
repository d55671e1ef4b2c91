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
      case NodeKind::Device:
        return word::NODE_DEVICE;
      }
      return QString();
    }

    QVariant statusValue( RegulatorStatus status )
    {
      return status == RegulatorStatus::None ? QVariant()
                                             : QVariant( QString::fromLatin1( regulatorStatusName( status ) ) );
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
      fields.append( QgsField( field::NAME, compat::Field::String ) );
      fields.append( QgsField( field::P_IN_LOW, compat::Field::Double ) );
      fields.append( QgsField( field::P_IN_HIGH, compat::Field::Double ) );
      fields.append( QgsField( field::STATUS, compat::Field::String ) );
      return fields;
    }

  } // namespace

  QgsGeometry pointZM( const PlanPoint &place, double z, double m )
  {
    return QgsGeometry( std::make_unique<QgsPoint>( compat::WkbType::PointZM, place.x, place.y, z, m ) );
  }

  std::vector<NodeRow> nodeRows( const StaticResult &result )
  {
    std::vector<int> deviceOfNode( result.network.nodes.size(), -1 );
    std::vector<bool> leftOut( result.network.nodes.size(), false );
    for ( std::size_t i = 0; i < result.devices.size(); ++i )
    {
      const StandingDevice &device = result.devices[i];
      deviceOfNode[static_cast<std::size_t>( device.outletNode )] = static_cast<int>( i );
      if ( device.inletNode == device.outletNode )
        continue;
      const bool isSource = result.network.nodes[static_cast<std::size_t>( device.inletNode )].kind == NodeKind::Source;
      const auto link = std::find_if( result.network.links.begin(), result.network.links.end(),
        [&]( const DeviceLink &own ) { return own.device == device.device; } );
      if ( link->passes )
        leftOut[static_cast<std::size_t>( device.inletNode )] = !isSource;
      else
        deviceOfNode[static_cast<std::size_t>( device.inletNode )] = static_cast<int>( i );
    }
    std::vector<NodeRow> rows;
    for ( std::size_t node = 0; node < leftOut.size(); ++node )
    {
      if ( !leftOut[node] )
        rows.push_back( { static_cast<int>( node ), deviceOfNode[node] } );
    }
    return rows;
  }

  ResultTable nodeTable( const ResultContext &context )
  {
    ResultTable table;
    table.output = output::NODES;
    table.what = ResultLayer::Nodes;
    table.type = compat::WkbType::PointZM;
    table.fields = nodeFields();
    const std::vector<NodeRow> rows = nodeRows( context.result );
    table.rows = rows.size();
    table.hasGaps = std::any_of( context.result.nodeFigures.begin(), context.result.nodeFigures.end(),
      []( const NodeFigures &figures ) { return std::isnan( figures.pressureHighPa ); } );
    table.make = [&context, rows]( std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const std::size_t number = static_cast<std::size_t>( rows[i].node );
        const Node &node = context.result.network.nodes[number];
        const NodeFigures &figures = context.result.nodeFigures[number];
        const DisplayUnits &units = context.units;
        const StandingDevice *device =
          rows[i].device < 0 ? nullptr : &context.result.devices[static_cast<std::size_t>( rows[i].device )];
        const bool hasInlet = device && device->inletNode != rows[i].node;
        const int inletDegree =
          hasInlet ? context.result.network.nodes[static_cast<std::size_t>( device->inletNode )].degree : 0;
        QgsAttributes attributes;
        attributes << QVariant( static_cast<int>( i ) + 1 ) << kindName( node.kind ) << node.degree + inletDegree
                   << units.lengthValue( figures.elevationM ) << units.pressureValue( figures.pressureLowPa )
                   << units.pressureValue( figures.pressureHighPa ) << QString::fromLatin1( stateName( figures.state ) )
                   << oneBased( context.result.zoneMap.ofNode[number] );
        if ( device )
          attributes << context.names.devices.value( device->device ) << units.pressureValue( device->inletLowPa )
                     << units.pressureValue( device->inletHighPa ) << statusValue( device->status );
        else
          attributes << QVariant() << QVariant() << QVariant() << QVariant();
        features[i - first].setAttributes( attributes );
        features[i - first].setGeometry(
          pointZM( node.place, context.z( figures.elevationM ), context.pressure( figures.pressureHighPa ) ) );
      }
    };
    return table;
  }

} // namespace stillhead
