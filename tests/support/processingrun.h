// SPDX-License-Identifier: GPL-2.0-or-later
// Runs algorithms through the registry, by id, on small layers and rasters made for the purpose, and keeps what they said.
#pragma once

#include "processing/entrypoint.h"
#include "tests/support/smallraster.h"

#include <qgsapplication.h>
#include <qgsfeatureiterator.h>
#include <qgsgeometry.h>
#include <qgsprocessingalgorithm.h>
#include <qgsprocessingcontext.h>
#include <qgsprocessingfeedback.h>
#include <qgsprocessingregistry.h>
#include <qgsprocessingutils.h>
#include <qgsproject.h>
#include <qgsvectorlayer.h>

#include <QTemporaryDir>
#include <QTest>

#include <functional>
#include <memory>
#include <vector>

namespace stillhead::test
{

  //! Runs all tests of \a Test within a QGIS session that has the provider.
  template <class Test> int runWithQgis( int argc, char *argv[] )
  {
    QgsApplication application( argc, argv, true );
    QgsApplication::init();
    QgsApplication::initQgis();
    stillhead_register_provider();
    int failures = 0;
    {
      Test test;
      failures = QTest::qExec( &test, argc, argv );
    }
    QgsApplication::exitQgis();
    return failures;
  }

  //! Keeps what a run says, and cancels it when told to.
  class Listener : public QgsProcessingFeedback
  {
    public:
      Listener()
        : QgsProcessingFeedback( false )
      {
      }

      void reportError( const QString &error, bool ) override { errors << error; }
      void pushWarning( const QString &warning ) override { warnings << warning; }
      void pushInfo( const QString &info ) override { infos << info; }

      QStringList errors;
      QStringList warnings;
      QStringList infos;
  };

  //! A feature whose attributes are asked by name.
  class Row : public QgsFeature
  {
    public:
      Row() = default;
      explicit Row( const QgsFeature &feature )
        : QgsFeature( feature )
      {
      }
      QVariant operator[]( const char *name ) const { return attribute( QString::fromLatin1( name ) ); }
  };

  //! What came of a run. Layers in memory live as long as it does.
  struct Outcome
  {
      bool ok = false;
      QVariantMap results;
      QStringList errors;
      QStringList warnings;
      QStringList infos;
      std::shared_ptr<QgsProcessingContext> context;

      QgsVectorLayer *layer( const QString &output ) const
      {
        return qobject_cast<QgsVectorLayer *>(
          QgsProcessingUtils::mapLayerFromString( results.value( output ).toString(), *context ) );
      }

      std::vector<Row> features( const QString &output ) const
      {
        std::vector<Row> list;
        QgsVectorLayer *source = layer( output );
        if ( !source )
          return list;
        QgsFeature feature;
        QgsFeatureIterator iterator = source->getFeatures();
        while ( iterator.nextFeature( feature ) )
          list.emplace_back( feature );
        return list;
      }

      double number( const QString &output ) const { return results.value( output ).toDouble(); }

      bool said( const QStringList &lines, const QString &part ) const
      {
        for ( const QString &line : lines )
        {
          if ( line.contains( part ) )
            return true;
        }
        return false;
      }
  };

  //! Runs the algorithm \a id ("staticpressure") of our provider.
  inline Outcome runAlgorithm( const QString &id, const QVariantMap &parameters, Listener &listener )
  {
    Outcome outcome;
    outcome.context = std::make_shared<QgsProcessingContext>();
    outcome.context->setFeedback( &listener );
    outcome.context->setProject( QgsProject::instance() );
    const std::unique_ptr<QgsProcessingAlgorithm> algorithm(
      QgsApplication::processingRegistry()->createAlgorithmById( QStringLiteral( "stillhead:" ) + id ) );
    if ( algorithm )
      outcome.results = algorithm->run( parameters, *outcome.context, &listener, &outcome.ok );
    outcome.context->setFeedback( nullptr );
    outcome.errors = listener.errors;
    outcome.warnings = listener.warnings;
    outcome.infos = listener.infos;
    return outcome;
  }

  inline Outcome runAlgorithm( const QString &id, const QVariantMap &parameters )
  {
    Listener listener;
    return runAlgorithm( id, parameters, listener );
  }

  //! A feature to draw: WKT (blank: no geometry) and attributes.
  struct Drawn
  {
      QString wkt;
      QVariantList attributes = {};
  };

  using LayerPointer = std::unique_ptr<QgsVectorLayer>;

  //! A layer in memory; \a definition as in "LineString?crs=EPSG:32631&field=cover:double".
  inline LayerPointer drawLayer( const QString &definition, const std::vector<Drawn> &features, const QString &name )
  {
    auto layer = std::make_unique<QgsVectorLayer>( definition, name, QStringLiteral( "memory" ) );
    QgsFeatureList list;
    for ( const Drawn &drawn : features )
    {
      QgsFeature feature( layer->fields() );
      if ( !drawn.wkt.isEmpty() )
        feature.setGeometry( QgsGeometry::fromWkt( drawn.wkt ) );
      for ( int i = 0; i < drawn.attributes.size(); ++i )
        feature.setAttribute( i, drawn.attributes.at( i ) );
      list << feature;
    }
    layer->dataProvider()->addFeatures( list );
    layer->updateExtents();
    return layer;
  }

