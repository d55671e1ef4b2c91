// SPDX-License-Identifier: GPL-2.0-or-later
// Small drawings written as short text, and what joining makes of them. A sketch names its lines one after the other:
//   main 0 0, 10 0; lateral system=north cover=0.5 5 0, 5 5; main 0 0 101.5, 10 0 nan
// Words: main, lateral, system=, cover=, feature= (default: the line's number); then vertices "x y" or "x y z".
// A word that is not known is an error. Lines, directions and order can be changed at random.
#pragma once

#include "core/network/disjointsets.h"
#include "core/network/joining.h"

#include <algorithm>
#include <cstdlib>
#include <optional>
#include <random>
#include <sstream>
#include <stdexcept>
#include <string>
#include <vector>

namespace stillhead::test
{

  class SketchReader
  {
    public:
      Drawing read( const std::string &text )
      {
        std::stringstream lines( text );
        for ( std::string line; std::getline( lines, line, ';' ); )
          readLine( line );
        if ( !mHasZ )
          mDrawing.surveyZM.clear();
        return mDrawing;
      }

    private:
      Drawing mDrawing;
      bool mHasZ = false;

      void readLine( const std::string &text )
      {
        std::stringstream vertices( text );
        DrawnLine line;
        line.first = mDrawing.vertices.size();
        line.feature = static_cast<int>( mDrawing.lines.size() );
        bool hasRole = false;
        for ( std::string vertex; std::getline( vertices, vertex, ',' ); )
        {
          std::stringstream words( vertex );
          std::vector<double> numbers;
          for ( std::string word; words >> word; )
          {
            if ( readWord( word, line ) )
              hasRole = true;
            else
              numbers.push_back( number( word ) );
          }
          if ( numbers.empty() )
            continue;
          if ( numbers.size() < 2 || numbers.size() > 3 )
            throw std::invalid_argument( "not a vertex: " + vertex );
          mDrawing.vertices.push_back( { numbers[0], numbers[1] } );
          mDrawing.surveyZM.push_back( numbers.size() == 3 ? numbers[2] : NOT_A_FIGURE );
          mHasZ = mHasZ || numbers.size() == 3;
        }
        if ( !hasRole && mDrawing.vertices.size() == line.first )
          return; // nothing but space after the last semicolon
        if ( !hasRole )
          throw std::invalid_argument( "a line without main or lateral: " + text );
        line.count = mDrawing.vertices.size() - line.first;
        mDrawing.lines.push_back( line );
      }

      bool readWord( const std::string &word, DrawnLine &line )
      {
        if ( word == "main" || word == "lateral" )
          line.role = word == "main" ? Role::Mainline : Role::Lateral;
        else if ( word.rfind( "system=", 0 ) == 0 )
          line.system = systemNumber( word.substr( 7 ) );
        else if ( word.rfind( "cover=", 0 ) == 0 )
          line.coverM = number( word.substr( 6 ) );
        else if ( word.rfind( "feature=", 0 ) == 0 )
          line.feature = static_cast<int>( number( word.substr( 8 ) ) );
        else
          return false;
        return true;
      }

      int systemNumber( const std::string &name )
      {
        auto &systems = mDrawing.systems;
        const auto found = std::find( systems.begin(), systems.end(), name );
        if ( found != systems.end() )
          return static_cast<int>( found - systems.begin() );
        systems.push_back( name );
        return static_cast<int>( systems.size() ) - 1;
      }

      static double number( const std::string &word )
      {
        char *end = nullptr;
        const double value = std::strtod( word.c_str(), &end );
        if ( end == word.c_str() || *end != '\0' )
          throw std::invalid_argument( "not a number: " + word );
        return value;
      }
  };

  inline Drawing sketched( const std::string &text )
  {
    return SketchReader().read( text );
  }

  //! Appends a line; without \a zM it has no surveyed Z.
  inline void addLine(
    Drawing &drawing, const std::vector<PlanPoint> &vertices, DrawnLine line = {}, const std::vector<double> &zM = {} )
  {
    line.first = drawing.vertices.size();
    line.count = vertices.size();
    drawing.vertices.insert( drawing.vertices.end(), vertices.begin(), vertices.end() );
    drawing.surveyZM.insert( drawing.surveyZM.end(), zM.begin(), zM.end() );
    drawing.lines.push_back( line );
  }

