// SPDX-License-Identifier: GPL-2.0-or-later
// A preview's computation as one of QGIS's background tasks.
#pragma once

#include "plugin/preview/previewwork.h"

#include <qgstaskmanager.h>

namespace stillhead
{

  class PreviewTask : public QgsTask
  {
      Q_OBJECT

    public:
      explicit PreviewTask( std::unique_ptr<PreviewWork> work );

      void cancel() override;

      //! Null where the work failed or was cancelled.
      const PreviewResultPointer &result() const { return mResult; }

      //! Why it failed, as a sentence; blank where it was cancelled.
      const QString &problem() const { return mProblem; }

    signals:
      //! The work is over, in one way or another; main thread.
      void over();

    protected:
      bool run() override;
      void finished( bool result ) override;

    private:
      std::unique_ptr<PreviewWork> mWork;
      PreviewResultPointer mResult;
      QString mProblem;
  };

} // namespace stillhead
