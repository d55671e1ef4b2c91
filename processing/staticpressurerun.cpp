// SPDX-License-Identifier: GPL-2.0-or-later
// Nothing is created before the computation has succeeded and every format has been asked whether it can hold the result.
#include "processing/staticpressurerun.h"

#include "core/feedback/background.h"
#include "core/geo/gdalcachelimit.h"
#include "core/geo/geodesicmeasure.h"
#include "core/geo/terraintransform.h"
#include "processing/feedbackmonitor.h"
#include "processing/parameternames.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/limitsreader.h"
#include "processing/reading/unitsreader.h"
#include "processing/surfaceoutput.h"
#include "processing/text/refusaltext.h"
#include "processing/text/summarytext.h"
#include "processing/text/text.h"
#include "processing/writing/stretchoutline.h"

#include <qgsexception.h>

#include <QMap>

#include <cmath>

namespace stillhead
{

  namespace
  {

    // How the progress bar is shared out.
    constexpr double READ_TO = 8.0;
    constexpr double SOLVE_TO = 65.0;
    constexpr double SURFACE_TO = 85.0;
    constexpr double WRITE_TO = 99.0;

    std::unique_ptr<PlanToTerrain> wayToTerrain( const QgsCoordinateReferenceSystem &lines,
      const QgsCoordinateReferenceSystem &terrain, const QgsCoordinateTransformContext &context )
    {
      // The user's choice of operation, where there is one for this direction; else PROJ's best.
      const bool chosen = !context.mustReverseCoordinateOperation( lines, terrain );
      const QString operation = chosen ? context.calculateCoordinateOperation( lines, terrain ) : QString();
      return makePlanToTerrain( crsDefinition( lines ), crsDefinition( terrain ), operation.toStdString() );
    }

    double metresPerLineZ( const ParameterValues &values, const Terrain &terrain )
    {
      const int choice = values.choice( parameter::LINE_Z_UNIT );
      return choice == 0 ? terrain.unit.metresPerUnit : metresPer( static_cast<ElevationUnit>( choice - 1 ) );
    }

    double rowShare( const ResultTable &table )
    {
      return static_cast<double>( table.rows ) + 1.0;
    }

    //! Drawing outlines takes about as long as writing everything; without stretches it is nothing.
    double outlineShare( const std::vector<ResultTable> &tables )
    {
      double rows = 0.0;
      bool asked = false;
      for ( const ResultTable &table : tables )
      {
        rows += rowShare( table );
        asked = asked || ( table.output == output::STRETCHES && table.rows > 0 );
      }
      return asked ? rows : 0.0;
    }

    double workIn( const std::vector<ResultTable> &tables )
    {
      double work = outlineShare( tables );
      for ( const ResultTable &table : tables )
        work += rowShare( table );
      return work;
    }

  } // namespace

  QStringList staticPressureLayers()
  {
    return { output::SPANS, output::NODES, output::STRETCHES, output::EXTREMES, output::FINDINGS, output::SURFACE };
  }

  StaticPressureRun::StaticPressureRun(
    const ParameterValues &values, Terrain &terrain, QgsProcessingFeedback &feedback )
    : mValues( values )
    , mTerrain( terrain )
    , mFeedback( feedback )
    , mUnits( readUnits( values ) )
    , mLimits( readLimits( values, mUnits ) )
    , mStyle( resultStyle( mLimits, mUnits ) )
  {
  }

  void StaticPressureRun::read( const std::vector<DrawnLayer> &layers )
  {
    FeedbackMonitor monitor( &mFeedback, 0.0, READ_TO );
    DrawingOptions options;
    options.useLineZ = mValues.boolean( parameter::USE_LINE_Z );
    options.metresPerZ = metresPerLineZ( mValues, mTerrain );
    options.reservedFields = spanFieldNames();
    mDrawn = readDrawing( layers, options, mUnits, mValues, mFeedback, monitor );
    mSource = readSource( mValues, mUnits, mDrawn.crs, mFeedback );
    mMeasure = makePlanMeasure( crsDefinition( mDrawn.crs ) );
    mFeedback.pushInfo( Text::tr( "%1 drawn features in %2; lengths and tolerances are measured on the ground." )
                          .arg( mDrawn.features.size() )
                          .arg( crsText( mDrawn.crs ) ) );
  }

