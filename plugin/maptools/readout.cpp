// SPDX-License-Identifier: GPL-2.0-or-later
// Colours of tool tips, which the desktop's theme keeps readable over anything.
#include "plugin/maptools/readout.h"

#include <qgsmapcanvas.h>

#include <QToolTip>

#include <algorithm>

namespace stillhead
{

  namespace
  {

    constexpr int GAP_PIXELS = 16;

  } // namespace

  ReadOut::ReadOut( QgsMapCanvas *canvas )
    : mCanvas( canvas )
    , mLabel( new QLabel( canvas ) )
  {
    mLabel->setObjectName( QStringLiteral( "StillheadReadOut" ) );
    mLabel->setAttribute( Qt::WA_TransparentForMouseEvents );
    mLabel->setFocusPolicy( Qt::NoFocus );
    mLabel->setAutoFillBackground( true );
    mLabel->setPalette( QToolTip::palette() );
    mLabel->setBackgroundRole( QPalette::ToolTipBase );
    mLabel->setForegroundRole( QPalette::ToolTipText );
    mLabel->setFrameShape( QFrame::Box );
    mLabel->setMargin( 4 );
    mLabel->hide();
  }

  ReadOut::~ReadOut()
  {
    delete mLabel;
  }

  void ReadOut::show( const QString &text, const QPoint &place )
  {
    if ( !mLabel || text.isEmpty() )
    {
      hide();
      return;
    }
    mLabel->setText( text );
    mLabel->adjustSize();
    // On the other side of the cursor where there is no room.
    const auto side = []( int at, int size, int room ) {
      const int after = at + GAP_PIXELS;
      return after + size <= room ? after : std::max( 0, at - GAP_PIXELS - size );
    };
    mLabel->move(
      side( place.x(), mLabel->width(), mCanvas->width() ), side( place.y(), mLabel->height(), mCanvas->height() ) );
    mLabel->show();
    mLabel->raise();
  }

  void ReadOut::hide()
  {
    if ( mLabel )
      mLabel->hide();
  }

  QString ReadOut::text() const
  {
    return mLabel && mLabel->isVisibleTo( mCanvas ) ? mLabel->text() : QString();
  }

} // namespace stillhead
