// SPDX-License-Identifier: GPL-2.0-or-later
// Marks the few names that leave the provider's shared library; everything else stays hidden.
#pragma once

#define STILLHEAD_EXPORT __attribute__( ( visibility( "default" ) ) )
