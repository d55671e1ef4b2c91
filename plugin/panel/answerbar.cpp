// SPDX-License-Identifier: GPL-2.0-or-later
// While the answer is older than the drawing it is greyed and marked, never taken away.
#include "plugin/panel/answerbar.h"

#include "plugin/panel/answertext.h"
#include "plugin/preview/preview.h"
#include "processing/text/cautions.h"

#include <qgsapplication.h>

#include <QClipboard>
#include <QGridLayout>
#include <QLabel>
#include <QToolButton>

namespace stillhead
{

  AnswerBar::AnswerBar( const Preview &preview, QWidget *parent )
    : QWidget( parent )
    , mPreview( preview )
    , mAnswer( new QLabel( this ) )
    , mState( new QLabel( this ) )
    , mCopy( new QToolButton( this ) )
    , mSave( new QToolButton( this ) )
  {
    mAnswer->setObjectName( QStringLiteral( "StillheadAnswer" ) );
    mAnswer->setWordWrap( true );
    mAnswer->setTextInteractionFlags( Qt::TextSelectableByMouse );
    QFont strong = mAnswer->font();
    strong.setBold( true );
    mAnswer->setFont( strong );
    mState->setObjectName( QStringLiteral( "StillheadState" ) );
    mState->setWordWrap( true );
    mCopy->setIcon( QgsApplication::getThemeIcon( QStringLiteral( "/mActionEditCopy.svg" ) ) );
    mCopy->setToolTip( tr( "Copy the summary with its figures and cautions" ) );
    mCopy->setAccessibleName( tr( "Copy the summary" ) );
    mCopy->setAutoRaise( true );
    connect( mCopy, &QToolButton::clicked, this, &AnswerBar::copy );

    mSave->setObjectName( QStringLiteral( "StillheadSave" ) );
    mSave->setIcon( QgsApplication::getThemeIcon( QStringLiteral( "/mActionFileSave.svg" ) ) );
    mSave->setToolTip( tr( "Save the results as layers of the project" ) );
    mSave->setAccessibleName( tr( "Save the results" ) );
    mSave->setAutoRaise( true );
    connect( mSave, &QToolButton::clicked, this, &AnswerBar::saveWanted );

    auto *grid = new QGridLayout( this );
    grid->setColumnStretch( 0, 1 );
    grid->addWidget( mAnswer, 0, 0 );
    grid->addWidget( mCopy, 0, 1, Qt::AlignTop );
    grid->addWidget( mSave, 0, 2, Qt::AlignTop );
    grid->addWidget( mState, 1, 0, 1, 3 );
    connect( &mPreview, &Preview::changed, this, &AnswerBar::follow );
    follow();
  }

  QString AnswerBar::text() const
  {
    return mAnswer->text();
  }

  void AnswerBar::follow()
  {
    const PreviewResultPointer &result = mPreview.result();
    mAnswer->setText( result ? answerText( result->plan ) : mPreview.reason() );
    mAnswer->setToolTip(
      result ? QStringLiteral( "<p>%1</p>" ).arg( runningWaterCaution().toHtmlEscaped() ) : QString() );
    mAnswer->setEnabled( !mPreview.isStale() );
    mCopy->setEnabled( result && !mPreview.isStale() );
    mSave->setEnabled( mCopy->isEnabled() );
    QString state;
    if ( mPreview.isStale() )
      state = tr( "Computing…" );
    else if ( result && !result->plan.result.findings.empty() )
      state = tr( "%n findings", nullptr, static_cast<int>( result->plan.result.findings.size() ) );
    mState->setText( state );
  }

  void AnswerBar::copy() const
  {
    if ( mPreview.result() )
      QgsApplication::clipboard()->setText( mPreview.result()->summary );
  }

} // namespace stillhead
