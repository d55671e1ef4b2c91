// SPDX-License-Identifier: GPL-2.0-or-later
// The stages in their order; each is a plain value handed to the next.
#include "core/job/staticjob.h"

#include "core/feedback/parallel.h"
#include "core/job/placing.h"
#include "core/job/zonefeeding.h"
#include "core/judgement/judge.h"
#include "core/judgement/linejudge.h"
#include "core/judgement/sags.h"
#include "core/judgement/stretches.h"
#include "core/judgement/summits.h"
#include "core/profile/profilebuilder.h"
#include "core/terrain/segmentwalk.h"

#include <algorithm>
#include <cmath>
#include <memory>
#include <numeric>
#include <utility>

namespace stillhead
{

  namespace
  {
    class Pipeline
    {
      public:
        Pipeline( const StaticJob &job, Monitor &monitor )
          : mJob( job )
          , mMonitor( monitor )
        {
        }

        StaticResult run()
        {
          mResult.drawing = canonicalDrawing( *mJob.drawing, *mJob.measure, mJob.threads, mResult.findings, mMonitor );
          if ( mResult.drawing.lines.empty() )
            throw Refusal { Refusal::Reason::NoLines, 0.0, {}, {}, {} };
          findWithoutSurvey();
          joinAndFeed();
          judgeLines();
          judgeWhole();
          return std::move( mResult );
        }

      private:
        void findWithoutSurvey()
        {
          if ( !mJob.useLineZ )
            return;
          for ( const CanonicalLine &line : mResult.drawing.lines )
          {
            if ( !hasSurvey( mResult.drawing, line ) )
              addFinding( FindingCode::NoSurveyZ, mResult.drawing.vertices[line.first] ).line = line.drawn;
          }
        }

        Finding &addFinding( FindingCode code, const PlanPoint &place )
        {
          Finding finding;
          finding.code = code;
          finding.place = place;
          mResult.findings.push_back( finding );
          return mResult.findings.back();
        }

        TerrainPoint pixelOf( const PlanPoint &place ) const
        {
          TerrainPoint terrain;
          mJob.planToTerrain->transform( &place, &terrain, 1 );
          return mJob.terrain->grid().toPixel( terrain );
        }

        //! Places sources and devices, joins the lines there, parts the network at devices and feeds its zones.
        void joinAndFeed()
        {
          Placing placing( mJob, mResult.drawing, mResult.findings );
          mResult.sources = placing.placeSources();
          std::vector<DevicePlace> devices = placing.placeDevices();

          std::vector<std::size_t> order( mResult.sources.size() );
          std::iota( order.begin(), order.end(), 0 );
          const auto on = [&]( std::size_t i ) {
            return std::make_pair( mResult.sources[i].on.line, mResult.sources[i].on.alongM );
          };
          std::stable_sort(
            order.begin(), order.end(), [&]( std::size_t a, std::size_t b ) { return on( a ) < on( b ); } );
          std::vector<PlaceOnLine> places;
          for ( const std::size_t source : order )
            places.push_back( mResult.sources[source].on );
          for ( const DevicePlace &device : devices )
            places.push_back( device.on );

          std::vector<int> nodes;
          mResult.network = joinLines(
            mResult.drawing, *mJob.measure, mJob.joins, places, nodes, mJob.threads, mResult.findings, mMonitor );
          for ( std::size_t i = 0; i < order.size(); ++i )
          {
            mResult.sources[order[i]].node = nodes[i];
            mResult.network.nodes[static_cast<std::size_t>( nodes[i] )].kind = NodeKind::Source;
          }
          for ( std::size_t i = 0; i < devices.size(); ++i )
            devices[i].node = nodes[order.size() + i];
          partAtDevices( mResult.network, mResult.drawing, mJob.devices, devices, mResult.findings );
          const auto isLeftOut = [&]( const DevicePlace &place ) {
            return mResult.network.nodes[static_cast<std::size_t>( place.node )].device != place.device;
          };
          devices.erase( std::remove_if( devices.begin(), devices.end(), isLeftOut ), devices.end() );
          std::vector<double> elevationsM;
          for ( const DevicePlace &device : devices )
            elevationsM.push_back( placing.deviceElevationM( device ) );
          directLinks( mResult.network, mResult.drawing, mJob.devices, devices );
          mResult.zoneMap = zonesOf( mResult.network );
          feedZones( mJob, devices, elevationsM, mResult );
        }

