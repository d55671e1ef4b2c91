// SPDX-License-Identifier: GPL-2.0-or-later
// Every piece that reaches into a cell is widened whole and clipped then, so that the outlines on both sides of a line
// between cells come from the same pieces and meet.
#include "processing/writing/pipearea.h"

#include "processing/writing/cellgluing.h"

#include <qgslinestring.h>
#include <qgsmultilinestring.h>
#include <qgsrectangle.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>
#include <memory>
#include <numeric>

namespace stillhead
{

  namespace
  {

    //! Straight pieces to a quarter circle: round enough for a pen.
    constexpr int SEGMENTS = 4;

    //! Lines to a cell: tried with ten thousand of them, far apart and crossing each other twenty times.
    constexpr std::size_t CELL_LINES = 96;

    //! Cells are at least so many times as wide as what is drawn around pipe.
    constexpr double LEAST_CELL_WIDTHS = 20.0;

    //! Where an outline happens to run along a line between cells, other cells are tried.
    constexpr int TRIALS = 3;
    constexpr double OTHER_SIDE = 1.0371;

    //! Strands of at most \a longestM, so that each lies in few cells.
    class Splitter
    {
      public:
        explicit Splitter( double longestM )
          : mLongestM( longestM )
        {
        }

        void add( const Strand &strand )
        {
          start( strand.x.front(), strand.y.front() );
          for ( int i = 1; i < strand.x.size(); ++i )
            goTo( strand.x.at( i ), strand.y.at( i ) );
          end();
        }

        std::vector<Strand> take() { return std::move( mStrands ); }

      private:
        void start( double x, double y )
        {
          mCurrent = { { x }, { y } };
          mLengthM = 0.0;
        }

        void goTo( double x, double y )
        {
          const double fromX = mCurrent.x.back();
          const double fromY = mCurrent.y.back();
          const double legM = std::hypot( x - fromX, y - fromY );
          const int parts = std::max( 1, static_cast<int>( std::ceil( legM / mLongestM ) ) );
          if ( mLengthM > 0.0 && mLengthM + legM / parts > mLongestM )
          {
            end();
            start( fromX, fromY );
          }
          for ( int part = 1; part <= parts; ++part )
          {
            const double share = static_cast<double>( part ) / parts;
            const double toX = part == parts ? x : fromX + share * ( x - fromX );
            const double toY = part == parts ? y : fromY + share * ( y - fromY );
            if ( part > 1 )
            {
              const double atX = mCurrent.x.back();
              const double atY = mCurrent.y.back();
              end();
              start( atX, atY );
            }
            mCurrent.x << toX;
            mCurrent.y << toY;
          }
          mLengthM += legM / parts;
        }

        void end()
        {
          if ( mCurrent.x.size() > 1 )
            mStrands.push_back( mCurrent );
        }

        double mLongestM;
        double mLengthM = 0.0;
        Strand mCurrent;
        std::vector<Strand> mStrands;
    };

    QgsGeometry widened( const std::vector<Strand> &strands, const std::vector<std::size_t> &which, double distanceM )
    {
      auto lines = std::make_unique<QgsMultiLineString>();
      for ( const std::size_t index : which )
        lines->addGeometry( new QgsLineString( strands[index].x, strands[index].y ) );
      return QgsGeometry( std::move( lines ) ).buffer( distanceM, SEGMENTS );
    }

    QgsGeometry widenedAtOnce( const std::vector<Strand> &strands, double distanceM )
    {
      std::vector<std::size_t> all( strands.size() );
      std::iota( all.begin(), all.end(), std::size_t { 0 } );
      return widened( strands, all, distanceM );
    }

    //! A side of cells that gives about CELL_LINES to each.
    double usualSideM( const std::vector<Strand> &strands, double distanceM )
    {
      double left = std::numeric_limits<double>::max();
      double low = left;
      double right = -left;
      double high = -left;
      for ( const Strand &strand : strands )
      {
        const auto [west, east] = std::minmax_element( strand.x.begin(), strand.x.end() );
        const auto [south, north] = std::minmax_element( strand.y.begin(), strand.y.end() );
        left = std::min( left, *west );
        right = std::max( right, *east );
        low = std::min( low, *south );
        high = std::max( high, *north );
      }
      const double cells = static_cast<double>( strands.size() ) / static_cast<double>( CELL_LINES );
      const double area = std::max( right - left, distanceM ) * std::max( high - low, distanceM );
      return std::max( std::sqrt( area / cells ), LEAST_CELL_WIDTHS * distanceM );
    }

  } // namespace

  PipeArea::PipeArea( std::vector<Strand> strands, double distanceM )
    : mDistanceM( distanceM )
    , mStrands( std::move( strands ) )
  {
    if ( mStrands.size() > CELL_LINES )
    {
      mCellSideM = usualSideM( mStrands, distanceM );
      cut( mStrands, mCellSideM );
    }
    mParts.resize( std::max<std::size_t>( 1, mCells.size() ) );
  }

  void PipeArea::cut( const std::vector<Strand> &strands, double sideM )
  {
    mGrid.sideM = sideM;
    Splitter splitter( 0.5 * sideM );
    for ( const Strand &strand : strands )
      splitter.add( strand );
    mPieces = splitter.take();

    std::map<CellIndex, std::vector<std::size_t>> cells;
    // The rounding of outlines stays well within a hundredth more.
    const double reachM = 1.01 * mDistanceM;
    for ( std::size_t i = 0; i < mPieces.size(); ++i )
    {
      const auto [left, right] = std::minmax_element( mPieces[i].x.begin(), mPieces[i].x.end() );
      const auto [low, high] = std::minmax_element( mPieces[i].y.begin(), mPieces[i].y.end() );
      const std::int64_t lastColumn = mGrid.indexOf( *right + reachM );
      const std::int64_t lastRow = mGrid.indexOf( *high + reachM );
      for ( std::int64_t column = mGrid.indexOf( *left - reachM ); column <= lastColumn; ++column )
      {
        for ( std::int64_t row = mGrid.indexOf( *low - reachM ); row <= lastRow; ++row )
          cells[{ column, row }].push_back( i );
      }
    }
    mCells.assign( cells.begin(), cells.end() );
  }

  void PipeArea::widen( std::size_t part )
  {
    if ( mCells.empty() )
    {
      mParts[part] = widenedAtOnce( mStrands, mDistanceM );
      return;
    }
    const auto &[index, pieces] = mCells[part];
    const QgsRectangle cell( mGrid.lineAtM( index.first ), mGrid.lineAtM( index.second ),
      mGrid.lineAtM( index.first + 1 ), mGrid.lineAtM( index.second + 1 ) );
    mParts[part] = widened( mPieces, pieces, mDistanceM ).clipped( cell );
  }

  QgsGeometry PipeArea::whole()
  {
    if ( mCells.empty() )
      return mParts.front();
    for ( int trial = 1;; ++trial )
    {
      if ( const std::optional<QgsGeometry> glued = gluedCells( mParts, mGrid ) )
        return *glued;
      if ( trial == TRIALS )
        return widenedAtOnce( mStrands, mDistanceM );
      mCellSideM *= OTHER_SIDE;
      cut( mStrands, mCellSideM );
      mParts.resize( mCells.size() );
      for ( std::size_t part = 0; part < mParts.size(); ++part )
        widen( part );
    }
  }

} // namespace stillhead
