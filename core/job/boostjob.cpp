// SPDX-License-Identifier: GPL-2.0-or-later
// The second run tells what the boosters do; nothing of it is taken from the plan.
#include "core/job/boostjob.h"

#include "core/feedback/stagemonitor.h"
#include "core/job/proposalgraph.h"

#include <algorithm>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    Device deviceOf( const ProposedBooster &booster, const CanonicalDrawing &drawing )
    {
      const CanonicalLine &line = drawing.lines[index( booster.at.line )];
      Device device;
      device.kind = DeviceKind::Booster;
      device.place = drawing.placeAt( line, booster.at.alongM );
      device.boostPa = booster.boostPa;
      device.boostLowPa = booster.boostLowPa;
      device.direction =
        booster.againstLine != line.reversed ? DeviceDirection::EndToStart : DeviceDirection::StartToEnd;
      return device;
    }

    //! Pipe of a result, found by its place.
    class PieceFinder
    {
      public:
        explicit PieceFinder( const StaticResult &result )
          : mResult( result )
          , mPieces( result.drawing.lines.size() )
        {
          for ( std::size_t i = 0; i < result.pieces.size(); ++i )
            mPieces[index( result.network.spans[index( result.pieces[i].span )].line )].push_back( i );
        }

        bool isOver( int line, double alongM ) const
        {
          const std::vector<std::size_t> &own = mPieces[index( line )];
          const auto piece = std::lower_bound(
            own.begin(), own.end(), alongM, [&]( std::size_t i, double at ) { return mResult.pieces[i].toM < at; } );
          return piece != own.end() && mResult.pieces[*piece].over;
        }

      private:
        const StaticResult &mResult;
        std::vector<std::vector<std::size_t>> mPieces; //!< of every line, along it
    };

    void compare( BoostResult &result )
    {
      const PieceFinder before( result.before );
      for ( const Piece &piece : result.after.pieces )
      {
        const double lengthM = piece.toM - piece.fromM;
        const int line = result.after.network.spans[index( piece.span )].line;
        if ( piece.over && !before.isOver( line, 0.5 * ( piece.fromM + piece.toM ) ) )
          result.newlyOverM += lengthM;
        if ( piece.isShort )
          result.stillShortM += lengthM;
      }
    }

    void makeExact( std::vector<ProposedBooster> &boosters, ProposalPlaces &places )
    {
      for ( ProposedBooster &own : boosters )
      {
        for ( PlaceOnLine *place : { &own.at, &own.neededAt, &own.lowestAt } )
          place->alongM = place->line < 0 ? 0.0 : places.exactM( *place );
      }
    }
  } // namespace

  BoostResult solveBoost( const BoostJob &job, Monitor &monitor )
  {
    BoostResult result;
    StageMonitor first( monitor, 0.0, 0.4 );
    result.before = solveStatics( job.statics, first );
    StageMonitor second( monitor, 0.4, 0.6 );
    const PipeGraph graph = proposalGraph( job.statics, result.before, second );
    stopIfCancelled( monitor );
    result.boosters = proposeBoosters( graph, { job.statics.limits, job.statics.specificWeightNPerM3, job.risePa } );
    ProposalPlaces places( job.statics, result.before, graph );
    makeExact( result.boosters, places );

    StaticJob with = job.statics;
    for ( const ProposedBooster &booster : result.boosters )
    {
      if ( !booster.atSource )
      {
        with.devices.push_back( deviceOf( booster, result.before.drawing ) );
        continue;
      }
      for ( Source &source : with.sources )
      {
        source.boostLowPa = source.boostLowPa.value_or( source.boostPa ) + booster.boostLowPa;
        source.boostPa += booster.boostPa;
      }
    }
    result.devices = with.devices;
    StageMonitor third( monitor, 0.6, 1.0 );
    result.after = solveStatics( with, third );
    compare( result );
    return result;
  }

} // namespace stillhead
