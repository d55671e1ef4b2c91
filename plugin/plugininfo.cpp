// SPDX-License-Identifier: GPL-2.0-or-later
// Name, description and icon of the plugin; the icon is the provider's own.
#include "plugin/plugininfo.h"

#include "core/version.h"

#include <QCoreApplication>

namespace stillhead
{

  QString pluginName()
  {
    return QStringLiteral( "Stillhead" );
  }

  QString pluginDescription()
  {
    return QCoreApplication::translate( "stillhead::Plugin", "Static pressure along irrigation pipe on sloped ground" );
  }

  QString pluginCategory()
  {
    return QCoreApplication::translate( "stillhead::Plugin", "Analysis" );
  }

  QString pluginVersion()
  {
    return QString::fromLatin1( versionText() );
  }

  QString pluginIcon()
  {
    return QStringLiteral( ":/stillhead/stillhead.svg" );
  }

} // namespace stillhead
