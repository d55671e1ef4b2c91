// SPDX-License-Identifier: GPL-2.0-or-later
// The main job over a terrain in memory, with everything it needs kept together, and its result by place: rows without
// any number of a line, span or node, so that results of the same drawing drawn otherwise can be compared to the bit.
#pragma once

#include "core/job/pieceline.h"
#include "core/job/staticjob.h"
#include "core/judgement/judge.h"
#include "tests/support/memoryterrain.h"
#include "tests/support/networksketch.h"

#include <QString>
#include <QStringList>

#include <algorithm>
#include <memory>
#include <string>

namespace stillhead::test
{

  //! "Conventional water" of NIST SP 811: 1000 kg/m3 at standard gravity; what the hand-worked cases use.
  constexpr double CONVENTIONAL_N_PER_M3 = 1000.0 * 9.80665;

  //! A weight that makes 1 Pa per millimetre of height: dyadic elevations give exact pressures.
  constexpr double EXACT_N_PER_M3 = 1000.0;

  /**
   * The main job. Unless changed: γ = 1000 N/m3, a flat terrain at 0 m, an open water level of 100 m at the origin, limits
   * 20 and 60 kPa (80 and 40 m of pipe elevation), no bands, one thread.
   */
  struct JobSetup
  {
      Drawing drawing;
      PlanarMeasure planar;
      SamePlan samePlan;
      std::unique_ptr<MemoryTerrain> terrain;
      StaticJob job;
      std::size_t cacheBytes = TileCache::DEFAULT_BUDGET_BYTES;

      explicit JobSetup( const Drawing &drawn )
        : drawing( drawn )
        , terrain( std::make_unique<MemoryTerrain>( 2, 2, std::vector<double>( 4, 0.0 ), centresAt( -1e6, 1e6, 2e6 ) ) )
      {
        job.sources.resize( 1 );
        job.sources.front().kind = SourceKind::WaterLevel;
        job.sources.front().high = 100.0;
        job.sources.front().low = 100.0;
        job.specificWeightNPerM3 = EXACT_N_PER_M3;
        setLimits( 20000.0, 60000.0 );
        job.threads = 1;
      }

      //! A sketch whose Z, where it has any, is the pipe.
      explicit JobSetup( const std::string &sketch )
        : JobSetup( sketched( sketch ) )
      {
        job.useLineZ = !drawing.surveyZM.empty();
      }

      void setLimits( double leastPa, double mostPa )
      {
        job.limits.leastPa = job.limits.lateralLeastPa = leastPa;
        job.limits.mostPa = job.limits.lateralMostPa = mostPa;
      }

      void setLevels( double highM, double lowM )
      {
        job.sources.front().high = highM;
        job.sources.front().low = lowM;
      }

      StaticResult solve( Monitor &monitor )
      {
        TileCache cache( *terrain, cacheBytes );
        job.drawing = &drawing;
        job.measure = job.measure ? job.measure : &planar;
        job.planToTerrain = job.planToTerrain ? job.planToTerrain : &samePlan;
        job.terrain = &cache;
        StaticResult result = solveStatics( job, monitor );
        job.terrain = nullptr;
        return result;
      }

      StaticResult solve()
      {
        Monitor monitor;
        return solve( monitor );
      }
  };

  inline std::size_t countOf( const StaticResult &result, FindingCode code )
  {
    return static_cast<std::size_t>( std::count_if( result.findings.begin(), result.findings.end(),
      [code]( const Finding &finding ) { return finding.code == code; } ) );
  }

  //! The first finding of that code.
  inline Finding findingOf( const StaticResult &result, FindingCode code )
  {
    for ( const Finding &finding : result.findings )
    {
      if ( finding.code == code )
        return finding;
    }
    throw std::out_of_range( findingName( code ) );
  }

  inline const CanonicalLine &lineOf( const StaticResult &result, const Piece &piece )
  {
    return result.drawing
      .lines[static_cast<std::size_t>( result.network.spans[static_cast<std::size_t>( piece.span )].line )];
  }

  //! The piece of a drawn line at a distance along it as drawn.
  inline const Piece &pieceAlong( const StaticResult &result, int drawn, double alongM )
  {
    for ( const Piece &piece : result.pieces )
    {
      const CanonicalLine &line = lineOf( result, piece );
      const double along = line.reversed ? line.lengthM - alongM : alongM;
      if ( line.drawn == drawn && along >= piece.fromM && along <= piece.toM )
        return piece;
    }
    throw std::out_of_range( "no piece there" );
  }

  //! States of a drawn line's pieces as drawn: "0-20 within limits, 20-45 over limit"; lengths in whole metres.
  inline QString statesAlong( const StaticResult &result, int drawn )
  {
    std::vector<std::pair<double, QString>> parts;
    for ( const Piece &piece : result.pieces )
    {
      const CanonicalLine &line = lineOf( result, piece );
      if ( line.drawn != drawn )
        continue;
      const double from = line.reversed ? line.lengthM - piece.toM : piece.fromM;
      const double to = line.reversed ? line.lengthM - piece.fromM : piece.toM;
      parts.emplace_back(
        from, QString::number( from ) + "-" + QString::number( to ) + " " + stateName( piece.state ) );
    }
    std::sort( parts.begin(), parts.end() );
    QStringList texts;
    for ( const auto &part : parts )
      texts << part.second;
    return texts.join( ", " );
  }

