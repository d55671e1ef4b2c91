// SPDX-License-Identifier: GPL-2.0-or-later
// One computation at a time: what changes meanwhile is computed as soon as the one under way has ended.
#include "plugin/preview/preview.h"

#include "plugin/preview/previewtask.h"

#include <qgsapplication.h>
#include <qgsexception.h>
#include <qgsproject.h>

namespace stillhead
{

  namespace
  {

    //! Long enough to gather the signals of one edit, too short to be noticed.
    constexpr int DELAY_MS = 40;

  } // namespace

  Preview::Preview( QgsProject *project, QObject *parent )
    : QObject( parent )
    , mProject( project )
  {
    mDelay.setSingleShot( true );
    mDelay.setInterval( DELAY_MS );
    connect( &mDelay, &QTimer::timeout, this, &Preview::begin );
    connect( &mWatch, &LayerWatch::changed, this, [this] { schedule( Urgency::StopWork ); } );
    connect( mProject, &QgsProject::transformContextChanged, this, [this] { schedule( Urgency::StopWork ); } );
  }

  Preview::~Preview()
  {
    stopWork();
  }

  bool Preview::isComputing() const
  {
    return !mTask.isNull();
  }

  void Preview::stopWork()
  {
    mDelay.stop();
    mAgain = false;
    if ( !mTask )
      return;
    mTask->disconnect( this );
    mTask->cancel();
    mTask->waitForFinished();
    mTask.clear();
  }

  void Preview::setInput( const PreviewInput &input )
  {
    mInput = input;
    mWatch.watch( { mInput.mains, mInput.laterals }, mInput.terrain );
    schedule( Urgency::StopWork );
  }

  void Preview::setSketch( const std::optional<SketchedLine> &sketch )
  {
    if ( !sketch && !mInput.sketch )
      return;
    mInput.sketch = sketch;
    schedule( Urgency::FinishFirst );
  }

  void Preview::setActive( bool active )
  {
    if ( mActive == active )
      return;
    mActive = active;
    if ( mActive )
    {
      schedule( Urgency::StopWork );
      return;
    }
    stopWork();
    mTerrains.forget();
    showReason( QString() );
  }

  void Preview::schedule( Urgency urgency )
  {
    if ( !mActive )
      return;
    if ( mTask && urgency == Urgency::StopWork )
      mTask->cancel();
    const bool newlyStale = !mStale;
    mStale = true;
    // Not put off by every further change, or nothing would show while a line is being drawn.
    if ( !mDelay.isActive() )
      mDelay.start();
    if ( newlyStale )
      emit changed();
  }

  void Preview::begin()
  {
    if ( mTask )
    {
      mAgain = true;
      return;
    }
    const QString missing = mInput.missing();
    if ( !missing.isEmpty() )
    {
      showReason( missing );
      return;
    }
    try
    {
      auto work = std::make_unique<PreviewWork>( mInput, mProject->transformContext(), mTerrains );
      mTask = new PreviewTask( std::move( work ) );
    }
    catch ( const QgsException &e )
    {
      showReason( e.what() );
      return;
    }
    connect( mTask, &PreviewTask::over, this, [this, task = mTask.data()] { take( task ); } );
    QgsApplication::taskManager()->addTask( mTask );
    emit changed();
  }

  void Preview::take( PreviewTask *task )
  {
    mTask.clear();
    const bool again = mAgain || mDelay.isActive();
    mAgain = false;
    if ( task->result() )
    {
      mResult = task->result();
      mReason.clear();
      mStale = again;
      emit changed();
    }
    else if ( !task->problem().isEmpty() && !again )
    {
      showReason( task->problem() );
    }
    if ( again && !mDelay.isActive() )
      begin();
  }

  void Preview::showReason( const QString &reason )
  {
    mResult.reset();
    mReason = reason;
    mStale = false;
    emit changed();
  }

} // namespace stillhead
