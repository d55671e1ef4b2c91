// SPDX-License-Identifier: GPL-2.0-or-later
// Field by field.
#include "processing/reading/pointlayer.h"

#include "processing/parameternames.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/text.h"

#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgsgeometry.h>
#include <qgspoint.h>

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    int systemNumber( const QString &name, Drawing &drawing )
    {
      const std::string wanted = name.toStdString();
      const auto known = std::find( drawing.systems.begin(), drawing.systems.end(), wanted );
      if ( known != drawing.systems.end() )
        return static_cast<int>( known - drawing.systems.begin() );
      drawing.systems.push_back( wanted );
      return static_cast<int>( drawing.systems.size() ) - 1;
    }

  } // namespace

  PointRow::PointRow( const QgsFeature &feature, const QString &parameterName, const DisplayUnits &units )
    : mFeature( feature )
    , mParameterName( parameterName )
    , mUnits( units )
  {
  }

  QVariant PointRow::value( const QString &field ) const
  {
    const int index = mFeature.fields().lookupField( field );
    return index < 0 ? QVariant() : mFeature.attribute( index );
  }

  QString PointRow::text( const QString &field ) const
  {
    const QVariant given = value( field );
    return given.isNull() ? QString() : given.toString().trimmed();
  }

  std::optional<double> PointRow::number( const QString &field ) const
  {
    const QString given = text( field );
    if ( given.isEmpty() )
      return std::nullopt;
    bool isNumber = false;
    const double number = given.toDouble( &isNumber );
    if ( !isNumber || !std::isfinite( number ) )
      refuse( Text::tr( "`%1` is “%2”, which is no number; write it without a unit and with a point as decimal mark." )
                .arg( field, given ) );
    return number;
  }

  std::optional<double> PointRow::pressurePa( const QString &field ) const
  {
    const std::optional<double> given = number( field );
    if ( !given )
      return std::nullopt;
    const double pascals = mUnits.pascals( *given );
    if ( pascals < 0.0 || pascals > HIGHEST_PRESSURE_PA )
      refuse( Text::tr( "`%1` (%2) is out of range; give a pressure from 0 to %3." )
                .arg( field, mUnits.givenPressureText( pascals ), mUnits.givenPressureText( HIGHEST_PRESSURE_PA ) ) );
    return pascals;
  }

  std::optional<double> PointRow::lengthM( const QString &field ) const
  {
    const std::optional<double> given = number( field );
    return given ? std::optional<double>( mUnits.metres( *given ) ) : std::nullopt;
  }

  void PointRow::refuse( const QString &sentence ) const
  {
    throw QgsProcessingException( Text::tr( "%1, feature %2: %3" ).arg( mParameterName ).arg( fid() ).arg( sentence ) );
  }

  QString PointRow::name() const
  {
    const QString given = text( field::NAME );
    return given.isEmpty() ? Text::tr( "feature %1" ).arg( fid() ) : given;
  }

  void readPoints( const QgsProcessingFeatureSource &layer, const QString &parameterName, const DisplayUnits &units,
    const QgsCoordinateReferenceSystem &crs, const QgsCoordinateTransformContext &transforms, Drawing &drawing,
    const std::function<void( const PointRow &row, const PlanPoint &place, int system )> &read )
  {
    requireCrs( layer.sourceCrs(), parameterName, layer.sourceName() );
    const QgsCoordinateTransform transform( layer.sourceCrs(), crs, transforms );
    QgsFeature feature;
    QgsFeatureIterator features = layer.getFeatures();
    while ( features.nextFeature( feature ) )
    {
      const PointRow row( feature, parameterName, units );
      const QgsAbstractGeometry *geometry = feature.geometry().constGet();
      if ( !geometry || geometry->isEmpty() )
        row.refuse( Text::tr( "it has no point; place it on the pipe, or delete the row." ) );
      QgsPoint point = *geometry->vertices_begin();
      try
      {
        point.transform( transform );
      }
      catch ( const QgsCsException & )
      {
        row.refuse( Text::tr( "it cannot be reprojected to %1; check its coordinates and the layer's CRS." )
                      .arg( crsText( crs ) ) );
      }
      const QString system = row.text( field::SYSTEM );
      read( row, { point.x(), point.y() }, system.isEmpty() ? 0 : systemNumber( system, drawing ) );
    }
  }

} // namespace stillhead
