// SPDX-License-Identifier: GPL-2.0-or-later
// Draws the profile of a way: ground, pipe in the colours of its bands, the static levels of both cases, and the room
// between the limits in which pipe should lie.
#pragma once

#include "core/job/wayprofile.h"
#include "processing/solvedplan.h"

#include <qwt_plot.h>

#include <functional>
#include <vector>

class QwtPlotMarker;

namespace stillhead
{

  class ProfilePlot : public QwtPlot
  {
      Q_OBJECT

    public:
      explicit ProfilePlot( QWidget *parent );

      //! Shows the profile; \a points in the order of the way. An empty one clears the plot.
      void showProfile( const std::vector<WayPoint> &points, const SolvedPlan *plan );

      //! Marks a distance, in the length unit; nothing for NaN.
      void mark( double distance );

    signals:
      //! The cursor points at the point number \a point, −1 for none.
      void pointed( int point );

    private:
      void addCurve( const QString &title, const QPen &pen, const std::vector<WayPoint> &points,
        const std::function<double( const WayPoint & )> &elevation );
      void addRoom( const std::vector<WayPoint> &points, const DisplayUnits &units );
      void addPipe( const std::vector<WayPoint> &points, const SolvedPlan &plan );
      void point( const QPoint &pixel );
      bool eventFilter( QObject *watched, QEvent *event ) override;

      std::vector<double> mDistances; //!< in the length unit
      QwtPlotMarker *mMark = nullptr; //!< owned by the plot
  };

} // namespace stillhead
