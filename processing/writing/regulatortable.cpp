// SPDX-License-Identifier: GPL-2.0-or-later
// The columns; name, kind, set, rise and direction are those of DEVICES, so that the layer can be given back unchanged.
#include "processing/writing/regulatortable.h"

#include "processing/parameternames.h"
#include "processing/reading/devicelayer.h"
#include "processing/text/whytext.h"

#include <qgspoint.h>

#include <cmath>

namespace stillhead
{

  namespace
  {

    QgsFields regulatorFields()
    {
      QgsFields fields;
      const auto append = [&]( compat::FieldType type, std::initializer_list<QString> names ) {
        for ( const QString &name : names )
          fields.append( QgsField( name, type ) );
      };
      append( compat::Field::String, { field::NAME, field::KIND } );
      append( compat::Field::Double, { field::SET, field::RISE } );
      append( compat::Field::String, { field::DIRECTION, field::STATUS } );
      append( compat::Field::Int, { field::STAGE } );
      append( compat::Field::Double,
        { field::GROUND, field::Z, field::INLET_LOW, field::INLET_HIGH, field::DIFFERENTIAL, field::RATIO,
          field::SET_LEAST, field::SET_MOST, field::LOCKUP } );
      append( compat::Field::Int, { field::PRESSURE_ZONE } );
      append( compat::Field::Double,
        { field::P_LOW, field::P_HIGH, field::Z_LOW, field::Z_HIGH, field::SERVES_UP_TO, field::HOLDS_DOWN_TO,
          field::P_FAILED_OPEN, field::LENGTH } );
      append( compat::Field::String, { field::DRAWN_LAYER } );
      append( compat::Field::LongLong, { field::DRAWN_FID } );
      append( compat::Field::Double, { field::DISTANCE_ALONG, field::PLACE_FROM, field::PLACE_TO } );
      append( compat::Field::String, { field::WHY } );
      return fields;
    }

    QVariant numberValue( double number )
    {
      return std::isnan( number ) ? QVariant() : QVariant( number );
    }

    QVariant statusValue( RegulatorStatus status )
    {
      return status == RegulatorStatus::None ? QVariant()
                                             : QVariant( QString::fromLatin1( regulatorStatusName( status ) ) );
    }

    //! Writes the attributes of one row in the order of the fields.
    class RowWriter
    {
      public:
        RowWriter( const ResultContext &context, const RegulatorRow &row, const std::vector<double> &partStarts )
          : mContext( context )
          , mUnits( context.units )
          , mRow( row )
          , mPartStarts( partStarts )
          , mLine( context.result.drawing.lines[static_cast<std::size_t>( row.standing.on.line )] )
        {
        }

        QgsAttributes attributes() const
        {
          const StandingDevice &standing = mRow.standing;
          const ScheduleRow &figures = mRow.figures;
          const double setPa = mRow.device.setPa.value_or( NOT_A_FIGURE );
          const double risePa = mRow.device.regulates() ? mRow.device.risePa : NOT_A_FIGURE;
          const DrawnFeature &feature = mContext.featureOf( mLine );
          QgsAttributes values;
          values << mContext.names.devices.value( standing.device )
                 << QString::fromLatin1( deviceKindName( mRow.device.kind ) ) << mUnits.pressureValue( setPa )
                 << mUnits.pressureValue( risePa ) << directionText( mRow.device.direction )
                 << statusValue( standing.status ) << ( figures.stage > 0 ? QVariant( figures.stage ) : QVariant() )
                 << mUnits.lengthValue( figures.groundM ) << mUnits.lengthValue( standing.elevationM )
                 << mUnits.pressureValue( standing.inletLowPa ) << mUnits.pressureValue( standing.inletHighPa )
                 << mUnits.pressureValue( standing.inletLowPa - setPa )
                 << numberValue( setPa > 0.0 ? standing.inletHighPa / setPa : NOT_A_FIGURE )
                 << mUnits.pressureValue( figures.setLeastPa ) << mUnits.pressureValue( figures.setMostPa )
                 << mUnits.pressureValue( setPa + risePa ) << oneBased( figures.zone )
                 << mUnits.pressureValue( figures.feeds.lowestPa ) << mUnits.pressureValue( figures.feeds.highestPa )
                 << mUnits.lengthValue( figures.feeds.lowestM ) << mUnits.lengthValue( figures.feeds.highestM )
                 << mUnits.lengthValue( figures.servesUpToM ) << mUnits.lengthValue( figures.holdsDownToM )
                 << mUnits.pressureValue( figures.failedOpenPa ) << mUnits.lengthValue( figures.feeds.lengthM )
                 << drawnLayerName( feature.role ) << static_cast<qlonglong>( feature.fid )
                 << distanceAlong( standing.on.alongM ) << distanceAlong( mRow.placeFromM )
                 << distanceAlong( mRow.placeToM ) << whyText( mRow, mContext.limits, mUnits );
          return values;
        }

        QgsGeometry geometry() const
        {
          const PlanPoint place = mContext.result.drawing.placeAt( mLine, mRow.standing.on.alongM );
          return QgsGeometry( std::make_unique<QgsPoint>(
            compat::WkbType::PointZ, place.x, place.y, mContext.z( mRow.standing.elevationM ) ) );
        }

      private:
        //! From the start of the drawn feature.
        QVariant distanceAlong( double alongM ) const
        {
          if ( std::isnan( alongM ) )
            return QVariant();
          const double alongPartM = mLine.reversed ? mLine.lengthM - alongM : alongM;
          return mUnits.lengthValue( mPartStarts[static_cast<std::size_t>( mLine.drawn )] + alongPartM );
        }

        const ResultContext &mContext;
        const DisplayUnits &mUnits;
        const RegulatorRow &mRow;
        const std::vector<double> &mPartStarts;
        const CanonicalLine &mLine;
    };

  } // namespace

  ResultTable regulatorTable(
    const ResultContext &context, const QString &output, const std::vector<RegulatorRow> &rows )
  {
    ResultTable table;
    table.output = output;
    table.what = ResultLayer::Regulators;
    table.type = compat::WkbType::PointZ;
    table.fields = regulatorFields();
    table.rows = rows.size();
    table.legend.field = field::KIND;
    for ( const RegulatorRow &row : rows )
      table.legend.values << QString::fromLatin1( deviceKindName( row.device.kind ) );
    table.legend.values.removeDuplicates();
    table.hasGaps = std::any_of(
      rows.begin(), rows.end(), []( const RegulatorRow &row ) { return std::isnan( row.standing.elevationM ); } );
    table.make = [&context, &rows, starts = partStartsM( context )](
                   std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const RowWriter writer( context, rows[i], starts );
        features[i - first].setAttributes( writer.attributes() );
        features[i - first].setGeometry( writer.geometry() );
      }
    };
    return table;
  }

} // namespace stillhead
