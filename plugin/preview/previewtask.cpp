// SPDX-License-Identifier: GPL-2.0-or-later
// Nothing is thrown out of a task: QGIS would end with it.
#include "plugin/preview/previewtask.h"

#include "processing/qgiscompat.h"

#include <qgsexception.h>

namespace stillhead
{

  PreviewTask::PreviewTask( std::unique_ptr<PreviewWork> work )
    : QgsTask( tr( "Static pressure preview" ), compat::quietTaskFlags() )
    , mWork( std::move( work ) )
  {
  }

  void PreviewTask::cancel()
  {
    mWork->cancel();
    QgsTask::cancel();
  }

  bool PreviewTask::run()
  {
    try
    {
      mResult = mWork->run();
    }
    catch ( const QgsException &e )
    {
      mProblem = e.what();
    }
    catch ( const std::exception &e )
    {
      mProblem = QString::fromUtf8( e.what() );
    }
    return mResult != nullptr;
  }

  void PreviewTask::finished( bool )
  {
    emit over();
  }

} // namespace stillhead
