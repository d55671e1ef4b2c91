// SPDX-License-Identifier: GPL-2.0-or-later
// EXTREMES: the worst place of every stretch and of every pressure zone, then the summits and sags of mainlines.
#include "processing/parameternames.h"
#include "processing/text/findingtext.h"
#include "processing/text/text.h"
#include "processing/writing/resulttable.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    QgsFields extremeFields()
    {
      QgsFields fields;
      fields.append( QgsField( field::WHAT, compat::Field::String ) );
      fields.append( QgsField( field::P, compat::Field::Double ) );
      fields.append( QgsField( field::Z, compat::Field::Double ) );
      fields.append( QgsField( field::PRESSURE_ZONE, compat::Field::Int ) );
      fields.append( QgsField( field::STRETCH, compat::Field::Int ) );
      fields.append( QgsField( field::DRAWN_LAYER, compat::Field::String ) );
      fields.append( QgsField( field::DRAWN_FID, compat::Field::LongLong ) );
      fields.append( QgsField( field::DISTANCE_ALONG, compat::Field::Double ) );
      fields.append( QgsField( field::LABEL, compat::Field::String ) );
      return fields;
    }

    QString kindWord( ExtremeKind kind )
    {
      switch ( kind )
      {
      case ExtremeKind::Highest:
        return word::HIGHEST;
      case ExtremeKind::Lowest:
        return word::LOWEST;
      case ExtremeKind::Summit:
        return word::SUMMIT;
      case ExtremeKind::Sag:
        return word::SAG;
      }
      return QString();
    }

    //! "95 psi, pipe 348 ft", "summit, 62 psi, pipe 412 ft", and without water "summit, pipe 412 ft".
    QString labelOf( const Extreme &extreme, Role role, const ResultContext &context )
    {
      const QString pipe = std::isnan( extreme.pressurePa )
        ? Text::tr( "pipe %1" ).arg( context.units.lengthText( extreme.elevationM ) )
        : placeLabel( extreme.pressurePa, extreme.elevationM, context.units, context.limits.leastFor( role ),
          context.limits.mostFor( role ) );
      const bool isWorst = extreme.kind == ExtremeKind::Highest || extreme.kind == ExtremeKind::Lowest;
      return isWorst ? pipe : Text::tr( "%1, %2" ).arg( kindWord( extreme.kind ), pipe );
    }

  } // namespace

  std::vector<double> partStartsM( const ResultContext &context )
  {
    const std::vector<DrawnLine> &lines = context.drawn.drawing.lines;
    std::vector<double> lengths( lines.size(), 0.0 );
    for ( const CanonicalLine &line : context.result.drawing.lines )
      lengths[static_cast<std::size_t>( line.drawn )] = line.lengthM;
    std::vector<double> starts( lines.size(), 0.0 );
    for ( std::size_t i = 1; i < lines.size(); ++i )
    {
      if ( lines[i].feature == lines[i - 1].feature )
        starts[i] = starts[i - 1] + lengths[i - 1];
    }
    return starts;
  }

  QString placeLabel( double pressurePa, double elevationM, const DisplayUnits &units, double leastPa, double mostPa )
  {
    const double nearPa = PASCALS_PER_PSI;
    const bool near = std::abs( pressurePa - leastPa ) < nearPa || std::abs( pressurePa - mostPa ) < nearPa;
    return Text::tr( "%1, pipe %2" )
      .arg( units.pressureText( pressurePa, near ? 1 : 0 ), units.lengthText( elevationM ) );
  }

  ResultTable extremeTable( const ResultContext &context )
  {
    ResultTable table;
    table.output = output::EXTREMES;
    table.what = ResultLayer::Extremes;
    table.type = compat::WkbType::PointZM;
    table.fields = extremeFields();
    table.rows = context.result.extremes.size();
    table.hasGaps = std::any_of( context.result.extremes.begin(), context.result.extremes.end(),
      []( const Extreme &extreme ) { return std::isnan( extreme.pressurePa ); } );
    table.make = [&context, starts = partStartsM( context )](
                   std::size_t first, std::size_t last, QgsFeature *features ) {
      for ( std::size_t i = first; i < last; ++i )
      {
        const Extreme &extreme = context.result.extremes[i];
        const CanonicalLine &line = context.lineOf( context.result.pieces[static_cast<std::size_t>( extreme.piece )] );
        const DrawnFeature &feature = context.featureOf( line );
        const double alongPartM = line.reversed ? line.lengthM - extreme.alongM : extreme.alongM;
        QgsAttributes attributes;
        attributes << kindWord( extreme.kind ) << context.units.pressureValue( extreme.pressurePa )
                   << context.units.lengthValue( extreme.elevationM ) << oneBased( extreme.zone )
                   << oneBased( extreme.stretch ) << drawnLayerName( feature.role )
                   << static_cast<qlonglong>( feature.fid )
                   << context.units.lengthValue( starts[static_cast<std::size_t>( line.drawn )] + alongPartM )
                   << labelOf( extreme, line.role, context );
        features[i - first].setAttributes( attributes );
        features[i - first].setGeometry( pointZM( context.result.drawing.placeAt( line, extreme.alongM ),
          context.z( extreme.elevationM ), context.pressure( extreme.pressurePa ) ) );
      }
    };
    return table;
  }

} // namespace stillhead
