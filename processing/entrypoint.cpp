// SPDX-License-Identifier: GPL-2.0-or-later
// Registers the provider once: the registry is asked by id first, so two callers never add two.
#include "processing/entrypoint.h"

#include "processing/provider.h"

#include <qgsapplication.h>
#include <qgsprocessingregistry.h>

bool stillhead_register_provider()
{
  QgsProcessingRegistry *registry = QgsApplication::processingRegistry();
  if ( registry->providerById( stillhead::Provider::providerId() ) )
    return false;
  // The registry takes ownership, also when it refuses.
  return registry->addProvider( new stillhead::Provider() );
}
