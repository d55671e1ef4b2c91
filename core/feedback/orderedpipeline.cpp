// SPDX-License-Identifier: GPL-2.0-or-later
// Whoever finishes the unit that is next in order takes it, and those behind it that are ready; no thread is kept for
// that alone. A unit is begun only when its slot (unit modulo places) is free again.
#include "core/feedback/orderedpipeline.h"

#include <algorithm>
#include <condition_variable>
#include <exception>
#include <mutex>
#include <thread>
#include <vector>

namespace stillhead
{

  namespace
  {

    class Run
    {
      public:
        Run( const OrderedPipeline &pipeline, Monitor &monitor, double from, double to )
          : mPipeline( pipeline )
          , mMonitor( monitor )
          , mFrom( from )
          , mTo( to )
          , mReady( std::max<std::size_t>( 1, pipeline.places ), false )
        {
        }

        void work( bool reports )
        {
          try
          {
            std::size_t unit = 0;
            while ( begin( unit ) )
            {
              stopIfCancelled( mMonitor );
              mPipeline.make( unit, unit % mReady.size() );
              finish( unit );
              if ( reports )
                mMonitor.progress( mFrom + ( mTo - mFrom ) * fractionTaken() );
            }
          }
          catch ( ... )
          {
            const std::lock_guard<std::mutex> lock( mMutex );
            if ( !mFailure )
              mFailure = std::current_exception();
            mFreed.notify_all();
          }
        }

        std::exception_ptr failure() const { return mFailure; }

      private:
        bool begin( std::size_t &unit )
        {
          std::unique_lock<std::mutex> lock( mMutex );
          mFreed.wait(
            lock, [this] { return mFailure || mNext >= mPipeline.units || mNext < mTaken + mReady.size(); } );
          if ( mFailure || mNext >= mPipeline.units )
            return false;
          unit = mNext++;
          return true;
        }

        void finish( std::size_t unit )
        {
          std::unique_lock<std::mutex> lock( mMutex );
          mReady[unit % mReady.size()] = true;
          if ( mIsTaking )
            return;
          mIsTaking = true;
          while ( !mFailure && mReady[mTaken % mReady.size()] )
          {
            const std::size_t slot = mTaken % mReady.size();
            lock.unlock();
            try
            {
              mPipeline.take( mTaken, slot );
            }
            catch ( ... )
            {
              lock.lock();
              mIsTaking = false;
              throw;
            }
            lock.lock();
            mReady[slot] = false;
            ++mTaken;
            mFreed.notify_all();
          }
          mIsTaking = false;
        }

        double fractionTaken()
        {
          const std::lock_guard<std::mutex> lock( mMutex );
          return static_cast<double>( mTaken ) / static_cast<double>( mPipeline.units );
        }

        const OrderedPipeline &mPipeline;
        Monitor &mMonitor;
        const double mFrom;
        const double mTo;
        std::mutex mMutex;
        std::condition_variable mFreed;
        std::vector<bool> mReady;
        std::size_t mNext = 0;
        std::size_t mTaken = 0;
        bool mIsTaking = false;
        std::exception_ptr mFailure;
    };

  } // namespace

  void runOrdered( const OrderedPipeline &pipeline, Monitor &monitor, double from, double to )
  {
    if ( pipeline.units > 0 )
    {
      Run run( pipeline, monitor, from, to );
      const std::size_t used = std::min<std::size_t>(
        { pipeline.units, std::max( 1u, pipeline.threads ), std::max<std::size_t>( 1, pipeline.places ) } );
      std::vector<std::thread> helpers;
      for ( std::size_t i = 1; i < used; ++i )
        helpers.emplace_back( [&run] { run.work( false ); } );
      run.work( true );
      for ( std::thread &helper : helpers )
        helper.join();
      if ( run.failure() )
        std::rethrow_exception( run.failure() );
    }
    monitor.progress( to );
  }

} // namespace stillhead
