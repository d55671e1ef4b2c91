// SPDX-License-Identifier: GPL-2.0-or-later
// The styled map against a control image: every band, state and mark as it shall look on paper. Where the look is meant
// to change, look at the new picture (it is left in the build folder) and put it in the control image's place.
#include "tests/support/processingrun.h"
#include "tests/support/stylesample.h"

#include <qgsmaprenderersequentialjob.h>
#include <qgsmapsettings.h>

#include <QDir>
#include <QImage>

using namespace stillhead;
using namespace stillhead::test;

class TestStyledMap : public QObject
{
    Q_OBJECT

  private slots:
    void looksLikeTheControlImage();
    void pipeIsNeverCovered();

  private:
    QImage render( const QList<QgsMapLayer *> &layers ) const;

    StyleSample mSample;
};

namespace
{

  // Half a millimetre of ground is a pixel: 4.7 pixels in a millimetre of paper.
  constexpr double DPI = 120.0;
  const QgsRectangle EXTENT( -8, -8, 130, 100 );

  //! Of the pixels that are not white in both, the share of which some channel differs by more than \a allowed.
  double shareDifferent( const QImage &a, const QImage &b, int allowed )
  {
    const QRgb white = qRgb( 255, 255, 255 );
    int drawn = 0;
    int different = 0;
    for ( int y = 0; y < a.height(); ++y )
    {
      for ( int x = 0; x < a.width(); ++x )
      {
        const QRgb p = a.pixel( x, y );
        const QRgb q = b.pixel( x, y );
        if ( p == white && q == white )
          continue;
        ++drawn;
        const int most = qMax(
          qAbs( qRed( p ) - qRed( q ) ), qMax( qAbs( qGreen( p ) - qGreen( q ) ), qAbs( qBlue( p ) - qBlue( q ) ) ) );
        different += most > allowed ? 1 : 0;
      }
    }
    return static_cast<double>( different ) / drawn;
  }

} // namespace

QImage TestStyledMap::render( const QList<QgsMapLayer *> &layers ) const
{
  QgsMapSettings settings;
  settings.setLayers( layers );
  settings.setDestinationCrs( QgsCoordinateReferenceSystem( QStringLiteral( "EPSG:32631" ) ) );
  settings.setOutputDpi( DPI );
  settings.setOutputSize( QSize( 828, 648 ) );
  settings.setExtent( EXTENT );
  settings.setBackgroundColor( Qt::white );
  // Letters differ between versions of the font library.
  settings.setFlag( Qgis::MapSettingsFlag::DrawLabeling, false );
  QgsMapRendererSequentialJob job( settings );
  job.start();
  job.waitForFinished();
  return job.renderedImage().convertToFormat( QImage::Format_RGB32 );
}

void TestStyledMap::looksLikeTheControlImage()
{
  const LayerPointer spans = mSample.spans();
  const LayerPointer nodes = mSample.nodes();
  const LayerPointer findings = mSample.findings();
  const LayerPointer extremes = mSample.extremes();
  const LayerPointer stretches = mSample.stretches();
  const LayerPointer limits = mSample.groundLimits();
  styleResult( *spans, ResultLayer::Spans, mSample.style() );
  styleResult( *nodes, ResultLayer::Nodes, mSample.style() );
  styleResult( *findings, ResultLayer::Findings, mSample.style() );
  styleResult( *extremes, ResultLayer::Extremes, mSample.style() );
  styleResult( *stretches, ResultLayer::Stretches, mSample.style() );
  styleResult( *limits, ResultLayer::GroundLimits, mSample.style() );
  const QImage image =
    render( { extremes.get(), findings.get(), nodes.get(), spans.get(), limits.get(), stretches.get() } );

  const QString left =
    QDir( QStringLiteral( STILLHEAD_BINARY_DIR ) ).filePath( QStringLiteral( "tests/styledmap.png" ) );
  QVERIFY( image.save( left ) );
  const QImage control( QStringLiteral( STILLHEAD_SOURCE_DIR "/tests/processing/styles/styledmap.png" ) );
  QVERIFY2( !control.isNull(), "the control image does not open" );
  QCOMPARE( image.size(), control.size() );
  // Edges may be smoothed a little differently from one version to the next; one kind of mark lost is more than that.
  const double share = shareDifferent( image, control.convertToFormat( QImage::Format_RGB32 ), 24 );
  QVERIFY2( share < 0.01, qPrintable( QStringLiteral( "%1: %2 differs" ).arg( left ).arg( share ) ) );
}

// Where a wide dark casing crosses a pipe, the pipe line stays on top.
void TestStyledMap::pipeIsNeverCovered()
{
  const LayerPointer crossing =
    drawLayer( QStringLiteral( "LineString?crs=EPSG:32631&field=role:string&field=band:integer&"
                               "field=state:string&field=close_call:bool" ),
      { { QStringLiteral( "LINESTRING(0 50, 120 50)" ),
          { QStringLiteral( "mainline" ), 0, QStringLiteral( "within limits" ), false } },
        { QStringLiteral( "LINESTRING(60 0, 60 90)" ),
          { QStringLiteral( "lateral" ), 5, QStringLiteral( "within limits" ), false } } },
      QStringLiteral( "spans" ) );
  styleResult( *crossing, ResultLayer::Spans, mSample.style() );
  const QImage image = render( { crossing.get() } );
  const auto pixelAt = [&image]( double x, double y ) {
    return QColor( image.pixel( qRound( ( x - EXTENT.xMinimum() ) / EXTENT.width() * image.width() ),
      qRound( ( EXTENT.yMaximum() - y ) / EXTENT.height() * image.height() ) ) );
  };
  // On the mainline's middle, within the lateral's casing but beside its line: black, not the casing's dark blue.
  QVERIFY( lightness( pixelAt( 59.2, 50 ) ) < 5.0 );
  QCOMPARE( pixelAt( 59.2, 40 ).name(), mSample.colors().last().name() );
}

int main( int argc, char *argv[] )
{
  return runWithQgis<TestStyledMap>( argc, argv );
}

#include "teststyledmap.moc"
