// SPDX-License-Identifier: GPL-2.0-or-later
// Styles are stored after the tables; if that fails the file goes away again, for a plan without forms would surprise.
#include "processing/newplan/newplanfile.h"

#include "processing/newplan/planform.h"
#include "processing/newplan/planlayers.h"
#include "processing/text/text.h"
#include "processing/writing/geopackageextras.h"
#include "processing/writing/geopackagefile.h"

#include <qgsexception.h>
#include <qgslayermetadata.h>

#include <QDir>
#include <QFile>
#include <QFileInfo>

namespace stillhead
{

  namespace
  {

    void refuseUnlessNew( const QString &path )
    {
      const QFileInfo file( path );
      if ( file.suffix().compare( QLatin1String( "gpkg" ), Qt::CaseInsensitive ) != 0 )
        throw QgsProcessingException(
          Text::tr( "PLAN is “%1”; a plan is kept in a GeoPackage: give a name that ends in .gpkg." ).arg( path ) );
      if ( file.exists() )
        throw QgsProcessingException(
          Text::tr( "PLAN “%1” is there already and is left as it is; give another name." ).arg( path ) );
      if ( !file.absoluteDir().exists() )
        throw QgsProcessingException(
          Text::tr( "The folder “%1” of PLAN does not exist; make it first, or choose another." )
            .arg( file.absolutePath() ) );
    }

    QgsLayerMetadata metadataOf( const PlanLayer &plan, const DisplayUnits &units )
    {
      QgsLayerMetadata metadata;
      metadata.setIdentifier( plan.table );
      metadata.setTitle( plan.title );
      metadata.setType( QStringLiteral( "dataset" ) );
      metadata.setAbstract( Text::tr( "Planning layer. Pressures are in %1; elevations, lengths, depths and heights in "
                                      "%2. Choose the same units where pressure is computed from it." )
                              .arg( units.pressureName(), units.lengthName() ) );
      return metadata;
    }

  } // namespace

  void makePlanFile( const QString &path, const QgsCoordinateReferenceSystem &crs, const DisplayUnits &units )
  {
    refuseUnlessNew( path );
    std::vector<LayerExtras> extras;
    {
      GeoPackageFile file( path, true );
      bool made = true;
      for ( const PlanLayer &plan : planLayers( units ) )
      {
        made = made && file.beginLayer( plan.table, plan.plainFields(), plan.type, crs ) && file.endLayer();
        extras.push_back( { plan.table, planStyleText( plan ), metadataOf( plan, units ) } );
      }
      if ( !made || !file.commit() )
        throw QgsProcessingException( Text::tr( "PLAN “%1” could not be made; check the folder and its free space. %2" )
                                        .arg( path, file.reason() )
                                        .trimmed() );
    }
    const QString problem = storeExtras( path, extras );
    if ( problem.isEmpty() )
      return;
    QFile::remove( path );
    throw QgsProcessingException( problem );
  }

} // namespace stillhead
