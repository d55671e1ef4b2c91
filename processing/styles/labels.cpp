// SPDX-License-Identifier: GPL-2.0-or-later
// The same text format for every result layer, so that labels of different layers read as one set.
#include "processing/styles/labels.h"

#include "processing/qgiscompat.h"

#include <qgscallout.h>
#include <qgslabelobstaclesettings.h>
#include <qgspallabeling.h>
#include <qgsrulebasedlabeling.h>
#include <qgstextbuffersettings.h>
#include <qgstextformat.h>
#include <qgsvectorlayer.h>
#include <qgsvectorlayerlabeling.h>

#include <QFont>

namespace stillhead
{

  namespace
  {

    QgsPalLayerSettings darkOnWhite( const QString &expression, double sizePoints, int priority )
    {
      QFont font( QStringLiteral( "DejaVu Sans" ) );
      font.setBold( true );
      QgsTextFormat format;
      format.setFont( font );
      format.setSize( sizePoints );
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
      settings.priority = priority;
      return settings;
    }

    QgsPalLayerSettings besideThePoint( const QString &expression, double sizePoints, int priority )
    {
      QgsPalLayerSettings settings = darkOnWhite( expression, sizePoints, priority );
      settings.placement = compat::LabelPlacement::OrderedPositionsAroundPoint;
      settings.dist = 3.5;
      auto *callout = new QgsSimpleLineCallout();
      callout->setEnabled( true );
      callout->setMinimumLength( 5.0 );
      settings.setCallout( callout );
      return settings;
    }

    QgsPalLayerSettings firstLabels( const QString &expression )
    {
      QgsPalLayerSettings settings = besideThePoint( expression, 8.0, 10 );
      compat::keepEveryLabel( settings );
      return settings;
    }

  } // namespace

  void labelPoints( QgsVectorLayer &layer, const QString &expression )
  {
    layer.setLabeling( new QgsVectorLayerSimpleLabeling( firstLabels( expression ) ) );
    layer.setLabelsEnabled( true );
  }

  void labelPoints( QgsVectorLayer &layer, const PointLabels &first, const PointLabels &more, double smallestScale )
  {
    using Rule = QgsRuleBasedLabeling::Rule;
    auto *root = new Rule( nullptr );
    root->appendChild( new Rule( new QgsPalLayerSettings( firstLabels( first.expression ) ), 0, 0, first.filter ) );
    root->appendChild(
      new Rule( new QgsPalLayerSettings( besideThePoint( more.expression, 7.0, 1 ) ), 0, smallestScale, more.filter ) );
    layer.setLabeling( new QgsRuleBasedLabeling( root ) );
    layer.setLabelsEnabled( true );
  }

  void labelLines( QgsVectorLayer &layer, const QString &expression )
  {
    QgsPalLayerSettings settings = darkOnWhite( expression, 7.0, 3 );
    settings.placement = compat::LabelPlacement::Line;
    settings.repeatDistance = 150.0;
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