  void StaticPressureRun::solve()
  {
    const GdalCacheLimit cacheLimit;
    FeedbackMonitor monitor( &mFeedback, READ_TO, SOLVE_TO );
    const std::unique_ptr<PlanToTerrain> planToTerrain =
      wayToTerrain( mDrawn.crs, mTerrain.crs, mValues.context().transformContext() );
    StaticJob job;
    job.drawing = &mDrawn.drawing;
    job.measure = mMeasure.get();
    job.planToTerrain = planToTerrain.get();
    job.terrain = mTerrain.cache.get();
    job.source = mSource.source;
    job.sourceReachM = mSource.reachM;
    job.useLineZ = mValues.boolean( parameter::USE_LINE_Z );
    job.joins.toleranceM = readDistance( mValues, parameter::JOIN_TOLERANCE, mUnits ).value_or( job.joins.toleranceM );
    job.joins.joinCrossings = mValues.boolean( parameter::JOIN_CROSSINGS );
    job.limits = mLimits;
    job.terrainRmseM = readDistance( mValues, parameter::TERRAIN_RMSE, mUnits ).value_or( 0.0 );
    job.readingErrorPa = readPressure( mValues, parameter::READING_ERROR, mUnits ).value_or( 0.0 );
    const double sagDepthM = readSagDepthM( mValues, mUnits );
    if ( Destination( mValues, output::EXTREMES ).isAsked() )
      job.sagDepthM = sagDepthM;
    job.specificWeightNPerM3 = mUnits.specificWeightNPerM3();
    job.threads = mTerrain.threads;
    try
    {
      mResult = solveStatics( job, monitor );
    }
    catch ( const Refusal &refusal )
    {
      throw QgsProcessingException( refusalText( refusal, mSource.reachM, mUnits ) );
    }
    logSource();
    logFindings();
    warnOfElevations();
  }

  void StaticPressureRun::warnOfElevations() const
  {
    // The lowest shore and the highest summit on dry land, with room to spare.
    constexpr double LOWEST_M = -500.0;
    constexpr double HIGHEST_M = 9000.0;
    for ( const Piece &piece : mResult.pieces )
    {
      if ( !( piece.lowestM < LOWEST_M ) && !( piece.highestM > HIGHEST_M ) )
        continue;
      const double elevationM = piece.lowestM < LOWEST_M ? piece.lowestM : piece.highestM;
      mFeedback.pushWarning(
        Text::tr( "Pipe lies at an elevation of %1, which no ground has: the terrain may use a value "
                  "for “no data” without declaring it, or another unit than it says." )
          .arg( mUnits.lengthText( elevationM ) ) );
      return;
    }
  }

  void StaticPressureRun::logSource() const
  {
    const SourceReport &report = mResult.source;
    mFeedback.pushInfo(
      Text::tr( "The source joins the pipe %1 away." ).arg( mUnits.lengthText( report.distanceM, 1 ) ) );
    if ( mSource.source.groundElevationM && !std::isnan( report.terrainGroundM ) )
      mFeedback.pushInfo(
        Text::tr( "Ground at the source: %1 surveyed, which is used; %2 by the terrain; difference %3." )
          .arg( mUnits.lengthText( report.usedGroundM, 1 ), mUnits.lengthText( report.terrainGroundM, 1 ),
            mUnits.lengthText( report.usedGroundM - report.terrainGroundM, 1 ) ) );
    else if ( mSource.source.groundElevationM )
      mFeedback.pushInfo( Text::tr( "Ground at the source: %1 surveyed; the terrain has none there." )
                            .arg( mUnits.lengthText( report.usedGroundM, 1 ) ) );
    else if ( !std::isnan( report.terrainGroundM ) )
      mFeedback.pushInfo(
        Text::tr( "Ground at the source: %1 by the terrain." ).arg( mUnits.lengthText( report.terrainGroundM, 1 ) ) );
    mFeedback.pushInfo( Text::tr( "Static level: elevation %1 in the high case, %2 in the low case (%3)." )
                          .arg( mUnits.lengthText( report.levels.highM, 1 ), mUnits.lengthText( report.levels.lowM, 1 ),
                            mUnits.constantText() ) );
    if ( mSource.source.kind == SourceKind::WaterLevel && mSource.source.high < report.usedGroundM )
      mFeedback.pushWarning( Text::tr( "The water level lies below the ground at the source; make sure that it is an "
                                       "elevation, not a depth." ) );
  }

