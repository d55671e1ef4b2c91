// SPDX-License-Identifier: GPL-2.0-or-later
// Menu, panel and provider of the desktop plugin. The dialog of an algorithm belongs to the Processing plugin, which
// is written in Python: it is asked through QGIS's Python runner, and where it is not running the user is told.
#include "plugin/plugin.h"

#include "plugin/panel/dock.h"
#include "plugin/plugininfo.h"
#include "processing/entrypoint.h"

#include <qgisinterface.h>
#include <qgsapplication.h>
#include <qgsmapcanvas.h>
#include <qgsmessagebar.h>
#include <qgsprocessingregistry.h>
#include <qgsproject.h>
#include <qgspythonrunner.h>

#include <QAction>
#include <QIcon>
#include <QMenu>

namespace stillhead
{

  namespace
  {

    //! True if the Processing plugin runs in this session, so that its dialogs can be opened.
    bool processingRuns()
    {
      QString answer;
      return QgsPythonRunner::isValid()
        && QgsPythonRunner::eval(
          QStringLiteral( "'processing' in __import__('qgis.utils').utils.active_plugins" ), answer )
        && answer == QLatin1String( "True" );
    }

  } // namespace

  Plugin::Plugin( QgisInterface *iface )
    : QgisPlugin( pluginName(), pluginDescription(), pluginCategory(), pluginVersion(), QgisPlugin::UI )
    , mIface( iface )
  {
  }

  void Plugin::initGui()
  {
    mAddedProvider = stillhead_register_provider();
    mMenu = mIface->pluginMenu()->addMenu( QIcon( pluginIcon() ), pluginName() );
    mMenu->setObjectName( QStringLiteral( "StillheadMenu" ) );
    addDock();
    addAlgorithmAction( tr( "New plan…" ), QStringLiteral( "stillhead:newplan" ) );
    addAlgorithmAction( tr( "Static pressure along pipes…" ), QStringLiteral( "stillhead:staticpressure" ) );
    addAlgorithmAction( tr( "Static pressure surface…" ), QStringLiteral( "stillhead:pressuresurface" ) );
  }

  void Plugin::addDock()
  {
    mDock = new Dock( mIface->mapCanvas(), QgsProject::instance() );
    mIface->addDockWidget( Qt::RightDockWidgetArea, mDock );
    QAction *panel = mMenu->addAction( QIcon( pluginIcon() ), tr( "&Panel" ) );
    panel->setObjectName( QStringLiteral( "StillheadPanel" ) );
    mDock->setToggleVisibilityAction( panel );
    mMenu->addSeparator();
  }

  void Plugin::unload()
  {
    if ( mDock )
      mIface->removeDockWidget( mDock );
    delete mDock;
    delete mMenu;
    if ( mAddedProvider )
      QgsApplication::processingRegistry()->removeProvider( QStringLiteral( "stillhead" ) );
    mAddedProvider = false;
  }

  void Plugin::addAlgorithmAction( const QString &text, const QString &algorithmId )
  {
    QAction *action = mMenu->addAction( QIcon( pluginIcon() ), text );
    action->setObjectName( algorithmId );
    connect( action, &QAction::triggered, this, [this, algorithmId] { openAlgorithmDialog( algorithmId ); } );
  }

  void Plugin::openAlgorithmDialog( const QString &algorithmId )
  {
    if ( processingRuns()
      && QgsPythonRunner::run(
        QStringLiteral( "import processing; processing.execAlgorithmDialog('%1')" ).arg( algorithmId ) ) )
      return;
    mIface->messageBar()->pushWarning( pluginName(),
      tr(
        "The Processing plugin is not running. Turn it on in Plugins ▸ Manage and Install Plugins, then try again." ) );
  }

} // namespace stillhead
