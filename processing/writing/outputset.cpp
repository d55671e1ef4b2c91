// SPDX-License-Identifier: GPL-2.0-or-later
// While one batch of rows is written the next is made on the other threads: writing is bound to one.
#include "processing/writing/outputset.h"

#include "core/feedback/parallel.h"
#include "processing/feedbackmonitor.h"
#include "processing/text/text.h"
#include "processing/writing/resultfinish.h"

#include <qgsexception.h>
#include <qgsfeaturesink.h>
#include <qgsprocessingutils.h>

#include <QDir>
#include <QFileInfo>

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

    [[noreturn]] void refuseWrite( const QString &output, const QString &destination, const QString &reason = {} )
    {
      throw QgsProcessingException(
        Text::tr( "%1 could not be written to %2%3; check that the place has room and that nobody else holds it open." )
          .arg( output, destination, reason.isEmpty() ? QString() : QStringLiteral( " (%1)" ).arg( reason ) ) );
    }

    void writeRows( const ResultTable &table, const std::function<void( QgsFeatureList & )> &add, Monitor &monitor )
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
        add( batch );
        monitor.progress( std::min( 1.0, static_cast<double>( done ) / static_cast<double>( table.rows ) ) );
        stopIfCancelled( monitor );
      }
    }

  } // namespace

  //! Where the rows of one output go: our own file, or a sink of the platform's.
  class OutputSet::Rows
  {
    public:
      Rows( OutputSet &set, const QString &output, const QgsFields &fields, compat::WkbType type,
        const QgsCoordinateReferenceSystem &crs )
        : mOutput( output )
      {
        const Destination &destination = set.mDestinations.at( output );
        if ( destination.isOwnGeoPackage() )
        {
          mFile = &set.fileFor( destination );
          mId = set.idOf( output );
          if ( !mFile->beginLayer( layerNameOf( mId ), fields, type, crs ) )
            refuseWrite( output, destination.path(), mFile->reason() );
          set.loadOnCompletion( output, mId );
          return;
        }
        set.mWritten.push_back( output );
        mSink.reset( QgsProcessingParameters::parameterAsSink(
          set.mValues.definition( output ), set.mValues.values(), fields, type, crs, set.mValues.context(), mId ) );
        if ( !mSink )
          refuseWrite( output, destination.path() );
      }

      void add( QgsFeatureList &rows )
      {
        if ( mFile && !mFile->add( rows ) )
          refuseWrite( mOutput, mId, mFile->reason() );
        if ( mSink && !mSink->addFeatures( rows, QgsFeatureSink::FastInsert ) )
          refuseWrite( mOutput, mId );
      }

      //! The id of the layer, once all its rows are there.
      QString finished()
      {
        if ( mFile && !mFile->endLayer() )
          refuseWrite( mOutput, mId, mFile->reason() );
        if ( mSink && !mSink->flushBuffer() )
          refuseWrite( mOutput, mId );
        mSink.reset();
        return mId;
      }

    private:
      QString mOutput;
      QString mId;
      GeoPackageFile *mFile = nullptr;
      std::unique_ptr<QgsFeatureSink> mSink;
  };

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
    Rows rows( *this, table.output, table.fields, table.type, crs );
    writeRows(
      table, [&rows]( QgsFeatureList &batch ) { rows.add( batch ); }, monitor );
    return rows.finished();
  }

  QString OutputSet::writeSpool( const QString &output, const QgsFields &fields, compat::WkbType type,
    const QgsCoordinateReferenceSystem &crs, RowSpool &spool, Monitor &monitor )
  {
    stopIfCancelled( monitor );
    Rows rows( *this, output, fields, type, crs );
    spool.rewind();
    for ( QgsFeatureList batch = spool.take( SPOOL_ROWS ); !batch.isEmpty(); batch = spool.take( SPOOL_ROWS ) )
    {
      rows.add( batch );
      if ( !mReplaces )
        stopIfCancelled( monitor );
    }
    return rows.finished();
  }

  GeoPackageFile &OutputSet::fileFor( const Destination &destination )
  {
    const QString path = QDir::cleanPath( QFileInfo( destination.path() ).absoluteFilePath() );
    std::unique_ptr<GeoPackageFile> &file = mFiles[path];
    if ( !file )
      file = std::make_unique<GeoPackageFile>( path, destination.table().isEmpty() );
    return *file;
  }

  QString OutputSet::geoPackageOf( const QString &name ) const
  {
    const Destination &destination = mDestinations.at( name );
    return destination.isOwnGeoPackage() ? destination.path() : QString();
  }

  QString OutputSet::idOf( const QString &name ) const
  {
    const Destination &destination = mDestinations.at( name );
    return destination.table().isEmpty()
      ? destination.path()
      : QStringLiteral( "%1|layername=%2" ).arg( destination.path(), destination.table() );
  }

  //! What the platform does for the sinks that it makes itself.
  void OutputSet::loadOnCompletion( const QString &name, const QString &id ) const
  {
    const QVariant value = mValues.values().value( name );
    if ( !value.canConvert<QgsProcessingOutputLayerDefinition>() )
      return;
    const auto definition = value.value<QgsProcessingOutputLayerDefinition>();
    if ( !definition.destinationProject )
      return;
    const QString title =
      definition.destinationName.isEmpty() ? mValues.definition( name )->description() : definition.destinationName;
    mValues.context().addLayerToLoadOnCompletion( id,
      QgsProcessingContext::LayerDetails(
        title, definition.destinationProject, name, QgsProcessingUtils::LayerHint::Vector ) );
  }

  void OutputSet::commit()
  {
    for ( const auto &[path, file] : mFiles )
    {
      if ( !file->commit() )
        throw QgsProcessingException(
          Text::tr( "%1 could not be completed%2; check that the place has room and that "
                    "nobody else holds it open." )
            .arg( path, file->reason().isEmpty() ? QString() : QStringLiteral( " (%1)" ).arg( file->reason() ) ) );
    }
    mFiles.clear();
    mWritten.clear();
  }

} // namespace stillhead
