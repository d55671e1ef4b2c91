// SPDX-License-Identifier: GPL-2.0-or-later
// What the plugin manager shows of the plugin, stated once for the entry points and the plugin itself.
#pragma once

#include <QString>

namespace stillhead
{

  QString pluginName();
  QString pluginDescription();
  QString pluginCategory();
  QString pluginVersion();
  QString pluginIcon();

} // namespace stillhead
