// SPDX-License-Identifier: GPL-2.0-or-later
// Names are looked for in the words of the trade; a raster must be of numbers, not a picture.
#include "plugin/panel/panelsettings.h"

#include "processing/parameternames.h"
#include "processing/qgiscompat.h"

#include <qgsproject.h>
#include <qgsrasterdataprovider.h>
#include <qgsrasterlayer.h>
#include <qgssettings.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    const QString SCOPE = QStringLiteral( "Stillhead" );
    const QString PARAMETERS = QStringLiteral( "/parameters" );
    const QString UNITS_KEY = QStringLiteral( "stillhead/units/" );

    QString entry( const QString &name )
    {
      return PARAMETERS + '/' + name;
    }

    bool isNamed( const QgsMapLayer &layer, const QStringList &words )
    {
      for ( const QString &word : words )
      {
        if ( layer.name().contains( word, Qt::CaseInsensitive ) )
          return true;
      }
      return false;
    }

    bool isLines( const QgsMapLayer &layer )
    {
      const auto *vector = qobject_cast<const QgsVectorLayer *>( &layer );
      return vector && vector->isValid() && vector->geometryType() == compat::Geometry::Line;
    }

    bool isNumbers( const QgsMapLayer &layer )
    {
      const auto *raster = qobject_cast<const QgsRasterLayer *>( &layer );
      return raster && raster->isValid() && raster->bandCount() > 0 && raster->dataProvider()
        && raster->dataProvider()->dataType( 1 ) != Qgis::DataType::Byte;
    }

    //! The one of \a layers that is named so; else the only one there is, if that may be taken.
    QString choose( const QList<QgsMapLayer *> &layers, const QStringList &words, bool takeOnly )
    {
      for ( const QgsMapLayer *layer : layers )
      {
        if ( isNamed( *layer, words ) )
          return layer->id();
      }
      return takeOnly && layers.size() == 1 ? layers.first()->id() : QString();
    }

  } // namespace

  void writeSettings( QgsProject &project, const PanelSettings &settings )
  {
    PanelSettings kept;
    if ( readSettings( project, kept ) && kept == settings )
      return;
    project.removeEntry( SCOPE, PARAMETERS );
    project.writeEntry( SCOPE, QStringLiteral( "/mains" ), settings.mains );
    project.writeEntry( SCOPE, QStringLiteral( "/laterals" ), settings.laterals );
    project.writeEntry( SCOPE, QStringLiteral( "/terrain" ), settings.terrain );
    for ( auto value = settings.parameters.constBegin(); value != settings.parameters.constEnd(); ++value )
      project.writeEntry( SCOPE, entry( value.key() ), value.value().toString() );
  }

  bool readSettings( const QgsProject &project, PanelSettings &settings )
  {
    settings = {};
    bool isKept = false;
    settings.mains = project.readEntry( SCOPE, QStringLiteral( "/mains" ), QString(), &isKept );
    settings.laterals = project.readEntry( SCOPE, QStringLiteral( "/laterals" ) );
    settings.terrain = project.readEntry( SCOPE, QStringLiteral( "/terrain" ) );
    for ( const QString &name : project.entryList( SCOPE, PARAMETERS ) )
      settings.parameters.insert( name, project.readEntry( SCOPE, entry( name ) ) );
    return isKept;
  }

  PanelSettings guessedSettings( const QgsProject &project )
  {
    QList<QgsMapLayer *> lines;
    QList<QgsMapLayer *> rasters;
    for ( QgsMapLayer *layer : project.mapLayers() )
    {
      if ( isLines( *layer ) )
        lines << layer;
      else if ( isNumbers( *layer ) )
        rasters << layer;
    }
    PanelSettings settings;
    settings.mains = choose( lines, { QStringLiteral( "mainline" ), QStringLiteral( "main" ) }, true );
    settings.laterals = choose( lines, { QStringLiteral( "lateral" ) }, false );
    settings.terrain = choose( rasters,
      { QStringLiteral( "bare earth" ), QStringLiteral( "terrain" ), QStringLiteral( "ground" ),
        QStringLiteral( "elevation" ) },
      true );
    const QgsSettings remembered;
    for ( const QString &name : { parameter::PRESSURE_UNIT, parameter::LENGTH_UNIT } )
      settings.parameters.insert( name, remembered.value( UNITS_KEY + name, 0, QgsSettings::Plugins ).toString() );
    return settings;
  }

  void rememberUnits( const QVariantMap &parameters )
  {
    QgsSettings remembered;
    for ( const QString &name : { parameter::PRESSURE_UNIT, parameter::LENGTH_UNIT } )
      remembered.setValue( UNITS_KEY + name, parameters.value( name, 0 ), QgsSettings::Plugins );
  }

} // namespace stillhead
