// SPDX-License-Identifier: GPL-2.0-or-later
// Shares a stretch of the progress bar out among pieces of work of known weight.
#pragma once

namespace stillhead
{

  class ProgressShares
  {
    public:
      //! A part of the progress bar.
      struct Share
      {
          double from = 0.0;
          double to = 0.0;
      };

      //! \param work the sum of the weights to come; at least as large as that of all calls of next()
      ProgressShares( double from, double to, double work )
        : mAt( from )
        , mPerWeight( work > 0.0 ? ( to - from ) / work : 0.0 )
      {
      }

      //! The part for the next piece of work.
      Share next( double weight )
      {
        const Share share { mAt, mAt + mPerWeight * weight };
        mAt = share.to;
        return share;
      }

    private:
      double mAt;
      double mPerWeight;
  };

} // namespace stillhead
