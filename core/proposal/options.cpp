// SPDX-License-Identifier: GPL-2.0-or-later
// Every rule is linear in inlet and outlet level, so a range of outlet levels is fed by a range of inlet levels.
#include "core/proposal/options.h"

#include <cmath>

namespace stillhead
{

  namespace
  {
    //! A regulator on the leg above starts anew from the cheapest choice, so much dearer ones are not wanted.
    constexpr int MOST_EXTRA_COST = 12 * BROKEN_COST;

    constexpr double MOST_STEPS = 1024.0; //!< more settings than this in a range are as good as any setting

    //! Inlet levels from which a regulator that keeps all rules can give some level of \a outlet.
    void addFeeds( const LevelRange &outlet, const StandPlace &place, const ProposalRules &rules, LevelSet &feeds )
    {
      const double dropM = rules.dropM();
      const double e = place.elevationM;
      LevelRange feed { outlet.lowM + dropM, ANY_LEVEL_M };
      if ( rules.mostRatio > 0.0 )
      {
        if ( rules.mostRatio <= 1.0 )
          return;
        const double share = 1.0 / rules.mostRatio;
        feed.highM = e + rules.mostRatio * ( outlet.highM - e ) - rules.riseM();
        feed.lowM = std::max( feed.lowM, e + ( rules.riseM() * share + dropM ) / ( 1.0 - share ) );
      }
      if ( !feed.isEmpty() )
        feeds.unite( feed );
    }

    //! The ends of \a range moved inwards to settings that are multiples of the step.
    LevelRange toSettings( const LevelRange &range, double elevationM, double stepM )
    {
      const auto at = [&]( double steps ) { return elevationM + steps * stepM; };
      const double first = std::max( 1.0, std::ceil( ( range.lowM - SAME_LEVEL_M - elevationM ) / stepM ) );
      const double last = std::floor( ( range.highM + SAME_LEVEL_M - elevationM ) / stepM );
      return first > last ? LevelRange { 1.0, 0.0 } : LevelRange { at( first ), at( last ) };
    }

    LevelSet keptFeeds( const LevelSet &outlets, const StandPlace &place, const ProposalRules &rules )
    {
      const double stepM = rules.stepM();
      LevelSet feeds;
      for ( LevelRange range : outlets.ranges() )
      {
        range.lowM = std::max( range.lowM, place.elevationM + LEAST_SET_M );
        // Where any level will do no regulator is wanted.
        if ( range.isEmpty() || range.highM == ANY_LEVEL_M )
          continue;
        if ( stepM <= 0.0 )
        {
          addFeeds( range, place, rules, feeds );
          continue;
        }
        range = toSettings( range, place.elevationM, stepM );
        if ( range.isEmpty() )
          continue;
        if ( ( range.highM - range.lowM ) / stepM > MOST_STEPS )
        {
          addFeeds( range, place, rules, feeds );
          continue;
        }
        for ( double levelM = range.lowM; levelM <= range.highM + SAME_LEVEL_M; levelM += stepM )
          addFeeds( { levelM, levelM }, place, rules, feeds );
      }
      return feeds;
    }

    LevelSet brokenFeeds( const LevelSet &outlets, const StandPlace &place )
    {
      LevelSet feeds;
      for ( const LevelRange &range : outlets.ranges() )
      {
        const double lowM = std::max( range.lowM, place.elevationM + LEAST_SET_M );
        if ( range.highM < ANY_LEVEL_M && lowM <= range.highM + SAME_LEVEL_M )
          feeds.unite( { lowM, ANY_LEVEL_M } );
      }
      return feeds;
    }

    //! True if unregulated water at \a place can be brought to some level of \a levels.
    bool feedsUnregulated( const StandPlace &place, const LevelSet &levels, bool keep, const ProposalRules &rules )
    {
      return bestOutlet( place, levels, outletRange( place, place.today, keep, rules ), keep, rules ).found;
    }
  } // namespace

  LevelRange outletRange( const StandPlace &place, const StaticLevels &inlet, bool keep, const ProposalRules &rules )
  {
    const double e = place.elevationM;
    LevelRange range { e + LEAST_SET_M, inlet.lowM - ( keep ? rules.dropM() : 0.0 ) };
    if ( keep && rules.mostRatio > 0.0 )
      range.lowM = std::max( range.lowM, e + ( inlet.highM - e ) / rules.mostRatio );
    return range;
  }