  void StaticPressureRun::logFindings() const
  {
    QMap<QString, int> counts;
    for ( const Finding &finding : mResult.findings )
      ++counts[QString::fromLatin1( findingName( finding.code ) )];
    QStringList parts;
    for ( auto count = counts.constBegin(); count != counts.constEnd(); ++count )
      parts << QStringLiteral( "%1 × %2" ).arg( count.value() ).arg( count.key() );
    if ( !parts.isEmpty() )
      mFeedback.pushInfo( Text::tr( "Findings: %1." ).arg( parts.join( QStringLiteral( ", " ) ) ) );
  }

  RunFacts StaticPressureRun::facts( const QString &summary ) const
  {
    RunFacts facts;
    facts.algorithm = Text::tr( "static pressure along pipes" );
    facts.summary = summary;
    facts.source = sourceText( mSource.source, mUnits );
    facts.sourceNote = mSource.note;
    facts.terrain = mTerrain.description();
    facts.constant = mUnits.constantText();
    facts.parameters = parameterLines( mValues.values(), staticPressureLayers() );
    return facts;
  }

  SolvedPlan StaticPressureRun::takeSolved()
  {
    std::unique_ptr<PlanToTerrain> planToTerrain =
      wayToTerrain( mDrawn.crs, mTerrain.crs, mValues.context().transformContext() );
    return { mUnits, mLimits, mStyle, std::move( mDrawn ), std::move( mSource ), std::move( mMeasure ),
      std::move( mResult ), mTerrain.unit.metresPerUnit, std::move( planToTerrain ) };
  }

  QVariantMap StaticPressureRun::write()
  {
    // Writing needs the memory more.
    mTerrain.cache->clear();
    const ResultContext context { mResult, mDrawn, *mMeasure, mUnits, mLimits, mStyle, mTerrain.unit.metresPerUnit };
    OutputSet outputs( mValues, staticPressureLayers() );
    std::vector<QgsGeometry> outlines;
    std::vector<ResultTable> tables;
    for ( ResultTable table : { spanTable( context ), nodeTable( context ), stretchTable( context, outlines ),
            extremeTable( context ), findingTable( context ) } )
    {
      if ( outputs.isAsked( table.output ) )
        tables.push_back( std::move( table ) );
    }
    outputs.checkFormats( tables );

    QVariantMap results;
    const QString summary = summaryText( context, mSource.source );
    const RunFacts runFacts = facts( summary );
    Background<std::vector<QgsGeometry>> outlineWork( [this, &context, &outputs]( Monitor &monitor ) {
      return outputs.isAsked( output::STRETCHES )
        ? stretchOutlines( context, outlineDistanceM( mUnits.lengthUnit() ), monitor )
        : std::vector<QgsGeometry>();
    } );
    const auto takeOutlines = [&]( const ProgressShares::Share &share ) {
      FeedbackMonitor monitor( &mFeedback, share.from, share.to );
      outlines = outlineWork.take( monitor );
    };
    ProgressShares shares( outputs.isAsked( output::SURFACE ) ? SURFACE_TO : SOLVE_TO, WRITE_TO, workIn( tables ) );
    writeSurface( outputs, runFacts, results );
    // Where something is replaced as it is written, all work comes first: a cancel then finds it untouched.
    if ( outputs.replacesAtOnce() )
      takeOutlines( shares.next( outlineShare( tables ) ) );
    for ( const ResultTable &table : tables )
    {
      if ( table.output == output::STRETCHES && !outputs.replacesAtOnce() )
        takeOutlines( shares.next( outlineShare( tables ) ) );
      writeTable( outputs, table, runFacts, shares.next( rowShare( table ) ), results );
    }
    outputs.commit();
    mFeedback.setProgress( 100.0 );
    results.insert( output::SUMMARY, summary );
    addNumbers( results );
    mFeedback.pushInfo( summary );
    return results;
  }

