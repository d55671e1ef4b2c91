// SPDX-License-Identifier: GPL-2.0-or-later
// Per zone the highest and the lowest source decide whether all agree.
#include "core/statics/feeding.h"

#include "core/network/way.h"
#include "core/units/units.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace stillhead
{

  namespace
  {
    using SourceGroup = std::vector<const PlacedSource *>;

    double levelOf( const PlacedSource &source, Case which )
    {
      return which == Case::High ? source.levels.highM : source.levels.lowM;
    }

    //! The source of the group with the least or largest level; of equal ones the first given.
    const PlacedSource &extremeOf( const SourceGroup &group, Case which, bool largest )
    {
      const auto before = [&]( const PlacedSource *a, const PlacedSource *b ) {
        const double levelA = largest ? -levelOf( *a, which ) : levelOf( *a, which );
        const double levelB = largest ? -levelOf( *b, which ) : levelOf( *b, which );
        return levelA < levelB || ( levelA == levelB && a->source < b->source );
      };
      return **std::min_element( group.begin(), group.end(), before );
    }

    void requireAgreement( const SourceGroup &group, const Network &network, double specificWeightNPerM3,
      std::vector<SourceDifference> &differences )
    {
      const SourceDifference *worst = nullptr;
      SourceDifference found[2];
      for ( const Case which : { Case::High, Case::Low } )
      {
        const PlacedSource &largest = extremeOf( group, which, true );
        const PlacedSource &least = extremeOf( group, which, false );
        SourceDifference &own = found[which == Case::High ? 0 : 1];
        own = { std::min( largest.source, least.source ), std::max( largest.source, least.source ),
          levelOf( largest, which ) - levelOf( least, which ) };
        const double allowedPa =
          std::max( AGREED_DIFFERENCE_PSI * PASCALS_PER_PSI, std::hypot( largest.doubtPa, least.doubtPa ) );
        if ( own.differenceM * specificWeightNPerM3 > allowedPa * ( 1.0 + 1e-12 ) )
        {
          Refusal refusal;
          refusal.reason = Refusal::Reason::SourcesDisagree;
          refusal.sources = { own.source, own.otherSource };
          refusal.figureM = own.differenceM;
          bool reached = false;
          refusal.lines = linesOfWay( network, largest.node, least.node, {}, reached );
          throw refusal;
        }
        if ( !worst || own.differenceM > worst->differenceM )
          worst = &own;
      }
      if ( worst->differenceM > 0.0 )
        differences.push_back( *worst );
    }
  } // namespace

  Feeding feedingOf( const std::vector<PlacedSource> &sources, const Network &network, const ZoneMap &zones,
    double specificWeightNPerM3 )
  {
    std::map<int, SourceGroup> groups;
    for ( const PlacedSource &source : sources )
      groups[zones.ofNode[static_cast<std::size_t>( source.node )]].push_back( &source );

    Feeding feeding;
    for ( const auto &[zone, group] : groups )
    {
      if ( group.size() > 1 )
        requireAgreement( group, network, specificWeightNPerM3, feeding.differences );
      const bool openWater =
        std::any_of( group.begin(), group.end(), []( const PlacedSource *s ) { return s->openWater; } );
      const PlacedSource &high = extremeOf( group, Case::High, true );
      const PlacedSource &low = extremeOf( group, Case::Low, false );
      feeding.high.push_back( { zone, high.source, high.levels.highM, openWater, high.errors } );
      feeding.low.push_back( { zone, low.source, low.levels.lowM, openWater, low.errors } );
    }
    return feeding;
  }

} // namespace stillhead