        //! Lines in the order of the tiles they begin in, so that neighbours are worked on while their terrain is at hand.
        std::vector<std::size_t> linesByTile() const
        {
          std::vector<std::pair<std::pair<double, double>, std::size_t>> keys;
          keys.reserve( mResult.drawing.lines.size() );
          for ( std::size_t i = 0; i < mResult.drawing.lines.size(); ++i )
          {
            const TerrainPoint pixel = pixelOf( mResult.drawing.vertices[mResult.drawing.lines[i].first] );
            const auto tile = [&]( double position, int size ) {
              return std::isfinite( position ) ? std::floor( position / size ) : 0.0;
            };
            keys.push_back(
              { { tile( pixel.y, mJob.terrain->tileRows() ), tile( pixel.x, mJob.terrain->tileColumns() ) }, i } );
          }
          std::sort( keys.begin(), keys.end() );
          std::vector<std::size_t> order;
          order.reserve( keys.size() );
          for ( const auto &key : keys )
            order.push_back( key.second );
          return order;
        }

        //! Neighbours in chunks large enough that threads seldom wait for the same tile, and enough of them to share out.
        static std::size_t chunkOf( std::size_t lines, std::size_t threads )
        {
          return std::clamp<std::size_t>( lines / ( 16 * threads ), 1, 64 );
        }

        void judgeLines()
        {
          const LineParts parts( mResult.network, mResult.drawing.lines.size() );
          const CutElevations cuts = cutElevationsOf( mResult.zones, mJob.limits, mJob.specificWeightNPerM3 );
          const LineJudgeInput input { mResult.drawing, mResult.network, parts, mResult.zoneMap, mResult.zones,
            mJob.limits, mJob.specificWeightNPerM3, sagDepthM() };
          const std::vector<std::size_t> order = linesByTile();
          std::vector<LineOutcome> outcomes( order.size() );
          std::vector<double> nodeElevationsM( mResult.network.nodes.size(), NO_ELEVATION );
          std::vector<std::unique_ptr<LineJudge>> judges( threadCount( mJob.threads ) );
          parallelRanges( order.size(), chunkOf( order.size(), judges.size() ), mJob.threads, mMonitor, 0.14, 0.9,
            [&]( std::size_t first, std::size_t last, unsigned worker ) {
              if ( !judges[worker] )
                judges[worker] = std::make_unique<LineJudge>(
                  input, cuts, ProfileBuilder( mResult.drawing, *mJob.planToTerrain, *mJob.terrain, mJob.useLineZ ) );
              for ( std::size_t i = first; i < last; ++i )
                outcomes[order[i]] = judges[worker]->judge( order[i], nodeElevationsM );
            } );
          gather( outcomes );
          judgeNodes( nodeElevationsM );
        }

        std::optional<double> sagDepthM() const
        {
          return mJob.sagDepthM ? std::optional<double>( countedSagDepthM( *mJob.sagDepthM ) ) : std::nullopt;
        }

        void gather( std::vector<LineOutcome> &outcomes )
        {
          std::size_t pieces = 0;
          std::size_t vertices = 0;
          bool anyElevation = false;
          for ( const LineOutcome &outcome : outcomes )
          {
            pieces += outcome.pieces.size();
            vertices += outcome.vertices.size();
            anyElevation = anyElevation || outcome.anyElevation;
          }
          if ( !anyElevation && !Placing( mJob, mResult.drawing, mResult.findings ).linesMeetTerrain() )
            throw Refusal { Refusal::Reason::NoOverlap, 0.0, {}, {}, {} };
          mResult.pieces.reserve( pieces );
          mResult.vertices.reserve( vertices );
          for ( LineOutcome &outcome : outcomes )
          {
            const unsigned first = static_cast<unsigned>( mResult.vertices.size() );
            for ( Piece &piece : outcome.pieces )
            {
              piece.firstVertex += first;
              mResult.pieces.push_back( piece );
            }
            mResult.vertices.insert( mResult.vertices.end(), outcome.vertices.begin(), outcome.vertices.end() );
            const std::size_t firstTurn = mTurns.turns.size();
            for ( TurnRun &run : outcome.turns.runs )
            {
              run.first += firstTurn;
              mTurns.runs.push_back( run );
            }
            mTurns.turns.insert( mTurns.turns.end(), outcome.turns.turns.begin(), outcome.turns.turns.end() );
            outcome = {};
          }
        }

