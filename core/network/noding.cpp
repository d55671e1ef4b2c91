// SPDX-License-Identifier: GPL-2.0-or-later
// Cuts sorted along their lines become spans; sets of things that meet become nodes.
#include "core/network/noding.h"

#include <algorithm>
#include <tuple>
#include <utility>

namespace stillhead
{

  namespace
  {
    bool before( const LineCut &a, const LineCut &b )
    {
      return std::tie( a.line, a.alongM, a.element ) < std::tie( b.line, b.alongM, b.element );
    }

    //! What speaks for an element as the place of its node: least wins.
    struct Claim
    {
        int onEnd = 1; //!< 0: on a line whose interior was met
        int lateral = 1;
        PlanPoint place;
        PlaceOnLine on;

        bool operator<( const Claim &other ) const
        {
          return std::tie( onEnd, lateral, place, on.line, on.alongM )
            < std::tie( other.onEnd, other.lateral, other.place, other.on.line, other.on.alongM );
        }
    };
  } // namespace

  Noding::Noding( const CanonicalDrawing &drawing, DisjointSets ends, double sameJointM )
    : mDrawing( drawing )
    , mSameJointM( sameJointM )
    , mEnds( static_cast<int>( drawing.lines.size() * 2 ) )
    , mSets( std::move( ends ) )
  {
  }

  int Noding::cut( int line, double alongM )
  {
    const int element = mSets.add();
    mCuts.push_back( { line, alongM, element } );
    return element;
  }

  LineCut Noding::endOf( int line, bool last ) const
  {
    return { line, last ? mDrawing.lines[static_cast<std::size_t>( line )].lengthM : 0.0, 2 * line + ( last ? 1 : 0 ) };
  }

  void Noding::settle()
  {
    std::sort( mCuts.begin(), mCuts.end(), before );
    for ( std::size_t i = 0; i < mCuts.size(); ++i )
    {
      const LineCut &cut = mCuts[i];
      if ( i > 0 && mCuts[i - 1].line == cut.line && cut.alongM - mCuts[i - 1].alongM < LEAST_SPAN_M )
        mSets.join( mCuts[i - 1].element, cut.element );
      if ( cut.alongM < LEAST_SPAN_M )
        mSets.join( endOf( cut.line, false ).element, cut.element );
      if ( endOf( cut.line, true ).alongM - cut.alongM < LEAST_SPAN_M )
        mSets.join( endOf( cut.line, true ).element, cut.element );
    }
  }

  std::vector<LineCut> Noding::near( int line, double alongM, double reachM ) const
  {
    std::vector<LineCut> found;
    if ( alongM <= reachM )
      found.push_back( endOf( line, false ) );
    const auto first = std::lower_bound( mCuts.begin(), mCuts.end(), LineCut { line, alongM - reachM, -1 }, before );
    for ( auto cut = first; cut != mCuts.end() && cut->line == line && cut->alongM <= alongM + reachM; ++cut )
      found.push_back( *cut );
    if ( endOf( line, true ).alongM - alongM <= reachM )
      found.push_back( endOf( line, true ) );
    return found;
  }

  Network Noding::network( const std::vector<int> &asked, std::vector<int> &nodeOfEnd, std::vector<int> &nodeOfAsked )
  {
    Network network;
    const int elements = mEnds + static_cast<int>( mCuts.size() );
    std::vector<int> nodeOfElement( static_cast<std::size_t>( elements ), -1 );
    for ( int element = 0; element < elements; ++element )
    {
      int &node = nodeOfElement[static_cast<std::size_t>( mSets.find( element ) )];
      if ( node < 0 )
      {
        node = static_cast<int>( network.nodes.size() );
        network.nodes.emplace_back();
      }
      nodeOfElement[static_cast<std::size_t>( element )] = node;
    }
    nodeOfEnd.assign( nodeOfElement.begin(), nodeOfElement.begin() + mEnds );

    auto cut = mCuts.begin();
    for ( int line = 0; line < static_cast<int>( mDrawing.lines.size() ); ++line )
    {
      LineCut last = endOf( line, false );
      const auto add = [&]( const LineCut &next ) {
        const int from = nodeOfElement[static_cast<std::size_t>( last.element )];
        const int to = nodeOfElement[static_cast<std::size_t>( next.element )];
        network.spans.push_back( { line, last.alongM, next.alongM, from, to } );
        last = next;
      };
      const LineCut end = endOf( line, true );
      const auto apart = [&]( const LineCut &a, const LineCut &b ) {
        const bool sameNode =
          nodeOfElement[static_cast<std::size_t>( a.element )] == nodeOfElement[static_cast<std::size_t>( b.element )];
        return b.alongM - a.alongM >= LEAST_SPAN_M && !( sameNode && b.alongM - a.alongM <= mSameJointM );
      };
      for ( ; cut != mCuts.end() && cut->line == line; ++cut )
      {
        if ( apart( last, *cut ) && apart( *cut, end ) )
          add( *cut );
      }
      add( end );
    }

    choosePlaces( network, nodeOfElement );
    for ( const Span &span : network.spans )
    {
      ++network.nodes[static_cast<std::size_t>( span.fromNode )].degree;
      ++network.nodes[static_cast<std::size_t>( span.toNode )].degree;
    }
    for ( Node &node : network.nodes )
      node.kind = node.degree > 1 ? NodeKind::Joint : NodeKind::End;
    nodeOfAsked.clear();
    for ( const int element : asked )
      nodeOfAsked.push_back( nodeOfElement[static_cast<std::size_t>( element )] );
    return network;
  }

  void Noding::choosePlaces( Network &network, const std::vector<int> &nodeOfElement ) const
  {
    std::vector<Claim> place( network.nodes.size() );
    std::vector<Claim> pipe( network.nodes.size() );
    const auto claim = [&]( const LineCut &at ) {
      const CanonicalLine &line = mDrawing.lines[static_cast<std::size_t>( at.line )];
      Claim own;
      own.onEnd = isEnd( at.element ) ? 1 : 0;
      own.lateral = line.role == Role::Lateral ? 1 : 0;
      own.place = mDrawing.placeAt( line, at.alongM );
      own.on = { at.line, at.alongM };
      const std::size_t node = static_cast<std::size_t>( nodeOfElement[static_cast<std::size_t>( at.element )] );
      if ( pipe[node].on.line < 0 || own < pipe[node] )
        pipe[node] = own;
      // Where only ends meet the place is the least (x, y) of them, whatever they are.
      if ( own.onEnd == 1 )
        own.lateral = 1;
      if ( place[node].on.line < 0 || own < place[node] )
        place[node] = own;
    };
    for ( int line = 0; line < static_cast<int>( mDrawing.lines.size() ); ++line )
    {
      claim( endOf( line, false ) );
      claim( endOf( line, true ) );
    }
    for ( const LineCut &cut : mCuts )
      claim( cut );
    for ( std::size_t i = 0; i < network.nodes.size(); ++i )
    {
      network.nodes[i].place = place[i].place;
      network.nodes[i].on = pipe[i].on;
    }
  }

} // namespace stillhead
