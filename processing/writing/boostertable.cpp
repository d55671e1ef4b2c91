// SPDX-License-Identifier: GPL-2.0-or-later
// Inlet and outlet are those of the run with the boosters in place.
#include "processing/writing/boostertable.h"

#include "processing/parameternames.h"
#include "processing/reading/devicelayer.h"
#include "processing/text/boosttext.h"
#include "processing/text/findingtext.h"

#include <qgspoint.h>

#include <algorithm>

namespace stillhead
{

  namespace
  {

    QgsFields boosterFields()
    {
      QgsFields fields;
      const auto append = [&]( compat::FieldType type, std::initializer_list<QString> names ) {
        for ( const QString &name : names )
          fields.append( QgsField( name, type ) );
      };
      append( compat::Field::String, { field::NAME, field::KIND } );
      append( compat::Field::Double, { field::BOOST, field::BOOST_LOW } );
      append( compat::Field::String, { field::DIRECTION } );
      append( compat::Field::Double,
        { field::Z, field::INLET_LOW, field::INLET_HIGH, field::OUTLET_LOW, field::OUTLET_HIGH, field::LENGTH_SHORT,
          field::Z_HIGH, field::Z_LOW, field::SERVED_WITHOUT } );
      append( compat::Field::Bool, { field::REGULATOR_FOLLOWS } );
      append( compat::Field::String, { field::DRAWN_LAYER } );
      append( compat::Field::LongLong, { field::DRAWN_FID } );
      append( compat::Field::Double, { field::DISTANCE_ALONG } );
      append( compat::Field::String, { field::WHY } );
      return fields;
    }

    //! A booster with its number among all devices.
    struct StandingBooster
    {
        const ProposedBooster *booster = nullptr;
        std::size_t device = 0;
    };

    std::vector<StandingBooster> standing( const BoostResult &result )
    {
      std::vector<StandingBooster> rows;
      for ( const ProposedBooster &booster : result.boosters )
      {
        if ( !booster.atSource )
          rows.push_back( { &booster, 0 } );
      }
      for ( std::size_t i = 0; i < rows.size(); ++i )
        rows[i].device = result.devices.size() - rows.size() + i;
      return rows;
    }

    void fillRow( const ResultContext &context, const BoostResult &result, const StandingBooster &row,
      const std::vector<double> &partStarts, QgsFeature &feature )
    {
      const ProposedBooster &own = *row.booster;
      const DisplayUnits &units = context.units;
      const CanonicalLine &line = context.result.drawing.lines[static_cast<std::size_t>( own.at.line )];
      const DrawnFeature &drawn = context.featureOf( line );
      const auto device = std::find_if( context.result.devices.begin(), context.result.devices.end(),
        [&]( const StandingDevice &other ) { return other.device == static_cast<int>( row.device ); } );
      const bool stands = device != context.result.devices.end();
      const double inletLowPa = stands ? device->inletLowPa : NOT_A_FIGURE;
      const double inletHighPa = stands ? device->inletHighPa : NOT_A_FIGURE;
      const double alongPartM = line.reversed ? line.lengthM - own.at.alongM : own.at.alongM;
      QgsAttributes values;
      values << context.names.devices.value( static_cast<int>( row.device ) )
             << QString::fromLatin1( deviceKindName( DeviceKind::Booster ) ) << units.pressureValue( own.boostPa )
             << units.pressureValue( own.boostLowPa ) << directionText( result.devices[row.device].direction )
             << units.lengthValue( own.elevationM ) << units.pressureValue( inletLowPa )
             << units.pressureValue( inletHighPa ) << units.pressureValue( inletLowPa + own.boostLowPa )
             << units.pressureValue( inletHighPa + own.boostPa ) << units.lengthValue( own.shortM )
             << units.lengthValue( own.neededByM ) << units.lengthValue( own.lowestM )
             << units.lengthValue( servedWithoutM( context, own, result ) ) << own.regulatorFollows
             << drawnLayerName( drawn.role ) << static_cast<qlonglong>( drawn.fid )
             << units.lengthValue( partStarts[static_cast<std::size_t>( line.drawn )] + alongPartM )
             << boosterWhyText( context, own, result );
      feature.setAttributes( values );
      const PlanPoint place = context.result.drawing.placeAt( line, own.at.alongM );
      feature.setGeometry( QgsGeometry(
        std::make_unique<QgsPoint>( compat::WkbType::PointZ, place.x, place.y, context.z( own.elevationM ) ) ) );
    }

  } // namespace

  ResultTable boosterTable( const ResultContext &context, const BoostResult &result )
  {
    ResultTable table;
    table.output = output::BOOSTERS;
    table.what = ResultLayer::Boosters;
    table.type = compat::WkbType::PointZ;
    table.fields = boosterFields();
    const std::vector<StandingBooster> rows = standing( result );
    table.rows = rows.size();
    table.make = [&context, &result, rows, starts = partStartsM( context )](
                   std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
        fillRow( context, result, rows[i], starts, features[i - first] );
    };
    return table;
  }

} // namespace stillhead