  void StaticPressureRun::writeSurface( OutputSet &outputs, const RunFacts &facts, QVariantMap &results )
  {
    if ( !outputs.isAsked( output::SURFACE ) )
      return;
    SurfaceInput input;
    input.levels = mResult.source.levels;
    input.hasLow = mSource.source.low.has_value();
    if ( !QgsProcessingParameters::isDynamic( mValues.values(), parameter::COVER ) )
      input.coverM = mUnits.metres( mValues.number( parameter::COVER ) );
    FeedbackMonitor monitor( &mFeedback, SOLVE_TO, SURFACE_TO );
    WrittenLayer written;
    written.id = QgsProcessingParameters::parameterAsOutputLayer(
      mValues.definition( output::SURFACE ), mValues.values(), mValues.context() );
    written.what = ResultLayer::Surface;
    written.metadata =
      resultMetadata( facts, mValues.definition( output::SURFACE )->description(), layerNameOf( written.id ) );
    writeSurfaceFile( written.id, input, mTerrain, mUnits, monitor );
    outputs.noteWritten( output::SURFACE );
    finishOnLoading( written, mStyle, mValues.context() );
    results.insert( output::SURFACE, written.id );
    mWritten.push_back( written );
  }

  void StaticPressureRun::writeTable( OutputSet &outputs, const ResultTable &table, const RunFacts &facts,
    const ProgressShares::Share &share, QVariantMap &results )
  {
    WrittenLayer written;
    written.id = outputs.write( table, mDrawn.crs, mFeedback, share.from, share.to );
    written.what = table.what;
    written.metadata =
      resultMetadata( facts, mValues.definition( table.output )->description(), layerNameOf( written.id ) );
    written.geoPackage = outputs.geoPackageOf( table.output );
    written.fields = table.fields;
    written.type = table.type;
    finishOnLoading( written, mStyle, mValues.context() );
    results.insert( table.output, written.id );
    mWritten.push_back( written );
  }

  void StaticPressureRun::addNumbers( QVariantMap &results ) const
  {
    const Totals &totals = mResult.totals;
    results.insert( output::SPAN_COUNT, static_cast<qlonglong>( mResult.pieces.size() ) );
    results.insert( output::NODE_COUNT, static_cast<qlonglong>( mResult.network.nodes.size() ) );
    results.insert( output::STRETCH_COUNT, static_cast<qlonglong>( mResult.stretches.size() ) );
    results.insert( output::FINDING_COUNT, static_cast<qlonglong>( mResult.findings.size() ) );
    results.insert( output::STATIC_LEVEL_HIGH, mUnits.lengthValue( mResult.source.levels.highM ) );
    results.insert( output::STATIC_LEVEL_LOW, mUnits.lengthValue( mResult.source.levels.lowM ) );
    results.insert( output::P_LOWEST, mUnits.pressureValue( totals.lowestPa ) );
    results.insert( output::P_HIGHEST, mUnits.pressureValue( totals.highestPa ) );
    results.insert( output::LENGTH_TOTAL, mUnits.lengthValue( totals.lengthM ) );
    results.insert( output::LENGTH_WITHIN, mUnits.lengthValue( totals.withinM ) );
    results.insert( output::LENGTH_OVER, mUnits.lengthValue( totals.overM ) );
    results.insert( output::LENGTH_SHORT, mUnits.lengthValue( totals.shortM ) );
    results.insert( output::LENGTH_NO_SOURCE, mUnits.lengthValue( totals.noSourceM ) );
    results.insert( output::LENGTH_NO_TERRAIN, mUnits.lengthValue( totals.noTerrainM ) );
    results.insert( output::LENGTH_CLOSE_CALL, mUnits.lengthValue( totals.closeCallM ) );
  }

} // namespace stillhead
