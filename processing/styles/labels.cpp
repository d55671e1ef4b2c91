// SPDX-License-Identifier: GPL-2.0-or-later
// The same text format for every result layer, so that labels of different layers read as one set.
#include "processing/styles/labels.h"

#include "processing/qgiscompat.h"

#include <qgscallout.h>
#include <qgslabelobstaclesettings.h>
#include <qgspallabeling.h>
#include <qgstextbuffersettings.h>
#include <qgstextformat.h>
#include <qgsvectorlayer.h>
#include <qgsvectorlayerlabeling.h>

#include <QFont>

namespace stillhead
{

  void labelPoints( QgsVectorLayer &layer, const QString &expression )
  {
    QFont font( QStringLiteral( "DejaVu Sans" ) );
    font.setBold( true );
    QgsTextFormat format;
    format.setFont( font );
    format.setSize( 8.0 );
    format.setColor( Qt::black );
    QgsTextBufferSettings halo;
    halo.setEnabled( true );
    halo.setSize( 0.9 );
    halo.setColor( Qt::white );
    format.setBuffer( halo );

    QgsPalLayerSettings settings;
    settings.setFormat( format );
    settings.fieldName = expression;
    settings.isExpression = true;
    settings.placement = compat::LabelPlacement::OrderedPositionsAroundPoint;
    settings.dist = 3.5;
    settings.priority = 10;
    compat::keepEveryLabel( settings );
    auto *callout = new QgsSimpleLineCallout();
    callout->setEnabled( true );
    callout->setMinimumLength( 5.0 );
    settings.setCallout( callout );
    layer.setLabeling( new QgsVectorLayerSimpleLabeling( settings ) );
    layer.setLabelsEnabled( true );
  }

  void keepLabelsOff( QgsVectorLayer &layer )
  {
    QgsPalLayerSettings settings;
    settings.drawLabels = false;
    settings.obstacleSettings().setIsObstacle( true );
    settings.obstacleSettings().setFactor( 1.0 );
    layer.setLabeling( new QgsVectorLayerSimpleLabeling( settings ) );
    layer.setLabelsEnabled( true );
  }

} // namespace stillhead
