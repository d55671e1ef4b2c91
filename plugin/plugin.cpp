// SPDX-License-Identifier: GPL-2.0-or-later
// Menu, panel and provider of the desktop plugin. The dialog of an algorithm belongs to the Processing plugin, which
// is written in Python: it is asked through QGIS's Python runner, and where it is not running the user is told.
#include "plugin/plugin.h"

#include "plugin/panel/dock.h"
#include "plugin/plugininfo.h"
#include "plugin/profile/profiletab.h"
#include "plugin/results/resultsdock.h"
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
    addDocks();
    addAlgorithmAction( tr( "New plan…" ), QStringLiteral( "stillhead:newplan" ) );
    addAlgorithmAction( tr( "Static pressure along pipes…" ), QStringLiteral( "stillhead:staticpressure" ) );
    addAlgorithmAction( tr( "Static pressure surface…" ), QStringLiteral( "stillhead:pressuresurface" ) );
  }

  void Plugin::addDocks()
  {
    mDock = new Dock( mIface->mapCanvas(), QgsProject::instance() );
    mIface->addDockWidget( Qt::RightDockWidgetArea, mDock );
    mResults = new ResultsDock( mDock->preview(), mIface->mapCanvas(), mIface->messageBar() );
    auto *profile = new ProfileTab( mDock->preview(), mDock->inquiry(), mIface->mapCanvas(), mResults );
    mResults->addTab( profile, tr( "P&rofile" ) );
    connect( mDock, &Dock::said, mResults, &ResultsDock::say );
    connect( profile, &ProfileTab::said, mResults, &ResultsDock::say );
    mIface->addDockWidget( Qt::BottomDockWidgetArea, mResults );
    // Until the user asks for it, QGIS looks as it did before.
    mDock->setUserVisible( false );
    mResults->setUserVisible( false );
    const auto addToggle = [this]( QgsDockWidget *dock, const QString &text, const QString &name ) {
      QAction *toggle = mMenu->addAction( QIcon( pluginIcon() ), text );
      toggle->setObjectName( name );
      toggle->setCheckable( true );
      dock->setToggleVisibilityAction( toggle );
    };
    addToggle( mDock, tr( "&Panel" ), QStringLiteral( "StillheadPanel" ) );
    addToggle( mResults, tr( "&Results" ), QStringLiteral( "StillheadResults" ) );
    mMenu->addSeparator();
  }

  void Plugin::unload()
  {
    // The results look at the panel's preview, so they go first.
    if ( mResults )
      mIface->removeDockWidget( mResults );
    delete mResults;
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
