// SPDX-License-Identifier: GPL-2.0-or-later
// While one batch of rows is written the next is made on the other threads: writing is bound to one.
#include "processing/writing/outputset.h"

#include "core/feedback/parallel.h"
#include "processing/feedbackmonitor.h"
#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsfeaturesink.h>

#include <algorithm>
#include <future>

namespace stillhead
{

  namespace
  {

    constexpr std::size_t BATCH_ROWS = 4096;
    constexpr int SPOOL_ROWS = 256; //!< rows that may be great polygons

    QgsFeatureList makeBatch( const ResultTable &table, std::size_t first, Monitor &monitor )
    {
      const std::size_t count = std::min( BATCH_ROWS, table.rows - first );
      std::vector<QgsFeature> features( count );
      parallelRanges( count, 64, 0, monitor, 0.0, 0.0, [&]( std::size_t from, std::size_t to, unsigned ) {
        table.make( first + from, first + to, features.data() + from );
      } );
      QgsFeatureList list;
      list.reserve( static_cast<int>( count ) );
      for ( QgsFeature &feature : features )
        list.append( std::move( feature ) );
      return list;
    }

    [[noreturn]] void refuseWrite( const QString &output, const QString &destination )
    {
      throw QgsProcessingException(
        Text::tr( "%1 could not be written to %2; check that the place has room and that nobody else holds it open." )
          .arg( output, destination ) );
    }

    void writeRows( const ResultTable &table, QgsFeatureSink &sink, const QString &destination, Monitor &monitor )
    {
      if ( table.rows == 0 )
        return;
      // No progress from the makers: they run ahead of the writer.
      class Makers : public Monitor
      {
        public:
          explicit Makers( const Monitor &monitor )
            : mMonitor( monitor )
          {
          }
          bool cancelled() const override { return mMonitor.cancelled(); }

        private:
          const Monitor &mMonitor;
      } makers( monitor );

      const auto makeLater = [&]( std::size_t first ) {
        return std::async( std::launch::async, [&table, &makers, first] { return makeBatch( table, first, makers ); } );
      };
      std::future<QgsFeatureList> next = makeLater( 0 );
      for ( std::size_t first = 0; first < table.rows; first += BATCH_ROWS )
      {
        QgsFeatureList batch = next.get();
        const std::size_t done = first + BATCH_ROWS;
        if ( done < table.rows )
          next = makeLater( done );
        if ( !sink.addFeatures( batch, QgsFeatureSink::FastInsert ) )
          refuseWrite( table.output, destination );
        monitor.progress( std::min( 1.0, static_cast<double>( done ) / static_cast<double>( table.rows ) ) );
        stopIfCancelled( monitor );
      }
    }

  } // namespace

  OutputSet::OutputSet( const ParameterValues &values, const QStringList &names )
    : mValues( values )
  {
    for ( const QString &name : names )
    {
      const Destination destination( values, name );
      mReplaces = mReplaces || ( destination.isAsked() && destination.replaces() );
      mDestinations.emplace( name, destination );
    }
  }

  OutputSet::~OutputSet()
  {
    if ( mReplaces )
      return;
    for ( const QString &name : mWritten )
      mDestinations.at( name ).remove();
  }

  void OutputSet::check( const std::map<QString, const QgsMapLayer *> &inputs ) const
  {
    for ( const auto &[name, destination] : mDestinations )
    {
      for ( const auto &[inputName, layer] : inputs )
        destination.refuseInput( layer, inputName );
      destination.refuseUnwritable();
      for ( const auto &[otherName, other] : mDestinations )
      {
        if ( name < otherName )
          destination.refuseSamePlace( other );
      }
    }
  }

  void OutputSet::checkFormats( const std::vector<ResultTable> &tables ) const
  {
    for ( const ResultTable &table : tables )
    {
      const Destination &destination = mDestinations.at( table.output );
      if ( table.hasGaps && !destination.holdsGaps() )
        throw QgsProcessingException(
          Text::tr( "%1 has places without figures (no source or no terrain), which the format "
                    "of %2 cannot hold; choose a GeoPackage (.gpkg)." )
            .arg( table.output, destination.path() ) );
    }
  }

  QString OutputSet::write( const ResultTable &table, const QgsCoordinateReferenceSystem &crs,
    QgsProcessingFeedback &feedback, double fromPercent, double toPercent )
  {
    // Once something earlier is gone, half a result in its place would be the worst outcome: cancel is late then.
    class Unstoppable : public FeedbackMonitor
    {
      public:
        using FeedbackMonitor::FeedbackMonitor;
        bool cancelled() const override { return false; }
    };
    FeedbackMonitor stoppable( &feedback, fromPercent, toPercent );
    Unstoppable unstoppable( &feedback, fromPercent, toPercent );
    Monitor &monitor = mReplaces ? static_cast<Monitor &>( unstoppable ) : stoppable;

    stopIfCancelled( monitor );
    QString destination;
    mWritten.push_back( table.output );
    std::unique_ptr<QgsFeatureSink> sink( QgsProcessingParameters::parameterAsSink( mValues.definition( table.output ),
      mValues.values(), table.fields, table.type, crs, mValues.context(), destination ) );
    if ( !sink )
      refuseWrite( table.output, mDestinations.at( table.output ).path() );
    writeRows( table, *sink, destination, monitor );
    const bool flushed = sink->flushBuffer();
    sink.reset();
    if ( !flushed || !mDestinations.at( table.output ).holdsRows( table.rows ) )
      refuseWrite( table.output, destination );
    return destination;
  }

  QString OutputSet::writeSpool( const QString &output, const QgsFields &fields, compat::WkbType type,
    const QgsCoordinateReferenceSystem &crs, RowSpool &spool, Monitor &monitor )
  {
    stopIfCancelled( monitor );
    QString destination;
    mWritten.push_back( output );
    std::unique_ptr<QgsFeatureSink> sink( QgsProcessingParameters::parameterAsSink(
      mValues.definition( output ), mValues.values(), fields, type, crs, mValues.context(), destination ) );
    if ( !sink )
      refuseWrite( output, mDestinations.at( output ).path() );
    spool.rewind();
    for ( QgsFeatureList batch = spool.take( SPOOL_ROWS ); !batch.isEmpty(); batch = spool.take( SPOOL_ROWS ) )
    {
      if ( !sink->addFeatures( batch, QgsFeatureSink::FastInsert ) )
        refuseWrite( output, destination );
      if ( !mReplaces )
        stopIfCancelled( monitor );
    }
    const bool flushed = sink->flushBuffer();
    sink.reset();
    if ( !flushed || !mDestinations.at( output ).holdsRows( spool.rows() ) )
      refuseWrite( output, destination );
    return destination;
  }

} // namespace stillhead
