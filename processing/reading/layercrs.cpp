// SPDX-License-Identifier: GPL-2.0-or-later
// core/geo knows the placeholders.
#include "processing/reading/layercrs.h"

#include "core/geo/crs.h"
#include "processing/qgiscompat.h"
#include "processing/text/text.h"

#include <qgsexception.h>

namespace stillhead
{

  std::string crsDefinition( const QgsCoordinateReferenceSystem &crs )
  {
    return crs.isValid() ? crs.toWkt( compat::FULL_WKT ).toStdString() : std::string();
  }

  void requireCrs( const QgsCoordinateReferenceSystem &crs, const QString &name, const QString &layer )
  {
    if ( !crs.isValid() || isPlaceholderCrs( crsDefinition( crs ) ) )
      throw QgsProcessingException(
        Text::tr( "%1 (“%2”) has no coordinate reference system; set the layer's CRS first." ).arg( name, layer ) );
  }

  QString crsText( const QgsCoordinateReferenceSystem &crs )
  {
    return crs.authid().isEmpty() ? crs.description()
                                  : QStringLiteral( "%1, %2" ).arg( crs.authid(), crs.description() );
  }

} // namespace stillhead
