// SPDX-License-Identifier: GPL-2.0-or-later
// Pressures that follow the drawing: whatever changes, they are computed anew in the background a moment later. It has
// no widgets; panel, map, lists and profile all show its one result.
#pragma once

#include "plugin/preview/layerwatch.h"
#include "plugin/preview/previewinput.h"
#include "plugin/preview/previewwork.h"

#include <QObject>
#include <QPointer>
#include <QTimer>

class QgsProject;

namespace stillhead
{

  class PreviewTask;

  class Preview : public QObject
  {
      Q_OBJECT

    public:
      explicit Preview( QgsProject *project, QObject *parent = nullptr );

      //! Stops work under way and waits for it.
      ~Preview() override;

      const PreviewInput &input() const { return mInput; }

      //! Computes from \a input from now on.
      void setInput( const PreviewInput &input );

      //! A line that is being drawn, to be counted as pipe; nothing when it is finished or given up.
      void setSketch( const std::optional<SketchedLine> &sketch );

      //! An inactive preview drops its result and computes nothing.
      void setActive( bool active );
      bool isActive() const { return mActive; }

      //! The latest result; null before the first one and where there can be none.
      const PreviewResultPointer &result() const { return mResult; }

      //! True while the result is older than what it should show.
      bool isStale() const { return mStale; }

      bool isComputing() const;

      //! Why there is no result: the next step for the user, or what went wrong. Blank otherwise.
      const QString &reason() const { return mReason; }

    signals:
      //! Result, reason or staleness have changed.
      void changed();

    private:
      enum class Urgency
      {
        FinishFirst, //!< work under way is still worth showing
        StopWork     //!< what is under way is out of date
      };

      void schedule( Urgency urgency );
      void begin();
      void take( PreviewTask *task );
      void showReason( const QString &reason );
      void stopWork();

      QgsProject *mProject;
      PreviewInput mInput;
      LayerWatch mWatch;
      TerrainKeeper mTerrains;
      QTimer mDelay;
      QPointer<PreviewTask> mTask;
      PreviewResultPointer mResult;
      QString mReason;
      bool mActive = false;
      bool mStale = false;
      bool mAgain = false; //!< something changed since the task under way began
  };

} // namespace stillhead