  inline QVariant asParameter( const LayerPointer &layer )
  {
    return QVariant::fromValue( layer.get() );
  }

  //! A place of the invented ground: metres east and north of a corner that lies in open sea.
  inline QString at( double east, double north )
  {
    return QStringLiteral( "%1 %2" ).arg( 320000.0 + east, 0, 'f', 6 ).arg( 110000.0 + north, 0, 'f', 6 );
  }

  //! "LINESTRING(…)" through places of the invented ground.
  inline QString line( const std::vector<std::pair<double, double>> &places )
  {
    QStringList parts;
    for ( const auto &[east, north] : places )
      parts << at( east, north );
    return QStringLiteral( "LINESTRING(%1)" ).arg( parts.join( QStringLiteral( ", " ) ) );
  }

  //! A point parameter at a place of the invented ground.
  inline QString place( double east, double north )
  {
    return QStringLiteral( "%1 [EPSG:32631]" ).arg( at( east, north ).replace( ' ', ',' ) );
  }

  //! Ground, pipe and source with answers that need no paper; the rasters live in its folder.
  class Slope
  {
    public:
      static constexpr int COLUMNS = 401;
      static constexpr int ROWS = 81;

      //! Ground in metres: falls 1 m in 10 to the east from 100 m; cell centres at whole metres, north −40 to 40.
      Slope()
      {
        makeTerrain( QStringLiteral( "slope.tif" ), []( double east, double ) { return 100.0 - 0.1 * east; } );
        mMains = drawLayer( lines(), { { line( { { 0, 0 }, { 300, 0 } } ) } }, QStringLiteral( "pipe" ) );
      }

      //! Parameters of a surface with band areas over the slope.
      QVariantMap surfaceParameters() const
      {
        return { { "TERRAIN", path( "slope.tif" ) }, { "SOURCE", place( 0, 0 ) }, { "SOURCE_KIND", 1 },
          { "SOURCE_VALUE", 150 }, { "PRESSURE_UNIT", 3 }, { "LENGTH_UNIT", 1 }, { "SURFACE", path( "contract.tif" ) },
          { "BAND_AREAS", QgsProcessing::TEMPORARY_OUTPUT }, { "GROUND_LIMITS", QgsProcessing::TEMPORARY_OUTPUT } };
      }

      static QString lines() { return QStringLiteral( "LineString?crs=EPSG:32631" ); }

      QString path( const QString &file ) const { return mFolder.filePath( file ); }

      //! A terrain of the same cells; \a change may alter what is written.
      QString makeTerrain( const QString &file, const std::function<double( double east, double north )> &ground,
        const std::function<void( SmallRaster & )> &change = {},
        const std::function<void( GDALDataset & )> &finish = {} ) const
      {
        SmallRaster raster;
        raster.columns = COLUMNS;
        raster.rows = ROWS;
        raster.type = GDT_Float64;
        raster.geoTransform = { 319999.5, 1.0, 0.0, 110040.5, 0.0, -1.0 };
        raster.crs = "EPSG:32631";
        raster.bands = { {} };
        for ( int row = 0; row < ROWS; ++row )
        {
          for ( int column = 0; column < COLUMNS; ++column )
            raster.bands[0].push_back( ground( column, 40.0 - row ) );
        }
        if ( change )
          change( raster );
        const DatasetPointer dataset = create( path( file ).toStdString(), raster );
        if ( finish )
          finish( *dataset );
        return path( file );
      }

      /**
       * One main from (0, 0) to (300, 0); water level 150 m at its start; metres of water and metres, so that the pressure is
       * 50 + east / 10. Limits 20 and 55.
       */
      QVariantMap parameters() const
      {
        return { { QStringLiteral( "MAINS" ), asParameter( mMains ) },
          { QStringLiteral( "TERRAIN" ), path( QStringLiteral( "slope.tif" ) ) },
          { QStringLiteral( "TERRAIN_UNIT" ), 1 }, { QStringLiteral( "SOURCE" ), place( 0, 0 ) },
          { QStringLiteral( "SOURCE_KIND" ), 1 }, { QStringLiteral( "SOURCE_VALUE" ), 150 },
          { QStringLiteral( "SOURCE_LOW" ), 150 }, { QStringLiteral( "PRESSURE_UNIT" ), 3 },
          { QStringLiteral( "LENGTH_UNIT" ), 1 }, { QStringLiteral( "SPANS" ), temporary() },
          { QStringLiteral( "NODES" ), temporary() }, { QStringLiteral( "STRETCHES" ), temporary() },
          { QStringLiteral( "EXTREMES" ), temporary() }, { QStringLiteral( "FINDINGS" ), temporary() } };
      }

      //! The same with some parameters set otherwise.
      QVariantMap parameters( const QVariantMap &changes ) const
      {
        QVariantMap all = parameters();
        for ( auto change = changes.constBegin(); change != changes.constEnd(); ++change )
          all.insert( change.key(), change.value() );
        return all;
      }

      static QString temporary() { return QgsProcessing::TEMPORARY_OUTPUT; }

    private:
      QTemporaryDir mFolder;
      LayerPointer mMains;
  };

} // namespace stillhead::test
