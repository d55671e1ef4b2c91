// SPDX-License-Identifier: GPL-2.0-or-later
// The profile along the way from the source to a clicked place: plot, link with the map, and what can be saved of it.
#pragma once

#include "core/job/wayprofile.h"
#include "plugin/preview/previewwork.h"

#include <QPointer>
#include <QWidget>

#include <memory>
#include <optional>

class QgsMapCanvas;
class QgsMapToolEmitPoint;
class QgsRubberBand;
class QgsVertexMarker;
class QLabel;
class QToolButton;

namespace stillhead
{

  class Inquiry;
  class Preview;
  class ProfilePlot;

  class ProfileTab : public QWidget
  {
      Q_OBJECT

    public:
      ProfileTab( Preview &preview, Inquiry &inquiry, QgsMapCanvas *canvas, QWidget *parent );
      ~ProfileTab() override;

      //! Shows the way to the pipe at \a place of the map.
      void showWayTo( const QgsPointXY &place );

      const std::vector<WayPoint> &points() const { return mPoints; }

      //! The profile as CSV: distance, elevations and pressures in the chosen units.
      QString csv() const;

      //! Writes a picture or CSV, by the ending of \a path. \returns an error text, blank when all is well
      QString save( const QString &path ) const;

    signals:
      void said( const QString &text, bool isProblem );

    private:
      void follow();
      void rebuild();
      void clear( const QString &why );
      void point( int index );
      void markHovered( const std::optional<PlaceOnLine> &on );
      void drawWay();
      void pick( bool wanted );
      void askForFile();

      Preview &mPreview;
      Inquiry &mInquiry;
      QPointer<QgsMapCanvas> mCanvas;
      ProfilePlot *mPlot;
      QLabel *mWords;
      QToolButton *mPick;
      std::unique_ptr<QgsMapToolEmitPoint> mTool;
      std::unique_ptr<QgsRubberBand> mWay;
      std::unique_ptr<QgsVertexMarker> mMarker;
      PreviewResultPointer mShown;
      std::optional<QgsPointXY> mPlace; //!< of the map
      std::vector<WayPoint> mPoints;
  };

} // namespace stillhead
