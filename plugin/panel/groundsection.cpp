// SPDX-License-Identifier: GPL-2.0-or-later
// What the terrain says of itself is the sentence that stands in the log of a run.
#include "plugin/panel/groundsection.h"

#include "plugin/panel/parametertexts.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/reading/terrainreader.h"

#include <qgsmaplayercombobox.h>

#include <QLabel>
#include <QSignalBlocker>

namespace stillhead
{

  GroundSection::GroundSection( const DisplayUnits &units, QWidget *parent )
    : Section( tr( "Ground" ), units, parent )
    , mTerrain( new QgsMapLayerComboBox( this ) )
  {
    mTerrain->setFilters( compat::LayerFilter::RasterLayer );
    mTerrain->setAllowEmptyLayer( true );
    mTerrain->setSizeAdjustPolicy( QComboBox::AdjustToMinimumContentsLengthWithIcon );
    mTerrain->setMinimumContentsLength( 8 );
    mTerrain->setLayer( nullptr );
    explain( mTerrain, parameter::TERRAIN );
    addRow( tr( "&Terrain" ), mTerrain );
    addChoice( tr( "&Heights in" ), parameter::TERRAIN_UNIT );
    mNote = addNote();
    mNote->setObjectName( QStringLiteral( "TerrainNote" ) );
    connect( mTerrain, &QgsMapLayerComboBox::layerChanged, this, &Section::edited );
  }

  QgsRasterLayer *GroundSection::terrain() const
  {
    return qobject_cast<QgsRasterLayer *>( mTerrain->currentLayer() );
  }

  void GroundSection::setTerrain( QgsRasterLayer *terrain )
  {
    const QSignalBlocker quiet( mTerrain );
    mTerrain->setLayer( terrain );
  }

  void GroundSection::describe( const Terrain *terrain )
  {
    mNote->setVisible( terrain );
    QString text = terrain ? terrain->description() : QString();
    if ( !text.isEmpty() )
      text[0] = text[0].toUpper();
    mNote->setText( text );
    setSummary( terrain
        ? tr( "%1, heights in %2" ).arg( terrain->name, QString::fromStdString( terrain->unit.unitName ) )
        : QString() );
  }

} // namespace stillhead
