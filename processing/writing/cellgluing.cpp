// SPDX-License-Identifier: GPL-2.0-or-later
// Every ring is broken where it runs along a line between cells. Each such stretch must have its opposite in the
// neighbour's ring; what is left are chains, of which each begins where another ends.
#include "processing/writing/cellgluing.h"

#include <qgslinestring.h>
#include <qgspolygon.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <memory>
#include <set>
#include <utility>

namespace stillhead
{

  namespace
  {

    using Place = std::pair<double, double>;
    using Chain = std::vector<Place>;

    //! Twice the area, positive where the ring runs counter-clockwise.
    double signedArea( const Chain &ring )
    {
      double area = 0.0;
      for ( std::size_t i = 0; i < ring.size(); ++i )
      {
        const Place &a = ring[i];
        const Place &b = ring[( i + 1 ) % ring.size()];
        // About the first vertex, so that large coordinates cost no digits.
        area += ( a.first - ring[0].first ) * ( b.second - ring[0].second )
          - ( b.first - ring[0].first ) * ( a.second - ring[0].second );
      }
      return area;
    }

    class Glue
    {
      public:
        explicit Glue( const CellGrid &grid )
          : mGrid( grid )
        {
        }

        void addPolygon( const QgsPolygon &polygon )
        {
          addRing( polygon.exteriorRing(), true );
          for ( int i = 0; i < polygon.numInteriorRings(); ++i )
            addRing( polygon.interiorRing( i ), false );
        }

        std::optional<QgsGeometry> polygon()
        {
          if ( mIsAmbiguous || !mOpenBorders.empty() || !linkChains() )
            return std::nullopt;
          const auto shell =
            std::find_if( mRings.begin(), mRings.end(), []( const Chain &ring ) { return signedArea( ring ) > 0.0; } );
          if ( shell == mRings.end() )
            return std::nullopt;
          auto result = std::make_unique<QgsPolygon>( lineOf( *shell ) );
          for ( auto ring = mRings.begin(); ring != mRings.end(); ++ring )
          {
            if ( ring == shell )
              continue;
            if ( signedArea( *ring ) > 0.0 )
              return std::nullopt;
            result->addInteriorRing( lineOf( *ring ) );
          }
          return QgsGeometry( std::move( result ) );
        }

      private:
        //! On a line between cells the other coordinate is rounded, so that both sides name the same place.
        Place settled( double x, double y ) const
        {
          constexpr double STEPS_PER_M = 1e4;
          const bool onColumn = mGrid.isOnLine( x );
          const bool onRow = mGrid.isOnLine( y );
          if ( onColumn && !onRow )
            y = std::round( y * STEPS_PER_M ) / STEPS_PER_M;
          else if ( onRow && !onColumn )
            x = std::round( x * STEPS_PER_M ) / STEPS_PER_M;
          return { x, y };
        }

        bool isBorder( const Place &a, const Place &b ) const
        {
          return ( a.first == b.first && mGrid.isOnLine( a.first ) )
            || ( a.second == b.second && mGrid.isOnLine( a.second ) );
        }

        Chain ringOf( const QgsCurve &curve, bool isShell ) const
        {
          Chain ring;
          for ( int i = 0; i < curve.numPoints(); ++i )
          {
            const Place place = settled( curve.xAt( i ), curve.yAt( i ) );
            if ( ring.empty() || place != ring.back() )
              ring.push_back( place );
          }
          if ( ring.size() > 1 && ring.front() == ring.back() )
            ring.pop_back();
          if ( ( signedArea( ring ) > 0.0 ) != isShell )
            std::reverse( ring.begin(), ring.end() );
          return ring;
        }

        void addRing( const QgsCurve *curve, bool isShell )
        {
          const Chain ring = ringOf( *curve, isShell );
          if ( ring.size() < 3 )
            return;
          const auto at = [&ring]( std::size_t i ) -> const Place & { return ring[i % ring.size()]; };
          std::size_t first = 0;
          while ( first < ring.size() && !isBorder( at( first ), at( first + 1 ) ) )
            ++first;
          if ( first == ring.size() )
          {
            mRings.push_back( ring );
            return;
          }
          Chain chain;
          for ( std::size_t i = first; i < first + ring.size(); ++i )
          {
            if ( isBorder( at( i ), at( i + 1 ) ) )
            {
              addChain( chain );
              addBorder( at( i ), at( i + 1 ) );
              chain.clear();
              continue;
            }
            if ( chain.empty() )
              chain.push_back( at( i ) );
            chain.push_back( at( i + 1 ) );
          }
          addChain( chain );
        }

        void addChain( const Chain &chain )
        {
          if ( chain.size() > 1 )
            mIsAmbiguous = !mChains.emplace( chain.front(), chain ).second || mIsAmbiguous;
        }

        void addBorder( const Place &from, const Place &to )
        {
          if ( mOpenBorders.erase( { to, from } ) == 0 )
            mOpenBorders.insert( { from, to } );
        }

        bool linkChains()
        {
          while ( !mChains.empty() )
          {
            auto next = mChains.begin();
            Chain ring = std::move( next->second );
            mChains.erase( next );
            while ( ring.back() != ring.front() )
            {
              next = mChains.find( ring.back() );
              if ( next == mChains.end() )
                return false;
              ring.insert( ring.end(), next->second.begin() + 1, next->second.end() );
              mChains.erase( next );
            }
            ring.pop_back();
            if ( ring.size() > 2 )
              mRings.push_back( std::move( ring ) );
          }
          return true;
        }

        static QgsLineString *lineOf( const Chain &ring )
        {
          QVector<double> x;
          QVector<double> y;
          x.reserve( static_cast<int>( ring.size() ) + 1 );
          y.reserve( static_cast<int>( ring.size() ) + 1 );
          for ( const Place &place : ring )
          {
            x << place.first;
            y << place.second;
          }
          x << ring.front().first;
          y << ring.front().second;
          return new QgsLineString( x, y );
        }

        const CellGrid &mGrid;
        std::vector<Chain> mRings;
        std::map<Place, Chain> mChains; //!< by their beginning
        std::set<std::pair<Place, Place>> mOpenBorders;
        bool mIsAmbiguous = false;
    };

  } // namespace

  std::optional<QgsGeometry> gluedCells( const std::vector<QgsGeometry> &parts, const CellGrid &grid )
  {
    Glue glue( grid );
    for ( const QgsGeometry &part : parts )
    {
      for ( auto polygon = part.const_parts_begin(); polygon != part.const_parts_end(); ++polygon )
      {
        if ( const auto *surface = qgsgeometry_cast<const QgsPolygon *>( *polygon ) )
          glue.addPolygon( *surface );
      }
    }
    return glue.polygon();
  }

} // namespace stillhead
