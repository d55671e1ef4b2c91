// SPDX-License-Identifier: GPL-2.0-or-later
// Ends first, then interiors, then crossings, then sources and devices; findings last, when it is known what is joined.
#include "core/network/joining.h"

#include "core/network/crossings.h"
#include "core/network/endjoins.h"
#include "core/network/groundscales.h"
#include "core/network/legindex.h"
#include "core/network/nearmisses.h"
#include "core/network/noding.h"

#include <algorithm>
#include <cmath>
#include <map>
#include <utility>

namespace stillhead
{

  namespace
  {
    //! How many tolerances apart places of one node on a line may be and still be one: twice, as the farthest of three ends in a chain.
    constexpr double SAME_JOINT_TOLERANCES = 2.0;

    enum class CrossingMeets
    {
      Nothing,  //!< the lines merely cross
      OwnJoint, //!< one of the two lines ends in the joint
      OtherEnd  //!< a third line's end joins both
    };

    //! What the noding has where two lines cross.
    CrossingMeets crossingMeets( Noding &noding, const Crossing &crossing, double reachM )
    {
      bool joined = false;
      for ( const LineCut &onA : noding.near( crossing.lineA, crossing.alongA, reachM ) )
      {
        for ( const LineCut &onB : noding.near( crossing.lineB, crossing.alongB, reachM ) )
        {
          if ( onA.element == onB.element || !noding.together( onA.element, onB.element ) )
            continue;
          if ( noding.isEnd( onA.element ) || noding.isEnd( onB.element ) )
            return CrossingMeets::OwnJoint;
          joined = true;
        }
      }
      return joined ? CrossingMeets::OtherEnd : CrossingMeets::Nothing;
    }

    Finding findingAt( FindingCode code, const PlanPoint &place, int line, int otherLine )
    {
      Finding finding;
      finding.code = code;
      finding.place = place;
      finding.line = line;
      finding.otherLine = otherLine;
      return finding;
    }

    bool endsHere( const CanonicalDrawing &drawing, int line, double alongM, double toleranceM )
    {
      return alongM <= toleranceM || drawing.lines[static_cast<std::size_t>( line )].lengthM - alongM <= toleranceM;
    }

    //! Makes the crossings into joints, or into findings.
    void treatCrossings( const CanonicalDrawing &drawing, const std::vector<Crossing> &crossings,
      const JoinOptions &options, Noding &noding, std::vector<Finding> &findings )
    {
      const double reachM = NEAR_MISS_TOLERANCES * options.toleranceM;
      std::vector<const Crossing *> toJoin;
      for ( const Crossing &crossing : crossings )
      {
        const CrossingMeets meets = crossingMeets( noding, crossing, reachM );
        if ( meets == CrossingMeets::OwnJoint )
          continue;
        const bool sameSystem = drawing.lines[static_cast<std::size_t>( crossing.lineA )].system
          == drawing.lines[static_cast<std::size_t>( crossing.lineB )].system;
        // An end that touches a line of another system is told as such already.
        if ( !sameSystem
          && ( endsHere( drawing, crossing.lineA, crossing.alongA, options.toleranceM )
            || endsHere( drawing, crossing.lineB, crossing.alongB, options.toleranceM ) ) )
          continue;
        if ( meets == CrossingMeets::Nothing && options.joinCrossings && sameSystem )
        {
          toJoin.push_back( &crossing );
          continue;
        }
        const FindingCode code =
          options.joinCrossings && !sameSystem ? FindingCode::SystemsTouch : FindingCode::CrossingNotJoined;
        findings.push_back( findingAt( code, crossing.place, crossing.lineA, crossing.lineB ) );
        findings.back().joinedByEnd = meets == CrossingMeets::OtherEnd;
      }
      for ( const Crossing *crossing : toJoin )
        noding.join( noding.cut( crossing->lineA, crossing->alongA ), noding.cut( crossing->lineB, crossing->alongB ) );
      noding.settle();
    }

