// SPDX-License-Identifier: GPL-2.0-or-later
// Trees of pipe written by hand for the tests of the proposal, and water at rest in them worked out place by place, in a
// way that shares nothing with the programme under test. One metre of water is one pascal here.
#pragma once

#include "core/proposal/proposal.h"

#include <cmath>
#include <string>
#include <vector>

namespace smalltree
{

  using namespace stillhead;

  constexpr double TOLERANCE_M = 0.1;
  constexpr double STUB_M = 2.0 * TOLERANCE_M;
  constexpr double PART_M = 10.0; //!< length of every part

  //! A stretch of pipe that rises or falls evenly; its plan length is PART_M.
  struct Pipe
  {
      double fromM = 0.0; //!< elevation at its upstream end
      double toM = 0.0;
      Role role = Role::Mainline;
      bool known = true;
  };

  struct Leg
  {
      int parent = -1;
      std::vector<Pipe> pipes;
  };

  struct Tree
  {
      StaticLevels source;
      std::vector<Leg> legs;
      ProposalRules rules;
  };

  inline ProposalRules rulesOf( double least, double most, double rise )
  {
    ProposalRules rules;
    rules.limits.leastPa = rules.limits.lateralLeastPa = least;
    rules.limits.mostPa = rules.limits.lateralMostPa = most;
    rules.specificWeightNPerM3 = 1.0;
    rules.risePa = rise;
    rules.toleranceM = TOLERANCE_M;
    return rules;
  }

  inline double heightAt( const Pipe &pipe, double share )
  {
    return pipe.fromM + ( pipe.toM - pipe.fromM ) * share;
  }

  //! A point that is judged: pipe at a distance along a leg.
  struct Place
  {
      int leg = -1;
      double atM = 0.0; //!< from the leg's upstream end
      double elevationM = 0.0;
      bool known = true;
      Role role = Role::Mainline;
      bool stub = false;
      bool served = false;
      bool over = false;
      bool excused = false;
  };

  //! A regulator as water sees it.
  struct Valve
  {
      double atM = 0.0;
      double levelM = 0.0; //!< set level
      double elevationM = 0.0;
  };

  using Valves = std::vector<std::vector<Valve>>; //!< by leg, from its upstream end; empty: none anywhere

  struct Water
  {
      double highM = 0.0;
      double lowM = 0.0;
      bool reached = true;    //!< in the low case
      double arrivingM = 0.0; //!< high level just above a regulator that stands here, within a pipe
  };

  inline Water behind( const Valve &valve, Water water, const ProposalRules &rules )
  {
    water.highM = std::min( water.highM, valve.levelM + rules.riseM() );
    water.lowM = std::min( water.lowM, valve.levelM );
    return water;
  }

  //! Calls \a visit( place, water ) along the whole tree, upstream before downstream, at \a steps places of every pipe.
  template <typename Visit> void flow( const Tree &tree, const Valves &valves, int steps, Visit visit )
  {
    std::vector<Water> below( tree.legs.size() );
    for ( std::size_t i = 0; i < tree.legs.size(); ++i )
    {
      const Leg &leg = tree.legs[i];
      Water water =
        leg.parent < 0 ? Water { tree.source.highM, tree.source.lowM } : below[static_cast<std::size_t>( leg.parent )];
      static const std::vector<Valve> none;
      const std::vector<Valve> &own = valves.empty() ? none : valves[i];
      std::size_t next = 0;
      const double lengthM = PART_M * static_cast<double>( leg.pipes.size() );
      for ( std::size_t p = 0; p < leg.pipes.size(); ++p )
      {
        for ( int k = 0; k <= steps; ++k )
        {
          const double share = static_cast<double>( k ) / steps;
          Place place;
          place.leg = static_cast<int>( i );
          place.atM = PART_M * ( static_cast<double>( p ) + share );
          // Where two pipes meet a regulator stands at the upper end of the lower one.
          const double passedM = k == steps ? place.atM - 1e-9 : place.atM + 1e-9;
          const double arrivingM = water.highM;
          while ( next < own.size() && own[next].atM <= passedM )
            water = behind( own[next++], water, tree.rules );
          place.elevationM = heightAt( leg.pipes[p], share );
          place.known = leg.pipes[p].known;
          place.role = leg.pipes[p].role;
          place.stub = place.atM < STUB_M || place.atM > lengthM - STUB_M - 1e-9;
          if ( place.known && place.elevationM > water.lowM + 1e-7 )
            water.reached = false;
          water.arrivingM = k > 0 ? arrivingM : water.highM;
          visit( place, water );
        }
      }
      while ( next < own.size() )
        water = behind( own[next++], water, tree.rules );
      below[i] = water;
    }
  }

