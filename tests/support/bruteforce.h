// SPDX-License-Identifier: GPL-2.0-or-later
// The whole job a second time by brute force, written apart from core: every line sampled every few centimetres on an
// independent bilinear surface, every end compared with every leg, water flooded from sample to sample.
#pragma once

#include "core/judgement/limits.h"
#include "core/judgement/piece.h"
#include "tests/support/bilinear.h"
#include "tests/support/networksketch.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <vector>

namespace stillhead::test
{

  struct BruteJob
  {
      const Drawing *drawing = nullptr;
      const MemoryTerrain *terrain = nullptr;
      PlanPoint source;
      double toleranceM = 0.1;
      double levelHighM = 0.0;
      double levelLowM = 0.0;
      Limits limits;
      double specificWeightNPerM3 = 0.0;
      double doubtPa = 0.0;
      double stepM = 0.05;
  };

  //! A place on a line half way between two samples, and what is true there.
  struct BruteSample
  {
      double alongM = 0.0; //!< along the line as drawn
      double elevationM = 0.0;
      double pressureHighPa = 0.0;
      double pressureLowPa = 0.0;
      State state = State::NoSource;
      bool over = false;
      bool isShort = false;
      bool closeCall = false;
      int band = -1;
  };

  class BruteForce
  {
    public:
      explicit BruteForce( const BruteJob &job )
        : mJob( job )
      {
        for ( const DrawnLine &line : job.drawing->lines )
          mLines.push_back( measured( line ) );
        mSets = DisjointSets( mLines.size() * 2 );
        for ( std::size_t line = 0; line < mLines.size(); ++line )
        {
          mPlaces.push_back( { line, 0.0 } );
          mPlaces.push_back( { line, mLines[line].alongM.back() } );
        }
        for ( std::size_t end = 0; end < 2 * mLines.size(); ++end )
          meetEverything( end );
        const int source = placeSource();
        for ( std::size_t line = 0; line < mLines.size(); ++line )
          sample( line );
        flood( source );
      }

      //! What is true half way between the samples of a drawn line.
      std::vector<BruteSample> along( int drawn ) const
      {
        std::vector<BruteSample> result;
        const Line &line = mLines[static_cast<std::size_t>( drawn )];
        for ( std::size_t i = 0; i + 1 < line.samples.size(); ++i )
        {
          BruteSample sample;
          sample.alongM = 0.5 * ( line.samples[i].alongM + line.samples[i + 1].alongM );
          sample.elevationM = elevationM( line, sample.alongM );
          judge( line, line.samples[i].reached && line.samples[i + 1].reached, line.samples[i].fed, sample );
          result.push_back( sample );
        }
        return result;
      }

      //! Lowest and highest elevation among all samples of a drawn line; NaN where there is none.
      std::pair<double, double> range( int drawn ) const
      {
        std::pair<double, double> range { NODATA, NODATA };
        for ( const Sample &sample : mLines[static_cast<std::size_t>( drawn )].samples )
        {
          if ( std::isnan( sample.elevationM ) )
            continue;
          range.first = !( range.first <= sample.elevationM ) ? sample.elevationM : range.first;
          range.second = !( range.second >= sample.elevationM ) ? sample.elevationM : range.second;
        }
        return range;
      }

      //! True if two lines of one role are equally near to the source: either may be the one that it joins.
      bool sourceIsAmbiguous() const { return mSourceIsAmbiguous; }

      //! True if part of a drawn line has no elevation.
      bool hasGaps( int drawn ) const
      {
        const std::vector<Sample> &samples = mLines[static_cast<std::size_t>( drawn )].samples;
        return std::any_of(
          samples.begin(), samples.end(), []( const Sample &sample ) { return std::isnan( sample.elevationM ); } );
      }

    private:
      struct Sample
      {
          double alongM = 0.0;
          double elevationM = 0.0;
          int set = -1; //!< what meets here, −1: nothing
          bool fed = false;
          bool reached = false;
      };

      struct Line
      {
          DrawnLine drawn;
          std::vector<PlanPoint> vertices;
          std::vector<double> alongM;
          std::vector<Sample> samples;
      };

      struct PlaceOnDrawn
      {
          std::size_t line = 0;
          double alongM = 0.0;
      };

      BruteJob mJob;
      std::vector<Line> mLines;
      std::vector<PlaceOnDrawn> mPlaces; //!< by number of what meets; ends first
      DisjointSets mSets;
      bool mSourceIsAmbiguous = false;

      Line measured( const DrawnLine &drawn ) const
      {
        Line line;
        line.drawn = drawn;
        line.vertices = verticesOf( *mJob.drawing, drawn );
        line.alongM = { 0.0 };
        for ( std::size_t i = 1; i < line.vertices.size(); ++i )
          line.alongM.push_back( line.alongM.back()
            + std::hypot( line.vertices[i].x - line.vertices[i - 1].x, line.vertices[i].y - line.vertices[i - 1].y ) );
        return line;
      }

