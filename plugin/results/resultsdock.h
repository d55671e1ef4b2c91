// SPDX-License-Identifier: GPL-2.0-or-later
// The lists below the map: worst places, stretches, findings. A click goes to the place and lets it flash.
#pragma once

#include "plugin/preview/previewwork.h"

#include <qgsdockwidget.h>

#include <QPointer>

class QgsMapCanvas;
class QgsMessageBar;
class QTabWidget;

namespace stillhead
{

  class Preview;
  class ResultTab;

  class ResultsDock : public QgsDockWidget
  {
      Q_OBJECT

    public:
      //! \param messages where news goes; may be null
      ResultsDock( Preview &preview, QgsMapCanvas *canvas, QgsMessageBar *messages, QWidget *parent = nullptr );

      //! Adds a further tab, which the dock takes over.
      void addTab( QWidget *tab, const QString &title );

      //! Says something in the message bar.
      void say( const QString &text, bool isProblem );

    private:
      ResultTab *addList( const QString &name );
      void follow();
      void fill();
      void goTo( const QgsGeometry &place );

      Preview &mPreview;
      QPointer<QgsMapCanvas> mCanvas;
      QPointer<QgsMessageBar> mMessages;
      QTabWidget *mTabs;
      ResultTab *mPlaces;
      ResultTab *mStretches;
      ResultTab *mFindings;
      PreviewResultPointer mShown;
      bool mIsOpen = false;
  };

} // namespace stillhead
