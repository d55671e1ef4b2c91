// SPDX-License-Identifier: GPL-2.0-or-later
// A sweep from the ends up finds what everything costs; a walk from the sources down spends it.
#include "core/proposal/planner.h"

#include "core/proposal/legoptions.h"

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {
    //! So far on from the first place that would do a better one is looked for.
    constexpr int MOST_LIMBS_LOOKED_AT = 100;

    struct Task
    {
        int limb = -1;
        std::size_t boundary = 0;
        Feed feed;
        int cost = 0;
        bool stood = false; //!< a regulator stands at this boundary already
    };

    struct Candidate
    {
        Planned regulator;
        std::size_t boundary = 0;
        int costBelow = 0;
        bool mainline = false;
        double marginM = 0.0;
    };

    class Planner
    {
      public:
        Planner( const MarkedForest &marked, const FewestRegulators &fewest, const ProposalRules &rules )
          : mMarked( marked )
          , mRules( rules )
          , mBreaks( marked.forest.limbs.size() )
          , mAbove( marked.forest.limbs.size() )
        {
          for ( const Break &place : fewest.breaks )
            mBreaks[static_cast<std::size_t>( place.limb )].push_back( place.alongM );
        }

        std::vector<Planned> run( bool &complete )
        {
          for ( std::size_t i = mMarked.forest.limbs.size(); i-- > 0; )
          {
            if ( mMarked.mustMend[i] )
              mAbove[i] = optionsAbove( static_cast<int>( i ) );
          }
          complete = true;
          for ( const int limb : mMarked.children.of( -1 ) )
            complete = complete && ( !mustMend( limb ) || above( limb ).costOf( Feed() ) < NEVER );
          push( -1, Feed() );
          while ( !mTasks.empty() )
          {
            const Task task = mTasks.back();
            mTasks.pop_back();
            spend( task );
          }
          std::stable_sort(
            mPlan.begin(), mPlan.end(), []( const Planned &a, const Planned &b ) { return a.limb < b.limb; } );
          return std::move( mPlan );
        }

      private:
        const Limb &limbOf( int limb ) const { return mMarked.forest.limbs[static_cast<std::size_t>( limb )]; }
        bool mustMend( int limb ) const { return mMarked.mustMend[static_cast<std::size_t>( limb )]; }
        const Options &above( int limb ) const { return mAbove[static_cast<std::size_t>( limb )]; }

        Options joint( int limb ) const
        {
          Options options = Options::free( mMarked.below[static_cast<std::size_t>( limb )].levelM );
          for ( const int child : mMarked.children.of( limb ) )
          {
            if ( mustMend( child ) )
              options.join( above( child ) );
          }
          return options;
        }

        Options optionsAbove( int number )
        {
          const Limb &limb = limbOf( number );
          Options options;
          if ( limb.loop )
          {
            options = bodyOptions( number );
            if ( !limb.inlets.empty() )
              options = Options::behind( options, inletPlace( limb ), static_cast<int>( limb.inlets.size() ), mRules );
          }
          else
          {
            options = legOptions( number, false ).at.front();
          }
          options.lower( limb.boostLowM, limb.boostHighM );
          options.pass( { mMarked.above[static_cast<std::size_t>( number )].levelM, ANY_LEVEL_M }, true );
          return options;
        }

        Options bodyOptions( int number ) const
        {
          const Limb &limb = limbOf( number );
          LevelRange range;
          range.lowM = limb.wayM + limb.boostLowM;
          for ( std::size_t i = limb.firstPart; i < limb.firstPart + limb.partCount; ++i )
          {
            const ForestPart &part = mMarked.forest.parts[i];
            range.lowM = std::max( range.lowM, needOf( part, false, mRules ).levelM );
            if ( part.mend )
              range.highM = std::min( range.highM, part.lowestM() + mRules.standM( part.role ) );
          }
          Options options = joint( number );
          options.pass( range, range.highM == ANY_LEVEL_M );
          return options;
        }

        //! The inlet that asks most of the rules stands for all of them.
        StandPlace inletPlace( const Limb &limb ) const
        {
          const Inlet *highest = &limb.inlets.front();
          for ( const Inlet &inlet : limb.inlets )
          {
            if ( inlet.elevationM > highest->elevationM )
              highest = &inlet;
          }
          return { highest->elevationM, mMarked.forest.zones[static_cast<std::size_t>( highest->zone )] };
        }

        LegOptions legOptions( int number, bool keepAll ) const
        {
          return optionsOfLeg( mMarked.forest, limbOf( number ), mBreaks[static_cast<std::size_t>( number )],
            joint( number ), mMarked.below[static_cast<std::size_t>( number )].levelM, keepAll, mRules );
        }

        //! Tasks for what begins at the lower end of \a limb and is not free.
        void push( int limb, const Feed &feed )
        {
          for ( const int child : mMarked.children.of( limb ) )
          {
            if ( !mustMend( child ) )
              continue;
            const int cost = above( child ).costOf( feed );
            if ( cost > 0 && cost < NEVER )
              mTasks.push_back( { child, 0, feed, cost, false } );
          }
        }

        //! Follows a leg, and the only leg behind it that still costs, and puts the next regulator at its best place.
        void spend( Task task )
        {
          Candidate best;
          bool found = false;
          int sinceFound = 0;
          for ( bool onward = true; onward && sinceFound < MOST_LIMBS_LOOKED_AT; sinceFound += found ? 1 : 0 )
          {
            const Limb &limb = limbOf( task.limb );
            if ( task.boundary == 0 && !task.stood )
              task.feed = task.feed.boosted( limb.boostHighM, limb.boostLowM );
            if ( !limb.inlets.empty() )
            {
              if ( !found )
                standAtInlets( task );
              break;
            }
            if ( limb.loop )
            {
              onward = cross( task, found );
              continue;
            }
            const LegOptions leg = legOptions( task.limb, true );
            const std::size_t count = leg.leg.segments.size();
            std::size_t i = task.boundary;
            for ( ;; ++i )
            {
              Candidate candidate;
              const bool taken = task.stood && ( i == task.boundary || leg.leg.onePlace );
              if ( !taken && leg.stationAt[i] >= 0 && candidateAt( task, leg, i, candidate )
                && ( !found || isBetter( candidate, best ) ) )
              {
                best = candidate;
                found = true;
              }
              if ( i == count || leg.below[i].costOf( task.feed ) > task.cost )
                break;
            }
            if ( i < count || leg.below[i].costOf( task.feed ) > task.cost )
              break;
            onward = cross( task, found );
          }
          if ( !found )
            return;
          mPlan.push_back( best.regulator );
          if ( best.costBelow > 0 )
            mTasks.push_back( { best.regulator.limb, best.boundary,
              Feed { true, best.regulator.levelM, best.regulator.levelM }, best.costBelow, true } );
        }

        static bool isBetter( const Candidate &a, const Candidate &b )
        {
          if ( a.regulator.kept != b.regulator.kept )
            return a.regulator.kept;
          if ( a.mainline != b.mainline )
            return a.mainline;
          return a.marginM > b.marginM + SAME_LEVEL_M;
        }

        /**
         * At the lower end of the task's limb: true if the walk goes on along a single limb that costs (then \a task is there).
         * Where several cost, each goes its own way unless a place has been found already that spares laterals.
         */
        bool cross( Task &task, bool &found )
        {
          std::vector<int> costly;
          bool laterals = false;
          for ( const int child : mMarked.children.of( task.limb ) )
          {
            if ( !mustMend( child ) || above( child ).costOf( task.feed ) == 0 )
              continue;
            costly.push_back( child );
            laterals = laterals || roleOf( child ) == Role::Lateral;
          }
          if ( costly.size() == 1 )
          {
            task.limb = costly.front();
            task.boundary = 0;
            task.stood = false;
            return true;
          }
          if ( !found || !laterals )
          {
            found = false;
            push( task.limb, task.feed );
          }
          return false;
        }

        Role roleOf( int limb ) const
        {
          const Limb &own = limbOf( limb );
          return own.partCount > 0 ? mMarked.forest.parts[own.firstPart].role : Role::Mainline;
        }

        bool candidateAt( const Task &task, const LegOptions &leg, std::size_t boundary, Candidate &candidate ) const
        {
          const Station &station = leg.leg.stations[static_cast<std::size_t>( leg.stationAt[boundary] )];
          const StandPlace place = placeOf( station, mMarked.forest );
          const StaticLevels inlet = task.feed.levels( place.today, mRules.riseM() );
          for ( const bool keep : { true, false } )
          {
            const int costBelow = task.cost - ( keep ? KEPT_COST : BROKEN_COST );
            if ( costBelow < 0 )
              break;
            for ( const bool keepStep : { true, false } )
            {
              if ( keep && !keepStep )
                break;
              const Outlet outlet = bestOutlet( place, leg.beneath( station ).levelsWithin( costBelow ),
                outletRange( place, inlet, keep, mRules ), keepStep, mRules );
              if ( !outlet.found )
                continue;
              candidate.regulator = { task.limb, -1, station.alongM, station.elevationM, outlet.levelM, keep };
              candidate.boundary = boundary;
              candidate.costBelow = leg.beneath( station ).costOf( Feed { true, outlet.levelM, outlet.levelM } );
              candidate.mainline = station.role == Role::Mainline;
              const double inletMarginM = mRules.mostM( station.role ) - ( inlet.highM - station.elevationM );
              candidate.marginM = std::min( inletMarginM, outlet.marginM );
              return true;
            }
          }
          return false;
        }

        void standAtInlets( const Task &task )
        {
          const Limb &limb = limbOf( task.limb );
          const Options below = bodyOptions( task.limb );
          const StandPlace place = inletPlace( limb );
          const StaticLevels inlet = task.feed.levels( place.today, mRules.riseM() );
          const int count = static_cast<int>( limb.inlets.size() );
          for ( const bool keep : { true, false } )
          {
            const int costBelow = task.cost - count * ( keep ? KEPT_COST : BROKEN_COST );
            const Outlet outlet = costBelow < 0 ? Outlet()
                                                : bestOutlet( place, below.levelsWithin( costBelow ),
                                                  outletRange( place, inlet, keep, mRules ), keep, mRules );
            if ( !outlet.found )
              continue;
            for ( int i = 0; i < count; ++i )
            {
              const Inlet &own = limb.inlets[static_cast<std::size_t>( i )];
              mPlan.push_back( { task.limb, i, own.on.alongM, own.elevationM, outlet.levelM, keep } );
            }
            push( task.limb, Feed { true, outlet.levelM, outlet.levelM } );
            return;
          }
        }

        const MarkedForest &mMarked;
        const ProposalRules &mRules;
        std::vector<std::vector<double>> mBreaks;
        std::vector<Options> mAbove;
        std::vector<Task> mTasks;
        std::vector<Planned> mPlan;
    };
  } // namespace

  std::vector<Planned> planRegulators(
    const MarkedForest &marked, const FewestRegulators &fewest, const ProposalRules &rules, bool &complete )
  {
    return Planner( marked, fewest, rules ).run( complete );
  }

} // namespace stillhead