      //! Lines without length are left out.
      static bool hasLength( const Line &line ) { return line.alongM.back() > 0.0; }

      struct Nearest
      {
          double distanceM = HUGE_VAL;
          double alongM = 0.0;
      };

      static Nearest nearestOnLeg( const Line &line, std::size_t leg, const PlanPoint &p )
      {
        const PlanPoint &a = line.vertices[leg];
        const PlanPoint &b = line.vertices[leg + 1];
        const double length = line.alongM[leg + 1] - line.alongM[leg];
        if ( !( length > 0.0 ) )
          return { std::hypot( p.x - a.x, p.y - a.y ), line.alongM[leg] };
        const double share = std::clamp(
          ( ( p.x - a.x ) * ( b.x - a.x ) + ( p.y - a.y ) * ( b.y - a.y ) ) / ( length * length ), 0.0, 1.0 );
        return { std::hypot( a.x + share * ( b.x - a.x ) - p.x, a.y + share * ( b.y - a.y ) - p.y ),
          line.alongM[leg] + share * length };
      }

      void meetEverything( std::size_t end )
      {
        const Line &own = mLines[end / 2];
        const PlanPoint place = end % 2 == 0 ? own.vertices.front() : own.vertices.back();
        for ( std::size_t other = 0; other < mLines.size(); ++other )
        {
          const Line &line = mLines[other];
          if ( line.drawn.system != own.drawn.system || !hasLength( line ) || !hasLength( own ) )
            continue;
          for ( std::size_t leg = 0; leg + 1 < line.vertices.size(); ++leg )
          {
            const Nearest nearest = nearestOnLeg( line, leg, place );
            if ( nearest.distanceM <= mJob.toleranceM )
              mSets.join( static_cast<int>( end ), numberOf( other, nearest.alongM ) );
          }
        }
      }

      int numberOf( std::size_t line, double alongM )
      {
        if ( alongM == 0.0 )
          return static_cast<int>( 2 * line );
        if ( alongM == mLines[line].alongM.back() )
          return static_cast<int>( 2 * line + 1 );
        mPlaces.push_back( { line, alongM } );
        return mSets.add();
      }

      //! The nearest pipe; a mainline where it is farther by no more than the tolerance.
      int placeSource()
      {
        Nearest best[2];
        std::size_t on[2] {};
        for ( std::size_t number = 0; number < mLines.size(); ++number )
        {
          if ( !hasLength( mLines[number] ) )
            continue;
          const int role = mLines[number].drawn.role == Role::Lateral ? 1 : 0;
          for ( std::size_t leg = 0; leg + 1 < mLines[number].vertices.size(); ++leg )
          {
            const Nearest nearest = nearestOnLeg( mLines[number], leg, mJob.source );
            if ( std::abs( nearest.distanceM - best[role].distanceM ) < 1e-9 && on[role] != number )
              mSourceIsAmbiguous = true;
            if ( nearest.distanceM >= best[role].distanceM )
              continue;
            if ( nearest.distanceM < best[role].distanceM - 1e-9 )
              mSourceIsAmbiguous = false;
            best[role] = nearest;
            on[role] = number;
          }
        }
        const int role = best[0].distanceM <= best[1].distanceM + mJob.toleranceM ? 0 : 1;
        const int source = numberOf( on[role], best[role].alongM );
        for ( std::size_t i = 0; i < mPlaces.size(); ++i )
        {
          if ( mPlaces[i].line == on[role] && std::abs( mPlaces[i].alongM - best[role].alongM ) <= mJob.toleranceM )
            mSets.join( source, static_cast<int>( i ) );
        }
        return source;
      }

      double elevationM( const Line &line, double alongM ) const
      {
        std::size_t leg = 0;
        while ( leg + 2 < line.vertices.size() && line.alongM[leg + 1] <= alongM )
          ++leg;
        const double share = ( alongM - line.alongM[leg] ) / ( line.alongM[leg + 1] - line.alongM[leg] );
        const PlanPoint &a = line.vertices[leg];
        const PlanPoint &b = line.vertices[leg + 1];
        const TerrainPoint pixel =
          mJob.terrain->grid().toPixel( { a.x + share * ( b.x - a.x ), a.y + share * ( b.y - a.y ) } );
        return bilinear( *mJob.terrain, pixel.x, pixel.y ) - line.drawn.coverM;
      }

