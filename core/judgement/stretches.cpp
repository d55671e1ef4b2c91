// SPDX-License-Identifier: GPL-2.0-or-later
// Of places equally bad the first in canonical order stands.
#include "core/judgement/stretches.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <tuple>

namespace stillhead
{

  namespace
  {
    class StretchFinder
    {
      public:
        StretchFinder( const PieceGraph &graph, const CanonicalDrawing &canonical, const Drawing &drawing,
          const std::vector<Zone> &zones, const Limits &limits )
          : mGraph( graph )
          , mCanonical( canonical )
          , mDrawing( drawing )
          , mZones( zones )
          , mLimits( limits )
        {
        }

        void find( bool over, std::vector<Stretch> &stretches ) const
        {
          const auto belongs = [&]( int number ) { return over ? piece( number ).over : piece( number ).isShort; };
          DisjointSets groups = mGraph.groups( belongs );
          std::map<int, Stretch> found;
          for ( int i = 0; i < static_cast<int>( mGraph.pieces().size() ); ++i )
          {
            if ( !belongs( i ) )
              continue;
            Stretch &stretch = found[groups.find( i )];
            stretch.over = over;
            stretch.pieces.push_back( i );
            stretch.lengthM += piece( i ).toM - piece( i ).fromM;
            if ( stretch.worstPiece < 0 || beyond( i, over ) > beyond( stretch.worstPiece, over ) )
              stretch.worstPiece = i;
          }
          const std::size_t first = stretches.size();
          for ( auto &[group, stretch] : found )
          {
            finish( stretch );
            stretches.push_back( std::move( stretch ) );
          }
          std::stable_sort( stretches.begin() + static_cast<std::ptrdiff_t>( first ), stretches.end(),
            []( const Stretch &a, const Stretch &b ) { return a.beyondPa > b.beyondPa; } );
        }

      private:
        const Piece &piece( int number ) const { return mGraph.pieces()[static_cast<std::size_t>( number )]; }

        const CanonicalLine &lineOf( int number ) const
        {
          return mCanonical.lines[static_cast<std::size_t>(
            mGraph.network().spans[static_cast<std::size_t>( piece( number ).span )].line )];
        }

        double beyond( int number, bool over ) const
        {
          const Role role = lineOf( number ).role;
          return over ? piece( number ).pressureHighPa - mLimits.mostFor( role )
                      : mLimits.leastFor( role ) - piece( number ).pressureLowPa;
        }

        void finish( Stretch &stretch ) const
        {
          const Piece &worst = piece( stretch.worstPiece );
          stretch.worstPa = stretch.over ? worst.pressureHighPa : worst.pressureLowPa;
          stretch.worstElevationM = stretch.over ? worst.lowestM : worst.highestM;
          const double past = beyond( stretch.worstPiece, stretch.over );
          stretch.beyondPa = std::max( 0.0, past );
          const Zone &zone = mZones[static_cast<std::size_t>( worst.zone )];
          const double doubt = stretch.over ? zone.doubtHighPa : zone.doubtLowPa;
          stretch.closeCall = doubt > 0.0 && std::abs( past ) <= doubt;
          std::vector<std::tuple<Role, int>> features;
          for ( const int number : stretch.pieces )
          {
            const CanonicalLine &line = lineOf( number );
            features.emplace_back( line.role, mDrawing.lines[static_cast<std::size_t>( line.drawn )].feature );
          }
          std::sort( features.begin(), features.end() );
          features.erase( std::unique( features.begin(), features.end() ), features.end() );
          for ( const auto &[role, feature] : features )
            ++( role == Role::Mainline ? stretch.mainlines : stretch.laterals );
        }

        const PieceGraph &mGraph;
        const CanonicalDrawing &mCanonical;
        const Drawing &mDrawing;
        const std::vector<Zone> &mZones;
        const Limits &mLimits;
    };

    Extreme extremeOf( const Piece &piece, int number, bool highest )
    {
      Extreme extreme;
      extreme.kind = highest ? ExtremeKind::Highest : ExtremeKind::Lowest;
      extreme.piece = number;
      extreme.alongM = highest ? piece.lowestAtM : piece.highestAtM;
      extreme.pressurePa = highest ? piece.pressureHighPa : piece.pressureLowPa;
      extreme.elevationM = highest ? piece.lowestM : piece.highestM;
      extreme.zone = piece.zone;
      return extreme;
    }
  } // namespace

  std::vector<Stretch> findStretches( const PieceGraph &graph, const CanonicalDrawing &canonical,
    const Drawing &drawing, const std::vector<Zone> &zones, const Limits &limits )
  {
    std::vector<Stretch> stretches;
    const StretchFinder finder( graph, canonical, drawing, zones, limits );
    finder.find( true, stretches );
    finder.find( false, stretches );
    return stretches;
  }

  std::vector<Extreme> findExtremes(
    const PieceGraph &graph, const std::vector<Stretch> &stretches, const std::vector<Zone> &zones )
  {
    std::vector<Extreme> extremes;
    const std::vector<Piece> &pieces = graph.pieces();
    for ( std::size_t i = 0; i < stretches.size(); ++i )
    {
      const int worst = stretches[i].worstPiece;
      extremes.push_back( extremeOf( pieces[static_cast<std::size_t>( worst )], worst, stretches[i].over ) );
      extremes.back().stretch = static_cast<int>( i );
    }
    std::vector<int> highest( zones.size(), -1 );
    std::vector<int> lowest( zones.size(), -1 );
    for ( std::size_t i = 0; i < pieces.size(); ++i )
    {
      if ( std::isnan( pieces[i].pressureHighPa ) )
        continue;
      int &high = highest[static_cast<std::size_t>( pieces[i].zone )];
      int &low = lowest[static_cast<std::size_t>( pieces[i].zone )];
      if ( high < 0 || pieces[i].pressureHighPa > pieces[static_cast<std::size_t>( high )].pressureHighPa )
        high = static_cast<int>( i );
      if ( low < 0 || pieces[i].pressureLowPa < pieces[static_cast<std::size_t>( low )].pressureLowPa )
        low = static_cast<int>( i );
    }
    for ( std::size_t zone = 0; zone < zones.size(); ++zone )
    {
      if ( highest[zone] < 0 )
        continue;
      extremes.push_back( extremeOf( pieces[static_cast<std::size_t>( highest[zone] )], highest[zone], true ) );
      extremes.push_back( extremeOf( pieces[static_cast<std::size_t>( lowest[zone] )], lowest[zone], false ) );
    }
    return extremes;
  }

} // namespace stillhead
