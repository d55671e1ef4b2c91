// SPDX-License-Identifier: GPL-2.0-or-later
// Facts go into the history, one entry each, so that they stay readable apart; cautions go into the abstract.
#include "processing/writing/resultmetadata.h"

#include "core/version.h"
#include "processing/text/cautions.h"
#include "processing/text/text.h"

#include <qgsmaplayer.h>
#include <qgsprocessingparameters.h>
#include <qgsproperty.h>
#include <qgsreferencedgeometry.h>

#include <QDateTime>

namespace stillhead
{

  namespace
  {

    QString valueText( const QVariant &value )
    {
      if ( auto *layer = qobject_cast<QgsMapLayer *>( value.value<QObject *>() ) )
        return QStringLiteral( "%1 (%2)" ).arg( layer->name(), layer->publicSource() );
      if ( value.canConvert<QgsProcessingFeatureSourceDefinition>() )
        return valueText( QVariant::fromValue( value.value<QgsProcessingFeatureSourceDefinition>().source ) );
      if ( value.canConvert<QgsProperty>() )
        return value.value<QgsProperty>().asExpression();
      if ( value.canConvert<QgsReferencedPointXY>() )
      {
        const QgsReferencedPointXY point = value.value<QgsReferencedPointXY>();
        return QStringLiteral( "%1 [%2]" ).arg( point.toString( 6 ), point.crs().authid() );
      }
      if ( value.canConvert<QgsPointXY>() )
        return value.value<QgsPointXY>().toString( 6 );
      return value.toString();
    }

  } // namespace

  QStringList parameterLines( const QVariantMap &parameters, const QStringList &leaveOut )
  {
    QStringList lines;
    for ( auto parameter = parameters.constBegin(); parameter != parameters.constEnd(); ++parameter )
    {
      if ( leaveOut.contains( parameter.key() ) )
        continue;
      const QString value = valueText( parameter.value() );
      if ( !value.isEmpty() )
        lines << QStringLiteral( "%1 = %2" ).arg( parameter.key(), value );
    }
    return lines;
  }

  QStringList factLines( const RunFacts &facts )
  {
    QStringList lines;
    lines << Text::tr( "Made by Stillhead %1, %2, on %3" )
               .arg( QString::fromLatin1( versionText() ), facts.algorithm,
                 QDateTime::currentDateTime().toString( Qt::ISODate ) );
    lines << Text::tr( "Source: %1" ).arg( facts.source );
    if ( !facts.sourceNote.isEmpty() )
      lines << Text::tr( "Note on the source: %1" ).arg( facts.sourceNote );
    lines << Text::tr( "Ground: %1" ).arg( facts.terrain );
    lines << Text::tr( "Weight of water: %1" ).arg( facts.constant );
    lines << facts.parameters;
    return lines;
  }

  QgsLayerMetadata resultMetadata( const RunFacts &facts, const QString &title, const QString &identifier )
  {
    QgsLayerMetadata metadata;
    metadata.setType( QStringLiteral( "dataset" ) );
    metadata.setTitle( title );
    metadata.setIdentifier( identifier );
    QStringList paragraphs;
    if ( !facts.summary.isEmpty() )
      paragraphs << facts.summary;
    else
      paragraphs << runningWaterCaution() << safetyCaution();
    metadata.setAbstract( paragraphs.join( QStringLiteral( "\n\n" ) ) );
    for ( const QString &line : factLines( facts ) )
      metadata.addHistoryItem( line );
    return metadata;
  }

} // namespace stillhead
