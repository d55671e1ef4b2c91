// SPDX-License-Identifier: GPL-2.0-or-later
// Reads layer after layer; invalid geometry is welcome, since only its vertices count.
#include "processing/reading/drawingreader.h"

#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/reading/coverreader.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/lineextractor.h"
#include "processing/text/text.h"

#include <qgsexception.h>

#include <QHash>

#include <algorithm>

namespace stillhead
{

  namespace
  {

    //! Names of systems as numbers; the blank one is 0.
    class SystemReader
    {
      public:
        explicit SystemReader( Drawing &drawing )
          : mDrawing( drawing )
        {
        }

        void beginLayer( const QgsFields &fields )
        {
          mField = -1;
          for ( int i = 0; i < fields.count() && mField < 0; ++i )
          {
            if ( fields.at( i ).name().compare( field::SYSTEM, Qt::CaseInsensitive ) == 0 )
              mField = i;
          }
        }

        int systemOf( const QgsFeature &feature )
        {
          const QVariant value = mField < 0 ? QVariant() : feature.attribute( mField );
          const QString name = value.isNull() ? QString() : value.toString().trimmed();
          if ( name.isEmpty() )
            return 0;
          const auto known = mNumbers.constFind( name );
          if ( known != mNumbers.constEnd() )
            return *known;
          const int number = static_cast<int>( mDrawing.systems.size() );
          mDrawing.systems.push_back( name.toStdString() );
          mNumbers.insert( name, number );
          return number;
        }

      private:
        Drawing &mDrawing;
        QHash<QString, int> mNumbers;
        int mField = -1;
    };

    QString layerText( const DrawnLayer &layer )
    {
      return QStringLiteral( "%1 (“%2”)" ).arg( layer.parameterName, layer.source->sourceName() );
    }

    //! How many features there are to read; sources that do not know their number count for none.
    double featureTotal( const std::vector<DrawnLayer> &layers )
    {
      double total = 1.0;
      for ( const DrawnLayer &layer : layers )
        total += static_cast<double>( std::max( 0LL, static_cast<long long>( layer.source->featureCount() ) ) );
      return total;
    }

    void readLayer( const DrawnLayer &layer, std::size_t number, DrawnInput &input, LineExtractor &extractor,
      CoverReader &covers, SystemReader &systems, double total, Monitor &monitor )
    {
      const QgsFields fields = layer.source->fields();
      covers.beginLayer( fields, layer.expressions, layerText( layer ) );
      systems.beginLayer( fields );
      QgsFeature feature;
      QgsFeatureIterator features = layer.source->getFeatures();
      while ( features.nextFeature( feature ) )
      {
        stopIfCancelled( monitor );
        DrawnLine model;
        model.role = layer.role;
        model.system = systems.systemOf( feature );
        model.coverM = covers.coverM( feature );
        model.feature = static_cast<int>( input.features.size() );
        try
        {
          extractor.add( feature.geometry(), model );
        }
        catch ( const QgsCsException & )
        {
          throw QgsProcessingException(
            Text::tr( "Feature %1 of %2 cannot be reprojected from %3 to %4; check the layers' "
                      "CRSs." )
              .arg( feature.id() )
              .arg( layerText( layer ), crsText( layer.source->sourceCrs() ), crsText( input.crs ) ) );
        }
        input.features.push_back(
          { layer.role, feature.id(), input.fields.attributes( feature.attributes(), number ) } );
        if ( input.features.size() % 256 == 0 )
          monitor.progress( std::min( 1.0, static_cast<double>( input.features.size() ) / total ) );
      }
    }

  } // namespace

  DrawnInput readDrawing( const std::vector<DrawnLayer> &layers, const DrawingOptions &options,
    const DisplayUnits &units, const ParameterValues &values, QgsProcessingFeedback &feedback, Monitor &monitor )
  {
    DrawnInput input;
    std::vector<DrawnLayerFields> layerFields;
    for ( const DrawnLayer &layer : layers )
    {
      requireCrs( layer.source->sourceCrs(), layer.parameterName, layer.source->sourceName() );
      layer.source->setInvalidGeometryCheck( compat::GeometryCheck::No );
      layerFields.push_back( { layer.source->fields(), layer.keys } );
    }
    input.crs = layers.front().source->sourceCrs();
    input.fields = DrawnFields( layerFields, options.reservedFields );
    for ( const QString &renamed : input.fields.renamed() )
      feedback.pushInfo(
        Text::tr( "A drawn field bears a name that the result needs and is kept under another: %1." ).arg( renamed ) );

    CoverReader covers( values, units );
    SystemReader systems( input.drawing );
    const double total = featureTotal( layers );
    long long curves = 0;
    for ( std::size_t i = 0; i < layers.size(); ++i )
    {
      LineExtractor extractor( input.drawing, layers[i].source->sourceCrs(), input.crs,
        values.context().transformContext(), options.useLineZ ? options.metresPerZ : 0.0 );
      readLayer( layers[i], i, input, extractor, covers, systems, total, monitor );
      curves += extractor.curves();
      if ( layers[i].source->sourceCrs() != input.crs )
        feedback.pushInfo(
          Text::tr( "%1 is reprojected from %2 to %3." )
            .arg( layerText( layers[i] ), crsText( layers[i].source->sourceCrs() ), crsText( input.crs ) ) );
      if ( layers[i].role == Role::Mainline && input.features.empty() )
        throw QgsProcessingException( Text::tr( "%1 has no lines; draw the mainlines first, or choose another layer." )
                                        .arg( layerText( layers[i] ) ) );
    }
    covers.report( feedback );
    if ( curves > 0 )
      feedback.pushInfo(
        Text::tr( "%1 curved lines are followed by chords to within 1 cm on the ground." ).arg( curves ) );
    return input;
  }

} // namespace stillhead
