// SPDX-License-Identifier: GPL-2.0-or-later
// A stage's share of the whole progress.
#pragma once

#include "core/feedback/monitor.h"

namespace stillhead
{

  class StageMonitor : public Monitor
  {
    public:
      StageMonitor( Monitor &whole, double from, double to )
        : mWhole( whole )
        , mFrom( from )
        , mTo( to )
      {
      }

      bool cancelled() const override { return mWhole.cancelled(); }
      void progress( double fraction ) override { mWhole.progress( mFrom + fraction * ( mTo - mFrom ) ); }

    private:
      Monitor &mWhole;
      double mFrom;
      double mTo;
  };

} // namespace stillhead
