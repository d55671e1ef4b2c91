// SPDX-License-Identifier: GPL-2.0-or-later
// Core's Monitor over the platform's feedback. Any thread may ask for cancel; only the thread that runs the job moves
// the progress bar.
#pragma once

#include "core/feedback/monitor.h"

#include <qgsfeedback.h>

#include <thread>

namespace stillhead
{

  class FeedbackMonitor : public Monitor
  {
    public:
      //! A stage that takes the bar from \a fromPercent to \a toPercent. \a feedback may be null.
      FeedbackMonitor( QgsFeedback *feedback, double fromPercent, double toPercent )
        : mFeedback( feedback )
        , mFromPercent( fromPercent )
        , mToPercent( toPercent )
      {
      }

      bool cancelled() const override { return mFeedback && mFeedback->isCanceled(); }

      void progress( double fraction ) override
      {
        if ( mFeedback && std::this_thread::get_id() == mThread )
          mFeedback->setProgress( mFromPercent + ( mToPercent - mFromPercent ) * fraction );
      }

    private:
      QgsFeedback *mFeedback;
      double mFromPercent;
      double mToPercent;
      std::thread::id mThread = std::this_thread::get_id();
  };

} // namespace stillhead
