// SPDX-License-Identifier: GPL-2.0-or-later
// The desktop plugin: registers the Processing provider, puts the Stillhead menu and the panel into QGIS. Whatever it
// adds in initGui() it takes away in unload(), and nothing that another added.
#pragma once

#include <qgisplugin.h>

#include <QObject>
#include <QPointer>

class QgisInterface;
class QMenu;

namespace stillhead
{

  class Dock;
  class ResultsDock;

  class Plugin : public QObject, public QgisPlugin
  {
      Q_OBJECT

    public:
      explicit Plugin( QgisInterface *iface );

      void initGui() override;
      void unload() override;

    private:
      void addDocks();
      void addAlgorithmAction( const QString &text, const QString &algorithmId );
      void openAlgorithmDialog( const QString &algorithmId );

      QgisInterface *mIface = nullptr;
      QPointer<QMenu> mMenu; //!< owns its actions; QGIS may delete it first when it closes
      QPointer<Dock> mDock;  //!< so may the panel
      QPointer<ResultsDock> mResults;
      bool mAddedProvider = false;
  };

} // namespace stillhead
