// SPDX-License-Identifier: GPL-2.0-or-later
// SPANS: one row for every piece of pipe, its line built from coordinate arrays so that what is no number stays so.
#include "core/job/pieceline.h"
#include "processing/parameternames.h"
#include "processing/writing/resulttable.h"

#include <qgslinestring.h>

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    QgsFields ownFields()
    {
      QgsFields fields;
      fields.append( QgsField( field::SPAN, compat::Field::Int ) );
      fields.append( QgsField( field::ROLE, compat::Field::String ) );
      fields.append( QgsField( field::DRAWN_FID, compat::Field::LongLong ) );
      fields.append( QgsField( field::LENGTH, compat::Field::Double ) );
      fields.append( QgsField( field::Z_LOW, compat::Field::Double ) );
      fields.append( QgsField( field::Z_HIGH, compat::Field::Double ) );
      fields.append( QgsField( field::P_LOW, compat::Field::Double ) );
      fields.append( QgsField( field::P_HIGH, compat::Field::Double ) );
      fields.append( QgsField( field::BAND, compat::Field::Int ) );
      fields.append( QgsField( field::BAND_TEXT, compat::Field::String ) );
      fields.append( QgsField( field::STATE, compat::Field::String ) );
      fields.append( QgsField( field::OVER, compat::Field::Bool ) );
      fields.append( QgsField( field::SHORT, compat::Field::Bool ) );
      fields.append( QgsField( field::PRESSURE_ZONE, compat::Field::Int ) );
      fields.append( QgsField( field::DOUBT, compat::Field::Double ) );
      fields.append( QgsField( field::CLOSE_CALL, compat::Field::Bool ) );
      fields.append( QgsField( field::P_FAILED_OPEN, compat::Field::Double ) );
      fields.append( QgsField( field::FAILED_OPEN_CAUSE, compat::Field::String ) );
      return fields;
    }

    //! Texts that repeat in row after row, made once and shared.
    struct SpanWords
    {
        QVariant mainline = word::MAINLINE;
        QVariant lateral = word::LATERAL;
        std::vector<QVariant> bands;
        std::vector<QVariant> states;

        explicit SpanWords( const ResultContext &context )
        {
          for ( int band = 0; band < context.style.bandCount(); ++band )
            bands.emplace_back( bandText( band, context.style ) );
          for ( int state = 0; state <= static_cast<int>( State::WithinLimits ); ++state )
            states.emplace_back( QString::fromLatin1( stateName( static_cast<State>( state ) ) ) );
        }
    };

    //! The larger of the doubts of both cases.
    double doubtOf( const ResultContext &context, const Piece &piece )
    {
      const Zone &zone = context.result.zones[static_cast<std::size_t>( piece.zone )];
      return std::max( zone.doubtHighPa, zone.doubtLowPa );
    }

    void appendFailure( QgsAttributes &attributes, const ResultContext &context, const Piece &piece )
    {
      if ( context.result.failures.empty() || std::isnan( piece.pressureHighPa ) )
      {
        attributes << QVariant() << QVariant();
        return;
      }
      const ZoneFailure &failure = context.result.failures[static_cast<std::size_t>( piece.zone )];
      attributes << context.units.pressureValue(
        context.units.specificWeightNPerM3() * ( failure.levelM - piece.lowestM ) );
      attributes << ( failure.device < 0 ? QVariant() : QVariant( context.names.devices.value( failure.device ) ) );
    }

    void appendOwn(
      QgsAttributes &attributes, const ResultContext &context, const SpanWords &words, std::size_t number )
    {
      const Piece &piece = context.result.pieces[number];
      const DrawnFeature &feature = context.featureOf( context.lineOf( piece ) );
      const bool figures = !std::isnan( piece.pressureHighPa );
      attributes << QVariant( static_cast<int>( number ) + 1 );
      attributes << ( feature.role == Role::Mainline ? words.mainline : words.lateral );
      attributes << QVariant( static_cast<qlonglong>( feature.fid ) );
      attributes << context.units.lengthValue( piece.toM - piece.fromM );
      attributes << context.units.lengthValue( piece.lowestM );
      attributes << context.units.lengthValue( piece.highestM );
      attributes << context.units.pressureValue( piece.pressureLowPa );
      attributes << context.units.pressureValue( piece.pressureHighPa );
      attributes << ( piece.band < 0 ? QVariant() : QVariant( piece.band ) );
      attributes << ( piece.band < 0 ? QVariant() : words.bands[static_cast<std::size_t>( piece.band )] );
      attributes << words.states[static_cast<std::size_t>( piece.state )];
      attributes << QVariant( piece.over );
      attributes << QVariant( piece.isShort );
      attributes << oneBased( piece.zone );
      attributes << ( figures ? context.units.pressureValue( doubtOf( context, piece ) ) : QVariant() );
      attributes << QVariant( piece.closeCall );
      appendFailure( attributes, context, piece );
    }

    QgsGeometry lineOf( const ResultContext &context, const std::vector<PieceVertex> &vertices )
    {
      const int count = static_cast<int>( vertices.size() );
      QVector<double> x( count );
      QVector<double> y( count );
      QVector<double> z( count );
      QVector<double> m( count );
      for ( int i = 0; i < count; ++i )
      {
        const PieceVertex &vertex = vertices[static_cast<std::size_t>( i )];
        x[i] = vertex.x;
        y[i] = vertex.y;
        z[i] = context.z( vertex.elevationM );
        m[i] = context.pressure( vertex.pressurePa );
      }
      return QgsGeometry( std::make_unique<QgsLineString>( x, y, z, m ) );
    }

    QStringList statesIn( const std::vector<Piece> &pieces )
    {
      QStringList states;
      for ( int state = 0; state <= static_cast<int>( State::WithinLimits ); ++state )
      {
        const auto own = static_cast<State>( state );
        if ( std::any_of( pieces.begin(), pieces.end(), [own]( const Piece &piece ) { return piece.state == own; } ) )
          states << QString::fromLatin1( stateName( own ) );
      }
      return states;
    }

  } // namespace

  QStringList spanFieldNames()
  {
    return ownFields().names();
  }

  ResultTable spanTable( const ResultContext &context )
  {
    ResultTable table;
    table.output = output::SPANS;
    table.what = ResultLayer::Spans;
    table.type = compat::WkbType::LineStringZM;
    table.fields = context.drawn.fields.fields();
    for ( const QgsField &field : ownFields() )
      table.fields.append( field );
    table.rows = context.result.pieces.size();
    table.legend = { field::STATE, statesIn( context.result.pieces ) };
    table.hasGaps = std::any_of( context.result.pieces.begin(), context.result.pieces.end(),
      []( const Piece &piece ) { return std::isnan( piece.pressureHighPa ); } );
    const SpanWords words( context );
    table.make = [&context, words, width = table.fields.count()](
                   std::size_t first, std::size_t last, QgsFeature *features ) {
      std::vector<PieceVertex> vertices;
      for ( std::size_t i = first; i < last; ++i )
      {
        const Piece &piece = context.result.pieces[i];
        QgsAttributes attributes;
        attributes.reserve( width );
        attributes += context.featureOf( context.lineOf( piece ) ).attributes;
        appendOwn( attributes, context, words, i );
        pieceLine( context.result, piece, context.units.specificWeightNPerM3(), vertices );
        features[i - first].setAttributes( attributes );
        features[i - first].setGeometry( lineOf( context, vertices ) );
      }
    };
    return table;
  }

} // namespace stillhead