  //! All places with what is known of today.
  inline std::vector<Place> placesOf( const Tree &tree, int steps )
  {
    std::vector<Place> places;
    flow( tree, {}, steps, [&]( Place place, const Water &water ) {
      if ( place.known )
      {
        place.served = water.reached && water.lowM >= place.elevationM + tree.rules.leastM( place.role ) - 1e-9;
        place.over = water.highM > place.elevationM + tree.rules.mostM( place.role ) + 1e-9;
      }
      places.push_back( place );
    } );
    // The level needed through a place: of each served place behind it its own, and every height on the way to it.
    std::vector<double> needBehind( tree.legs.size(), NO_LEVEL_M );
    for ( std::size_t i = places.size(); i-- > 0; )
    {
      Place &place = places[i];
      const std::size_t leg = static_cast<std::size_t>( place.leg );
      double &need = needBehind[leg];
      if ( place.known && place.served )
        need = std::max( need, place.elevationM + tree.rules.leastM( place.role ) );
      else if ( place.known && need > NO_LEVEL_M )
        need = std::max( need, place.elevationM );
      // Serving ends between two places where the pipe is just too high for it.
      const bool onward = i + 1 < places.size() && places[i + 1].leg == place.leg && places[i + 1].atM > place.atM;
      if ( onward && place.known && places[i + 1].known && place.served != places[i + 1].served )
        need = std::max( need, tree.source.lowM );
      place.excused = place.over && need > place.elevationM + tree.rules.standM( place.role ) + 1e-9;
      const bool first = i == 0 || places[i - 1].leg != place.leg;
      if ( first && tree.legs[leg].parent >= 0 )
      {
        double &above = needBehind[static_cast<std::size_t>( tree.legs[leg].parent )];
        above = std::max( above, need );
      }
    }
    return places;
  }

  //! What is wrong with \a valves; empty if nothing is.
  inline std::string faultOf(
    const Tree &tree, const Valves &valves, const std::vector<Place> &today, int steps, bool stubs )
  {
    std::string fault;
    std::size_t number = 0;
    flow( tree, valves, steps, [&]( const Place &place, const Water &water ) {
      const Place &known = today[number++];
      if ( !place.known || ( place.stub && !stubs ) || !fault.empty() )
        return;
      const std::string where = " on leg " + std::to_string( place.leg ) + " at " + std::to_string( place.atM );
      if ( known.over && !known.excused
        && ( stubs ? water.arrivingM : water.highM ) > place.elevationM + tree.rules.mostM( place.role ) + 1e-6 )
        fault = "over" + where;
      if ( known.served
        && ( !water.reached || water.lowM < place.elevationM + tree.rules.leastM( place.role ) - 1e-6 ) )
        fault = "short" + where;
    } );
    return fault;
  }

  inline Forest forestOf( const Tree &tree )
  {
    Forest forest;
    forest.zones.push_back( tree.source );
    std::vector<Water> below( tree.legs.size() );
    std::vector<double> topM( tree.legs.size() ); // highest pipe on the way
    for ( std::size_t i = 0; i < tree.legs.size(); ++i )
    {
      const Leg &leg = tree.legs[i];
      double wayM = leg.parent < 0 ? NO_LEVEL_M : topM[static_cast<std::size_t>( leg.parent )];
      Limb limb;
      limb.parent = leg.parent;
      limb.firstPart = forest.parts.size();
      const double lengthM = PART_M * static_cast<double>( leg.pipes.size() );
      limb.standFromM = STUB_M;
      limb.standToM = lengthM - STUB_M;
      for ( std::size_t p = 0; p < leg.pipes.size(); ++p )
      {
        const Pipe &pipe = leg.pipes[p];
        ForestPart part;
        part.line = static_cast<int>( i );
        part.fromM = PART_M * static_cast<double>( p );
        part.toM = part.fromM + PART_M;
        part.elevation = { pipe.fromM, pipe.toM, 0.0 };
        part.role = pipe.role;
        part.known = pipe.known;
        // Cut where serving begins or ends.
        const double servedBelowM = tree.source.lowM - tree.rules.leastM( pipe.role );
        std::vector<double> shares { 0.0, 1.0 };
        if ( pipe.known )
        {
          for ( const double cutM : { servedBelowM, tree.source.lowM } )
          {
            if ( cutM > part.lowestM() && cutM < part.highestM() )
              shares.push_back( part.shareOf( cutM ) );
          }
        }
        std::sort( shares.begin(), shares.end() );
        for ( std::size_t k = 0; k + 1 < shares.size(); ++k )
        {
          ForestPart piece = shares.size() == 2 ? part : part.between( shares[k], shares[k + 1] );
          const double middleM = 0.5 * ( piece.elevation.from + piece.elevation.to );
          if ( piece.known )
          {
            wayM = std::max( wayM, piece.elevation.from );
            piece.served = wayM <= tree.source.lowM + 1e-9 && middleM <= servedBelowM + 1e-9;
            wayM = std::max( wayM, piece.elevation.to );
          }
          forest.parts.push_back( piece );
        }
      }
      topM[i] = wayM;
      limb.partCount = forest.parts.size() - limb.firstPart;
      forest.limbs.push_back( limb );
    }
    return forest;
  }

  inline Valves valvesOf( const Tree &tree, const Proposal &proposal )
  {
    Valves valves( tree.legs.size() );
    for ( const ProposedRegulator &regulator : proposal.regulators )
      valves[static_cast<std::size_t>( regulator.at.line )].push_back(
        { regulator.at.alongM, regulator.planned.levelM, regulator.planned.elevationM } );
    return valves;
  }

} // namespace smalltree