        void judgeNodes( const std::vector<double> &elevationsM )
        {
          mResult.nodeFigures.reserve( elevationsM.size() );
          for ( std::size_t i = 0; i < elevationsM.size(); ++i )
          {
            CutPiece point;
            point.lowestM = point.highestM = point.middleM = elevationsM[i];
            point.known = !std::isnan( elevationsM[i] );
            const int zone = mResult.zoneMap.ofNode[i];
            const Role role = mResult.drawing.lines[static_cast<std::size_t>( mResult.network.nodes[i].on.line )].role;
            mNodePieces.push_back( judgedPiece( point, -1, zone, mResult.zones[static_cast<std::size_t>( zone )], role,
              mJob.limits, mJob.specificWeightNPerM3 ) );
            mNodePieces.back().lowestM = elevationsM[i];
          }
        }

        void judgeWhole()
        {
          stopIfCancelled( mMonitor );
          const PieceGraph graph( mResult.network, mResult.pieces );
          const Reach reach = lowCaseReach( graph, mResult.zones );
          settleSummits( mResult.pieces, mResult.zones, reach );
          finishNodes( reach );
          mMonitor.progress( 0.93 );
          findSummitsAndGaps( graph, mResult.drawing, mResult.zones, reach, mResult.findings );
          stopIfCancelled( mMonitor );
          mResult.stretches = findStretches( graph, mResult.drawing, *mJob.drawing, mResult.zones, mJob.limits );
          mResult.extremes = findExtremes( graph, mResult.stretches, mResult.zones );
          if ( mJob.sagDepthM )
          {
            const std::vector<Extreme> places = findSummitsAndSags(
              graph, mResult.drawing, mTurns, *sagDepthM(), mResult.zones, mJob.specificWeightNPerM3 );
            mResult.extremes.insert( mResult.extremes.end(), places.begin(), places.end() );
          }
          mResult.totals = totalsOf( mResult.pieces );
          mMonitor.progress( 1.0 );
        }

        void finishNodes( const Reach &reach )
        {
          for ( std::size_t i = 0; i < mNodePieces.size(); ++i )
          {
            Piece &node = mNodePieces[i];
            const Zone &zone = mResult.zones[static_cast<std::size_t>( node.zone )];
            if ( zone.fed && node.state != State::NoTerrain && reach.ofNode[i] == Reached::No )
              markPastASummit( node );
            mResult.nodeFigures.push_back( { node.lowestM, node.pressureLowPa, node.pressureHighPa, node.state } );
          }
        }

        const StaticJob &mJob;
        Monitor &mMonitor;
        StaticResult mResult;
        std::vector<Piece> mNodePieces;
        Turns mTurns;
    };
  } // namespace

  Totals totalsOf( const std::vector<Piece> &pieces )
  {
    Totals totals;
    totals.lowestPa = totals.highestPa = NOT_A_FIGURE;
    for ( const Piece &piece : pieces )
    {
      const double lengthM = piece.toM - piece.fromM;
      totals.lengthM += lengthM;
      totals.withinM += piece.state == State::WithinLimits ? lengthM : 0.0;
      totals.overM += piece.over ? lengthM : 0.0;
      totals.shortM += piece.isShort ? lengthM : 0.0;
      totals.noSourceM += piece.state == State::NoSource ? lengthM : 0.0;
      totals.noTerrainM += piece.state == State::NoTerrain ? lengthM : 0.0;
      totals.closeCallM += piece.closeCall ? lengthM : 0.0;
      if ( !( totals.lowestPa <= piece.pressureLowPa ) && !std::isnan( piece.pressureLowPa ) )
        totals.lowestPa = piece.pressureLowPa;
      if ( !( totals.highestPa >= piece.pressureHighPa ) && !std::isnan( piece.pressureHighPa ) )
        totals.highestPa = piece.pressureHighPa;
    }
    return totals;
  }

  StaticResult solveStatics( const StaticJob &job, Monitor &monitor )
  {
    return Pipeline( job, monitor ).run();
  }

} // namespace stillhead
