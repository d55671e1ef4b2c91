// SPDX-License-Identifier: GPL-2.0-or-later
// The platform's own reading reprojects by the project's settings and hides failures, so it is asked for the bare
// coordinates only.
#include "processing/reading/placereader.h"

#include "processing/reading/layercrs.h"
#include "processing/text/text.h"

#include <qgscoordinatetransform.h>
#include <qgsexception.h>
#include <qgsproperty.h>
#include <qgsreferencedgeometry.h>

#include <QRegularExpression>

namespace stillhead
{

  namespace
  {

    //! The CRS that came with the point, \a otherwise if none did.
    QgsCoordinateReferenceSystem crsOf(
      const QVariant &value, const QString &name, const QgsCoordinateReferenceSystem &otherwise )
    {
      if ( value.canConvert<QgsReferencedPointXY>() )
      {
        const QgsCoordinateReferenceSystem crs = value.value<QgsReferencedPointXY>().crs();
        return crs.isValid() ? crs : otherwise;
      }
      static const QRegularExpression bracketed( QStringLiteral( "\\[(.+)\\]\\s*\\)?\\s*$" ) );
      const QRegularExpressionMatch match = bracketed.match( value.toString() );
      if ( !match.hasMatch() )
        return otherwise;
      const QgsCoordinateReferenceSystem crs( match.captured( 1 ).trimmed() );
      if ( !crs.isValid() )
        throw QgsProcessingException(
          Text::tr( "%1 names a CRS that is not known, “%2”; write the point as x,y [EPSG:code]." )
            .arg( name, match.captured( 1 ) ) );
      return crs;
    }

  } // namespace

  PlanPoint readPlace( const ParameterValues &values, const QString &name, const QgsCoordinateReferenceSystem &crs )
  {
    QVariant value = values.values().value( name );
    if ( value.canConvert<QgsProperty>() )
      value = value.value<QgsProperty>().value( values.context().expressionContext() );
    const QgsPointXY given = QgsProcessingParameters::parameterAsPoint(
      values.definition( name ), value, values.context(), QgsCoordinateReferenceSystem() );
    if ( given.isEmpty() )
      throw QgsProcessingException(
        Text::tr( "%1 is “%2”, which is no point; write it as x,y [EPSG:code], or pick it on the map." )
          .arg( name, value.toString() ) );
    const QgsCoordinateReferenceSystem from = crsOf( value, name, crs );
    try
    {
      const QgsPointXY place =
        QgsCoordinateTransform( from, crs, values.context().transformContext() ).transform( given );
      return { place.x(), place.y() };
    }
    catch ( const QgsCsException & )
    {
      throw QgsProcessingException( Text::tr( "%1 cannot be reprojected from %2 to %3; check its coordinates and CRS." )
                                      .arg( name, crsText( from ), crsText( crs ) ) );
    }
  }

} // namespace stillhead
