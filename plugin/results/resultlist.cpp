// SPDX-License-Identifier: GPL-2.0-or-later
// Rows are made by the tables of the outputs, so a list cannot say anything else than the layer would.
#include "plugin/results/resultlist.h"

#include "core/job/pieceline.h"
#include "processing/styles/fieldaliases.h"

#include <qgslinestring.h>
#include <qgsmemoryproviderutils.h>
#include <qgsmultilinestring.h>
#include <qgsvectorlayer.h>

#include <memory>

namespace stillhead
{

  namespace
  {

    QStringList headingsOf( const ResultTable &table, const ResultStyle &style )
    {
      const std::unique_ptr<QgsVectorLayer> layer( QgsMemoryProviderUtils::createMemoryLayer(
        QStringLiteral( "list" ), table.fields, table.type, QgsCoordinateReferenceSystem() ) );
      setFieldAliases( *layer, table.what, style );
      QStringList headings;
      for ( int i = 0; i < layer->fields().count(); ++i )
        headings << layer->attributeDisplayName( i );
      return headings;
    }

    ResultList listOf( const ResultTable &table, const ResultStyle &style )
    {
      ResultList list;
      list.headings = headingsOf( table, style );
      std::vector<QgsFeature> features( table.rows );
      table.make( 0, table.rows, features.data() );
      list.rows.reserve( static_cast<int>( table.rows ) );
      for ( const QgsFeature &feature : features )
        list.rows << ResultRow { feature.attributes().toList(), feature.geometry() };
      return list;
    }

    //! All pipe of \a stretch.
    QgsGeometry pipeOf( const Stretch &stretch, const SolvedPlan &plan )
    {
      auto lines = std::make_unique<QgsMultiLineString>();
      std::vector<PieceVertex> vertices;
      for ( const int number : stretch.pieces )
      {
        const Piece &piece = plan.result.pieces[static_cast<std::size_t>( number )];
        pieceLine( plan.result, piece, plan.units.specificWeightNPerM3(), vertices );
        QVector<double> x;
        QVector<double> y;
        for ( const PieceVertex &vertex : vertices )
        {
          x << vertex.x;
          y << vertex.y;
        }
        lines->addGeometry( new QgsLineString( x, y ) );
      }
      return QgsGeometry( std::move( lines ) );
    }

  } // namespace

  ResultList placeList( const SolvedPlan &plan )
  {
    const ResultContext context = plan.context();
    return listOf( extremeTable( context ), plan.style );
  }

  ResultList stretchList( const SolvedPlan &plan )
  {
    const ResultContext context = plan.context();
    std::vector<QgsGeometry> places;
    for ( const Stretch &stretch : plan.result.stretches )
      places.push_back( pipeOf( stretch, plan ) );
    return listOf( stretchTable( context, places ), plan.style );
  }

  ResultList findingList( const SolvedPlan &plan )
  {
    const ResultContext context = plan.context();
    return listOf( findingTable( context ), plan.style );
  }

} // namespace stillhead
