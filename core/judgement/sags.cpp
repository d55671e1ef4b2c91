// SPDX-License-Identifier: GPL-2.0-or-later
// The pipe is taken in from the highest turn down. What has been taken in hangs together in parts, each with its top; a top
// is judged when everything higher than the depth below it has been taken in: it is a summit if it is still the top of
// its part and the part is left over two steps of pipe or more. n log n for n turns.
#include "core/judgement/sags.h"

#include "core/network/disjointsets.h"

#include <algorithm>
#include <cmath>
#include <numeric>
#include <tuple>
#include <utility>

namespace stillhead
{

  namespace
  {
    //! Turns and the monotone pipe between them; a joint is one more vertex, as high as the highest end that meets there.
    class TurnGraph
    {
      public:
        TurnGraph( const Network &network, const CanonicalDrawing &drawing, const Turns &turns )
          : mNetwork( network )
          , mDrawing( drawing )
          , mTurns( turns )
          , mSpanOf( turns.turns.size(), -1 )
        {
          std::vector<std::pair<int, int>> atNodes;
          for ( const TurnRun &run : turns.runs )
          {
            const Span &span = network.spans[static_cast<std::size_t>( run.span )];
            const int first = static_cast<int>( run.first );
            const int last = static_cast<int>( run.first + run.count ) - 1;
            for ( int turn = first; turn <= last; ++turn )
            {
              mSpanOf[static_cast<std::size_t>( turn )] = run.span;
              if ( turn > first )
                mSteps.emplace_back( turn - 1, turn );
            }
            if ( run.fromNode )
              atNodes.emplace_back( span.fromNode, first );
            if ( run.toNode )
              atNodes.emplace_back( span.toNode, last );
          }
          addJoints( atNodes );
        }

        std::size_t turnCount() const { return mSpanOf.size(); }
        const std::vector<std::pair<int, int>> &steps() const { return mSteps; }
        int spanOf( int turn ) const { return mSpanOf[static_cast<std::size_t>( turn )]; }

        //! Height of every vertex, turns first; upside down with \a sign −1.
        std::vector<double> heightsM( double sign ) const
        {
          std::vector<double> heights;
          heights.reserve( turnCount() + mJoints.size() );
          for ( const Turn &turn : mTurns.turns )
            heights.push_back( sign * turn.elevationM );
          for ( const std::vector<int> &ends : mJoints )
          {
            double highest = heights[static_cast<std::size_t>( ends.front() )];
            for ( const int end : ends )
              highest = std::max( highest, heights[static_cast<std::size_t>( end )] );
            heights.push_back( highest );
          }
          return heights;
        }

        //! The order among places equally high.
        bool goesBefore( int a, int b ) const
        {
          const auto key = [this]( int turn ) {
            const Span &span = mNetwork.spans[static_cast<std::size_t>( spanOf( turn ) )];
            const double alongM = mTurns.turns[static_cast<std::size_t>( turn )].alongM;
            return std::make_tuple(
              mDrawing.placeAt( mDrawing.lines[static_cast<std::size_t>( span.line )], alongM ), span.line, alongM );
          };
          return key( a ) < key( b );
        }

      private:
        void addJoints( std::vector<std::pair<int, int>> &atNodes )
        {
          std::sort( atNodes.begin(), atNodes.end() );
          for ( std::size_t first = 0, next = 0; first < atNodes.size(); first = next )
          {
            while ( next < atNodes.size() && atNodes[next].first == atNodes[first].first )
              ++next;
            if ( next - first < 2 )
              continue;
            const int joint = static_cast<int>( turnCount() + mJoints.size() );
            mJoints.emplace_back();
            for ( std::size_t i = first; i < next; ++i )
            {
              mJoints.back().push_back( atNodes[i].second );
              mSteps.emplace_back( joint, atNodes[i].second );
            }
          }
        }

