// SPDX-License-Identifier: GPL-2.0-or-later
// A few words beside the cursor, over the map. It takes no focus and no mouse.
#pragma once

#include <QLabel>
#include <QPointer>

class QgsMapCanvas;

namespace stillhead
{

  class ReadOut
  {
    public:
      explicit ReadOut( QgsMapCanvas *canvas );
      ~ReadOut();
      ReadOut( const ReadOut & ) = delete;
      ReadOut &operator=( const ReadOut & ) = delete;

      //! Shows \a text beside \a place (canvas pixels), within the canvas; blank hides.
      void show( const QString &text, const QPoint &place );
      void hide();

      //! What is shown; blank while hidden.
      QString text() const;

    private:
      QgsMapCanvas *mCanvas;
      QPointer<QLabel> mLabel; //!< the canvas owns it and may go first
  };

} // namespace stillhead
