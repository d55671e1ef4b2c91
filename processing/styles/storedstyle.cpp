// SPDX-License-Identifier: GPL-2.0-or-later
// A layer in memory with the same fields is styled and asked for its style; opening the written one would cost far more.
#include "processing/styles/storedstyle.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsfeature.h>
#include <qgsmemoryproviderutils.h>
#include <qgsvectordataprovider.h>
#include <qgsvectorlayer.h>

#include <QDomDocument>

#include <memory>

namespace stillhead
{

  QString styleText( ResultLayer what, const QgsFields &fields, compat::WkbType type, const LegendValues &legend,
    const ResultStyle &style )
  {
    const std::unique_ptr<QgsVectorLayer> layer( QgsMemoryProviderUtils::createMemoryLayer(
      QStringLiteral( "result" ), fields, type, QgsCoordinateReferenceSystem() ) );
    // Styles look into the layer for what to show in the legend.
    const int index = fields.lookupField( legend.field );
    for ( const QString &value : legend.values )
    {
      QgsFeature row( layer->fields() );
      row.setAttribute( index, value );
      layer->dataProvider()->addFeature( row );
    }
    styleResult( *layer, what, style );
    QString error;
    QDomDocument qml;
    layer->exportNamedStyle( qml, error );
    return qml.toString();
  }

} // namespace stillhead
