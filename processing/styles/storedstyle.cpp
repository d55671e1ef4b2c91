// SPDX-License-Identifier: GPL-2.0-or-later
// A layer in memory with the same fields is styled and asked for its style; opening the written one would cost far more.
#include "processing/styles/storedstyle.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsmemoryproviderutils.h>
#include <qgsvectorlayer.h>

#include <QDomDocument>

#include <memory>

namespace stillhead
{

  QString styleText( ResultLayer what, const QgsFields &fields, compat::WkbType type, const ResultStyle &style )
  {
    const std::unique_ptr<QgsVectorLayer> layer( QgsMemoryProviderUtils::createMemoryLayer(
      QStringLiteral( "result" ), fields, type, QgsCoordinateReferenceSystem() ) );
    styleResult( *layer, what, style );
    QString error;
    QDomDocument qml;
    layer->exportNamedStyle( qml, error );
    return qml.toString();
  }

} // namespace stillhead
