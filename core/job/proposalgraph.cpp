// SPDX-License-Identifier: GPL-2.0-or-later
// Spans become edges, pieces give served or not, runs give the elevations.
#include "core/job/proposalgraph.h"

#include "core/feedback/parallel.h"
#include "core/job/runs.h"
#include "core/profile/profilesearch.h"

#include <algorithm>
#include <cmath>
#include <memory>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    class GraphMaker
    {
      public:
        GraphMaker( const StaticJob &job, const StaticResult &result, Monitor &monitor )
          : mJob( job )
          , mResult( result )
          , mMonitor( monitor )
          , mFirstSpan( result.drawing.lines.size() + 1, 0 )
          , mFirstPiece( result.network.spans.size() + 1, 0 )
        {
          for ( const Span &span : result.network.spans )
            ++mFirstSpan[index( span.line ) + 1];
          for ( const Piece &piece : result.pieces )
            ++mFirstPiece[index( piece.span ) + 1];
          for ( std::size_t i = 1; i < mFirstSpan.size(); ++i )
            mFirstSpan[i] += mFirstSpan[i - 1];
          for ( std::size_t i = 1; i < mFirstPiece.size(); ++i )
            mFirstPiece[i] += mFirstPiece[i - 1];
        }

        PipeGraph run()
        {
          mGraph.nodeCount = static_cast<int>( mResult.network.nodes.size() );
          for ( const Zone &zone : mResult.zones )
            mGraph.zones.push_back( zone.levels );
          for ( std::size_t i = 0; i < mResult.network.nodes.size(); ++i )
          {
            if ( mResult.network.nodes[i].kind == NodeKind::Source )
              mGraph.sources.push_back( static_cast<int>( i ) );
          }
          std::vector<std::vector<ForestPart>> parts( mResult.network.spans.size() );
          std::vector<std::unique_ptr<ProfileBuilder>> builders( threadCount( mJob.threads ) );
          parallelRanges( mResult.drawing.lines.size(), 8, mJob.threads, mMonitor, 0.0, 1.0,
            [&]( std::size_t first, std::size_t last, unsigned worker ) {
              if ( !builders[worker] )
                builders[worker] = std::make_unique<ProfileBuilder>(
                  mResult.drawing, *mJob.planToTerrain, *mJob.terrain, mJob.useLineZ );
              for ( std::size_t line = first; line < last; ++line )
                makeLine( line, *builders[worker], parts );
            } );
          for ( std::size_t i = 0; i < parts.size(); ++i )
          {
            addSpan( i, parts[i] );
            parts[i] = {};
          }
          for ( const DeviceLink &link : mResult.network.links )
            addLink( link );
          return std::move( mGraph );
        }

      private:
        bool isFed( const Span &span ) const
        {
          return mResult.zones[index( mResult.zoneMap.ofNode[index( span.fromNode )] )].fed;
        }

        //! How near to \a node a regulator may be written: at a source from which this pipe alone leaves, at its very end.
        double stubM( int node ) const
        {
          const Node &own = mResult.network.nodes[index( node )];
          return own.kind == NodeKind::Source && own.degree == 1 && own.device < 0 ? 0.0 : 2.0 * mJob.joins.toleranceM;
        }

        void makeLine( std::size_t line, ProfileBuilder &builder, std::vector<std::vector<ForestPart>> &parts ) const
        {
          if ( mFirstSpan[line] == mFirstSpan[line + 1] )
            return;
          Profile profile;
          std::vector<Run> runs;
          builder.build( mResult.drawing.lines[line], profile );
          for ( std::size_t span = mFirstSpan[line]; span < mFirstSpan[line + 1]; ++span )
          {
            if ( isFed( mResult.network.spans[span] ) )
              makeSpan( span, profile, runs, parts[span] );
          }
        }

        void makeSpan(
          std::size_t span, const Profile &profile, std::vector<Run> &runs, std::vector<ForestPart> &parts ) const
        {
          const Span &own = mResult.network.spans[span];
          // Where regulators may be written, elevations must be exact.
          const double apartM = 2.0 * mJob.joins.toleranceM;
          std::vector<double> cutsM { own.fromM + apartM, own.fromM + 2.0 * apartM, own.toM - apartM,
            own.toM - 2.0 * apartM, 0.5 * ( own.fromM + own.toM ) };
          std::sort( cutsM.begin(), cutsM.end() );
          for ( std::size_t i = mFirstPiece[span]; i < mFirstPiece[span + 1]; ++i )
          {
            const Piece &piece = mResult.pieces[i];
            ForestPart part;
            part.line = own.line;
            part.zone = piece.zone;
            part.role = mResult.drawing.lines[index( own.line )].role;
            part.known = !std::isnan( piece.lowestM );
            part.served = part.known && !piece.isShort;
            part.fromM = piece.fromM;
            part.toM = piece.toM;
            if ( !part.known )
            {
              parts.push_back( part );
              continue;
            }
            const bool afterGap = i > mFirstPiece[span] && std::isnan( mResult.pieces[i - 1].lowestM );
            const bool beforeGap = i + 1 < mFirstPiece[span + 1] && std::isnan( mResult.pieces[i + 1].lowestM );
            std::vector<double> ownCutsM = cutsM;
            if ( afterGap )
              ownCutsM.push_back( piece.fromM + FROM_GAP_M );
            if ( beforeGap )
              ownCutsM.push_back( piece.toM - FROM_GAP_M );
            std::sort( ownCutsM.begin(), ownCutsM.end() );
            runsOf( profile, piece.fromM, piece.toM, ownCutsM, runs );
            for ( const Run &run : runs )
            {
              part.canStand = !( afterGap && run.toM <= piece.fromM + FROM_GAP_M )
                && !( beforeGap && run.fromM >= piece.toM - FROM_GAP_M );
              part.fromM = run.fromM;
              part.toM = run.toM;
              part.elevation = { run.fromElevationM, run.toElevationM, 0.0 };
              parts.push_back( part );
            }
          }
        }

        void addSpan( std::size_t span, const std::vector<ForestPart> &parts )
        {
          if ( parts.empty() )
            return;
          const Span &own = mResult.network.spans[span];
          GraphEdge edge;
          edge.fromNode = own.fromNode;
          edge.toNode = own.toNode;
          edge.firstPart = mGraph.parts.size();
          edge.partCount = parts.size();
          edge.stubFromM = stubM( own.fromNode );
          edge.stubToM = stubM( own.toNode );
          mGraph.parts.insert( mGraph.parts.end(), parts.begin(), parts.end() );
          mGraph.edges.push_back( edge );
        }

        void addLink( const DeviceLink &link )
        {
          const Zone &inlet = mResult.zones[index( mResult.zoneMap.ofNode[index( link.fromNode )] )];
          if ( !link.passes || !inlet.fed )
            return;
          GraphEdge edge;
          edge.fromNode = link.fromNode;
          edge.toNode = link.toNode;
          edge.oneWay = true;
          const Device &device = mJob.devices[index( link.device )];
          edge.regulates = device.regulates();
          const auto standing = std::find_if( mResult.devices.begin(), mResult.devices.end(),
            [&]( const StandingDevice &own ) { return own.device == link.device; } );
          if ( device.kind == DeviceKind::Booster && standing != mResult.devices.end() )
          {
            if ( inlet.levels.highM >= standing->elevationM )
              edge.boostHighM = device.boostPa / mJob.specificWeightNPerM3;
            if ( inlet.levels.lowM >= standing->elevationM )
            {
              edge.boostLowM = device.boostLowPa.value_or( device.boostPa ) / mJob.specificWeightNPerM3;
              edge.inletNeedM = standing->elevationM;
            }
          }
          mGraph.edges.push_back( edge );
        }

        const StaticJob &mJob;
        const StaticResult &mResult;
        Monitor &mMonitor;
        std::vector<std::size_t> mFirstSpan;
        std::vector<std::size_t> mFirstPiece;
        PipeGraph mGraph;
    };
  } // namespace

  PipeGraph proposalGraph( const StaticJob &job, const StaticResult &result, Monitor &monitor )
  {
    return GraphMaker( job, result, monitor ).run();
  }

  ProposalPlaces::ProposalPlaces( const StaticJob &job, const StaticResult &result, const PipeGraph &graph )
    : mResult( result )
    , mGraph( graph )
    , mBuilder( result.drawing, *job.planToTerrain, *job.terrain, job.useLineZ )
  {
  }

  double ProposalPlaces::exactM( const PlaceOnLine &place )
  {
    // Edges are in the order of the spans: by line and along it.
    const auto before = [&]( const GraphEdge &edge, const PlaceOnLine &at ) {
      if ( edge.partCount == 0 )
        return false;
      const ForestPart &last = mGraph.parts[edge.firstPart + edge.partCount - 1];
      return last.line < at.line || ( last.line == at.line && last.toM < at.alongM );
    };
    const auto edge = std::lower_bound( mGraph.edges.begin(), mGraph.edges.end(), place, before );
    if ( edge == mGraph.edges.end() || edge->partCount == 0 )
      return place.alongM;
    const auto first = mGraph.parts.begin() + static_cast<std::ptrdiff_t>( edge->firstPart );
    const auto end = first + static_cast<std::ptrdiff_t>( edge->partCount );
    const auto part = std::lower_bound(
      first, end, place.alongM, []( const ForestPart &own, double alongM ) { return own.toM < alongM; } );
    if ( part == end || !part->known || part->line != place.line || place.alongM <= part->fromM
      || place.alongM >= part->toM || part->elevation.from == part->elevation.to )
      return place.alongM;
    if ( mLine != place.line )
    {
      mBuilder.build( mResult.drawing.lines[index( place.line )], mProfile );
      mLine = place.line;
    }
    const double share = ( place.alongM - part->fromM ) / ( part->toM - part->fromM );
    const Run run { part->fromM, part->toM, part->elevation.from, part->elevation.to };
    return alongAtElevation( mProfile, run, part->elevation.at( share ) );
  }

} // namespace stillhead
