// SPDX-License-Identifier: GPL-2.0-or-later
// Owners for PROJ's handles. A context serves one thread and must outlive the objects made in it; ours is silent:
// errors are asked for, never printed.
#pragma once

#include <memory>

#include <proj.h>

namespace stillhead
{

  struct ProjContextDeleter
  {
      void operator()( PJ_CONTEXT *context ) const { proj_context_destroy( context ); }
  };

  struct ProjDeleter
  {
      void operator()( PJ *object ) const { proj_destroy( object ); }
  };

  using ProjContext = std::unique_ptr<PJ_CONTEXT, ProjContextDeleter>;
  using ProjObject = std::unique_ptr<PJ, ProjDeleter>;

  inline ProjContext makeProjContext()
  {
    ProjContext context( proj_context_create() );
    proj_log_level( context.get(), PJ_LOG_NONE );
    return context;
  }

} // namespace stillhead