      void sample( std::size_t number )
      {
        Line &line = mLines[number];
        std::map<double, int> places; // what meets there
        const int steps = static_cast<int>( line.alongM.back() / mJob.stepM ) + 1;
        for ( int i = 0; i <= steps; ++i )
          places.emplace( line.alongM.back() * i / steps, -1 );
        for ( std::size_t leg = 0; leg + 1 < line.vertices.size(); ++leg )
        {
          const PlanPoint &a = line.vertices[leg];
          const PlanPoint &b = line.vertices[leg + 1];
          const std::vector<double> shares = samplingShares( *mJob.terrain,
            mJob.terrain->grid().toPixel( { a.x, a.y } ), mJob.terrain->grid().toPixel( { b.x, b.y } ), 1, true );
          for ( const double share : shares )
            places.emplace( line.alongM[leg] + share * ( line.alongM[leg + 1] - line.alongM[leg] ), -1 );
        }
        for ( std::size_t i = 0; i < mPlaces.size(); ++i )
        {
          if ( mPlaces[i].line != number )
            continue;
          int &here = places.emplace( mPlaces[i].alongM, -1 ).first->second;
          if ( here >= 0 )
            mSets.join( here, static_cast<int>( i ) );
          here = static_cast<int>( i );
        }
        for ( const auto &[alongM, set] : places )
        {
          Sample sample;
          sample.alongM = alongM;
          sample.elevationM = elevationM( line, alongM );
          sample.set = set;
          line.samples.push_back( sample );
        }
      }

      //! Fed: connected to the source. Reached: connected by pipe that is not known to be above the low level.
      void flood( int source )
      {
        DisjointSets byPipe( mPlaces.size() );
        for ( std::size_t i = 0; i < mPlaces.size(); ++i )
        {
          byPipe.join( static_cast<int>( i ), static_cast<int>( 2 * mPlaces[i].line ) );
          byPipe.join( static_cast<int>( i ), mSets.find( static_cast<int>( i ) ) );
        }
        std::vector<std::pair<std::size_t, std::size_t>> open;
        std::map<int, std::vector<std::pair<std::size_t, std::size_t>>> members;
        for ( std::size_t line = 0; line < mLines.size(); ++line )
        {
          for ( std::size_t i = 0; i < mLines[line].samples.size(); ++i )
          {
            Sample &sample = mLines[line].samples[i];
            sample.fed = byPipe.find( static_cast<int>( 2 * line ) ) == byPipe.find( source );
            if ( sample.set >= 0 )
              members[mSets.find( sample.set )].emplace_back( line, i );
          }
        }
        const auto reach = [&]( std::size_t line, std::size_t i ) {
          Sample &sample = mLines[line].samples[i];
          if ( sample.reached || sample.elevationM > mJob.levelLowM )
            return;
          sample.reached = true;
          open.emplace_back( line, i );
        };
        const auto reachSet = [&]( int set ) {
          const auto found = members.find( mSets.find( set ) );
          if ( found == members.end() )
            return;
          const auto all = found->second;
          members.erase( found );
          for ( const auto &[line, i] : all )
            reach( line, i );
        };
        reachSet( source );
        while ( !open.empty() )
        {
          const auto [line, i] = open.back();
          open.pop_back();
          if ( mLines[line].samples[i].set >= 0 )
            reachSet( mLines[line].samples[i].set );
          if ( i > 0 )
            reach( line, i - 1 );
          if ( i + 1 < mLines[line].samples.size() )
            reach( line, i + 1 );
        }
      }

      void judge( const Line &line, bool reached, bool fed, BruteSample &sample ) const
      {
        sample.state = fed ? State::NoTerrain : State::NoSource;
        sample.pressureHighPa = sample.pressureLowPa = NODATA;
        if ( !fed || std::isnan( sample.elevationM ) )
          return;
        const bool lateral = line.drawn.role == Role::Lateral;
        const double most = lateral ? mJob.limits.lateralMostPa : mJob.limits.mostPa;
        const double least = lateral ? mJob.limits.lateralLeastPa : mJob.limits.leastPa;
        sample.pressureHighPa = mJob.specificWeightNPerM3 * ( mJob.levelHighM - sample.elevationM );
        sample.pressureLowPa = mJob.specificWeightNPerM3 * ( mJob.levelLowM - sample.elevationM );
        sample.over = sample.pressureHighPa > most;
        const bool under = sample.pressureLowPa < least;
        const bool above = sample.elevationM > mJob.levelLowM;
        sample.isShort = under || above || !reached;
        sample.band = 0;
        for ( const double limit : mJob.limits.bandsPa )
          sample.band += sample.pressureHighPa >= limit ? 1 : 0;
        if ( sample.over )
          sample.state = under ? State::OverAndUnder : State::OverLimit;
        else if ( above )
          sample.state = State::AboveStaticLevel;
        else if ( !reached )
          sample.state = State::PastASummit;
        else
          sample.state = under ? State::UnderLimit : State::WithinLimits;
        const bool dry = sample.state == State::AboveStaticLevel || sample.state == State::PastASummit;
        sample.closeCall = mJob.doubtPa > 0.0 && !dry
          && ( std::abs( sample.pressureHighPa - most ) <= mJob.doubtPa
            || std::abs( sample.pressureLowPa - least ) <= mJob.doubtPa );
      }
  };

} // namespace stillhead::test
