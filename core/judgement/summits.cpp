// SPDX-License-Identifier: GPL-2.0-or-later
// A summit is connected pipe above the static level with water on one side and pipe without on another.
#include "core/judgement/summits.h"

#include "core/judgement/judge.h"

#include <algorithm>
#include <map>
#include <set>

namespace stillhead
{

  namespace
  {
    class GapFinder
    {
      public:
        GapFinder( const PieceGraph &graph, const CanonicalDrawing &drawing, const std::vector<Zone> &zones,
          const Reach &reach, std::vector<Finding> &findings )
          : mGraph( graph )
          , mDrawing( drawing )
          , mZones( zones )
          , mReach( reach )
          , mFindings( findings )
        {
        }

        void run()
        {
          findSummits();
          findUnknownSummits();
          findUnfed();
          findNoTerrain();
        }

      private:
        const Piece &piece( int number ) const { return mGraph.pieces()[static_cast<std::size_t>( number )]; }
        int pieceCount() const { return static_cast<int>( mGraph.pieces().size() ); }
        const Zone &zone( int number ) const { return mZones[static_cast<std::size_t>( piece( number ).zone )]; }
        Reached reached( int number ) const { return mReach.ofPiece[static_cast<std::size_t>( number )]; }
        double length( int number ) const { return piece( number ).toM - piece( number ).fromM; }
        bool isBlocked( int number ) const
        {
          return zone( number ).fed && liesAbove( piece( number ), zone( number ).levels.lowM );
        }
        bool isDry( int number ) const
        {
          return zone( number ).fed && !isBlocked( number ) && reached( number ) == Reached::No;
        }

        Finding &add( FindingCode code, int number, double alongM )
        {
          const Span &span = mGraph.network().spans[static_cast<std::size_t>( piece( number ).span )];
          const CanonicalLine &line = mDrawing.lines[static_cast<std::size_t>( span.line )];
          Finding finding;
          finding.code = code;
          finding.line = line.drawn;
          finding.place = mDrawing.placeAt( line, alongM );
          mFindings.push_back( finding );
          return mFindings.back();
        }

        double middle( int number ) const { return 0.5 * ( piece( number ).fromM + piece( number ).toM ); }

        void findSummits()
        {
          DisjointSets summits = mGraph.groups( [this]( int number ) { return isBlocked( number ); } );
          DisjointSets beyond = mGraph.groups( [this]( int number ) { return isDry( number ); } );
          struct Summit
          {
              bool wetSide = false;
              std::set<int> dryGroups;
              int highest = -1;
          };
          std::map<int, Summit> found;
          std::map<int, double> dryLengthM;
          for ( int i = 0; i < pieceCount(); ++i )
          {
            if ( isDry( i ) )
              dryLengthM[beyond.find( i )] += length( i );
            if ( !isBlocked( i ) )
              continue;
            Summit &summit = found[summits.find( i )];
            if ( summit.highest < 0 || piece( i ).highestM > piece( summit.highest ).highestM )
              summit.highest = i;
          }
          if ( found.empty() )
            return;
          mGraph.visitPlaces( [&]( int node, const std::vector<int> &here ) {
            Summit *summit = nullptr; // all that is blocked at one place is one summit
            bool wet = node >= 0 && mGraph.network().nodes[static_cast<std::size_t>( node )].kind == NodeKind::Source;
            int dry = -1;
            for ( const int number : here )
            {
              if ( isBlocked( number ) )
                summit = &found[summits.find( number )];
              else if ( isDry( number ) )
                dry = beyond.find( number );
              else
                wet = wet || zone( number ).fed;
            }
            if ( !summit )
              return;
            summit->wetSide = summit->wetSide || wet;
            if ( dry >= 0 )
              summit->dryGroups.insert( dry );
          } );
          for ( const auto &[group, summit] : found )
          {
            if ( !summit.wetSide || summit.dryGroups.empty() )
              continue;
            Finding &finding = add( FindingCode::Summit, summit.highest, piece( summit.highest ).highestAtM );
            finding.figureM = piece( summit.highest ).highestM - zone( summit.highest ).levels.lowM;
            finding.lengthM = 0.0;
            for ( const int dry : summit.dryGroups )
              finding.lengthM += dryLengthM[dry];
          }
        }

        void findUnknownSummits()
        {
          const auto isUncertain = [this]( int number ) {
            return zone( number ).fed && reached( number ) == Reached::Uncertain;
          };
          DisjointSets groups = mGraph.groups( isUncertain );
          struct Uncertain
          {
              int entry = -1;
              double lengthM = 0.0;
          };
          std::map<int, Uncertain> found;
          for ( int i = 0; i < pieceCount(); ++i )
          {
            if ( !isUncertain( i ) )
              continue;
            Uncertain &uncertain = found[groups.find( i )];
            if ( piece( i ).state != State::NoTerrain )
              uncertain.lengthM += length( i );
            else if ( uncertain.entry < 0 )
              uncertain.entry = i;
          }
          for ( const auto &[group, uncertain] : found )
          {
            if ( uncertain.lengthM > 0.0 && uncertain.entry >= 0 )
              add( FindingCode::SummitUnknown, uncertain.entry, middle( uncertain.entry ) ).lengthM = uncertain.lengthM;
          }
        }

        void findUnfed()
        {
          std::map<int, std::pair<int, double>> found;
          for ( int i = 0; i < pieceCount(); ++i )
          {
            if ( zone( i ).fed )
              continue;
            const auto entry = found.emplace( piece( i ).zone, std::make_pair( i, 0.0 ) ).first;
            entry->second.second += length( i );
          }
          for ( const auto &[zoneNumber, entry] : found )
            add( FindingCode::NoSource, entry.first, middle( entry.first ) ).lengthM = entry.second;
        }

        void findNoTerrain()
        {
          for ( int i = 0; i < pieceCount(); ++i )
          {
            if ( piece( i ).state == State::NoTerrain )
              add( FindingCode::NoTerrain, i, middle( i ) ).lengthM = length( i );
          }
        }

        const PieceGraph &mGraph;
        const CanonicalDrawing &mDrawing;
        const std::vector<Zone> &mZones;
        const Reach &mReach;
        std::vector<Finding> &mFindings;
    };
  } // namespace

  void settleSummits( std::vector<Piece> &pieces, const std::vector<Zone> &zones, const Reach &reach )
  {
    for ( std::size_t i = 0; i < pieces.size(); ++i )
    {
      Piece &piece = pieces[i];
      const Zone &zone = zones[static_cast<std::size_t>( piece.zone )];
      if ( zone.fed && piece.state != State::NoTerrain && reach.ofPiece[i] == Reached::No )
        markPastASummit( piece );
    }
  }

  void findSummitsAndGaps( const PieceGraph &graph, const CanonicalDrawing &drawing, const std::vector<Zone> &zones,
    const Reach &reach, std::vector<Finding> &findings )
  {
    GapFinder( graph, drawing, zones, reach, findings ).run();
  }

} // namespace stillhead