        const Network &mNetwork;
        const CanonicalDrawing &mDrawing;
        const Turns &mTurns;
        std::vector<int> mSpanOf;
        std::vector<std::pair<int, int>> mSteps;
        std::vector<std::vector<int>> mJoints; //!< the turns that meet there
    };

    //! Takes the pipe in from above and finds the tops that are summits.
    class Descent
    {
      public:
        Descent( const TurnGraph &graph, double sign, double depthM )
          : mGraph( graph )
          , mDepthM( depthM )
          , mHeightsM( graph.heightsM( sign ) )
          , mSets( mHeightsM.size() )
          , mParts( mHeightsM.size() )
          , mTakenIn( mHeightsM.size(), false )
        {
        }

        //! Turns at which summits stand.
        std::vector<int> summits()
        {
          listNeighbours();
          std::vector<int> order( mHeightsM.size() );
          std::iota( order.begin(), order.end(), 0 );
          // A turn goes before the joint that has its height, so that every part has a turn for its top.
          std::sort( order.begin(), order.end(), [this]( int a, int b ) {
            return std::make_tuple( -heightM( a ), a ) < std::make_tuple( -heightM( b ), b );
          } );
          std::vector<int> tops;
          std::vector<int> found;
          std::size_t judged = 0;
          for ( const int vertex : order )
          {
            for ( ; judged < tops.size() && heightM( vertex ) <= heightM( tops[judged] ) - mDepthM; ++judged )
            {
              const Part &part = mParts[index( mSets.find( tops[judged] ) )];
              if ( part.top == tops[judged] && part.waysDown >= 2 )
                found.push_back( part.place );
            }
            if ( takeIn( vertex ) )
              tops.push_back( vertex );
          }
          return found;
        }

      private:
        //! Pipe that hangs together above the present height.
        struct Part
        {
            int top = -1;     //!< its highest turn
            int place = -1;   //!< the turn, level with the top, that stands for it
            int waysDown = 0; //!< steps that lead out of it
        };

        static std::size_t index( int vertex ) { return static_cast<std::size_t>( vertex ); }
        double heightM( int vertex ) const { return mHeightsM[index( vertex )]; }

        void listNeighbours()
        {
          mFirst.assign( mHeightsM.size() + 1, 0 );
          for ( const auto &[a, b] : mGraph.steps() )
          {
            ++mFirst[index( a ) + 1];
            ++mFirst[index( b ) + 1];
          }
          std::partial_sum( mFirst.begin(), mFirst.end(), mFirst.begin() );
          std::vector<std::size_t> next( mFirst.begin(), mFirst.end() - 1 );
          mNeighbours.resize( mFirst.back() );
          for ( const auto &[a, b] : mGraph.steps() )
          {
            mNeighbours[next[index( a )]++] = b;
            mNeighbours[next[index( b )]++] = a;
          }
        }

        //! True if a new part begins there.
        bool takeIn( int vertex )
        {
          mTakenIn[index( vertex )] = true;
          const bool isTurn = index( vertex ) < mGraph.turnCount();
          Part part;
          for ( std::size_t i = mFirst[index( vertex )]; i < mFirst[index( vertex ) + 1]; ++i )
          {
            const int neighbour = mNeighbours[i];
            if ( !mTakenIn[index( neighbour )] )
            {
              ++part.waysDown;
              continue;
            }
            const int set = mSets.find( neighbour );
            if ( set != mSets.find( vertex ) )
              part = united( part, mParts[index( set )] );
            --part.waysDown;
            mSets.join( vertex, neighbour );
          }
          const bool isTop = part.top < 0;
          if ( isTop )
            part.top = part.place = vertex;
          else if ( isTurn && isLevel( part.top, vertex ) && mGraph.goesBefore( vertex, part.place ) )
            part.place = vertex;
          mParts[index( mSets.find( vertex ) )] = part;
          return isTop;
        }

