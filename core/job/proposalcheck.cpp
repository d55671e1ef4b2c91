// SPDX-License-Identifier: GPL-2.0-or-later
// Pieces after are looked up among the pieces before by the middle of each; every regulator must stand where it was put.
#include "core/job/proposalcheck.h"

#include "core/job/proposalgraph.h"

#include <algorithm>
#include <cmath>
#include <utility>

namespace stillhead
{

  namespace
  {
    std::size_t index( int number )
    {
      return static_cast<std::size_t>( number );
    }

    class Check
    {
      public:
        Check( ProposalResult &result, double stubM )
          : mResult( result )
          , mStubM( stubM )
          , mBefore( result.before.drawing.lines.size() )
          , mExcused( result.before.drawing.lines.size() )
          , mNodes( result.before.drawing.lines.size() )
        {
          for ( std::size_t i = 0; i < result.before.pieces.size(); ++i )
            mBefore[index( lineOf( result.before, result.before.pieces[i] ) )].push_back( i );
          for ( const Excused &own : result.proposal.excused )
            mExcused[index( own.line )].push_back( std::minmax( own.fromM, own.toM ) );
          for ( const Span &span : result.before.network.spans )
          {
            mNodes[index( span.line )].push_back( span.fromM );
            mNodes[index( span.line )].push_back( span.toM );
          }
        }

        std::vector<PlaceOnLine> run()
        {
          std::vector<PlaceOnLine> failures;
          for ( const ProposedRegulator &regulator : mResult.proposal.regulators )
          {
            if ( !stands( regulator ) )
              failures.push_back( regulator.at );
          }
          mResult.notMendedM = 0.0;
          for ( const Piece &piece : mResult.after.pieces )
          {
            const int line = lineOf( mResult.after, piece );
            if ( piece.over && isExcused( line, piece ) )
              mResult.notMendedM += piece.toM - piece.fromM;
            else if ( ( piece.over || ( piece.isShort && wasServed( line, piece ) ) ) && !isStub( line, piece ) )
              failures.push_back( { line, middleOf( piece ) } );
          }
          mResult.verified = failures.empty();
          return failures;
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
          const std::vector<std::pair<double, double>> &ranges = mExcused[index( line )];
          return std::any_of( ranges.begin(), ranges.end(), [&]( const std::pair<double, double> &own ) {
            return middleOf( piece ) > own.first && middleOf( piece ) < own.second;
          } );
        }

        bool wasServed( int line, const Piece &piece ) const
        {
          const std::vector<std::size_t> &pieces = mBefore[index( line )];
          const auto own = std::lower_bound( pieces.begin(), pieces.end(), middleOf( piece ),
            [&]( std::size_t i, double alongM ) { return mResult.before.pieces[i].toM < alongM; } );
          return own != pieces.end() && !mResult.before.pieces[*own].isShort
            && !std::isnan( mResult.before.pieces[*own].pressureLowPa );
        }

        bool isStub( int line, const Piece &piece ) const
        {
          const auto within = [&]( double alongM, double reachM ) {
            return std::max( std::abs( piece.fromM - alongM ), std::abs( piece.toM - alongM ) ) <= reachM;
          };
          const std::vector<double> &nodes = mNodes[index( line )];
          if ( std::any_of(
                 nodes.begin(), nodes.end(), [&]( double nodeM ) { return within( nodeM, mStubM + 1e-3 ); } ) )
            return true;
          const std::vector<std::size_t> &pieces = mBefore[index( line )];
          return std::any_of( pieces.begin(), pieces.end(), [&]( std::size_t i ) {
            const Piece &own = mResult.before.pieces[i];
            return std::isnan( own.lowestM )
              && ( within( own.fromM, 2.0 * FROM_GAP_M ) || within( own.toM, 2.0 * FROM_GAP_M ) );
          } );
        }

        ProposalResult &mResult;
        double mStubM;
        std::vector<std::vector<std::size_t>> mBefore; //!< pieces of every line, along it
        std::vector<std::vector<std::pair<double, double>>> mExcused;
        std::vector<std::vector<double>> mNodes;
    };
  } // namespace

  std::vector<PlaceOnLine> checkProposal( ProposalResult &result, double stubM )
  {
    return Check( result, stubM ).run();
  }

} // namespace stillhead
