// SPDX-License-Identifier: GPL-2.0-or-later
// The answer, pinned above everything else: one sentence, or the next step while there is no answer yet.
#pragma once

#include <QWidget>

class QLabel;
class QToolButton;

namespace stillhead
{

  class Preview;

  class AnswerBar : public QWidget
  {
      Q_OBJECT

    public:
      AnswerBar( const Preview &preview, QWidget *parent );

      //! The sentence that is shown.
      QString text() const;

    signals:
      //! The user wants the results as layers.
      void saveWanted();

    private:
      void follow();
      void copy() const;

      const Preview &mPreview;
      QLabel *mAnswer;
      QLabel *mState;
      QToolButton *mCopy;
      QToolButton *mSave;
  };

} // namespace stillhead
