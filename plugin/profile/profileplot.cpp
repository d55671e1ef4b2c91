// SPDX-License-Identifier: GPL-2.0-or-later
// Elevations are shown in the chosen unit; where there are none a curve has a gap.
#include "plugin/profile/profileplot.h"

#include "processing/styles/palette.h"

#include <qwt_legend.h>
#include <qwt_plot_canvas.h>
#include <qwt_plot_curve.h>
#include <qwt_plot_grid.h>
#include <qwt_plot_intervalcurve.h>
#include <qwt_plot_marker.h>
#include <qwt_scale_map.h>
#include <qwt_text.h>

#include <QMouseEvent>

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    //! Runs of samples without gap.
    QVector<QVector<QPointF>> runsOf( const QVector<QPointF> &samples )
    {
      QVector<QVector<QPointF>> runs;
      bool isGap = true;
      for ( const QPointF &sample : samples )
      {
        if ( std::isnan( sample.y() ) )
        {
          isGap = true;
          continue;
        }
        if ( isGap )
          runs << QVector<QPointF>();
        isGap = false;
        runs.last() << sample;
      }
      return runs;
    }

  } // namespace

  ProfilePlot::ProfilePlot( QWidget *parent )
    : QwtPlot( parent )
  {
    setObjectName( QStringLiteral( "StillheadProfile" ) );
    setAutoDelete( true );
    // Colours of the desktop's theme, dark ones included.
    setCanvasBackground( palette().base() );
    auto *frame = qobject_cast<QwtPlotCanvas *>( canvas() );
    if ( frame )
      frame->setFrameStyle( QFrame::NoFrame );
    insertLegend( new QwtLegend(), QwtPlot::RightLegend );
    canvas()->setMouseTracking( true );
    canvas()->installEventFilter( this );
    setMinimumHeight( 120 );
  }

  void ProfilePlot::showProfile( const std::vector<WayPoint> &points, const SolvedPlan *plan )
  {
    detachItems( QwtPlotItem::Rtti_PlotItem, true );
    mDistances.clear();
    mMark = new QwtPlotMarker();
    mMark->setLineStyle( QwtPlotMarker::VLine );
    mMark->setLinePen( palette().color( QPalette::Text ), 1.0, Qt::DotLine );
    mMark->setVisible( false );
    mMark->attach( this );
    if ( points.empty() || !plan )
    {
      replot();
      return;
    }
    auto *grid = new QwtPlotGrid();
    grid->setPen( palette().color( QPalette::Midlight ), 0.5 );
    grid->attach( this );
    const DisplayUnits &units = plan->units;
    for ( const WayPoint &point : points )
      mDistances.push_back( units.length( point.distanceM ) );
    setAxisTitle( QwtPlot::xBottom, tr( "Along the way from the source, %1" ).arg( units.lengthName() ) );
    setAxisTitle( QwtPlot::yLeft, tr( "Elevation, %1" ).arg( units.lengthName() ) );

    const QColor text = palette().color( QPalette::Text );
    addRoom( points, units );
    addCurve( tr( "ground" ), QPen( QColor( 0x8a, 0x6d, 0x3b ), 1.5 ), points,
      [&units]( const WayPoint &point ) { return units.length( point.figures.groundM ); } );
    addCurve( tr( "static level, night and winter" ), QPen( text, 1.2 ), points,
      [&units]( const WayPoint &point ) { return units.length( point.figures.levels.highM ); } );
    addCurve( tr( "static level, summer peak" ), QPen( text, 1.2, Qt::DashLine ), points,
      [&units]( const WayPoint &point ) { return units.length( point.figures.levels.lowM ); } );
    addPipe( points, *plan );
    replot();
  }

  void ProfilePlot::addCurve( const QString &title, const QPen &pen, const std::vector<WayPoint> &points,
    const std::function<double( const WayPoint & )> &elevation )
  {
    QVector<QPointF> samples;
    for ( std::size_t i = 0; i < points.size(); ++i )
      samples << QPointF( mDistances[i], elevation( points[i] ) );
    bool isFirst = true;
    for ( const QVector<QPointF> &run : runsOf( samples ) )
    {
      auto *curve = new QwtPlotCurve( title );
      curve->setItemAttribute( QwtPlotItem::Legend, isFirst );
      curve->setRenderHint( QwtPlotItem::RenderAntialiased );
      curve->setPen( pen );
      curve->setSamples( run );
      curve->attach( this );
      isFirst = false;
    }
  }

  void ProfilePlot::addRoom( const std::vector<WayPoint> &points, const DisplayUnits &units )
  {
    QVector<QwtIntervalSample> samples;
    for ( std::size_t i = 0; i < points.size(); ++i )
    {
      const double low = units.length( points[i].mostElevationM );
      const double high = units.length( points[i].leastElevationM );
      if ( low <= high )
        samples << QwtIntervalSample( mDistances[i], low, high );
    }
    auto *room = new QwtPlotIntervalCurve( tr( "within limits" ) );
    QColor shade = palette().color( QPalette::Highlight );
    shade.setAlpha( 40 );
    room->setBrush( shade );
    room->setPen( QPen( Qt::NoPen ) );
    room->setSamples( samples );
    room->attach( this );
  }

  void ProfilePlot::addPipe( const std::vector<WayPoint> &points, const SolvedPlan &plan )
  {
    const QVector<QColor> colors = bandColors( plan.style.bandCount() );
    bool isFirst = true;
    for ( std::size_t from = 0; from + 1 < points.size(); )
    {
      // Pipe of one piece is one curve.
      std::size_t to = from + 1;
      while ( to + 1 < points.size() && points[to].figures.piece == points[from].figures.piece )
        ++to;
      const int piece = points[from].figures.piece;
      const int band = piece < 0 ? -1 : plan.result.pieces[static_cast<std::size_t>( piece )].band;
      QVector<QPointF> samples;
      for ( std::size_t i = from; i <= to; ++i )
        samples << QPointF( mDistances[i], plan.units.length( points[i].figures.pipeM ) );
      for ( const QVector<QPointF> &run : runsOf( samples ) )
      {
        auto *curve = new QwtPlotCurve( tr( "pipe, by band" ) );
        curve->setItemAttribute( QwtPlotItem::Legend, isFirst );
        curve->setRenderHint( QwtPlotItem::RenderAntialiased );
        curve->setPen( band < 0 ? edgeColor() : colors.at( std::min( band, colors.size() - 1 ) ), 4.0 );
        curve->setSamples( run );
        curve->attach( this );
        isFirst = false;
      }
      from = to;
    }
  }

  void ProfilePlot::mark( double distance )
  {
    const bool isShown = !std::isnan( distance ) && !mDistances.empty();
    if ( isShown )
      mMark->setXValue( distance );
    if ( isShown || mMark->isVisible() )
    {
      mMark->setVisible( isShown );
      replot();
    }
  }

  void ProfilePlot::point( const QPoint &pixel )
  {
    if ( mDistances.empty() )
      return;
    const double distance = invTransform( QwtPlot::xBottom, pixel.x() );
    const auto after = std::lower_bound( mDistances.begin(), mDistances.end(), distance );
    const std::ptrdiff_t index =
      std::min<std::ptrdiff_t>( after - mDistances.begin(), static_cast<std::ptrdiff_t>( mDistances.size() ) - 1 );
    mark( mDistances[static_cast<std::size_t>( index )] );
    emit pointed( static_cast<int>( index ) );
  }

  bool ProfilePlot::eventFilter( QObject *watched, QEvent *event )
  {
    if ( watched == canvas() && event->type() == QEvent::MouseMove )
      point( static_cast<QMouseEvent *>( event )->pos() );
    if ( watched == canvas() && event->type() == QEvent::Leave )
    {
      mark( std::nan( "" ) );
      emit pointed( -1 );
    }
    return QwtPlot::eventFilter( watched, event );
  }

} // namespace stillhead
