// SPDX-License-Identifier: GPL-2.0-or-later
// The file is made in the background; the project is touched in the main thread, and only if that was asked for.
#include "processing/newplan/newplanalgorithm.h"

#include "processing/newplan/newplanfile.h"
#include "processing/newplan/planlayers.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/reading/layercrs.h"
#include "processing/reading/unitsreader.h"
#include "processing/text/cautions.h"
#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsproject.h>

namespace stillhead
{

  namespace
  {

    constexpr double SNAP_PIXELS = 12.0;

    //! Output that gives the layer of \a table: "MAINLINES".
    QString outputOf( const PlanLayer &plan )
    {
      return plan.table.toUpper();
    }

    QString layerIn( const QString &path, const PlanLayer &plan )
    {
      return QStringLiteral( "%1|layername=%2" ).arg( path, plan.table );
    }

    DisplayUnits unitsOf( const ParameterValues &values )
    {
      constexpr double ANY_TEMPERATURE = 15.0;
      return DisplayUnits( static_cast<PressureUnit>( values.choice( parameter::PRESSURE_UNIT ) ),
        static_cast<LengthUnit>( values.choice( parameter::LENGTH_UNIT ) ), ANY_TEMPERATURE );
    }

  } // namespace

  QString NewPlanAlgorithm::name() const
  {
    return algorithm::NEW_PLAN;
  }

  QString NewPlanAlgorithm::displayName() const
  {
    return Text::tr( "New plan" );
  }

  QString NewPlanAlgorithm::shortDescription() const
  {
    return Text::tr( "A GeoPackage to draw irrigation pipe in: mainlines, laterals, sources and devices, with forms." );
  }

  QString NewPlanAlgorithm::shortHelpString() const
  {
    return QStringList {
      Text::tr(
        "Makes a new GeoPackage with four empty layers to draw in: mainlines, laterals, sources and devices. Each "
        "comes with its fields, a form that asks for them with their units, advice where a value cannot be "
        "right, and symbols." ),
      Text::tr(
        "Inputs: the CRS to draw in, best a projected one made for the place, and the units in which the fields "
        "are filled in." ),
      Text::tr( "Outputs: PLAN, the GeoPackage; MAINLINES, LATERALS, SOURCES and DEVICES, its layers, ready to be "
                "inputs of the other algorithms. Where the layers are added to the project, snapping to ends and lines "
                "is turned on, since pipe joins only where ends meet a line." ),
      Text::tr(
        "Units: the chosen ones stand in the names that the form shows and in the layers' metadata; choose the "
        "same where pressure is computed. Inside diameters are in inches with feet, in millimetres with metres." ),
      Text::tr( "Limits: a file that is there already is never written over." ), runningWaterCaution(), safetyCaution()
    }
      .join( QStringLiteral( "\n\n" ) );
  }

  QStringList NewPlanAlgorithm::tags() const
  {
    return Text::tr( "irrigation,plan,draw,layers,geopackage,mainline,lateral,source,device,form,template" )
      .split( ',' );
  }

  QgsProcessingAlgorithm *NewPlanAlgorithm::createInstance() const
  {
    return new NewPlanAlgorithm();
  }

  void NewPlanAlgorithm::initAlgorithm( const QVariantMap & )
  {
    ParameterList list;
    list.emplace_back(
      new QgsProcessingParameterCrs( parameter::CRS, Text::tr( "CRS to draw in" ), QStringLiteral( "ProjectCrs" ) ) );
    list.back()->setHelp( Text::tr( "Of all four layers. Default: the project's." ) );
    for ( ParameterPointer &shared : unitParameters() )
    {
      if ( shared->name() == parameter::PRESSURE_UNIT || shared->name() == parameter::LENGTH_UNIT )
        list.push_back( std::move( shared ) );
    }
    list.emplace_back( new QgsProcessingParameterBoolean(
      parameter::ADD_TO_PROJECT, Text::tr( "Add the layers to the project and turn snapping on" ), true ) );
    list.back()->setHelp( Text::tr( "Only where the run has a project that shows layers. Default: yes." ) );
    addParameters( std::move( list ) );
    addParameter( new QgsProcessingParameterFileDestination(
      parameter::PLAN, Text::tr( "Planning GeoPackage" ), Text::tr( "GeoPackage (*.gpkg)" ) ) );
    for ( const PlanLayer &plan : planLayers( DisplayUnits( PressureUnit::Psi, LengthUnit::Foot, 15.0 ) ) )
      addOutput( new QgsProcessingOutputVectorLayer( outputOf( plan ), plan.title ) );
  }

  QVariantMap NewPlanAlgorithm::processAlgorithm(
    const QVariantMap &parameters, QgsProcessingContext &context, QgsProcessingFeedback *feedback )
  {
    return guarded( [&] {
      const ParameterValues values = valuesOf( parameters, context );
      const QgsCoordinateReferenceSystem crs = parameterAsCrs( parameters, parameter::CRS, context );
      if ( !crs.isValid() )
        throw QgsProcessingException( Text::tr( "CRS is “%1”, which is not known; choose the CRS to draw in." )
                                        .arg( parameters.value( parameter::CRS ).toString() ) );
      const QString path = parameterAsFileOutput( parameters, parameter::PLAN, context );
      makePlanFile( path, crs, unitsOf( values ) );
      QgsProcessingFeedback silent;
      QgsProcessingFeedback &log = feedbackOr( feedback, silent );
      log.pushInfo( Text::tr( "Made %1 in %2." ).arg( path, crsText( crs ) ) );
      if ( crs.isGeographic() )
        log.pushWarning(
          Text::tr( "The CRS counts in degrees: lengths come out right, but drawing to measure is easier in a "
                    "projected one." ) );

      QVariantMap results { { parameter::PLAN, path } };
      mAddsToProject = values.boolean( parameter::ADD_TO_PROJECT ) && context.project();
      for ( const PlanLayer &plan : planLayers( unitsOf( values ) ) )
      {
        results.insert( outputOf( plan ), layerIn( path, plan ) );
        if ( mAddsToProject )
          context.addLayerToLoadOnCompletion( layerIn( path, plan ),
            QgsProcessingContext::LayerDetails( plan.title, context.project(), outputOf( plan ) ) );
      }
      return results;
    } );
  }

  QVariantMap NewPlanAlgorithm::postProcessAlgorithm( QgsProcessingContext &context, QgsProcessingFeedback * )
  {
    if ( mAddsToProject && context.project() )
    {
      QgsSnappingConfig snapping = context.project()->snappingConfig();
      compat::snapToAllLayers( snapping, SNAP_PIXELS );
      context.project()->setSnappingConfig( snapping );
    }
    return QVariantMap();
  }

} // namespace stillhead
