// SPDX-License-Identifier: GPL-2.0-or-later
// The main job, the proposal, the main job again; the second run is the proof of the first proposal.
#include "core/job/proposaljob.h"

#include "core/job/proposalgraph.h"
#include "core/proposal/graphproposal.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    //! A stage's share of the whole progress.
    class StageMonitor : public Monitor
    {
      public:
        StageMonitor( Monitor &whole, double from, double to )
          : mWhole( whole )
          , mFrom( from )
          , mTo( to )
        {
        }

        bool cancelled() const override { return mWhole.cancelled(); }
        void progress( double fraction ) override { mWhole.progress( mFrom + fraction * ( mTo - mFrom ) ); }

      private:
        Monitor &mWhole;
        double mFrom;
        double mTo;
    };

    ProposalRules rulesOf( const ProposalJob &job )
    {
      ProposalRules rules;
      rules.limits = job.statics.limits;
      rules.specificWeightNPerM3 = job.statics.specificWeightNPerM3;
      rules.risePa = job.risePa;
      rules.leastDropPa = job.statics.leastDropPa;
      rules.mostRatio = job.mostRatio;
      rules.settingStepPa = job.settingStepPa;
      rules.toleranceM = job.statics.joins.toleranceM;
      return rules;
    }

    void makeExact( Proposal &proposal, ProposalPlaces &places )
    {
      for ( ProposedRegulator &own : proposal.regulators )
      {
        own.placeFromM = places.exactM( { own.at.line, own.placeFromM } );
        own.placeToM = places.exactM( { own.at.line, own.placeToM } );
        own.at.alongM = own.planned.alongM = places.exactM( own.at );
        for ( PlaceOnLine *place :
          { &own.beneath.lowest.at, &own.beneath.highest.at, &own.beneath.need.at, &own.aboveNeed.at } )
          place->alongM = place->line < 0 ? 0.0 : places.exactM( *place );
      }
      for ( Excused &own : proposal.excused )
      {
        own.fromM = places.exactM( { own.line, own.fromM } );
        own.toM = places.exactM( { own.line, own.toM } );
        own.lowestAtM = places.exactM( { own.line, own.lowestAtM } );
        if ( own.need.at.line >= 0 )
          own.need.at.alongM = places.exactM( own.need.at );
      }
    }

    Device deviceOf( const ProposedRegulator &regulator, const CanonicalDrawing &drawing, double risePa )
    {
      const CanonicalLine &line = drawing.lines[index( regulator.at.line )];
      Device device;
      device.kind = DeviceKind::Regulator;
      device.place = drawing.placeAt( line, regulator.at.alongM );
      device.system = line.system;
      device.setPa = regulator.setPa;
      device.risePa = risePa;
      device.direction =
        regulator.againstLine != line.reversed ? DeviceDirection::EndToStart : DeviceDirection::StartToEnd;
      return device;
    }

    //! Compares the pipe before and after.
    class Check
    {
      public:
        explicit Check( ProposalResult &result, double stubM )
          : mResult( result )
          , mStubM( stubM )
        {
          for ( std::size_t i = 0; i < result.before.pieces.size(); ++i )
            mBefore[lineOf( result.before, result.before.pieces[i] )].push_back( i );
          for ( const Excused &own : result.proposal.excused )
            mExcused[own.line].push_back( std::minmax( own.fromM, own.toM ) );
          for ( const Span &span : result.before.network.spans )
          {
            for ( const double alongM : { span.fromM, span.toM } )
              mNodes[span.line].push_back( alongM );
          }
        }

        void run()
        {
          mResult.verified = std::all_of( mResult.proposal.regulators.begin(), mResult.proposal.regulators.end(),
            [this]( const ProposedRegulator &regulator ) { return stands( regulator ); } );
          for ( const Piece &piece : mResult.after.pieces )
          {
            const int line = lineOf( mResult.after, piece );
            if ( piece.over && isExcused( line, piece ) )
              mResult.notMendedM += piece.toM - piece.fromM;
            else if ( ( piece.over || ( piece.isShort && wasServed( line, piece ) ) ) && !isStub( line, piece ) )
              mResult.verified = false;
          }
        }

      private:
        static int lineOf( const StaticResult &result, const Piece &piece )
        {
          return result.network.spans[index( piece.span )].line;
        }

        static double middleOf( const Piece &piece ) { return 0.5 * ( piece.fromM + piece.toM ); }

        //! True if the device was found again on its own line, at its place.
        bool stands( const ProposedRegulator &regulator ) const
        {
          const int device = static_cast<int>( mResult.devices.size() - mResult.proposal.regulators.size()
            + static_cast<std::size_t>( &regulator - mResult.proposal.regulators.data() ) );
          return std::any_of(
            mResult.after.devices.begin(), mResult.after.devices.end(), [&]( const StandingDevice &own ) {
              return own.device == device && own.on.line == regulator.at.line
                && std::abs( own.on.alongM - regulator.at.alongM ) < 0.5 * mStubM + 1e-6;
            } );
        }

        bool isExcused( int line, const Piece &piece ) const
        {
          const auto found = mExcused.find( line );
          return found != mExcused.end()
            && std::any_of( found->second.begin(), found->second.end(), [&]( const std::pair<double, double> &own ) {
                 return middleOf( piece ) > own.first && middleOf( piece ) < own.second;
               } );
        }

        bool wasServed( int line, const Piece &piece ) const
        {
          const auto found = mBefore.find( line );
          if ( found == mBefore.end() )
            return false;
          const std::vector<std::size_t> &pieces = found->second;
          const auto own = std::lower_bound( pieces.begin(), pieces.end(), middleOf( piece ),
            [&]( std::size_t i, double alongM ) { return mResult.before.pieces[i].toM < alongM; } );
          return own != pieces.end() && !mResult.before.pieces[*own].isShort
            && !std::isnan( mResult.before.pieces[*own].pressureLowPa );
        }

        bool isStub( int line, const Piece &piece ) const
        {
          const auto found = mNodes.find( line );
          return found != mNodes.end()
            && std::any_of( found->second.begin(), found->second.end(), [&]( double alongM ) {
                 return std::max( std::abs( piece.fromM - alongM ), std::abs( piece.toM - alongM ) ) <= mStubM + 1e-3;
               } );
        }

        ProposalResult &mResult;
        double mStubM;
        std::map<int, std::vector<std::size_t>> mBefore; //!< pieces of every line, along it
        std::map<int, std::vector<std::pair<double, double>>> mExcused;
        std::map<int, std::vector<double>> mNodes;
    };

    void tellExcused( ProposalResult &result )
    {
      for ( const Excused &own : result.proposal.excused )
      {
        const CanonicalLine &line = result.after.drawing.lines[index( own.line )];
        Finding finding;
        finding.code = FindingCode::CannotBeMended;
        finding.line = line.drawn;
        finding.place = result.after.drawing.placeAt( line, own.lowestAtM );
        finding.lengthM = std::abs( own.toM - own.fromM );
        if ( own.need.any() )
          finding.figureM = own.need.elevationM;
        result.after.findings.push_back( finding );
      }
    }
  } // namespace

  ProposalResult solveProposal( const ProposalJob &job, Monitor &monitor )
  {
    ProposalResult result;
    StageMonitor first( monitor, 0.0, 0.4 );
    result.before = solveStatics( job.statics, first );
    StageMonitor second( monitor, 0.4, 0.6 );
    const PipeGraph graph = proposalGraph( job.statics, result.before, second );
    stopIfCancelled( monitor );
    result.proposal = proposeOnGraph( graph, rulesOf( job ) );
    stopIfCancelled( monitor );
    ProposalPlaces places( job.statics, result.before, graph );
    makeExact( result.proposal, places );

    StaticJob with = job.statics;
    for ( const ProposedRegulator &regulator : result.proposal.regulators )
      with.devices.push_back( deviceOf( regulator, result.before.drawing, job.risePa ) );
    result.devices = with.devices;
    StageMonitor third( monitor, 0.6, 1.0 );
    result.after = solveStatics( with, third );
    Check( result, 2.0 * job.statics.joins.toleranceM ).run();
    tellExcused( result );
    return result;
  }

} // namespace stillhead