  //! Vertices of one drawn line.
  inline std::vector<PlanPoint> verticesOf( const Drawing &drawing, const DrawnLine &line )
  {
    const auto first = drawing.vertices.begin() + static_cast<std::ptrdiff_t>( line.first );
    return { first, first + static_cast<std::ptrdiff_t>( line.count ) };
  }

  /**
   * The same drawing, its lines in another order and every other one drawn the other way round; systems are numbered
   * differently too.
   */
  inline Drawing redrawn( const Drawing &drawing, unsigned seed )
  {
    std::mt19937 random( seed );
    std::vector<std::size_t> order( drawing.lines.size() );
    for ( std::size_t i = 0; i < order.size(); ++i )
      order[i] = i;
    std::shuffle( order.begin(), order.end(), random );
    Drawing result;
    result.systems.insert( result.systems.end(), drawing.systems.rbegin(), drawing.systems.rend() - 1 );
    for ( const std::size_t number : order )
    {
      DrawnLine line = drawing.lines[number];
      if ( line.system > 0 )
        line.system = static_cast<int>( drawing.systems.size() ) - line.system;
      std::vector<PlanPoint> vertices = verticesOf( drawing, line );
      std::vector<double> zM;
      if ( !drawing.surveyZM.empty() )
        zM.assign( drawing.surveyZM.begin() + static_cast<std::ptrdiff_t>( line.first ),
          drawing.surveyZM.begin() + static_cast<std::ptrdiff_t>( line.first + line.count ) );
      if ( random() % 2 == 0 )
      {
        std::reverse( vertices.begin(), vertices.end() );
        std::reverse( zM.begin(), zM.end() );
      }
      addLine( result, vertices, line, zM );
    }
    return result;
  }

  //! A drawing with all that joining makes of it.
  struct Joined
  {
      CanonicalDrawing drawing;
      Network network;
      std::vector<Finding> findings;

      std::size_t count( FindingCode code ) const
      {
        return static_cast<std::size_t>( std::count_if(
          findings.begin(), findings.end(), [code]( const Finding &finding ) { return finding.code == code; } ) );
      }

      //! The first finding of that code.
      Finding finding( FindingCode code ) const
      {
        for ( const Finding &finding : findings )
        {
          if ( finding.code == code )
            return finding;
        }
        throw std::out_of_range( findingName( code ) );
      }

      //! Sets of connected pipe.
      std::size_t parts() const
      {
        DisjointSets sets( network.nodes.size() );
        for ( const Span &span : network.spans )
          sets.join( span.fromNode, span.toNode );
        std::size_t parts = 0;
        for ( int i = 0; i < static_cast<int>( network.nodes.size() ); ++i )
          parts += sets.find( i ) == i ? 1 : 0;
        return parts;
      }

      //! The node at a place, −1 where there is none.
      int nodeAt( double x, double y ) const
      {
        for ( std::size_t i = 0; i < network.nodes.size(); ++i )
        {
          if ( network.nodes[i].place == PlanPoint { x, y } )
            return static_cast<int>( i );
        }
        return -1;
      }
  };

  inline Joined joined( const Drawing &drawing, const JoinOptions &options = {},
    const PlanMeasure &measure = PlanarMeasure(), unsigned threads = 1,
    const std::optional<PlanPoint> &source = std::nullopt )
  {
    Joined result;
    Monitor monitor;
    result.drawing = canonicalDrawing( drawing, measure, threads, result.findings, monitor );
    std::vector<PlaceOnLine> places;
    if ( source )
      places.push_back( nearestPipe( result.drawing, measure, *source, 0, options.toleranceM )->on );
    std::vector<int> nodes;
    result.network = joinLines( result.drawing, measure, options, places, nodes, threads, result.findings, monitor );
    for ( const int node : nodes )
      result.network.nodes[static_cast<std::size_t>( node )].kind = NodeKind::Source;
    return result;
  }

} // namespace stillhead::test