    //! One finding for each pair of lines and place; both of two ends that meet tell of the same touch.
    void reportTouches( const CanonicalDrawing &drawing, const std::vector<SystemTouch> &touches,
      const GroundScales &scales, double toleranceM, std::vector<Finding> &findings )
    {
      std::map<std::pair<int, int>, std::vector<PlanPoint>> told;
      for ( const SystemTouch &touch : touches )
      {
        const int own = touch.end / 2;
        const PlanPoint &place = endPoint( drawing, touch.end );
        std::vector<PlanPoint> &places = told[std::minmax( own, touch.line )];
        const GroundScale &scale = scales.atEnd( touch.end );
        const bool known = std::any_of( places.begin(), places.end(),
          [&]( const PlanPoint &p ) { return scale.distanceM( p.x - place.x, p.y - place.y ) <= toleranceM; } );
        if ( known )
          continue;
        places.push_back( place );
        findings.push_back( findingAt( FindingCode::SystemsTouch, place, own, touch.line ) );
      }
    }

    //! The element of a source or device: what the line has within the tolerance, else a cut of its own.
    int elementAt( Noding &noding, const PlaceOnLine &on, double toleranceM )
    {
      const std::vector<LineCut> near = noding.near( on.line, on.alongM, toleranceM );
      const auto nearest = std::min_element( near.begin(), near.end(), [&]( const LineCut &a, const LineCut &b ) {
        return std::make_pair( std::abs( a.alongM - on.alongM ), a.element )
          < std::make_pair( std::abs( b.alongM - on.alongM ), b.element );
      } );
      return nearest != near.end() ? nearest->element : noding.cut( on.line, on.alongM );
    }
  } // namespace

  Network joinLines( const CanonicalDrawing &drawing, const PlanMeasure &measure, const JoinOptions &options,
    const std::vector<PlaceOnLine> &places, std::vector<int> &nodeOfPlace, unsigned threads,
    std::vector<Finding> &findings, Monitor &monitor )
  {
    const GroundScales scales( drawing, measure, threads, monitor );
    const LegIndex index( drawing );
    stopIfCancelled( monitor );

    Noding noding(
      drawing, joinEnds( drawing, scales, options.toleranceM, monitor ), SAME_JOINT_TOLERANCES * options.toleranceM );
    std::vector<SystemTouch> touches;
    for ( const Meeting &meeting :
      meetInteriors( drawing, index, scales, options.toleranceM, threads, touches, monitor ) )
      noding.join( meeting.end, noding.cut( meeting.line, meeting.alongM ) );
    noding.settle();

    std::vector<Finding> found;
    reportTouches( drawing, touches, scales, options.toleranceM, found );
    treatCrossings(
      drawing, findCrossings( drawing, index, options.toleranceM, threads, monitor ), options, noding, found );
    std::vector<int> elements;
    for ( const PlaceOnLine &place : places )
    {
      elements.push_back( elementAt( noding, place, options.toleranceM ) );
      noding.settle();
    }

    std::vector<int> nodeOfEnd;
    Network network = noding.network( elements, nodeOfEnd, nodeOfPlace );
    const std::vector<Finding> nearMisses =
      findNearMisses( drawing, network, nodeOfEnd, index, scales, options.toleranceM, threads, monitor );
    found.insert( found.end(), nearMisses.begin(), nearMisses.end() );
    for ( Finding &finding : found )
    {
      finding.line = drawing.lines[static_cast<std::size_t>( finding.line )].drawn;
      finding.otherLine = drawing.lines[static_cast<std::size_t>( finding.otherLine )].drawn;
      findings.push_back( finding );
    }
    return network;
  }

  std::optional<NearestPipe> nearestPipe(
    const CanonicalDrawing &drawing, const PlanMeasure &measure, const PlanPoint &place, int system, double toleranceM )
  {
    const GroundScale scale = measure.scaleAt( place );
    std::optional<NearestPipe> nearest[2];
    for ( std::size_t i = 0; i < drawing.lines.size(); ++i )
    {
      const CanonicalLine &line = drawing.lines[i];
      if ( system != 0 && line.system != system )
        continue;
      std::optional<NearestPipe> &best = nearest[line.role == Role::Mainline ? 0 : 1];
      for ( std::size_t v = line.first; v + 1 < line.first + line.count; ++v )
      {
        const LegHit hit = nearestOnLeg( drawing, { static_cast<int>( i ), v }, place, scale );
        if ( !best || hit.distanceM < best->distanceM )
          best = NearestPipe { { static_cast<int>( i ), hit.alongM }, hit.distanceM };
      }
    }
    if ( !nearest[0] || !nearest[1] )
      return nearest[0] ? nearest[0] : nearest[1];
    return nearest[0]->distanceM <= nearest[1]->distanceM + toleranceM ? nearest[0] : nearest[1];
  }

} // namespace stillhead
