// SPDX-License-Identifier: GPL-2.0-or-later
// How core tells its progress and learns that the user has had enough. Core never prints and has no globals.
#pragma once

namespace stillhead
{

  //! Thrown by any core function soon after Monitor::cancelled() turns true; nothing has been written then.
  struct Cancelled
  {
  };

  //! Progress and cancel; the default is silent and never cancels. Called from several threads at once.
  class Monitor
  {
    public:
      virtual ~Monitor() = default;

      //! True once the user asked to stop.
      virtual bool cancelled() const { return false; }

      //! The work is done to \a fraction (0 to 1, never falling within one stage).
      virtual void progress( double fraction ) { static_cast<void>( fraction ); }
  };

  //! Throws Cancelled if \a monitor says so.
  inline void stopIfCancelled( const Monitor &monitor )
  {
    if ( monitor.cancelled() )
      throw Cancelled();
  }

} // namespace stillhead
