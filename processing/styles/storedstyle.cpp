// SPDX-License-Identifier: GPL-2.0-or-later
// Opens the written layer, styles it and saves it under our own name. A style of that name is removed first: QGIS would
// ask before it replaces one, and a run has nobody to ask.
#include "processing/styles/storedstyle.h"

#include "processing/text/text.h"

#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    QString styleName()
    {
      return QStringLiteral( "Stillhead" );
    }

    void removeOwnStyles( QgsVectorLayer &layer )
    {
      QStringList ids;
      QStringList names;
      QStringList descriptions;
      QString error;
      const int own = layer.listStylesInDatabase( ids, names, descriptions, error );
      for ( int index = 0; index < own; ++index )
      {
        if ( names.at( index ) == styleName() )
          layer.deleteStyleFromDatabase( ids.at( index ), error );
      }
    }

  } // namespace

  QString storeDefaultStyle( const QString &source, ResultLayer what, const ResultStyle &style )
  {
    if ( !source.contains( QLatin1String( ".gpkg" ), Qt::CaseInsensitive ) )
      return QString();
    QgsVectorLayer layer( source, QStringLiteral( "result" ), QStringLiteral( "ogr" ) );
    if ( !layer.isValid() )
      return Text::tr( "The style of %1 could not be stored: the layer does not open." ).arg( source );
    styleResult( layer, what, style );
    removeOwnStyles( layer );
    QString error;
    layer.saveStyleToDatabase(
      styleName(), Text::tr( "Made by the run that wrote the layer" ), true, QString(), error );
    return error;
  }

} // namespace stillhead
