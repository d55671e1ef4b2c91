// SPDX-License-Identifier: GPL-2.0-or-later
// The one C entry point of the provider's library. The desktop plugin and the headless Python package
// both call it; whichever comes first adds the provider, and only that one removes it.
#pragma once

#include "processing/export.h"

extern "C"
{
  /**
   * Adds the provider to the application's Processing registry unless one with its id is there already.
   * Call it on the main thread. Returns true if this call added it: the caller then removes it when it unloads.
   */
  STILLHEAD_EXPORT bool stillhead_register_provider();
}