  //! Everything in \a result, by place and to the bit (numbers with 17 digits), sorted.
  inline QStringList rowsByPlace( const StaticResult &result, const Drawing &drawn, double specificWeightNPerM3 )
  {
    const auto bits = []( double value ) { return QString::number( value, 'g', 17 ); };
    const auto place = [&]( const PlanPoint &p ) { return bits( p.x ) + " " + bits( p.y ); };
    const auto lineText = [&]( int number ) {
      if ( number < 0 )
        return QString( "-" );
      const DrawnLine &line = drawn.lines[static_cast<std::size_t>( number )];
      const std::vector<PlanPoint> there = verticesOf( drawn, line );
      const std::vector<PlanPoint> back( there.rbegin(), there.rend() );
      QString text = line.role == Role::Lateral ? "lateral" : "main";
      text += QString::fromStdString( drawn.systems[static_cast<std::size_t>( line.system )] );
      for ( const PlanPoint &p : back < there ? back : there )
        text += " " + place( p );
      return text;
    };
    QStringList rows;
    std::vector<QString> pieceTexts;
    std::vector<PieceVertex> vertices;
    for ( const Piece &piece : result.pieces )
    {
      pieceLine( result, piece, specificWeightNPerM3, vertices );
      if ( lineOf( result, piece ).reversed )
        std::reverse( vertices.begin(), vertices.end() );
      QString text = QString( "piece %1 band %2 %3%4%5 " )
                       .arg( stateName( piece.state ) )
                       .arg( piece.band )
                       .arg( piece.over ? "o" : "-" )
                       .arg( piece.isShort ? "s" : "-" )
                       .arg( piece.closeCall ? "c" : "-" );
      for ( const double value : { piece.fromM, piece.toM, piece.lowestM, piece.lowestAtM, piece.highestM,
              piece.highestAtM, piece.pressureLowPa, piece.pressureHighPa } )
        text += bits( value ) + " ";
      text += piece.zone == 0 ? "fed" : "other";
      for ( const PieceVertex &vertex : vertices )
        text += " / " + bits( vertex.x ) + " " + bits( vertex.y ) + " " + bits( vertex.elevationM ) + " "
          + bits( vertex.pressurePa );
      pieceTexts.push_back( text + " of " + lineText( lineOf( result, piece ).drawn ) );
      rows << pieceTexts.back();
    }
    for ( std::size_t i = 0; i < result.network.nodes.size(); ++i )
    {
      const Node &node = result.network.nodes[i];
      const NodeFigures &figures = result.nodeFigures[i];
      rows << QString( "node %1 %2 %3 " )
                .arg( static_cast<int>( node.kind ) )
                .arg( node.degree )
                .arg( stateName( figures.state ) )
          + place( node.place ) + " " + bits( figures.elevationM ) + " " + bits( figures.pressureLowPa ) + " "
          + bits( figures.pressureHighPa );
    }
    for ( const Stretch &stretch : result.stretches )
    {
      QStringList parts;
      for ( const int piece : stretch.pieces )
        parts << pieceTexts[static_cast<std::size_t>( piece )];
      parts.sort();
      rows << QString( "stretch %1%2 %3 %4 " )
                .arg( stretch.over ? "over" : "short" )
                .arg( stretch.closeCall ? " close" : "" )
                .arg( stretch.mainlines )
                .arg( stretch.laterals )
          + bits( stretch.worstPa ) + " " + bits( stretch.beyondPa ) + " " + bits( stretch.worstElevationM ) + " "
          + bits( stretch.lengthM ) + " " + pieceTexts[static_cast<std::size_t>( stretch.worstPiece )]
          + parts.join( "; " );
    }
    for ( const Extreme &extreme : result.extremes )
    {
      const CanonicalLine &line = lineOf( result, result.pieces[static_cast<std::size_t>( extreme.piece )] );
      static const char *const kinds[] { "highest", "lowest", "summit", "sag" };
      rows << QString( "extreme %1 %2 %3 " )
                .arg( kinds[static_cast<int>( extreme.kind )] )
                .arg( extreme.stretch >= 0 ? "of stretch" : "of zone" )
                .arg( extreme.zone == 0 ? "fed" : "other" )
          + place( result.drawing.placeAt( line, extreme.alongM ) ) + " " + bits( extreme.pressurePa ) + " "
          + bits( extreme.elevationM );
    }
    for ( const Finding &finding : result.findings )
    {
      QStringList lines { lineText( finding.line ), lineText( finding.otherLine ) };
      if ( finding.code != FindingCode::NearMiss )
        lines.sort();
      rows << QString( "finding %1 " ).arg( findingName( finding.code ) ) + place( finding.place ) + " "
          + bits( finding.gapM ) + " " + bits( finding.figureM ) + " " + bits( finding.lengthM ) + " "
          + bits( finding.figurePa ) + ( finding.joinedByEnd ? " joined " : " " ) + lines.join( " / " );
    }
    const Totals &totals = result.totals;
    QString sums = "totals";
    for ( const double value : { totals.lengthM, totals.withinM, totals.overM, totals.shortM, totals.noSourceM,
            totals.noTerrainM, totals.closeCallM, totals.lowestPa, totals.highestPa } )
      sums += " " + bits( value );
    rows << sums
         << "levels " + bits( result.sources.front().levels.highM ) + " " + bits( result.sources.front().levels.lowM );
    rows.sort();
    return rows;
  }

} // namespace stillhead::test