        bool isLevel( int a, int b ) const { return std::abs( heightM( a ) - heightM( b ) ) <= LEVEL_PIPE_M; }

        Part united( const Part &a, const Part &b ) const
        {
          const int waysDown = a.waysDown + b.waysDown;
          if ( a.top < 0 || b.top < 0 )
            return { std::max( a.top, b.top ), std::max( a.place, b.place ), waysDown };
          const bool aFirst = std::make_tuple( -heightM( a.top ), a.top ) < std::make_tuple( -heightM( b.top ), b.top );
          const Part &higher = aFirst ? a : b;
          const Part &lower = aFirst ? b : a;
          const bool takesOther = isLevel( a.top, b.top ) && mGraph.goesBefore( lower.place, higher.place );
          return { higher.top, takesOther ? lower.place : higher.place, waysDown };
        }

        const TurnGraph &mGraph;
        const double mDepthM;
        const std::vector<double> mHeightsM;
        DisjointSets mSets;
        std::vector<Part> mParts; //!< by the number that stands for its set
        std::vector<bool> mTakenIn;
        std::vector<std::size_t> mFirst;
        std::vector<int> mNeighbours;
    };

    //! The piece of \a span on which \a alongM lies; of two that meet there the first.
    int pieceOf( const PieceGraph &graph, int span, double alongM )
    {
      const std::vector<Piece> &pieces = graph.pieces();
      const auto first = pieces.begin() + graph.firstOf( span );
      const auto last = pieces.begin() + graph.firstOf( span + 1 );
      const auto found =
        std::partition_point( first, last - 1, [alongM]( const Piece &piece ) { return piece.toM < alongM; } );
      return static_cast<int>( found - pieces.begin() );
    }
  } // namespace

  double countedSagDepthM( double depthM )
  {
    return std::max( depthM, LEAST_SAG_DEPTH_M ) - LEVEL_PIPE_M;
  }

  std::vector<Extreme> findSummitsAndSags( const PieceGraph &graph, const CanonicalDrawing &drawing, const Turns &turns,
    double depthM, const std::vector<Zone> &zones, double specificWeightNPerM3 )
  {
    const TurnGraph turnGraph( graph.network(), drawing, turns );
    std::vector<std::tuple<int, double, Extreme>> found;
    const auto add = [&]( ExtremeKind kind, const std::vector<int> &places ) {
      for ( const int turn : places )
      {
        Extreme extreme;
        extreme.kind = kind;
        extreme.alongM = turns.turns[static_cast<std::size_t>( turn )].alongM;
        extreme.elevationM = turns.turns[static_cast<std::size_t>( turn )].elevationM;
        extreme.piece = pieceOf( graph, turnGraph.spanOf( turn ), extreme.alongM );
        extreme.zone = graph.pieces()[static_cast<std::size_t>( extreme.piece )].zone;
        const Zone &zone = zones[static_cast<std::size_t>( extreme.zone )];
        const double levelM = kind == ExtremeKind::Summit ? zone.levels.lowM : zone.levels.highM;
        extreme.pressurePa = zone.fed ? specificWeightNPerM3 * ( levelM - extreme.elevationM ) : NOT_A_FIGURE;
        found.emplace_back( turnGraph.spanOf( turn ), extreme.alongM, extreme );
      }
    };
    add( ExtremeKind::Summit, Descent( turnGraph, 1.0, depthM ).summits() );
    add( ExtremeKind::Sag, Descent( turnGraph, -1.0, depthM ).summits() );
    std::sort( found.begin(), found.end(), []( const auto &a, const auto &b ) {
      return std::tie( std::get<0>( a ), std::get<1>( a ) ) < std::tie( std::get<0>( b ), std::get<1>( b ) );
    } );
    std::vector<Extreme> extremes;
    for ( const auto &[span, alongM, extreme] : found )
      extremes.push_back( extreme );
    return extremes;
  }

} // namespace stillhead
