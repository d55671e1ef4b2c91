// SPDX-License-Identifier: GPL-2.0-or-later
// The C functions by which QGIS asks a native plugin who it is, makes it and takes it down. QGIS keeps the
// pointers to the texts, so they live as long as the module.
#include "plugin/plugin.h"
#include "plugin/plugininfo.h"

#include <qgis.h>

QGISEXTERN const QString *name()
{
  static const QString text = stillhead::pluginName();
  return &text;
}

QGISEXTERN const QString *description()
{
  static const QString text = stillhead::pluginDescription();
  return &text;
}

QGISEXTERN const QString *category()
{
  static const QString text = stillhead::pluginCategory();
  return &text;
}

QGISEXTERN int type()
{
  return QgisPlugin::UI;
}

QGISEXTERN const QString *version()
{
  static const QString text = stillhead::pluginVersion();
  return &text;
}

QGISEXTERN const QString *icon()
{
  static const QString text = stillhead::pluginIcon();
  return &text;
}

QGISEXTERN QgisPlugin *classFactory( QgisInterface *iface )
{
  return new stillhead::Plugin( iface );
}

QGISEXTERN void unload( QgisPlugin *plugin )
{
  delete plugin;
}