  Outlet bestOutlet( const StandPlace &place, const LevelSet &levels, const LevelRange &range, bool keepStep,
    const ProposalRules &rules )
  {
    Outlet best;
    for ( const LevelRange &own : levels.ranges() )
    {
      LevelRange allowed { std::max( own.lowM, range.lowM ), std::min( own.highM, range.highM ) };
      if ( allowed.isEmpty() || own.highM == ANY_LEVEL_M )
        continue;
      const double lowM = std::max( own.lowM, place.elevationM );
      double levelM = std::min( std::max( 0.5 * ( lowM + own.highM ), allowed.lowM ), allowed.highM );
      if ( keepStep && rules.settingStepPa > 0.0 )
      {
        const double stepM = rules.stepM();
        allowed = toSettings( allowed, place.elevationM, stepM );
        if ( allowed.isEmpty() )
          continue;
        levelM = place.elevationM + std::round( ( levelM - place.elevationM ) / stepM ) * stepM;
        levelM = std::min( std::max( levelM, allowed.lowM ), allowed.highM );
      }
      const double marginM = std::min( levelM - lowM, own.highM - levelM );
      if ( !best.found || marginM > best.marginM )
        best = { true, levelM, marginM };
    }
    return best;
  }

  Options Options::free( double needM )
  {
    Options options;
    options.mChoices.push_back( { 0, LevelSet( { needM, ANY_LEVEL_M } ) } );
    options.mUnregulated = 0;
    return options;
  }

  int Options::costOf( const Feed &feed ) const
  {
    if ( !feed.regulated )
      return mUnregulated;
    for ( const Choice &choice : mChoices )
    {
      if ( choice.levels.holds( feed.lowM, feed.highM ) )
        return choice.cost;
    }
    return NEVER;
  }

  const LevelSet &Options::levelsWithin( int cost ) const
  {
    static const LevelSet none;
    const LevelSet *found = &none;
    for ( const Choice &choice : mChoices )
    {
      if ( choice.cost <= cost )
        found = &choice.levels;
    }
    return *found;
  }

  void Options::pass( const LevelRange &range, bool unregulatedToo )
  {
    for ( Choice &choice : mChoices )
      choice.levels.clip( range );
    if ( !unregulatedToo )
      mUnregulated = NEVER;
    tidy();
  }

  void Options::join( const Options &other )
  {
    std::vector<Choice> own;
    own.swap( mChoices );
    for ( const Choice &a : own )
    {
      for ( const Choice &b : other.mChoices )
      {
        const LevelSet both = a.levels.common( b.levels );
        if ( !both.isEmpty() )
          add( a.cost + b.cost, both );
      }
    }
    mUnregulated = std::min( NEVER, mUnregulated + other.mUnregulated );
    tidy();
  }

  void Options::stand( const StandPlace &place, int regulators, const ProposalRules &rules )
  {
    const Options below = *this;
    standOver( below, place, regulators, rules );
  }

  void Options::standOver( const Options &below, const StandPlace &place, int regulators, const ProposalRules &rules )
  {
    for ( const Choice &choice : below.mChoices )
    {
      const int kept = choice.cost + KEPT_COST * regulators;
      const int broken = choice.cost + BROKEN_COST * regulators;
      const LevelSet feeds = keptFeeds( choice.levels, place, rules );
      if ( !feeds.isEmpty() && !levelsWithin( kept ).holds( feeds ) )
        add( kept, feeds );
      const LevelSet any = brokenFeeds( choice.levels, place );
      if ( !any.isEmpty() && !levelsWithin( broken ).holds( any ) )
        add( broken, any );
      if ( kept < mUnregulated && feedsUnregulated( place, choice.levels, true, rules ) )
        mUnregulated = kept;
      if ( broken < mUnregulated && feedsUnregulated( place, choice.levels, false, rules ) )
        mUnregulated = broken;
    }
    tidy();
  }

  Options Options::behind( const Options &below, const StandPlace &place, int regulators, const ProposalRules &rules )
  {
    Options options;
    options.standOver( below, place, regulators, rules );
    return options;
  }

  void Options::lower( double lowM, double highM )
  {
    if ( lowM == 0.0 && highM == 0.0 )
      return;
    for ( Choice &choice : mChoices )
      choice.levels.lower( lowM, highM );
    tidy();
  }

  void Options::add( int cost, const LevelSet &levels )
  {
    auto at = mChoices.begin();
    while ( at != mChoices.end() && at->cost < cost )
      ++at;
    if ( at == mChoices.end() || at->cost != cost )
    {
      Choice choice;
      choice.cost = cost;
      if ( at != mChoices.begin() )
        choice.levels = ( at - 1 )->levels;
      at = mChoices.insert( at, choice );
    }
    for ( ; at != mChoices.end(); ++at )
      at->levels.unite( levels );
  }

  void Options::tidy()
  {
    std::size_t kept = 0;
    for ( std::size_t i = 0; i < mChoices.size(); ++i )
    {
      if ( mChoices[i].levels.isEmpty() || mChoices[i].cost > mChoices.front().cost + MOST_EXTRA_COST )
        continue;
      if ( kept > 0 && mChoices[kept - 1].levels.holds( mChoices[i].levels ) )
        continue;
      if ( kept != i )
        mChoices[kept] = std::move( mChoices[i] );
      ++kept;
    }
    mChoices.resize( kept );
  }

} // namespace stillhead
