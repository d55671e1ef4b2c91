// SPDX-License-Identifier: GPL-2.0-or-later
// One long piece of work done while its owner does something else.
#pragma once

#include "core/feedback/monitor.h"

#include <atomic>
#include <chrono>
#include <functional>
#include <future>
#include <utility>

namespace stillhead
{

  /**
   * Work that begins at once in a thread of its own. take() gives its result; an owner that goes away without taking it
   * has the work stop, and waits for that.
   */
  template <typename Result> class Background
  {
    public:
      using Work = std::function<Result( Monitor &monitor )>;

      explicit Background( Work work )
        : mResult( std::async( std::launch::async, [this, work = std::move( work )] { return work( mInside ); } ) )
      {
      }

      ~Background()
      {
        mInside.stop = true;
        if ( mResult.valid() )
          mResult.wait();
      }
      Background( const Background & ) = delete;
      Background &operator=( const Background & ) = delete;

      /**
       * Waits for the result, once; progress is passed on meanwhile. \throws Cancelled if \a monitor says so, and what the work
       * threw
       */
      Result take( Monitor &monitor )
      {
        constexpr auto LOOK_AGAIN = std::chrono::milliseconds( 50 );
        while ( mResult.wait_for( LOOK_AGAIN ) != std::future_status::ready )
        {
          monitor.progress( mInside.done );
          mInside.stop = monitor.cancelled();
        }
        monitor.progress( 1.0 );
        return mResult.get();
      }

    private:
      class Inside : public Monitor
      {
        public:
          bool cancelled() const override { return stop; }
          void progress( double fraction ) override { done = fraction; }

          std::atomic<bool> stop { false };
          std::atomic<double> done { 0.0 };
      };

      Inside mInside;
      std::future<Result> mResult; //!< last: it uses what stands above
  };

} // namespace stillhead
